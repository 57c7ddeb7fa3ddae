/** What a view lets people choose, as groups of radio buttons; kept from sheet to sheet, so that the keyboard stays where it is. */
import { element } from "../page/element.js";
import type { Choice } from "./sheet.js";

export interface Choices {
  readonly element: HTMLElement;
  show(choices: readonly Choice[]): void;
}

/** `group`: a name that no other group of the page has. */
export function createChoices(group: string, onChoose: (key: string, value: string) => void): Choices {
  const box = element("div", { class: "choices" });
  let shown = "";
  return {
    element: box,
    show(choices) {
      const next = JSON.stringify(choices);
      if (next === shown) return;
      const isSameBut = withoutChosen(shown) === withoutChosen(next);
      shown = next;
      if (!isSameBut) box.replaceChildren(...choices.map((choice) => groupOf(group, choice, onChoose)));
      for (const { key, chosen } of choices) {
        for (const input of box.querySelectorAll<HTMLInputElement>(`input[name="${group}-${key}"]`)) {
          input.checked = input.value === chosen;
        }
      }
    },
  };
}

function groupOf(group: string, { key, label, options }: Choice, onChoose: (key: string, value: string) => void): HTMLElement {
  const inputs = options.map(({ value, words }) => {
    const input = element("input", { attributes: { type: "radio", name: `${group}-${key}`, value } });
    input.addEventListener("change", () => onChoose(key, value));
    return element("label", { class: "choice" }, [input, document.createTextNode(words)]);
  });
  return element("fieldset", {}, [element("legend", { text: label }), ...inputs]);
}

function withoutChosen(choices: string): string {
  return JSON.stringify(JSON.parse(choices || "[]"), (key, value: unknown) => (key === "chosen" ? undefined : value));
}

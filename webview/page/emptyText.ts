/** What the page says instead of a chart, and what to do then. */
import type { Nothing } from "../../extension/protocol/chartMessages.js";
import { element } from "./element.js";

const TEXTS: Readonly<Record<Nothing["reason"], readonly string[]>> = {
  "nothing-declared": [
    'No mechanism is declared in this workspace yet. Declare one with mechanism(…) from "loadmark", and its chart appears here.',
  ],
  "nothing-computed": [
    "No mechanism can be computed yet. The Problems view says which values are missing; the chart appears here once they are known.",
  ],
  "does-not-apply": [],
};

export function emptySentences({ reason, says }: Nothing): readonly string[] {
  return [...TEXTS[reason], ...says];
}

export function showEmpty(box: HTMLElement, nothing: Nothing): void {
  const example =
    nothing.example === null ? [] : [element("pre", { class: "example" }, [element("code", { text: nothing.example })])];
  box.replaceChildren(...emptySentences(nothing).map((text) => element("p", { text })), ...example);
}

/** Facts of a sheet, with those of the saved result where they differ. */
import type { Fact } from "../frame/sheet.js";
import { element } from "./element.js";

export function showFacts(list: HTMLElement, facts: readonly Fact[]): void {
  list.replaceChildren(
    ...facts.map(({ name, now, was }) =>
      element("div", { class: "fact" }, [
        element("dt", { text: name }),
        element("dd", {}, [
          element("span", { class: "now", text: now }),
          ...(was === null ? [] : [element("span", { class: "was", text: `was ${was}` })]),
        ]),
      ]),
    ),
  );
}

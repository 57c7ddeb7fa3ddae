/** All values at the cursor, as cells that keep their places. */
import type { ReadOut, ReadOutRow } from "../frame/sheet.js";
import type { Theme } from "../theme/theme.js";
import { element } from "./element.js";

export function showReadout(table: HTMLTableElement, { at, names, head, rows }: ReadOut, theme: Theme): void {
  table.replaceChildren(
    element("caption", { text: `At ${at}${names === "" ? "" : `: ${names}`}` }),
    element("thead", {}, [
      element("tr", {}, [element("td"), ...head.map((text) => element("th", { text, attributes: { scope: "col" } }))]),
    ]),
    element(
      "tbody",
      {},
      rows.map(({ name, cells, swatch }) =>
        element("tr", {}, [
          element("th", { attributes: { scope: "row" } }, [...keyOf(swatch, theme), document.createTextNode(name)]),
          ...cells.map((text) => element("td", { text })),
        ]),
      ),
    ),
  );
}

function keyOf(swatch: ReadOutRow["swatch"], theme: Theme): HTMLElement[] {
  if (swatch === undefined) return [];
  const canvas = element("canvas", { class: "swatch" });
  swatch(canvas, theme);
  return [canvas];
}

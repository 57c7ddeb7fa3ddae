/** All values at the cursor, as cells that keep their places. */
import type { ReadOut } from "../frame/sheet.js";
import { element } from "./element.js";

export function showReadout(table: HTMLTableElement, { at, names, head, rows }: ReadOut): void {
  table.replaceChildren(
    element("caption", { text: `At ${at}${names === "" ? "" : `: ${names}`}` }),
    element("thead", {}, [
      element("tr", {}, [element("td"), ...head.map((text) => element("th", { text, attributes: { scope: "col" } }))]),
    ]),
    element(
      "tbody",
      {},
      rows.map(({ name, cells }) =>
        element("tr", {}, [
          element("th", { text: name, attributes: { scope: "row" } }),
          ...cells.map((text) => element("td", { text })),
        ]),
      ),
    ),
  );
}

/** A table of a sheet as elements of the page. */
import type { Table } from "../frame/sheet.js";
import { element } from "./element.js";

export function showDataTable(table: HTMLTableElement, { caption, head, rows }: Table): void {
  table.replaceChildren(
    element("caption", { text: caption }),
    element("thead", {}, [
      element(
        "tr",
        {},
        head.map((text) => element("th", { text, attributes: { scope: "col" } })),
      ),
    ]),
    element(
      "tbody",
      {},
      rows.map(([first = "", ...cells]) =>
        element("tr", {}, [
          element("th", { text: first, attributes: { scope: "row" } }),
          ...cells.map((text) => element("td", { text })),
        ]),
      ),
    ),
  );
}

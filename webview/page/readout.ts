/** All values at the cursor, as cells that keep their places: while a cursor moves only texts change. */
import type { ReadOut, ReadOutRow } from "../frame/sheet.js";
import type { Theme } from "../theme/theme.js";
import { element, setText } from "./element.js";

export interface ReadoutTable {
  show(read: ReadOut, theme: Theme): void;
}

export function createReadout(table: HTMLTableElement): ReadoutTable {
  let built = "";
  let caption: HTMLElement | undefined;
  let cells: readonly (readonly HTMLElement[])[] = [];
  const build = (read: ReadOut, theme: Theme): void => {
    caption = element("caption");
    cells = read.rows.map((row) => row.cells.map(() => element("td")));
    table.replaceChildren(
      caption,
      element("thead", {}, [
        element("tr", {}, [element("td"), ...read.head.map((text) => element("th", { text, attributes: { scope: "col" } }))]),
      ]),
      element(
        "tbody",
        {},
        read.rows.map(({ name, swatch }, index) =>
          element("tr", {}, [
            element("th", { attributes: { scope: "row" } }, [...keyOf(swatch, theme), document.createTextNode(name)]),
            ...(cells[index] ?? []),
          ]),
        ),
      ),
    );
  };
  return {
    show(read, theme) {
      const { at, names, head, rows } = read;
      const wanted = JSON.stringify([
        head,
        rows.map(({ name, cells: own, swatch }) => [name, own.length, swatch !== undefined]),
        theme,
      ]);
      if (wanted !== built) build(read, theme);
      built = wanted;
      if (caption !== undefined) setText(caption, `At ${at}${names === "" ? "" : `: ${names}`}`);
      for (const [row, { cells: texts }] of rows.entries()) {
        for (const [column, text] of texts.entries()) {
          const cell = cells[row]?.[column];
          if (cell !== undefined) setText(cell, text);
        }
      }
    },
  };
}

function keyOf(swatch: ReadOutRow["swatch"], theme: Theme): HTMLElement[] {
  if (swatch === undefined) return [];
  const canvas = element("canvas", { class: "swatch" });
  swatch(canvas, theme);
  return [canvas];
}

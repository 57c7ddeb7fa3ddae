/** The table behind the plots: the same points in numbers. */
import { QUANTITIES } from "../plots/quantities.js";
import { type Stop, thinned } from "../stops.js";
import { type ChartUnits, shareNumber, torqueNumber, valueNumber } from "../units.js";
import { element } from "./element.js";

/** About this many rows beside the named ones. */
const ROWS = 20;

export function showDataTable(table: HTMLTableElement, mechanism: string, stops: readonly Stop[], units: ChartUnits): void {
  const head = [
    `Torque (${units.torque.text})`,
    "Share of stall (%)",
    ...QUANTITIES.map(({ title, name }) => `${title} (${units.of[name].text})`),
    ...QUANTITIES.map(({ title, name }) => `${title}, sheet (${units.of[name].text})`),
    "Point",
  ];
  table.replaceChildren(
    element("caption", { text: `${mechanism}: one motor over torque` }),
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
      thinned(stops, ROWS).map((stop) => rowOf(stop, units)),
    ),
  );
}

function rowOf({ torqueNm, shareOfStall, available, sheet, names }: Stop, units: ChartUnits): HTMLElement {
  const cells = [
    shareNumber(shareOfStall),
    ...QUANTITIES.map((quantity) => valueNumber(units, quantity, available)),
    ...QUANTITIES.map((quantity) => valueNumber(units, quantity, sheet)),
    names.join(", "),
  ];
  return element("tr", {}, [
    element("th", { text: torqueNumber(units, torqueNm), attributes: { scope: "row" } }),
    ...cells.map((text) => element("td", { text })),
  ]);
}

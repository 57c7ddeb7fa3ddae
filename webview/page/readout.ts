/** All values at the cursor, as cells that keep their places and as one sentence for those who hear it. */
import { QUANTITIES } from "../plots/quantities.js";
import type { Stop } from "../stops.js";
import { type ChartUnits, shareText, writeTorque, writeValue } from "../units.js";
import { element } from "./element.js";

export function readoutSentence({ available, sheet, names }: Stop, units: ChartUnits): string {
  const list = (values: Stop["available"]): string =>
    QUANTITIES.map((quantity) => `${quantity.title.toLowerCase()} ${writeValue(units, quantity, values)}`).join(", ");
  return [
    ...(names.length > 0 ? [`${names.join(", ")}.`] : []),
    available === null ? "Beyond the available line." : `Available: ${list(available)}.`,
    sheet === null ? "Beyond the sheet's line." : `Sheet: ${list(sheet)}.`,
  ].join(" ");
}

/** Short, for the cursor itself. */
export function torqueText({ torqueNm, shareOfStall }: Stop, units: ChartUnits): string {
  return `${writeTorque(units, torqueNm)}, ${shareText(shareOfStall)} of stall`;
}

export function showReadout(table: HTMLTableElement, stop: Stop, units: ChartUnits): void {
  const row = (name: string, values: Stop["available"]): HTMLElement =>
    element("tr", {}, [
      element("th", { text: name, attributes: { scope: "row" } }),
      ...QUANTITIES.map((quantity) => element("td", { text: writeValue(units, quantity, values) })),
    ]);
  table.replaceChildren(
    element("caption", { text: `At ${torqueText(stop, units)}${named(stop)}` }),
    element("thead", {}, [
      element("tr", {}, [
        element("td"),
        ...QUANTITIES.map(({ title }) => element("th", { text: title, attributes: { scope: "col" } })),
      ]),
    ]),
    element("tbody", {}, [row("Available", stop.available), row("Sheet", stop.sheet)]),
  );
}

function named({ names }: Stop): string {
  return names.length > 0 ? `: ${names.join(", ")}` : "";
}

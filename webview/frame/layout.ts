/**
 * The fixed parts of one view's page, made once: results only change what is in them, so that focus and scroll stay where they are.
 */
import type { ViewName } from "../../extension/protocol/charts/views.js";
import { CAUTIONS } from "../page/cautions.js";
import { element } from "../page/element.js";
import { panelId, tabId } from "./tabs.js";

export interface Layout {
  readonly panel: HTMLElement;
  readonly empty: HTMLElement;
  readonly emptyText: HTMLElement;
  readonly content: HTMLElement;
  readonly old: HTMLElement;
  readonly title: HTMLElement;
  readonly verdict: HTMLElement;
  readonly notes: HTMLElement;
  readonly facts: HTMLElement;
  readonly findings: HTMLElement;
  /** What there is to set, above the plots. */
  readonly controls: HTMLElement;
  readonly plots: HTMLElement;
  /** Right below the plots, so that they stay where they are as it grows. */
  readonly answers: HTMLElement;
  readonly readout: HTMLTableElement;
  readonly spoken: HTMLElement;
  readonly tableButton: HTMLButtonElement;
  readonly pictureButton: HTMLButtonElement;
  readonly csvButton: HTMLButtonElement;
  readonly pageButton: HTMLButtonElement;
  readonly tableBox: HTMLElement;
  readonly table: HTMLTableElement;
  readonly assumed: HTMLElement;
  readonly notChecked: HTMLElement;
}

export interface LayoutOptions {
  /** With a reader of the screen the numbers come before the pictures. */
  readonly tableFirst: boolean;
  readonly canZoom: boolean;
  readonly canProbe: boolean;
}

export function buildLayout(name: ViewName, heading: string, { tableFirst, canZoom, canProbe }: LayoutOptions): Layout {
  const button = (text: string): HTMLButtonElement => element("button", { text, attributes: { type: "button" } });
  const tableId = `table-${name}`;
  const keysId = `keys-${name}`;
  const plots = {
    role: "slider",
    tabindex: "0",
    "aria-orientation": "horizontal",
    "aria-describedby": keysId,
  };
  const parts: Layout = {
    panel: element("section", { attributes: { id: panelId(name), role: "tabpanel", "aria-labelledby": tabId(name) } }),
    empty: element("div", { class: "empty" }, [element("h1", { text: heading })]),
    emptyText: element("div"),
    content: element("div", { class: "content" }),
    old: element("p", { class: "old", attributes: { role: "status" } }),
    title: element("h1"),
    verdict: element("p", { class: "verdict" }),
    notes: element("p", { class: "notes" }),
    facts: element("dl", { class: "facts" }),
    findings: element("ul", { class: "findings" }),
    controls: element("div", { class: "controls" }),
    plots: element("div", { class: "plots", attributes: plots }),
    answers: element("div"),
    readout: element("table", { class: "readout", attributes: { "aria-hidden": "true" } }),
    spoken: element("p", { class: "spoken", attributes: { "aria-live": "polite" } }),
    tableButton: button("Show table"),
    pictureButton: button("Save picture (PNG)"),
    csvButton: button("Save numbers (CSV)"),
    pageButton: button("Save page to print (HTML)"),
    tableBox: element("div", {
      class: "table-box",
      attributes: { id: tableId, role: "region", "aria-label": "Table", tabindex: "0" },
    }),
    table: element("table", { class: "data" }),
    assumed: element("section", { class: "remarks" }),
    notChecked: element("section", { class: "remarks" }),
  };
  parts.tableButton.setAttribute("aria-controls", tableId);
  parts.empty.append(parts.emptyText);
  parts.tableBox.append(parts.table);
  const actions = element("div", { class: "actions" }, [
    parts.tableButton,
    parts.pictureButton,
    parts.csvButton,
    parts.pageButton,
  ]);
  const keys = element("p", {
    class: "note",
    text: [KEYS, ...(canZoom ? [ZOOM_KEYS] : []), ...(canProbe ? [PROBE_KEYS] : [])].join(" "),
    attributes: { id: keysId },
  });
  const picture = [parts.controls, parts.plots, parts.answers, parts.spoken, parts.readout, keys];
  const numbers = [actions, parts.tableBox];
  parts.content.append(
    element("header", {}, [parts.title, parts.verdict, parts.notes, parts.old]),
    parts.facts,
    ...(tableFirst ? [...numbers, ...picture] : [...picture, ...numbers]),
    parts.findings,
    parts.assumed,
    parts.notChecked,
    element("footer", { class: "cautions" }, [element("p", { text: CAUTIONS })]),
  );
  parts.panel.append(parts.empty, parts.content);
  return parts;
}

const KEYS = "Read off with the mouse, or with the keys ← → Home End while the plots have the focus; Esc takes the cursor away.";
const PROBE_KEYS = "To try another torque, drag the line of the needed one, or move the slider above the plots.";
const ZOOM_KEYS = "Drag over a span to zoom to it, or press + and −; 0 shows all.";

/**
 * The page's fixed parts, made once: results only change what is in them, so that focus and scroll stay where they are.
 */
import { CAUTIONS } from "./cautions.js";
import { element } from "./element.js";

export interface Layout {
  readonly empty: HTMLElement;
  readonly emptyReason: HTMLElement;
  readonly content: HTMLElement;
  readonly old: HTMLElement;
  readonly title: HTMLElement;
  readonly verdict: HTMLElement;
  readonly perMotor: HTMLElement;
  readonly facts: HTMLElement;
  readonly findings: HTMLElement;
  readonly plots: HTMLElement;
  readonly upper: HTMLCanvasElement;
  readonly lower: HTMLCanvasElement;
  readonly readout: HTMLTableElement;
  readonly spoken: HTMLElement;
  readonly tableButton: HTMLButtonElement;
  readonly pictureButton: HTMLButtonElement;
  readonly csvButton: HTMLButtonElement;
  readonly tableBox: HTMLElement;
  readonly table: HTMLTableElement;
  readonly assumed: HTMLElement;
  readonly notChecked: HTMLElement;
}

/** `tableFirst`: with a reader of the screen the numbers come before the pictures. */
export function buildLayout(root: HTMLElement, tableFirst: boolean): Layout {
  const canvas = (): HTMLCanvasElement => element("canvas", { attributes: { role: "img" } });
  const button = (text: string): HTMLButtonElement => element("button", { text, attributes: { type: "button" } });
  const parts: Layout = {
    empty: element("div", { class: "empty" }, [element("h1", { text: "Operating point" })]),
    emptyReason: element("p"),
    content: element("div", { class: "content" }),
    old: element("p", { class: "old", attributes: { role: "status" } }),
    title: element("h1"),
    verdict: element("p", { class: "verdict" }),
    perMotor: element("p", { class: "per-motor" }),
    facts: element("dl", { class: "facts" }),
    findings: element("ul", { class: "findings" }),
    plots: element("div", { class: "plots", attributes: PLOTS }),
    upper: canvas(),
    lower: canvas(),
    readout: element("table", { class: "readout", attributes: { "aria-hidden": "true" } }),
    spoken: element("p", { class: "spoken", attributes: { "aria-live": "polite" } }),
    tableButton: button("Show table"),
    pictureButton: button("Save picture (PNG)"),
    csvButton: button("Save numbers (CSV)"),
    tableBox: element("div", {
      class: "table-box",
      attributes: { id: TABLE_ID, role: "region", "aria-label": "Table", tabindex: "0" },
    }),
    table: element("table", { class: "data" }),
    assumed: element("section", { class: "remarks" }),
    notChecked: element("section", { class: "remarks" }),
  };
  parts.tableButton.setAttribute("aria-controls", TABLE_ID);
  parts.empty.append(parts.emptyReason);
  parts.tableBox.append(parts.table);
  parts.plots.append(element("div", { class: "plot" }, [parts.upper]), element("div", { class: "plot" }, [parts.lower]));
  const actions = element("div", { class: "actions" }, [parts.tableButton, parts.pictureButton, parts.csvButton]);
  const keys = element("p", { class: "note", text: KEYS, attributes: { id: KEYS_ID } });
  const picture = [parts.plots, parts.spoken, parts.readout, keys];
  const numbers = [actions, parts.tableBox];
  parts.content.append(
    element("header", {}, [parts.title, parts.verdict, parts.perMotor, parts.old]),
    parts.facts,
    ...(tableFirst ? [...numbers, ...picture] : [...picture, ...numbers]),
    parts.findings,
    parts.assumed,
    parts.notChecked,
    element("footer", { class: "cautions" }, [element("p", { text: CAUTIONS })]),
  );
  root.replaceChildren(parts.empty, parts.content);
  return parts;
}

const TABLE_ID = "numbers";
const KEYS_ID = "keys";
const KEYS = "Read off with the mouse, or with the keys ← → Home End while the plots have the focus; Esc takes the cursor away.";

const PLOTS = {
  role: "slider",
  tabindex: "0",
  "aria-label": "Torque of the read-out",
  "aria-orientation": "horizontal",
  "aria-describedby": KEYS_ID,
};

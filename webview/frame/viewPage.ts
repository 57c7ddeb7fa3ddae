/**
 * One view's page: shows each answer by the view's sheet, and turns keys, mouse and buttons into changes of what is remembered.
 *
 * Computes no number; sheets know what they say, and plots how they look.
 */
import type { ChartAnswer } from "../../extension/protocol/chartMessages.js";
import type { ShownChart, ViewMemory, ViewName } from "../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../extension/units/systems.js";
import { fileNameOf } from "../fileName.js";
import type { Host } from "../host.js";
import { showDataTable } from "../page/dataTable.js";
import { setShown, setText } from "../page/element.js";
import { showEmpty } from "../page/emptyText.js";
import { showFacts } from "../page/facts.js";
import { createReadout } from "../page/readout.js";
import { showFindings, showSentences } from "../page/remarks.js";
import { readTheme } from "../theme/theme.js";
import type { View } from "../views/view.js";
import { createActionButtons } from "./actionButtons.js";
import { createChoices } from "./choices.js";
import { csvOf } from "./csv.js";
import { cursorAfterKey, downwards, nearestStop } from "./cursorKeys.js";
import { buildLayout } from "./layout.js";
import { drawPicture } from "./picture.js";
import { createPlotRow } from "./plotRow.js";
import { printedPage } from "./printedPage.js";
import { createProbeControl } from "./probeControl.js";
import type { Sheet } from "./sheet.js";
import { createZoomControl } from "./zoomControl.js";

/** What the page as a whole does for one of its views. */
export interface ViewSurroundings<V extends ViewName> {
  readonly host: Host;
  readonly withReader: boolean;
  readonly memory: () => ViewMemory<V>;
  readonly remember: (change: Partial<ViewMemory<V>>) => void;
  readonly tableOpen: () => boolean | null;
  readonly openTable: (open: boolean) => void;
  readonly system: () => UnitSystem;
  /** Asks the host anew, after a change of what is wanted. */
  readonly ask: () => void;
  /** Asks the host to write to the code what is wanted. */
  readonly write: () => void;
}

export interface ViewPage<V extends ViewName> {
  readonly panel: HTMLElement;
  show(answer: ChartAnswer & { readonly view: V }): void;
  /** After a change of what is remembered. */
  update(): void;
  /** Draws again in the colours and for the pixels of now. */
  redraw(): void;
}

export function createViewPage<V extends ViewName>(view: View<V>, around: ViewSurroundings<V>): ViewPage<V> {
  const { host, withReader } = around;
  const parts = buildLayout(view.name, view.title, {
    tableFirst: withReader,
    canZoom: view.zoomed !== undefined,
    canProbe: view.probed !== undefined,
  });
  const plots = createPlotRow(parts.plots);
  const readout = createReadout(parts.readout);
  let shown: ShownChart<V> | undefined;
  let sheet: Sheet | undefined;
  let plotsKey: string | undefined;
  let theme = readTheme(document.body);
  setShown(parts.content, false);
  setShown(parts.empty, false);

  const setCursor = (cursor: number | null): void => around.remember({ cursor } as Partial<ViewMemory<V>>);

  const redraw = (): void => {
    // Without a size; it is drawn when it is chosen.
    if (sheet === undefined || !parts.panel.isConnected) return;
    theme = readTheme(document.body);
    plots.draw(theme);
    showCursor(sheet);
  };

  const showCursor = ({ stops, restsAt, readAt, actionsAt }: Sheet): void => {
    const { cursor } = around.memory();
    const stop = nearestStop(stops, cursor ?? restsAt);
    writes.show(actionsAt?.(cursor === null || stop < 0 ? null : stop) ?? []);
    if (stop < 0) return;
    const read = readAt(stop);
    plots.setCursor(cursor === null ? null : stop);
    readout.show(read, theme);
    setText(parts.spoken, cursor === null ? "" : read.spoken);
    parts.plots.setAttribute("aria-valuemin", "0");
    parts.plots.setAttribute("aria-valuemax", String(stops.length - 1));
    parts.plots.setAttribute("aria-valuenow", String(stop));
    parts.plots.setAttribute("aria-valuetext", read.at);
  };

  const showTable = (): void => {
    const open = around.tableOpen() ?? withReader;
    setShown(parts.tableBox, open);
    parts.tableButton.setAttribute("aria-expanded", String(open));
    setText(parts.tableButton, open ? "Hide table" : "Show table");
    if (open && sheet !== undefined) showDataTable(parts.table, sheet.table());
  };

  const showSheet = (next: Sheet, old: string | null): void => {
    sheet = next;
    setText(parts.title, sheet.title);
    setText(parts.verdict, sheet.verdict);
    parts.verdict.dataset.state = sheet.state;
    setText(parts.old, old ?? "");
    setShown(parts.old, old !== null);
    setText(parts.notes, sheet.notes.join(" "));
    setShown(parts.notes, sheet.notes.length > 0);
    showFindings(parts.findings, sheet.findings);
    showFacts(parts.facts, sheet.facts);
    showSentences(parts.assumed, "Assumed", sheet.assumed);
    showSentences(parts.notChecked, "Not checked", sheet.notChecked);
    parts.plots.setAttribute("aria-label", `${sheet.across} of the read-out`);
    setShown(parts.content, true);
    choices.show(sheet.choices);
    zoom.show(sheet.zoom);
    probe.show(sheet.probe);
    if (sheet.plotsKey === undefined || sheet.plotsKey !== plotsKey) {
      plotsKey = sheet.plotsKey;
      plots.show(sheet.plots);
      redraw();
    } else showCursor(sheet);
    plots.setProbe(sheet.probe?.at ?? null);
    showTable();
  };

  const update = (): void => {
    if (shown !== undefined) showSheet(view.sheet(shown, around.memory(), around.system()), shown.old);
  };

  const zoom = createZoomControl({
    box: parts.plots,
    at: plots.at,
    onZoom(span) {
      const change = view.zoomed?.(span);
      if (change === undefined) return;
      around.remember(change);
      update();
      around.ask();
    },
  });
  const choices = createChoices(view.name, (key, value) => {
    around.remember(view.chosen?.(key, value) ?? ({ [key]: value } as Partial<ViewMemory<V>>));
    update();
    around.ask();
  });
  const writes = createActionButtons(({ message }) => host.send(message));
  const probe = createProbeControl({
    box: parts.plots,
    at: plots.at,
    onProbe(at) {
      const change = view.probed?.(at);
      if (change === undefined) return;
      around.remember(change);
      update();
      around.ask();
    },
    onWrite() {
      around.write();
      around.remember(view.probed?.(null) ?? {});
      update();
      around.ask();
    },
  });
  parts.controls.append(choices.element, zoom.element, probe.element);
  parts.answers.append(probe.answers);
  parts.plots.after(writes.element);

  const savePicture = (): void => {
    if (sheet === undefined || shown === undefined) return;
    const base64 = drawPicture(sheet, shown.old !== null, readTheme(document.body));
    const fileName = fileNameOf(sheet.title, view.name, "png");
    if (base64 !== undefined) host.send({ type: "savePicture", fileName, base64 });
    else host.send({ type: "trouble", what: "The canvas gave no picture." });
  };

  const saveTable = (): void => {
    if (sheet === undefined) return;
    host.send({ type: "saveTable", fileName: fileNameOf(sheet.title, view.name, "csv"), csv: csvOf(sheet.file()) });
  };

  const savePage = (): void => {
    if (sheet === undefined || shown === undefined) return;
    const html = printedPage(sheet, view.title, shown.old);
    host.send({ type: "savePage", fileName: fileNameOf(sheet.title, view.name, "html"), html });
  };

  parts.plots.addEventListener("keydown", (event) => {
    if (sheet === undefined || event.altKey || event.ctrlKey || event.metaKey) return;
    if (zoom.onKey(event, around.memory().cursor ?? sheet.restsAt)) return event.preventDefault();
    const key = sheet.downwards ? downwards(event.key) : event.key;
    const cursor = cursorAfterKey(key, around.memory().cursor, sheet.stops, sheet.restsAt);
    if (cursor === undefined) return;
    event.preventDefault();
    setCursor(cursor);
    showCursor(sheet);
  });
  const placeAt = (event: PointerEvent): void => {
    if (zoom.isDragging() || probe.isDragging()) return;
    const wanted = plots.at(event.clientX);
    const stop = sheet === undefined || wanted === undefined ? undefined : sheet.stops[nearestStop(sheet.stops, wanted)];
    if (sheet === undefined || stop === undefined) return;
    setCursor(stop);
    showCursor(sheet);
  };
  parts.plots.addEventListener("pointermove", placeAt);
  parts.plots.addEventListener("pointerdown", placeAt);
  parts.tableButton.addEventListener("click", () => {
    around.openTable(Boolean(parts.tableBox.hidden));
    showTable();
  });
  parts.pictureButton.addEventListener("click", savePicture);
  parts.csvButton.addEventListener("click", saveTable);
  parts.pageButton.addEventListener("click", savePage);

  return {
    panel: parts.panel,
    redraw,
    update,
    show(answer) {
      setShown(parts.empty, answer.kind === "nothing");
      if (answer.kind === "chart") {
        // The answer is of this view, which the compiler does not see through a type parameter.
        shown = answer as unknown as ShownChart<V>;
        return update();
      }
      [shown, sheet, plotsKey] = [undefined, undefined, undefined];
      setShown(parts.content, false);
      showEmpty(parts.emptyText, answer);
    },
  };
}

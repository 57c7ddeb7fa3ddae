/**
 * The chart's page: shows each answer of the host, and turns keys, mouse and buttons into changes of its own small state.
 *
 * Computes no number; the parts know how they look.
 */
import type { ChartAnswer, ShownChart } from "../extension/protocol/chartMessages.js";
import type { ChartView } from "../extension/protocol/chartView.js";
import { csvOf } from "./csv.js";
import { fileNameOf } from "./fileName.js";
import type { Host } from "./host.js";
import { showDataTable } from "./page/dataTable.js";
import { describeMotion, describePower } from "./page/describe.js";
import { setShown, setText } from "./page/element.js";
import { emptyText } from "./page/emptyText.js";
import { factsOf, showFacts } from "./page/facts.js";
import { buildLayout } from "./page/layout.js";
import { readoutSentence, showReadout, torqueText } from "./page/readout.js";
import { showFindings, showSentences } from "./page/remarks.js";
import { drawPicture } from "./picture.js";
import { type Drawing, drawChart } from "./plots/drawing.js";
import { type Cursor, createPlot } from "./plots/plot.js";
import { QUANTITIES } from "./plots/quantities.js";
import { nearestStop, type Stop, stopsOf } from "./stops.js";
import { readTheme } from "./theme/theme.js";
import { type ChartUnits, unitsOf } from "./units.js";
import { actionOfKey, changeView, type ViewAction } from "./viewState.js";

interface Shown {
  readonly answer: ShownChart;
  readonly drawing: Drawing;
  readonly stops: readonly Stop[];
  readonly units: ChartUnits;
}

export interface ChartPage {
  show(answer: ChartAnswer): void;
  /** Draws again in the colours and for the pixels of now. */
  redraw(): void;
}

export function createChartPage(root: HTMLElement, host: Host): ChartPage {
  const withReader = document.body.classList.contains("vscode-using-screen-reader");
  const parts = buildLayout(root, withReader);
  const plots = [createPlot(parts.upper, { place: "upper" }), createPlot(parts.lower, { place: "lower" })];
  let view: ChartView = host.recall();
  let shown: Shown | undefined;

  setShown(parts.content, false);
  setShown(parts.empty, false);

  const redraw = (): void => {
    if (shown === undefined) return;
    const theme = readTheme(document.body);
    for (const plot of plots) plot.show(shown.drawing, theme);
  };

  const showView = (): void => {
    if (shown === undefined) return;
    const { stops, units, answer } = shown;
    // Without a cursor the read-out is about what the load needs.
    const stop = stops[nearestStop(stops, view.cursorNm ?? answer.chart.hardest.torqueNm)];
    if (stop === undefined) return;
    for (const plot of plots) plot.setCursor(view.cursorNm === null ? null : cursorAt(stop, units));
    showReadout(parts.readout, stop, units);
    setText(parts.spoken, view.cursorNm === null ? "" : readoutSentence(stop, units));
    showSlider(parts.plots, stop, shown);
    const open = view.tableOpen ?? withReader;
    setShown(parts.tableBox, open);
    parts.tableButton.setAttribute("aria-expanded", String(open));
    setText(parts.tableButton, open ? "Hide table" : "Show table");
  };

  const act = (action: ViewAction): void => {
    const next = changeView(view, action);
    if (next === view) return;
    view = next;
    host.remember(view);
    showView();
  };

  const showChart = (answer: ShownChart): void => {
    const { chart, saved, old } = answer;
    const drawing = drawChart(answer);
    const units = unitsOf(drawing);
    shown = { answer, drawing, stops: stopsOf(chart), units };
    act({ type: "show", mechanism: chart.mechanism });
    setText(parts.title, chart.mechanism);
    setText(parts.verdict, chart.verdict);
    parts.verdict.dataset.state = chart.state;
    setText(parts.old, old ?? "");
    setShown(parts.old, old !== null);
    setText(parts.perMotor, chart.motorCount > 1 ? `Values of one motor of ${chart.motorCount}.` : "");
    setShown(parts.perMotor, chart.motorCount > 1);
    showFindings(parts.findings, chart.findings);
    showFacts(parts.facts, factsOf(chart, saved, units));
    showSentences(parts.assumed, "Assumed", chart.assumed);
    showSentences(parts.notChecked, "Not checked", chart.notChecked);
    showDataTable(parts.table, chart.mechanism, shown.stops, units);
    parts.upper.setAttribute("aria-label", describeMotion(chart, drawing));
    parts.lower.setAttribute("aria-label", describePower(chart, units));
    setShown(parts.content, true);
    redraw();
    showView();
  };

  const savePicture = (): void => {
    if (shown === undefined) return;
    const base64 = drawPicture(shown.answer, shown.drawing, readTheme(document.body));
    const fileName = fileNameOf(shown.answer.chart.mechanism, "png");
    if (base64 !== undefined) host.send({ type: "savePicture", fileName, base64 });
    else host.send({ type: "trouble", what: "The canvas gave no picture." });
  };

  const saveTable = (): void => {
    if (shown === undefined) return;
    host.send({ type: "saveTable", fileName: fileNameOf(shown.answer.chart.mechanism, "csv"), csv: csvOf(shown.stops) });
  };

  parts.plots.addEventListener("keydown", (event) => {
    if (shown === undefined || event.altKey || event.ctrlKey || event.metaKey) return;
    const action = actionOfKey(event.key, shown.stops, shown.answer.chart.hardest.torqueNm);
    if (action === undefined) return;
    event.preventDefault();
    act(action);
  });
  const placeAt = (event: PointerEvent): void => {
    const [plot] = plots;
    if (shown === undefined || plot === undefined) return;
    const x = event.clientX - parts.upper.getBoundingClientRect().left;
    const { stops, drawing } = shown;
    const wanted = plot.torqueAt(x);
    const distance = (stop: Stop): number => Math.abs(drawing.torque.unit.fromSi(stop.torqueNm) - wanted);
    const nearest = stops.reduce<Stop | null>((best, stop) => (best && distance(best) <= distance(stop) ? best : stop), null);
    if (nearest !== null) act({ type: "place", torqueNm: nearest.torqueNm });
  };
  parts.plots.addEventListener("pointermove", placeAt);
  parts.plots.addEventListener("pointerdown", placeAt);
  parts.tableButton.addEventListener("click", () => act({ type: "openTable", open: Boolean(parts.tableBox.hidden) }));
  parts.pictureButton.addEventListener("click", savePicture);
  parts.csvButton.addEventListener("click", saveTable);

  return {
    redraw,
    show(answer) {
      setShown(parts.empty, answer.kind === "nothing");
      if (answer.kind === "chart") return showChart(answer);
      shown = undefined;
      setShown(parts.content, false);
      setText(parts.emptyReason, emptyText(answer.reason));
    },
  };
}

function cursorAt({ torqueNm, available }: Stop, { torque, of }: ChartUnits): Cursor {
  const values = QUANTITIES.flatMap((quantity) => {
    const value = available && quantity.read(available);
    return value === null ? [] : [[quantity.name, of[quantity.name].fromSi(value)]];
  });
  return { x: torque.fromSi(torqueNm), values: Object.fromEntries(values) };
}

function showSlider(plots: HTMLElement, stop: Stop, { stops, units }: Shown): void {
  plots.setAttribute("aria-valuemin", "0");
  plots.setAttribute("aria-valuemax", String(stops.length - 1));
  plots.setAttribute("aria-valuenow", String(stops.indexOf(stop)));
  plots.setAttribute("aria-valuetext", torqueText(stop, units));
}

/**
 * One of the two plots as chart.js wants it: axes, curves and marks in the theme's colours.
 *
 * No animation, no events and no box of keys: words stand at the curves, and the page moves the cursor.
 */
import type { ChartConfiguration, ChartDataset, Plugin, Scale, ScaleOptionsByType } from "chart.js";
import { writeNumber } from "../../../extension/units/write.js";
import type { Theme } from "../../theme/theme.js";
import { annotationsOf, type HatchFill } from "./annotations.js";
import type { AxisDrawing, Curve, Drawing, Mark, PlotDrawing } from "./drawing.js";

export type PlotPlace = "upper" | "lower";

export interface PlotRequest {
  readonly drawing: Drawing;
  readonly place: PlotPlace;
  readonly theme: Theme;
  readonly fill: HatchFill;
  /** Device pixels per px; the window's where absent. */
  readonly pixelRatio?: number | undefined;
  readonly responsive: boolean;
  readonly plugins: Plugin<"line">[];
}

/** Room for a title and its distance from the numbers, and for each character of these, px. */
const AXIS_ROOM = 36;
const CHARACTER = 7;
const TICK_FONT_SIZE = 11;
const TITLE_FONT_SIZE = 12;
/** Markers along a curve. */
const MARKERS = 10;

export function plotOf(drawing: Drawing, place: PlotPlace): PlotDrawing {
  return place === "upper" ? drawing.motion : drawing.power;
}

export function plotConfig(request: PlotRequest): ChartConfiguration<"line"> {
  const { drawing, place, theme, fill, pixelRatio, responsive, plugins } = request;
  const plot = plotOf(drawing, place);
  const upper = place === "upper";
  const share = upper && drawing.share ? { share: axisOptions(drawing.share, "top", theme, { title: true, labels: true }) } : {};
  return {
    type: "line",
    data: {
      datasets: [
        ...plot.curves.map((curve) => curveDataset(curve, theme)),
        ...plot.marks.map((mark) => markDataset(mark, theme)),
      ],
    },
    options: {
      animation: false,
      responsive,
      maintainAspectRatio: false,
      parsing: false,
      normalized: true,
      events: [],
      font: { family: theme.fontFamily },
      layout: { padding: { top: upper ? 0 : 8, bottom: 2 } },
      ...(pixelRatio === undefined ? {} : { devicePixelRatio: pixelRatio }),
      scales: {
        torque: axisOptions(drawing.torque, "bottom", theme, { title: !upper, labels: !upper }),
        left: axisOptions(plot.left, "left", theme, { title: true, labels: true }, axisWidth(drawing, "left")),
        right: axisOptions(plot.right, "right", theme, { title: true, labels: true }, axisWidth(drawing, "right")),
        ...share,
      },
      plugins: { annotation: { annotations: annotationsOf(drawing, theme, fill) } },
    },
    plugins,
  };
}

/** Both plots keep the same room beside them, so that they share one torque axis. */
function axisWidth({ motion, power }: Drawing, side: "left" | "right"): number {
  const labels = [motion, power].flatMap((plot) => plot[side].ticks.map((tick) => writeNumber(tick)));
  return AXIS_ROOM + CHARACTER * Math.max(...labels.map((label) => label.length));
}

function axisOptions(
  { max, ticks, title }: AxisDrawing,
  position: "top" | "bottom" | "left" | "right",
  theme: Theme,
  shows: { readonly title: boolean; readonly labels: boolean },
  width?: number,
): ScaleOptionsByType<"linear"> {
  const upright = position === "left" || position === "right";
  const options = {
    type: "linear",
    axis: upright ? "y" : "x",
    position,
    min: 0,
    max,
    afterBuildTicks: (scale: Scale) => {
      scale.ticks = ticks.map((value) => ({ value }));
    },
    afterFit: (scale: Scale) => {
      if (width !== undefined) scale.width = width;
    },
    border: { color: theme.quiet },
    grid: {
      color: theme.grid,
      tickColor: theme.quiet,
      // Left and right have the same intervals: one grid serves both.
      drawOnChartArea: position === "bottom" || position === "left",
    },
    ticks: {
      display: shows.labels,
      color: theme.foreground,
      font: { family: theme.fontFamily, size: TICK_FONT_SIZE },
      maxRotation: 0,
      callback: (value: string | number) => writeNumber(Number(value)),
    },
    title: {
      display: shows.title,
      text: title,
      color: theme.foreground,
      padding: { top: 2, bottom: 2 },
      font: { family: theme.fontFamily, size: TITLE_FONT_SIZE },
    },
  };
  // chart.js declares every option as present, though it fills in what is left out.
  return options as unknown as ScaleOptionsByType<"linear">;
}

function curveDataset({ quantity, line, points }: Curve, theme: Theme): ChartDataset<"line"> {
  const own = line === "available";
  const colour = own ? theme.curves[quantity.name] : theme.quiet;
  const every = Math.max(1, Math.round(points.length / MARKERS));
  return {
    label: `${quantity.title}, ${line}`,
    data: [...points],
    xAxisID: "torque",
    yAxisID: quantity.side,
    borderColor: colour,
    borderWidth: own ? 2 : 1,
    borderDash: own ? [...quantity.dash] : line === "sheet" ? [5, 4] : [1, 3],
    backgroundColor: theme.background,
    pointStyle: quantity.marker,
    pointRadius: own ? points.map((_, index) => (index % every === Math.floor(every / 2) ? 3 : 0)) : 0,
    pointBorderColor: colour,
    pointBackgroundColor: theme.background,
    pointBorderWidth: 1.5,
    order: own ? 1 : 2,
  };
}

/** Needed: a filled ring. Best: a small cross, for it is nobody's operating point. */
function markDataset({ quantity, kind, x, y }: Mark, theme: Theme): ChartDataset<"line"> {
  const colour = theme.curves[quantity.name];
  return {
    label: `${quantity.title}, ${kind}`,
    data: [{ x, y }],
    xAxisID: "torque",
    yAxisID: quantity.side,
    showLine: false,
    clip: false,
    pointStyle: kind === "needed" ? "circle" : "crossRot",
    pointRadius: kind === "needed" ? 6 : 5,
    pointBorderColor: kind === "needed" ? theme.foreground : colour,
    pointBackgroundColor: colour,
    pointBorderWidth: 2,
    order: 0,
  };
}

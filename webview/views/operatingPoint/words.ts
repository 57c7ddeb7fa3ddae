/**
 * The words in a plot: names at the curves, what is needed, and what each hatch means, each where it hides nothing.
 */
import type { Chart } from "chart.js";
import {
  type Box,
  type Place,
  type Point,
  placeLabels,
  placesAlong,
  placesBeside,
  placesUpright,
  placesWithin,
  type WantedLabel,
} from "../../plots/placing.js";
import type { Theme } from "../../theme/theme.js";
import type { Curve, Drawing, PlotDrawing } from "./drawing.js";

interface Words extends WantedLabel {
  readonly text: string;
  readonly colour: string;
}

const FONT_SIZE = 11;
const LINE_HEIGHT = 14;

/** From the end that people look at first: a curve's name stands where it starts high. */
const SHARES = [0.12, 0.18, 0.25, 0.32, 0.4, 0.06, 0.5, 0.6, 0.7, 0.8, 0.88, 0.95];

/** Draws them over everything else. `explains`: this plot also words the limits. */
export function drawWords(chart: Chart, drawing: Drawing, plot: PlotDrawing, theme: Theme, explains: boolean): void {
  const { ctx: context, chartArea: area } = chart;
  context.save();
  context.font = `${FONT_SIZE}px ${theme.fontFamily}`;
  context.textAlign = "center";
  context.textBaseline = "middle";
  context.lineJoin = "round";
  const words = wordsOf(chart, drawing, plot, theme, explains);
  const curves = [...plot.curves.map((curve) => inPixels(chart, curve)), ...uprights(chart, drawing, area)];
  const places = placeLabels(words, area, curves, markBoxes(chart, plot));
  for (const [index, place] of places.entries()) {
    const label = words[index];
    if (place !== null && label !== undefined) drawLabel(context, label, place, theme.background);
  }
  context.restore();
}

function wordsOf(chart: Chart, drawing: Drawing, plot: PlotDrawing, theme: Theme, explains: boolean): Words[] {
  const { ctx: context, chartArea: area } = chart;
  const label = (text: string, colour: string, optional: boolean, placesFor: (width: number) => readonly Place[]): Words => {
    const width = context.measureText(text).width + 4;
    return { text, colour, optional, width, height: LINE_HEIGHT, places: placesFor(width) };
  };
  const along = (curve: Curve, text: string, colour: string, optional: boolean, shares: readonly number[]): Words =>
    label(text, colour, optional, (width) => placesAlong(inPixels(chart, curve), width, LINE_HEIGHT, shares));
  const toX = (value: number): number => chart.scales.torque?.getPixelForValue(value) ?? 0;
  const of = (line: Curve["line"]): readonly Curve[] => plot.curves.filter((curve) => curve.line === line);
  const { needed, wasNeeded, zones, boundaries } = drawing;
  const neededX = needed.outside ? area.right : toX(needed.x);
  const explained = !explains
    ? []
    : [
        label(needed.outside ? `${needed.words} →` : needed.words, theme.foreground, false, (width) =>
          placesBeside(neededX, area, width, LINE_HEIGHT),
        ),
        // The last zone first: it has the least choice of places.
        ...zones
          .toReversed()
          .map(({ from, to, words }) =>
            label(words, theme.foreground, false, (width) => placesWithin(toX(from), toX(to), area, width, LINE_HEIGHT)),
          ),
        ...boundaries.map(({ x, words }) =>
          label(words, theme.foreground, false, (width) => [
            ...placesUpright(toX(x), area, LINE_HEIGHT),
            ...placesBeside(toX(x), area, width, LINE_HEIGHT),
          ]),
        ),
        ...(wasNeeded === null || wasNeeded.outside
          ? []
          : [label(wasNeeded.words, theme.quiet, true, (width) => placesBeside(toX(wasNeeded.x), area, width, LINE_HEIGHT))]),
      ];
  return [
    ...of("available").map((curve) => along(curve, nameOf(curve), theme.curves[curve.quantity.name], false, sharesFor(curve))),
    ...explained,
    ...of("sheet").map((curve) => along(curve, "sheet", theme.quiet, true, [...SHARES].reverse())),
    ...of("saved").map((curve) => along(curve, "saved", theme.quiet, true, SHARES)),
  ];
}

function nameOf({ quantity }: Curve): string {
  return quantity.title.toLowerCase();
}

/** A rising curve is named at its far end, where it has room above. */
function sharesFor(curve: Curve): readonly number[] {
  const first = curve.points[0]?.y ?? 0;
  const last = curve.points.at(-1)?.y ?? 0;
  return last > first ? [...SHARES].reverse() : SHARES;
}

function inPixels(chart: Chart, { points, quantity }: Curve): Point[] {
  const [across, up] = [chart.scales.torque, chart.scales[quantity.side]];
  if (across === undefined || up === undefined) return [];
  return points.map(({ x, y }) => ({ x: across.getPixelForValue(x), y: up.getPixelForValue(y) }));
}

function uprights(chart: Chart, { needed, wasNeeded, boundaries }: Drawing, area: Box): Point[][] {
  const lines = [...(needed.outside ? [] : [needed.x]), ...(wasNeeded ? [wasNeeded.x] : []), ...boundaries.map(({ x }) => x)];
  return lines.map((value) => {
    const x = chart.scales.torque?.getPixelForValue(value) ?? 0;
    return [
      { x, y: area.top },
      { x, y: area.bottom },
    ];
  });
}

function markBoxes(chart: Chart, { marks }: PlotDrawing): Box[] {
  return marks.map(({ x, y, quantity }) => {
    const [centreX, centreY] = [
      chart.scales.torque?.getPixelForValue(x) ?? 0,
      chart.scales[quantity.side]?.getPixelForValue(y) ?? 0,
    ];
    return { left: centreX - 7, right: centreX + 7, top: centreY - 7, bottom: centreY + 7 };
  });
}

/** A rim of ground keeps words readable on a hatch. */
function drawLabel(context: CanvasRenderingContext2D, { text, colour }: Words, { x, y, upright }: Place, ground: string): void {
  context.save();
  context.translate(x, y);
  if (upright) context.rotate(-Math.PI / 2);
  context.strokeStyle = ground;
  context.lineWidth = 4;
  context.strokeText(text, 0, 0);
  context.fillStyle = colour;
  context.fillText(text, 0, 0);
  context.restore();
}

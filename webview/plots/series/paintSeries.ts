/** Stack, limits, lines, marks and rows of a plot of series, inside its area. Words are placed by paintWords.ts. */
import type { Theme } from "../../theme/theme.js";
import { hatchPattern } from "../hatch.js";
import { createBandFill, inkOf } from "./bandFill.js";
import type { Ink, SeriesDrawing, SeriesLine, Upright } from "./drawing.js";
import { type Frame, ROW_HEIGHT } from "./frame.js";

/** Markers along a line. */
const MARKERS = 8;
const ROW_BAR = 7;
const LEVEL_BAND = 7;

export function paintSeries(
  pen: CanvasRenderingContext2D,
  drawing: SeriesDrawing,
  frame: Frame,
  theme: Theme,
  pixelRatio: number,
): void {
  const { area } = frame;
  pen.save();
  pen.beginPath();
  pen.rect(area.left, area.top - 1, area.right - area.left, area.bottom - area.top + 2);
  pen.clip();
  pen.lineJoin = "round";
  paintStack(pen, drawing, frame, theme, pixelRatio);
  paintLevels(pen, drawing, frame, theme, pixelRatio);
  for (const upright of drawing.uprights) paintUpright(pen, upright, frame, theme);
  for (const line of drawing.lines) paintLine(pen, line, frame, theme);
  paintRows(pen, drawing, frame, theme, pixelRatio);
  pen.restore();
  paintDots(pen, drawing, frame, theme);
}

export function inkColour(ink: Ink, theme: Theme): string {
  return ink === "quiet" ? theme.quiet : ink === "foreground" ? theme.foreground : theme.curves[ink];
}

function paintStack(
  pen: CanvasRenderingContext2D,
  { stack }: SeriesDrawing,
  frame: Frame,
  theme: Theme,
  pixelRatio: number,
): void {
  if (stack === null) return;
  const xs = stack.xs.map(frame.x);
  const fill = createBandFill(pen, theme, pixelRatio);
  for (const { lower, upper, turn } of stack.bands) {
    if (upper.every((value, index) => value === lower[index])) continue;
    pen.beginPath();
    for (const [index, x] of xs.entries()) pen.lineTo(x, frame.y(upper[index] ?? 0, "left"));
    for (let index = xs.length - 1; index >= 0; index--) pen.lineTo(xs[index] ?? 0, frame.y(lower[index] ?? 0, "left"));
    pen.closePath();
    pen.fillStyle = fill(turn);
    pen.fill();
    pen.strokeStyle = inkOf(turn, theme);
    pen.lineWidth = 1;
    pen.beginPath();
    for (const edge of [upper, lower]) outline(pen, xs, edge, frame, (index) => upper[index] !== lower[index]);
    pen.stroke();
  }
}

/** Only where the band has a height: elsewhere the line would be that of its neighbour. */
function outline(
  pen: CanvasRenderingContext2D,
  xs: readonly number[],
  edge: readonly number[],
  { y }: Frame,
  isHigh: (index: number) => boolean,
): void {
  for (let index = 1; index < xs.length; index++) {
    if (!isHigh(index - 1) && !isHigh(index)) continue;
    pen.moveTo(xs[index - 1] ?? 0, y(edge[index - 1] ?? 0, "left"));
    pen.lineTo(xs[index] ?? 0, y(edge[index] ?? 0, "left"));
  }
}

/** The far side of a limit is hatched, as a wall is on a drawing. */
function paintLevels(
  pen: CanvasRenderingContext2D,
  { levels }: SeriesDrawing,
  { area, y }: Frame,
  theme: Theme,
  pixelRatio: number,
): void {
  const fill = hatchPattern(pen, "boundary", theme.foreground, pixelRatio);
  for (const { side, y: value, hatched } of levels) {
    const at = Math.round(y(value, side)) + 0.5;
    pen.strokeStyle = theme.foreground;
    pen.lineWidth = 1;
    pen.setLineDash([]);
    pen.beginPath();
    pen.moveTo(area.left, at);
    pen.lineTo(area.right, at);
    pen.stroke();
    if (hatched === null || fill === undefined) continue;
    pen.fillStyle = fill;
    pen.fillRect(area.left, hatched === "above" ? at - LEVEL_BAND : at, area.right - area.left, LEVEL_BAND);
  }
}

function paintUpright(pen: CanvasRenderingContext2D, { x, kind }: Upright, frame: Frame, theme: Theme): void {
  const at = Math.round(frame.x(x)) + 0.5;
  pen.save();
  pen.strokeStyle = kind === "part" ? theme.quiet : theme.foreground;
  pen.lineWidth = 1;
  pen.setLineDash(kind === "event" ? [] : [4, 3]);
  pen.beginPath();
  pen.moveTo(at, frame.area.top);
  pen.lineTo(at, frame.area.bottom);
  pen.stroke();
  pen.restore();
}

function paintLine(pen: CanvasRenderingContext2D, line: SeriesLine, frame: Frame, theme: Theme): void {
  const { xs, ys, side, ink, dash, width, marker } = line;
  pen.save();
  pen.strokeStyle = inkColour(ink, theme);
  pen.lineWidth = width;
  pen.setLineDash([...dash]);
  pen.beginPath();
  for (const [index, x] of xs.entries()) pen.lineTo(frame.x(x), frame.y(ys[index] ?? 0, side));
  pen.stroke();
  pen.setLineDash([]);
  pen.lineWidth = 1.5;
  pen.fillStyle = theme.background;
  if (marker !== null)
    for (const index of spread(xs, frame)) paintMarker(pen, marker, frame.x(xs[index] ?? 0), frame.y(ys[index] ?? 0, side));
  pen.restore();
}

/** Indices evenly spread over what is seen of a line. */
function spread(xs: readonly number[], { area, x }: Frame): number[] {
  const step = (area.right - area.left) / MARKERS;
  const found: number[] = [];
  let next = area.left + step / 2;
  for (const [index, value] of xs.entries()) {
    if (x(value) < next || x(value) > area.right) continue;
    found.push(index);
    while (next <= x(value)) next += step;
  }
  return found;
}

function paintMarker(pen: CanvasRenderingContext2D, marker: NonNullable<SeriesLine["marker"]>, x: number, y: number): void {
  pen.beginPath();
  if (marker === "circle") pen.arc(x, y, 3, 0, 2 * Math.PI);
  else if (marker === "square") pen.rect(x - 3, y - 3, 6, 6);
  else {
    pen.moveTo(x, y - 3.5);
    pen.lineTo(x + 3.5, y + 3);
    pen.lineTo(x - 3.5, y + 3);
    pen.closePath();
  }
  pen.fill();
  pen.stroke();
}

function paintRows(
  pen: CanvasRenderingContext2D,
  { rows }: SeriesDrawing,
  { area, x }: Frame,
  theme: Theme,
  pixelRatio: number,
): void {
  const fill = hatchPattern(pen, "boundary", theme.foreground, pixelRatio);
  for (const [index, { spans, plain }] of rows.entries()) {
    const bottom = area.top + (index + 1) * ROW_HEIGHT - 3;
    pen.fillStyle = theme.grid;
    pen.fillRect(area.left, bottom - 2, area.right - area.left, 2);
    for (const { from, to } of spans) {
      const left = Math.max(x(from), area.left);
      const width = Math.max(Math.min(x(to), area.right) - left, 2);
      pen.fillStyle = theme.background;
      pen.fillRect(left, bottom - ROW_BAR, width, ROW_BAR);
      if (plain) pen.fillStyle = theme.quiet;
      else if (fill !== undefined) pen.fillStyle = fill;
      pen.fillRect(left, bottom - ROW_BAR, width, ROW_BAR);
      pen.strokeStyle = theme.foreground;
      pen.lineWidth = 1;
      pen.strokeRect(left + 0.5, bottom - ROW_BAR + 0.5, Math.max(width - 1, 1), ROW_BAR - 1);
    }
  }
}

function paintDots(pen: CanvasRenderingContext2D, { dots }: SeriesDrawing, { x, y, area }: Frame, theme: Theme): void {
  pen.save();
  for (const dot of dots) {
    if (x(dot.x) < area.left - 1 || x(dot.x) > area.right + 1) continue;
    pen.fillStyle = theme.foreground;
    pen.strokeStyle = theme.background;
    pen.lineWidth = 1.5;
    pen.beginPath();
    pen.arc(x(dot.x), y(dot.y, dot.side), 4.5, 0, 2 * Math.PI);
    pen.fill();
    pen.stroke();
  }
  pen.restore();
}

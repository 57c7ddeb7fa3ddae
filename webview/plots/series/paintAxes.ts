/** Grid, numbers and titles of a plot of series. */
import { writeNumber } from "../../../extension/units/write.js";
import type { Theme } from "../../theme/theme.js";
import type { SeriesAxis, SeriesDrawing, Side } from "./drawing.js";
import type { Frame } from "./frame.js";

const TICK_FONT = 11;
const TITLE_FONT = 12;
const TICK_LENGTH = 4;

export function paintAxes(pen: CanvasRenderingContext2D, drawing: SeriesDrawing, frame: Frame, theme: Theme): void {
  pen.save();
  pen.lineWidth = 1;
  paintAcross(pen, drawing, frame, theme);
  for (const side of ["left", "right"] as const) {
    const axis = drawing[side];
    if (axis !== null) paintSide(pen, axis, side, frame, theme, drawing.left === null || side === "left");
  }
  pen.restore();
}

function paintAcross(pen: CanvasRenderingContext2D, { across, showsAcross }: SeriesDrawing, frame: Frame, theme: Theme): void {
  const { area, x } = frame;
  pen.font = `${TICK_FONT}px ${theme.fontFamily}`;
  pen.textAlign = "center";
  pen.textBaseline = "top";
  let free = Number.NEGATIVE_INFINITY;
  for (const tick of across.ticks) {
    const at = sharp(x(tick));
    line(pen, theme.grid, at, area.top, at, area.bottom);
    if (!showsAcross) continue;
    line(pen, theme.quiet, at, area.bottom, at, area.bottom + TICK_LENGTH);
    const text = writeNumber(tick);
    const half = pen.measureText(text).width / 2 + 3;
    if (at - half < free) continue;
    free = at + half;
    pen.fillStyle = theme.foreground;
    pen.fillText(text, at, area.bottom + TICK_LENGTH + 2);
  }
  line(pen, theme.quiet, area.left, sharp(area.bottom), area.right, sharp(area.bottom));
  if (!showsAcross) return;
  pen.font = `${TITLE_FONT}px ${theme.fontFamily}`;
  pen.fillStyle = theme.foreground;
  pen.fillText(across.title, (area.left + area.right) / 2, area.bottom + 21, area.right - area.left);
}

function paintSide(
  pen: CanvasRenderingContext2D,
  { ticks, title }: SeriesAxis,
  side: Side,
  frame: Frame,
  theme: Theme,
  hasGrid: boolean,
): void {
  const { area, y } = frame;
  const edge = side === "left" ? area.left : area.right;
  const outwards = side === "left" ? -1 : 1;
  pen.font = `${TICK_FONT}px ${theme.fontFamily}`;
  pen.textAlign = side === "left" ? "right" : "left";
  pen.textBaseline = "middle";
  for (const tick of ticks) {
    const at = sharp(y(tick, side));
    if (hasGrid) line(pen, tick === 0 ? theme.quiet : theme.grid, area.left, at, area.right, at);
    line(pen, theme.quiet, edge, at, edge + outwards * TICK_LENGTH, at);
    pen.fillStyle = theme.foreground;
    pen.fillText(writeNumber(tick), edge + outwards * (TICK_LENGTH + 2), at);
  }
  line(pen, theme.quiet, sharp(edge), area.top, sharp(edge), area.bottom);
  pen.save();
  pen.translate(side === "left" ? 8 : frame.area.right + sideRoom(pen, ticks) + 14, (area.top + area.bottom) / 2);
  pen.rotate((outwards * Math.PI) / 2);
  pen.textAlign = "center";
  pen.font = `${TITLE_FONT}px ${theme.fontFamily}`;
  pen.fillText(title, 0, 0, area.bottom - area.top);
  pen.restore();
}

function sideRoom(pen: CanvasRenderingContext2D, ticks: readonly number[]): number {
  return TICK_LENGTH + Math.max(...ticks.map((tick) => pen.measureText(writeNumber(tick)).width));
}

function line(pen: CanvasRenderingContext2D, colour: string, fromX: number, fromY: number, toX: number, toY: number): void {
  pen.strokeStyle = colour;
  pen.beginPath();
  pen.moveTo(fromX, fromY);
  pen.lineTo(toX, toY);
  pen.stroke();
}

/** In the middle of a pixel, so that a thin line is not spread over two. */
function sharp(px: number): number {
  return Math.round(px) + 0.5;
}

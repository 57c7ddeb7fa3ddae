/**
 * A plot of series on a canvas: painted once for each size and theme, with the cursor on top of a copy.
 *
 * Follows the size of what it stands in, unless a pixel ratio is given. The only file here that holds a canvas.
 */
import type { Plot, PlotOptions } from "../../frame/sheet.js";
import type { Theme } from "../../theme/theme.js";
import { fitCanvas } from "../fitCanvas.js";
import type { SeriesDrawing, Side } from "./drawing.js";
import { type Frame, frameOf, type Room } from "./frame.js";
import { paintAxes } from "./paintAxes.js";
import { paintSeries } from "./paintSeries.js";
import { paintWords } from "./paintWords.js";

/** Where the cursor stands, and the values to ring there, in axis units. */
export interface SeriesCursor {
  readonly x: number;
  readonly rings: readonly { readonly side: Side; readonly y: number }[];
}

export interface SeriesPlotParts {
  readonly drawing: SeriesDrawing;
  readonly room: Room;
  readonly cursorAt: (stop: number) => SeriesCursor;
}

export function createSeriesPlot(
  canvas: HTMLCanvasElement,
  { drawing, room, cursorAt }: SeriesPlotParts,
  { pixelRatio }: PlotOptions,
): Plot {
  const box = pixelRatio === undefined ? canvas.parentElement : null;
  const own = { width: canvas.width, height: canvas.height };
  /** The plot without a cursor, kept as soon as there is one. */
  let ground: HTMLCanvasElement | undefined;
  let theme: Theme | undefined;
  let cursor: number | null = null;
  let painted: { readonly frame: Frame; readonly width: number; readonly height: number; readonly ratio: number } | undefined;

  const paint = (): void => {
    const fitted = theme && fitCanvas(canvas, box, own, pixelRatio);
    if (theme === undefined || fitted === undefined) return;
    const { pen, width, height, ratio } = fitted;
    const frame = frameOf(drawing, width, height, room);
    paintAxes(pen, drawing, frame, theme);
    paintSeries(pen, drawing, frame, theme, ratio);
    paintWords(pen, drawing, frame, theme);
    painted = { frame, width, height, ratio };
    ground = undefined;
    if (cursor !== null) showCursor(cursor);
  };

  const clearCursor = (): void => {
    const pen = canvas.getContext("2d");
    if (painted === undefined || ground === undefined || pen === null) return;
    pen.setTransform(1, 0, 0, 1, 0, 0);
    pen.clearRect(0, 0, canvas.width, canvas.height);
    pen.drawImage(ground, 0, 0);
    pen.setTransform(painted.ratio, 0, 0, painted.ratio, 0, 0);
  };

  const showCursor = (stop: number): void => {
    const pen = canvas.getContext("2d");
    if (painted === undefined || theme === undefined || pen === null) return;
    if (ground === undefined) ground = copyOf(canvas);
    else clearCursor();
    paintCursor(pen, cursorAt(stop), painted.frame, theme);
  };

  const observer = box === null ? undefined : new ResizeObserver(() => isOtherSize() && paint());
  const isOtherSize = (): boolean => box !== null && (box.clientWidth !== painted?.width || box.clientHeight !== painted.height);
  if (box !== null) observer?.observe(box);

  return {
    draw(next) {
      theme = next;
      paint();
    },
    setCursor(stop) {
      if (stop === cursor) return;
      cursor = stop;
      if (stop !== null) showCursor(stop);
      else clearCursor();
    },
    at: (px) => drawing.across.unit.toSi(painted?.frame.valueAt(px) ?? 0),
    destroy: () => observer?.disconnect(),
  };
}

function copyOf(canvas: HTMLCanvasElement): HTMLCanvasElement {
  const copy = document.createElement("canvas");
  [copy.width, copy.height] = [canvas.width, canvas.height];
  copy.getContext("2d")?.drawImage(canvas, 0, 0);
  return copy;
}

function paintCursor(pen: CanvasRenderingContext2D, { x, rings }: SeriesCursor, frame: Frame, theme: Theme): void {
  const { area } = frame;
  const at = frame.x(x);
  if (at < area.left - 1 || at > area.right + 1) return;
  pen.save();
  pen.strokeStyle = theme.foreground;
  pen.lineWidth = 1;
  pen.setLineDash([1, 2]);
  pen.beginPath();
  pen.moveTo(at, area.top);
  pen.lineTo(at, area.bottom);
  pen.stroke();
  pen.setLineDash([]);
  pen.lineWidth = 2;
  pen.fillStyle = theme.background;
  for (const { side, y } of rings) {
    pen.beginPath();
    pen.arc(at, frame.y(y, side), 4, 0, 2 * Math.PI);
    pen.fill();
    pen.stroke();
  }
  pen.restore();
}

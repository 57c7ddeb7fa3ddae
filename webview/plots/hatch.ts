/** Hatches as on a drawing: lines at an angle, drawn for the pixels of the device so that they stay sharp. */
import type { Zone } from "../views/operatingPoint/limits.js";

export type HatchKind = Zone["kind"] | "boundary";

interface Hatch {
  /** Distance of the lines, px. */
  readonly pitch: number;
  readonly rising: boolean;
  readonly falling: boolean;
}

const HATCHES: Readonly<Record<HatchKind, Hatch>> = {
  "past-peak": { pitch: 12, rising: true, falling: false },
  "current-limit": { pitch: 8, rising: false, falling: true },
  "no-go": { pitch: 8, rising: true, falling: true },
  boundary: { pitch: 5, rising: true, falling: false },
};

/** Undefined where the canvas has no pattern to give: the zone is then left plain. */
export function hatchPattern(
  context: CanvasRenderingContext2D,
  kind: HatchKind,
  colour: string,
  pixelRatio: number,
): CanvasPattern | undefined {
  const { pitch, rising, falling } = HATCHES[kind];
  const size = Math.max(2, Math.round(pitch * pixelRatio));
  const tile = document.createElement("canvas");
  tile.width = size;
  tile.height = size;
  const pen = tile.getContext("2d");
  if (pen === null) return undefined;
  pen.strokeStyle = colour;
  pen.lineWidth = pixelRatio;
  pen.beginPath();
  // Each line is continued over the corners, so that tiles join without a gap.
  for (const shift of [-size, 0, size]) {
    if (rising) line(pen, shift, size, shift + size, 0);
    if (falling) line(pen, shift, 0, shift + size, size);
  }
  pen.stroke();
  const pattern = context.createPattern(tile, "repeat") ?? undefined;
  pattern?.setTransform(new DOMMatrix().scale(1 / pixelRatio));
  return pattern;
}

function line(pen: CanvasRenderingContext2D, fromX: number, fromY: number, toX: number, toY: number): void {
  pen.moveTo(fromX, fromY);
  pen.lineTo(toX, toY);
}

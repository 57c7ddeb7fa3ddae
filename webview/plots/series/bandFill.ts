/** How the parts of a stack are filled: a tint and a hatch in turn, so that neighbours differ by both. */
import type { Key } from "../../frame/sheet.js";
import { blend, parseColour, writeColour } from "../../theme/colour.js";
import type { Theme } from "../../theme/theme.js";

type Stroke = "rising" | "falling" | "level" | "upright" | "dots";

/** None, one or two kinds of strokes; as many as colours, so that a colour always comes with its hatch. */
const HATCHES: readonly (readonly Stroke[])[] = [[], ["rising"], ["dots"], ["falling"], ["level"], ["rising", "falling"]];
/** From the second round of colours on. */
const SECOND_ROUND: readonly (readonly Stroke[])[] = [
  ["upright"],
  ["level"],
  ["rising"],
  ["upright", "level"],
  ["dots"],
  ["falling"],
];
const TINT = 0.5;
const PITCH = 8;

export function inkOf(turn: number, { stack }: Theme): string {
  return stack[turn % stack.length] ?? "gray";
}

/** Fills by their turns; the tint alone where the canvas has no pattern to give. */
export function createBandFill(
  pen: CanvasRenderingContext2D,
  theme: Theme,
  pixelRatio: number,
): (turn: number) => CanvasPattern | string {
  const size = Math.max(4, Math.round(PITCH * pixelRatio));
  // One tile for all: a pattern takes what is on it then.
  const tile = document.createElement("canvas");
  [tile.width, tile.height] = [size, size];
  const brush = tile.getContext("2d");
  return (turn) => {
    const ink = inkOf(turn, theme);
    const tint = tintOf(ink, theme);
    if (brush === null) return tint;
    const hatches = Math.floor(turn / HATCHES.length) % 2 === 0 ? HATCHES : SECOND_ROUND;
    brush.fillStyle = tint;
    brush.fillRect(0, 0, size, size);
    brush.strokeStyle = ink;
    brush.fillStyle = ink;
    brush.lineWidth = pixelRatio;
    for (const stroke of hatches[turn % hatches.length] ?? []) paintStroke(brush, stroke, size, pixelRatio);
    const pattern = pen.createPattern(tile, "repeat");
    pattern?.setTransform(new DOMMatrix().scale(1 / pixelRatio));
    return pattern ?? tint;
  };
}

/** None in high contrast, where the hatch alone tells parts apart. */
function tintOf(ink: string, { background, stack }: Theme): string {
  const [ground, colour] = [parseColour(background), parseColour(ink)];
  return colour && ground && stack.length > 1 ? writeColour(blend(colour, ground, TINT)) : background;
}

function paintStroke(brush: CanvasRenderingContext2D, stroke: Stroke, size: number, pixelRatio: number): void {
  brush.beginPath();
  if (stroke === "dots") {
    brush.arc(size / 2, size / 2, 1.2 * pixelRatio, 0, 2 * Math.PI);
    brush.fill();
    return;
  }
  if (stroke === "level") [brush.moveTo(0, size / 2), brush.lineTo(size, size / 2)];
  if (stroke === "upright") [brush.moveTo(size / 2, 0), brush.lineTo(size / 2, size)];
  // Continued over the corners, so that tiles join without a gap.
  for (const shift of [-size, 0, size]) {
    if (stroke === "rising") [brush.moveTo(shift, size), brush.lineTo(shift + size, 0)];
    if (stroke === "falling") [brush.moveTo(shift, 0), brush.lineTo(shift + size, size)];
  }
  brush.stroke();
}

/** Paints a small key of a part of a stack. */
export function paintSwatch(turn: number): Key["swatch"] {
  return (canvas, theme, ratio = window.devicePixelRatio) => {
    [canvas.width, canvas.height] = [Math.round(SWATCH.width * ratio), Math.round(SWATCH.height * ratio)];
    const pen = canvas.getContext("2d");
    if (pen === null) return;
    pen.scale(ratio, ratio);
    pen.fillStyle = createBandFill(pen, theme, ratio)(turn);
    pen.fillRect(0, 0, SWATCH.width, SWATCH.height);
    pen.strokeStyle = inkOf(turn, theme);
    pen.strokeRect(0.5, 0.5, SWATCH.width - 1, SWATCH.height - 1);
  };
}

/** As in the style sheet, px. */
const SWATCH = { width: 18, height: 11 };

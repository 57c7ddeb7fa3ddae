/**
 * A sheet as one PNG file: its plots under the name of what they are about, on the theme's own ground, at twice the pixels.
 *
 * Always as wide, whatever the panel's width, so that pictures of one robot go together.
 */
import type { Theme } from "../theme/theme.js";
import type { Key, PlotPart, Sheet } from "./sheet.js";

const PIXEL_RATIO = 2;
const WIDTH = 900;
const MARGIN = 16;
const HEAD = 84;
const PLOT_HEIGHT = 300;
const FOOT = 26;
const KEY_LINE = 20;
export const SWATCH = { width: 18, height: 11 };

/** In base64; undefined where the canvas gives no picture. */
export function drawPicture(sheet: Sheet, isOld: boolean, theme: Theme): string | undefined {
  const canvas = document.createElement("canvas");
  const context = canvas.getContext("2d");
  if (context === null) return undefined;
  const keys = placeKeys(context, sheet.keys ?? [], theme);
  const keyed = HEAD + keys.lines * KEY_LINE;
  const below = sheet.plots.reduce((sum, part) => sum + heightOf(part), keyed);
  canvas.width = WIDTH * PIXEL_RATIO;
  canvas.height = (below + FOOT) * PIXEL_RATIO;
  context.scale(PIXEL_RATIO, PIXEL_RATIO);
  context.fillStyle = theme.background;
  context.fillRect(0, 0, canvas.width, canvas.height);
  const write = (text: string, y: number, font: string, x = MARGIN): void => {
    context.fillStyle = theme.foreground;
    context.font = `${font} ${theme.fontFamily}`;
    context.fillText(text, x, y, WIDTH - MARGIN - x);
  };
  write(sheet.title, 28, "bold 16px");
  write([sheet.verdict, ...(isOld ? ["an old result"] : [])].join("  ·  "), 48, "12px");
  write(sheet.facts.map(({ name, now }) => `${name} ${now}`).join("  ·  "), 68, "12px");
  for (const { key, x, line } of keys.placed) {
    const y = HEAD + line * KEY_LINE;
    context.drawImage(swatchOf(key, theme), x, y, SWATCH.width, SWATCH.height);
    write(key.name, y + 10, KEY_FONT, x + SWATCH.width + 5);
  }
  let top = keyed;
  for (const part of sheet.plots) {
    context.drawImage(drawPlot(part, theme), MARGIN, top, WIDTH - 2 * MARGIN, heightOf(part));
    top += heightOf(part);
  }
  write(`${sheet.footnote} An estimate, not a safety assessment.`, below + 14, "11px");
  return canvas.toDataURL("image/png").split(",")[1];
}

export function swatchOf({ swatch }: Key, theme: Theme): HTMLCanvasElement {
  const canvas = document.createElement("canvas");
  swatch(canvas, theme, PIXEL_RATIO);
  return canvas;
}

function heightOf({ pictureHeight = PLOT_HEIGHT }: PlotPart): number {
  return pictureHeight;
}

const KEY_FONT = "11px";

/** One after the other, in as many lines as they need. */
function placeKeys(context: CanvasRenderingContext2D, keys: readonly Key[], theme: Theme) {
  context.font = `${KEY_FONT} ${theme.fontFamily}`;
  let [x, line] = [MARGIN, 0];
  const placed = keys.map((key) => {
    const width = SWATCH.width + 5 + context.measureText(key.name).width + 16;
    if (x > MARGIN && x + width > WIDTH - MARGIN) [x, line] = [MARGIN, line + 1];
    const place = { key, x, line };
    x += width;
    return place;
  });
  return { placed, lines: keys.length === 0 ? 0 : line + 1 };
}

function drawPlot(part: PlotPart, theme: Theme): HTMLCanvasElement {
  const canvas = document.createElement("canvas");
  canvas.width = WIDTH - 2 * MARGIN;
  canvas.height = heightOf(part);
  const plot = part.create(canvas, { pixelRatio: PIXEL_RATIO });
  plot.draw(theme);
  return canvas;
}

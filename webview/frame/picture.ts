/**
 * A sheet as one PNG file: its plots under the name of what they are about, on the theme's own ground, at twice the pixels.
 *
 * Always as wide, whatever the panel's width, so that pictures of one robot go together.
 */
import type { Theme } from "../theme/theme.js";
import type { PlotPart, Sheet } from "./sheet.js";

const PIXEL_RATIO = 2;
const WIDTH = 900;
const MARGIN = 16;
const HEAD = 84;
const PLOT_HEIGHT = 300;
const FOOT = 26;

/** In base 64; undefined where the canvas gives no picture. */
export function drawPicture(sheet: Sheet, isOld: boolean, theme: Theme): string | undefined {
  const canvas = document.createElement("canvas");
  const below = HEAD + sheet.plots.length * PLOT_HEIGHT;
  canvas.width = WIDTH * PIXEL_RATIO;
  canvas.height = (below + FOOT) * PIXEL_RATIO;
  const context = canvas.getContext("2d");
  if (context === null) return undefined;
  context.scale(PIXEL_RATIO, PIXEL_RATIO);
  context.fillStyle = theme.background;
  context.fillRect(0, 0, canvas.width, canvas.height);
  const write = (text: string, y: number, font: string): void => {
    context.fillStyle = theme.foreground;
    context.font = `${font} ${theme.fontFamily}`;
    context.fillText(text, MARGIN, y, WIDTH - 2 * MARGIN);
  };
  write(sheet.title, 28, "bold 16px");
  write([sheet.verdict, ...(isOld ? ["an old result"] : [])].join("  ·  "), 48, "12px");
  write(sheet.facts.map(({ name, now }) => `${name} ${now}`).join("  ·  "), 68, "12px");
  for (const [index, part] of sheet.plots.entries()) {
    context.drawImage(drawPlot(part, theme), MARGIN, HEAD + index * PLOT_HEIGHT, WIDTH - 2 * MARGIN, PLOT_HEIGHT);
  }
  write(`${sheet.footnote} An estimate, not a safety assessment.`, below + 14, "11px");
  return canvas.toDataURL("image/png").split(",")[1];
}

function drawPlot({ create }: PlotPart, theme: Theme): HTMLCanvasElement {
  const canvas = document.createElement("canvas");
  canvas.width = WIDTH - 2 * MARGIN;
  canvas.height = PLOT_HEIGHT;
  create(canvas, { pixelRatio: PIXEL_RATIO }).draw(theme);
  return canvas;
}

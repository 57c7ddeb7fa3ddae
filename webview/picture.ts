/**
 * The chart as one PNG file: both plots under the mechanism's name, on the theme's own ground, at twice the pixels.
 *
 * Always the same size, however wide the panel is, so that pictures of one robot go together.
 */
import type { ShownChart } from "../extension/protocol/chartMessages.js";
import { factsOf } from "./page/facts.js";
import type { Drawing } from "./plots/drawing.js";
import { createPlot } from "./plots/plot.js";
import type { PlotPlace } from "./plots/plotConfig.js";
import type { Theme } from "./theme/theme.js";
import { unitsOf } from "./units.js";

const PIXEL_RATIO = 2;
const WIDTH = 900;
const MARGIN = 16;
const HEAD = 84;
const PLOT_HEIGHT = 300;
const FOOT = 26;

/** In base 64; undefined where the canvas gives no picture. */
export function drawPicture({ chart, old }: ShownChart, drawing: Drawing, theme: Theme): string | undefined {
  const sheet = document.createElement("canvas");
  sheet.width = WIDTH * PIXEL_RATIO;
  sheet.height = (HEAD + 2 * PLOT_HEIGHT + FOOT) * PIXEL_RATIO;
  const context = sheet.getContext("2d");
  if (context === null) return undefined;
  context.scale(PIXEL_RATIO, PIXEL_RATIO);
  context.fillStyle = theme.background;
  context.fillRect(0, 0, sheet.width, sheet.height);
  const write = (text: string, y: number, font: string): void => {
    context.fillStyle = theme.foreground;
    context.font = `${font} ${theme.fontFamily}`;
    context.fillText(text, MARGIN, y, WIDTH - 2 * MARGIN);
  };
  write(chart.mechanism, 28, "bold 16px");
  const facts = factsOf(chart, null, unitsOf(drawing)).map(({ name, now }) => `${name} ${now}`);
  const verdict = [chart.verdict, ...(old === null ? [] : ["an old result"])];
  write(verdict.join("  ·  "), 48, "12px");
  write(facts.join("  ·  "), 68, "12px");
  for (const [index, place] of (["upper", "lower"] as const).entries()) {
    context.drawImage(drawPlot(drawing, place, theme), MARGIN, HEAD + index * PLOT_HEIGHT, WIDTH - 2 * MARGIN, PLOT_HEIGHT);
  }
  const motors = chart.motorCount > 1 ? `one motor of ${chart.motorCount}` : "the motor";
  write(
    `Values of ${motors}. Thin dashes: its sheet. An estimate, not a safety assessment.`,
    HEAD + 2 * PLOT_HEIGHT + 14,
    "11px",
  );
  return sheet.toDataURL("image/png").split(",")[1];
}

function drawPlot(drawing: Drawing, place: PlotPlace, theme: Theme): HTMLCanvasElement {
  const canvas = document.createElement("canvas");
  canvas.width = WIDTH - 2 * MARGIN;
  canvas.height = PLOT_HEIGHT;
  createPlot(canvas, { place, pixelRatio: PIXEL_RATIO }).show(drawing, theme);
  return canvas;
}

/**
 * A plot on a canvas: paints what it is given and moves the cursor. The only file that holds a chart of chart.js.
 */
import { Chart, LinearScale, LineController, LineElement, type Plugin, PointElement } from "chart.js";
import annotationPlugin from "chartjs-plugin-annotation";
import { hatchPattern } from "../../plots/hatch.js";
import type { Theme } from "../../theme/theme.js";
import type { Drawing } from "./drawing.js";
import { type PlotPlace, plotConfig, plotOf } from "./plotConfig.js";
import type { QuantityName } from "./quantities.js";
import { drawWords } from "./words.js";

Chart.register(LineController, LineElement, PointElement, LinearScale, annotationPlugin);

/** In axis units. */
export interface Cursor {
  readonly x: number;
  /** Of the available line, as far as it reaches. */
  readonly values: Readonly<Partial<Record<QuantityName, number>>>;
}

export interface Plot {
  show(drawing: Drawing, theme: Theme): void;
  setCursor(cursor: Cursor | null): void;
  /** Torque in axis units; null for none. */
  setProbe(x: number | null): void;
  /** Torque in axis units at a distance from the canvas's left edge, px. */
  torqueAt(x: number): number;
  destroy(): void;
}

export interface PlotOptions {
  readonly place: PlotPlace;
  /** Where absent the plot follows the size of what it stands in. */
  readonly pixelRatio?: number;
}

const BOUNDARY_BAND = 7;

export function createPlot(canvas: HTMLCanvasElement, { place, pixelRatio }: PlotOptions): Plot {
  let chart: Chart<"line"> | undefined;
  let cursor: Cursor | null = null;
  let probe: number | null = null;
  return {
    show(drawing, theme) {
      chart?.destroy();
      const context = canvas.getContext("2d");
      if (context === null) return;
      const ratio = pixelRatio ?? window.devicePixelRatio;
      const boundaryFill = hatchPattern(context, "boundary", theme.foreground, ratio);
      const painter: Plugin<"line"> = {
        id: "words",
        beforeDatasetsDraw: (shown) => drawBoundaryBands(shown, drawing, boundaryFill),
        afterDraw: (shown) => {
          drawWords(shown, drawing, plotOf(drawing, place), theme, place === "upper");
          if (probe !== null) drawProbe(shown, probe, theme);
          if (cursor !== null) drawCursor(shown, drawing, place, cursor, theme);
        },
      };
      chart = new Chart(
        canvas,
        plotConfig({
          drawing,
          place,
          theme,
          pixelRatio,
          responsive: pixelRatio === undefined,
          fill: (kind) => hatchPattern(context, kind, theme.hatch, ratio),
          plugins: [painter],
        }),
      );
    },
    setCursor(next) {
      cursor = next;
      chart?.draw();
    },
    setProbe(next) {
      if (next === probe) return;
      probe = next;
      chart?.draw();
    },
    destroy: () => chart?.destroy(),
    torqueAt: (x) => chart?.scales.torque?.getValueForPixel(x) ?? 0,
  };
}

/** The far side of a boundary is hatched, as a wall is on a drawing. */
function drawBoundaryBands(chart: Chart, { boundaries }: Drawing, fill: CanvasPattern | undefined): void {
  const { ctx: context, chartArea: area } = chart;
  if (fill === undefined) return;
  context.save();
  context.fillStyle = fill;
  for (const { x } of boundaries) {
    const left = chart.scales.torque?.getPixelForValue(x) ?? 0;
    const right = Math.min(left + BOUNDARY_BAND, area.right);
    if (right > left) context.fillRect(left, area.top, right - left, area.bottom - area.top);
  }
  context.restore();
}

function drawCursor(chart: Chart, drawing: Drawing, place: PlotPlace, { x, values }: Cursor, theme: Theme): void {
  const { ctx: context, chartArea: area, scales } = chart;
  const across = Math.min(scales.torque?.getPixelForValue(x) ?? 0, area.right);
  context.save();
  context.strokeStyle = theme.foreground;
  context.lineWidth = 1;
  context.setLineDash([1, 2]);
  context.beginPath();
  context.moveTo(across, area.top);
  context.lineTo(across, area.bottom);
  context.stroke();
  context.setLineDash([]);
  context.lineWidth = 2;
  for (const { quantity } of plotOf(drawing, place).curves.filter(({ line }) => line === "available")) {
    const value = values[quantity.name];
    const scale = scales[quantity.side];
    if (value === undefined || scale === undefined) continue;
    context.fillStyle = theme.background;
    context.strokeStyle = theme.curves[quantity.name];
    context.beginPath();
    context.arc(across, scale.getPixelForValue(value), 4.5, 0, 2 * Math.PI);
    context.fill();
    context.stroke();
  }
  context.restore();
}

/** A thick line with a grip at both ends. */
function drawProbe(chart: Chart, x: number, theme: Theme): void {
  const { ctx: context, chartArea: area, scales } = chart;
  const at = Math.min(scales.torque?.getPixelForValue(x) ?? 0, area.right);
  context.save();
  context.strokeStyle = theme.foreground;
  context.fillStyle = theme.foreground;
  context.lineWidth = 2.5;
  context.setLineDash([7, 3]);
  context.beginPath();
  context.moveTo(at, area.top);
  context.lineTo(at, area.bottom);
  context.stroke();
  for (const [y, inwards] of [
    [area.top, 1],
    [area.bottom, -1],
  ] as const) {
    context.beginPath();
    context.moveTo(at - GRIP, y);
    context.lineTo(at + GRIP, y);
    context.lineTo(at, y + inwards * GRIP * 1.5);
    context.closePath();
    context.fill();
  }
  context.restore();
}

const GRIP = 7;

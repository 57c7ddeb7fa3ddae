/**
 * Ranked bars on a canvas, one below the other: the words of each at the left, its effect to one side of a line at 0, the number at its end.
 *
 * What reduces the result is hatched, so that no one needs the side alone. The cursor frames a bar.
 */
import type { Plot, PlotOptions } from "../../frame/sheet.js";
import { fitCanvas } from "../../plots/fitCanvas.js";
import { hatchPattern } from "../../plots/hatch.js";
import type { Theme } from "../../theme/theme.js";
import { type Bar, writeEffect } from "./ranks.js";

const ROW = 24;
const BAR = 13;
const TOP = 6;
const TITLE = 30;
const FONT = 12;
const EDGE = 8;
/** Words may take so much of the width. */
const MOST_WORDS = 0.4;

export function heightOfBars(count: number): number {
  return TOP + Math.max(count, 1) * ROW + TITLE;
}

export function createBarPlot(
  canvas: HTMLCanvasElement,
  { bars, title }: { readonly bars: readonly Bar[]; readonly title: string },
  { pixelRatio }: PlotOptions,
): Plot {
  const box = pixelRatio === undefined ? canvas.parentElement : null;
  const own = { width: canvas.width, height: canvas.height };
  let theme: Theme | undefined;
  let cursor: number | null = null;

  const paint = (): void => {
    const fitted = theme && fitCanvas(canvas, box, own, pixelRatio);
    if (theme === undefined || fitted === undefined) return;
    const { pen, width, ratio } = fitted;
    pen.font = `${FONT}px ${theme.fontFamily}`;
    pen.textBaseline = "middle";
    paintBars(pen, bars, { width, theme, cursor, ratio });
    pen.fillStyle = theme.foreground;
    pen.textAlign = "center";
    pen.fillText(title, width / 2, TOP + bars.length * ROW + TITLE / 2, width - 2 * EDGE);
  };

  const observer = box === null ? undefined : new ResizeObserver(() => paint());
  if (box !== null) observer?.observe(box);

  return {
    draw(next) {
      theme = next;
      paint();
    },
    setCursor(stop) {
      cursor = stop;
      paint();
    },
    // Bars lie below each other: nothing lies across.
    at: () => undefined,
    destroy: () => observer?.disconnect(),
  };
}

interface Ground {
  readonly width: number;
  readonly theme: Theme;
  readonly cursor: number | null;
  readonly ratio: number;
}

function paintBars(pen: CanvasRenderingContext2D, bars: readonly Bar[], { width, theme, cursor, ratio }: Ground): void {
  const wordsWidth = Math.min(Math.max(0, ...bars.map(({ words }) => pen.measureText(words).width)) + EDGE, width * MOST_WORDS);
  const numberWidth = pen.measureText("−0.000").width + EDGE;
  const [left, right] = [EDGE + wordsWidth + numberWidth, width - EDGE - numberWidth];
  const effects = bars.flatMap(({ effect, was }) => [effect, was ?? 0]);
  const [least, greatest] = [Math.min(0, ...effects), Math.max(0, ...effects)];
  const span = greatest - least || 1;
  const x = (effect: number): number => left + ((effect - least) / span) * Math.max(right - left, 1);
  const hatch = hatchPattern(pen, "boundary", theme.foreground, ratio);
  for (const [index, { words, effect, was }] of bars.entries()) {
    const middle = TOP + (index + 0.5) * ROW;
    const [from, to] = effect < 0 ? [x(effect), x(0)] : [x(0), x(effect)];
    if (cursor === index) {
      pen.strokeStyle = theme.foreground;
      pen.lineWidth = 1;
      pen.setLineDash([1, 2]);
      pen.strokeRect(1.5, middle - ROW / 2 + 1.5, width - 3, ROW - 3);
      pen.setLineDash([]);
    }
    pen.fillStyle = effect < 0 ? theme.background : theme.curves.current;
    pen.fillRect(from, middle - BAR / 2, Math.max(to - from, 1), BAR);
    if (effect < 0 && hatch !== undefined) {
      pen.fillStyle = hatch;
      pen.fillRect(from, middle - BAR / 2, Math.max(to - from, 1), BAR);
    }
    pen.strokeStyle = theme.foreground;
    pen.lineWidth = 1;
    pen.strokeRect(from + 0.5, middle - BAR / 2 + 0.5, Math.max(to - from - 1, 1), BAR - 1);
    if (was !== null && was !== effect) {
      pen.fillStyle = theme.quiet;
      pen.fillRect(x(was) - 1, middle - BAR / 2 - 3, 2, BAR + 6);
    }
    pen.fillStyle = theme.foreground;
    pen.textAlign = "left";
    pen.fillText(shortened(pen, words, wordsWidth - EDGE), EDGE, middle);
    pen.textAlign = effect < 0 ? "right" : "left";
    pen.fillText(writeEffect(effect), effect < 0 ? from - 4 : to + 4, middle);
  }
  pen.strokeStyle = theme.quiet;
  pen.beginPath();
  pen.moveTo(Math.round(x(0)) + 0.5, TOP);
  pen.lineTo(Math.round(x(0)) + 0.5, TOP + bars.length * ROW);
  pen.stroke();
}

/** The table has the words whole. */
function shortened(pen: CanvasRenderingContext2D, words: string, room: number): string {
  if (pen.measureText(words).width <= room) return words;
  let length = words.length;
  while (length > 1 && pen.measureText(`${words.slice(0, length)}…`).width > room) length--;
  return `${words.slice(0, length).trimEnd()}…`;
}

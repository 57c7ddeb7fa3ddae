/** The words in a plot of series: names at lines and in the stack, limits and events, each where it hides nothing. */
import type { Theme } from "../../theme/theme.js";
import {
  type Box,
  type Place,
  type Point,
  placeLabels,
  placesAlong,
  placesBeside,
  placesUpright,
  type WantedLabel,
} from "../placing.js";
import type { Band, SeriesDrawing, SeriesLine } from "./drawing.js";
import { type Frame, ROW_HEIGHT } from "./frame.js";
import { inkColour } from "./paintSeries.js";

interface Words extends WantedLabel {
  readonly text: string;
  readonly colour: string;
}

const FONT_SIZE = 11;
const LINE_HEIGHT = 14;
/** Height of a row's words: its bar lies close below. */
const ROW_WORDS = 13;
const SHARES = [0.75, 0.85, 0.65, 0.92, 0.5, 0.4, 0.3, 0.2, 0.1];
/** More points of a line than this only cost time where words look for a place. */
const POINTS = 120;

export function paintWords(pen: CanvasRenderingContext2D, drawing: SeriesDrawing, frame: Frame, theme: Theme): void {
  pen.save();
  pen.font = `${FONT_SIZE}px ${theme.fontFamily}`;
  pen.textBaseline = "middle";
  pen.lineJoin = "round";
  paintRowWords(pen, drawing, frame, theme);
  pen.textAlign = "center";
  const lines = drawing.lines.map((line) => ({ line, points: pointsOf(line, frame) }));
  const words = wordsOf(pen, drawing, frame, theme, lines);
  const obstacles = [...lines.map(({ points }) => points), ...levelsAndUprights(drawing, frame)];
  const places = placeLabels(words, frame.area, obstacles, dotBoxes(drawing, frame));
  for (const [index, place] of places.entries()) {
    const label = words[index];
    if (place !== null && label !== undefined) paintLabel(pen, label, place, theme.background);
  }
  pen.restore();
}

function wordsOf(
  pen: CanvasRenderingContext2D,
  drawing: SeriesDrawing,
  frame: Frame,
  theme: Theme,
  lines: readonly { readonly line: SeriesLine; readonly points: readonly Point[] }[],
): Words[] {
  const { area } = frame;
  const label = (text: string, colour: string, optional: boolean, placesFor: (width: number) => readonly Place[]): Words => {
    const width = pen.measureText(text).width + 4;
    return { text, colour, optional, width, height: LINE_HEIGHT, places: placesFor(width) };
  };
  const isSeen = (x: number): boolean => frame.x(x) >= area.left - 1 && frame.x(x) <= area.right + 1;
  return [
    ...drawing.dots
      .filter(({ x }) => isSeen(x))
      .map(({ x, y, side, words }) =>
        label(words, theme.foreground, false, (width) =>
          placesAlong([{ x: frame.x(x), y: frame.y(y, side) }], width, LINE_HEIGHT, [0]),
        ),
      ),
    ...lines
      .filter(({ line, points }) => line.name !== "" && points.length > 1)
      .map(({ line, points }) =>
        label(line.name, inkColour(line.ink, theme), line.ink === "quiet", (width) =>
          placesAlong(points, width, LINE_HEIGHT, SHARES),
        ),
      ),
    ...drawing.levels.map(({ y, side, words, hatched }) =>
      label(words, theme.foreground, false, (width) => alongLevel(frame.y(y, side), hatched, area, width)),
    ),
    ...drawing.uprights
      .filter(({ x, words }) => words !== "" && isSeen(x))
      .map(({ x, words, kind }) =>
        label(words, kind === "part" ? theme.quiet : theme.foreground, kind === "part", (width) => [
          ...placesBeside(frame.x(x), area, width, LINE_HEIGHT).filter((place) => kind !== "part" || place.x > frame.x(x)),
          ...placesUpright(frame.x(x), area, LINE_HEIGHT).filter((place) => kind !== "part" || place.x > frame.x(x)),
        ]),
      ),
    ...(drawing.stack?.bands ?? []).flatMap((band) => {
      const places = placesInBand(band, drawing.stack?.xs ?? [], frame);
      return places.length === 0 ? [] : [label(band.name, theme.foreground, true, (width) => places.filter(fits(width)))];
    }),
  ];
}

/** A place in a band, with the room that is there. */
interface BandPlace extends Place {
  readonly room: number;
}

const fits =
  (width: number) =>
  ({ room }: BandPlace): boolean =>
    room >= width;

/** Where a band is high enough for a line of words, the widest stretch first. */
function placesInBand({ lower, upper }: Band, xs: readonly number[], frame: Frame): readonly BandPlace[] {
  const { area } = frame;
  const found: BandPlace[] = [];
  let [start, last] = [Number.NaN, area.left];
  let [top, bottom] = [area.top, area.bottom];
  const close = (): void => {
    if (last > start) found.push({ x: (start + last) / 2, y: (top + bottom) / 2, room: last - start, upright: false });
    start = Number.NaN;
    [top, bottom] = [area.top, area.bottom];
  };
  for (const [index, value] of xs.entries()) {
    const x = frame.x(value);
    if (x < area.left || x > area.right) continue;
    const [high, low] = [frame.y(upper[index] ?? 0, "left"), frame.y(lower[index] ?? 0, "left")];
    const [nextTop, nextBottom] = [Math.max(top, Math.min(high, low)), Math.min(bottom, Math.max(high, low))];
    if (nextBottom - nextTop < LINE_HEIGHT) {
      close();
      continue;
    }
    if (Number.isNaN(start)) start = x;
    last = x;
    [top, bottom] = [nextTop, nextBottom];
  }
  close();
  return found.sort((one, other) => other.room - one.room).slice(0, 6);
}

function alongLevel(y: number, hatched: "above" | "below" | null, area: Box, width: number): readonly Place[] {
  const free = hatched === "below" ? y - LINE_HEIGHT / 2 - 2 : y + LINE_HEIGHT / 2 + 2;
  const far = hatched === "below" ? y + LINE_HEIGHT / 2 + 9 : y - LINE_HEIGHT / 2 - 9;
  const across = [0.98, 0.02, 0.5, 0.75, 0.25].map(
    (share) => area.left + width / 2 + share * Math.max(area.right - area.left - width, 0),
  );
  return [free, far].flatMap((at) => across.map((x) => ({ x, y: at, upright: false })));
}

function pointsOf({ xs, ys, side }: SeriesLine, frame: Frame): Point[] {
  const every = Math.max(1, Math.ceil(xs.length / POINTS));
  return xs.flatMap((x, index) => {
    const point = { x: frame.x(x), y: frame.y(ys[index] ?? 0, side) };
    const isSeen = point.x >= frame.area.left - 1 && point.x <= frame.area.right + 1;
    return isSeen && (index % every === 0 || index === xs.length - 1) ? [point] : [];
  });
}

function levelsAndUprights({ levels, uprights }: SeriesDrawing, { area, x, y }: Frame): Point[][] {
  return [
    ...levels.map((level) => [area.left, area.right].map((end) => ({ x: end, y: y(level.y, level.side) }))),
    ...uprights.map((upright) => [area.top, area.bottom].map((end) => ({ x: x(upright.x), y: end }))),
  ];
}

function dotBoxes({ dots }: SeriesDrawing, { x, y }: Frame): Box[] {
  return dots.map((dot) => {
    const [across, up] = [x(dot.x), y(dot.y, dot.side)];
    return { left: across - 5, right: across + 5, top: up - 5, bottom: up + 5 };
  });
}

/** A row's words stand above its bar, shortened where the panel is too narrow; they are whole in the description and the table. */
function paintRowWords(pen: CanvasRenderingContext2D, { rows }: SeriesDrawing, { area }: Frame, theme: Theme): void {
  pen.textAlign = "left";
  for (const [index, { words }] of rows.entries()) {
    const text = shortened(pen, words, area.right - area.left);
    const y = area.top + index * ROW_HEIGHT + 7;
    // On plain ground: lines that end a step go between letters, not through them.
    pen.fillStyle = theme.background;
    pen.fillRect(area.left, y - ROW_WORDS / 2, pen.measureText(text).width + 3, ROW_WORDS);
    pen.fillStyle = theme.foreground;
    pen.fillText(text, area.left + 1, y);
  }
}

function shortened(pen: CanvasRenderingContext2D, text: string, room: number): string {
  if (pen.measureText(text).width <= room) return text;
  let length = text.length;
  while (length > 1 && pen.measureText(`${text.slice(0, length)}…`).width > room) length--;
  return `${text.slice(0, length).trimEnd()}…`;
}

/** A rim of ground keeps words readable on a hatch. */
function paintLabel(pen: CanvasRenderingContext2D, { text, colour }: Words, { x, y, upright }: Place, ground: string): void {
  pen.save();
  pen.translate(x, y);
  if (upright) pen.rotate(-Math.PI / 2);
  pen.strokeStyle = ground;
  pen.lineWidth = 4;
  pen.strokeText(text, 0, 0);
  pen.fillStyle = colour;
  pen.fillText(text, 0, 0);
  pen.restore();
}

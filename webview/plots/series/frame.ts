/** Where a plot's area lies on its canvas, and how axis units become pixels in it. Knows no canvas. */
import { writeNumber } from "../../../extension/units/write.js";
import type { Box } from "../placing.js";
import type { SeriesAxis, SeriesDrawing, Side } from "./drawing.js";

export interface Room {
  readonly left: number;
  readonly right: number;
}

export interface Frame {
  readonly area: Box;
  readonly x: (value: number) => number;
  readonly y: (value: number, side: Side) => number;
  /** Back to axis units. */
  readonly valueAt: (px: number) => number;
}

/** Beside the numbers: the title and its distance, px; and of each character of the numbers. */
const AXIS_ROOM = 30;
const CHARACTER = 6.5;
const TOP = 8;
const BOTTOM = 38;
const BARE_BOTTOM = 8;
const EDGE = 12;
/** A row of states: its words and its bar. */
export const ROW_HEIGHT = 24;

/** Room beside the areas of plots that share an abscissa, so that these stand below each other. */
export function roomFor(drawings: readonly SeriesDrawing[]): Room {
  const roomOf = (side: Side): number => {
    const axes = drawings.flatMap((drawing) => drawing[side] ?? []);
    if (axes.length === 0) return EDGE;
    return AXIS_ROOM + CHARACTER * Math.max(...axes.flatMap(({ ticks }) => ticks.map((tick) => writeNumber(tick).length)));
  };
  return { left: roomOf("left"), right: roomOf("right") };
}

/** Height of a plot that holds nothing but rows. */
export function heightOfRows(count: number): number {
  return TOP + count * ROW_HEIGHT + BOTTOM;
}

/** Where a value lies between the ends of its axis. */
function shareOf(value: number, { min, max, scale }: SeriesAxis): number {
  return scale === "log" ? Math.log(value / min) / Math.log(max / min) : (value - min) / (max - min);
}

function valueAtShare(share: number, { min, max, scale }: SeriesAxis): number {
  return scale === "log" ? min * (max / min) ** share : min + share * (max - min);
}

export function frameOf(drawing: SeriesDrawing, width: number, height: number, room: Room): Frame {
  const area: Box = {
    left: room.left,
    top: TOP,
    right: Math.max(width - room.right, room.left + 1),
    bottom: Math.max(height - (drawing.showsAcross ? BOTTOM : BARE_BOTTOM), TOP + 1),
  };
  return {
    area,
    x: (value) => area.left + shareOf(value, drawing.across) * (area.right - area.left),
    y(value, side) {
      const axis = drawing[side] ?? drawing.left ?? drawing.right;
      return axis === null ? area.bottom : area.bottom - shareOf(value, axis) * (area.bottom - area.top);
    },
    valueAt(px) {
      const at = Math.min(Math.max((px - area.left) / (area.right - area.left), 0), 1);
      return valueAtShare(at, drawing.across);
    },
  };
}

/**
 * A plot of series over one abscissa as plain data in axis units: curves, a stack, limits, marks and rows of states.
 *
 * All that is left to do is to paint it (paint….ts). Holds no colours, only what they are for.
 */
import type { ColourName } from "../../theme/palette.js";
import type { AxisUnit } from "../axisUnit.js";

export interface SeriesAxis {
  readonly min: number;
  readonly max: number;
  /** Absent: even steps. `log`: even factors, both ends above 0. */
  readonly scale?: "log";
  readonly ticks: readonly number[];
  /** With its unit: "Power (W)". */
  readonly title: string;
  readonly unit: AxisUnit;
}

export type Side = "left" | "right";
export type Ink = ColourName | "quiet" | "foreground";

export interface SeriesLine {
  readonly name: string;
  readonly side: Side;
  readonly xs: readonly number[];
  readonly ys: readonly number[];
  readonly ink: Ink;
  readonly dash: readonly number[];
  readonly width: number;
  /** Drawn here and there along the line, so that no one needs its colour. */
  readonly marker: "circle" | "triangle" | "square" | null;
}

/** One part of a stack, between two series over the abscissas of the stack. */
export interface Band {
  readonly name: string;
  readonly lower: readonly number[];
  readonly upper: readonly number[];
  /** Its turn among the colours and hatches. */
  readonly turn: number;
}

export interface Stack {
  readonly xs: readonly number[];
  readonly bands: readonly Band[];
}

/** A limit across the plot, hatched on the side that is not allowed. */
export interface Level {
  readonly side: Side;
  readonly y: number;
  readonly words: string;
  readonly hatched: "above" | "below" | null;
}

/** An upright line: something that happens, or where a part begins. */
export interface Upright {
  readonly x: number;
  readonly words: string;
  /** `due`: when something should have happened. */
  readonly kind: "event" | "part" | "due";
}

export interface Dot {
  readonly side: Side;
  readonly x: number;
  readonly y: number;
  readonly words: string;
}

/** One row of states along the abscissa, under its words. */
export interface StateRow {
  readonly words: string;
  readonly spans: readonly { readonly from: number; readonly to: number }[];
  /** Good rather than bad: plain instead of hatched. */
  readonly plain?: true;
}

export interface SeriesDrawing {
  readonly across: SeriesAxis;
  /** False where a plot below it carries the numbers of the same axis. */
  readonly showsAcross: boolean;
  readonly left: SeriesAxis | null;
  readonly right: SeriesAxis | null;
  readonly stack: Stack | null;
  readonly lines: readonly SeriesLine[];
  readonly levels: readonly Level[];
  readonly uprights: readonly Upright[];
  readonly dots: readonly Dot[];
  readonly rows: readonly StateRow[];
}

export const EMPTY_DRAWING: Omit<SeriesDrawing, "across"> = {
  showsAcross: true,
  left: null,
  right: null,
  stack: null,
  lines: [],
  levels: [],
  uprights: [],
  dots: [],
  rows: [],
};

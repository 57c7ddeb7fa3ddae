/** How a span of the abscissa grows, shrinks and moves. Pure; null is all of it. */
import type { Zoom } from "./sheet.js";

export interface Span {
  readonly from: number;
  readonly to: number;
}

/** A shorter span than this share of all shows nothing new. */
const LEAST = 1e-4;

/** `factor` below 1 zooms in; what lies at `about` stays where it is. */
export function scaled({ from, to, least, greatest }: Zoom, factor: number, about: number): Span | null {
  const length = Math.max((to - from) * factor, (greatest - least) * LEAST);
  const share = Math.min(Math.max((about - from) / (to - from), 0), 1);
  return within(about - share * length, length, least, greatest);
}

/** By a share of what is shown. */
export function moved({ from, to, least, greatest }: Zoom, by: number): Span | null {
  return within(from + by * (to - from), to - from, least, greatest);
}

/** From one end to the other, whichever comes first; `undefined` where they are too near. */
export function spanned({ least, greatest }: Zoom, one: number, other: number): Span | null | undefined {
  const [from, to] = [Math.max(Math.min(one, other), least), Math.min(Math.max(one, other), greatest)];
  return to - from < (greatest - least) * LEAST ? undefined : within(from, to - from, least, greatest);
}

/** What a key does to a span; `undefined` leaves it to the page. */
export function afterKey(zoom: Zoom, key: string, shift: boolean, about: number): Span | null | undefined {
  if (key === "+" || key === "=") return scaled(zoom, 0.5, about);
  if (key === "-" || key === "−") return scaled(zoom, 2, about);
  if (key === "0") return null;
  if (shift && key === "ArrowLeft") return moved(zoom, -0.25);
  if (shift && key === "ArrowRight") return moved(zoom, 0.25);
  return undefined;
}

function within(from: number, length: number, least: number, greatest: number): Span | null {
  if (length >= (greatest - least) * (1 - 1e-9)) return null;
  const start = Math.min(Math.max(from, least), greatest - length);
  return { from: start, to: start + length };
}

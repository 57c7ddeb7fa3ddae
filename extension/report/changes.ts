/** What moved between two analyses of the same robot: every mechanism whose numbers differ by more than a share, as text or Markdown. */
import type { Analysis } from "../analysis/analysis.js";
import { writeNumber, writeQuantity, writeShare } from "../units/write.js";
import { toInertText } from "./inert.js";

export interface Moved {
  readonly mechanism: string;
  /** `added` and `removed` mechanisms have no numbers to compare. */
  readonly kind: "moved" | "added" | "removed" | "unknown";
  readonly numbers: readonly {
    readonly label: string;
    readonly before: string;
    readonly after: string;
    readonly share: number | null;
  }[];
}

/** `least`: changes of a smaller share are left out. Mechanisms are the same where their names are. */
export function findMoved(before: Analysis, after: Analysis, least: number): Moved[] {
  const known = new Map(before.mechanisms.map((one) => [one.name, one]));
  const now = new Set(after.mechanisms.map(({ name }) => name));
  const moved = after.mechanisms.flatMap((one): Moved[] => {
    const old = known.get(one.name);
    if (old === undefined) return [{ mechanism: one.name, kind: "added", numbers: [] }];
    if (old.numbers === undefined || one.numbers === undefined) {
      return old.numbers === one.numbers ? [] : [{ mechanism: one.name, kind: "unknown", numbers: [] }];
    }
    const numbers = compareNumbers(old.numbers, one.numbers, least);
    return numbers.length === 0 ? [] : [{ mechanism: one.name, kind: "moved", numbers }];
  });
  const removed = before.mechanisms.filter(({ name }) => !now.has(name));
  return [...moved, ...removed.map(({ name }): Moved => ({ mechanism: name, kind: "removed", numbers: [] }))];
}

/** For a terminal: one block a mechanism. */
export function writeMovedText(moved: readonly Moved[], against: string): string {
  if (moved.length === 0) return `No mechanism's numbers moved against ${toInertText(against)}.\n`;
  const blocks = moved.map(({ mechanism, kind, numbers }) => {
    const rows = numbers.map(
      ({ label, before, after, share }) => `  ${label.padEnd(16)} ${before} → ${after}${tellShare(share)}`,
    );
    return [`${toInertText(mechanism)}${kind === "moved" ? "" : `: ${WORDS[kind]}`}`, ...rows].join("\n");
  });
  return `Against ${toInertText(against)}:\n\n${blocks.join("\n\n")}\n`;
}

/** For a pull request: one table. */
export function writeMovedMarkdown(moved: readonly Moved[], against: string): string {
  if (moved.length === 0) return `No mechanism's numbers moved against ${toInertMarkdown(against)}.\n`;
  const rows = moved.flatMap(({ mechanism, kind, numbers }) => {
    const name = toInertMarkdown(mechanism);
    if (kind !== "moved") return [`| ${name} | ${WORDS[kind]} | | |`];
    return numbers.map(({ label, before, after, share }) => `| ${name} | ${label} | ${before} | ${after}${tellShare(share)} |`);
  });
  return [`| mechanism | number | ${toInertMarkdown(against)} | now |`, "| --- | --- | ---: | ---: |", ...rows, ""].join("\n");
}

const WORDS: Readonly<Record<Exclude<Moved["kind"], "moved">, string>> = {
  added: "new",
  removed: "gone",
  unknown: "its numbers cannot be known on one side",
};

type Numbers = NonNullable<Analysis["mechanisms"][number]["numbers"]>;

const COMPARED: readonly { readonly label: string; read(numbers: Numbers): number | null; write(value: number): string }[] = [
  { label: "ratio", read: ({ ratio }) => ratio, write: writeNumber },
  { label: "share of stall", read: ({ hardest }) => hardest.stallShare, write: writeShare },
  { label: "current", read: ({ hardest }) => hardest.motorCurrentA, write: (value) => writeQuantity(value, "current") },
  { label: "travel time", read: ({ travel }) => travel?.timeS ?? null, write: (value) => writeQuantity(value, "time") },
  { label: "opens in travel", read: ({ travel }) => travel?.tripsAfterS ?? null, write: (value) => writeQuantity(value, "time") },
  {
    label: "winding",
    read: ({ travel }) => celsius(travel?.windingPeakC),
    write: (value) => writeQuantity(value, "temperature"),
  },
];

function compareNumbers(before: Numbers, after: Numbers, least: number): Moved["numbers"] {
  return COMPARED.flatMap(({ label, read, write }) => {
    const [was, is] = [read(before), read(after)];
    if (was === null && is === null) return [];
    const tell = (value: number | null) => (value === null ? "–" : write(value));
    if (was === null || is === null) return [{ label, before: tell(was), after: tell(is), share: null }];
    const share = was === 0 ? (is === 0 ? 0 : Number.POSITIVE_INFINITY) : is / was - 1;
    if (Math.abs(share) <= least) return [];
    return [{ label, before: tell(was), after: tell(is), share: Number.isFinite(share) ? share : null }];
  });
}

function celsius(windingC: number | null | undefined): number | null {
  return windingC === null || windingC === undefined ? null : windingC + 273.15;
}

function tellShare(share: number | null): string {
  return share === null ? "" : ` (${share > 0 ? "+" : "\u2212"}${writeShare(Math.abs(share))})`;
}

function toInertMarkdown(text: string): string {
  return toInertText(text).replaceAll(/[\\`*_[\]{}|~#<>&]/g, "\\$&");
}

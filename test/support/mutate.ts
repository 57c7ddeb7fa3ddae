/** Damages real texts in the ways that editing, merging and bad disks do, seeded, so that a failure comes again. */
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { seeded } from "../model/seeded.js";

/** A whole number from 0 up to, without, the one given. */
export type Draw = (below: number) => number;

export function drawFrom(seed: number): Draw {
  const random = seeded(seed);
  return (below) => Math.min(Math.floor(random(0, below)), Math.max(below - 1, 0));
}

/** One to three kinds of damage, one after the other. */
export function mutate(text: string, draw: Draw): string {
  let damaged = text;
  for (let count = 1 + draw(3); count > 0; count--) damaged = pick(MUTATIONS, draw)(damaged, draw);
  return damaged;
}

/** The sources of a folder by path below it. */
export function readSources(folder: string): Record<string, string> {
  const names = readdirSync(folder, { recursive: true, encoding: "utf8" }).map((name) => name.split(path.sep).join("/"));
  const kept = names.filter((name) => /\.(?:[mc]?[jt]s|json)$/.test(name) && !name.includes("node_modules/")).sort();
  return Object.fromEntries(kept.map((name) => [name, readFileSync(path.join(folder, name), "utf8")]));
}

const MUTATIONS: readonly ((text: string, draw: Draw) => string)[] = [
  // Cut anywhere, as a write that was interrupted.
  (text, draw) => text.slice(0, draw(text.length + 1)),
  // A line doubled, or put elsewhere, as a bad merge does.
  (text, draw) => {
    const lines = text.split("\n");
    lines.splice(draw(lines.length), draw(2), lines[draw(lines.length)] ?? "");
    return lines.join("\n");
  },
  // One bracket for another.
  (text, draw) => {
    const brackets = [...text.matchAll(/[()[\]{}]/g)];
    const at = brackets[draw(brackets.length)]?.index;
    return at === undefined ? text : text.slice(0, at) + ("()[]{}"[draw(6)] ?? "") + text.slice(at + 1);
  },
  // Bytes of anything.
  (text, draw) => {
    const at = draw(text.length + 1);
    const noise = Array.from({ length: 1 + draw(12) }, () => String.fromCharCode(draw(0x10000))).join("");
    return text.slice(0, at) + noise + text.slice(at + draw(12));
  },
  // A piece of syntax where none belongs.
  (text, draw) => {
    const at = draw(text.length + 1);
    return text.slice(0, at) + pick(PIECES, draw) + text.slice(at);
  },
  // A stretch lost.
  (text, draw) => {
    const at = draw(text.length + 1);
    return text.slice(0, at) + text.slice(at + draw(200));
  },
  // A number that is legal, but absurd or wrong.
  (text, draw) => {
    const numbers = [...text.matchAll(/\d+(?:\.\d+)?/g)];
    const found = numbers[draw(numbers.length)];
    return found === undefined
      ? text
      : text.slice(0, found.index) + pick(NUMBERS, draw) + text.slice(found.index + found[0].length);
  },
];

const PIECES = [
  "`",
  "${",
  "/*",
  "*/",
  "//",
  '"',
  "'",
  "\\",
  "=>",
  "...",
  "?.",
  "#",
  "@",
  "<",
  "import ",
  "export default ",
  "\ud800",
  "\u202e",
];
const NUMBERS = ["0", "-1", "1e9", "1e-9", "1e999", "0x10", "9007199254740993", "NaN", "3 kg", "1_000", "08"];

function pick<T>(items: readonly T[], draw: Draw): T {
  return items[draw(items.length)] as T;
}

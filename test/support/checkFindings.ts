/** Analyses a fixture and holds its findings to its marks: both ways, ranges included. */

import { expect } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { Analysis } from "../../extension/analysis/analysis.js";
import { readFixture } from "./fixture.js";
import { parser as ts } from "./parser.js";

/** Motors, supply and imports that most fixtures start with: invented, with round numbers. */
export const PRELUDE = `import { arm, battery, between, breaker, chain, flywheel, lift, mechanism, motor, reduction, roller, spur, wheels } from "loadmark";
const twelveVolt = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
`;

export function analyseFixture(text: string): Analysis {
  const { files, snapshot } = readFixture(text);
  return createAnalyser(ts).analyse(
    [...files.keys()].filter((file) => !file.endsWith(".json")),
    snapshot,
  );
}

/** Fails unless every mark has its finding and every finding its mark. */
export function checkFindings(text: string): Analysis {
  const { files, marks } = readFixture(text);
  const analysis = analyseFixture(text);
  const told = analysis.findings.map(({ at, level, rule, message }) => ({ ...at, level, rule, message }));
  const found = told.map(({ message, ...place }) => ({
    ...place,
    marked: textAt(files, place),
    says: saysOf(marks, place, message),
  }));
  const wanted = marks.map((mark) => ({ ...mark, marked: textAt(files, mark) }));
  expect(found.sort(byPlace)).toEqual(wanted.sort(byPlace));
  return analysis;
}

interface Placed {
  readonly file: string;
  readonly start: number;
  readonly end: number;
  readonly rule: string;
}

/** The mark's own words where the message holds them, else the whole message, so that a difference shows it. */
function saysOf(marks: readonly (Placed & { readonly says: string })[], place: Placed, message: string): string {
  const mark = marks.find(
    (one) => one.rule === place.rule && one.file === place.file && one.start === place.start && message.includes(one.says),
  );
  return mark?.says ?? message;
}

function textAt(files: ReadonlyMap<string, string>, { file, start, end }: Placed): string {
  return (files.get(file) ?? "").slice(start, end);
}

function byPlace(a: Placed, b: Placed): number {
  return a.file.localeCompare(b.file) || a.start - b.start || a.rule.localeCompare(b.rule);
}

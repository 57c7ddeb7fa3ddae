/** Which files are touched by what differs, where it stands in another file than the mechanism. */
import { describe, expect, it } from "vitest";
import type { AnalysedMechanism, Analysis, FileAnalysis, Finding } from "../../extension/analysis/analysis.js";
import { changesBetween } from "../../extension/features/analysisChanges.js";
import { createIndexReader, createMechanismsReader } from "../../extension/features/mechanismIndex.js";
import { EditedWorkspace } from "../support/editedWorkspace.js";

const { analysis } = new EditedWorkspace().result();

function touchedBy(now: Partial<Analysis>): string[] {
  const next = { ...analysis, ...now };
  return [...changesBetween(analysis, next, createIndexReader()(next)).touched].sort();
}

function found(file: string): Pick<Analysis, "findingsIn"> {
  const at = { file, start: 0, end: 1 };
  const finding: Finding = { rule: "late", level: "warning", mechanism: null, message: "Late.", at, related: [] };
  return { findingsIn: new Map([...analysis.findingsIn, [file, [finding]]]) };
}

/** The analysis with the place of one mechanism in another file. */
function placedIn(file: string, name: string): Analysis {
  const move = (one: AnalysedMechanism) => (one.name === name ? { ...one, at: { file, start: 0, end: 1 } } : one);
  const inFile = [...analysis.inFile].map(([key, own]): [string, FileAnalysis] => {
    return [key, own.mechanisms.some((one) => one.name === name) ? { ...own, mechanisms: own.mechanisms.map(move) } : own];
  });
  return { ...analysis, mechanisms: analysis.mechanisms.map(move), inFile: new Map(inFile) };
}

describe("what another analysis touches", () => {
  it("is nothing where it is the same", () => {
    expect(touchedBy({ findings: [...analysis.findings] })).toEqual([]);
  });

  it("is a mechanism that is another, and the robot that lists it", () => {
    expect(touchedBy({ inFile: placedIn("/w/e.ts", "solo").inFile })).toEqual(["/w/e.ts", "/w/other.ts"]);
    expect(touchedBy(found("/w/plain.ts"))).toEqual(["/w/plain.ts"]);
  });

  it("is what stands where something else is found", () => {
    const before = placedIn("/w/plain.ts", "vague");
    const now = { ...before, ...found("/w/plain.ts") };
    expect(changesBetween(before, now, createIndexReader()(now)).touched).toContain("/w/b.ts");
  });
});

describe("mechanisms in a file", () => {
  it("are those placed there, wherever they are declared, until they are no more", () => {
    const namesIn = (of: Analysis, file: string) => mechanismsIn(of, file).map(({ name }) => name);
    const mechanismsIn = createMechanismsReader(createIndexReader());
    expect(namesIn(analysis, "/w/plain.ts")).toEqual([]);
    expect(namesIn(placedIn("/w/plain.ts", "solo"), "/w/plain.ts")).toEqual(["solo"]);
    expect(namesIn({ ...analysis }, "/w/plain.ts")).toEqual([]);
    expect(namesIn(placedIn("/w/a.ts", "vague"), "/w/a.ts")).toEqual(["upper", "middle", "lower", "vague"]);
  });
});

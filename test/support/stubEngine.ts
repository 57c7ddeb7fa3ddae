/**
 * A stand-in for the analysis in tests of the session: a line `finding: WORD` in a root, or in what it imports by `from "…"`, is a finding.
 *
 * As the real one it asks for imported files and for settings, and never reads anything itself.
 */
import type { Analysis, Finding } from "../../extension/analysis/analysis.js";
import type { FileEvaluation, Snapshot } from "../../extension/evaluator/value.js";
import type { Engine } from "../../extension/server/engine.js";

export interface StubEngine extends Engine {
  /** How many analyses were asked for. */
  readonly runs: { count: number };
}

export function createStubEngine(): StubEngine {
  const runs = { count: 0 };
  return {
    runs,
    analyse(roots, snapshot) {
      runs.count += 1;
      return analyse(roots, snapshot);
    },
  };
}

function analyse(roots: readonly string[], snapshot: Snapshot): Analysis {
  const findings: Finding[] = [];
  const wanted = new Set<string>();
  const files = new Map<string, FileEvaluation>();
  for (const file of roots) {
    const settings = `${file.slice(0, file.lastIndexOf("/"))}/loadmark.json`;
    if (snapshot.read(settings) === undefined) wanted.add(settings);
    const text = snapshot.read(file) ?? "";
    if (text.includes("CRASH")) throw new Error("The stub was told to fail.");
    const dependencies = [file];
    for (const [, name = ""] of text.matchAll(/from "\.\/([^"]+)"/g)) {
      const imported = file.slice(0, file.lastIndexOf("/") + 1) + name;
      const there = snapshot.read(imported);
      dependencies.push(imported);
      if (there === undefined) wanted.add(imported);
      // The finding stands in the importer, as it does when a constant of another file is to blame.
      for (const [, word = ""] of (there ?? "").matchAll(/finding: (\w+)/g)) findings.push(finding(file, word, 0, 1));
    }
    for (const match of text.matchAll(/finding: (\w+)/g)) {
      findings.push(finding(file, match[1] ?? "", match.index, match.index + match[0].length));
    }
    files.set(file, { file, calls: [], dependencies, wanted: [], missing: [] });
  }
  return {
    mechanisms: [],
    motors: [],
    robots: [],
    findings,
    findingsIn: new Map(),
    inFile: new Map(),
    files,
    wanted: [...wanted],
    levels: new Map(),
    toothCounts: new Map(),
    snapshot,
  };
}

function finding(file: string, message: string, start: number, end: number): Finding {
  return { rule: "past-peak", level: "warning", mechanism: null, message, at: { file, start, end }, related: [] };
}

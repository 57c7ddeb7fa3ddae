/** One check of a file or folder: finds the files, analyses them, writes the report. */
import { realpathSync, statSync } from "node:fs";
import path from "node:path";
import { createAnalyser } from "../analysis/analyser.js";
import type { Analysis } from "../analysis/analysis.js";
import { loadParser, type Parser } from "../analysis/parser.js";
import type { Proposal } from "../analysis/proposal.js";
import { proposalsFor } from "../analysis/propose.js";
import { sensitivitiesOf } from "../analysis/sensitivity.js";
import { mentionsDeclarations } from "../analysis/sources.js";
import { spreadOf } from "../analysis/spread.js";
import { findMoved, writeMovedMarkdown, writeMovedText } from "../report/changes.js";
import { type Extras, makeReport } from "../report/report.js";
import { writeText } from "../report/text.js";
import type { CheckLine, FailOn } from "./commandLine.js";
import { createDiskSnapshot, findSources, toName } from "./disk.js";
import { readCommitted } from "./gitSnapshot.js";

export interface CheckResult {
  readonly output: string;
  readonly complaint?: string;
  readonly status: 0 | 1 | 2;
}

export async function check(line: CheckLine): Promise<CheckResult> {
  const { path: given, format, failOn, propose } = line;
  const target = path.resolve(given);
  const stats = statSync(target, { throwIfNoEntry: false });
  if (stats === undefined) return { output: "", complaint: `there is no "${given}"`, status: 2 };
  const snapshot = createDiskSnapshot(stats.isDirectory() ? target : path.dirname(target));
  const roots = stats.isDirectory() ? findSources(target, snapshot) : [toName(target)];
  if (roots.length === 0) return { output: "", complaint: `no file in "${given}" mentions "loadmark"`, status: 2 };
  const parser = await loadParser();
  const analysis = createAnalyser(parser).analyse(roots, snapshot);
  const status = fails(analysis, failOn) ? 1 : 0;
  if (line.against !== undefined) return { output: tellMoved(analysis, parser, target, line.against, line), status };
  // Names count from the checked folder, so that the report does not depend on where the command was started; a
  // terminal can open only what counts from the working directory.
  const base = format === "json" ? (stats.isDirectory() ? target : path.dirname(target)) : process.cwd();
  const nameOf = (file: string) => path.relative(base, file).split(path.sep).join("/");
  const output =
    format === "json"
      ? `${JSON.stringify(makeReport(analysis, nameOf, extrasOf(analysis, parser)), null, 2)}\n`
      : writeText(analysis, nameOf, {
          proposals: propose ? proposalsOf(analysis, parser) : [],
          spreadOf: (mechanism) => spreadOf(analysis, mechanism),
        });
  return { output, status };
}

/** The same folder as a commit holds it, analysed in the same way. */
function tellMoved(analysis: Analysis, parser: Parser, target: string, against: string, { format, movedBy }: CheckLine): string {
  const isFile = statSync(target).isFile();
  const { snapshot, sources } = readCommitted(realpathSync(isFile ? path.dirname(target) : target), against);
  const mentioning = sources.filter((file) => mentionsDeclarations(snapshot.read(file) ?? ""));
  const roots = isFile ? mentioning.filter((file) => path.posix.basename(file) === path.basename(target)) : mentioning;
  const moved = findMoved(createAnalyser(parser).analyse(roots, snapshot), analysis, movedBy);
  return format === "markdown" ? writeMovedMarkdown(moved, against) : writeMovedText(moved, against);
}

function extrasOf(analysis: Analysis, parser: Parser): Extras {
  return {
    sensitivityOf: (mechanism) => sensitivitiesOf(analysis, mechanism),
    spreadOf: (mechanism) => spreadOf(analysis, mechanism),
    proposals: proposalsOf(analysis, parser),
  };
}

/** An analyser of its own tries the changed texts. */
function proposalsOf(analysis: Analysis, parser: Parser): Proposal[] {
  const { analyse } = createAnalyser(parser);
  return analysis.findings.flatMap((finding) => proposalsFor(analysis, finding, analyse));
}

function fails(analysis: Analysis, failOn: FailOn): boolean {
  const levels = ["information", "warning", "error"];
  const from = levels.indexOf(failOn);
  return from >= 0 && analysis.findings.some(({ level }) => levels.indexOf(level) >= from);
}

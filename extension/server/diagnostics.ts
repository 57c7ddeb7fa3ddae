/**
 * Findings as the protocol's diagnostics, file by file.
 *
 * Changes nothing about them but places, which become lines and characters here, and spaces between sentences.
 */
import { type Diagnostic, DiagnosticSeverity } from "vscode-languageserver";
import type { Finding } from "../analysis/analysis.js";
import { sameItems } from "../analysis/lists.js";
import type { Span } from "../evaluator/value.js";
import { differingFiles, FileIndex } from "../features/fileIndex.js";
import type { Level } from "../rules/rule.js";
import type { LineMap } from "./lineMap.js";
import type { Result } from "./session.js";

export const SOURCE = "Loadmark";

const SEVERITIES: Readonly<Record<Level, DiagnosticSeverity>> = {
  error: DiagnosticSeverity.Error,
  warning: DiagnosticSeverity.Warning,
  information: DiagnosticSeverity.Information,
};

export type UriOf = (file: string) => string;

export interface FileDiagnostics {
  readonly uri: string;
  /** The version of the open document that they are for; absent when it isn't open. */
  readonly version?: number | undefined;
  readonly diagnostics: readonly Diagnostic[];
}

/**
 * Files with findings, and open documents with or without, so that what they are told carries their version. Valid until the next result;
 * a file's object is the same for as long as it says the same.
 */
export type DiagnosticsOf = (result: Result, uriOf: UriOf) => ReadonlyMap<string, FileDiagnostics>;

/** Looks at a file where its findings are others than in the result given before, or a text that they have a place in. */
export function createDiagnosticsReader(): DiagnosticsOf {
  const diagnosticOf = createFindingWriter();
  const byFile = new Map<string, FileDiagnostics>();
  /** Which files' findings name places in another file. */
  const pointing = new FileIndex<string>();
  let last: Result | undefined;
  return (result, uriOf) => {
    const before = last;
    // One that fails half-way is not built upon.
    last = undefined;
    const { analysis, snapshot } = result;
    const everyFile = () => [...byFile.keys(), ...analysis.findingsIn.keys(), ...snapshot.versions.keys()];
    for (const file of new Set((before && differingFrom(before, result, pointing)) ?? everyFile())) {
      const findings = analysis.findingsIn.get(file) ?? [];
      const version = snapshot.versions.get(file);
      pointing.set(
        file,
        findings.flatMap(({ related }) => related.map(({ at }) => at.file)),
      );
      if (findings.length === 0 && version === undefined) {
        byFile.delete(file);
        continue;
      }
      const uri = uriOf(file);
      const diagnostics = findings.map((finding) => diagnosticOf(finding, snapshot, uriOf));
      const known = byFile.get(file);
      const isSame = known?.uri === uri && known.version === version && sameItems(known.diagnostics, diagnostics);
      if (!isSame) byFile.set(file, { uri, version, diagnostics });
    }
    last = result;
    return byFile;
  };
}

/** `undefined`: any file may differ. */
function differingFrom(before: Result, now: Result, pointing: FileIndex<string>): string[] | undefined {
  const texts = now.snapshot.changes?.between(before.snapshot, now.snapshot);
  if (texts === undefined) return undefined;
  const files = differingFiles(before.analysis.findingsIn, now.analysis.findingsIn);
  return [...files, ...[...texts].flatMap((file) => [file, ...pointing.filesOf(file)])];
}

interface Written {
  /** Of every file that it has a place in: a place lies elsewhere once its text is another. */
  readonly lines: readonly LineMap[];
  readonly uris: readonly string[];
  readonly diagnostic: Diagnostic;
}

/** Most findings of a file are those of the last result: their diagnostics are, too. */
function createFindingWriter(): (finding: Finding, snapshot: Result["snapshot"], uriOf: UriOf) => Diagnostic {
  const known = new WeakMap<Finding, Written>();
  return (finding, snapshot, uriOf) => {
    const spans = [finding.at, ...finding.related.map(({ at }) => at)];
    const lines = spans.map(({ file }) => snapshot.lineMap(file));
    const uris = spans.map(({ file }) => uriOf(file));
    const before = known.get(finding);
    if (before !== undefined && sameItems(before.lines, lines) && sameItems(before.uris, uris)) return before.diagnostic;
    const diagnostic = writeDiagnostic(finding, lines, uris);
    known.set(finding, { lines, uris, diagnostic });
    return diagnostic;
  };
}

/** `lines` and `uris`: of the finding's own place, then of the related ones. */
function writeDiagnostic(
  { rule, level, mechanism, message, at, related }: Finding,
  lines: readonly LineMap[],
  uris: readonly string[],
): Diagnostic {
  const rangeOf = (span: Span, index: number) => (lines[index] as LineMap).rangeOf(span);
  return {
    range: rangeOf(at, 0),
    severity: SEVERITIES[level],
    code: rule,
    source: SOURCE,
    message: inLines(message),
    data: { rule, mechanism },
    ...(related.length === 0
      ? {}
      : {
          relatedInformation: related.map((one, index) => ({
            location: { uri: uris[index + 1] as string, range: rangeOf(one.at, index + 1) },
            message: one.message,
          })),
        }),
  };
}

/** A line for each sentence: some of the editor's views do not wrap lines, and would cut off the way out. */
export function inLines(message: string): string {
  return message.replaceAll(/(?<=[.!?]) (?=\p{Lu})/gu, "\n");
}

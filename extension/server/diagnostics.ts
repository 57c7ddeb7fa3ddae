/**
 * Findings as the protocol's diagnostics, file by file.
 *
 * Changes nothing about them but places, which become lines and characters here, and spaces between sentences.
 */
import { type Diagnostic, DiagnosticSeverity } from "vscode-languageserver";
import type { Finding } from "../analysis/analysis.js";
import type { Span } from "../evaluator/value.js";
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

export type DiagnosticsOf = (result: Result, uriOf: UriOf) => ReadonlyMap<string, readonly Diagnostic[]>;

interface Written {
  /** Of every file that it has a place in: a place lies elsewhere once its text is another. */
  readonly lines: readonly LineMap[];
  readonly uris: readonly string[];
  readonly diagnostic: Diagnostic;
}

/** Most findings are those of the last result: their diagnostics are, too. Files without findings are absent. */
export function createDiagnosticsReader(): DiagnosticsOf {
  const known = new WeakMap<Finding, Written>();
  return ({ analysis, snapshot }, uriOf) => {
    const byFile = new Map<string, Diagnostic[]>();
    const isCurrent = ({ lines, uris }: Written, { at, related }: Finding): boolean => {
      const isAt = ({ file }: Span, index: number) => lines[index] === snapshot.lineMap(file) && uris[index] === uriOf(file);
      return isAt(at, 0) && related.every((one, index) => isAt(one.at, index + 1));
    };
    const write = (finding: Finding): Diagnostic => {
      const spans = [finding.at, ...finding.related.map(({ at }) => at)];
      const lines = spans.map(({ file }) => snapshot.lineMap(file));
      const uris = spans.map(({ file }) => uriOf(file));
      const diagnostic = diagnosticOf(finding, lines, uris);
      known.set(finding, { lines, uris, diagnostic });
      return diagnostic;
    };
    for (const finding of analysis.findings) {
      const before = known.get(finding);
      const diagnostic = before !== undefined && isCurrent(before, finding) ? before.diagnostic : write(finding);
      const { file } = finding.at;
      const diagnostics = byFile.get(file);
      if (diagnostics === undefined) byFile.set(file, [diagnostic]);
      else diagnostics.push(diagnostic);
    }
    return byFile;
  };
}

/** `lines` and `uris`: of the finding's own place, then of the related ones. */
function diagnosticOf(
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

export function sameItems<Item>(one: readonly Item[], other: readonly Item[]): boolean {
  return one.length === other.length && one.every((item, index) => item === other[index]);
}

/** A line for each sentence: some of the editor's views do not wrap lines, and would cut off the way out. */
export function inLines(message: string): string {
  return message.replaceAll(/(?<=[.!?]) (?=\p{Lu})/gu, "\n");
}

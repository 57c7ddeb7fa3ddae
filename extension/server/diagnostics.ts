/**
 * Findings as the protocol's diagnostics, file by file.
 *
 * Changes nothing about them but places, which become lines and characters here, and spaces between sentences.
 */
import { type Diagnostic, DiagnosticSeverity } from "vscode-languageserver";
import type { Finding } from "../analysis/analysis.js";
import type { Span } from "../evaluator/value.js";
import type { Level } from "../rules/rule.js";
import type { Result } from "./session.js";

export const SOURCE = "Loadmark";

const SEVERITIES: Readonly<Record<Level, DiagnosticSeverity>> = {
  error: DiagnosticSeverity.Error,
  warning: DiagnosticSeverity.Warning,
  information: DiagnosticSeverity.Information,
};

export type UriOf = (file: string) => string;

/** Files without findings are absent. */
export function diagnosticsOf({ analysis, snapshot }: Result, uriOf: UriOf): ReadonlyMap<string, readonly Diagnostic[]> {
  const rangeOf = (span: Span) => snapshot.lineMap(span.file).rangeOf(span);
  const diagnosticOf = ({ rule, level, mechanism, message, at, related }: Finding): Diagnostic => ({
    range: rangeOf(at),
    severity: SEVERITIES[level],
    code: rule,
    source: SOURCE,
    message: inLines(message),
    data: { rule, mechanism },
    ...(related.length === 0
      ? {}
      : {
          relatedInformation: related.map((one) => ({
            location: { uri: uriOf(one.at.file), range: rangeOf(one.at) },
            message: one.message,
          })),
        }),
  });
  const byFile = new Map<string, Diagnostic[]>();
  for (const finding of analysis.findings) {
    const diagnostics = byFile.get(finding.at.file);
    if (diagnostics === undefined) byFile.set(finding.at.file, [diagnosticOf(finding)]);
    else diagnostics.push(diagnosticOf(finding));
  }
  return byFile;
}

/** A line for each sentence: some of the editor's views do not wrap lines, and would cut off the way out. */
export function inLines(message: string): string {
  return message.replaceAll(/(?<=[.!?]) (?=\p{Lu})/gu, "\n");
}

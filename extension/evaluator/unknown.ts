/**
 * Makes values: known ones with their origin, and unknowns with one plain sentence that names the expression.
 *
 * All wording of the evaluator is here. It decides nothing.
 */
import type ts from "typescript";
import type { Module } from "./context.js";
import { findNearest } from "./nearest.js";
import type { Data, Known, Origin, Span, Unknown, UnknownReason } from "./value.js";

type Code = UnknownReason["code"];

const LONGEST = 40;

export function known(data: Data, origin: Origin): Known {
  return { known: true, data, origin };
}

export function primitive(value: string | number | boolean | bigint | null | undefined, origin: Origin): Known {
  return { known: true, data: { kind: "primitive", value }, origin };
}

export function unknown(code: Code, message: string, advice: string, origin: Origin, cause?: Unknown): Unknown {
  const reason = { code, message, advice };
  return cause === undefined ? { known: false, reason, origin } : { known: false, reason, origin, cause };
}

/** An unknown because a part of it is; the part's own message tells why. */
export function dependent(node: ts.Node, module: Module, origin: Origin, cause: Unknown): Unknown {
  const { span } = cause.origin;
  // Brackets and assertions around an unknown are no link of the chain.
  if (span.file === module.file && span.start === origin.span.start && span.end === origin.span.end) return cause;
  const message = `${quote(node, module)} depends on a value that cannot be known.`;
  const made = unknown("depends", message, cause.reason.advice, origin, cause);
  return cause.reportedBy === undefined ? made : { ...made, reportedBy: cause.reportedBy };
}

export function unsupported(node: ts.Node, module: Module, why: string, from: readonly Origin[] = []): Unknown {
  const origin: Origin = { kind: "operation", span: spanOf(node, module), from };
  return unknown("unsupported", `${quote(node, module)} ${why}.`, "write the value as a constant", origin);
}

export function tooDeep(node: ts.Node, module: Module): Unknown {
  const origin: Origin = { kind: "operation", span: spanOf(node, module), from: [] };
  return unknown("too-deep", `${quote(node, module)} takes too many steps to work out.`, "write the value as a constant", origin);
}

/** The end of a sentence: "did you mean" for the nearest of the candidates, if one is near. */
export function suggest(name: string, candidates: Iterable<string>): string {
  const near = findNearest(name, candidates);
  return near === undefined ? "." : `; did you mean \`${near}\`?`;
}

export function spanOf(node: ts.Node, module: Module): Span {
  return { file: module.file, start: module.source.startOf(node), end: node.end };
}

/** The expression's own text on one line, shortened, in backquotes. */
export function quote(node: ts.Node, module: Module): string {
  const start = module.source.startOf(node);
  return quoteText(module.source.text.slice(start, Math.min(node.end, start + 400)));
}

export function quoteText(text: string): string {
  const line = text.replaceAll(/[\p{White_Space}\p{Cc}\p{Cf}]+/gu, " ").trim();
  if (line.length <= LONGEST) return `\`${line}\``;
  // A cut between the two halves of a surrogate pair would leave a broken character.
  const cut = line.slice(0, LONGEST - 1).replace(/[\uD800-\uDBFF]$/, "");
  return `\`${cut}…\``;
}

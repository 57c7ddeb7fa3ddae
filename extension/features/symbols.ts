/** What the editor's outline and its search for names can find: mechanisms, motors and robots. */
import type { Analysis } from "../analysis/analysis.js";
import type { Span } from "../evaluator/value.js";
import { plainText } from "./inertText.js";

export interface DeclaredSymbol {
  /** Plain text. */
  readonly name: string;
  readonly kind: "mechanism" | "motor" | "robot";
  /** The whole declaration. */
  readonly span: Span;
  /** The name that is selected; inside `span`. */
  readonly selection: Span;
}

/** In order of position. */
export function documentSymbolsOf(analysis: Analysis, file: string): DeclaredSymbol[] {
  return allSymbols(analysis)
    .filter(({ span }) => span.file === file)
    .sort((one, other) => one.span.start - other.span.start);
}

/** Symbols whose name holds the letters of `query` in their order, whatever their case; all for an empty query. */
export function workspaceSymbolsOf(analysis: Analysis, query: string): DeclaredSymbol[] {
  return allSymbols(analysis).filter(({ name }) => holdsInOrder(name.toLowerCase(), query.toLowerCase()));
}

function allSymbols({ mechanisms, motors, robots }: Analysis): DeclaredSymbol[] {
  return [
    ...mechanisms.map(({ name, at, call }) => symbol(name, "mechanism", at, call.span)),
    ...motors.map(({ at, call }) => symbol(call.binding?.name ?? "motor", "motor", at, call.span)),
    ...robots.map(({ name, at, call }) => symbol(name, "robot", at, call.span)),
  ];
}

function symbol(name: string, kind: DeclaredSymbol["kind"], at: Span, call: Span): DeclaredSymbol {
  // A name argument may come from another file; the symbol stays where the call is.
  const selection = at.file === call.file ? at : call;
  const start = Math.min(selection.start, call.start);
  const end = Math.max(selection.end, call.end);
  return { name: plainText(name), kind, span: { file: call.file, start, end }, selection };
}

function holdsInOrder(name: string, letters: string): boolean {
  let from = 0;
  for (const letter of letters) {
    const at = name.indexOf(letter, from);
    if (at < 0) return false;
    from = at + letter.length;
  }
  return true;
}

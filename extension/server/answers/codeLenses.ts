/** Code lenses: places at once, titles when one comes into view, from the result of then. */
import type { CodeLens } from "vscode-languageserver";
import { codeLensesOf, type CodeLens as Lens } from "../../features/codeLenses.js";
import type { MechanismsIn } from "../../features/mechanismIndex.js";
import type { Committed } from "../../features/sinceCommit.js";
import { SHOW_CHART } from "../../protocol/commands.js";
import type { CurrentFile } from "../current.js";
import type { Result } from "../session.js";

interface LensData {
  readonly file: string;
  readonly mechanism: string;
  /** Position among the lenses of the file with the same name. */
  readonly index: number;
}

/** All lenses of a file. `committed`: what the last commit has. */
export type LensesOf = (result: Result, file: string, committed?: Committed) => readonly Lens[];

export function createLensReader(mechanismsIn: MechanismsIn): LensesOf {
  return ({ analysis }, file, committed) => codeLensesOf(analysis, file, committed, mechanismsIn(analysis, file));
}

export function answerCodeLenses(lensesOf: LensesOf, { result, file, lines, carry }: CurrentFile): CodeLens[] {
  const seen = new Map<string, number>();
  return lensesOf(result, file).map(({ span, mechanism }) => {
    const index = seen.get(mechanism) ?? 0;
    seen.set(mechanism, index + 1);
    const data: LensData = { file, mechanism, index };
    return { range: lines.rangeOf(carry(span)), data };
  });
}

/** `commands`: those that the client has. */
export function resolveCodeLens(
  lensesOf: LensesOf,
  result: Result,
  lens: CodeLens,
  { commands, committed }: { readonly commands: readonly string[]; readonly committed: Committed },
): CodeLens {
  const { file, mechanism, index } = lens.data as LensData;
  const found = lensesOf(result, file, committed).filter((one) => one.mechanism === mechanism)[index];
  const title = found?.title ?? mechanism;
  const opens = found !== undefined && commands.includes(SHOW_CHART);
  return { ...lens, command: opens ? { title, command: SHOW_CHART, arguments: [mechanism] } : { title, command: "" } };
}

/** True when `next` gives other lenses than those shown, which moved along with the text. `committedOf`: what the last commit has. */
export function changesCodeLenses(
  lensesOf: LensesOf,
  shown: CurrentFile | undefined,
  next: Result,
  file: string,
  committedOf: (result: Result) => Committed,
): boolean {
  const before = shown === undefined ? [] : lensesOf(shown.result, file, committedOf(shown.result));
  const moved = before.map((lens) => ({ ...lens, span: shown?.carry(lens.span) ?? lens.span }));
  return summary(moved) !== summary(lensesOf(next, file, committedOf(next)));
}

function summary(lenses: readonly Lens[]): string {
  return JSON.stringify(lenses.map(({ span, title, mechanism }) => [span.start, title, mechanism]));
}

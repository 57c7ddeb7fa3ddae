/** Inlay hints, moved along with the text until the next result; whether that result changes them is told here too. */
import type { InlayHint, Range } from "vscode-languageserver";
import { type InlayHint as Hint, inlayHintsIn } from "../../features/inlayHints.js";
import type { MechanismsIn } from "../../features/mechanismIndex.js";
import type { CurrentFile } from "../current.js";
import type { DisplaySettings } from "../displaySettings.js";
import type { Result } from "../session.js";

/** All hints of a file. */
export type HintsOf = (result: Result, file: string) => readonly Hint[];

/** Hints are asked for at every scroll, and compared with each new result: they are worked out once for each. */
export function createHintReader(mechanismsIn: MechanismsIn): HintsOf {
  const known = new WeakMap<Result, Map<string, readonly Hint[]>>();
  return (result, file) => {
    const { analysis, snapshot } = result;
    const byFile = known.get(result) ?? new Map<string, readonly Hint[]>();
    known.set(result, byFile);
    const before = byFile.get(file);
    if (before !== undefined) return before;
    const found = inlayHintsIn(analysis, file, 0, snapshot.read(file)?.length ?? 0, mechanismsIn(analysis, file));
    byFile.set(file, found);
    return found;
  };
}

export interface HintWish {
  readonly range: Range;
  readonly hints: DisplaySettings["hints"];
}

export function answerInlayHints(hintsOf: HintsOf, current: CurrentFile, { range, hints: wish }: HintWish): InlayHint[] {
  const { result, file, lines } = current;
  if (wish === "off") return [];
  const start = lines.offsetAt(range.start);
  const end = lines.offsetAt(range.end);
  return hintsOf(result, file)
    .filter(({ state }) => wish === "all" || state === "error" || state === "warning")
    .map((hint) => ({ ...hint, offset: carryOffset(current, hint) }))
    .filter(({ offset }) => start <= offset && offset <= end)
    .map(({ offset, label, tooltip }) => ({ position: lines.positionAt(offset), label, tooltip, paddingLeft: true }));
}

/** True when `next` gives other hints than those shown, which moved along with the text. */
export function changesInlayHints(hintsOf: HintsOf, shown: CurrentFile | undefined, next: Result, file: string): boolean {
  const before =
    shown === undefined ? [] : hintsOf(shown.result, file).map((hint) => ({ ...hint, offset: carryOffset(shown, hint) }));
  return JSON.stringify(before) !== JSON.stringify(hintsOf(next, file));
}

/** A hint follows what it stands behind; text put in right there comes after it. */
function carryOffset(current: CurrentFile, { offset }: Hint): number {
  return current.carry({ start: Math.max(0, offset - 1), end: offset }).end;
}

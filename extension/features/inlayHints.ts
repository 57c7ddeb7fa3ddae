/**
 * Short notes beside the code: torque and speed behind each stage, share of stall at the mechanism's name.
 *
 * A label has at most 16 characters, since the editor cuts a line's notes at 43 in all; what it means is in the tooltip.
 */
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";
import type { Origin, Span, Value } from "../evaluator/value.js";
import { writeQuantity, writeShare } from "../units/write.js";
import { passedThrough } from "./feeds.js";
import { plainText } from "./inertText.js";
import { type ShaftPoint, shaftsOf } from "./shaft.js";
import { type State, verdictOf, worse } from "./verdict.js";

export interface InlayHint {
  readonly offset: number;
  readonly label: string;
  /** Plain text. */
  readonly tooltip: string;
  /** Of the worst mechanism that it speaks of, for a display that is limited to warnings. */
  readonly state: State;
}

export const LONGEST_LABEL = 16;

/** Hints at offsets from `start` to `end`, in order. `mechanisms`: all that may have one in the file, in the analysis's order. */
export function inlayHintsIn(
  analysis: Analysis,
  file: string,
  start: number,
  end: number,
  mechanisms: readonly AnalysedMechanism[] = analysis.mechanisms,
): InlayHint[] {
  const hints = mechanisms.flatMap((mechanism) => {
    const { state } = verdictOf(analysis, mechanism);
    return [...shareHints(mechanism, file, state), ...stageHints(mechanism, stagePlaces(mechanism, file), state)];
  });
  const inRange = hints.filter(({ offset }) => start <= offset && offset <= end);
  return mergeAtSamePlace(inRange).sort((one, other) => one.offset - other.offset);
}

/** Where a mechanism's hints may stand: by its name, and along the ways of its stages. */
export function filesWithHints({ call }: AnalysedMechanism): ReadonlySet<string> {
  const files = new Set([call.span.file]);
  const [name, fields] = call.args;
  if (name !== undefined) files.add(name.origin.span.file);
  const stages = fieldOf(fields, "stages");
  if (!stages?.known || stages.data.kind !== "array") return files;
  for (const { origin } of stages.data.items) {
    for (let one: Origin | undefined = origin; one !== undefined; [one] = one.from) files.add(one.span.file);
  }
  return files;
}

function shareHints(mechanism: AnalysedMechanism, file: string, state: State): InlayHint[] {
  const at = mechanism.call.args[0]?.origin.span;
  const hardest = mechanism.numbers?.hardest;
  if (at?.file !== file || hardest === undefined || hardest.stallShare === null) return [];
  const share = `${writeShare(hardest.stallShare)} of stall`;
  const label = hardest.motorSpeedRadPerS === 0 || share.length > LONGEST_LABEL ? "stalls" : share;
  const tooltip = `${plainText(mechanism.name)}: each motor needs ${share} torque at the hardest position.`;
  return [{ offset: at.end, label, tooltip, state }];
}

function stageHints(mechanism: AnalysedMechanism, places: readonly (Span | undefined)[], state: State): InlayHint[] {
  const behind = shaftsOf(mechanism).slice(1);
  return behind.flatMap((shaft, index) => {
    const place = places[index];
    if (place === undefined) return [];
    const speed = shaft.speedRadPerS === 0 ? "stalled" : writeQuantity(shaft.speedRadPerS, "speed");
    const tooltip = `${plainText(mechanism.name)}: behind stage ${index + 1}, ${writeQuantity(shaft.torqueNm, "torque")}, ${speed}, at the hardest position.`;
    return [{ offset: place.end, label: shortLabel(shaft), tooltip, state }];
  });
}

/** Where each stage is written in `file`; `undefined` for one that is written elsewhere, as through a spread. */
function stagePlaces({ call }: AnalysedMechanism, file: string): readonly (Span | undefined)[] {
  const stages = fieldOf(call.args[1], "stages");
  if (!stages?.known || stages.data.kind !== "array") return [];
  return stages.data.items.map((item) => spanIn(item.origin, call.span, file));
}

/** The occurrence within the mechanism's own declaration; else, in its file, the nearest to the use. */
function spanIn(origin: Origin, declaration: Span, file: string): Span | undefined {
  const here = passedThrough(origin)
    .map(({ span }) => span)
    .filter((span) => span.file === file);
  return here.find((span) => declaration.start <= span.start && span.end <= declaration.end) ?? here[0];
}

/** As many digits as fit. */
function shortLabel({ torqueNm, speedRadPerS }: ShaftPoint): string {
  for (const digits of [3, 2, 1]) {
    const torque = writeQuantity(torqueNm, "torque", digits);
    const label = speedRadPerS === 0 ? `${torque} stall` : `${torque} ${writeQuantity(speedRadPerS, "speed", digits)}`;
    if (label.length <= LONGEST_LABEL) return label;
  }
  return writeQuantity(torqueNm, "torque", 2).slice(0, LONGEST_LABEL);
}

/** A loop or a shared list of stages serves several mechanisms: one label, that of the worst, and a tooltip that tells of each. */
function mergeAtSamePlace(hints: readonly InlayHint[]): InlayHint[] {
  const byOffset = new Map<number, InlayHint>();
  for (const hint of hints) {
    const before = byOffset.get(hint.offset);
    if (before === undefined) byOffset.set(hint.offset, hint);
    else {
      const isWorse = before.state !== hint.state && worse(before.state, hint.state) === hint.state;
      byOffset.set(hint.offset, { ...(isWorse ? hint : before), tooltip: `${before.tooltip}\n${hint.tooltip}` });
    }
  }
  return [...byOffset.values()];
}

function fieldOf(value: Value | undefined, key: string): Value | undefined {
  return value?.known === true && value.data.kind === "object" ? value.data.entries.get(key) : undefined;
}

/**
 * Which declared numbers matter: per cent of a result for one per cent of an input.
 *
 * Central differences of logarithms, by building the declaration again; counts (teeth, motors) go by one up and down. Costs two short
 * solutions for every number that the results depend on, so it is computed when asked for and not on every edit.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Drive, Supply } from "../model/drive.js";
import { type Effects, effectsOf, withoutWatches } from "../model/effects.js";
import type { AnalysedMechanism, Analysis } from "./analysis.js";
import { robotOf, supplyCallOf } from "./lentSupply.js";
import { type Leaf, leavesBelow, rebuild } from "./rebuild.js";

export interface Sensitivity {
  /** Where the number is declared, from the mechanism inwards: "load.mass", "stages[0].driver". */
  readonly input: string;
  readonly output: "current" | "time" | "share";
  readonly perCentPerPerCent: number;
}

/** Step of a quantity as a share: the error of the difference is about its square over 6, the solver's noise 1e-7 over twice of it. */
const STEP = 3e-3;
/** Below this an input does not matter: it is the noise of the solver. */
const LEAST = 1e-4;

/** By falling size; empty where the mechanism has no numbers. */
export function sensitivitiesOf(analysis: Analysis, { call, declared, numbers, drive }: AnalysedMechanism): Sensitivity[] {
  if (declared === undefined || numbers === undefined) return [];
  const robot = declared.si.supply === undefined ? robotOf(declared, analysis.robots) : undefined;
  const supplyCall = robot && supplyCallOf(robot);
  const leaves = [
    ...leavesBelow(call),
    ...(supplyCall === undefined ? [] : leavesBelow(supplyCall).map((leaf) => ({ ...leaf, label: `supply.${leaf.label}` }))),
  ];
  const driveWith = (leaf: Leaf, plain: string | number): Drive | undefined => {
    const replacements = new Map([[leaf, plain]]);
    const mechanism = rebuild(call, replacements) as Mechanism | undefined;
    const lent = supplyCall && (rebuild(supplyCall, replacements) as { readonly si: Supply } | undefined)?.si;
    return mechanism && withoutWatches(lent === undefined ? mechanism.si : { ...mechanism.si, supply: lent });
  };
  const nominal = JSON.stringify(drive && withoutWatches(drive));
  const found = leaves.flatMap((leaf): Sensitivity[] => {
    const steps = stepsOf(leaf);
    const high = steps && driveWith(leaf, steps[1].plain);
    // What is only watched moves nothing.
    if (steps === undefined || high === undefined || JSON.stringify(high) === nominal) return [];
    const low = driveWith(leaf, steps[0].plain);
    return low === undefined
      ? []
      : between(leaf.label, effectsOf(low), effectsOf(high), Math.log(steps[1].value / steps[0].value));
  });
  return found.sort((a, b) => sizeOf(b) - sizeOf(a) || compare(a, b));
}

const OUTPUTS = { current: "currentA", time: "timeS", share: "share" } as const satisfies Record<
  Sensitivity["output"],
  keyof Effects
>;

/** `span`: between the logarithms of the input. */
function between(input: string, low: Effects, high: Effects, span: number): Sensitivity[] {
  return Object.entries(OUTPUTS).flatMap(([output, effect]) => {
    const [before, after] = [low[effect], high[effect]];
    if (!(before !== null && after !== null && before > 0 && after > 0)) return [];
    const perCentPerPerCent = Math.log(after / before) / span;
    return Math.abs(perCentPerPerCent) < LEAST ? [] : [{ input, output: output as Sensitivity["output"], perCentPerPerCent }];
  });
}

interface Step {
  readonly plain: string | number;
  readonly value: number;
}

const COUNTS = new Set(["driver", "driven", "sun", "ring", "starts", "wheelTeeth", "motorCount"]);

/** Two neighbours of the value; `undefined` for 0, for words and for what is not a quantity. */
function stepsOf({ plain, range, label }: Leaf): readonly [Step, Step] | undefined {
  if (range !== undefined) return stepsOfRange(range);
  if (typeof plain === "number" && COUNTS.has(label.slice(label.lastIndexOf(".") + 1))) {
    const low = Math.max(plain - 1, 1);
    return [step(low), step(plain + 1)];
  }
  const split = splitQuantity(plain);
  if (split === undefined) return undefined;
  return [times(split, 1 - STEP), times(split, 1 + STEP)];
}

/** A range is moved as a whole: its middle counts. */
function stepsOfRange([low, high]: readonly [string | number, string | number]): readonly [Step, Step] | undefined {
  const [from, to] = [splitQuantity(low), splitQuantity(high)];
  if (from === undefined || to === undefined || from.unit !== to.unit) return undefined;
  const middle = { value: (from.value + to.value) / 2, unit: from.unit };
  return middle.value === 0 ? undefined : [times(middle, 1 - STEP), times(middle, 1 + STEP)];
}

interface Split {
  readonly value: number;
  /** With the space before it; empty for a plain number. */
  readonly unit: string;
}

function splitQuantity(plain: string | number): Split | undefined {
  if (typeof plain === "number") return plain === 0 ? undefined : { value: plain, unit: "" };
  const space = plain.indexOf(" ");
  const value = space < 0 ? Number.NaN : Number(plain.slice(0, space));
  return Number.isFinite(value) && value !== 0 ? { value, unit: plain.slice(space) } : undefined;
}

function times({ value, unit }: Split, factor: number): Step {
  const changed = value * factor;
  return unit === "" ? step(changed) : { plain: `${changed}${unit}`, value: changed };
}

function step(value: number): Step {
  return { plain: value, value };
}

/** To four decimals: below that, what is equal would stand in the order of its rounding. */
function sizeOf({ perCentPerPerCent }: Sensitivity): number {
  return Math.round(Math.abs(perCentPerPerCent) * 1e4);
}

function compare(a: Sensitivity, b: Sensitivity): number {
  const [one, other] = [`${a.input} ${a.output}`, `${b.input} ${b.output}`];
  return one === other ? 0 : one < other ? -1 : 1;
}

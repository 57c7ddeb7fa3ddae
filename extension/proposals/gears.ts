/**
 * Other gears: one gear of a stage, both gears of a stage, one gear of each of two stages, another plain ratio, one more stage; the smallest change of ratio first.
 *
 * Only ratios that can help are listed: the search prunes by the factor that is needed, and simulates nothing.
 */
import type { Stage } from "../declarations/stages.js";
import type { Change, Situation } from "./change.js";

/** What a choice of gears rests on. */
export type Gearing = Pick<Situation, "mechanism" | "toothCounts">;

/** Bounds of the new ratio over the old one. */
export interface Wanted {
  readonly atLeast: number;
  readonly atMost: number;
}

const TOOTHED: ReadonlySet<Stage["kind"]> = new Set(["spur", "chain", "belt"]);
/** Rounding of a sum of logarithms must not lose the ratio that is exactly enough. */
const SLACK = 1e-9;

/** One gear of one stage, or the number of one plain reduction. */
export function oneGear({ mechanism, toothCounts }: Gearing, wanted: Wanted): Change[] {
  return mechanism.stages
    .flatMap((stage, index) => {
      if (stage.kind === "reduction") return otherReduction(stage, index, wanted);
      if (!TOOTHED.has(stage.kind)) return [];
      return [0, 1].flatMap((argument) => toothCounts.flatMap((teeth) => withTeeth(stage, index, [[argument, teeth]], wanted)));
    })
    .sort(bySize)
    .map(({ change }) => change);
}

/** Both gears of one stage. */
export function twoGears({ mechanism, toothCounts }: Gearing, wanted: Wanted): Change[] {
  return mechanism.stages
    .flatMap((stage, index) => {
      if (!TOOTHED.has(stage.kind)) return [];
      return toothCounts.flatMap((driver) =>
        toothCounts.flatMap((driven) =>
          withTeeth(
            stage,
            index,
            [
              [0, driver],
              [1, driven],
            ],
            wanted,
          ),
        ),
      );
    })
    .sort(bySize)
    .map(({ change }) => change);
}

/** One gear of each of two stages, where one alone would not be enough. */
export function twoStages({ mechanism, toothCounts }: Gearing, wanted: Wanted): Change[] {
  const any = { atLeast: 0, atMost: Number.POSITIVE_INFINITY };
  const ways = mechanism.stages.map((stage, index) =>
    TOOTHED.has(stage.kind)
      ? [0, 1].flatMap((argument) => toothCounts.flatMap((teeth) => withTeeth(stage, index, [[argument, teeth]], any)))
      : [],
  );
  return ways
    .flatMap((firsts, index) =>
      ways
        .slice(index + 1)
        .flatMap((seconds) =>
          firsts.flatMap((one) =>
            seconds
              .filter((other) => isWanted(one.factor * other.factor, wanted))
              .map((other) => ({ factor: one.factor * other.factor, change: both(one.change, other.change) })),
          ),
        ),
    )
    .sort(bySize)
    .map(({ change }) => change);
}

function both(one: Change, other: Change): Change {
  return { sets: [...one.sets, ...other.sets], words: `${one.words} and ${other.words}` };
}

/** One more pair of spur gears behind the stages that are there. */
export function oneMoreStage({ toothCounts }: Gearing, wanted: Wanted): Change[] {
  return toothCounts
    .flatMap((driver) => toothCounts.map((driven) => ({ driver, driven, factor: driven / driver })))
    .filter(({ factor }) => factor !== 1 && isWanted(factor, wanted))
    .sort((a, b) => Math.abs(Math.log(a.factor)) - Math.abs(Math.log(b.factor)) || a.driver - b.driver)
    .map(({ driver, driven }) => ({
      sets: [{ addSpur: [driver, driven] }],
      words: `one more stage of ${driver} and ${driven} teeth`,
    }));
}

interface Sized {
  readonly change: Change;
  readonly factor: number;
}

function withTeeth(stage: Stage, index: number, teeth: readonly (readonly [number, number])[], wanted: Wanted): Sized[] {
  const [driver, driven] = [teethAt(stage, teeth, 0), teethAt(stage, teeth, 1)];
  if (driver === undefined || driven === undefined || teeth.some(([argument, value]) => stage.given[argument] === value))
    return [];
  const factor = driven / driver / stage.ratio;
  if (factor === 1 || !isWanted(factor, wanted)) return [];
  return [
    {
      factor,
      change: {
        sets: teeth.map(([argument, value]) => ({ stage: index, argument, value })),
        words: `stage ${index + 1} with ${driver} and ${driven} teeth`,
      },
    },
  ];
}

function teethAt({ given }: Stage, teeth: readonly (readonly [number, number])[], argument: number): number | undefined {
  const changed = teeth.find(([which]) => which === argument)?.[1];
  const written = given[argument];
  return changed ?? (typeof written === "number" ? written : undefined);
}

/** Plain ratios are not bound to teeth: what is needed and a little more, in three digits. */
function otherReduction(stage: Stage, index: number, { atLeast, atMost }: Wanted): Sized[] {
  const factors =
    atLeast > 1
      ? [1.02, 1.1, 1.25, 1.5, 2].map((more) => atLeast * more)
      : [0.98, 0.9, 0.75, 0.5].map((less) => Math.min(atMost, 1) * less);
  return factors
    .map((factor) => Number((stage.ratio * factor).toPrecision(3)))
    .filter((ratio) => isWanted(ratio / stage.ratio, { atLeast, atMost }))
    .map((ratio) => ({
      factor: ratio / stage.ratio,
      change: { sets: [{ stage: index, argument: 0, value: ratio }], words: `stage ${index + 1} with a ratio of ${ratio}` },
    }));
}

function isWanted(factor: number, { atLeast, atMost }: Wanted): boolean {
  return factor >= atLeast * (1 - SLACK) && factor <= atMost * (1 + SLACK);
}

function bySize(a: Sized, b: Sized): number {
  return Math.abs(Math.log(a.factor)) - Math.abs(Math.log(b.factor)) || a.change.words.localeCompare(b.change.words, "en");
}

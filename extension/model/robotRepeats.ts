/**
 * Cycles of a robot that need not be followed: those that repeat the last one, and those in which only slow heat still rises.
 *
 * Deliberately not here: the cycles that are followed (robotRun.ts).
 */
import { heatTimeConstants } from "./heat.js";
import type { RobotPart } from "./robotPart.js";
import type { RobotRun } from "./robotRun.js";

/** State and sums at the end of a cycle. */
export interface CycleMark {
  readonly heatC: readonly (readonly [windingC: number, housingC: number])[];
  /** θ and damages, own and shared. */
  readonly borne: readonly number[];
  readonly speeds: readonly number[];
  readonly open: readonly boolean[];
  /** Whether something that is open will close by itself. */
  readonly waits: boolean;
  /** Charge, depletion, energy, then each mechanism's energy. */
  readonly sums: readonly number[];
}

export interface Skip {
  readonly cycles: number;
  /** True where nothing is left to rise. */
  readonly periodic: boolean;
  /** By mechanism, K. */
  readonly risesK: readonly (readonly [winding: number, housing: number])[];
}

/** Heat that changes by less than this in a cycle, and then by less than this in all that is left, has come to its periodic state, K. */
const PERIODIC_K = 0.1;
/** What protectors have borne, as a share of what opens them, and turning speeds must repeat to this. */
const REPEATS = 1e-3;
/** One skip lets no temperature rise by more, K. */
const MOST_RISE_K = 2;
/** Fewer cycles are not worth skipping while heat still rises. */
const LEAST_SKIPPED = 8;

export function markCycle(run: RobotRun): CycleMark {
  const { parts, protectors, sums, sharing } = run;
  return {
    heatC: parts.map(({ carried }) => [carried.windingC, carried.housingC] as const),
    borne: [
      ...parts.flatMap(({ carried }) => [carried.protection, carried.fast]),
      ...sharing.shared.flatMap(({ state, fast }) => [state, fast]),
    ],
    speeds: parts.map(({ plant, speedRadPerS }) => (plant.load.endless ? speedRadPerS : 0)),
    open: protectors.map(({ open }) => open),
    waits: protectors.some(({ open, closesAtS }) => open && Number.isFinite(closesAtS)),
    sums: [sums.chargeAs, sums.depletedAs, sums.energyJ, ...parts.map(({ energyJ }) => energyJ)],
  };
}

/** What may be skipped of the cycles left; `marks`: after the last cycle, before it, and, where it was followed too, one earlier. Null: nothing. */
export function planSkip(run: RobotRun, marks: readonly CycleMark[], left: number, cycleS: number): Skip | null {
  const [after, before] = marks;
  if (!after || !before || !repeats(run, before, after)) return null;
  const changes = run.parts.map((part) => changeOf(part, marks, cycleS));
  if (changes.some(({ perCycleK }) => perCycleK >= PERIODIC_K)) return null;
  if (slowestProtector(run, before, after, left, cycleS) > REPEATS) return null;
  const riseK = (cycles: number): number =>
    Math.max(0, ...changes.map((change) => change.perCycleK * repeated(change.share, cycles)));
  const fits = cyclesThatFit(run, before, after);
  const periodic = riseK(left) < PERIODIC_K;
  // Not yet known how it goes on, or ever faster.
  if (!periodic && changes.some(({ share }) => share >= 1)) return null;
  let cycles = left;
  if (!periodic) while (riseK(cycles) > MOST_RISE_K) cycles = Math.floor(cycles / 2);
  cycles = Math.min(cycles, fits);
  if (cycles < 1 || (!periodic && cycles < Math.min(LEAST_SKIPPED, fits))) return null;
  return {
    cycles,
    periodic,
    risesK: changes.map(({ byNodeK, share }) => [byNodeK[0] * repeated(share, cycles), byNodeK[1] * repeated(share, cycles)]),
  };
}

/** Takes the cycles as done, each with the sums of the last one. */
export function skip(run: RobotRun, plan: Skip, lastCycle: readonly number[]): void {
  run.cycle += plan.cycles;
  addSums(run, lastCycle, plan.cycles);
  for (const part of run.parts) {
    const [winding, housing] = plan.risesK[part.index] ?? [0, 0];
    const { carried } = part;
    part.carried = { ...carried, windingC: carried.windingC + winding, housingC: carried.housingC + housing };
  }
}

export function sumsBetween(before: CycleMark, after: CycleMark): number[] {
  return after.sums.map((value, i) => value - (before.sums[i] ?? 0));
}

/** Adds sums `times` over. */
export function addSums(run: RobotRun, sums: readonly number[], times: number): void {
  const [charge = 0, depletion = 0, energy = 0, ...byPart] = sums;
  run.sums.chargeAs += times * charge;
  run.sums.depletedAs += times * depletion;
  run.sums.energyJ += times * energy;
  for (const part of run.parts) part.energyJ += times * (byPart[part.index] ?? 0);
}

function repeats({ parts }: RobotRun, before: CycleMark, after: CycleMark): boolean {
  if (before.waits || after.waits) return false;
  if (after.open.some((open, i) => open !== before.open[i])) return false;
  const near = (one: number, other: number, scale: number): boolean => Math.abs(one - other) <= REPEATS * scale;
  return (
    after.borne.every((value, i) => near(value, before.borne[i] ?? 0, 1)) &&
    parts.every(({ scales }, i) => near(after.speeds[i] ?? 0, before.speeds[i] ?? 0, scales.speedRadPerS))
  );
}

type Nodes = readonly [winding: number, housing: number];

interface Change {
  readonly byNodeK: Nodes;
  readonly perCycleK: number;
  /** Of this change that the next cycle brings. */
  readonly share: number;
}

/**
 * Changes of both nodes in the cycle, and how they go on: by the greatest ratio to the cycle before, since copper that grows with heat makes
 * a network slower than its own time constant; no faster than that one, e^(−cycle/τ).
 */
function changeOf({ network, index }: RobotPart, marks: readonly CycleMark[], cycleS: number): Change {
  if (!network) return { byNodeK: [0, 0], perCycleK: 0, share: 0 };
  const [after, before, earlier] = marks.map(({ heatC }): Nodes => heatC[index] ?? [0, 0]);
  const changes = (to: Nodes = [0, 0], from: Nodes = to): Nodes => [(to[0] ?? 0) - (from[0] ?? 0), (to[1] ?? 0) - (from[1] ?? 0)];
  const byNodeK = changes(after, before);
  const perCycleK = Math.max(...byNodeK.map(Math.abs));
  const own = Math.exp(-cycleS / heatTimeConstants(network)[1]);
  const ratios = earlier ? changes(before, earlier).map((was, node) => (was === 0 ? 0 : (byNodeK[node] ?? 0) / was)) : [1];
  return { byNodeK, perCycleK, share: perCycleK === 0 ? 0 : Math.max(own, ...ratios) };
}

/** q + q² + … + q^n. */
function repeated(share: number, cycles: number): number {
  return share >= 1 ? share * cycles : (share * (1 - share ** cycles)) / (1 - share);
}

/** The most that any protector's state still changes in the cycles left. */
function slowestProtector(
  { parts, sharing }: RobotRun,
  before: CycleMark,
  after: CycleMark,
  left: number,
  cycleS: number,
): number {
  const owners = [
    ...parts.flatMap(({ index }) => {
      const own = sharing.own.find(({ mechanism }) => mechanism === index);
      return [own, own];
    }),
    ...sharing.shared.flatMap((one) => [one, one]),
  ];
  return Math.max(
    0,
    ...owners.map((protector, i) => {
      const change = Math.abs((after.borne[i] ?? 0) - (before.borne[i] ?? 0));
      const timeS = protector?.replica?.timeConstantS;
      return change * repeated(timeS === undefined ? 1 : Math.exp(-cycleS / timeS), left);
    }),
  );
}

/** Whole cycles that the battery has charge for, one kept back to be followed. */
function cyclesThatFit({ sums, sharing }: RobotRun, before: CycleMark, after: CycleMark): number {
  const { capacityAh } = sharing.supply;
  const perCycle = (after.sums[1] ?? 0) - (before.sums[1] ?? 0);
  if (capacityAh === undefined || !(perCycle > 0)) return Number.POSITIVE_INFINITY;
  const whole = Math.floor((capacityAh * 3600 - sums.depletedAs) / perCycle - 1e-9);
  return Math.max(whole, 0);
}

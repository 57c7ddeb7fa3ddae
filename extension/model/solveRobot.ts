/**
 * The model's entrance for a whole robot: its load cycle on one supply, cycle after cycle.
 *
 * A step's `moving` restarts its travel and holds when done; flywheel and roller keep turning. Heat, protection and charge carry over
 * from step to step and cycle to cycle. Ends after the last cycle, with the battery's charge, or early where the state repeats: the
 * cycles left then count with the last one's sums. Deliberately no judgement.
 */
import type { RobotDrive } from "./robotDrive.js";
import { createRobotObserver } from "./robotObserver.js";
import { createPart, type MutableBus, type RobotPart } from "./robotPart.js";
import { createProtector, historyOf, type RobotProtector } from "./robotProtector.js";
import { addSums, type CycleMark, markCycle, planSkip, skip, sumsBetween } from "./robotRepeats.js";
import { type RobotRun, runStep } from "./robotRun.js";
import type { MechanismHistory, RobotOptions, RobotSolution, StepTravel } from "./robotSolution.js";
import { createSharedBus } from "./sharedBus.js";

const SECONDS_PER_HOUR = 3600;

/** Never throws; legal input, however extreme, gives finite numbers. Relative error below 1e-6, but for cycles that are not followed. */
export function solveRobot(drive: RobotDrive, options: RobotOptions = {}): RobotSolution {
  const run = createRun(drive, options);
  const travels = new Map<string, StepTravel>();
  const cycleS = drive.steps.reduce((sum, { lastsS }) => sum + lastsS, 0);
  let followed = 0;
  let lastFollowed = 0;
  let periodic = false;
  /** Cycles skipped with the last followed one's sums, until the next one shows how these have changed. */
  let owed: { readonly cycles: number; readonly sums: readonly number[] } | null = null;

  let marks = [markCycle(run)];
  while (drive.steps.length > 0 && run.cycle < drive.cycles && run.outcome === "done") {
    const [before] = marks as [CycleMark];
    lastFollowed = run.cycle;
    const whole = runCycle(run, drive, cycleS, travels);
    followed++;
    if (!whole) break;
    const after = markCycle(run);
    marks = [after, ...marks].slice(0, 3);
    const sums = sumsBetween(before, after);
    run.cycle++;
    if (owed) {
      const { cycles, sums: earlier } = owed;
      addSums(
        run,
        sums.map((value, i) => (value - (earlier[i] ?? 0)) / 2),
        cycles,
      );
      owed = null;
      marks[0] = markCycle(run);
    }
    const left = drive.cycles - run.cycle;
    const plan = left > 0 ? planSkip(run, marks, left, cycleS) : null;
    if (!plan) continue;
    skip(run, plan, sums);
    marks = [markCycle(run)];
    periodic ||= plan.periodic;
    if (!plan.periodic) owed = { cycles: plan.cycles, sums };
  }
  return finish(run, { cyclesFollowed: followed, lastFollowed, periodic }, cycleS, travels);
}

function runCycle(run: RobotRun, drive: RobotDrive, cycleS: number, travels: Map<string, StepTravel>): boolean {
  let startS = run.cycle * cycleS;
  for (const [index, step] of drive.steps.entries()) {
    run.step = index;
    run.stepStartS = startS;
    const arrived = new Map<RobotPart, number>();
    const whole = runStep(run, step, (part, stepS) => arrived.set(part, stepS));
    for (const part of run.parts.filter((one) => step.moving.includes(one.index))) {
      const key = `${part.index} ${index}`;
      if (whole || arrived.has(part)) travels.set(key, addTravel(travels.get(key), index, arrived.get(part), part.endSpeed));
    }
    if (!whole) return false;
    startS += step.lastsS;
  }
  return true;
}

function addTravel(before: StepTravel | undefined, step: number, timeS: number | undefined, endSpeed: number): StepTravel {
  const known = before ?? { step, arrivals: 0, misses: 0, firstS: null, slowestS: null, endSpeed: null };
  if (timeS === undefined) return { ...known, misses: known.misses + 1 };
  return {
    ...known,
    arrivals: known.arrivals + 1,
    firstS: known.firstS ?? timeS,
    slowestS: Math.max(known.slowestS ?? timeS, timeS),
    endSpeed,
  };
}

function createRun(drive: RobotDrive, options: RobotOptions): RobotRun {
  const { supply } = drive;
  const plantBus: MutableBus = { openCircuitV: supply.openCircuitV, resistanceOhm: 0 };
  const parts = drive.mechanisms.map((one, index) => createPart(one, index, supply, drive.ambientC, plantBus));
  const own = parts.flatMap((part): RobotProtector[] => {
    const { protection } = part.plant.drive;
    return protection ? [createProtector(protection, [part], { mechanism: part.index, shared: null })] : [];
  });
  const shared = drive.shared.map(({ protection, feeds }, index) =>
    createProtector(
      protection,
      parts.filter((part) => feeds.includes(part.index)),
      { mechanism: null, shared: index },
    ),
  );
  const protectors = [...own, ...shared];
  const sums = { chargeAs: 0, depletedAs: 0, energyJ: 0 };
  return {
    parts,
    protectors,
    sharing: {
      supply,
      bus: createSharedBus(supply.openCircuitV, supply.resistanceOhm),
      plantBus,
      own,
      shared,
      depletedAs: () => sums.depletedAs,
    },
    observer: createRobotObserver(parts, protectors, supply, options),
    systems: new Map(),
    sums,
    stalledAtS: parts.map(() => null),
    cycle: 0,
    step: 0,
    stepStartS: 0,
    stepS: 0,
    lastedS: 0,
    nextStepS: Number.POSITIVE_INFINITY,
    events: 0,
    steps: 0,
    outcome: "done",
  };
}

function finish(
  run: RobotRun,
  followed: Pick<RobotSolution, "cyclesFollowed" | "lastFollowed" | "periodic">,
  cycleS: number,
  travels: ReadonlyMap<string, StepTravel>,
): RobotSolution {
  const { observer, sums, outcome } = run;
  const coveredS = outcome === "done" ? run.cycle * cycleS : run.stepStartS + run.stepS;
  observer.sags.end(coveredS);
  const { lowestV, lowestAtS, peakA, collapsesAtS } = observer.seen;
  return {
    numbers: {
      lowestVoltageV: lowestV,
      lowestVoltageAtS: lowestAtS,
      peakCurrentA: peakA,
      sourceEnergyJ: sums.energyJ,
      chargeUsedAh: sums.chargeAs / SECONDS_PER_HOUR,
      cyclesDone: run.cycle,
    },
    outcome,
    coveredS,
    ...followed,
    depletedAh: sums.depletedAs / SECONDS_PER_HOUR,
    emptyAtS: outcome === "empty" ? coveredS : null,
    collapsesAtS,
    sags: observer.sags.history(),
    mechanisms: run.parts.map((part) => mechanismHistory(run, part, travels)),
    protectors: run.protectors.map(historyOf),
    ...observer.samples(),
  };
}

function mechanismHistory(run: RobotRun, part: RobotPart, travels: ReadonlyMap<string, StepTravel>): MechanismHistory {
  const { index, network, carried, energyJ } = part;
  const winding = run.observer.windings[index];
  const own = [...travels].filter(([key]) => key.startsWith(`${index} `)).map(([, travel]) => travel);
  return {
    travels: own.sort((one, other) => one.step - other.step),
    sourceEnergyJ: energyJ,
    windingPeakC: network ? (winding?.peakC ?? carried.windingC) : null,
    windingPeakAtS: winding?.peakAtS ?? null,
    windingLimitAtS: winding?.limitAtS ?? null,
    windingEndC: network ? carried.windingC : null,
    housingEndC: network ? carried.housingC : null,
    stallsAtS: run.stalledAtS[index] ?? null,
  };
}

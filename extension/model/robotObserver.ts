/**
 * What is remembered of a robot's run: extremes of the supply, sags, winding temperatures, samples for charts.
 *
 * Deliberately not here: what protectors did (robotProtector.ts) and when travels ended (robotRun.ts).
 */

import type { Supply } from "./drive.js";
import { isInMotion, type RobotPart } from "./robotPart.js";
import type { RobotProtector } from "./robotProtector.js";
import type { RobotOptions, RobotSample, RobotSolution } from "./robotSolution.js";
import type { BusPoint, RobotSystem } from "./robotSystem.js";
import type { RobotEvent } from "./robotWatches.js";
import { createSagRecord, type SagMoment, type SagRecord } from "./sagRecord.js";
import type { Stepper } from "./stepper.js";
import { thinSamples } from "./thinSamples.js";

export interface WindingSeen {
  peakC: number | null;
  peakAtS: number | null;
  limitAtS: number | null;
}

export interface RobotObserver {
  readonly seen: { lowestV: number; lowestAtS: number; peakA: number; collapsesAtS: number | null };
  readonly windings: readonly WindingSeen[];
  readonly sags: SagRecord;
  readonly samples: () => Pick<RobotSolution, "samples" | "thinned">;
  /** Looks at the system as it is prepared; `runS` is the run's time. */
  readonly look: (system: RobotSystem, runS: number) => void;
  /** After a step of the integration. */
  readonly stepped: (system: RobotSystem, stepStartS: number, fromS: number, toS: number, at: Stepper["at"]) => void;
  /** At a noted crossing inside a step. */
  readonly noted: (
    system: RobotSystem,
    event: RobotEvent,
    stepStartS: number,
    timeS: number,
    state: Float64Array,
    rising: boolean,
  ) => void;
}

const INNER_SAMPLES = 3;
const MOST_SAMPLES = 3000;
/** Extremes nearer than this share of each other are the same: the earlier one is told. */
const SAME = 1e-9;
/** A voltage that falls by this share of the open circuit's in less than this time, s, breaks down. */
const JUMP_SHARE = 1e-3;
const JUMP_S = 1e-9;

export function createRobotObserver(
  parts: readonly RobotPart[],
  protectors: readonly RobotProtector[],
  supply: Supply,
  { sampled }: RobotOptions,
): RobotObserver {
  const floorV = supply.mustStayAbove?.voltageV;
  const seen = { lowestV: supply.openCircuitV, lowestAtS: 0, peakA: 0, collapsesAtS: null as number | null };
  const windings = parts.map((): WindingSeen => ({ peakC: null, peakAtS: null, limitAtS: null }));
  const sags = createSagRecord();
  let samples: RobotSample[] = [];
  let thinned = false;
  let lastV = supply.openCircuitV;
  /** Step time and voltage of a peak inside the present step that lies below the floor. */
  let dipS: number | null = null;

  function extremes(point: BusPoint, runS: number): void {
    seen.peakA = Math.max(seen.peakA, point.supplyA);
    if (point.voltageV < seen.lowestV * (1 - SAME)) {
      seen.lowestV = point.voltageV;
      seen.lowestAtS = runS;
    }
  }

  function momentOf(system: RobotSystem, point: BusPoint, which: "at" | "front"): SagMoment {
    const supplyA = parts.map(() => 0);
    for (const { unit } of system.seats) supplyA[unit.part.index] = unit.demand ? unit[which].supplyA : 0;
    return { voltageV: point.voltageV, supplyA, moving: parts.filter(isInMotion).map(({ index }) => index) };
  }

  function windingPeaks(system: RobotSystem, runS: number): void {
    for (const { unit, state } of system.seats) {
      const { layout, index } = unit.part;
      if (layout.winding < 0) continue;
      const winding = windings[index] as WindingSeen;
      const now = state[layout.winding] as number;
      if (winding.peakC !== null && now <= winding.peakC + SAME) continue;
      winding.peakC = now;
      winding.peakAtS = runS;
    }
  }

  function holdsLost(system: RobotSystem, runS: number): void {
    if (seen.collapsesAtS !== null) return;
    for (const { unit } of system.seats) {
      const { mode, scales } = unit.part;
      if (mode.kind === "held" && unit.front.limitGap < -SAME * scales.currentA) seen.collapsesAtS = runS;
    }
  }

  function look(system: RobotSystem, runS: number): void {
    const { front } = system;
    extremes(front, runS);
    windingPeaks(system, runS);
    holdsLost(system, runS);
    if (floorV !== undefined) {
      if (front.voltageV < floorV) {
        sags.begin(runS);
        sags.deepen(runS, momentOf(system, front, "front"));
      } else sags.end(runS);
    }
    lastV = front.voltageV;
    if (wants(runS)) sample(system, front, "front", runS);
  }

  function stepped(system: RobotSystem, stepStartS: number, fromS: number, toS: number, at: Stepper["at"]): void {
    const inner = new Float64Array(system.size);
    const voltsAt = (share: number): BusPoint => {
      at(share, inner);
      return system.pointAt(fromS + share * (toS - fromS), inner);
    };
    if (dipS !== null && !sags.isOpen() && floorV !== undefined && system.front.voltageV >= floorV) {
      addDip(system, stepStartS, fromS, toS, (dipS - fromS) / (toS - fromS), voltsAt, floorV);
    }
    dipS = null;
    for (let k = 1; k <= INNER_SAMPLES && wants(stepStartS + fromS); k++) {
      const share = k / (INNER_SAMPLES + 1);
      sample(system, voltsAt(share), "at", stepStartS + fromS + share * (toS - fromS));
    }
    // Back to the end of the step, where the extremes are looked for.
    if (wants(stepStartS + fromS)) voltsAt(1);
    const breaksDown = lastV - system.front.voltageV > JUMP_SHARE * supply.openCircuitV && toS - fromS < JUMP_S;
    if (breaksDown) seen.collapsesAtS ??= stepStartS + toS;
    look(system, stepStartS + toS);
  }

  /** A sag that begins and ends inside one step, around its peak. */
  function addDip(
    system: RobotSystem,
    stepStartS: number,
    fromS: number,
    toS: number,
    peak: number,
    voltsAt: (share: number) => BusPoint,
    floor: number,
  ): void {
    if (!(peak > 0 && peak < 1)) return;
    const runAt = (share: number): number => stepStartS + fromS + share * (toS - fromS);
    const crossing = (below: number, above: number): number => {
      let [low, high] = [below, above];
      for (let k = 0; k < 50; k++) {
        const middle = (low + high) / 2;
        if (voltsAt(middle).voltageV < floor) low = middle;
        else high = middle;
      }
      return low;
    };
    sags.begin(runAt(crossing(peak, 0)));
    sags.deepen(runAt(peak), momentOf(system, voltsAt(peak), "at"));
    sags.end(runAt(crossing(peak, 1)));
  }

  function noted(
    system: RobotSystem,
    event: RobotEvent,
    stepStartS: number,
    timeS: number,
    state: Float64Array,
    rises: boolean,
  ): void {
    const runS = stepStartS + timeS;
    if (event.kind === "supply" && event.event === "crosses-floor") {
      if (rises) sags.end(runS);
      else sags.begin(runS);
    } else if (event.kind === "supply") {
      const point = system.pointAt(timeS, state);
      extremes(point, runS);
      if (sags.isOpen()) sags.deepen(runS, momentOf(system, point, "at"));
      else if (floorV !== undefined && point.voltageV < floorV) dipS = timeS;
    } else if (event.kind === "unit" && event.event === "passes-limit") {
      (windings[event.unit.part.index] as WindingSeen).limitAtS ??= runS;
    } else if (event.kind === "unit" && event.event === "winding-peaks") {
      system.pointAt(timeS, state);
      windingPeaks(system, runS);
    }
  }

  function wants(runS: number): boolean {
    return sampled !== undefined && runS >= sampled.fromS && runS <= sampled.toS;
  }

  function sample(system: RobotSystem, point: BusPoint, which: "at" | "front", timeS: number): void {
    const windingC = parts.map(({ network, carried }) => (network ? carried.windingC : null));
    for (const { unit, state } of system.seats) {
      const { layout, index } = unit.part;
      if (layout.winding >= 0) windingC[index] = state[layout.winding] as number;
    }
    samples.push({
      timeS,
      supplyVoltageV: point.voltageV,
      supplyCurrentA: point.supplyA,
      powerW: momentOf(system, point, which).supplyA.map((amperes) => amperes * point.voltageV),
      windingC,
      open: protectors.map((protector) => protector.open),
    });
    if (samples.length < MOST_SAMPLES) return;
    samples = thinSamples(samples, MOST_SAMPLES / 2);
    thinned = true;
  }

  return { seen, windings, sags, samples: () => ({ samples, thinned }), look, stepped, noted };
}

/**
 * What is remembered of a course in time: peaks, lowest supply, trips, samples.
 *
 * Deliberately not here: deciding when a course ends (travel.ts, holdRun.ts).
 */
import type { Instant } from "./instant.js";
import type { Course } from "./integrate.js";
import type { MotionSystem } from "./motionSystem.js";
import type { Plant } from "./plant.js";
import { fuseRate, isBorderline } from "./protection.js";

/** A moment of a course, for charts; motor values are one motor's. */
export interface TravelSample {
  readonly timeS: number;
  /** In the load's own coordinate; for a flywheel 0. */
  readonly position: number;
  /** In the load's own coordinate per second. */
  readonly speed: number;
  readonly motorTorqueNm: number;
  readonly motorCurrentA: number;
  readonly sourceCurrentA: number;
  readonly supplyVoltageV: number;
  /** null without thermal data. */
  readonly windingC: number | null;
}

export interface Observation {
  peakMotorCurrentA: number;
  peakSourceCurrentA: number;
  lowestSupplyV: number;
  lowestSupplyAtS: number;
  windingPeakC: number | null;
  windingLimitAfterS: number | null;
  /** Protection; a fuse's slow gate. */
  opensAfterS: number | null;
  mayOpenAfterS: number | null;
  borderline: boolean;
  /** Longest time that the supply was below the voltage that it must stay above, s. */
  belowFloorS: number;
  /** False where a controller asked for more than the supply can give. */
  supplied: boolean;
  readonly samples: TravelSample[];
}

export interface Observer {
  readonly seen: Observation;
  /** Looks at the state as it is now; call it at the start of each phase. */
  readonly look: (system: MotionSystem, timeS: number, state: Float64Array) => void;
  /** Listeners for a phase's integration. */
  readonly listen: (system: MotionSystem) => Pick<Required<Course>, "onStep" | "onNote">;
  /** Closes what is still open at the end. */
  readonly close: (timeS: number) => void;
}

/** Samples inside each step, beside its end. */
const INNER_SAMPLES = 3;

export function createObserver(plant: Plant, sampling: boolean): Observer {
  const seen: Observation = {
    peakMotorCurrentA: 0,
    peakSourceCurrentA: 0,
    lowestSupplyV: plant.bus.openCircuitV,
    lowestSupplyAtS: 0,
    windingPeakC: null,
    windingLimitAfterS: null,
    opensAfterS: null,
    mayOpenAfterS: null,
    borderline: false,
    belowFloorS: 0,
    supplied: true,
    samples: [],
  };
  const { protection, supply } = plant.drive;
  const floorV = supply?.mustStayAbove?.voltageV;
  let belowSinceS: number | null = null;

  /** Below its first gate a fuse forgets what it has borne. */
  function fuseRests(system: MotionSystem): boolean {
    return protection?.kind === "fuse" && fuseRate(protection.ratingA, system.carried(system.front), "fast").rate === 0;
  }

  function peaks(system: MotionSystem, timeS: number, state: Float64Array, now: Instant): void {
    seen.peakMotorCurrentA = Math.max(seen.peakMotorCurrentA, Math.abs(now.currentA));
    seen.peakSourceCurrentA = Math.max(seen.peakSourceCurrentA, now.supplyA);
    if (!now.supplied) seen.supplied = false;
    if (now.supplyV < seen.lowestSupplyV) {
      seen.lowestSupplyV = now.supplyV;
      seen.lowestSupplyAtS = timeS;
    }
    const windingC = windingOf(system, state);
    if (windingC !== null) seen.windingPeakC = Math.max(seen.windingPeakC ?? windingC, windingC);
  }

  function sample(system: MotionSystem, timeS: number, state: Float64Array): void {
    const now = system.instantAt(timeS, state);
    const { load, direction } = plant;
    seen.samples.push({
      timeS,
      position: (load.startRad + direction * (state[0] as number)) * load.ownPerRad,
      speed: (now.motorSpeed / plant.train.ratio) * load.ownPerRad,
      motorTorqueNm: now.torqueNm,
      motorCurrentA: now.currentA,
      sourceCurrentA: now.supplyA,
      supplyVoltageV: now.supplyV,
      windingC: windingOf(system, state),
    });
  }

  function look(system: MotionSystem, timeS: number, state: Float64Array): void {
    const now = system.instantAt(timeS, state);
    peaks(system, timeS, state, now);
    if (floorV !== undefined && now.supplyV < floorV) belowSinceS ??= timeS;
    if (sampling) sample(system, timeS, state);
  }

  function close(timeS: number): void {
    if (belowSinceS !== null) seen.belowFloorS = Math.max(seen.belowFloorS, timeS - belowSinceS);
    belowSinceS = null;
  }

  function listen(system: MotionSystem): Pick<Required<Course>, "onStep" | "onNote"> {
    const inner = new Float64Array(system.size);
    return {
      onStep: (fromS, toS, state, at) => {
        for (let k = 1; sampling && k <= INNER_SAMPLES; k++) {
          const share = k / (INNER_SAMPLES + 1);
          at(share, inner);
          sample(system, fromS + share * (toS - fromS), inner);
        }
        peaks(system, toS, state, system.front);
        if (fuseRests(system)) {
          state[system.layout.protection] = 0;
          state[system.layout.fast] = 0;
        }
        if (sampling) sample(system, toS, state);
      },
      onNote: (watch, timeS, state, rising) => {
        const { index } = system;
        if (watch === index.currentPeak || watch === index.supplyPeak || watch === index.windingPeak) {
          peaks(system, timeS, state, system.instantAt(timeS, state));
        } else if (watch === index.windingLimit) seen.windingLimitAfterS ??= timeS;
        else if (watch === index.mayOpen) seen.mayOpenAfterS ??= timeS;
        else if (watch === index.opens && seen.opensAfterS === null && !seen.borderline) {
          // So near to the held current the time would mean nothing.
          if (protection && isBorderline(protection, system.carried(system.instantAt(timeS, state)))) seen.borderline = true;
          else seen.opensAfterS = timeS;
        } else if (watch === index.floor) {
          if (rising) close(timeS);
          else belowSinceS ??= timeS;
        }
      },
    };
  }

  return { seen, look, listen, close };
}

function windingOf(system: MotionSystem, state: Float64Array): number | null {
  return system.layout.winding < 0 ? null : (state[system.layout.winding] as number);
}

// One mechanism's travel by the model, and the same equations by two general solvers, for every kind of load: bare, and with all that a
// travel carries along (heat, a breaker, a ramp, a current limit). Times are those of the processor, in batches taken in turn, since
// other work disturbs a clock more. Each travel has a load of its own, so that nothing can be remembered. It judges no accuracy:
// test/model does.

import type { Drive, Load } from "../../extension/model/drive.js";
import { scalesOf } from "../../extension/model/motionScales.js";
import { startState } from "../../extension/model/motionState.js";
import { motionSystem } from "../../extension/model/motionSystem.js";
import { plantOf } from "../../extension/model/plant.js";
import { solveTravel } from "../../extension/model/travel.js";
import { armOf, driveOf, liftOf, plainMotor, reduction } from "../model/drives.js";
import { type Rates, solveByMathjs, solveByOdex } from "../model/generalSolvers.js";
import { type Spread, spreadOf } from "./spread.js";

export interface TravelTimes {
  readonly name: string;
  /** ms. */
  readonly ours: Spread;
  readonly odex: Spread;
  /** Of the bare travels only, and where it gets over their bends at all. */
  readonly mathjs: Spread | undefined;
}

const TOLERANCE = 1e-8;
const WARM = 60;
const BATCHES = 9;

/** Loads by a number that makes each another one. */
const LOADS: Readonly<Record<string, (turn: number) => Load>> = {
  lift: (turn) => liftOf(6 + turn / 1000, 0.03, 0.8),
  arm: (turn) => armOf(2 + turn / 1000, 0.35, -0.4, 1.3),
  wheels: (turn) => ({
    kind: "wheels",
    massKg: 12 + turn / 1000,
    radiusM: 0.05,
    grip: 0.25,
    rolling: 0.015,
    slopeRad: 0.03,
    distanceM: 3,
    drivenShare: 1,
    inertiaKgM2: 5e-4,
  }),
  flywheel: (turn) => ({ kind: "flywheel", inertiaKgM2: 0.02 + turn / 1e6, speedRadPerS: 15, dragNm: 0.05 }),
  screw: (turn) => ({
    kind: "screw",
    forceN: 200 + turn / 100,
    leadM: 0.005,
    meanDiameterM: 0.012,
    friction: 0.12,
    travelM: 0.2,
    threadAngleRad: 0.25,
    massKg: 5,
  }),
  "load curve": (turn) => ({
    kind: "loadCurve",
    torqueNm: [
      [0, 1],
      [1, 4 + turn / 1000],
      [2.5, 6],
      [4, 2],
    ],
    inertiaKgM2: [
      [0, 0.1],
      [2, 0.3],
      [4, 0.1],
    ],
  }),
};

const thermal = { windingToHousingKPerW: 3, housingToAmbientKPerW: 9, windingTimeS: 4, housingTimeS: 300, limitC: 130 };
const rotor = { ...plainMotor, rotorInertiaKgM2: 1e-5 };

const VARIANTS: Readonly<Record<string, Partial<Drive>>> = {
  bare: { motor: rotor },
  laden: {
    motor: { ...rotor, thermal, magnet: "ferrite" },
    motorCurrentLimitA: 20,
    rampS: 0.1,
    protection: { kind: "breaker", holdCurrentA: 8, tripsAtA: 16, tripsAfterS: 2, carries: "supply" },
  },
};

export function measureTravels(rounds: number): TravelTimes[] {
  return Object.entries(VARIANTS).flatMap(([variant, fields]) =>
    Object.entries(LOADS).map(([kind, load]) => {
      const make = (turn: number): Drive =>
        driveOf({
          load: load(turn),
          stages: [reduction(kind === "screw" ? 2 : kind === "arm" ? 30 : 20, 0.9, 1e-5)],
          supply: { openCircuitV: 12.6, resistanceOhm: 0.03, peukert: 1 },
          ...fields,
        });
      return { name: `${kind}, ${variant}`, ...measure(make, rounds, variant === "bare") };
    }),
  );
}

function measure(make: (turn: number) => Drive, rounds: number, byMathjs: boolean): Omit<TravelTimes, "name"> {
  const each = Math.ceil(rounds / BATCHES);
  let turn = 0;
  const times = { ours: [] as number[], odex: [] as number[], mathjs: [] as number[] };
  for (let warm = 0; warm < WARM; warm++) {
    const { rates, start, toS } = equationsOf(make(turn++));
    solveByOdex(rates, start, toS, TOLERANCE);
  }
  for (let batch = 0; batch < BATCHES; batch++) {
    const drives = Array.from({ length: each }, () => make(turn++));
    const equations = drives.map(equationsOf);
    times.ours.push(timeEach(drives, (drive) => solveTravel(drive)));
    times.odex.push(timeEach(equations, ({ rates, start, toS }) => solveByOdex(rates, start, toS, TOLERANCE)));
    // A hundred times slower: one of each batch is plenty.
    if (!byMathjs) continue;
    try {
      times.mathjs.push(timeEach(equations.slice(0, 1), ({ rates, start, toS }) => solveByMathjs(rates, start, toS, TOLERANCE)));
    } catch {
      // It gives up after as many steps as it is allowed.
    }
  }
  const mathjs = times.mathjs.length === 0 ? undefined : spreadOf(times.mathjs);
  return { ours: spreadOf(times.ours), odex: spreadOf(times.odex), mathjs };
}

interface Equations {
  readonly rates: Rates;
  readonly start: readonly number[];
  readonly toS: number;
}

/** The model's own rates, for solvers that work on plain lists. */
function equationsOf(drive: Drive): Equations {
  const toS = solveTravel(drive)?.timeS ?? null;
  if (toS === null) throw new Error(`The ${drive.load.kind} of the bench never arrives.`);
  const plant = plantOf(drive);
  const system = motionSystem(plant, { kind: "moving" }, scalesOf(plant));
  const state = new Float64Array(system.size);
  const rates = new Float64Array(system.size);
  return {
    rates: (timeS, y) => {
      state.set(y);
      system.evaluate(timeS, state, rates);
      return Array.from(rates);
    },
    start: Array.from(startState(plant)),
    toS,
  };
}

/** Processor time of one piece of work, ms. */
function timeEach<Item>(items: readonly Item[], work: (item: Item) => unknown): number {
  const before = process.cpuUsage();
  for (const item of items) work(item);
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1000 / items.length;
}

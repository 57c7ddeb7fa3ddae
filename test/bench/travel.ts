// One mechanism's travel by the model, and the same equations by two general solvers. Each travel has a load of its own, so that nothing
// can be remembered. It judges no accuracy: test/model does.

import type { Drive } from "../../extension/model/drive.js";
import { scalesOf } from "../../extension/model/motionScales.js";
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
  readonly mathjs: Spread;
}

const TOLERANCE = 1e-8;
const WARM = 20;

const MECHANISMS: readonly (readonly [string, (turn: number) => Drive])[] = [
  ["lift", (turn) => drive({ load: liftOf(6 + turn / 1000, 0.03, 0.8), stages: [reduction(20, 0.9, 1e-5)] })],
  ["arm", (turn) => drive({ load: armOf(2 + turn / 1000, 0.35, -0.4, 1.3), stages: [reduction(30, 0.9, 1e-5)] })],
];

function drive(fields: Pick<Drive, "load" | "stages">): Drive {
  return driveOf({
    ...fields,
    motor: { ...plainMotor, rotorInertiaKgM2: 1e-5 },
    supply: { openCircuitV: 12.6, resistanceOhm: 0.03, peukert: 1 },
  });
}

export function measureTravels(rounds: number): TravelTimes[] {
  return MECHANISMS.map(([name, make]) => {
    const times = { ours: [] as number[], odex: [] as number[], mathjs: [] as number[] };
    for (let turn = 0; turn < WARM + rounds; turn++) {
      const mechanism = make(turn);
      const ours = timed(() => solveTravel(mechanism));
      const toS = ours.result?.timeS;
      if (toS === null || toS === undefined) throw new Error(`The ${name} of the bench never arrives.`);
      const { rates, start } = equationsOf(mechanism);
      const odex = timed(() => solveByOdex(rates, start, toS, TOLERANCE));
      // A hundred times slower: a tenth of the rounds is plenty.
      const mathjs = turn % 10 === 0 ? timed(() => solveByMathjs(rates, start, toS, TOLERANCE)) : undefined;
      if (turn < WARM) continue;
      times.ours.push(ours.ms);
      times.odex.push(odex.ms);
      if (mathjs !== undefined) times.mathjs.push(mathjs.ms);
    }
    return { name, ours: spreadOf(times.ours), odex: spreadOf(times.odex), mathjs: spreadOf(times.mathjs) };
  });
}

/** The model's own rates, for solvers that work on plain lists. */
function equationsOf(mechanism: Drive): { readonly rates: Rates; readonly start: readonly number[] } {
  const plant = plantOf(mechanism);
  const system = motionSystem(plant, { kind: "moving" }, scalesOf(plant));
  const state = new Float64Array(system.size);
  const rates = new Float64Array(system.size);
  return {
    rates: (timeS, y) => {
      state.set(y);
      system.evaluate(timeS, state, rates);
      return Array.from(rates);
    },
    start: Array.from({ length: system.size }, () => 0),
  };
}

function timed<Result>(work: () => Result): { readonly ms: number; readonly result: Result } {
  const start = performance.now();
  const result = work();
  return { ms: performance.now() - start, result };
}

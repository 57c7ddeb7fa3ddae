/** State vectors of a mechanism: how they start, and what is handed on from one phase to the next. */
import { ambientOf } from "./heat.js";
import { layoutOf } from "./motionLayout.js";
import type { Plant } from "./plant.js";

/** Heat and protection as they are handed on: °C, and θ or damage. */
export interface CarriedState {
  readonly windingC: number;
  readonly housingC: number;
  readonly protection: number;
  readonly fast: number;
}

/** At the start of the travel; heat and protection as handed on, or cold and at rest. */
export function startState(plant: Plant, from?: CarriedState, speedRadPerS = 0): Float64Array {
  const layout = layoutOf(plant);
  const state = new Float64Array(layout.size);
  const { windingC, housingC, protection, fast } = from ?? coldState(plant);
  const put = (index: number, value: number): void => {
    if (index >= 0) state[index] = value;
  };
  put(layout.winding, windingC);
  put(layout.housing, housingC);
  put(layout.protection, protection);
  put(layout.fast, fast);
  state[layout.speed] = speedRadPerS;
  return state;
}

/** Everything at ambient, protection at rest. */
export function coldState(plant: Plant): CarriedState {
  const ambientC = ambientOf(plant.drive);
  return { windingC: ambientC, housingC: ambientC, protection: 0, fast: 0 };
}

export function carriedState(plant: Plant, state: Float64Array): CarriedState {
  const layout = layoutOf(plant);
  const cold = coldState(plant);
  const at = (index: number, otherwise: number): number => (index < 0 ? otherwise : (state[index] as number));
  return {
    windingC: at(layout.winding, cold.windingC),
    housingC: at(layout.housing, cold.housingC),
    protection: at(layout.protection, 0),
    fast: at(layout.fast, 0),
  };
}

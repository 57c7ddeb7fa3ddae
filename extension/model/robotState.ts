/**
 * Between mechanisms with their protectors and the state vector of a robot in fixed modes.
 *
 * Deliberately not here: how the vector is laid out (robotSystem.ts) and what moves it (robotRun.ts).
 */
import { startState } from "./motionState.js";
import type { RobotSystem, Seat } from "./robotSystem.js";

/** Of the supply, over the run: A·s, A·s with Peukert's loss, J. */
export interface RunSums {
  chargeAs: number;
  depletedAs: number;
  energyJ: number;
}

/** The state of a system in the modes that its mechanisms are in, sums at 0. */
export function gather(system: RobotSystem): Float64Array {
  const state = new Float64Array(system.size);
  for (const { unit, place, state: own } of system.seats) {
    const { part } = unit;
    own.set(startState(part.plant, part.carried, part.speedRadPerS));
    own[0] = part.progressRad;
    for (let k = 0; k < place.length; k++) if ((place[k] as number) >= 0) state[place[k] as number] = own[k] as number;
  }
  for (const { protector, state: theta, fast } of system.places.protectors) {
    state[theta] = protector.state;
    if (fast >= 0) state[fast] = protector.fast;
  }
  return state;
}

/** Hands the state back to mechanisms and protectors, and adds the sums up. */
export function scatter(sums: RunSums, system: RobotSystem, state: Float64Array): void {
  for (const seat of system.seats) handBack(seat, state);
  for (const { protector, state: theta, fast } of system.places.protectors) {
    protector.state = state[theta] as number;
    if (fast >= 0) protector.fast = state[fast] as number;
  }
  sums.chargeAs += state[system.places.charge] as number;
  sums.depletedAs += state[system.places.depletion] as number;
  sums.energyJ += state[system.places.energy] as number;
}

function handBack({ unit, place }: Seat, state: Float64Array): void {
  const { part } = unit;
  const { layout, carried } = part;
  const at = (k: number, otherwise: number): number => {
    const from = k < 0 ? -1 : (place[k] as number);
    return from < 0 ? otherwise : (state[from] as number);
  };
  part.progressRad = at(layout.progress, part.progressRad);
  part.speedRadPerS = at(layout.speed, part.speedRadPerS);
  part.energyJ += at(layout.energy, 0);
  part.carried = {
    windingC: at(layout.winding, carried.windingC),
    housingC: at(layout.housing, carried.housingC),
    protection: at(layout.protection, carried.protection),
    fast: at(layout.fast, carried.fast),
  };
}

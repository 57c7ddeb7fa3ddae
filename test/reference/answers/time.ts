/** The model's answers to the rows on protection, heating, travel, flywheels and batteries. */
import { depletionCurrent, dischargeTime } from "../../../extension/model/battery.js";
import type { Drive, Load, Protection, Supply } from "../../../extension/model/drive.js";
import {
  type HeatNetwork,
  heatingCurve,
  heatNetworkOf,
  heatTimeConstants,
  holdingHeat,
  steadyHeat,
} from "../../../extension/model/heat.js";
import { availableLine } from "../../../extension/model/line.js";
import { motorFromConstants } from "../../../extension/model/motor.js";
import { replicaTripTime, thermalReplica } from "../../../extension/model/protection.js";
import { solveRelease } from "../../../extension/model/release.js";
import { copperFactor } from "../../../extension/model/temperature.js";
import { solveTravel } from "../../../extension/model/travel.js";
import { driveOf } from "../../model/drives.js";
import type { Answers } from "../row.js";
import { REPLICA_TIMES, TWO_NODE_RISES } from "../rows/time.js";

const RPM = Math.PI / 30;

/** A breaker whose τ is 1 s, so that times come in τ: at twice the held current it opens after ln(4/3) s. */
const breaker: Exclude<Protection, { kind: "fuse" }> = {
  kind: "breaker",
  holdCurrentA: 3,
  tripsAtA: 6,
  tripsAfterS: Math.log(4 / 3),
  carries: "motor",
};
const tripTime = (multiple: number, before: number) =>
  replicaTripTime(thermalReplica(breaker), multiple * 3, before * before) ?? Number.NaN;

function networkOf(windingTimeS: number, housingTimeS: number, resistances: readonly [number, number]): HeatNetwork {
  const [windingToHousingKPerW, housingToAmbientKPerW] = resistances;
  const thermal = { windingToHousingKPerW, housingToAmbientKPerW, windingTimeS, housingTimeS, limitC: 150 };
  const motor = motorFromConstants({
    voltageV: 12,
    resistanceOhm: (0.1 * copperFactor(25)) / copperFactor(20),
    torqueConstantNmPerA: 0.02,
    noLoadCurrentA: 0,
    thermal,
  });
  return heatNetworkOf(motor) as HeatNetwork;
}
/** Capacities of 10 and 200 J/K, resistances of 1 and 2 K/W. */
const twoNodes = networkOf(10, 400, [1, 2]);
const at20W = (timeS: number) => heatingCurve(twoNodes, { atAmbientW: 20, perKW: 0 }, timeS);

/** R20 = 0.1 ohm. */
const copper = motorFromConstants({
  voltageV: 12,
  resistanceOhm: 0.1 * (copperFactor(25) / copperFactor(20)),
  torqueConstantNmPerA: 0.02,
  noLoadCurrentA: 0,
});
const steady = steadyHeat(twoNodes, holdingHeat(copper, 10 * copper.torqueConstantNmPerA));

/** The current at the border of running away, by bisection. */
function runawayCurrent(): number {
  let low = 1;
  let high = 100;
  for (let k = 0; k < 60; k++) {
    const middle = (low + high) / 2;
    if (steadyHeat(twoNodes, holdingHeat(copper, middle * copper.torqueConstantNmPerA))) low = middle;
    else high = middle;
  }
  return low;
}

/** One node: the winding adds nothing. */
const oneNode = networkOf(1e-9, 43.28085 * 60, [1e-6, 1]);
const oneNodeRise = (minutes: number) => heatingCurve(oneNode, { atAmbientW: 40, perKW: 0 }, minutes * 60).housingC - 25;

/** Steady speed 100 rad/s, τ = J·R/(k_t·k_e) = 0.1 s. */
const lag = motorFromConstants({ voltageV: 100, resistanceOhm: 1, torqueConstantNmPerA: 1, noLoadCurrentA: 0 });
const turning = (load: Load, motor = lag): Drive => driveOf({ motor, stages: [], load });
const wheel = (speedRadPerS: number, inertiaKgM2 = 0.1) => ({ kind: "flywheel", inertiaKgM2, speedRadPerS, dragNm: 0 }) as const;
const timeTo = (speed: number) => solveTravel(turning(wheel(speed)))?.timeS ?? Number.NaN;

/** Speed after τ, from the time that each speed takes. */
function speedAfterTau(): number {
  let low = 1;
  let high = 99;
  for (let k = 0; k < 60; k++) {
    const middle = (low + high) / 2;
    if (timeTo(middle) < 0.1) low = middle;
    else high = middle;
  }
  return low / 100;
}

const viscous = motorFromConstants({ voltageV: 1, resistanceOhm: 1, torqueConstantNmPerA: 0.01, noLoadCurrentA: 0.999001 });

const released = (inertiaKgM2: number, rpm: number, releaseEnergyJ: number) =>
  (solveRelease(turning({ ...wheel(rpm * RPM, inertiaKgM2), releaseEnergyJ }))?.speedAfterRadPerS ?? Number.NaN) / RPM;

/** Never runs out of voltage: the limit gives 1500 N·m throughout. */
const strong = motorFromConstants({ voltageV: 1e5, resistanceOhm: 1, torqueConstantNmPerA: 1, noLoadCurrentA: 0 });
const constantTorque = driveOf({ motor: strong, stages: [], load: wheel(6, 2500), motorCurrentLimitA: 1500 });

const pack: Supply = { openCircuitV: 12, resistanceOhm: 0, capacityAh: 100, ratedOverH: 20, peukert: 1.2 };
const hours = (supply: Supply, currentA: number) => (dischargeTime(supply, currentA) ?? Number.NaN) / 3600;

export const timeAnswers: Answers = {
  ...Object.fromEntries(
    REPLICA_TIMES.flatMap(([multiple]) => [
      [`D1 cold ${multiple}`, () => tripTime(multiple, 0)],
      [`D1 hot ${multiple}`, () => tripTime(multiple, 0.9)],
    ]),
  ),
  "D1 half": () => tripTime(2, 0.5),
  "D4 class 10": () => thermalReplica({ ...breaker, holdCurrentA: 1, tripsAtA: 7.2, tripsAfterS: 10 }).timeConstantS,
  ...Object.fromEntries(
    TWO_NODE_RISES.flatMap(([timeS]) => [
      [`C10 winding ${timeS} s`, () => at20W(timeS).windingC - 25],
      [`C10 housing ${timeS} s`, () => at20W(timeS).housingC - 25],
    ]),
  ),
  "C10 fast": () => heatTimeConstants(twoNodes)[0],
  "C10 slow": () => heatTimeConstants(twoNodes)[1],
  "C10 feedback winding": () => steady?.windingC ?? Number.NaN,
  "C10 feedback housing": () => steady?.housingC ?? Number.NaN,
  "C10 feedback heat": () => steady?.copperW ?? Number.NaN,
  "C10 runaway": runawayCurrent,
  "C6 30 min": () => oneNodeRise(30),
  "C6 60 min": () => oneNodeRise(60),
  "F12 travel": () => {
    const curve = [
      [0, 0],
      [10, 0],
    ] as const;
    return solveTravel(turning({ kind: "loadCurve", torqueNm: curve, inertiaKgM2: 0.1 }))?.timeS ?? Number.NaN;
  },
  "F12 τ": speedAfterTau,
  "F12 95": () => timeTo(95) / 0.1,
  "F12 98": () => timeTo(98) / 0.1,
  "F11 gain": () => availableLine(driveOf({ motor: viscous })).noLoadSpeedRadPerS,
  "F5 slowest": () => released(6500 * 1.8 ** 2, 121.0103, 56_000),
  "F5 time": () => solveTravel(constantTorque)?.timeS ?? Number.NaN,
  "F5 release": () => released(0.005, 3000, 20),
  "G1 time": () => hours(pack, 10),
  "G1 charge": () => hours(pack, 10) * 10,
  "G1 at 1 A": () => 100 / depletionCurrent({ ...pack, ratedOverH: 100 }, 5),
};

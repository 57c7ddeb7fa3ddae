/** The model's answers to the values beside the topics. */
import { wormDefinition } from "../../../extension/declarations/stages.js";
import { dischargeTime } from "../../../extension/model/battery.js";
import type { Drive, ThermalConstants } from "../../../extension/model/drive.js";
import { availableLine } from "../../../extension/model/line.js";
import { motorFromConstants } from "../../../extension/model/motor.js";
import { operatingPointAt } from "../../../extension/model/operatingPoint.js";
import { tripVerdict } from "../../../extension/model/protection.js";
import { solveRelease } from "../../../extension/model/release.js";
import { solveRepeats } from "../../../extension/model/repeats.js";
import { solveHold } from "../../../extension/model/runs.js";
import { ASSUMED_EFFICIENCY } from "../../../extension/model/stages.js";
import { driveAt } from "../../../extension/model/temperature.js";
import { driveOf, liftOf, reduction } from "../../model/drives.js";
import type { Answers } from "../row.js";

const RPM = Math.PI / 30;

/** Loss power of 350 W at the inner voltage of 94.5 V is a constant loss current; the winding's 0.03864 ohm are at 20 °C. */
const lossy: Drive = driveAt(
  driveOf({
    motor: motorFromConstants({
      voltageV: 100,
      resistanceOhm: 0.03864 * (1 + 0.00393 * 5),
      torqueConstantNmPerA: 94.5 / (1417.5 * RPM),
      noLoadCurrentA: 350 / 94.5,
      speedLossShare: 0,
    }),
    driver: { dropV: 0.5, resistanceOhm: 0 },
  }),
  95,
);
const lossyPoint = operatingPointAt(lossy, lossy.motor.torqueConstantNmPerA * (100 - 350 / 94.5));

/** A lift without travel, held for a share of every second, far below its thermal time constants. */
const thermal: ThermalConstants = {
  windingToHousingKPerW: 2,
  housingToAmbientKPerW: 3,
  windingTimeS: 400,
  housingTimeS: 800,
  limitC: 150,
};
const held = (currentA: number): Drive =>
  driveOf({
    motor: motorFromConstants({ voltageV: 12, resistanceOhm: 1, torqueConstantNmPerA: 0.1, noLoadCurrentA: 0, thermal }),
    stages: [reduction(1)],
    load: liftOf((currentA * 0.1) / 9.80665, 1, 0),
  });
function currentOfSameHeat(share: number): number {
  const continuousC = solveHold(held(3))?.windingFinalC ?? Number.NaN;
  let [low, high] = [3, 9];
  for (let k = 0; k < 16; k++) {
    const middle = (low + high) / 2;
    const windingC = solveRepeats({ ...held(middle), holdForS: share, everyS: 1 })?.windingPeakC ?? Number.POSITIVE_INFINITY;
    if (windingC < continuousC) low = middle;
    else high = middle;
  }
  return low / 3;
}

const blade = (ratingA: number, multiple: number) => tripVerdict({ kind: "fuse", ratingA, carries: "motor" }, multiple * ratingA);
const fast = (ratingA: number, multiple: number) => blade(ratingA, multiple).mayOpenAfterS ?? Number.NaN;
const slow = (ratingA: number, multiple: number) => blade(ratingA, multiple).opensAfterS ?? Number.NaN;

/** What a turning inertia gives up until it just stands, by halving. */
function energyOf(inertiaKgM2: number, speedRadPerS: number): number {
  const load = { kind: "flywheel", inertiaKgM2, speedRadPerS, dragNm: 0 } as const;
  let [low, high] = [0, 1e7];
  for (let k = 0; k < 60; k++) {
    const releaseEnergyJ = (low + high) / 2;
    const after = solveRelease(driveOf({ load: { ...load, releaseEnergyJ }, stages: [] }))?.speedAfterRadPerS ?? 0;
    if (after > 0) low = releaseEnergyJ;
    else high = releaseEnergyJ;
  }
  return low;
}

const worm = wormDefinition.check([2, 60, { leadAngle: "12 deg" }]).built;

/** Two metres of AWG 12 between supply and a stalled motor of 30 A. */
const wire = 2 * 5.2107e-3;
const wired = driveOf({
  motor: motorFromConstants({ voltageV: 12, resistanceOhm: 0.4 - wire, torqueConstantNmPerA: 0.02, noLoadCurrentA: 0 }),
  wiringOhm: wire,
});
const wiredPoint = operatingPointAt(wired, availableLine(wired).stallTorqueNm);

export const furtherAnswers: Answers = {
  "B2 inner voltage": () => lossyPoint.speedRadPerS * lossy.motor.backEmfVPerRadPerS,
  "B2 output": () => lossyPoint.shaftPowerW,
  "B2 torque": () => lossyPoint.torqueNm,
  "B2 efficiency": () => lossyPoint.shaftPowerW / (100 * lossyPoint.sourceCurrentA),
  "B2 copper loss": () => lossyPoint.currentA ** 2 * lossy.motor.resistanceOhm,
  "C11 15 %": () => currentOfSameHeat(0.15),
  "C11 25 %": () => currentOfSameHeat(0.25),
  "C11 40 %": () => currentOfSameHeat(0.4),
  "C11 60 %": () => currentOfSameHeat(0.6),
  "D5 40 A 135 % fast": () => fast(40, 1.35),
  "D5 40 A 135 % slow": () => slow(40, 1.35),
  "D5 40 A 200 % fast": () => fast(40, 2),
  "D5 40 A 200 % slow": () => slow(40, 2),
  "D5 40 A 350 % fast": () => fast(40, 3.5),
  "D5 40 A 350 % slow": () => slow(40, 3.5),
  "D5 40 A 600 % slow": () => slow(40, 6),
  "D5 20 A 160 % fast": () => fast(20, 1.6),
  "D5 20 A 160 % slow": () => slow(20, 1.6),
  "D5 20 A 200 % fast": () => fast(20, 2),
  "D5 20 A 200 % slow": () => slow(20, 2),
  "D5 20 A 350 % fast": () => fast(20, 3.5),
  "D5 20 A 600 % slow": () => slow(20, 6),
  "E10 spur": () => ASSUMED_EFFICIENCY.spur,
  "E10 planetary": () => ASSUMED_EFFICIENCY.planetary,
  "E10 chain": () => ASSUMED_EFFICIENCY.chain,
  "E10 belt": () => ASSUMED_EFFICIENCY.belt,
  "E10 worm": () => worm?.si.efficiency ?? Number.NaN,
  "F4 energy": () => energyOf((4 * 50 * 4 ** 2) / 3, 300 * RPM),
  "F5 energy": () => energyOf(2500, 6),
  "G2 10 h": () =>
    (dischargeTime({ openCircuitV: 12, resistanceOhm: 0.027, capacityAh: 5, ratedOverH: 20, peukert: 1.132801 }, 0.475) ??
      Number.NaN) / 3600,
  "G6 loop": () => 12 - wiredPoint.terminalVoltageV,
};

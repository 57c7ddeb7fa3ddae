/** The model's answers to the further published values. */
import { depletionCurrent } from "../../../extension/model/battery.js";
import type { Drive, Load } from "../../../extension/model/drive.js";
import { hardestPosition } from "../../../extension/model/hardest.js";
import { availableLine, sheetLine } from "../../../extension/model/line.js";
import { motorFromConstants } from "../../../extension/model/motor.js";
import { stalledPoint } from "../../../extension/model/operatingPoint.js";
import { solveRelease } from "../../../extension/model/release.js";
import { screwEfficiency, screwTorques } from "../../../extension/model/screw.js";
import { trainOf } from "../../../extension/model/stages.js";
import { copperFactor } from "../../../extension/model/temperature.js";
import { solveTravel } from "../../../extension/model/travel.js";
import { driveOf, liftOf, reduction } from "../../model/drives.js";
import type { Answers } from "../row.js";

const INCH = 0.0254;
const LBF = 4.4482216152605;
const LBF_IN = LBF * INCH;
/** These texts reckon with 9.8 m/s². */
const ROUNDED_GRAVITY = 9.8 / 9.80665;

type Screw = Extract<Load, { kind: "screw" }>;
const screw = (fields: Pick<Screw, "forceN" | "leadM" | "meanDiameterM" | "friction"> & Partial<Screw>): Screw => ({
  kind: "screw",
  travelM: 1,
  threadAngleRad: 0,
  massKg: 0,
  ...fields,
});
const mott = screw({
  forceN: 12_500 * LBF,
  leadM: INCH / 4,
  meanDiameterM: 1.3429 * INCH,
  friction: 0.15,
  threadAngleRad: (14.5 * Math.PI) / 180,
});
const jack = screw({ forceN: 10_000 * LBF, leadM: INCH / 2, meanDiameterM: 2 * INCH, friction: 0.2 });
const prep = screw({ forceN: 20_000, leadM: 0.01, meanDiameterM: 0.04, friction: 0.05, efficiency: 0.7 });

/** Force at the rope of a lift, N, from the torque at its drum of 1 m. */
function ropeForce(massKg: number, counterbalanceKg = 0): number {
  const weight = liftOf(massKg * ROUNDED_GRAVITY, 1, 1);
  const load = { ...weight, counterbalanceN: counterbalanceKg * 9.8 };
  return hardestPosition(driveOf({ stages: [reduction(1)], load })).outputTorqueNm;
}

/** A motor known by winding, voltage and the back-emf at some speed; the constants do not matter to the currents asked for. */
const winding = (voltageV: number, resistanceOhm: number) =>
  motorFromConstants({ voltageV, resistanceOhm, torqueConstantNmPerA: 1, noLoadCurrentA: 0 });
const currentAtBackEmf = (motor: ReturnType<typeof winding>, volts: number) => {
  const line = sheetLine(motor);
  return line.currentAt(line.torqueAt(volts / motor.backEmfVPerRadPerS));
};
const backEmfAt = (motor: ReturnType<typeof winding>, amperes: number) =>
  sheetLine(motor).speedAt(amperes * motor.torqueConstantNmPerA) * motor.backEmfVPerRadPerS;
const coil = winding(120, 13);
const series = winding(120, 0.72);
const toy = winding(6, (6 - 4.5) / 3);

const wheel = { kind: "flywheel", inertiaKgM2: 1, speedRadPerS: 120, dragNm: 0 } as const;
/** The limit gives 30 N·m throughout. */
const pushed: Drive = driveOf({ motor: winding(1e6, 1), stages: [], load: wheel, motorCurrentLimitA: 30 });
/** All of its energy, found by halving: what leaves it just standing. */
function wheelEnergy(): number {
  let low = 0;
  let high = 20_000;
  for (let k = 0; k < 60; k++) {
    const releaseEnergyJ = (low + high) / 2;
    if ((solveRelease({ ...pushed, load: { ...wheel, releaseEnergyJ } })?.speedAfterRadPerS ?? 0) > 0) low = releaseEnergyJ;
    else high = releaseEnergyJ;
  }
  return low;
}

const cell = driveOf({ motor: winding(24, 5), supply: { openCircuitV: 24, resistanceOhm: 1, peukert: 1 } });
const blocked = stalledPoint(cell, availableLine(cell).stallTorqueNm);

export const foundAnswers: Answers = {
  "Mott raising": () => screwTorques(mott).raisingNm / LBF_IN,
  "Mott efficiency": () => screwEfficiency(mott),
  "Mott wormgear": () => 1750 / trainOf([reduction(52 / 3)]).ratio,
  "statics jack": () => screwTorques(jack).raisingNm / LBF_IN,
  "prep screw": () => screwTorques(prep).raisingNm,
  "forum winding": () => copperFactor(83.63) / copperFactor(20),
  "Knight lift power": () => (ropeForce(1000) * 100) / 50,
  "Knight lift work": () => ropeForce(1000) * 100,
  "elevator power": () => (ropeForce(2623.91) * 35) / 20,
  "coil at rest": () => sheetLine(coil).stallCurrentA,
  "coil at speed": () => currentAtBackEmf(coil, 66),
  "household motor": () => backEmfAt(winding(115, 115 / 21.5), 6.5),
  "series back-emf": () => backEmfAt(series, 7),
  "series start": () => sheetLine(series).stallCurrentA,
  "series resistor": () => availableLine(driveOf({ motor: series, wiringOhm: 7.28 })).stallCurrentA,
  "toy start": () => sheetLine(toy).stallCurrentA,
  "starter motor": () => backEmfAt(winding(5.5, 5.5 / 8.6), 1.9),
  "wheel time": () => solveTravel(pushed)?.timeS ?? Number.NaN,
  "wheel energy": wheelEnergy,
  "train speed": () => 100 / trainOf([reduction(40 / 60), reduction(25 / 50), reduction(24 / 30)]).ratio,
  "cell current": () => blocked.currentA,
  "cell voltage": () => blocked.supplyVoltageV,
  "Peukert 1.3": () =>
    250 / depletionCurrent({ openCircuitV: 12, resistanceOhm: 0, capacityAh: 250, ratedOverH: 250, peukert: 1.3 }, 20),
  "freight elevator": () => (ropeForce(1200, 950) * 54) / 180,
};

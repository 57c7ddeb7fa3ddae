/** The model's answers to the rows on screws, worms, gear trains and hoists. */
import type { Drive, Load } from "../../../extension/model/drive.js";
import { feedforwardNumbers } from "../../../extension/model/feedforward.js";
import { hardestPosition } from "../../../extension/model/hardest.js";
import { holdPoint } from "../../../extension/model/hold.js";
import { sheetLine } from "../../../extension/model/line.js";
import { motorFromConstants } from "../../../extension/model/motor.js";
import { screwEfficiency, screwTorques } from "../../../extension/model/screw.js";
import { shaftLoadOf } from "../../../extension/model/shaftLoad.js";
import { trainOf, wormEfficiencies } from "../../../extension/model/stages.js";
import { armOf, driveOf, liftOf, reduction, rollerOf } from "../../model/drives.js";
import type { Answers } from "../row.js";

const RPM = Math.PI / 30;
const DEGREE = Math.PI / 180;

type Screw = Extract<Load, { kind: "screw" }>;
const square = { kind: "screw", travelM: 1, threadAngleRad: 0, massKg: 0 } as const;
const twoStarts: Screw = {
  ...square,
  forceN: 6400,
  leadM: 0.008,
  meanDiameterM: 0.03,
  friction: 0.08,
  collar: { meanDiameterM: 0.04, friction: 0.08 },
};
const problem84: Screw = {
  ...square,
  forceN: 6000,
  leadM: 0.005,
  meanDiameterM: 0.0225,
  friction: 0.08,
  collar: { meanDiameterM: 0.04, friction: 0.05 },
};

/** The table prints φ = 14.5° up to 15° of lead, 20° above. */
function tableEfficiency(lead: number): number {
  return 100 * wormEfficiencies(lead * DEGREE, 0.05, (lead <= 15 ? 14.5 : 20) * DEGREE).forward;
}
const backward = (lead: number) => wormEfficiencies(lead * DEGREE, 0.05, 14.5 * DEGREE).backward;

/** Lead angle, in degrees, where the backward efficiency changes sign. */
function lockingLead(): number {
  let low = 0.1;
  let high = 20;
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (backward(middle) < 0) low = middle;
    else high = middle;
  }
  return low;
}

/** 1.5 m/s at 1420 rpm: 99.13 rad of motor per m of rope, here as a drum of 0.1 m. The book's g is 9.81. */
const turns = (1420 * RPM) / 1.5;
const hoist = driveOf({ stages: [reduction(turns * 0.1, 0.85)], load: liftOf((1000 * 9.81) / 9.80665, 0.1, 1) });
const geared = driveOf({ stages: [reduction(10, 0.9)], load: rollerOf(10) });

function hoistInertia(): number {
  const rope = driveOf({ stages: [reduction(turns * 0.1)], load: liftOf(1000, 0.1, 1) });
  const atMotor = (drive: Drive, own: number) => own / trainOf(drive.stages).ratio ** 2;
  return 0.2 + atMotor(geared, 10) + atMotor(rope, shaftLoadOf(rope).inertia(0));
}

const armMotor = motorFromConstants({ voltageV: 12, resistanceOhm: 0.2, torqueConstantNmPerA: 0.02, noLoadCurrentA: 0 });
const arm = driveOf({ motor: armMotor, stages: [reduction(50, 0.8)], load: armOf(2, 0.4, 0, 1) });
const raising = () => hardestPosition(arm).motorTorqueNm / armMotor.torqueConstantNmPerA;

/** K 0.01, b 0.1, R 1: at 1 rad/s the friction takes b/K amperes. */
const viscous = motorFromConstants({ voltageV: 10.01, resistanceOhm: 1, torqueConstantNmPerA: 0.01, noLoadCurrentA: 10 });
const perSpeed = () => feedforwardNumbers(driveOf({ motor: viscous, stages: [], load: rollerOf(0) })).voltsPerRadPerS;

export const transmissionAnswers: Answers = {
  "E1 raising": () => screwTorques(twoStarts).raisingNm,
  "E1 lowering": () => screwTorques(twoStarts).loweringNm,
  "E1 efficiency": () => screwEfficiency(twoStarts),
  "E2 raising": () => screwTorques(problem84).raisingNm,
  "E2 lowering": () => screwTorques(problem84).loweringNm,
  "E2 efficiency": () => screwEfficiency(problem84),
  "E6 worm": lockingLead,
  "E7 1": () => tableEfficiency(1),
  "E7 2.5": () => tableEfficiency(2.5),
  "E7 5": () => tableEfficiency(5),
  "E7 7.5": () => tableEfficiency(7.5),
  "E7 10": () => tableEfficiency(10),
  "E7 15": () => tableEfficiency(15),
  "E7 20": () => tableEfficiency(20),
  "E7 30": () => tableEfficiency(30),
  "E7 back 1": () => backward(1),
  "E7 back 2.5": () => backward(2.5),
  "E7 back 5": () => backward(5),
  "E7 back 10": () => backward(10),
  "E9 train": () => 975 / trainOf([reduction(50 / 20), reduction(75 / 25), reduction(65 / 26)]).ratio,
  "E9 rounded": () => trainOf([reduction(88 / 16), reduction(88 / 16)]).ratio,
  "E9 exact": () => trainOf([reduction(96 / 16), reduction(80 / 16)]).ratio,
  "F2 inertia": hoistInertia,
  "F2 geared torque": () => hardestPosition(geared).motorTorqueNm,
  "F2 hoist torque": () => hardestPosition(hoist).motorTorqueNm,
  "H2 arm": () => hardestPosition(arm).outputTorqueNm,
  "H2 raising current": raising,
  "H2 raising voltage": () => raising() * armMotor.resistanceOhm,
  "H2 held current": () => holdPoint(arm)?.motorCurrentA ?? Number.NaN,
  "H2 held voltage": () => holdPoint(arm)?.motorVoltageV ?? Number.NaN,
  "H2 hoist at rest": () => holdPoint(hoist)?.motorTorqueNm ?? Number.NaN,
  "H1 per speed": perSpeed,
  "H1 5 rad/s": () => sheetLine(viscous).voltageV * (5 / sheetLine(viscous).noLoadSpeedRadPerS),
};

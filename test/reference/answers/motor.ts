/** The model's answers to the rows on DC motors. */
import { lineOf, sheetLine } from "../../../extension/model/line.js";
import { motorFromConstants, motorFromSheet } from "../../../extension/model/motor.js";
import { linePoint, peakEfficiencyPoint, peakPowerPoint } from "../../../extension/model/peaks.js";
import type { Answers } from "../row.js";

const RPM = Math.PI / 30;
const LBF_IN = 4.4482216152605 * 0.0254;

/** The dcpm1 machine: 95 V inner voltage at 1425 rpm and 100 A. */
const lossFree = motorFromConstants({
  voltageV: 100,
  resistanceOhm: 0.05,
  torqueConstantNmPerA: 95 / (1425 * RPM),
  noLoadCurrentA: 0,
});
const at100A = linePoint(sheetLine(lossFree), 100 * lossFree.torqueConstantNmPerA);

function measured(noLoadRpm: number, stallTorqueNm: number) {
  const speed = noLoadRpm * RPM;
  const stallCurrentA = 1;
  const sheet = { noLoadSpeedRadPerS: speed, noLoadCurrentA: 0, stallTorqueNm, stallCurrentA };
  return peakPowerPoint(sheetLine(motorFromSheet({ voltageV: (stallTorqueNm * speed) / stallCurrentA, ...sheet })));
}
const first = measured(600, 0.325);
const second = measured(3750, 0.0722);
const third = measured(92, 1.6);

/** 12 V, 0.1 ohm: stall current 120 A; constant friction. */
function constantFriction(noLoadCurrentA: number) {
  return sheetLine(
    motorFromConstants({ voltageV: 12, resistanceOhm: 0.1, torqueConstantNmPerA: 0.02, noLoadCurrentA, speedLossShare: 0 }),
  );
}
const best = (share: number) => peakEfficiencyPoint(constantFriction(120 * share)).efficiency;

/** k = 0.0173, R = 1.3, viscous friction c = 3e-6: no load at 1000 rad/s takes c·ω/k. */
const viscousLoss = (3e-6 * 1000) / 0.0173;
const viscous = motorFromConstants({
  voltageV: 0.0173 * 1000 + 1.3 * viscousLoss,
  resistanceOhm: 1.3,
  torqueConstantNmPerA: 0.0173,
  noLoadCurrentA: viscousLoss,
});
const viscousBest = peakEfficiencyPoint(sheetLine(viscous));
/** On this machine the whole line scales with voltage, so that power goes with its square. */
const volts30W = viscous.voltageV * Math.sqrt(30 / viscousBest.shaftPowerW);
const at30W = peakEfficiencyPoint(lineOf(viscous, volts30W, 1.3));

const fitzgerald = motorFromSheet({
  voltageV: 50,
  noLoadSpeedRadPerS: 2100 * RPM,
  noLoadCurrentA: 1.25,
  stallTorqueNm: 1,
  stallCurrentA: 50 / 1.03,
});
const fitzgeraldLine = lineOf(fitzgerald, 48, 1.03);
const fitzgeraldCurrent = fitzgeraldLine.currentAt(fitzgeraldLine.torqueAt(1700 * RPM));

const wildi = motorFromConstants({ voltageV: 150, resistanceOhm: 1, torqueConstantNmPerA: 50 / (500 * RPM), noLoadCurrentA: 0 });
const wildiCurrent = (rpm: number) => sheetLine(wildi).currentAt(sheetLine(wildi).torqueAt(rpm * RPM));

const kosow = motorFromConstants({ voltageV: 125, resistanceOhm: 0.25, torqueConstantNmPerA: 1, noLoadCurrentA: 0 });

const cold = motorFromConstants({ voltageV: 50, resistanceOhm: 2, torqueConstantNmPerA: 50 / (1800 * RPM), noLoadCurrentA: 0 });
const hot = {
  ...cold,
  resistanceOhm: cold.resistanceOhm * 1.25,
  torqueConstantNmPerA: cold.torqueConstantNmPerA * 0.95,
  backEmfVPerRadPerS: cold.backEmfVPerRadPerS * 0.95,
};
const atCold = linePoint(sheetLine(cold), 2);
const atHot = linePoint(sheetLine(hot), 2);

const geared = motorFromSheet({
  voltageV: 7.5,
  noLoadSpeedRadPerS: 100 * RPM,
  noLoadCurrentA: 0.37,
  stallTorqueNm: 15 * LBF_IN,
  stallCurrentA: 4.8,
});

export const motorAnswers: Answers = {
  "B1 no-load speed": () => sheetLine(lossFree).noLoadSpeedRadPerS / RPM,
  "B1 torque": () => at100A.torqueNm,
  "B1 inner voltage": () => at100A.speedRadPerS * lossFree.backEmfVPerRadPerS,
  "B1 copper loss": () => at100A.currentA ** 2 * lossFree.resistanceOhm,
  "B1 output": () => at100A.shaftPowerW,
  "B1 stall current": () => sheetLine(lossFree).stallCurrentA,
  "B3 first speed": () => first.speedRadPerS / RPM,
  "B3 first torque": () => first.torqueNm,
  "B3 first power": () => first.shaftPowerW,
  "B3 second speed": () => second.speedRadPerS / RPM,
  "B3 second torque": () => second.torqueNm,
  "B3 second power": () => second.shaftPowerW,
  "B3 third speed": () => third.speedRadPerS / RPM,
  "B3 third torque": () => third.torqueNm,
  "B3 third power": () => third.shaftPowerW,
  "B4 0.01": () => best(0.01),
  "B4 0.02": () => best(0.02),
  "B4 0.04": () => best(0.04),
  "B4 0.0625": () => best(0.0625),
  "B4 0.10": () => best(0.1),
  "B4 case efficiency": () => peakEfficiencyPoint(constantFriction(2)).efficiency,
  "B4 case current": () => peakEfficiencyPoint(constantFriction(2)).currentA,
  "B4 net peak": () => peakPowerPoint(constantFriction(2)).shaftPowerW,
  "B4 net peak current": () => peakPowerPoint(constantFriction(2)).currentA,
  "B5 efficiency": () => viscousBest.efficiency,
  "B5 torque over speed": () => viscousBest.torqueNm / viscousBest.speedRadPerS,
  "B5 speed": () => at30W.speedRadPerS,
  "B5 torque": () => at30W.torqueNm,
  "B5 voltage": () => volts30W,
  "B5 ratio": () => at30W.speedRadPerS / 5,
  "B6 constant": () => fitzgerald.backEmfVPerRadPerS,
  "B6 back-emf": () => fitzgerald.backEmfVPerRadPerS * 1700 * RPM,
  "B6 current": () => fitzgeraldCurrent,
  "B6 gross power": () => fitzgerald.backEmfVPerRadPerS * 1700 * RPM * fitzgeraldCurrent,
  "B7 starting current": () => sheetLine(wildi).stallCurrentA,
  "B7 current at 1000 rpm": () => wildiCurrent(1000),
  "B7 current at 1460 rpm": () => wildiCurrent(1460),
  "B9 counter-emf": () => sheetLine(kosow).speedAt(60) * kosow.backEmfVPerRadPerS,
  "B11 constant": () => cold.backEmfVPerRadPerS,
  "B11 cold current": () => atCold.currentA,
  "B11 cold speed": () => atCold.speedRadPerS / RPM,
  "B11 cold power": () => atCold.shaftPowerW,
  "B11 cold efficiency": () => atCold.efficiency,
  "B11 hot current": () => atHot.currentA,
  "B11 hot speed": () => atHot.speedRadPerS / RPM,
  "B11 hot power": () => atHot.shaftPowerW,
  "B11 hot efficiency": () => atHot.efficiency,
  "practice power torque": () => peakPowerPoint(sheetLine(geared)).torqueNm / LBF_IN,
  "practice power speed": () => peakPowerPoint(sheetLine(geared)).speedRadPerS / RPM,
  "practice efficiency torque": () => peakEfficiencyPoint(sheetLine(geared)).torqueNm / LBF_IN,
  "practice efficiency speed": () => peakEfficiencyPoint(sheetLine(geared)).speedRadPerS / RPM,
  "practice 4 V current": () => lineOf(geared, 4, geared.resistanceOhm).noLoadCurrentA,
};

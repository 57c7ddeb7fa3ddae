/** The model's answers to the rows on copper and magnets. */
import { sheetLine } from "../../../extension/model/line.js";
import { motorFromConstants } from "../../../extension/model/motor.js";
import { copperFactor, copperFactorSlope, magnetFactor, motorAt } from "../../../extension/model/temperature.js";
import type { Answers } from "../row.js";

const over20 = (temperatureC: number) => copperFactor(temperatureC) / copperFactor(20);
const ferrite = motorFromConstants({
  voltageV: 12,
  resistanceOhm: 1,
  torqueConstantNmPerA: 0.02,
  noLoadCurrentA: 0,
  magnet: "ferrite",
});
const cold = sheetLine(motorAt(ferrite, 20));
const hot = sheetLine(motorAt(ferrite, 100));

export const temperatureAnswers: Answers = {
  "C1 25": () => over20(25),
  "C1 40": () => over20(40),
  "C1 80": () => over20(80),
  "C1 100": () => over20(100),
  "C1 120": () => over20(120),
  "C1 155": () => over20(155),
  "C1 at 25": () => copperFactorSlope(25) / copperFactor(25),
  "C2 235": () => over20(100),
  "C2 234.5": () => over20(100),
  "C5 neodymium": () => magnetFactor("neodymium", 85),
  "C5 ferrite": () => magnetFactor("ferrite", 85),
  "C5 hot no-load speed": () => hot.noLoadSpeedRadPerS / cold.noLoadSpeedRadPerS,
  "C5 hot stall current": () => hot.stallCurrentA / cold.stallCurrentA,
  "C5 hot stall torque": () => hot.stallTorqueNm / cold.stallTorqueNm,
};

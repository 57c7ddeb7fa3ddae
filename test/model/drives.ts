/** Mechanisms for the model's tests: plain drives with everything optional left out. */
import type { Drive, Load, Stage } from "../../extension/model/drive.js";
import { motorFromSheet } from "../../extension/model/motor.js";
import { backwardEfficiency } from "../../extension/model/stages.js";

export const RPM = Math.PI / 30;

/** An invented 12 V motor. */
export const plainMotor = motorFromSheet({
  voltageV: 12,
  noLoadSpeedRadPerS: 500,
  noLoadCurrentA: 0.8,
  stallTorqueNm: 1.1,
  stallCurrentA: 50,
});

export function reduction(ratio: number, efficiency = 1, inertiaKgM2 = 0): Stage {
  return {
    kind: "reduction",
    ratio,
    efficiency,
    backwardEfficiency: backwardEfficiency(efficiency),
    nearSelfLocking: false,
    inertiaKgM2,
  };
}

export function liftOf(massKg: number, drumRadiusM: number, travelM: number): Extract<Load, { kind: "lift" }> {
  return {
    kind: "lift",
    massKg,
    drumRadiusM,
    travelM,
    slopeRad: Math.PI / 2,
    carriagePerRope: 1,
    counterbalanceN: 0,
    frictionForceN: 0,
  };
}

export function armOf(massKg: number, centreOfMassM: number, fromRad: number, toRad: number): Extract<Load, { kind: "arm" }> {
  const inertiaKgM2 = massKg * centreOfMassM * centreOfMassM;
  return { kind: "arm", massKg, centreOfMassM, fromRad, toRad, slopeRad: Math.PI / 2, inertiaKgM2, counterbalanceNm: 0 };
}

export function rollerOf(torqueNm: number): Extract<Load, { kind: "roller" }> {
  return { kind: "roller", torqueNm, inertiaKgM2: 0 };
}

export function driveOf(fields: Partial<Drive> = {}): Drive {
  return {
    motor: plainMotor,
    motorCount: 1,
    stages: [reduction(20)],
    load: liftOf(10, 0.05, 1),
    dragNm: 0,
    pwmDuty: 1,
    wiringOhm: 0,
    rampS: 0,
    ...fields,
  };
}

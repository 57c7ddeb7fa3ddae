/**
 * A mechanism made ready for motion: all constants that its equations need, worked out once.
 *
 * Deliberately not here: anything that changes with time (motion.ts), except the command's ramp.
 */
import type { Drive, MotorConstants } from "./drive.js";
import { availableLine, leadOhm, supplyOf } from "./line.js";
import { breakawayCurrent, lossCurrentSlope } from "./motor.js";
import { type Direction, type ShaftLoad, shaftLoadOf, travelDirection } from "./shaftLoad.js";
import { type Train, trainOf } from "./stages.js";

export interface Plant {
  readonly drive: Drive;
  readonly motor: MotorConstants;
  readonly count: number;
  readonly train: Train;
  readonly load: ShaftLoad;
  readonly direction: Direction;
  /** Turn of the output shaft from start to end, rad, not below 0. */
  readonly spanRad: number;
  /** Inertia of all rotors at the output shaft, kg·m². */
  readonly rotorKgM2: number;
  readonly breakawayA: number;
  readonly lossSlopeAsPerRad: number;
  readonly leadOhm: number;
  readonly dropV: number;
  readonly limitA: number;
  readonly duty: number;
  readonly rampS: number;
  readonly bus: Bus;
  /** Torque at the output shaft and current of one motor that count as nothing, N·m and A. */
  readonly fadedNm: number;
  readonly fadedA: number;
}

/** Share of full torque that counts as nothing. */
const FADED = 1e-10;

/** What feeds the mechanism: an open-circuit voltage behind a resistance. */
export interface Bus {
  readonly openCircuitV: number;
  readonly resistanceOhm: number;
}

export function plantOf(drive: Drive): Plant {
  const load = shaftLoadOf(drive);
  const train = trainOf(drive.stages);
  const supply = supplyOf(drive);
  return {
    drive,
    motor: drive.motor,
    count: drive.motorCount,
    train,
    load,
    direction: travelDirection(load),
    spanRad: Math.abs(load.endRad - load.startRad),
    rotorKgM2: drive.motorCount * drive.motor.rotorInertiaKgM2 * train.ratio * train.ratio,
    breakawayA: breakawayCurrent(drive.motor),
    lossSlopeAsPerRad: lossCurrentSlope(drive.motor),
    leadOhm: leadOhm(drive),
    dropV: drive.driver?.dropV ?? 0,
    limitA: drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY,
    duty: drive.pwmDuty,
    rampS: drive.rampS,
    fadedNm: FADED * drive.motorCount * train.ratio * Math.min(availableLine(drive).stallTorqueNm, limitTorque(drive)),
    fadedA: FADED * Math.min(availableLine(drive).stallCurrentA, drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY),
    bus: { openCircuitV: supply.openCircuitV, resistanceOhm: supply.resistanceOhm },
  };
}

function limitTorque(drive: Drive): number {
  return drive.motor.torqueConstantNmPerA * (drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY);
}

/** Inertia that the motors must turn at the output shaft, losses left out, kg·m². */
export function turningInertia(plant: Plant, position: number): number {
  return plant.load.inertia(position) + plant.train.inertiaKgM2 + plant.rotorKgM2;
}

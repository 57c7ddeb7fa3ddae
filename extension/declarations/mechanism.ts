/** `mechanism(…)`: motors, stages and a load under one name, with what is asked of them. */
import * as v from "valibot";
import type { Drive } from "../model/drive.js";
import { define } from "./define.js";
import type { Definition } from "./definition.js";
import { exactRatio } from "./exactRatio.js";
import { builtBy, count, fields, NOT_NEGATIVE, name, number, POSITIVE, POSITIVE_SHARE, quantity } from "./fields.js";
import { LOAD_KINDS, type Load } from "./loads/load.js";
import type { Motor } from "./motor.js";
import { PROTECTION_KINDS, type Protection } from "./protection.js";
import type { Current, Range, Resistance, Time, Torque, Voltage } from "./quantities.js";
import { present, readOr } from "./read.js";
import type { Stage } from "./stages.js";
import type { Battery } from "./supply.js";

export interface MechanismInput {
  readonly motor: Motor;
  /** Motors that share the load; left out: 1. */
  readonly motorCount?: number;
  /** From the motor to the load, in order; empty for a direct drive. */
  readonly stages: readonly Stage[];
  readonly load: Load;
  /** Friction torque at the output shaft; opposes motion. */
  readonly drag?: Torque | Range<Torque>;
  /** Time that the travel may take. */
  readonly within?: Time | Range<Time>;
  /** Time for which the load is held at its hardest position. */
  readonly holdFor?: Time | Range<Time>;
  /** The travel starts again this often. */
  readonly every?: Time | Range<Time>;
  readonly motorCurrentLimit?: Current | Range<Current>;
  /** Full command as a share of the supply's voltage; left out: 1. */
  readonly pwmDuty?: number | Range<number>;
  /** Losses of the motor driver: a fixed drop, a resistance. */
  readonly driver?: { readonly drop?: Voltage | Range<Voltage>; readonly resistance?: Resistance | Range<Resistance> };
  /** Resistance of leads and connectors, per motor. */
  readonly wiring?: Resistance | Range<Resistance>;
  /** Time from rest to full command. */
  readonly ramp?: Time | Range<Time>;
  readonly protect?: Protection;
  /** Left out: the supply of the robot that lists the mechanism. */
  readonly supply?: Battery;
}

export interface Mechanism extends MechanismInput {
  readonly kind: "mechanism";
  readonly name: string;
  /** Motor turns per turn of the output shaft. */
  readonly ratio: number;
  readonly si: Drive;
}

const input: v.GenericSchema<unknown, MechanismInput> = fields({
  motor: builtBy<Motor>(["motor"], "a motor(…)"),
  motorCount: v.optional(count("the number of motors")),
  stages: v.array(
    builtBy<Stage>(["spur", "chain", "belt", "planetary", "worm", "reduction"], "a stage such as spur(16, 40)"),
    "here goes a list of stages such as [spur(16, 40)]",
  ),
  load: builtBy<Load>(LOAD_KINDS, "a load such as lift(…) or arm(…)"),
  drag: v.optional(quantity<Torque>("torque", NOT_NEGATIVE)),
  within: v.optional(quantity<Time>("time", POSITIVE)),
  holdFor: v.optional(quantity<Time>("time", POSITIVE)),
  every: v.optional(quantity<Time>("time", POSITIVE)),
  motorCurrentLimit: v.optional(quantity<Current>("current", POSITIVE)),
  pwmDuty: v.optional(number(POSITIVE_SHARE)),
  driver: v.optional(
    fields({
      drop: v.optional(quantity<Voltage>("voltage", NOT_NEGATIVE)),
      resistance: v.optional(quantity<Resistance>("resistance", NOT_NEGATIVE)),
    }),
  ),
  wiring: v.optional(quantity<Resistance>("resistance", NOT_NEGATIVE)),
  ramp: v.optional(quantity<Time>("time", NOT_NEGATIVE)),
  protect: v.optional(builtBy<Protection>(PROTECTION_KINDS, "a breaker(…), fuse(…) or ptc(…)")),
  supply: v.optional(builtBy<Battery>(["battery"], "a battery(…)")),
});

export const mechanismDefinition: Definition<[string, MechanismInput], Mechanism> = define(
  "mechanism",
  v.strictTuple([name, input], "mechanism takes a name and one object"),
  (label, given) => ({
    ...given,
    kind: "mechanism",
    name: label,
    ratio: ratioOf(given.stages),
    si: driveOf(given),
  }),
);

/** One driven part of the robot. */
export function mechanism(name: string, input: MechanismInput): Mechanism {
  return mechanismDefinition.build(name, input);
}

/** With teeth everywhere rounded once. */
function ratioOf(stages: readonly Stage[]): number {
  const exact = exactRatio(stages);
  return exact ? exact.numerator / exact.denominator : stages.reduce((ratio, stage) => ratio * stage.ratio, 1);
}

function driveOf(given: MechanismInput): Drive {
  const { driver, protect, supply } = given;
  return {
    motor: given.motor.si,
    motorCount: given.motorCount ?? 1,
    stages: given.stages.map((stage) => stage.si),
    load: given.load.si,
    dragNm: readOr(given.drag, 0),
    pwmDuty: readOr(given.pwmDuty, 1),
    wiringOhm: readOr(given.wiring, 0),
    rampS: readOr(given.ramp, 0),
    ...present({
      withinS: readOr(given.within, undefined),
      holdForS: readOr(given.holdFor, undefined),
      everyS: readOr(given.every, undefined),
      motorCurrentLimitA: readOr(given.motorCurrentLimit, undefined),
      driver: driver && { dropV: readOr(driver.drop, 0), resistanceOhm: readOr(driver.resistance, 0) },
      protection: protect?.si,
      supply: supply?.si,
    }),
  };
}

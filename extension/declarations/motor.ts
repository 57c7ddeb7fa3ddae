/** `motor(…)`: the motor's data, from a sheet or from its constants. Contradicting data are a finding of their own, not refused here. */
import * as v from "valibot";
import type { MotorConstants, ThermalConstants } from "../model/drive.js";
import { motorFromConstants, motorFromSheet } from "../model/motor.js";
import { define } from "./define.js";
import type { Definition } from "./definition.js";
import { fields, NOT_NEGATIVE, number, POSITIVE, quantity, SHARE, tell, word } from "./fields.js";
import type {
  Current,
  Inertia,
  Range,
  Resistance,
  Speed,
  Temperature,
  ThermalResistance,
  Time,
  Torque,
  TorqueConstant,
  Voltage,
} from "./quantities.js";
import { present, read, readOr } from "./read.js";

/** Fields that both forms of a motor may have. */
export interface MotorExtras {
  /** Share of the no-load current that grows with speed; left out: 1, the whole line scales with voltage. */
  readonly speedLossShare?: number | Range<number>;
  /** Inertia at the shaft that the sheet speaks of. */
  readonly rotorInertia?: Inertia | Range<Inertia>;
  /** Torque (and current) that the motor bears for ever. */
  readonly rated?: { readonly torque: Torque | Range<Torque>; readonly current?: Current | Range<Current> };
  /** Two-node heat network of winding and housing. */
  readonly thermal?: MotorThermal;
  readonly magnet?: "ferrite" | "neodymium" | "samarium-cobalt";
  /** Spread between motors as a share: 0.1 is ±10 %. */
  readonly tolerance?: number;
}

export interface MotorThermal {
  readonly windingToHousing: ThermalResistance | Range<ThermalResistance>;
  readonly housingToAmbient: ThermalResistance | Range<ThermalResistance>;
  readonly windingTime: Time | Range<Time>;
  readonly housingTime: Time | Range<Time>;
  /** Highest winding temperature. */
  readonly limit: Temperature | Range<Temperature>;
  readonly ambient?: Temperature | Range<Temperature>;
}

/** A motor as its sheet tells it, measured at `voltage`. */
export interface MotorSheet extends MotorExtras {
  readonly voltage: Voltage | Range<Voltage>;
  readonly noLoad: { readonly speed: Speed | Range<Speed>; readonly current: Current | Range<Current> };
  readonly stall: { readonly torque: Torque | Range<Torque>; readonly current: Current | Range<Current> };
}

/** A motor by its constants. */
export interface MotorByConstants extends MotorExtras {
  readonly voltage: Voltage | Range<Voltage>;
  readonly resistance: Resistance | Range<Resistance>;
  readonly torqueConstant: TorqueConstant | Range<TorqueConstant>;
  readonly noLoadCurrent: Current | Range<Current>;
}

export type MotorInput = MotorSheet | MotorByConstants;

export type Motor = MotorInput & {
  readonly kind: "motor";
  readonly si: MotorConstants;
};

const extras = {
  speedLossShare: v.optional(number(SHARE)),
  rotorInertia: v.optional(quantity<Inertia>("inertia", NOT_NEGATIVE)),
  rated: v.optional(
    fields({ torque: quantity<Torque>("torque", POSITIVE), current: v.optional(quantity<Current>("current", POSITIVE)) }),
  ),
  thermal: v.optional(
    fields({
      windingToHousing: quantity<ThermalResistance>("thermalResistance", POSITIVE),
      housingToAmbient: quantity<ThermalResistance>("thermalResistance", POSITIVE),
      windingTime: quantity<Time>("time", POSITIVE),
      housingTime: quantity<Time>("time", POSITIVE),
      limit: quantity<Temperature>("temperature", POSITIVE),
      ambient: v.optional(quantity<Temperature>("temperature", POSITIVE)),
    }),
  ),
  magnet: v.optional(word("ferrite", "neodymium", "samarium-cobalt")),
  tolerance: v.optional(
    v.custom<number>(
      (input) => typeof input === "number" && input >= 0 && input < 0.5,
      (issue) => `tolerance is a share from 0 to below 0.5 (0.1 is ±10 %), not ${tell(issue.input)}`,
    ),
  ),
};

const sheet = fields({
  voltage: quantity<Voltage>("voltage", POSITIVE),
  noLoad: fields({ speed: quantity<Speed>("speed", POSITIVE), current: quantity<Current>("current", NOT_NEGATIVE) }),
  stall: fields({ torque: quantity<Torque>("torque", POSITIVE), current: quantity<Current>("current", POSITIVE) }),
  ...extras,
});

const byConstants = fields({
  voltage: quantity<Voltage>("voltage", POSITIVE),
  resistance: quantity<Resistance>("resistance", POSITIVE),
  torqueConstant: quantity<TorqueConstant>("torqueConstant", POSITIVE),
  noLoadCurrent: quantity<Current>("current", NOT_NEGATIVE),
  ...extras,
});

/** Any field of the constants' form, and none of the sheet's, chooses that form. */
const input: v.GenericSchema<unknown, MotorInput> = v.lazy((given) => (isByConstants(given) ? byConstants : sheet));

export const motorDefinition: Definition<[MotorInput], Motor> = define(
  "motor",
  v.strictTuple([input], "motor takes one object"),
  (given) => ({
    ...given,
    kind: "motor",
    si: constantsOf(given),
  }),
);

/** A geared or bare DC motor: the numbers of its sheet, or its constants. */
export function motor(input: MotorInput): Motor {
  return motorDefinition.build(input);
}

function isByConstants(given: unknown): given is MotorByConstants {
  if (typeof given !== "object" || given === null || "noLoad" in given || "stall" in given) return false;
  return "resistance" in given || "torqueConstant" in given || "noLoadCurrent" in given;
}

function constantsOf(given: MotorInput): MotorConstants {
  const common = {
    voltageV: read(given.voltage),
    speedLossShare: readOr(given.speedLossShare, 1),
    rotorInertiaKgM2: readOr(given.rotorInertia, 0),
    ...present({
      rated: ratedOf(given.rated),
      thermal: thermalOf(given.thermal),
      magnet: given.magnet,
      tolerance: given.tolerance,
    }),
  };
  if (isByConstants(given)) {
    return motorFromConstants({
      ...common,
      resistanceOhm: read(given.resistance),
      torqueConstantNmPerA: read(given.torqueConstant),
      noLoadCurrentA: read(given.noLoadCurrent),
    });
  }
  const { noLoad, stall } = given as MotorSheet;
  return motorFromSheet({
    ...common,
    noLoadSpeedRadPerS: read(noLoad.speed),
    noLoadCurrentA: read(noLoad.current),
    stallTorqueNm: read(stall.torque),
    stallCurrentA: read(stall.current),
  });
}

function ratedOf(rated: MotorExtras["rated"]): MotorConstants["rated"] {
  return rated && present({ torqueNm: read(rated.torque), currentA: readOr(rated.current, undefined) });
}

function thermalOf(thermal: MotorThermal | undefined): ThermalConstants | undefined {
  return (
    thermal &&
    present({
      windingToHousingKPerW: read(thermal.windingToHousing),
      housingToAmbientKPerW: read(thermal.housingToAmbient),
      windingTimeS: read(thermal.windingTime),
      housingTimeS: read(thermal.housingTime),
      limitC: celsius(read(thermal.limit)),
      ambientC: thermal.ambient === undefined ? undefined : celsius(read(thermal.ambient)),
    })
  );
}

function celsius(kelvin: number): number {
  return kelvin - 273.15;
}

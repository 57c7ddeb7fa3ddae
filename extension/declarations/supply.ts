/** `battery(…)`: the supply that mechanisms share. */
import * as v from "valibot";
import type { Supply } from "../model/drive.js";
import { define } from "./define.js";
import type { Definition } from "./definition.js";
import { fields, NOT_NEGATIVE, number, POSITIVE, quantity } from "./fields.js";
import type { Charge, Range, Resistance, Time, Voltage } from "./quantities.js";
import { present, read, readOr } from "./read.js";

export interface BatteryInput {
  readonly openCircuit: Voltage | Range<Voltage>;
  /** Internal, with its leads. */
  readonly resistance: Resistance | Range<Resistance>;
  readonly capacity?: Charge | Range<Charge>;
  /** The time over which `capacity` is rated; needed for `peukert`. */
  readonly ratedOver?: Time | Range<Time>;
  /** Peukert exponent. */
  readonly peukert?: number | Range<number>;
  /** The lowest voltage that the electronics bear, for ever or for longer than a time. */
  readonly mustStayAbove?: Voltage | { readonly voltage: Voltage | Range<Voltage>; readonly for: Time | Range<Time> };
}

export type Battery = BatteryInput & { readonly kind: "battery"; readonly si: Supply };

const floor = fields({ voltage: quantity<Voltage>("voltage", POSITIVE), for: quantity<Time>("time", NOT_NEGATIVE) });
const input = fields({
  openCircuit: quantity<Voltage>("voltage", POSITIVE),
  resistance: quantity<Resistance>("resistance", NOT_NEGATIVE),
  capacity: v.optional(quantity<Charge>("charge", POSITIVE)),
  ratedOver: v.optional(quantity<Time>("time", POSITIVE)),
  peukert: v.optional(number({ min: 1, max: 2, say: "from 1 to 2" })),
  mustStayAbove: v.optional(v.lazy((given) => (isFloorObject(given) ? floor : quantity<Voltage>("voltage", POSITIVE)))),
}) as v.GenericSchema<unknown, BatteryInput>;

export const batteryDefinition: Definition<[BatteryInput], Battery> = define(
  "battery",
  v.strictTuple([input], "battery takes one object"),
  (given) => ({
    ...given,
    kind: "battery",
    si: {
      openCircuitV: read(given.openCircuit),
      resistanceOhm: read(given.resistance),
      peukert: readOr(given.peukert, 1),
      ...present({
        capacityAh: given.capacity && read(given.capacity) / 3600,
        ratedOverH: given.ratedOver && read(given.ratedOver) / 3600,
        mustStayAbove: floorOf(given.mustStayAbove),
      }),
    },
  }),
);

/** A battery or other supply with an internal resistance. */
export function battery(input: BatteryInput): Battery {
  return batteryDefinition.build(input);
}

function isFloorObject(given: unknown): boolean {
  return typeof given === "object" && given !== null && !("kind" in given);
}

function floorOf(given: BatteryInput["mustStayAbove"]): Supply["mustStayAbove"] {
  if (given === undefined) return undefined;
  return typeof given === "string"
    ? { voltageV: read(given), forS: 0 }
    : { voltageV: read(given.voltage), forS: read(given.for) };
}

/** `wheels(…)`: what a driven axle propels over ground, up to where the wheels slip. */
import * as v from "valibot";
import type { Load as LoadNumbers } from "../../model/drive.js";
import { define } from "../define.js";
import type { Definition } from "../definition.js";
import { fields, NOT_NEGATIVE, number, POSITIVE, POSITIVE_SHARE, quantity, together } from "../fields.js";
import type { Angle, Inertia, Length, Mass, Range } from "../quantities.js";
import { read, readOr } from "../read.js";
import { SLOPE } from "./curve.js";

export interface WheelsInput {
  /** What this mechanism propels (its share of the robot). */
  readonly mass: Mass | Range<Mass>;
  /** Of a wheel; or give the diameter. */
  readonly radius?: Length | Range<Length>;
  readonly diameter?: Length | Range<Length>;
  /** Coefficient of friction between tyre and ground. */
  readonly grip: number | Range<number>;
  /** Coefficient of rolling resistance; left out: 0. */
  readonly rolling?: number | Range<number>;
  readonly slope?: Angle | Range<Angle>;
  readonly distance: Length | Range<Length>;
  /** Share of the weight that rests on driven wheels; left out: 1. */
  readonly drivenShare?: number | Range<number>;
  /** Of the wheels about their shafts, beside the mass. */
  readonly inertia?: Inertia | Range<Inertia>;
}

export interface Wheels extends WheelsInput {
  readonly kind: "wheels";
  readonly si: Extract<LoadNumbers, { kind: "wheels" }>;
}

const input: v.GenericSchema<unknown, WheelsInput> = together(
  fields({
    mass: quantity<Mass>("mass", POSITIVE),
    radius: v.optional(quantity<Length>("length", POSITIVE)),
    diameter: v.optional(quantity<Length>("length", POSITIVE)),
    grip: number(POSITIVE),
    rolling: v.optional(number(NOT_NEGATIVE)),
    slope: v.optional(quantity<Angle>("angle", SLOPE)),
    distance: quantity<Length>("length", POSITIVE),
    drivenShare: v.optional(number(POSITIVE_SHARE)),
    inertia: v.optional(quantity<Inertia>("inertia", NOT_NEGATIVE)),
  }) as v.GenericSchema<unknown, WheelsInput>,
  ({ radius, diameter }) => {
    if (radius === undefined && diameter === undefined)
      return { field: "radius", message: 'wheels needs the field "radius" or "diameter"' };
    const both = radius !== undefined && diameter !== undefined;
    return both ? { field: "diameter", message: 'give "radius" or "diameter", not both' } : undefined;
  },
);

export const wheelsDefinition: Definition<[WheelsInput], Wheels> = define(
  "wheels",
  v.strictTuple([input], "wheels takes one object"),
  (given) => ({
    ...given,
    kind: "wheels",
    si: {
      kind: "wheels",
      massKg: read(given.mass),
      radiusM: given.radius === undefined ? read(given.diameter as Length) / 2 : read(given.radius),
      grip: read(given.grip),
      rolling: readOr(given.rolling, 0),
      slopeRad: readOr(given.slope, 0),
      distanceM: read(given.distance),
      drivenShare: readOr(given.drivenShare, 1),
      inertiaKgM2: readOr(given.inertia, 0),
    },
  }),
);

/** A mass that driven wheels move over ground. */
export function wheels(input: WheelsInput): Wheels {
  return wheelsDefinition.build(input);
}

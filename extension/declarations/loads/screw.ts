/** `screw(…)`: a power screw that pushes a force (and a mass) along its axis. */
import * as v from "valibot";
import type { Load as LoadNumbers } from "../../model/drive.js";
import { define } from "../define.js";
import type { Definition } from "../definition.js";
import { fields, NOT_NEGATIVE, number, POSITIVE, POSITIVE_SHARE, quantity } from "../fields.js";
import type { Angle, Force, Length, Mass, Range } from "../quantities.js";
import { present, read, readOr } from "../read.js";

export interface ScrewInput {
  /** Axial force to overcome, weight included. */
  readonly force: Force | Range<Force>;
  /** Travel per turn. */
  readonly lead: Length | Range<Length>;
  readonly meanDiameter: Length | Range<Length>;
  /** Coefficient of friction in the thread. */
  readonly friction: number | Range<number>;
  readonly travel: Length | Range<Length>;
  /** Half angle of the thread; left out: `"0 deg"`, a square thread. */
  readonly threadAngle?: Angle | Range<Angle>;
  readonly collar?: { readonly meanDiameter: Length | Range<Length>; readonly friction: number | Range<number> };
  /** What moves along; counts for inertia only. */
  readonly mass?: Mass | Range<Mass>;
  /** Replaces the friction equations, as for a ball screw. */
  readonly efficiency?: number | Range<number>;
}

export interface Screw extends ScrewInput {
  readonly kind: "screw";
  readonly si: Extract<LoadNumbers, { kind: "screw" }>;
}

const input: v.GenericSchema<unknown, ScrewInput> = fields({
  force: quantity<Force>("force", NOT_NEGATIVE),
  lead: quantity<Length>("length", POSITIVE),
  meanDiameter: quantity<Length>("length", POSITIVE),
  friction: number(NOT_NEGATIVE),
  travel: quantity<Length>("length", POSITIVE),
  threadAngle: v.optional(quantity<Angle>("angle", { min: 0, max: Math.PI / 3, say: "from 0 to 60 deg" })),
  collar: v.optional(fields({ meanDiameter: quantity<Length>("length", POSITIVE), friction: number(NOT_NEGATIVE) })),
  mass: v.optional(quantity<Mass>("mass", NOT_NEGATIVE)),
  efficiency: v.optional(number(POSITIVE_SHARE)),
});

export const screwDefinition: Definition<[ScrewInput], Screw> = define(
  "screw",
  v.strictTuple([input], "screw takes one object"),
  (given) => ({
    ...given,
    kind: "screw",
    si: {
      kind: "screw",
      forceN: read(given.force),
      leadM: read(given.lead),
      meanDiameterM: read(given.meanDiameter),
      friction: read(given.friction),
      travelM: read(given.travel),
      threadAngleRad: readOr(given.threadAngle, 0),
      massKg: readOr(given.mass, 0),
      ...present({
        collar: given.collar && { meanDiameterM: read(given.collar.meanDiameter), friction: read(given.collar.friction) },
        efficiency: readOr(given.efficiency, undefined),
      }),
    },
  }),
);

/** A power screw. */
export function screw(input: ScrewInput): Screw {
  return screwDefinition.build(input);
}

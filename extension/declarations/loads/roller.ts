/** `roller(…)`: a steady torque that turns on and on: intakes, conveyors, brushes. */
import * as v from "valibot";
import type { Load as LoadNumbers } from "../../model/drive.js";
import { define } from "../define.js";
import type { Definition } from "../definition.js";
import { fields, NOT_NEGATIVE, POSITIVE, quantity } from "../fields.js";
import type { Inertia, Range, Speed, Torque } from "../quantities.js";
import { present, read, readOr } from "../read.js";

export interface RollerInput {
  readonly torque: Torque | Range<Torque>;
  /** Speed of the output shaft that is asked for. */
  readonly speed?: Speed | Range<Speed>;
  readonly inertia?: Inertia | Range<Inertia>;
}

export interface Roller extends RollerInput {
  readonly kind: "roller";
  readonly si: Extract<LoadNumbers, { kind: "roller" }>;
}

const input: v.GenericSchema<unknown, RollerInput> = fields({
  torque: quantity<Torque>("torque", NOT_NEGATIVE),
  speed: v.optional(quantity<Speed>("speed", POSITIVE)),
  inertia: v.optional(quantity<Inertia>("inertia", NOT_NEGATIVE)),
});

export const rollerDefinition: Definition<[RollerInput], Roller> = define(
  "roller",
  v.strictTuple([input], "roller takes one object"),
  (given) => ({
    ...given,
    kind: "roller",
    si: {
      kind: "roller",
      torqueNm: read(given.torque),
      inertiaKgM2: readOr(given.inertia, 0),
      ...present({ speedRadPerS: readOr(given.speed, undefined) }),
    },
  }),
);

/** A steady torque. */
export function roller(input: RollerInput): Roller {
  return rollerDefinition.build(input);
}

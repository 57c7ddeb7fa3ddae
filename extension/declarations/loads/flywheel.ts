/** `flywheel(…)`: an inertia brought to speed against a steady drag; it may give off energy in a release. */
import * as v from "valibot";
import type { Load as LoadNumbers } from "../../model/drive.js";
import { define } from "../define.js";
import type { Definition } from "../definition.js";
import { fields, NOT_NEGATIVE, POSITIVE, quantity } from "../fields.js";
import type { Energy, Inertia, Range, Speed, Torque } from "../quantities.js";
import { present, read, readOr } from "../read.js";

export interface FlywheelInput {
  readonly inertia: Inertia | Range<Inertia>;
  /** Speed of the wheel to reach from rest. */
  readonly speed: Speed | Range<Speed>;
  /** Steady torque against it. */
  readonly drag?: Torque | Range<Torque>;
  /** Energy that one release takes from the turning parts. */
  readonly releaseEnergy?: Energy | Range<Energy>;
}

export interface Flywheel extends FlywheelInput {
  readonly kind: "flywheel";
  readonly si: Extract<LoadNumbers, { kind: "flywheel" }>;
}

const input: v.GenericSchema<unknown, FlywheelInput> = fields({
  inertia: quantity<Inertia>("inertia", POSITIVE),
  speed: quantity<Speed>("speed", POSITIVE),
  drag: v.optional(quantity<Torque>("torque", NOT_NEGATIVE)),
  releaseEnergy: v.optional(quantity<Energy>("energy", POSITIVE)),
});

export const flywheelDefinition: Definition<[FlywheelInput], Flywheel> = define(
  "flywheel",
  v.strictTuple([input], "flywheel takes one object"),
  (given) => ({
    ...given,
    kind: "flywheel",
    si: {
      kind: "flywheel",
      inertiaKgM2: read(given.inertia),
      speedRadPerS: read(given.speed),
      dragNm: readOr(given.drag, 0),
      ...present({ releaseEnergyJ: readOr(given.releaseEnergy, undefined) }),
    },
  }),
);

/** An inertia brought to speed. */
export function flywheel(input: FlywheelInput): Flywheel {
  return flywheelDefinition.build(input);
}

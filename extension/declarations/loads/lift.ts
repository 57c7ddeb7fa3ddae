/** `lift(…)`: a mass that a rope, belt or rack raises by a drum; also a slope, a cascade or a tackle. */
import * as v from "valibot";
import type { Curve, Load as LoadNumbers } from "../../model/drive.js";
import { define } from "../define.js";
import type { Definition } from "../definition.js";
import { fields, NOT_NEGATIVE, number, POSITIVE, quantity, together } from "../fields.js";
import type { Angle, Force, Length, Mass, Range } from "../quantities.js";
import { read, readOr } from "../read.js";
import { forceCurve, isCurve, readCurve, SLOPE } from "./curve.js";
import type { ForceCurve } from "./curvePoints.js";

export interface LiftInput {
  readonly mass: Mass | Range<Mass>;
  /** Of the drum or pinion at the rope; or give the diameter. */
  readonly drumRadius?: Length | Range<Length>;
  readonly drumDiameter?: Length | Range<Length>;
  /** Travel of the carriage. */
  readonly travel: Length | Range<Length>;
  /** From horizontal; left out: `"90 deg"`, straight up. */
  readonly slope?: Angle | Range<Angle>;
  /** Carriage travel per rope travel: 1; 2 for a cascade of two, 0.5 for a tackle of two. */
  readonly carriagePerRope?: number | Range<number>;
  /** Force that helps to raise: steady, or over the output shaft's position. */
  readonly counterbalance?: Force | Range<Force> | ForceCurve;
  /** Friction of the guides; opposes motion. */
  readonly frictionForce?: Force | Range<Force>;
}

export interface Lift extends LiftInput {
  readonly kind: "lift";
  readonly si: Extract<LoadNumbers, { kind: "lift" }>;
}

const input: v.GenericSchema<unknown, LiftInput> = together(
  fields({
    mass: quantity<Mass>("mass", POSITIVE),
    drumRadius: v.optional(quantity<Length>("length", POSITIVE)),
    drumDiameter: v.optional(quantity<Length>("length", POSITIVE)),
    travel: quantity<Length>("length", POSITIVE),
    slope: v.optional(quantity<Angle>("angle", SLOPE)),
    carriagePerRope: v.optional(number(POSITIVE)),
    counterbalance: v.optional(v.lazy((given) => (isCurve(given) ? forceCurve : quantity<Force>("force", NOT_NEGATIVE)))),
    frictionForce: v.optional(quantity<Force>("force", NOT_NEGATIVE)),
  }) as v.GenericSchema<unknown, LiftInput>,
  ({ drumRadius, drumDiameter }) => {
    if (drumRadius === undefined && drumDiameter === undefined) {
      return { field: "drumRadius", message: 'lift needs the field "drumRadius" or "drumDiameter"' };
    }
    const both = drumRadius !== undefined && drumDiameter !== undefined;
    return both ? { field: "drumDiameter", message: 'give "drumRadius" or "drumDiameter", not both' } : undefined;
  },
);

export const liftDefinition: Definition<[LiftInput], Lift> = define(
  "lift",
  v.strictTuple([input], "lift takes one object"),
  (given) => ({
    ...given,
    kind: "lift",
    si: {
      kind: "lift",
      massKg: read(given.mass),
      drumRadiusM: given.drumRadius === undefined ? read(given.drumDiameter as Length) / 2 : read(given.drumRadius),
      travelM: read(given.travel),
      slopeRad: readOr(given.slope, Math.PI / 2),
      carriagePerRope: readOr(given.carriagePerRope, 1),
      counterbalanceN: counterbalanceOf(given.counterbalance),
      frictionForceN: readOr(given.frictionForce, 0),
    },
  }),
);

/** A mass raised by a drum. */
export function lift(input: LiftInput): Lift {
  return liftDefinition.build(input);
}

function counterbalanceOf(given: LiftInput["counterbalance"]): number | Curve {
  return isCurve(given) ? readCurve(given) : readOr(given as Force | undefined, 0);
}

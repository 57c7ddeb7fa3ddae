/** `arm(…)`: a mass that turns about a pivot, in a vertical plane or a tilted one. */
import * as v from "valibot";
import type { Load as LoadNumbers } from "../../model/drive.js";
import { define } from "../define.js";
import type { Definition } from "../definition.js";
import { ANY, fields, type Limits, NOT_NEGATIVE, POSITIVE, quantity, together } from "../fields.js";
import type { Angle, Inertia, Length, Mass, Range, Torque } from "../quantities.js";
import { read, readOr } from "../read.js";
import { isCurve, readCurve, SLOPE, torqueCurve } from "./curve.js";
import type { TorqueCurve } from "./curvePoints.js";

export interface ArmInput {
  readonly mass: Mass | Range<Mass>;
  /** Distance of the centre of mass from the pivot. */
  readonly centreOfMass: Length | Range<Length>;
  /** Where the travel starts and ends; angles from horizontal. */
  readonly from: Angle | Range<Angle>;
  readonly to: Angle | Range<Angle>;
  /** Tilt of the plane of motion: `"90 deg"` (left out) is vertical, `"0 deg"` a turntable. */
  readonly slope?: Angle | Range<Angle>;
  /** About the pivot, in all; left out: mass × centreOfMass². */
  readonly inertia?: Inertia | Range<Inertia>;
  /** Torque towards greater angle: steady, or over the joint's angle. */
  readonly counterbalance?: Torque | Range<Torque> | TorqueCurve;
}

export interface Arm extends ArmInput {
  readonly kind: "arm";
  readonly si: Extract<LoadNumbers, { kind: "arm" }>;
}

/** Small robots: a centre of mass farther out is a slip of the unit. */
const REACH: Limits = { min: 0, max: 10, say: 'from 0 to "10 m"' };
const TURN: Limits = { min: -200 * Math.PI, max: 200 * Math.PI, say: "within 100 turns" };

const input: v.GenericSchema<unknown, ArmInput> = together(
  fields({
    mass: quantity<Mass>("mass", POSITIVE),
    centreOfMass: quantity<Length>("length", REACH),
    from: quantity<Angle>("angle", TURN),
    to: quantity<Angle>("angle", TURN),
    slope: v.optional(quantity<Angle>("angle", SLOPE)),
    inertia: v.optional(quantity<Inertia>("inertia", NOT_NEGATIVE)),
    counterbalance: v.optional(v.lazy((given) => (isCurve(given) ? torqueCurve : quantity<Torque>("torque", ANY)))),
  }) as v.GenericSchema<unknown, ArmInput>,
  ({ from, to }) =>
    read(from) === read(to)
      ? { field: "to", message: `the travel from "${String(from)}" to "${String(to)}" is no travel` }
      : undefined,
);

export const armDefinition: Definition<[ArmInput], Arm> = define(
  "arm",
  v.strictTuple([input], "arm takes one object"),
  (given) => {
    const massKg = read(given.mass);
    const centreOfMassM = read(given.centreOfMass);
    return {
      ...given,
      kind: "arm",
      si: {
        kind: "arm",
        massKg,
        centreOfMassM,
        fromRad: read(given.from),
        toRad: read(given.to),
        slopeRad: readOr(given.slope, Math.PI / 2),
        inertiaKgM2: readOr(given.inertia, massKg * centreOfMassM ** 2),
        counterbalanceNm: isCurve(given.counterbalance)
          ? readCurve(given.counterbalance as TorqueCurve)
          : readOr(given.counterbalance as Torque | undefined, 0),
      },
    };
  },
);

/** A mass on an arm about a pivot. */
export function arm(input: ArmInput): Arm {
  return armDefinition.build(input);
}

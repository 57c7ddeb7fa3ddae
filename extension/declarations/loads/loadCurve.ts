/** `loadCurve(…)`: a torque over the output shaft's position: linkages, cams, springs. */
import * as v from "valibot";
import type { Load as LoadNumbers } from "../../model/drive.js";
import { define } from "../define.js";
import type { Definition } from "../definition.js";
import { fields, NOT_NEGATIVE, quantity } from "../fields.js";
import type { Inertia, Range } from "../quantities.js";
import { readOr } from "../read.js";
import { inertiaCurve, isCurve, readCurve, torqueCurve } from "./curve.js";
import type { InertiaCurve, TorqueCurve } from "./curvePoints.js";

export interface LoadCurveInput {
  /** Torque against motion towards greater positions; linear between points, and the travel is from the first to the last. */
  readonly torque: TorqueCurve;
  readonly inertia?: Inertia | Range<Inertia> | InertiaCurve;
}

export interface LoadCurve extends LoadCurveInput {
  readonly kind: "loadCurve";
  readonly si: Extract<LoadNumbers, { kind: "loadCurve" }>;
}

const input = fields({
  torque: torqueCurve,
  inertia: v.optional(v.lazy((given) => (isCurve(given) ? inertiaCurve : quantity<Inertia>("inertia", NOT_NEGATIVE)))),
}) as v.GenericSchema<unknown, LoadCurveInput>;

export const loadCurveDefinition: Definition<[LoadCurveInput], LoadCurve> = define(
  "loadCurve",
  v.strictTuple([input], "loadCurve takes one object"),
  (given) => ({
    ...given,
    kind: "loadCurve",
    si: {
      kind: "loadCurve",
      torqueNm: readCurve(given.torque),
      inertiaKgM2: isCurve(given.inertia)
        ? readCurve(given.inertia as InertiaCurve)
        : readOr(given.inertia as Inertia | undefined, 0),
    },
  }),
);

/** A torque over position. */
export function loadCurve(input: LoadCurveInput): LoadCurve {
  return loadCurveDefinition.build(input);
}

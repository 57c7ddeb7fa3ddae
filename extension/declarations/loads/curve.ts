/** Quantities over the output shaft's position, as lists of `[position, value]`, and bounds that several loads share. */
import * as v from "valibot";
import type { Curve } from "../../model/drive.js";
import type { Dimension } from "../../units/table.js";
import { ANY, type Limits, quantity } from "../fields.js";
import type { Angle, Force, Inertia, Torque } from "../quantities.js";
import { read } from "../read.js";
import type { ForceCurve, InertiaCurve, TorqueCurve } from "./curvePoints.js";

/** From level ground to straight up. */
export const SLOPE: Limits = { min: 0, max: Math.PI / 2, say: "from 0 to 90 deg" };

export const torqueCurve: v.GenericSchema<unknown, TorqueCurve> = curve<Torque>("torque", ANY);
export const forceCurve: v.GenericSchema<unknown, ForceCurve> = curve<Force>("force", ANY);
export const inertiaCurve: v.GenericSchema<unknown, InertiaCurve> = curve<Inertia>("inertia", { min: 0, say: "0 or more" });

/** Tells a curve from a single quantity, which is a string or a range. */
export function isCurve<Item>(given: unknown | readonly Item[]): given is readonly Item[] {
  return Array.isArray(given);
}

/** An accepted curve in SI. */
export function readCurve(points: TorqueCurve | ForceCurve | InertiaCurve): Curve {
  return points.map(([position, value]) => [read(position), read(value)]);
}

function curve<Q extends string>(
  dimension: Dimension,
  limits: Limits,
): v.GenericSchema<unknown, readonly (readonly [Angle, Q])[]> {
  const point = v.strictTuple(
    [quantity<Angle>("angle", ANY), quantity<Q>(dimension, limits)],
    "here goes a pair [position, value]",
  );
  return v.pipe(
    v.array(point, "here goes a list of [position, value]"),
    v.rawCheck(({ dataset, addIssue }) => {
      if (!dataset.typed) return;
      const points = dataset.value;
      if (points.length < 2) addIssue({ message: "a curve needs at least two points" });
      points.forEach((current, key) => {
        const before = points[key - 1];
        if (before === undefined || read(before[0]) < read(current[0])) return;
        const message = `positions must rise: ${JSON.stringify(current[0])} does not lie beyond ${JSON.stringify(before[0])}`;
        addIssue({ message, path: [{ type: "array", origin: "value", input: points, key, value: current }] });
      });
    }),
  ) as v.GenericSchema<unknown, readonly (readonly [Angle, Q])[]>;
}

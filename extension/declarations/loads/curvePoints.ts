/** The written form of a quantity over the output shaft's position. Apart from its schemas, so that public types need only this. */
import type { Angle, Force, Inertia, Torque } from "../quantities.js";

export type TorqueCurve = readonly (readonly [position: Angle, torque: Torque])[];
export type ForceCurve = readonly (readonly [position: Angle, force: Force])[];
export type InertiaCurve = readonly (readonly [position: Angle, inertia: Inertia])[];

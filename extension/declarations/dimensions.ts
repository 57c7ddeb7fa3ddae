/**
 * Which dimension each quantity field has, for tools that complete units.
 *
 * The schemas decide what is accepted; a test asks them about every row here, and about every field that is missing here.
 */
import type { Dimension } from "../units/table.js";

type Fields = { readonly [field: string]: Dimension | Fields };

/** Dimension of the field at `path` (from the argument tuple inwards) of a word; `undefined` where no quantity goes. */
export function dimensionAt(word: string, path: readonly (string | number)[]): Dimension | undefined {
  let here: Dimension | Fields | undefined = Object.hasOwn(FIELDS, word) ? FIELDS[word] : undefined;
  // Which argument it is plays no role: no word has two objects with different fields of one name.
  for (const key of path.slice(1)) {
    if (here === undefined || typeof here === "string") return undefined;
    const field: string | number = typeof key === "number" && !Object.hasOwn(here, key) ? "each" : key;
    here = Object.hasOwn(here, field) ? here[field] : undefined;
  }
  if (typeof here === "object") here = here.alone;
  return typeof here === "string" ? here : undefined;
}

/** A field that takes one value or a list of `[position, value]`. */
function oneOrCurve(dimension: Dimension): Fields {
  return { alone: dimension, each: { 0: "angle", 1: dimension } };
}

const STAGE: Fields = { inertia: "inertia", maxTorque: "torque" };
const PTC: Fields = { holdCurrent: "current", trips: { at: "current", after: "time" } };

/** `each`: any item of a list; `alone`: where a list may stand too. */
const FIELDS: Fields = {
  motor: {
    voltage: "voltage",
    noLoad: { speed: "speed", current: "current" },
    stall: { torque: "torque", current: "current" },
    resistance: "resistance",
    torqueConstant: "torqueConstant",
    noLoadCurrent: "current",
    rotorInertia: "inertia",
    rated: { torque: "torque", current: "current" },
    thermal: {
      windingToHousing: "thermalResistance",
      housingToAmbient: "thermalResistance",
      windingTime: "time",
      housingTime: "time",
      limit: "temperature",
      ambient: "temperature",
    },
  },
  spur: STAGE,
  chain: STAGE,
  belt: STAGE,
  planetary: STAGE,
  reduction: STAGE,
  worm: { ...STAGE, leadAngle: "angle", pressureAngle: "angle" },
  lift: {
    mass: "mass",
    drumRadius: "length",
    drumDiameter: "length",
    travel: "length",
    slope: "angle",
    counterbalance: oneOrCurve("force"),
    frictionForce: "force",
  },
  arm: {
    mass: "mass",
    centreOfMass: "length",
    from: "angle",
    to: "angle",
    slope: "angle",
    inertia: "inertia",
    counterbalance: oneOrCurve("torque"),
  },
  wheels: { mass: "mass", radius: "length", diameter: "length", slope: "angle", distance: "length", inertia: "inertia" },
  flywheel: { inertia: "inertia", speed: "speed", drag: "torque", releaseEnergy: "energy" },
  screw: {
    force: "force",
    lead: "length",
    meanDiameter: "length",
    travel: "length",
    threadAngle: "angle",
    collar: { meanDiameter: "length" },
    mass: "mass",
  },
  roller: { torque: "torque", speed: "speed", inertia: "inertia" },
  loadCurve: { torque: { each: { 0: "angle", 1: "torque" } }, inertia: oneOrCurve("inertia") },
  breaker: { ...PTC, resets: "time" },
  ptc: PTC,
  fuse: { rating: "current" },
  battery: {
    openCircuit: "voltage",
    resistance: "resistance",
    capacity: "charge",
    ratedOver: "time",
    mustStayAbove: { alone: "voltage", voltage: "voltage", for: "time" },
  },
  mechanism: {
    drag: "torque",
    within: "time",
    holdFor: "time",
    every: "time",
    motorCurrentLimit: "current",
    driver: { drop: "voltage", resistance: "resistance" },
    wiring: "resistance",
    ramp: "time",
  },
  robot: { loadCycle: { each: { lasts: "time" } }, ambient: "temperature" },
};

/**
 * Every kind of load as one thing: a torque, an inertia and a travel at the output shaft.
 *
 * Positions here are turns of the output shaft in rad; `ownPerRad` converts to the load's own coordinate (m, or rad for arm and
 * loadCurve). Deliberately not here: stages and motors.
 */
import { curveSlope, curveValue } from "./curve.js";
import type { Curve, Drive, Load } from "./drive.js";
import { screwTorques } from "./screw.js";
import { torqueExtremes } from "./torqueExtremes.js";

/** Standard acceleration of gravity, m/s². Source: CGPM 1901, ISO 80000-3. */
export const STANDARD_GRAVITY = 9.80665;

export interface ShaftLoad {
  readonly kind: Load["kind"];
  /** True where position means nothing: flywheel and roller. */
  readonly endless: boolean;
  /** Shaft positions at start and end of the travel, rad. */
  readonly startRad: number;
  readonly endRad: number;
  /** The load's own coordinate per rad. */
  readonly ownPerRad: number;
  /** Torque towards smaller positions, all friction left out, N·m. */
  readonly restTorque: (position: number) => number;
  /** Torque against motion in a direction, friction and drag included; below 0 the load drives, N·m. */
  readonly opposing: (position: number, direction: Direction) => number;
  /** d(restTorque)/d(position), N·m/rad. */
  readonly slope: (position: number) => number;
  /** At the output shaft, stages and rotors not included, kg·m². */
  readonly inertia: (position: number) => number;
  /** d(inertia)/d(position), kg·m²/rad. */
  readonly inertiaSlope: (position: number) => number;
  /** Positions where torque or inertia has a corner, rad, rising. */
  readonly corners: readonly number[];
  /** Positions among which the greatest torque lies, rad, rising: ends, corners, interior extremes. */
  readonly extremes: () => readonly number[];
  /** True where torque and inertia are the same all along the travel. */
  readonly steady: boolean;
  /** Wheels: what the ground can take. */
  readonly traction?: Traction;
  /** Screw: true where the force does not turn it. */
  readonly selfLocking: boolean;
}

export type Direction = 1 | -1;

export interface Traction {
  /** Greatest torque from wheel to ground, N·m at the output shaft. */
  readonly limitNm: number;
  /** Inertia that the ground moves, kg·m² at the output shaft. */
  readonly groundInertiaKgM2: number;
  /** Part of the opposing torque that never reaches the ground, N·m. */
  readonly besideGroundNm: number;
}

/** The mechanism's load at its output shaft. */
export function shaftLoadOf(drive: Drive): ShaftLoad {
  const { load, dragNm } = drive;
  switch (load.kind) {
    case "lift":
      return liftLoad(load, dragNm);
    case "arm":
      return armLoad(load, dragNm);
    case "wheels":
      return wheelsLoad(load, dragNm);
    case "flywheel":
      return { ...steadyLoad(load.kind, 0, load.dragNm + dragNm, load.inertiaKgM2, 0, 1), endless: true };
    case "roller":
      return { ...steadyLoad(load.kind, load.torqueNm, dragNm, load.inertiaKgM2, 0, 1), endless: true };
    case "screw":
      return screwLoad(load, dragNm);
    case "loadCurve":
      return curveLoad(load, dragNm);
  }
}

/** Direction of the declared travel. */
export function travelDirection(load: ShaftLoad): Direction {
  return load.endRad < load.startRad ? -1 : 1;
}

function steadyLoad(
  kind: Load["kind"],
  torque: number,
  friction: number,
  inertia: number,
  end: number,
  ownPerRad: number,
): ShaftLoad {
  return {
    kind,
    endless: false,
    startRad: 0,
    endRad: end,
    ownPerRad,
    restTorque: () => torque,
    opposing: (_, direction) => direction * torque + friction,
    slope: () => 0,
    inertia: () => inertia,
    inertiaSlope: () => 0,
    corners: [],
    extremes: () => [0],
    steady: true,
    selfLocking: false,
  };
}

function liftLoad(load: Extract<Load, { kind: "lift" }>, dragNm: number): ShaftLoad {
  const lever = load.carriagePerRope * load.drumRadiusM;
  const weight = load.massKg * STANDARD_GRAVITY * Math.sin(load.slopeRad);
  const friction = load.frictionForceN * lever + dragNm;
  const base = steadyLoad("lift", 0, friction, load.massKg * lever * lever, load.travelM / lever, lever);
  return withTorque(base, { amplitude: 0, constant: weight * lever, helper: load.counterbalanceN, helperLever: lever }, friction);
}

function armLoad(load: Extract<Load, { kind: "arm" }>, dragNm: number): ShaftLoad {
  const amplitude = load.massKg * STANDARD_GRAVITY * load.centreOfMassM * Math.sin(load.slopeRad);
  const base = { ...steadyLoad("arm", 0, dragNm, load.inertiaKgM2, load.toRad, 1), startRad: load.fromRad };
  return withTorque(base, { amplitude, constant: 0, helper: load.counterbalanceNm, helperLever: 1 }, dragNm);
}

function wheelsLoad(load: Extract<Load, { kind: "wheels" }>, dragNm: number): ShaftLoad {
  const { massKg, radiusM } = load;
  const weight = massKg * STANDARD_GRAVITY * radiusM;
  const pressed = weight * Math.cos(load.slopeRad);
  const ground = massKg * radiusM * radiusM;
  const friction = pressed * load.rolling + dragNm;
  const inertia = ground + load.inertiaKgM2;
  return {
    ...steadyLoad("wheels", weight * Math.sin(load.slopeRad), friction, inertia, load.distanceM / radiusM, radiusM),
    traction: { limitNm: load.grip * pressed * load.drivenShare, groundInertiaKgM2: ground, besideGroundNm: dragNm },
  };
}

function screwLoad(load: Extract<Load, { kind: "screw" }>, dragNm: number): ShaftLoad {
  const ownPerRad = load.leadM / (2 * Math.PI);
  const torques = screwTorques(load);
  const sign = load.forceN < 0 ? -1 : 1;
  return {
    ...steadyLoad(
      "screw",
      sign * torques.frictionlessNm,
      dragNm,
      load.massKg * ownPerRad * ownPerRad,
      load.travelM / ownPerRad,
      ownPerRad,
    ),
    opposing: (_, direction) => (direction === sign ? torques.raisingNm : torques.loweringNm) + dragNm,
    selfLocking: torques.loweringNm > 0,
  };
}

function curveLoad(load: Extract<Load, { kind: "loadCurve" }>, dragNm: number): ShaftLoad {
  const { torqueNm, inertiaKgM2 } = load;
  const start = torqueNm[0]?.[0] ?? 0;
  const base = { ...steadyLoad("loadCurve", 0, dragNm, 0, torqueNm.at(-1)?.[0] ?? start, 1), startRad: start };
  const torque = withTorque(base, { amplitude: 0, constant: 0, helper: torqueNm, helperLever: -1 }, dragNm);
  if (typeof inertiaKgM2 === "number") return { ...torque, inertia: () => inertiaKgM2 };
  return {
    ...torque,
    inertia: (position) => curveValue(inertiaKgM2, position),
    inertiaSlope: (position) => curveSlope(inertiaKgM2, position),
    corners: inside(torque, [...torque.corners, ...inertiaKgM2.map(([position]) => position)]),
    steady: torque.steady && isFlat(inertiaKgM2),
  };
}

/** amplitude·cos(position) + constant − helperLever·helper(position). */
interface TorqueTerms {
  readonly amplitude: number;
  readonly constant: number;
  readonly helper: number | Curve;
  readonly helperLever: number;
}

function withTorque(base: ShaftLoad, terms: TorqueTerms, friction: number): ShaftLoad {
  const { amplitude, helper, helperLever } = terms;
  const curve = typeof helper === "number" ? undefined : helper;
  const constant = terms.constant - (typeof helper === "number" ? helperLever * helper : 0);
  const restTorque = (position: number): number =>
    (amplitude === 0 ? 0 : amplitude * Math.cos(position)) + constant - (curve ? helperLever * curveValue(curve, position) : 0);
  const corners = inside(base, curve?.map(([position]) => position) ?? []);
  const flat = amplitude === 0 && (!curve || isFlat(curve));
  const slopeOfHelper = (position: number): number => (curve ? helperLever * curveSlope(curve, position) : 0);
  return {
    ...base,
    restTorque,
    opposing: (position, direction) => direction * restTorque(position) + friction,
    slope: (position) => (amplitude === 0 ? 0 : -amplitude * Math.sin(position)) - slopeOfHelper(position),
    corners,
    extremes: () => (flat ? [Math.min(base.startRad, base.endRad)] : torqueExtremes(base, corners, amplitude, slopeOfHelper)),
    steady: flat || base.startRad === base.endRad,
  };
}

function isFlat(curve: Curve): boolean {
  return curve.every(([, value]) => value === curve[0]?.[1]);
}

function inside(load: ShaftLoad, positions: readonly number[]): number[] {
  const low = Math.min(load.startRad, load.endRad);
  const high = Math.max(load.startRad, load.endRad);
  return [...new Set(positions)].filter((position) => position > low && position < high).sort((one, other) => one - other);
}

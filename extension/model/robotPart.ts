/**
 * One mechanism as a part of a robot: its plant on the shared bus, what it is doing, and what it carries from step to step.
 *
 * Deliberately not here: its equations (robotUnit.ts) and when it does something else (robotTurns.ts).
 */
import type { Drive, Supply } from "./drive.js";
import { type HeatNetwork, heatNetworkOf, heatTimeConstants } from "./heat.js";
import { holdPoint } from "./hold.js";
import { type Layout, layoutOf, type Mode } from "./motionLayout.js";
import { isFollowing, type MotionScales, mechanicalTimeConstant, scalesOf } from "./motionScales.js";
import { type CarriedState, coldState } from "./motionState.js";
import { type Bus, type Plant, plantOf, turningInertia } from "./plant.js";
import { thermalReplica } from "./protection.js";
import { throughTrain } from "./stages.js";

/** The shared bus as every plant sees it: the voltage of the moment, stiff. */
export interface MutableBus extends Bus {
  openCircuitV: number;
}

export type Command = "off" | "move" | "hold";

/** `idle`: without current. */
export type PartMode = Mode | { readonly kind: "idle" };

export interface RobotPart {
  readonly index: number;
  readonly plant: Plant;
  readonly layout: Layout;
  readonly network: HeatNetwork | null;
  readonly scales: MotionScales;
  /** How it moves: with inertia or without. */
  readonly moves: "moving" | "following";
  /** Held still at one motor's torque; a flywheel or roller kept at its speed. */
  readonly held: Extract<Mode, { kind: "held" }>;
  /** Output speed at which a flywheel or roller has arrived, rad/s; null for a travel or where none is asked. */
  readonly askedRadPerS: number | null;
  /** Torque of one motor with which its wheels begin to slip, N·m; Infinity for anything else. */
  readonly slipNm: number;
  /** Fastest changes while it moves, and of its heat and protection alone, 1/s. */
  readonly movingRate: number;
  readonly stillRate: number;
  /** Corners of the travel ahead of the start and its end, rad, rising. */
  readonly targets: readonly number[];

  command: Command;
  mode: PartMode;
  /** Step time from which the ramp counts, s. */
  startedAtS: number;
  /** Index in `targets`. */
  next: number;
  arrived: boolean;
  /** On arrival, in the load's own coordinate per second. */
  endSpeed: number;
  /** Protectors that are open above it. */
  openAbove: number;
  /** Past anything that is still a motor. */
  burnt: boolean;
  progressRad: number;
  speedRadPerS: number;
  /** Since it last started, rad/s. */
  highestRadPerS: number;
  carried: CarriedState;
  energyJ: number;
}

export function createPart(drive: Drive, index: number, supply: Supply, ambientC: number, bus: MutableBus): RobotPart {
  const fed = onSupply(drive, supply, ambientC);
  const plant: Plant = { ...plantOf(fed), bus };
  const scales = scalesOf(plant);
  const { load, train } = plant;
  return {
    index,
    plant,
    layout: layoutOf(plant),
    network: heatNetworkOf(plant.motor),
    scales,
    moves: isFollowing(plant, scales) ? "following" : "moving",
    held: heldMode(plant),
    askedRadPerS: "speedRadPerS" in fed.load ? (fed.load.speedRadPerS ?? null) : null,
    slipNm: slipTorque(plant),
    movingRate: mechanicalRate(plant),
    stillRate: slowerRate(plant),
    targets: load.endless
      ? []
      : [...load.corners.map((at) => plant.direction * (at - load.startRad)), plant.spanRad].sort(rising),
    command: "off",
    mode: IDLE,
    startedAtS: 0,
    next: 0,
    arrived: false,
    endSpeed: 0,
    openAbove: 0,
    burnt: false,
    progressRad: 0,
    speedRadPerS: 0,
    highestRadPerS: 0,
    carried: coldState(plant),
    energyJ: 0,
  };

  function heldMode(of: Plant): RobotPart["held"] {
    if (!of.load.endless) {
      return { kind: "held", torqueNm: holdPoint(fed)?.motorTorqueNm ?? 0, motorSpeedRadPerS: 0 };
    }
    const torqueNm = throughTrain(train, load.opposing(0, 1)) / (train.ratio * of.count);
    const asked = "speedRadPerS" in fed.load ? (fed.load.speedRadPerS ?? 0) : 0;
    return { kind: "held", torqueNm, motorSpeedRadPerS: asked * train.ratio };
  }
}

export const IDLE: PartMode = { kind: "idle" };

/** True where it is moving or trying to, a flywheel or roller that is kept turning included. */
export function isInMotion({ mode }: RobotPart): boolean {
  return mode.kind === "held" ? mode.motorSpeedRadPerS > 0 : mode.kind !== "idle";
}

/** Progress (rad) at which the next corner or the end stands; a flywheel's or roller's speed (rad/s). */
export function targetOf(part: RobotPart): number {
  return part.targets[part.next] ?? part.askedRadPerS ?? Number.POSITIVE_INFINITY;
}

function rising(one: number, other: number): number {
  return one - other;
}

function onSupply(drive: Drive, supply: Supply, ambientC: number): Drive {
  const { thermal } = drive.motor;
  const { mustStayAbove: _, ...plain } = supply;
  if (!thermal) return { ...drive, supply: plain };
  return { ...drive, supply: plain, motor: { ...drive.motor, thermal: { ...thermal, ambientC: thermal.ambientC ?? ambientC } } };
}

function mechanicalRate(plant: Plant): number {
  const timeS = mechanicalTimeConstant(plant, turningInertia(plant, plant.load.startRad));
  return timeS > 0 ? 1 / timeS : 0;
}

function slowerRate(plant: Plant): number {
  const network = heatNetworkOf(plant.motor);
  const { protection } = plant.drive;
  const heats = network ? 1 / heatTimeConstants(network)[0] : 0;
  const protects = protection && protection.kind !== "fuse" ? 1 / thermalReplica(protection).timeConstantS : 0;
  return Math.max(heats, protects);
}

/** From n·N·T = J_rotors·α + Φ(T_load + J·α) at the α that the ground's grip allows. */
function slipTorque(plant: Plant): number {
  const { load, train } = plant;
  if (!load.traction) return Number.POSITIVE_INFINITY;
  const opposing = load.opposing(0, 1);
  const most = (load.traction.limitNm - (opposing - load.traction.besideGroundNm)) / load.traction.groundInertiaKgM2;
  const asked = opposing + (load.inertia(0) + train.inertiaKgM2) * most;
  return (plant.rotorKgM2 * most + throughTrain(train, asked)) / (plant.count * train.ratio);
}

/**
 * A change of a robot's load cycle, or of one mechanism's current, that might clear a finding about the whole robot.
 *
 * Works on what the model is told, so that a candidate costs no parsing. Where it is written is found elsewhere.
 */
import type { Drive } from "../model/drive.js";
import { holdPoint } from "../model/hold.js";
import type { RobotDrive, RobotStep } from "../model/robotDrive.js";

/** Mechanisms and steps by their index, as in the robot's drive before any change. */
export type RobotSetting =
  /** Takes a mechanism out of a step that moves it, into a step of its own right behind. */
  | { readonly kind: "stagger"; readonly step: number; readonly mechanism: number; readonly lastsS: number }
  /** Moves a mechanism in another step instead. */
  | { readonly kind: "shift"; readonly step: number; readonly mechanism: number; readonly to: number }
  | { readonly kind: "limit"; readonly mechanism: number; readonly currentA: number }
  /** A step without motion at the end of the cycle. */
  | { readonly kind: "rest"; readonly lastsS: number }
  | { readonly kind: "cycles"; readonly cycles: number };

/** A step of the changed cycle, with the step that it comes from; null for a rest. */
export interface PlannedStep extends RobotStep {
  readonly from: number | null;
}

/** What held its load, or turned on into the next step, goes on doing so in the steps that are put in. */
export function planSteps(drive: RobotDrive, sets: readonly RobotSetting[]): PlannedStep[] {
  const planned = drive.steps.flatMap((step, from): PlannedStep[] => {
    const taken = sets.flatMap((one) => (one.kind === "stagger" && one.step === from ? [one] : []));
    const leaving = sets.flatMap((one) => (one.kind === "shift" && one.step === from ? [one.mechanism] : []));
    const coming = sets.flatMap((one) => (one.kind === "shift" && one.to === from ? [one.mechanism] : []));
    const gone = [...leaving, ...taken.map(({ mechanism }) => mechanism)];
    const moving = [...step.moving.filter((one) => !gone.includes(one)), ...coming];
    const waiting = (after: number): number[] =>
      taken.slice(after).flatMap(({ mechanism }) => (wasHeld(drive, from, mechanism) ? [mechanism] : []));
    const own = taken.map(({ lastsS, mechanism }, index): PlannedStep => {
      const before = [...moving, ...step.holding, ...taken.slice(0, index).map((one) => one.mechanism)];
      const holding = before.filter((one) => goesOn(drive, from, one));
      return { lastsS, moving: [mechanism], holding: unique([...holding, ...waiting(index + 1)], [mechanism]), from };
    });
    return [{ lastsS: step.lastsS, moving, holding: unique([...step.holding, ...waiting(0)], moving), from }, ...own];
  });
  const rests = sets.flatMap((one) => (one.kind === "rest" ? [{ lastsS: one.lastsS, moving: [], holding: [], from: null }] : []));
  return [...planned, ...rests];
}

export function applyTo(drive: RobotDrive, sets: readonly RobotSetting[]): RobotDrive {
  const limits = new Map(sets.flatMap((one) => (one.kind === "limit" ? [[one.mechanism, one.currentA] as const] : [])));
  const mechanisms = drive.mechanisms.map((one, index) => {
    const motorCurrentLimitA = limits.get(index);
    return motorCurrentLimitA === undefined ? one : { ...one, motorCurrentLimitA };
  });
  const steps = planSteps(drive, sets).map(({ lastsS, moving, holding }) => ({ lastsS, moving, holding }));
  const cycles = sets.find((one) => one.kind === "cycles")?.cycles ?? drive.cycles;
  return { ...drive, mechanisms, steps, cycles };
}

/** Length of one cycle, s. */
export function cycleTimeOf({ steps }: Pick<RobotDrive, "steps">): number {
  return steps.reduce((sum, { lastsS }) => sum + lastsS, 0);
}

export function isUsed({ steps }: RobotDrive, step: number, mechanism: number): boolean {
  const one = steps[step];
  return one !== undefined && (one.moving.includes(mechanism) || one.holding.includes(mechanism));
}

/** Held or moved in the step before, with a load that would sink. */
function wasHeld(drive: RobotDrive, step: number, mechanism: number): boolean {
  return step > 0 && isUsed(drive, step - 1, mechanism) && holdsLoad(drive.mechanisms[mechanism]);
}

/** A load that would sink without current, or what the next step names again. */
function goesOn(drive: RobotDrive, step: number, mechanism: number): boolean {
  const one = drive.mechanisms[mechanism];
  return isEndless(one) ? isUsed(drive, step + 1, mechanism) : holdsLoad(one);
}

function isEndless(drive: Drive | undefined): boolean {
  return drive?.load.kind === "roller" || drive?.load.kind === "flywheel";
}

function holdsLoad(drive: Drive | undefined): boolean {
  return drive !== undefined && !isEndless(drive) && (holdPoint(drive)?.motorTorqueNm ?? 0) !== 0;
}

function unique(some: readonly number[], without: readonly number[]): number[] {
  return [...new Set(some)].filter((one) => !without.includes(one));
}

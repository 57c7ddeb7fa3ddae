/**
 * When a mechanism of a robot does something else: starts, arrives and holds, stands still, trips, goes on.
 *
 * A mechanism that loses its current stops and stays where it is. Deliberately not here: finding the moment (robotRun.ts).
 */
import type { Instant } from "./instant.js";
import { type Command, IDLE, type RobotPart, targetOf } from "./robotPart.js";
import { close, type Moment, open, type RobotProtector } from "./robotProtector.js";
import { type RobotUnit, spareToHold, stillBelow, type UnitEvent } from "./robotUnit.js";

/** Shares of a travel, a speed or a protector's state that count as having got there. */
const THERE = 1e-10;

/** At the start of a step, `lastedS` after that of the one before; a flywheel or roller that goes on being driven keeps its speed. */
export function beginStep(part: RobotPart, command: Command, lastedS: number): void {
  const goesOn = part.plant.load.endless && part.command !== "off" && command !== "off";
  part.command = command;
  part.progressRad = 0;
  part.next = 0;
  part.arrived = false;
  if (goesOn && part.mode.kind !== "idle") {
    part.startedAtS -= lastedS;
    part.arrived = part.mode.kind === "held";
  } else restart(part, 0);
}

/** From rest where it is, as its command says. */
export function restart(part: RobotPart, stepS: number): void {
  part.startedAtS = stepS;
  part.speedRadPerS = 0;
  if (part.command === "off" || part.openAbove > 0 || part.burnt) part.mode = IDLE;
  else if (part.plant.load.endless || (part.command === "move" && !part.arrived)) block(part);
  else part.mode = part.held;
}

/** Looks whether a mechanism that has just been looked at is in the mode that it should be in; true where it was not. */
export function reconsider(part: RobotPart, unit: RobotUnit, stepS: number): boolean {
  const now = unit.front;
  const { mode, askedRadPerS } = part;
  switch (mode.kind) {
    case "blocked":
      if (!(now.startGap > 0)) return false;
      part.mode = { kind: part.moves };
      return true;
    case "moving":
    case "following": {
      if (!part.plant.load.endless && part.progressRad >= targetOf(part) - THERE * part.plant.spanRad)
        return passTarget(part, now);
      const speed = now.motorSpeed / part.plant.train.ratio;
      if (askedRadPerS !== null && speed >= askedRadPerS * (1 - THERE) && spareToHold(part, now) > 0) return keepSpeed(part);
      const stands =
        mode.kind === "following" ? now.startGap < -slack(part) : speed <= stillBelow(part) && now.speedRate < -slack(part);
      if (stands) block(part);
      return stands;
    }
    case "held":
      if (!(mode.motorSpeedRadPerS > 0) || now.limitGap >= 0) return false;
      loseSpeed(part, stepS);
      return true;
    default:
      return false;
  }
}

/** Speed (rad/s of the motor) or acceleration (rad/s²) below 0 that may be rounding of what has just started. */
function slack({ moves, plant, scales }: RobotPart): number {
  return THERE * (moves === "following" ? plant.train.ratio * scales.speedRadPerS : scales.speedRadPerS / scales.timeS);
}

/** What a crossing of one mechanism's own makes of it. */
export function turn({ part, front }: RobotUnit, event: UnitEvent, stepS: number): void {
  switch (event) {
    case "arrives":
      passTarget(part, front);
      break;
    case "stands-still":
      block(part);
      break;
    case "starts":
      part.mode = { kind: part.moves };
      break;
    case "reaches-speed":
      keepSpeed(part);
      break;
    case "loses-speed":
      loseSpeed(part, stepS);
      break;
    case "burns":
      part.burnt = true;
      restart(part, stepS);
  }
}

/** Opens and stops what it feeds. */
export function trip(protector: RobotProtector, moment: Moment, currentA: number): void {
  open(protector, moment, currentA);
  for (const part of protector.feeds) restart(part, moment.stepS);
}

/** Closes; what it feeds goes on unless something else is open. */
export function reset(protector: RobotProtector, runS: number, stepS: number): void {
  close(protector, runS);
  for (const part of protector.feeds) if (part.openAbove === 0) restart(part, stepS);
}

/** Beyond a corner, or arrived; always true. */
function passTarget(part: RobotPart, now: Instant): boolean {
  const target = targetOf(part);
  const { spanRad, train, load } = part.plant;
  part.next++;
  // A hair beyond a corner, so that slopes are those of the piece ahead.
  part.progressRad = part.next < part.targets.length ? target + 1e-13 * spanRad : target;
  if (part.next < part.targets.length) return true;
  part.arrived = true;
  part.endSpeed = (now.motorSpeed / train.ratio) * load.ownPerRad;
  part.speedRadPerS = 0;
  part.mode = part.held;
  return true;
}

function keepSpeed(part: RobotPart): boolean {
  part.arrived = true;
  part.speedRadPerS = part.askedRadPerS ?? part.speedRadPerS;
  part.endSpeed = part.speedRadPerS;
  part.mode = part.held;
  return true;
}

/** At full command from the speed that it had; its ramp lies behind it. */
function loseSpeed(part: RobotPart, stepS: number): void {
  part.startedAtS = stepS - part.plant.rampS;
  part.mode = { kind: part.moves };
}

function block(part: RobotPart): void {
  part.speedRadPerS = 0;
  part.highestRadPerS = 0;
  part.mode = { kind: "blocked", startsAs: part.moves };
}

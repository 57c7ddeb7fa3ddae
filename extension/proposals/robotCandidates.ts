/**
 * What is worth trying for a finding about a whole robot, in the order in which it is offered. Never a bigger fuse or breaker.
 *
 * A ladder holds ever greater changes of one number: the smallest that helps is found by halving.
 */
import type { RobotDrive } from "../model/robotDrive.js";
import type { RobotSetting } from "./robotChange.js";
import { roundDown } from "./roundTo.js";

export type Way = "stagger" | "shift" | "limit" | "rest" | "cycles";

/** `shared`: the finding is about what several mechanisms draw together, not about one of them. */
export function waysFor(rule: string, subject: string, shared: boolean): readonly Way[] {
  if (subject === "charge") return ["cycles"];
  switch (rule) {
    case "sags":
      return ["stagger", "shift", "limit"];
    case "trips":
      return shared ? ["stagger", "shift", "limit", "rest"] : ["limit", "rest"];
    case "overheats":
      return ["limit", "rest"];
    default:
      return [];
  }
}

/** From just below what the motor draws at stall down to a twentieth of it, A. */
export function limitLadder(mechanism: number, stallCurrentA: number): RobotSetting[] {
  const shares = Array.from({ length: 19 }, (_, step) => 0.95 - step * 0.05);
  const currents = [...new Set(shares.map((share) => roundDown(stallCurrentA * share)))].filter((currentA) => currentA > 0);
  return currents.map((currentA) => ({ kind: "limit", mechanism, currentA }));
}

/** From a second to five minutes. */
export function restLadder({ cycles }: RobotDrive): RobotSetting[] {
  if (cycles < 2) return [];
  return [1, 2, 5, 10, 15, 20, 30, 45, 60, 90, 120, 180, 300].map((lastsS) => ({ kind: "rest", lastsS }));
}

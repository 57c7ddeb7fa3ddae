/** The drive that a mechanism's numbers were computed from: its declaration, with the robot's supply where it names none itself. */
import type { AnalysedMechanism, AnalysedRobot, Analysis } from "../analysis/analysis.js";
import type { Drive } from "../model/drive.js";

/** `undefined` where the mechanism has no numbers. */
export function driveOf(analysis: Analysis, { declared, numbers }: AnalysedMechanism): Drive | undefined {
  if (declared === undefined || numbers === undefined) return undefined;
  const supply = declared.si.supply ?? robotOf(analysis, declared)?.declared.supply.si;
  return supply === undefined ? declared.si : { ...declared.si, supply };
}

/** The one robot that lists the mechanism. */
export function robotOf(analysis: Analysis, declared: AnalysedMechanism["declared"]): AnalysedRobot | undefined {
  const listing = analysis.robots.filter((robot) => declared !== undefined && robot.declared.mechanisms.includes(declared));
  return listing.length === 1 ? listing[0] : undefined;
}

/** Every rule that has a file of its own, in the order in which they are judged: a rule may silence later ones. */
import { backdrives } from "./backdrives.js";
import { badDeclaration } from "./badDeclaration.js";
import { beyondSpeed } from "./beyondSpeed.js";
import { cannotHold } from "./cannotHold.js";
import { late } from "./late.js";
import { noHeadroom } from "./noHeadroom.js";
import { notConstant } from "./notConstant.js";
import { overheats } from "./overheats.js";
import { overloads } from "./overloads.js";
import { pastPeak } from "./pastPeak.js";
import { robotEmpties } from "./robotEmpties.js";
import { robotOverheats } from "./robotOverheats.js";
import type { RobotRule } from "./robotRule.js";
import { robotSags } from "./robotSags.js";
import { robotTrips } from "./robotTrips.js";
import type { Level, MechanismRule, MotorRule, RuleId } from "./rule.js";
import { sags } from "./sags.js";
import { sheetContradicts } from "./sheetContradicts.js";
import { slips } from "./slips.js";
import { stalls } from "./stalls.js";
import { trips } from "./trips.js";
import { unprotected } from "./unprotected.js";

export const MECHANISM_RULES: readonly MechanismRule[] = [
  stalls,
  cannotHold,
  beyondSpeed,
  trips,
  pastPeak,
  late,
  overheats,
  unprotected,
  overloads,
  sags,
  slips,
  backdrives,
  noHeadroom,
];
export const MOTOR_RULES: readonly MotorRule[] = [sheetContradicts];

/** Over a robot's load cycle; they share their names and settings with the rules above. */
export const ROBOT_RULES: readonly RobotRule[] = [robotTrips, robotOverheats, robotSags, robotEmpties];

/** Rules and their levels, for settings and documentation. */
export const RULES: readonly { readonly id: RuleId; readonly level: Level }[] = [
  ...MECHANISM_RULES,
  ...MOTOR_RULES,
  notConstant,
  badDeclaration,
];

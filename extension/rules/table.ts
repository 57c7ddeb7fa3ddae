/** Every rule that has a file of its own, in the order in which they are judged: a rule may silence later ones. */
import { badDeclaration } from "./badDeclaration.js";
import { beyondSpeed } from "./beyondSpeed.js";
import { noHeadroom } from "./noHeadroom.js";
import { notConstant } from "./notConstant.js";
import { overloads } from "./overloads.js";
import { pastPeak } from "./pastPeak.js";
import type { Level, MechanismRule, MotorRule, RuleId } from "./rule.js";
import { sheetContradicts } from "./sheetContradicts.js";
import { slips } from "./slips.js";
import { stalls } from "./stalls.js";

export const MECHANISM_RULES: readonly MechanismRule[] = [stalls, beyondSpeed, pastPeak, overloads, slips, noHeadroom];
export const MOTOR_RULES: readonly MotorRule[] = [sheetContradicts];

/** Rules and their levels, for settings and documentation. */
export const RULES: readonly { readonly id: RuleId; readonly level: Level }[] = [
  ...MECHANISM_RULES,
  ...MOTOR_RULES,
  notConstant,
  badDeclaration,
];

/** Every rule that has a file of its own, in the order of the documentation. */
import { badDeclaration } from "./badDeclaration.js";
import { notConstant } from "./notConstant.js";
import { pastPeak } from "./pastPeak.js";
import type { Level, MechanismRule, MotorRule, RuleId } from "./rule.js";
import { sheetContradicts } from "./sheetContradicts.js";
import { stalls } from "./stalls.js";

export const MECHANISM_RULES: readonly MechanismRule[] = [stalls, pastPeak];
export const MOTOR_RULES: readonly MotorRule[] = [sheetContradicts];

/** Rules and their levels, for settings and documentation. */
export const RULES: readonly { readonly id: RuleId; readonly level: Level }[] = [
  ...MECHANISM_RULES,
  ...MOTOR_RULES,
  notConstant,
  badDeclaration,
];

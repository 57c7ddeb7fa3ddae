/** Levels in their order: the greater, the worse. */
import type { Level } from "../rules/rule.js";

export function rankOf(level: Level): number {
  return ["information", "warning", "error"].indexOf(level);
}

/** `not-constant`: a value that cannot be known without running the code. */
import type { Unknown } from "../evaluator/value.js";
import type { Level, RuleId } from "./rule.js";

export const notConstant: { readonly id: RuleId; readonly level: Level } = { id: "not-constant", level: "warning" };

/** The message at the use, and the chain that led there, nearest first. */
export function tellUnknown(unknown: Unknown): { readonly message: string; readonly chain: readonly Unknown[] } {
  const chain: Unknown[] = [];
  for (let link = unknown.cause; link !== undefined; link = link.cause) chain.push(link);
  const root = chain.at(-1) ?? unknown;
  const { message, advice } = root.reason;
  return { message: `Not known without running the code: ${message}${advice === "" ? "" : ` Way out: ${advice}.`}`, chain };
}

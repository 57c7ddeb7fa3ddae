/** A mechanism that names no supply runs on that of the one robot that lists it. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Robot } from "../declarations/robot.js";
import type { DefinitionCall } from "../evaluator/value.js";
import type { RobotCall } from "./declared.js";
import { valueAt } from "./places.js";

/** The one robot that lists the mechanism; with several, none of them is assumed. */
export function robotOf<Listing extends { readonly declared?: Robot }>(
  mechanism: Mechanism,
  robots: readonly Listing[],
): Listing | undefined {
  const listing = robots.filter(({ declared }) => declared?.mechanisms.includes(mechanism));
  return listing.length === 1 ? listing[0] : undefined;
}

/** The call that declares the robot's supply. */
export function supplyCallOf({ call }: RobotCall): DefinitionCall | undefined {
  const argument = call.args[1];
  const value = argument === undefined ? undefined : valueAt(argument, ["supply"]);
  return value?.known && value.data.kind === "built" ? value.data.call : undefined;
}

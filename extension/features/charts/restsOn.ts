/** Everything that a mechanism's results rest on, as a key: the same again after an edit elsewhere. */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { robotOf } from "../../analysis/lentSupply.js";

/** Its declaration with all ranges, and the supply of its robot, where it has none of its own. */
export function restsOn({ robots }: Analysis, { name, declared }: AnalysedMechanism): unknown {
  const lent = declared !== undefined && declared.supply === undefined ? robotOf(declared, robots)?.declared?.supply : undefined;
  return [name, declared, lent];
}

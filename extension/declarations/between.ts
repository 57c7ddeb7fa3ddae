/** `between(low, high)`: a value known only as a range. Says nothing of which end is worse; the analysis finds that. */
import * as v from "valibot";
import { parseAnyQuantity } from "../units/parse.js";
import { define } from "./define.js";
import type { Definition } from "./definition.js";
import { tell } from "./fields.js";
import type { Range } from "./quantities.js";

export const betweenDefinition: Definition<[string | number, string | number], Range<string | number>> = define(
  "between",
  v.pipe(
    v.strictTuple([end(), end()], "between takes a low and a high end"),
    v.rawCheck(({ dataset, addIssue }) => {
      if (!dataset.typed) return;
      const [low, high] = dataset.value;
      const message = refusePair(low, high);
      if (message !== undefined)
        addIssue({ message, path: [{ type: "array", origin: "value", input: [low, high], key: 1, value: high }] });
    }),
  ),
  (low, high) => ({ kind: "between", low, high }),
);

/** A quantity or plain number that lies somewhere from `low` to `high`. */
export function between<const Q extends string | number>(low: Q, high: Q): Range<Q> {
  return betweenDefinition.build(low, high) as Range<Q>;
}

function end(): v.GenericSchema<unknown, string | number> {
  return v.custom<string | number>(
    (input) =>
      typeof input === "number" ? Number.isFinite(input) : typeof input === "string" && parseAnyQuantity(input) !== undefined,
    (issue) => `here goes a number or a quantity such as "4 kg", not ${tell(issue.input)}`,
  );
}

function refusePair(low: string | number, high: string | number): string | undefined {
  if (typeof low === "number" && typeof high === "number") {
    return low <= high ? undefined : `the high end ${high} lies below the low end ${low}`;
  }
  const from = typeof low === "string" ? parseAnyQuantity(low) : undefined;
  const to = typeof high === "string" ? parseAnyQuantity(high) : undefined;
  if (from === undefined || to === undefined || from.unit.dimension !== to.unit.dimension) {
    return `both ends must be of one kind, not ${tell(low)} and ${tell(high)}`;
  }
  return from.si <= to.si ? undefined : `the high end ${tell(high)} lies below the low end ${tell(low)}`;
}

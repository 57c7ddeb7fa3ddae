/** How protection and windings stand, in words, with the spans of time in which something is the matter. */
import type { PowerChart } from "../../../extension/protocol/charts/power.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeQuantity } from "../../../extension/units/write.js";
import type { StateRow } from "../../plots/series/drawing.js";
import { listed, writeTemperature } from "../../quantity.js";

const NOUNS = { breaker: "breaker", ptc: "PTC", fuse: "fuse" } as const;

export function rowsOf(chart: PowerChart, system: UnitSystem): readonly StateRow[] {
  return [...protectorRows(chart), ...windingRows(chart, system)];
}

function protectorRows({ protectors, cycleS }: PowerChart): StateRow[] {
  return protectors.map(({ kind, feeds, shared, holdsA, open, mayOpenAtS }) => {
    const holds = `${kind === "fuse" ? "rated" : "holds"} ${writeQuantity(holdsA, "current")}`;
    const name = `${shared ? "shared " : ""}${NOUNS[kind]} of ${listed(feeds)} (${holds})`;
    const times = open.map(({ fromS, toS }) =>
      toS >= cycleS
        ? `opens at ${writeQuantity(fromS, "time")}`
        : `open ${writeQuantity(fromS, "time")} to ${writeQuantity(toS, "time")}`,
    );
    const may = mayOpenAtS === null ? [] : [`may open from ${writeQuantity(mayOpenAtS, "time")} on`];
    const says = [...(times.length > 3 ? [...times.slice(0, 3), `${times.length} times in all`] : times), ...may];
    return {
      words: `${name}: ${says.length > 0 ? says.join(", ") : "stays closed"}`,
      spans: [
        ...open.map(({ fromS, toS }) => ({ from: fromS, to: toS })),
        ...(mayOpenAtS === null || open.length > 0 ? [] : [{ from: mayOpenAtS, to: cycleS }]),
      ],
    };
  });
}

function windingRows({ windings, cycles }: PowerChart, system: UnitSystem): StateRow[] {
  return windings.map(({ mechanism, limitC, peakC, peakAtS, above, peakOfAllC }) => {
    const [first] = above;
    const most = `${writeTemperature(peakC, system)} at ${writeQuantity(peakAtS, "time")}`;
    const limit = `limit ${writeTemperature(limitC, system)}`;
    const here =
      first === undefined ? `at most ${most}` : `above its limit from ${writeQuantity(first.fromS, "time")} on, ${most}`;
    const all = cycles > 1 ? `, ${writeTemperature(peakOfAllC, system)} in all cycles` : "";
    return {
      words: `winding of ${mechanism} (${limit}): ${here}${all}`,
      spans: above.map(({ fromS, toS }) => ({ from: fromS, to: toS })),
    };
  });
}

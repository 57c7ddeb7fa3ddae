/** What happens on the way, in a few words. */
import type { TravelChart } from "../../../extension/protocol/charts/travel.js";
import type { Write } from "../../quantity.js";

const NOUNS = { breaker: "breaker", ptc: "PTC", fuse: "fuse" } as const;

export function eventWords({ kind, timeS }: TravelChart["events"][number], chart: TravelChart, write: Write): string {
  const protector = chart.protection === null ? "protection" : NOUNS[chart.protection.kind];
  switch (kind) {
    case "ramp-ends":
      return "ramp ends";
    case "limit-begins":
      return "comes to the current limit";
    case "limit-ends":
      return "leaves the current limit";
    case "trips":
      return `${protector} opens, ${write(timeS, "time")}`;
    case "may-trip":
      return `${protector} may open from ${write(timeS, "time")} on`;
    case "winding-limit":
      return `winding at its limit, ${write(timeS, "time")}`;
    case "arrives":
      return `${chart.coordinate === null ? "at its speed" : "arrives"}, ${write(timeS, "time")}`;
    case "stands-still":
      return `stands still, ${write(timeS, "time")}`;
  }
}

export function outcomeWords({ outcome, numbers, coordinate }: TravelChart, write: Write): string {
  switch (outcome) {
    case "arrives":
      return write(numbers.timeS, "time");
    case "never-starts":
      return "never starts";
    case "stands-still":
      return "stands still on the way";
    case "never-reaches-speed":
      return "never reaches its speed";
    case "unresolved":
      return coordinate === null ? "not followed to its speed" : "not followed to its end";
  }
}

/** The hold in a line: "1.62 A for 30 s, breaker opens after 12 s". */
export function holdWords(
  { hold, protection }: TravelChart,
  write: Write,
  temperature: (celsius: number) => string,
): string | null {
  if (hold === null) return null;
  const { forS, currentA, tripsAfterS, windingFinalC, limitAfterS } = hold;
  const protector = protection === null ? "protection" : NOUNS[protection.kind];
  return [
    `${write(currentA, "current")} for ${write(forS, "time")}`,
    ...(tripsAfterS !== null && tripsAfterS < forS ? [`${protector} opens after ${write(tripsAfterS, "time")}`] : []),
    ...(limitAfterS !== null && limitAfterS < forS
      ? [`winding at its limit after ${write(limitAfterS, "time")}`]
      : windingFinalC !== null
        ? [`winding at ${temperature(windingFinalC)}`]
        : []),
  ].join(", ");
}

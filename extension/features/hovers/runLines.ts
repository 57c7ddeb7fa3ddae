/** What happens over time, a line each: the travel, the hold, a stall. Only what was computed is told. */
import type { Drive } from "../../model/drive.js";
import { writeIn, writeQuantity } from "../../units/write.js";

type Maybe = number | null | undefined;

/** The groups of a mechanism's numbers that are about time; s, A, °C. */
export interface RunNumbers {
  readonly travel?: { readonly timeS: number | null; readonly tripsAfterS?: Maybe; readonly windingPeakC?: Maybe } | null;
  readonly hold?: {
    readonly motorCurrentA: number;
    readonly tripsAfterS?: Maybe;
    readonly windingFinalC?: Maybe;
    readonly limitAfterS?: Maybe;
  } | null;
  readonly stall?: { readonly motorCurrentA: number; readonly tripsAfterS?: Maybe; readonly windingLimitAfterS?: Maybe } | null;
}

export function runLines(drive: Drive, { travel, hold, stall }: RunNumbers): string[] {
  const { withinS, holdForS, protection, motor } = drive;
  const lines: string[][] = [];
  if (travel) {
    lines.push([travelled(travel.timeS, withinS), opens(travel.tripsAfterS), peak(travel.windingPeakC, motor.thermal?.limitC)]);
  }
  if (hold && holdForS !== undefined) {
    const held = `Hold for ${time(holdForS)}: ${writeQuantity(hold.motorCurrentA, "current")}`;
    lines.push([held, opens(hold.tripsAfterS), reaches(hold.limitAfterS) || ends(hold.windingFinalC, motor.thermal?.limitC)]);
  }
  if (stall && (protection !== undefined || motor.thermal !== undefined)) {
    const stalled = `Stalled: ${writeQuantity(stall.motorCurrentA, "current")}`;
    const never = protection !== undefined && stall.tripsAfterS === null ? "protection never opens" : "";
    lines.push([stalled, opens(stall.tripsAfterS) || never, reaches(stall.windingLimitAfterS)]);
  }
  return lines.map((parts) => parts.filter((part) => part !== "").join(", "));
}

function travelled(timeS: number | null, withinS: number | undefined): string {
  const allowed = withinS === undefined ? "" : ` of the ${time(withinS)} allowed`;
  return timeS === null ? "Travel: never arrives" : `Travel: ${time(timeS)}${allowed}`;
}

function opens(afterS: Maybe): string {
  return typeof afterS === "number" ? `protection opens after ${time(afterS)}` : "";
}

function reaches(afterS: Maybe): string {
  return typeof afterS === "number" ? `winding at its limit after ${time(afterS)}` : "";
}

function peak(windingC: Maybe, limitC: number | undefined): string {
  return typeof windingC === "number" ? `winding up to ${temperature(windingC)}${ofLimit(limitC)}` : "";
}

function ends(windingC: Maybe, limitC: number | undefined): string {
  return typeof windingC === "number" ? `winding at ${temperature(windingC)}${ofLimit(limitC)}` : "";
}

function ofLimit(limitC: number | undefined): string {
  return limitC === undefined ? "" : ` of ${temperature(limitC)}`;
}

function time(seconds: number): string {
  return writeQuantity(seconds, "time");
}

function temperature(celsius: number): string {
  return writeIn(celsius + 273.15, "degC");
}

/** What happens over time, a line each: the travel, the hold, a stall. Only what was declared or computed is told. */
import type { Drive } from "../../model/drive.js";
import type { MechanismNumbers } from "../../model/numbers.js";
import { isBorderline } from "../../model/protection.js";
import { writeIn, writeQuantity } from "../../units/write.js";

export type RunNumbers = Pick<MechanismNumbers, "travel" | "hold" | "stall">;

export function runLines(drive: Drive, { travel, hold, stall }: RunNumbers): string[] {
  const { holdForS, protection, motor } = drive;
  const limitC = motor.thermal?.limitC;
  const lines: string[][] = [];
  if (travel) {
    lines.push([travelled(drive, travel.timeS), opens(travel.tripsAfterS), winding("up to", travel.windingPeakC, limitC)]);
  }
  if (hold && holdForS !== undefined) {
    const held = `Hold for ${time(holdForS)}: ${writeQuantity(hold.motorCurrentA, "current")}`;
    const heat = hold.limitAfterS === null ? winding("at", hold.windingFinalC, limitC) : limitReached(hold.limitAfterS);
    lines.push([held, opens(hold.tripsAfterS), heat]);
  }
  if (protection !== undefined || motor.thermal !== undefined) {
    const stalled = `Stalled: ${writeQuantity(stall.motorCurrentA, "current")}`;
    lines.push([stalled, opens(stall.tripsAfterS) || staysClosed(drive, stall), limitReached(stall.windingLimitAfterS)]);
  }
  return lines.map((parts) => parts.filter((part) => part !== "").join(", "));
}

function travelled({ load, withinS }: Drive, timeS: number | null): string {
  const spinsUp = load.kind === "flywheel";
  if (timeS === null) return spinsUp ? "Spin-up: never reaches its speed" : "Travel: never arrives";
  return `${spinsUp ? "Spin-up" : "Travel"}: ${time(timeS)}${withinS === undefined ? "" : ` of the ${time(withinS)} allowed`}`;
}

function opens(afterS: number | null): string {
  return afterS === null ? "" : `protection opens after ${time(afterS)}`;
}

/** So near to what is held for ever that no time means anything, or truly closed. */
function staysClosed({ protection }: Drive, { motorCurrentA, sourceCurrentA }: MechanismNumbers["stall"]): string {
  if (protection === undefined) return "";
  const carried = protection.carries === "motor" ? motorCurrentA : sourceCurrentA;
  return isBorderline(protection, carried) ? "protection may or may not open" : "protection never opens";
}

function limitReached(afterS: number | null): string {
  return afterS === null ? "" : `winding at its limit after ${time(afterS)}`;
}

function winding(where: "at" | "up to", windingC: number | null, limitC: number | undefined): string {
  if (windingC === null || limitC === undefined) return "";
  return `winding ${where} ${temperature(windingC)} of ${temperature(limitC)}`;
}

function time(seconds: number): string {
  return writeQuantity(seconds, "time");
}

function temperature(celsius: number): string {
  return writeIn(celsius + 273.15, "degC");
}

/**
 * A protector in a robot's run: a mechanism's own or a shared one, open or closed, with its history.
 *
 * Deliberately not here: how it warms up (motionRates.ts, robotSystem.ts) and what an opening stops (robotTurns.ts).
 */
import type { Protection } from "./drive.js";
import { isBorderline, LEAST_OPEN_S, type ThermalReplica, thermalReplica } from "./protection.js";
import type { RobotPart } from "./robotPart.js";
import type { Opening, ProtectorHistory } from "./robotSolution.js";

export interface RobotProtector {
  readonly protection: Protection;
  /** null for a fuse. */
  readonly replica: ThermalReplica | null;
  /** Index of the mechanism that it belongs to, or of the shared protector. */
  readonly mechanism: number | null;
  readonly shared: number | null;
  readonly feeds: readonly RobotPart[];
  open: boolean;
  /** Time in the present step at which it closes again; Infinity: not by itself. */
  closesAtS: number;
  /** θ, or damage at a fuse's slow and fast gate, of a shared one; a mechanism's own stands with the mechanism. */
  state: number;
  fast: number;
  /** The greatest share of what opens it that it has borne. */
  peak: number;
  count: number;
  mayOpenAtS: number | null;
  mayOpenA: number | null;
  readonly openings: Opening[];
}

const MOST_TOLD = 100;

export function createProtector(
  protection: Protection,
  feeds: readonly RobotPart[],
  place: Pick<RobotProtector, "mechanism" | "shared">,
): RobotProtector {
  return {
    protection,
    replica: protection.kind === "fuse" ? null : thermalReplica(protection),
    ...place,
    feeds,
    open: false,
    closesAtS: Number.POSITIVE_INFINITY,
    state: 0,
    fast: 0,
    peak: 0,
    count: 0,
    mayOpenAtS: null,
    mayOpenA: null,
    openings: [],
  };
}

/** True for a PTC that what it feeds keeps warm: it stays open. */
export function isKeptOpen({ open, protection, feeds }: RobotProtector): boolean {
  return open && protection.kind === "ptc" && feeds.some((part) => part.command !== "off");
}

/** When it happens: time of the run and of the step, s. */
export interface Moment {
  readonly runS: number;
  readonly stepS: number;
  readonly cycle: number;
  readonly step: number;
}

export function open(protector: RobotProtector, { runS, stepS, cycle, step }: Moment, currentA: number): void {
  const { protection } = protector;
  const resetsS = protection.kind === "breaker" ? protection.resetsS : undefined;
  const waitS = resetsS === undefined ? Number.POSITIVE_INFINITY : Math.max(resetsS, LEAST_OPEN_S);
  protector.open = true;
  protector.closesAtS = stepS + waitS;
  protector.count++;
  for (const part of protector.feeds) part.openAbove++;
  if (protector.openings.length >= MOST_TOLD) return;
  const closesAtS = Number.isFinite(waitS) ? runS + waitS : null;
  protector.openings.push({ atS: runS, closesAtS, cycle, step, currentA, borderline: isBorderline(protection, currentA) });
}

export function close(protector: RobotProtector, runS: number): void {
  protector.open = false;
  protector.closesAtS = Number.POSITIVE_INFINITY;
  for (const part of protector.feeds) part.openAbove--;
  const last = protector.openings.at(-1);
  if (last && protector.count === protector.openings.length)
    protector.openings[protector.openings.length - 1] = { ...last, closesAtS: runS };
}

export function historyOf(protector: RobotProtector): ProtectorHistory {
  const { mechanism, shared, openings, count, peak, mayOpenAtS, mayOpenA } = protector;
  return { mechanism, shared, openings, count, peakShare: count > 0 ? 1 : Math.min(peak, 1), mayOpenAtS, mayOpenA };
}

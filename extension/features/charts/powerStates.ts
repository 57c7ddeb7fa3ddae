/** How each protector and each winding stands along one load cycle: what the rows below the plots say. Numbers and names; no sentences. */
import type { Protection } from "../../model/drive.js";
import type { RobotDrive } from "../../model/robotDrive.js";
import type { ProtectorHistory, RobotSolution } from "../../model/robotSolution.js";
import type { CycleRun } from "./cycleRun.js";

export interface ProtectorState {
  readonly kind: Protection["kind"];
  /** What it feeds; more than one where it is shared. */
  readonly feeds: readonly string[];
  readonly shared: boolean;
  /** What it carries for ever, A. */
  readonly holdsA: number;
  /** Times in the cycle in which it is open, s. */
  readonly open: readonly { readonly fromS: number; readonly toS: number }[];
  /** A fuse: it may open from here on, s; null: never. */
  readonly mayOpenAtS: number | null;
}

export interface WindingState {
  readonly mechanism: string;
  readonly limitC: number;
  /** In the cycle that is plotted. */
  readonly peakC: number;
  readonly peakAtS: number;
  /** Times in the cycle in which it is above its limit, s. */
  readonly above: readonly { readonly fromS: number; readonly toS: number }[];
  /** Over all cycles. */
  readonly peakOfAllC: number;
}

export function protectorStates(drive: RobotDrive, names: readonly string[], run: CycleRun, cycleS: number): ProtectorState[] {
  return run.protectors.flatMap((history) => {
    const protection = protectionOf(drive, history);
    if (protection === undefined) return [];
    return [
      {
        kind: protection.kind,
        feeds: fedBy(drive, history).map((index) => names[index] ?? ""),
        shared: history.shared !== null,
        holdsA: protection.kind === "fuse" ? protection.ratingA : protection.holdCurrentA,
        open: history.openings.map(({ atS, closesAtS }) => ({
          fromS: Math.max(atS, 0),
          toS: Math.min(closesAtS ?? cycleS, cycleS),
        })),
        mayOpenAtS: history.mayOpenAtS === null || history.mayOpenAtS > cycleS ? null : Math.max(history.mayOpenAtS, 0),
      },
    ];
  });
}

export function windingStates(
  drive: RobotDrive,
  names: readonly string[],
  { samples }: CycleRun,
  { mechanisms }: RobotSolution,
): WindingState[] {
  return mechanisms.flatMap(({ windingPeakC }, index) => {
    const limitC = drive.mechanisms[index]?.motor.thermal?.limitC;
    if (limitC === undefined || windingPeakC === null) return [];
    const series = samples.map(({ timeS, windingC }) => ({ timeS, celsius: windingC[index] ?? Number.NEGATIVE_INFINITY }));
    const peak = series.reduce((most, one) => (one.celsius > most.celsius ? one : most), series[0] ?? { timeS: 0, celsius: 0 });
    return [
      {
        mechanism: names[index] ?? "",
        limitC,
        peakC: peak.celsius,
        peakAtS: peak.timeS,
        above: spansAbove(series, limitC),
        peakOfAllC: windingPeakC,
      },
    ];
  });
}

function spansAbove(series: readonly { readonly timeS: number; readonly celsius: number }[], limitC: number) {
  const spans: { fromS: number; toS: number }[] = [];
  let fromS: number | null = null;
  for (const { timeS, celsius } of series) {
    if (celsius > limitC) fromS ??= timeS;
    else if (fromS !== null) {
      spans.push({ fromS, toS: timeS });
      fromS = null;
    }
  }
  if (fromS !== null) spans.push({ fromS, toS: series.at(-1)?.timeS ?? fromS });
  return spans;
}

function protectionOf(drive: RobotDrive, { mechanism, shared }: ProtectorHistory): Protection | undefined {
  return mechanism === null ? drive.shared[shared ?? -1]?.protection : drive.mechanisms[mechanism]?.protection;
}

function fedBy(drive: RobotDrive, { mechanism, shared }: ProtectorHistory): readonly number[] {
  return mechanism === null ? (drive.shared[shared ?? -1]?.feeds ?? []) : [mechanism];
}

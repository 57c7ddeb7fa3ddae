/**
 * Where along the torque axis something gives way: zones that are hatched whole, and boundaries that are hatched on their far side.
 *
 * Places and words only; how a hatch looks is hatch.ts.
 */
import type { OperatingPointChart } from "../../../extension/protocol/charts/operatingPoint.js";
import { writeQuantity } from "../../../extension/units/write.js";

export interface Zone {
  readonly kind: "past-peak" | "current-limit" | "no-go";
  readonly from: number;
  readonly to: number;
  readonly words: string;
}

export interface Boundary {
  readonly x: number;
  readonly words: string;
}

/** In rising torque, without overlap. */
export function zonesOf({ limits, available }: OperatingPointChart, toX: (si: number) => number, end: number): readonly Zone[] {
  const { pastPeakFromNm, stopsAtNm, current } = limits;
  const stops = toX(stopsAtNm);
  const limited = stopsAtNm < available.stallTorqueNm;
  const limitFrom = current === null ? stops : Math.min(toX(current.fromNm), stops);
  const zones: Zone[] = [
    { kind: "past-peak", from: toX(pastPeakFromNm), to: limitFrom, words: "past the peak of power" },
    {
      kind: "current-limit",
      from: limitFrom,
      to: stops,
      words: current === null ? "" : `current limit ${writeQuantity(current.currentA, "current")}`,
    },
    { kind: "no-go", from: stops, to: end, words: limited ? "beyond the current limit" : "beyond stall" },
  ];
  return zones.filter(({ from, to }) => from < to);
}

export function boundariesOf({ limits }: OperatingPointChart, toX: (si: number) => number): readonly Boundary[] {
  return limits.others
    .filter(({ fromTorqueNm }) => fromTorqueNm > 0)
    .map(({ fromTorqueNm, label, currentA }) => ({
      x: toX(fromTorqueNm),
      words: currentA === undefined ? label : `${label}: ${writeQuantity(currentA, "current")}`,
    }));
}

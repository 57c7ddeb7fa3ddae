/** One motor at one torque, as charts and their tables carry it: SI. */
import type { OperatingPoint } from "../../model/operatingPoint.js";

export interface ChartValues {
  readonly speedRadPerS: number;
  readonly currentA: number;
  readonly shaftPowerW: number;
  /** Shaft power over power into the motor's terminals; null where nothing goes in. */
  readonly efficiency: number | null;
}

export interface ChartPoint extends ChartValues {
  readonly torqueNm: number;
}

export function chartPoint(point: OperatingPoint): ChartPoint {
  return { torqueNm: point.torqueNm, ...chartValues(point) };
}

export function chartValues({ speedRadPerS, currentA, shaftPowerW, efficiency }: OperatingPoint): ChartValues {
  return { speedRadPerS, currentA, shaftPowerW, efficiency };
}

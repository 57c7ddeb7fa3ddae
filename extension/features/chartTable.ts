/** The table behind the operating-point chart: every tenth of the way to standstill, and the points that have a name. */
import type { Drive } from "../model/drive.js";
import { availableLine } from "../model/line.js";
import { operatingPointAt } from "../model/operatingPoint.js";
import { type ChartPoint, chartPoint } from "./chartPoint.js";

export interface ChartTable {
  /** `unit`: SI; "1" for a share. */
  readonly columns: readonly { readonly title: string; readonly unit: string }[];
  /** In rising torque; `label` is empty for a plain step. */
  readonly rows: readonly { readonly label: string; readonly cells: readonly (number | null)[] }[];
}

const STEPS = 10;

const COLUMNS: ChartTable["columns"] = [
  { title: "torque", unit: "N·m" },
  { title: "share of stall torque", unit: "1" },
  { title: "speed", unit: "rad/s" },
  { title: "current", unit: "A" },
  { title: "output power", unit: "W" },
  { title: "efficiency", unit: "1" },
];

export function tableOf(drive: Drive, stopsAtNm: number, named: Readonly<Record<string, ChartPoint | undefined>>): ChartTable {
  const { stallTorqueNm } = availableLine(drive);
  const steps = Array.from({ length: STEPS + 1 }, (_, step) => (step / STEPS) * stopsAtNm);
  const rows = [
    ...steps.map((torqueNm) => ({ label: "", point: chartPoint(operatingPointAt(drive, torqueNm)) })),
    ...Object.entries(named).flatMap(([label, point]) => (point ? [{ label, point }] : [])),
  ];
  return {
    columns: COLUMNS,
    rows: rows
      .toSorted((one, other) => one.point.torqueNm - other.point.torqueNm)
      .map(({ label, point }) => ({
        label,
        cells: [
          point.torqueNm,
          stallTorqueNm > 0 ? point.torqueNm / stallTorqueNm : null,
          point.speedRadPerS,
          point.currentA,
          point.shaftPowerW,
          point.efficiency,
        ],
      })),
  };
}

/**
 * The chart as plain data in axis units: scales, curves, marks and limits. All that is left to do is to paint it.
 *
 * Scales numbers and chooses units; the numbers themselves come with the message.
 */
import type { CurveValues, OperatingPointChart } from "../../../extension/protocol/charts/operatingPoint.js";
import type { ShownChart } from "../../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeNumber } from "../../../extension/units/write.js";
import { type AxisUnit, axisUnit, PER_CENT } from "../../plots/axisUnit.js";
import { alignedScales, type Scale, ticksWithin } from "../../plots/ticks.js";
import { type Boundary, boundariesOf, type Zone, zonesOf } from "./limits.js";
import { CURRENT, EFFICIENCY, POWER, type Quantity, SPEED } from "./quantities.js";

export interface AxisDrawing extends Scale {
  /** With its unit: "Speed (rpm)". */
  readonly title: string;
  readonly unit: AxisUnit;
}

export type LineName = "available" | "sheet" | "saved";

export interface Curve {
  readonly quantity: Quantity;
  readonly line: LineName;
  readonly points: readonly { readonly x: number; readonly y: number }[];
}

export interface Mark {
  readonly quantity: Quantity;
  readonly kind: "needed" | "best";
  readonly x: number;
  readonly y: number;
}

export interface PlotDrawing {
  readonly left: AxisDrawing;
  readonly right: AxisDrawing;
  readonly curves: readonly Curve[];
  readonly marks: readonly Mark[];
}

export interface NeededTorque {
  readonly x: number;
  readonly words: string;
  /** True where it lies beyond the end of the axis. */
  readonly outside: boolean;
}

export interface Drawing {
  readonly torque: AxisDrawing;
  /** Per cent of the available stall torque; null for a motor that gives nothing. */
  readonly share: AxisDrawing | null;
  readonly motion: PlotDrawing;
  readonly power: PlotDrawing;
  readonly zones: readonly Zone[];
  readonly boundaries: readonly Boundary[];
  readonly needed: NeededTorque;
  /** The same of the saved result. */
  readonly wasNeeded: NeededTorque | null;
}

/** Room behind the longer line, so that its end is seen as one. */
const BEHIND = 1.06;
/** A needed torque up to this multiple of the longer line stretches the axis; a greater one is named at its end. */
const STRETCH = 2;

export function drawChart(
  { chart, saved }: Pick<ShownChart<"operating-point">, "chart" | "saved">,
  system: UnitSystem = "metric",
): Drawing {
  const torque = torqueAxis(chart, saved, system);
  const toX = torque.unit.fromSi;
  const plot = (left: Quantity, right: Quantity): PlotDrawing => {
    const [leftAxis, rightAxis] = valueAxes(chart, saved, left, right, system);
    const draw = (quantity: Quantity, { unit }: AxisDrawing): { curves: Curve[]; marks: Mark[] } => ({
      curves: curvesOf(chart, saved, quantity, toX, unit.fromSi),
      marks: marksOf(chart, quantity, toX, unit.fromSi),
    });
    const sides = [draw(left, leftAxis), draw(right, rightAxis)];
    return {
      left: leftAxis,
      right: rightAxis,
      curves: sides.flatMap(({ curves }) => curves),
      marks: sides.flatMap(({ marks }) => marks).filter(({ x }) => x <= torque.max),
    };
  };
  return {
    torque,
    share: shareAxis(chart, torque),
    motion: plot(SPEED, CURRENT),
    power: plot(POWER, EFFICIENCY),
    zones: zonesOf(chart, toX, torque.max),
    boundaries: boundariesOf(chart, toX),
    needed: neededTorque(chart, torque, "needed"),
    wasNeeded:
      saved !== null && saved.hardest.torqueNm !== chart.hardest.torqueNm ? neededTorque(saved, torque, "saved: needed") : null,
  };
}

function torqueAxis(chart: OperatingPointChart, saved: OperatingPointChart | null, system: UnitSystem): AxisDrawing {
  const lines = [chart, ...(saved ? [saved] : [])].flatMap(({ samples }) => samples.map(({ torqueNm }) => torqueNm));
  const longest = Math.max(0, ...lines);
  const needed = chart.hardest.torqueNm;
  const stretched = needed <= longest * STRETCH ? Math.max(longest, needed) : longest;
  const greatest = stretched > 0 ? stretched : needed > 0 ? needed : 1;
  const unit = axisUnit(greatest, "torque", system);
  const max = unit.fromSi(greatest) * BEHIND;
  return { max, ticks: ticksWithin(max), title: `Torque at one motor's shaft (${unit.text})`, unit };
}

function shareAxis(chart: OperatingPointChart, torque: AxisDrawing): AxisDrawing | null {
  const stall = torque.unit.fromSi(chart.available.stallTorqueNm);
  const max = PER_CENT.fromSi(torque.max / stall);
  if (!(stall > 0) || !Number.isFinite(max)) return null;
  // Quarters as long as they leave room for their numbers.
  const ticks = max <= 250 ? [0, 25, 50, 75, 100, 125, 150, 175, 200, 225, 250].filter((tick) => tick <= max) : ticksWithin(max);
  return { max, ticks, title: "Share of the available stall torque (%)", unit: PER_CENT };
}

function valueAxes(
  chart: OperatingPointChart,
  saved: OperatingPointChart | null,
  left: Quantity,
  right: Quantity,
  system: UnitSystem,
): readonly [AxisDrawing, AxisDrawing] {
  const drafts = [left, right].map((quantity) => {
    const greatest = Math.max(0, ...valuesOf(chart, quantity), ...(saved ? valuesOf(saved, quantity) : []));
    const unit = quantity.dimension === "share" ? PER_CENT : axisUnit(greatest, quantity.dimension, system);
    // Efficiency is read against the whole.
    const shown = quantity.dimension === "share" ? Math.max(greatest, 1) : greatest;
    return { unit, greatest: unit.fromSi(shown), title: `${quantity.title} (${unit.text})` };
  });
  const scales = alignedScales(drafts.map(({ greatest }) => greatest));
  const [one, other] = drafts.map(({ unit, title }, index) => ({
    ...(scales[index] ?? { max: 1, ticks: [0, 1] }),
    unit,
    title,
  }));
  if (one === undefined || other === undefined) throw new Error("A plot has two value axes.");
  return [one, other];
}

function valuesOf({ samples, hardest }: OperatingPointChart, { read }: Quantity): number[] {
  const everywhere = samples.flatMap(({ available, sheet }) => [available, sheet]);
  return [...everywhere, hardest].flatMap((values) => (values === null ? [] : [read(values) ?? 0]));
}

function curvesOf(
  chart: OperatingPointChart,
  saved: OperatingPointChart | null,
  quantity: Quantity,
  toX: (si: number) => number,
  toY: (si: number) => number,
): Curve[] {
  const curve = (line: LineName, source: OperatingPointChart, pick: "available" | "sheet"): Curve => ({
    quantity,
    line,
    points: source.samples.flatMap((sample) => {
      const values: CurveValues | null = sample[pick];
      const value = values && quantity.read(values);
      return value === null ? [] : [{ x: toX(sample.torqueNm), y: toY(value) }];
    }),
  });
  return [
    ...(saved && hasOtherLine(saved, chart) ? [curve("saved", saved, "available")] : []),
    curve("sheet", chart, "sheet"),
    curve("available", chart, "available"),
  ];
}

function marksOf(
  { hardest, peakPower, bestEfficiency }: OperatingPointChart,
  quantity: Quantity,
  toX: (si: number) => number,
  toY: (si: number) => number,
): Mark[] {
  const best = quantity.name === "power" ? peakPower : quantity.name === "efficiency" ? bestEfficiency : null;
  const points = [
    { kind: "best" as const, point: best },
    // Standing still it is at no point of the curves.
    { kind: "needed" as const, point: hardest.stalls ? null : hardest },
  ];
  return points.flatMap(({ kind, point }) => {
    const value = point && quantity.read(point);
    return point === null || value === null ? [] : [{ quantity, kind, x: toX(point.torqueNm), y: toY(value) }];
  });
}

function neededTorque({ hardest }: OperatingPointChart, { unit, max }: AxisDrawing, start: string): NeededTorque {
  const x = unit.fromSi(hardest.torqueNm);
  const end = !hardest.stalls ? "" : hardest.limitedBy === "grip" ? ": no grip" : ": stalls";
  return { x, words: `${start} ${writeNumber(x)} ${unit.text}${end}`, outside: x > max };
}

/** A saved line that lies under the new one is not drawn: another load or ratio asks for another torque of the same line. */
function hasOtherLine(one: OperatingPointChart, other: OperatingPointChart): boolean {
  const ends = ({ available, limits, bestEfficiency }: OperatingPointChart) => [
    ...[available.stallTorqueNm, available.noLoadSpeedRadPerS, available.stallCurrentA],
    ...[limits.stopsAtNm, bestEfficiency?.efficiency, bestEfficiency?.currentA],
  ];
  return String(ends(one)) !== String(ends(other));
}

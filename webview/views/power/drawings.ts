/** The three plots of a load cycle as plain data: stacked power, the supply, and the rows of protection and windings. */
import type { PowerChart } from "../../../extension/protocol/charts/power.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeNumber, writeQuantity } from "../../../extension/units/write.js";
import { axisUnit } from "../../plots/axisUnit.js";
import { fixedAxis, valueAxis } from "../../plots/series/axes.js";
import { EMPTY_DRAWING, type SeriesAxis, type SeriesDrawing, type Stack, type Upright } from "../../plots/series/drawing.js";
import { stackOf } from "./stack.js";
import { rowsOf } from "./stateRows.js";

export interface PowerDrawings {
  readonly power: SeriesDrawing;
  readonly supply: SeriesDrawing;
  /** Null where nothing is protected and no winding known. */
  readonly states: SeriesDrawing | null;
}

export interface Span {
  readonly fromS: number;
  readonly toS: number;
}

export function drawPower(chart: PowerChart, saved: PowerChart | null, span: Span, system: UnitSystem): PowerDrawings {
  const across = fixedAxis("Time in the load cycle", axisUnit(1, "time", system), span.fromS, span.toS);
  const rows = rowsOf(chart, system);
  const hasRows = rows.length > 0;
  return {
    power: powerPlot(chart, saved, across, system),
    supply: { ...supplyPlot(chart, saved, across, system), showsAcross: !hasRows },
    states: hasRows ? { ...EMPTY_DRAWING, across, uprights: stepLines(chart, false), rows } : null,
  };
}

function powerPlot(chart: PowerChart, saved: PowerChart | null, across: SeriesAxis, system: UnitSystem): SeriesDrawing {
  const stack = stackOf(chart);
  const ends = stack.bands.flatMap(({ lower, upper }) => [...lower, ...upper]);
  const savedTotals = saved === null ? [] : totalsOf(saved);
  const left = valueAxis("Electrical power", [...ends, ...savedTotals], "power", system);
  const toY = (values: readonly number[]): number[] => values.map(left.unit.fromSi);
  const bands = stack.bands.map((band) => ({ ...band, lower: toY(band.lower), upper: toY(band.upper) }));
  return {
    ...EMPTY_DRAWING,
    across,
    showsAcross: false,
    left,
    stack: { xs: stack.xs, bands } satisfies Stack,
    lines:
      saved === null
        ? []
        : [
            {
              name: "saved",
              side: "left",
              xs: saved.timesS,
              ys: toY(savedTotals),
              ink: "quiet",
              dash: [1, 3],
              width: 1.5,
              marker: null,
            },
          ],
    uprights: stepLines(chart, true),
  };
}

function supplyPlot(chart: PowerChart, saved: PowerChart | null, across: SeriesAxis, system: UnitSystem): SeriesDrawing {
  const { floor, voltageV, currentA, timesS, openCircuitV, numbers } = chart;
  const savedVolts = saved?.voltageV ?? [];
  const volts = [...voltageV, ...savedVolts, openCircuitV, ...(floor === null ? [] : [floor.voltageV])];
  const left = valueAxis("Supply voltage", volts, "voltage", system, { fromZero: false, intervals: 3 });
  const right = valueAxis("Supply current", currentA, "current", system, { intervals: 3 });
  const lowest = voltageV.indexOf(Math.min(...voltageV));
  const lowestV = voltageV[lowest];
  return {
    ...EMPTY_DRAWING,
    across,
    left,
    right,
    lines: [
      ...(saved === null
        ? []
        : [
            {
              name: "saved",
              side: "left" as const,
              xs: saved.timesS,
              ys: savedVolts.map(left.unit.fromSi),
              ink: "quiet" as const,
              dash: [1, 3],
              width: 1.5,
              marker: null,
            },
          ]),
      {
        name: "current",
        side: "right",
        xs: timesS,
        ys: currentA.map(right.unit.fromSi),
        ink: "current",
        dash: [9, 3, 2, 3],
        width: 1.5,
        marker: "triangle",
      },
      {
        name: "voltage",
        side: "left",
        xs: timesS,
        ys: voltageV.map(left.unit.fromSi),
        ink: "voltage",
        dash: [],
        width: 2,
        marker: "circle",
      },
    ],
    levels:
      floor === null
        ? []
        : [
            {
              side: "left",
              y: left.unit.fromSi(floor.voltageV),
              words: `must stay above ${writeQuantity(floor.voltageV, "voltage")}`,
              hatched: "below",
            },
          ],
    uprights: stepLines(chart, false),
    dots:
      lowestV === undefined || lowestV >= openCircuitV
        ? []
        : [
            {
              side: "left",
              x: timesS[lowest] ?? 0,
              y: left.unit.fromSi(lowestV),
              words: `${isLowestOfAll(lowestV, numbers.lowestVoltageV) ? "lowest" : "lowest here"} ${writeNumber(left.unit.fromSi(lowestV))} ${left.unit.text}`,
            },
          ],
  };
}

/** Later cycles may draw the supply lower than the one that is plotted. */
function isLowestOfAll(here: number, all: number): boolean {
  return here <= all * (1 + 1e-6);
}

function stepLines({ steps }: PowerChart, isNamed: boolean): Upright[] {
  return steps.map(({ startS }, index) => ({ x: startS, words: isNamed ? `step ${index + 1}` : "", kind: "part" as const }));
}

export function totalsOf({ timesS, mechanisms }: PowerChart): number[] {
  return timesS.map((_, index) => mechanisms.reduce((sum, { powerW }) => sum + (powerW[index] ?? 0), 0));
}

/** The same load cycle in numbers: facts of the whole run, the read-out at a moment, the table and the file. */
import type { PowerChart } from "../../../extension/protocol/charts/power.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { typeset, writeNumber, writeQuantity } from "../../../extension/units/write.js";
import { digits } from "../../frame/csv.js";
import type { ReadOut, Table } from "../../frame/sheet.js";
import { paintSwatch } from "../../plots/series/bandFill.js";
import { listed, NOTHING, temperatureColumn, writeTemperature } from "../../quantity.js";
import { totalsOf } from "./drawings.js";

const SECONDS_PER_HOUR = 3600;
/** About this many rows for people. */
const ROWS = 24;

export function powerFacts({ numbers, cycles, cycleS, floor }: PowerChart, system: UnitSystem): (readonly [string, string])[] {
  const { lowestVoltageV, lowestVoltageAtS, peakCurrentA, sourceEnergyJ, chargeUsedAh, cyclesDone } = numbers;
  const cycle = Math.min(Math.floor(lowestVoltageAtS / cycleS + 1e-12), cycles - 1);
  const inCycle = writeQuantity(Math.max(lowestVoltageAtS - cycle * cycleS, 0), "time");
  return [
    ["Lowest voltage", writeQuantity(lowestVoltageV, "voltage")],
    ["Lowest at", cycles > 1 ? `${inCycle} of cycle ${cycle + 1}` : inCycle],
    ["Must stay above", floor === null ? NOTHING : writeQuantity(floor.voltageV, "voltage")],
    ["Peak current", writeQuantity(peakCurrentA, "current")],
    ["Energy", writeQuantity(sourceEnergyJ, "energy")],
    ["Charge", writeQuantity(chargeUsedAh * SECONDS_PER_HOUR, "charge", 3, system)],
    ["Load cycle", writeQuantity(cycleS, "time")],
    ["Cycles done", `${cyclesDone} of ${cycles}`],
  ];
}

export function powerReadOut(chart: PowerChart, index: number, system: UnitSystem): ReadOut {
  const { timesS, voltageV, currentA, mechanisms, steps } = chart;
  const timeS = timesS[index] ?? 0;
  const total = mechanisms.reduce((sum, { powerW }) => sum + (powerW[index] ?? 0), 0);
  const power = (value: number): string => writeQuantity(cleared(value), "power");
  const step = steps.findLastIndex(({ startS }) => startS <= timeS);
  const hasWindings = mechanisms.some(({ windingC }) => windingC !== null);
  const rows = mechanisms.map(({ name, powerW, windingC }, turn) => ({
    name,
    cells: [
      power(powerW[index] ?? 0),
      ...(hasWindings ? [windingC === null ? NOTHING : writeTemperature(windingC[index] ?? 0, system)] : []),
    ],
    swatch: paintSwatch(turn),
  }));
  const supply = `${writeQuantity(voltageV[index] ?? 0, "voltage")}, ${writeQuantity(cleared(currentA[index] ?? 0), "current")}, ${power(total)}`;
  const active = rows.filter((_, turn) => Math.abs(mechanisms[turn]?.powerW[index] ?? 0) >= LEAST_W);
  return {
    at: `${writeQuantity(timeS, "time")}: ${supply}`,
    names: step < 0 ? "" : stepWords(chart, step),
    head: ["Power", ...(hasWindings ? ["Winding"] : [])],
    // The topmost part of the stack comes first.
    rows: rows.toReversed(),
    spoken: `${writeQuantity(timeS, "time")}. Supply ${supply}. ${active.length === 0 ? "Nothing takes power" : active.map(({ name, cells }) => `${name} ${cells[0]}`).join(", ")}.`,
  };
}

export function stepWords({ steps }: PowerChart, step: number): string {
  const { moving = [], holding = [] } = steps[step] ?? {};
  const parts = [
    ...(moving.length > 0 ? [`${listed(moving)} ${moving.length > 1 ? "move" : "moves"}`] : []),
    ...(holding.length > 0 ? [`${listed(holding)} ${holding.length > 1 ? "hold" : "holds"}`] : []),
  ];
  return `step ${step + 1}${parts.length > 0 ? `, ${parts.join(", ")}` : ""}`;
}

/** For people: moments evenly spread, and the one of least voltage. */
export function powerTable(chart: PowerChart, stops: readonly number[], system: UnitSystem): Table {
  const { robot, timesS, voltageV, currentA, mechanisms } = chart;
  const totals = totalsOf(chart);
  const least = stops.reduce((one, other) => ((voltageV[other] ?? 0) < (voltageV[one] ?? 0) ? other : one), stops[0] ?? 0);
  const temperature = temperatureColumn(system);
  const cell = (value: number | undefined): string => writeNumber(cleared(value ?? 0));
  return {
    caption: `${robot}: electrical power over the load cycle`,
    head: [
      "Time (s)",
      "Voltage (V)",
      "Current (A)",
      "All (W)",
      ...mechanisms.map(({ name }) => `${name} (W)`),
      ...mechanisms.flatMap(({ name, windingC }) =>
        windingC === null ? [] : [`${name}, winding (${typeset(temperature.symbol)})`],
      ),
    ],
    rows: evenly(stops, timesS, least).map((index) => [
      cell(timesS[index]),
      cell(voltageV[index]),
      cell(currentA[index]),
      cell(totals[index]),
      ...mechanisms.map(({ powerW }) => cell(powerW[index])),
      ...mechanisms.flatMap(({ windingC }) => (windingC === null ? [] : [cell(temperature.numberOf(windingC[index] ?? 0))])),
    ]),
  };
}

/** For programs: every moment. */
export function powerFile(chart: PowerChart, system: UnitSystem): Table {
  const { timesS, voltageV, currentA, mechanisms } = chart;
  const totals = totalsOf(chart);
  const temperature = temperatureColumn(system);
  return {
    caption: "",
    head: [
      "Time (s)",
      "Supply voltage (V)",
      "Supply current (A)",
      "All mechanisms (W)",
      ...mechanisms.map(({ name }) => `Power of ${name} (W)`),
      ...mechanisms.flatMap(({ name, windingC }) => (windingC === null ? [] : [`Winding of ${name} (${temperature.symbol})`])),
    ],
    rows: timesS.map((timeS, index) => [
      digits(timeS),
      digits(voltageV[index] ?? null),
      digits(currentA[index] ?? null),
      digits(totals[index] ?? null),
      ...mechanisms.map(({ powerW }) => digits(powerW[index] ?? null)),
      ...mechanisms.flatMap(({ windingC }) => (windingC === null ? [] : [digits(temperature.numberOf(windingC[index] ?? 0))])),
    ]),
  };
}

/** A power below this is nothing, W. */
const LEAST_W = 1e-6;

/** What rounding leaves of nothing is 0. */
function cleared(value: number): number {
  return Math.abs(value) < LEAST_W ? 0 : value;
}

function evenly(stops: readonly number[], timesS: readonly number[], always: number): readonly number[] {
  const [first = 0, last = 0] = [stops[0], stops.at(-1)];
  const [fromS, toS] = [timesS[first] ?? 0, timesS[last] ?? 0];
  const wanted = Array.from({ length: ROWS }, (_, row) => fromS + (row / (ROWS - 1)) * (toS - fromS));
  const found = new Set([always]);
  let at = 0;
  for (const timeS of wanted) {
    while (at < stops.length - 1 && (timesS[stops[at] ?? 0] ?? 0) < timeS) at++;
    const stop = stops[at];
    if (stop !== undefined) found.add(stop);
  }
  return [...found].sort((one, other) => one - other);
}

/** The same travel in numbers: facts as reported, the read-out at a moment, the table and the file. */
import type { TravelChart } from "../../../extension/protocol/charts/travel.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { typeset, writeNumber } from "../../../extension/units/write.js";
import { digits } from "../../frame/csv.js";
import type { ReadOut, Table } from "../../frame/sheet.js";
import { type Column, columnIn, NOTHING, temperatureColumn, writerIn, writeTemperature } from "../../quantity.js";
import { speedDimension } from "./drawings.js";
import { eventWords, holdWords, outcomeWords } from "./events.js";
import { type Moment, type Over, positionAt } from "./moments.js";

/** About this many rows for people. */
const ROWS = 24;

export function travelFacts(chart: TravelChart, system: UnitSystem): (readonly [string, string])[] {
  const { numbers, withinS, coordinate, hardest, windingLimitC } = chart;
  const write = writerIn(system);
  const temperature = (celsius: number): string => writeTemperature(celsius, system);
  const held = holdWords(chart, write, temperature);
  return [
    [coordinate === null ? "Spin-up" : "Travel time", outcomeWords(chart, write)],
    ["Within", write(withinS, "time")],
    ["Peak current", write(numbers.peakMotorCurrentA, "current")],
    ["RMS current", write(numbers.rmsMotorCurrentA, "current")],
    ["Most torque needed", write(hardest.torqueNm, "torque")],
    ["Speed at the end", numbers.timeS === null ? NOTHING : write(numbers.endSpeed, speedDimension(chart))],
    ["Energy", write(numbers.sourceEnergyJ, "energy")],
    ...(windingLimitC === null
      ? []
      : [["Winding, at most", `${writeTemperature(numbers.windingPeakC, system)} of ${temperature(windingLimitC)}`] as const]),
    ...(held === null ? [] : [["Hold", held] as const]),
  ];
}

export function travelReadOut(chart: TravelChart, moment: Moment, over: Over, system: UnitSystem): ReadOut {
  const write = writerIn(system);
  const position = chart.coordinate === null ? null : write(moment.position, chart.coordinate);
  const time = write(moment.timeS, "time");
  const cells: [string, string][] = [
    ["Needed", write(moment.neededNm, "torque")],
    ["Given", write(moment.givenNm, "torque")],
    ["Current", write(moment.currentA, "current")],
    ["Speed", write(moment.speed, speedDimension(chart))],
    ["Supply", `${write(moment.voltageV, "voltage")}, ${write(moment.sourceCurrentA, "current")}`],
    ...(chart.windingC === null ? [] : [["Winding", writeTemperature(moment.windingC, system)] as [string, string]]),
  ];
  const other = over === "time" ? position : moment.timeS === null ? "never there" : time;
  return {
    at: `${over === "time" ? time : position}${other === null ? "" : `, ${other}`}`,
    names: namesAt(chart, moment, system),
    head: cells.map(([name]) => name),
    rows: [{ name: "One motor", cells: cells.map(([, text]) => text) }],
    spoken: `${over === "time" ? time : position}. ${cells.map(([name, text]) => `${name} ${text}`).join(", ")}.`,
  };
}

/** An event at the very moment. */
function namesAt(chart: TravelChart, { timeS }: Moment, system: UnitSystem): string {
  const end = chart.timesS.at(-1) ?? 0;
  const near = (at: number): boolean => timeS !== null && Math.abs(at - timeS) <= end * 1e-6;
  return chart.events
    .filter((event) => near(event.timeS))
    .map((event) => eventWords(event, chart, writerIn(system)))
    .join("; ");
}

export function travelTable(chart: TravelChart, moments: readonly Moment[], system: UnitSystem): Table {
  const columns = columnsOf(chart, system);
  const every = Math.max(1, Math.round(moments.length / ROWS));
  const kept = moments.filter((_, index) => index % every === 0 || index === moments.length - 1);
  return {
    caption: `${chart.mechanism}: one travel at full command`,
    head: columns.map(({ title, column }) => `${title} (${typeset(column.symbol)})`),
    rows: kept.map((moment) => columns.map(({ read, column }) => numberText(read(moment), column))),
  };
}

export function travelFile(chart: TravelChart, moments: readonly Moment[], system: UnitSystem): Table {
  const columns = columnsOf(chart, system);
  return {
    caption: "",
    head: [...columns.map(({ title, column }) => `${title} (${column.symbol})`), "Event"],
    rows: moments.map((moment) => [
      ...columns.map(({ read, column }) => {
        const value = read(moment);
        return digits(value === null ? null : column.numberOf(value));
      }),
      namesAt(chart, moment, system),
    ]),
  };
}

interface Titled {
  readonly title: string;
  readonly column: Column;
  readonly read: (moment: Moment) => number | null;
}

function columnsOf(chart: TravelChart, system: UnitSystem): readonly Titled[] {
  const { coordinate } = chart;
  return [
    { title: "Time", column: columnIn(system, "time"), read: ({ timeS }) => timeS },
    ...(coordinate === null
      ? []
      : [{ title: "Position", column: columnIn(system, coordinate), read: ({ position }: Moment) => position }]),
    { title: "Torque needed", column: columnIn(system, "torque"), read: ({ neededNm }) => neededNm },
    { title: "Torque given", column: columnIn(system, "torque"), read: ({ givenNm }) => givenNm },
    { title: "Current", column: columnIn(system, "current"), read: ({ currentA }) => currentA },
    { title: "Speed of the load", column: columnIn(system, speedDimension(chart)), read: ({ speed }) => speed },
    { title: "Supply current", column: columnIn(system, "current"), read: ({ sourceCurrentA }) => sourceCurrentA },
    { title: "Supply voltage", column: columnIn(system, "voltage"), read: ({ voltageV }) => voltageV },
    ...(chart.windingC === null
      ? []
      : [{ title: "Winding", column: temperatureColumn(system), read: ({ windingC }: Moment) => windingC }]),
  ];
}

function numberText(value: number | null, { numberOf }: Column): string {
  return value === null ? NOTHING : writeNumber(numberOf(value));
}

/** Events with their places, for those who hear them. */
export function eventSentences(chart: TravelChart, system: UnitSystem): string[] {
  const write = writerIn(system);
  return chart.events.map((event) => {
    const where = chart.coordinate === null ? "" : ` at ${write(positionAt(chart, event.timeS), chart.coordinate)}`;
    return `${write(event.timeS, "time")}${where}: ${eventWords(event, chart, write)}.`;
  });
}

/**
 * The data of the chart of a robot's load cycle as it travels, checked where it arrives.
 *
 * SI values at the supply's terminals, temperatures in °C. What the numbers mean stands with the feature that computes them.
 */
import * as v from "valibot";
import { listOf, number, numbers, said, shownEntries, text } from "./parts.js";

const VIEW = "power";

const spanSchema = v.object({ fromS: number, toS: number });

const stepSchema = v.object({ startS: number, endS: number, moving: listOf(text), holding: listOf(text) });

const numbersSchema = v.object({
  lowestVoltageV: number,
  lowestVoltageAtS: number,
  peakCurrentA: number,
  sourceEnergyJ: number,
  chargeUsedAh: number,
  cyclesDone: number,
});

const protectorSchema = v.object({
  kind: v.picklist(["breaker", "ptc", "fuse"]),
  feeds: listOf(text),
  shared: v.boolean(),
  /** What it carries for ever, A. */
  holdsA: number,
  open: listOf(spanSchema),
  mayOpenAtS: v.nullable(number),
});

const windingSchema = v.object({
  mechanism: text,
  limitC: number,
  peakC: number,
  peakAtS: number,
  above: listOf(spanSchema),
  peakOfAllC: number,
});

export const powerChartSchema = v.pipe(
  v.object({
    robot: text,
    ...said,
    cycles: number,
    cycleS: number,
    /** Which one is plotted, from 1, and which one is the last that is followed. */
    cycle: number,
    lastCycle: number,
    /** What was sampled, s of the cycle. */
    span: spanSchema,
    steps: listOf(stepSchema),
    openCircuitV: number,
    floor: v.nullable(v.object({ voltageV: number, forS: number })),
    /** Of all cycles. */
    numbers: numbersSchema,
    /** Rising; two moments at one time stand before and after a change. All lists below go with it. */
    timesS: numbers,
    voltageV: numbers,
    currentA: numbers,
    mechanisms: listOf(v.object({ name: text, powerW: numbers, windingC: v.nullable(numbers) })),
    protectors: listOf(protectorSchema),
    windings: listOf(windingSchema),
  }),
  v.check(({ timesS, voltageV, currentA, mechanisms }) =>
    [voltageV, currentA, ...mechanisms.flatMap(({ powerW, windingC }) => [powerW, windingC ?? timesS])].every(
      ({ length }) => length === timesS.length,
    ),
  ),
);

export const powerShown = v.object(shownEntries(VIEW, powerChartSchema));

/** What the page asks for. */
export const powerWant = v.object({
  view: v.literal(VIEW),
  /** Of the load cycle; null: all of it. */
  span: v.nullable(spanSchema),
  cycle: v.picklist(["first", "last"]),
});

/** What the page remembers of this view. */
export const powerMemory = v.object({
  /** Time where the cursor stands, s of the cycle. */
  cursor: v.nullable(number),
  span: v.nullable(spanSchema),
  cycle: v.picklist(["first", "last"]),
});

export const NO_POWER_MEMORY: v.InferOutput<typeof powerMemory> = { cursor: null, span: null, cycle: "first" };

export type PowerChart = v.InferOutput<typeof powerChartSchema>;

/**
 * The data of the chart of one travel as it travels itself, checked where it arrives.
 *
 * SI values of one motor unless the name says source, temperatures in °C. What the numbers mean stands with the feature that computes them.
 */
import * as v from "valibot";
import { listOf, number, numbers, said, shownEntries, text } from "./parts.js";

const VIEW = "travel";

const travelNumbersSchema = v.object({
  timeS: v.nullable(number),
  endSpeed: number,
  peakMotorCurrentA: number,
  rmsMotorCurrentA: number,
  sourceEnergyJ: number,
  windingPeakC: v.nullable(number),
  tripsAfterS: v.nullable(number),
});

const eventSchema = v.object({
  kind: v.picklist(["ramp-ends", "limit-begins", "limit-ends", "trips", "may-trip", "winding-limit", "arrives", "stands-still"]),
  timeS: number,
});

const holdSchema = v.object({
  forS: number,
  currentA: number,
  torqueNm: number,
  tripsAfterS: v.nullable(number),
  windingFinalC: v.nullable(number),
  limitAfterS: v.nullable(number),
});

export const travelChartSchema = v.pipe(
  v.object({
    mechanism: text,
    motorCount: number,
    ...said,
    /** m, rad, or null where the load only turns; so is `travel`. */
    coordinate: v.nullable(v.picklist(["length", "angle"])),
    travel: v.nullable(v.object({ from: number, to: number })),
    outcome: v.picklist(["arrives", "never-starts", "stands-still", "never-reaches-speed", "unresolved"]),
    numbers: travelNumbersSchema,
    withinS: v.nullable(number),
    stallTorqueNm: number,
    hardest: v.object({ torqueNm: number, position: v.nullable(number) }),
    currentLimitA: v.nullable(number),
    windingLimitC: v.nullable(number),
    protection: v.nullable(v.object({ kind: v.picklist(["breaker", "ptc", "fuse"]), holdsA: number })),
    /** From start to end of the travel. */
    needed: listOf(v.object({ position: number, torqueNm: number })),
    /** Rising; all lists below go with it. */
    timesS: numbers,
    positions: numbers,
    speeds: numbers,
    neededNm: numbers,
    givenNm: numbers,
    currentA: numbers,
    sourceCurrentA: numbers,
    voltageV: numbers,
    windingC: v.nullable(numbers),
    events: listOf(eventSchema),
    hold: v.nullable(holdSchema),
  }),
  v.check(({ timesS, positions, speeds, neededNm, givenNm, currentA, sourceCurrentA, voltageV, windingC }) =>
    [positions, speeds, neededNm, givenNm, currentA, sourceCurrentA, voltageV, windingC ?? timesS].every(
      ({ length }) => length === timesS.length,
    ),
  ),
);

export const travelShown = v.object(shownEntries(VIEW, travelChartSchema));

/** What the page asks for. */
export const travelWant = v.object({ view: v.literal(VIEW) });

/** What the page remembers of this view. */
export const travelMemory = v.object({
  /** What lies across. */
  over: v.picklist(["time", "position"]),
  /** Where the cursor stands: s, or the load's own coordinate. */
  cursor: v.nullable(number),
  /** What is zoomed to, of the same; null: all. */
  span: v.nullable(v.object({ from: number, to: number })),
});

export const NO_TRAVEL_MEMORY: v.InferOutput<typeof travelMemory> = { over: "time", cursor: null, span: null };

export type TravelChart = v.InferOutput<typeof travelChartSchema>;

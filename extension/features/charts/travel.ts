/**
 * Everything that the chart of one travel plots: torque needed and given, current and speed along time and position, what happens on the
 * way, and the hold after it.
 *
 * SI throughout (temperatures °C), one motor unless the name says otherwise. Positions and speeds are in the load's own coordinate.
 */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { greatestTorque } from "../../model/bestPoints.js";
import type { Drive, Protection } from "../../model/drive.js";
import { requiredMotorTorque } from "../../model/hardest.js";
import { holdPoint } from "../../model/hold.js";
import type { MechanismNumbers } from "../../model/numbers.js";
import type { TravelSample } from "../../model/observer.js";
import { type ShaftLoad, shaftLoadOf, travelDirection } from "../../model/shaftLoad.js";
import { solveTravel } from "../../model/travel.js";
import type { TravelOutcome, TravelResult } from "../../model/travelResult.js";
import type { ChartFeature, NoChart, Wish } from "./feature.js";
import { keptMoments } from "./keptMoments.js";
import { headOf, type MechanismHead } from "./mechanismHead.js";
import { mechanismSubjects, noMechanism, whyMechanismIsOld } from "./mechanismSubjects.js";

export interface TravelChart extends MechanismHead {
  /** m, rad, or nothing where the load only turns. */
  readonly coordinate: "length" | "angle" | null;
  /** Null for a load that only turns. */
  readonly travel: { readonly from: number; readonly to: number } | null;
  readonly outcome: TravelOutcome;
  /** Of one travel from cold, as reported. */
  readonly numbers: NonNullable<MechanismNumbers["travel"]>;
  readonly withinS: number | null;
  readonly stallTorqueNm: number;
  readonly hardest: { readonly torqueNm: number; readonly position: number | null };
  readonly currentLimitA: number | null;
  readonly windingLimitC: number | null;
  readonly protection: { readonly kind: Protection["kind"]; readonly holdsA: number } | null;
  /** Static, all along the travel, whether it gets there or not. Empty for a load that only turns. */
  readonly needed: readonly { readonly position: number; readonly torqueNm: number }[];
  /** Rising; all lists below go with it. */
  readonly timesS: readonly number[];
  readonly positions: readonly number[];
  readonly speeds: readonly number[];
  readonly neededNm: readonly number[];
  readonly givenNm: readonly number[];
  readonly currentA: readonly number[];
  readonly sourceCurrentA: readonly number[];
  readonly voltageV: readonly number[];
  /** Null without thermal data. */
  readonly windingC: readonly number[] | null;
  /** In the order of their times. */
  readonly events: readonly TravelEvent[];
  /** Null where none is declared. */
  readonly hold: TravelHold | null;
}

export interface TravelEvent {
  readonly kind:
    | "ramp-ends"
    | "limit-begins"
    | "limit-ends"
    | "trips"
    | "may-trip"
    | "winding-limit"
    | "arrives"
    | "stands-still";
  readonly timeS: number;
}

export interface TravelHold {
  readonly forS: number;
  readonly currentA: number;
  readonly torqueNm: number;
  readonly tripsAfterS: number | null;
  readonly windingFinalC: number | null;
  readonly limitAfterS: number | null;
}

/** Spans of time that keep their extremes. */
const SPANS = 200;
/** Positions at which what is needed is worked out, beside those where it has a corner or an extreme. */
const POSITIONS = 80;

export const travelFeature: ChartFeature<TravelChart, unknown> = {
  subjects: travelSubjects,
  chartOf: travelChart,
  whyOld: whyMechanismIsOld,
  nothing: noTravel,
};

/** Where the mechanism that is meant has no travel, no other one's is shown in its place. */
function travelSubjects(analysis: Analysis, wish: Wish): readonly string[] {
  const names = mechanismSubjects(analysis, wish);
  const meant = analysis.mechanisms.find(({ name }) => name === names[0]);
  return meant !== undefined && onlyTurns(meant) ? [] : names;
}

function noTravel(analysis: Analysis, wish: Wish): NoChart {
  const [name] = mechanismSubjects(analysis, wish);
  const meant = analysis.mechanisms.find((one) => one.name === name);
  if (meant === undefined || !onlyTurns(meant)) return noMechanism(analysis);
  const says = [
    `"${meant.name}" turns on and on: its load has no travel. See its operating point, or put the caret on a mechanism with another load.`,
  ];
  return { reason: "does-not-apply", says, example: null };
}

function onlyTurns({ numbers }: AnalysedMechanism): boolean {
  return numbers !== undefined && numbers.travel === null;
}

export function travelChart(analysis: Analysis, mechanismName: string): TravelChart | undefined {
  const mechanism = analysis.mechanisms.find(({ name, numbers }) => name === mechanismName && numbers !== undefined);
  const { drive, numbers } = mechanism ?? {};
  if (mechanism === undefined || drive === undefined || !numbers?.travel) return undefined;
  const travel = solveTravel(drive, { sampling: true });
  if (travel === null) return undefined;
  const load = shaftLoadOf(drive);
  const direction = travelDirection(load);
  const neededAt = (position: number): number => requiredMotorTorque(drive, position, direction);
  const samples = thinned(travel.samples);
  const pick = (read: (sample: TravelSample) => number): number[] => samples.map(read);
  return {
    ...headOf(analysis, mechanism),
    coordinate: coordinateOf(load),
    travel: load.endless ? null : { from: load.startRad * load.ownPerRad, to: load.endRad * load.ownPerRad },
    outcome: travel.outcome,
    numbers: numbers.travel,
    withinS: drive.withinS ?? null,
    stallTorqueNm: greatestTorque(drive),
    hardest: { torqueNm: numbers.hardest.motorTorqueNm, position: numbers.hardest.position },
    currentLimitA: drive.motorCurrentLimitA ?? null,
    windingLimitC: drive.motor.thermal?.limitC ?? null,
    protection: protectionOf(drive),
    needed: positionsOf(load).map((position) => ({ position, torqueNm: neededAt(position) })),
    timesS: pick(({ timeS }) => timeS),
    positions: pick(({ position }) => position),
    speeds: pick(({ speed }) => speed),
    neededNm: pick(({ position }) => neededAt(position)),
    givenNm: pick(({ motorTorqueNm }) => motorTorqueNm),
    currentA: pick(({ motorCurrentA }) => motorCurrentA),
    sourceCurrentA: pick(({ sourceCurrentA }) => sourceCurrentA),
    voltageV: pick(({ supplyVoltageV }) => supplyVoltageV),
    windingC: drive.motor.thermal ? pick(({ windingC }) => windingC ?? 0) : null,
    events: eventsOf(drive, travel),
    hold: holdOf(drive, numbers.hold),
  };
}

function thinned(samples: readonly TravelSample[]): readonly TravelSample[] {
  const guides = [samples.map(({ motorTorqueNm }) => motorTorqueNm), samples.map(({ speed }) => speed)];
  const others = [samples.map(({ supplyVoltageV }) => supplyVoltageV), samples.map(({ sourceCurrentA }) => sourceCurrentA)];
  const kept = keptMoments(
    samples.map(({ timeS }) => timeS),
    guides,
    others,
    SPANS,
  );
  return kept.flatMap((index) => samples[index] ?? []);
}

function coordinateOf({ endless, kind }: ShaftLoad): TravelChart["coordinate"] {
  if (endless) return null;
  return kind === "arm" || kind === "loadCurve" ? "angle" : "length";
}

/** From start to end of the travel. */
function positionsOf(load: ShaftLoad): number[] {
  if (load.endless) return [];
  const { startRad, endRad } = load;
  const even = Array.from({ length: POSITIONS + 1 }, (_, step) => startRad + (step / POSITIONS) * (endRad - startRad));
  const all = [...new Set([...even, ...load.corners, ...load.extremes()])];
  const inside = all.filter((one) => one >= Math.min(startRad, endRad) && one <= Math.max(startRad, endRad));
  return inside.sort((one, other) => (endRad < startRad ? other - one : one - other)).map((one) => one * load.ownPerRad);
}

/** At the limit within rounding. */
const AT_LIMIT = 1 - 1e-6;

function eventsOf({ rampS, motorCurrentLimitA }: Drive, travel: TravelResult): readonly TravelEvent[] {
  const { samples, outcome, coveredS, timeS, opensAfterS, mayOpenAfterS, windingLimitAfterS } = travel;
  const event = (kind: TravelEvent["kind"], at: number | null | undefined): TravelEvent[] =>
    at === null || at === undefined || at > coveredS ? [] : [{ kind, timeS: at }];
  const atLimit = samples.filter(
    ({ motorCurrentA }) => motorCurrentA >= (motorCurrentLimitA ?? Number.POSITIVE_INFINITY) * AT_LIMIT,
  );
  const [first, last] = [atLimit[0], atLimit.at(-1)];
  return [
    ...event("ramp-ends", rampS > 0 && rampS < coveredS ? rampS : undefined),
    ...event("limit-begins", first !== undefined && first.timeS > 0 ? first.timeS : undefined),
    ...event("limit-ends", last !== undefined && last.timeS < coveredS ? last.timeS : undefined),
    ...event("trips", opensAfterS),
    ...event("may-trip", opensAfterS === mayOpenAfterS ? undefined : mayOpenAfterS),
    ...event("winding-limit", windingLimitAfterS),
    ...event("arrives", timeS),
    ...event("stands-still", outcome === "stands-still" ? coveredS : undefined),
  ].sort((one, other) => one.timeS - other.timeS);
}

function protectionOf({ protection }: Drive): TravelChart["protection"] {
  if (protection === undefined) return null;
  const holdsA = protection.kind === "fuse" ? protection.ratingA : protection.holdCurrentA;
  return { kind: protection.kind, holdsA };
}

function holdOf(drive: Drive, hold: MechanismNumbers["hold"]): TravelHold | null {
  const { holdForS } = drive;
  if (hold === null || holdForS === undefined) return null;
  const { motorCurrentA, tripsAfterS, windingFinalC, limitAfterS } = hold;
  return {
    forS: holdForS,
    currentA: motorCurrentA,
    torqueNm: holdPoint(drive)?.motorTorqueNm ?? 0,
    tripsAfterS,
    windingFinalC,
    limitAfterS,
  };
}

/**
 * A robot's load cycle written a second time, the slow way: the plain equations of each mechanism on a bus voltage that is found by
 * iteration, integrated by a general solver in short pieces, events found by halving the piece that holds them.
 */
import type { Drive, Supply } from "../../extension/model/drive.js";
import type { RobotDrive, RobotStep } from "../../extension/model/robotDrive.js";
import { solveByOdex } from "./generalSolvers.js";
import { PLAIN, plainInstant, plainSpan } from "./plainEquations.js";
import { type PlainDoing, replicaRate, stillAt } from "./plainStill.js";

const PIECE_S = 0.04;
const TOLERANCE = 1e-10;

interface PlainPart {
  readonly drive: Drive;
  readonly state: number[];
  doing: PlainDoing;
  command: "off" | "move" | "hold";
  arrived: boolean;
  startedS: number;
  closesS: number;
}

export interface PlainArrival {
  readonly mechanism: number;
  readonly cycle: number;
  readonly step: number;
  /** In the step. */
  readonly timeS: number;
}

export interface PlainRobot {
  lowestV: number;
  lowestAtS: number;
  peakA: number;
  energyJ: number;
  chargeAs: number;
  readonly arrivals: PlainArrival[];
  readonly trips: { readonly mechanism: number; readonly atS: number }[];
  readonly sharedTripsS: number[];
  readonly windingsC: number[];
  readonly energiesJ: number[];
}

/** Knows lifts, arms and flywheels, breakers of one mechanism that reset, and one shared breaker that does not. */
export function runPlainly(robot: RobotDrive): PlainRobot {
  const parts = robot.mechanisms.map(
    (drive): PlainPart => ({
      drive,
      state: [0, 0, robot.ambientC, robot.ambientC, 0, 0, 0],
      doing: "off",
      command: "off",
      arrived: false,
      startedS: 0,
      closesS: Number.POSITIVE_INFINITY,
    }),
  );
  const seen: PlainRobot = {
    lowestV: Number.POSITIVE_INFINITY,
    lowestAtS: 0,
    peakA: 0,
    energyJ: 0,
    chargeAs: 0,
    arrivals: [],
    trips: [],
    sharedTripsS: [],
    windingsC: [],
    energiesJ: [],
  };
  const shared = { theta: 0, open: false };
  let runS = 0;
  for (let cycle = 0; cycle < robot.cycles; cycle++) {
    for (const [index, step] of robot.steps.entries()) {
      runStep(step, index, cycle);
      runS += step.lastsS;
    }
  }
  for (const { state } of parts) {
    seen.windingsC.push(state[PLAIN.winding] as number);
    seen.energiesJ.push(state[PLAIN.energy] as number);
  }
  return seen;

  function runStep(step: RobotStep, index: number, cycle: number): void {
    parts.forEach((part, i) => {
      const before = part.command;
      part.command = step.moving.includes(i) ? "move" : step.holding.includes(i) ? "hold" : "off";
      const goesOn = part.drive.load.kind === "flywheel" && before !== "off" && part.command !== "off";
      if (goesOn && part.doing !== "open") {
        part.arrived = part.doing === "turning";
        if (part.arrived && part.command === "move") seen.arrivals.push({ mechanism: i, cycle, step: index, timeS: 0 });
        return;
      }
      part.arrived = false;
      part.state[PLAIN.progress] = 0;
      part.startedS = 0;
      if (part.doing !== "open") engage(part, 0);
    });
    for (let timeS = 0; timeS < step.lastsS - 1e-12; ) {
      const untilS = Math.min(step.lastsS, timeS + PIECE_S, ...parts.map(({ closesS }) => closesS));
      timeS = goTo(timeS, untilS, index, cycle);
      for (const part of parts) {
        if (part.doing !== "open" || part.closesS > timeS + 1e-12) continue;
        part.closesS = Number.POSITIVE_INFINITY;
        engage(part, timeS);
      }
    }
    for (const part of parts) part.closesS -= step.lastsS;
  }

  function engage(part: PlainPart, timeS: number): void {
    part.startedS = timeS;
    part.state[PLAIN.speed] = 0;
    const endless = part.drive.load.kind === "flywheel";
    if (part.command === "off") part.doing = "off";
    else if (part.command === "move" || endless) part.doing = part.arrived && !endless ? "holding" : "moving";
    else part.doing = "holding";
  }

  /** Advances to a time, or to the first event before it; returns the time reached. */
  function goTo(fromS: number, untilS: number, index: number, cycle: number): number {
    const start = [...parts.flatMap(({ state }) => state), shared.theta, 0, 0];
    look(fromS, start);
    const whole = solve(start, fromS, untilS - fromS);
    const late = eventsIn(whole);
    let lastsS = untilS - fromS;
    let end = whole;
    const first = late
      .map((event) => ({ event, lastsS: momentOf(event, start, fromS, untilS - fromS) }))
      .sort((one, other) => one.lastsS - other.lastsS)[0];
    if (first) {
      lastsS = first.lastsS;
      end = solve(start, fromS, lastsS);
    }
    take(end);
    look(fromS + lastsS, end);
    if (first) happen(first.event, fromS + lastsS, index, cycle);
    return fromS + lastsS;
  }

  function momentOf(event: PlainEvent, start: number[], fromS: number, lengthS: number): number {
    let [low, high] = [0, lengthS];
    let [below, above] = [event.value(start), event.value(solve(start, fromS, lengthS))];
    for (let k = 0; k < 60 && high - low > 1e-13; k++) {
      const guess = k % 3 === 2 ? (low + high) / 2 : low - (below * (high - low)) / (above - below);
      const value = event.value(solve(start, fromS, guess));
      if (Math.abs(value) < 1e-13) return guess;
      if (value < 0) [low, below] = [guess, value];
      else [high, above] = [guess, value];
    }
    return high;
  }

  function solve(start: number[], fromS: number, lengthS: number): number[] {
    if (lengthS <= 0) return start;
    return solveByOdex((timeS, state) => ratesAt(fromS + timeS, state).rates, start, lengthS, TOLERANCE);
  }

  function take(end: number[]): void {
    parts.forEach((part, i) => {
      for (let k = 0; k < PLAIN.size; k++) part.state[k] = end[i * PLAIN.size + k] as number;
    });
    const base = parts.length * PLAIN.size;
    shared.theta = end[base] as number;
    seen.chargeAs += end[base + 1] as number;
    seen.energyJ += end[base + 2] as number;
  }

  function look(timeS: number, state: number[]): void {
    const { volts, amperes } = ratesAt(timeS, state);
    seen.peakA = Math.max(seen.peakA, amperes);
    if (volts < seen.lowestV * (1 - 1e-9)) {
      seen.lowestV = volts;
      seen.lowestAtS = runS + timeS;
    }
  }

  interface PlainEvent {
    readonly part: number | "shared";
    readonly kind: "arrives" | "reaches-speed" | "trips";
    readonly value: (state: number[]) => number;
  }

  function eventsIn(end: number[]): PlainEvent[] {
    const found = parts.flatMap(({ drive, doing }, i): PlainEvent[] => {
      const own = (k: number) => (state: number[]) => state[i * PLAIN.size + k] as number;
      const { load, protection } = drive;
      const events: PlainEvent[] = [];
      if (doing === "moving" && load.kind === "flywheel") {
        events.push({ part: i, kind: "reaches-speed", value: (state) => own(PLAIN.speed)(state) - load.speedRadPerS });
      } else if (doing === "moving") {
        events.push({ part: i, kind: "arrives", value: (state) => own(PLAIN.progress)(state) - plainSpan(load) });
      }
      if (protection && doing !== "open")
        events.push({ part: i, kind: "trips", value: (state) => own(PLAIN.replica)(state) - 1 });
      return events;
    });
    if (robot.shared[0] && !shared.open) {
      found.push({ part: "shared", kind: "trips", value: (state) => (state[parts.length * PLAIN.size] as number) - 1 });
    }
    return found.filter(({ value }) => value(end) > 0);
  }

  function happen({ part: which, kind }: PlainEvent, timeS: number, step: number, cycle: number): void {
    if (which === "shared") {
      shared.open = true;
      seen.sharedTripsS.push(runS + timeS);
      for (const fed of robot.shared[0]?.feeds ?? []) stop(parts[fed] as PlainPart, Number.POSITIVE_INFINITY);
      return;
    }
    const part = parts[which] as PlainPart;
    if (kind === "trips") {
      seen.trips.push({ mechanism: which, atS: runS + timeS });
      const { protection } = part.drive;
      stop(
        part,
        protection?.kind === "breaker" && protection.resetsS !== undefined
          ? timeS + protection.resetsS
          : Number.POSITIVE_INFINITY,
      );
      return;
    }
    part.arrived = true;
    seen.arrivals.push({ mechanism: which, cycle, step, timeS });
    part.doing = kind === "arrives" ? "holding" : "turning";
    if (kind === "arrives") part.state[PLAIN.speed] = 0;
  }

  function stop(part: PlainPart, closesS: number): void {
    part.doing = "open";
    part.state[PLAIN.speed] = 0;
    part.closesS = closesS;
  }

  function ratesAt(timeS: number, state: readonly number[]): { volts: number; amperes: number; rates: number[] } {
    const { openCircuitV, resistanceOhm } = robot.supply;
    const all = (volts: number) =>
      parts.map((part, i) => partAt(part, timeS - part.startedS, state.slice(i * PLAIN.size, (i + 1) * PLAIN.size), volts));
    const sum = (volts: number): number => all(volts).reduce((total, one) => total + one.supplyA, 0);
    const misses = (volts: number): number => openCircuitV - resistanceOhm * sum(volts) - volts;
    let [v0, v1] = [openCircuitV, openCircuitV - resistanceOhm * sum(openCircuitV)];
    let [f0, f1] = [misses(v0), misses(v1)];
    for (let k = 0; k < 60 && Math.abs(f1) > 1e-13 && f1 !== f0; k++) {
      const next = v1 - (f1 * (v1 - v0)) / (f1 - f0);
      [v0, f0] = [v1, f1];
      v1 = next;
      f1 = misses(v1);
    }
    const found = all(v1);
    const amperes = found.reduce((total, one) => total + one.supplyA, 0);
    const rates = found.flatMap((one) => one.rates);
    const guard = robot.shared[0];
    const fed = guard ? found.reduce((total, one, i) => total + (guard.feeds.includes(i) ? one.supplyA : 0), 0) : 0;
    rates.push(guard ? replicaRate(guard.protection, fed, state[parts.length * PLAIN.size] as number) : 0);
    rates.push(Math.max(amperes, 0), v1 * Math.max(amperes, 0));
    return { volts: v1, amperes, rates };
  }
}

function partAt(part: PlainPart, timeS: number, state: readonly number[], volts: number): { supplyA: number; rates: number[] } {
  const supply: Supply = { openCircuitV: volts, resistanceOhm: 0, peukert: 1 };
  if (part.doing === "moving") {
    const { supplyA, rates } = plainInstant({ ...part.drive, supply }, timeS, state);
    rates[PLAIN.energy] = volts * Math.max(supplyA, 0);
    return { supplyA, rates };
  }
  return stillAt(part.drive, part.doing, state, volts);
}

/**
 * The voltage at the supply's terminals when several mechanisms draw from it at once.
 *
 * Each mechanism asks for the least of what its line gives at that voltage and a current that something caps: a limit, the
 * ground's grip, a hold. Capped, its controller lowers the duty, and it draws like a constant power. Deliberately not here: where
 * the figures come from (robotPart.ts).
 */

/** What one mechanism's draw depends on at an instant: n motors alike, one motor's values. Reused from call to call. */
export interface BusDemand {
  count: number;
  /** Share of full voltage at full command. */
  command: number;
  /** Lost in the controller, V. */
  dropV: number;
  /** Winding, leads and driver, ohm. */
  seriesOhm: number;
  /** Back-emf, V. */
  backV: number;
  /** What caps a driving current, A, and the voltage behind the switches that it needs. */
  capA: number;
  capV: number;
  /** Caps a current sent back, A. */
  limitA: number;
  /** Without inertia: past this current the speed follows, and only this share of a further rise of the line shows. Else Infinity and 1. */
  followsPastA: number;
  followShare: number;
  /** Drawn from the supply at the voltage last looked at, A, and its slope, A/V. */
  drawnA: number;
  slope: number;
}

export function createDemand(): BusDemand {
  return {
    count: 1,
    command: 0,
    dropV: 0,
    seriesOhm: 1,
    backV: 0,
    capA: Number.POSITIVE_INFINITY,
    capV: 0,
    limitA: Number.POSITIVE_INFINITY,
    followsPastA: Number.POSITIVE_INFINITY,
    followShare: 1,
    drawnA: 0,
    slope: 0,
  };
}

export interface SharedBus {
  readonly openCircuitV: number;
  readonly resistanceOhm: number;
  /** Highest V_b with V_b = V_oc − R·Σ drawn(V_b); each demand is then left as it is at that voltage. */
  readonly solve: (demands: readonly BusDemand[]) => number;
}

const MOST_NEWTON = 16;
const MOST_BISECTIONS = 200;
/** Of the open-circuit voltage: nearer than this a root is found. */
const CLOSE = 1e-15;

/** Starts each search at the last voltage found. */
export function createSharedBus(openCircuitV: number, resistanceOhm: number): SharedBus {
  let last = openCircuitV;

  function solve(demands: readonly BusDemand[]): number {
    if (resistanceOhm === 0) {
      excess(demands, openCircuitV);
      return openCircuitV;
    }
    const near = newton(demands, last);
    last = near !== null && isAlone(demands, near) ? near : highestRoot(demands);
    excess(demands, last);
    return last;
  }

  /** V_oc − R·Σ drawn(V) − V. */
  function excess(demands: readonly BusDemand[], volts: number): number {
    let drawn = 0;
    for (const demand of demands) {
      look(demand, volts);
      drawn += demand.drawnA;
    }
    return openCircuitV - resistanceOhm * drawn - volts;
  }

  /** −d(excess)/dV at the voltage last looked at. */
  function fall(demands: readonly BusDemand[]): number {
    let slope = 0;
    for (const demand of demands) slope += demand.slope;
    return 1 + resistanceOhm * slope;
  }

  function newton(demands: readonly BusDemand[], start: number): number | null {
    let volts = start;
    for (let k = 0; k < MOST_NEWTON; k++) {
      const step = excess(demands, volts) / fall(demands);
      if (!(fall(demands) > 0) || !Number.isFinite(step)) return null;
      volts += step;
      if (Math.abs(step) <= CLOSE * openCircuitV) return volts;
    }
    return null;
  }

  /**
   * True where no root can lie above: from V on, what is drawn falls by less than P/(V − V_drop)² for each volt, P = n·I·U of every cap,
   * and while R times that is below 1 the excess can only fall.
   */
  function isAlone(demands: readonly BusDemand[], volts: number): boolean {
    let steepest = 0;
    for (const { count, capA, capV, dropV } of demands) {
      if (!Number.isFinite(capA) || !(capA * capV > 0)) continue;
      const head = volts - dropV;
      if (!(head > 0)) return false;
      steepest += (count * capA * capV) / (head * head);
    }
    return resistanceOhm * steepest < 1;
  }

  /** From the top down, from kink to kink: between two of them the excess is concave, but for currents sent back at a limit. */
  function highestRoot(demands: readonly BusDemand[]): number {
    let high = openCircuitV;
    for (let k = 0; k < 100 && excess(demands, high) > 0; k++) high += Math.max(excess(demands, high), openCircuitV);
    const kinks = demands.flatMap(kinksOf).filter((volts) => volts > 0 && volts < high);
    for (const low of [...kinks.sort((one, other) => other - one), 0]) {
      const root = excess(demands, low) >= 0 ? bisect(demands, low, high) : descend(demands, low, high);
      if (root !== null) return root;
      high = low;
    }
    return 0;
  }

  function bisect(demands: readonly BusDemand[], low: number, high: number): number {
    let [from, to] = [low, high];
    for (let k = 0; k < MOST_BISECTIONS; k++) {
      const middle = (from + to) / 2;
      if (middle === from || middle === to) break;
      if (excess(demands, middle) >= 0) from = middle;
      else to = middle;
    }
    return from;
  }

  /** Both ends below 0: Newton's iteration from above meets the higher of two roots, or a slope that none can lie behind. */
  function descend(demands: readonly BusDemand[], low: number, high: number): number | null {
    let volts = high - 1e-12 * (high - low);
    for (let k = 0; k < MOST_BISECTIONS; k++) {
      const step = excess(demands, volts) / fall(demands);
      if (!(fall(demands) > 0) || volts + step < low) return null;
      if (Math.abs(step) <= CLOSE * openCircuitV) return volts;
      volts += step;
    }
    return null;
  }

  return { openCircuitV, resistanceOhm, solve };
}

/** Fills what the mechanism draws at a voltage. */
function look(demand: BusDemand, volts: number): void {
  const { count, command, seriesOhm, backV, capA, limitA, followsPastA, followShare } = demand;
  const head = Math.max(volts - demand.dropV, 0);
  let current = (command * head - backV) / seriesOhm;
  let slope = head > 0 ? command / seriesOhm : 0;
  if (current > followsPastA) {
    current = followsPastA + followShare * (current - followsPastA);
    slope *= followShare;
  }
  if (current > capA) {
    lower(demand, head, capA, demand.capV);
  } else if (current < -limitA) {
    lower(demand, head, -limitA, backV - limitA * seriesOhm);
  } else {
    demand.drawnA = count * command * current;
    demand.slope = count * command * slope;
  }
}

/** d·(V − V_drop) = U, I_s = n·d·I. */
function lower(demand: BusDemand, head: number, current: number, needed: number): void {
  const duty = head > 0 ? needed / head : demand.command;
  demand.drawnA = demand.count * duty * current;
  demand.slope = head > 0 ? -demand.drawnA / head : 0;
}

/** Voltages at which a mechanism's draw changes its formula. */
function kinksOf({ command, dropV, seriesOhm, backV, capA, limitA, followsPastA, followShare }: BusDemand): number[] {
  const voltsAt = (lineA: number): number => dropV + (lineA * seriesOhm + backV) / command;
  const capped = capA <= followsPastA ? capA : followsPastA + (capA - followsPastA) / followShare;
  return [dropV, voltsAt(capped), voltsAt(-limitA), voltsAt(followsPastA)].filter(Number.isFinite);
}

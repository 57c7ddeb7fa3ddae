/** The two methods and the search for events, on equations whose solutions are known. */
import { describe, expect, it } from "vitest";
import { createExplicitStepper } from "../../extension/model/explicitStepper.js";
import { integrate } from "../../extension/model/integrate.js";
import { factorise, solveFactorised } from "../../extension/model/linearSystem.js";
import { createStart, type OdeSystem, type Watch } from "../../extension/model/odeSystem.js";
import { createStiffStepper } from "../../extension/model/stiffStepper.js";

interface Equation {
  readonly size: number;
  readonly rates: (t: number, y: Float64Array) => number[];
  readonly jacobian: (t: number, y: Float64Array) => number[];
  readonly timeRates: (t: number, y: Float64Array) => number[];
}

/** y′ = −y² with time in it: x′ = −x²·cos t, x(0) = 1, x(t) = 1/(1 + sin t); and a swing v′ = −w, w′ = v. */
const known: Equation = {
  size: 3,
  rates: (t, [x = 0, v = 0, w = 0]) => [-x * x * Math.cos(t), -w, v],
  jacobian: (t, [x = 0]) => [-2 * x * Math.cos(t), 0, 0, 0, 0, -1, 0, 1, 0],
  timeRates: (t, [x = 0]) => [x * x * Math.sin(t), 0, 0],
};
const solution = (t: number): number[] => [1 / (1 + Math.sin(t)), Math.cos(t), Math.sin(t)];

function systemOf(
  equation: Equation,
  watches: readonly (Watch & { value: (t: number, y: Float64Array) => number })[] = [],
): OdeSystem {
  const watch = (t: number, y: Float64Array, watched: number[]): void => {
    watches.forEach((each, i) => {
      watched[i] = each.value(t, y);
    });
  };
  return {
    size: equation.size,
    coupled: equation.size,
    scale: new Float64Array(equation.size).fill(1),
    watches,
    evaluate: (t, y, rates) => rates.set(equation.rates(t, y)),
    prepare: (t, y, start, watched, stiff) => {
      start.rates.set(equation.rates(t, y));
      if (stiff) {
        start.jacobian.set(equation.jacobian(t, y));
        start.timeRates.set(equation.timeRates(t, y));
      }
      watch(t, y, watched);
    },
    watch,
  };
}

/** Largest error after stepping from 0 to 1 in n equal steps, at the end and halfway on the dense output of the last one. */
function errorsWith(method: "stiff" | "explicit", n: number): { readonly end: number; readonly dense: number } {
  const system = systemOf(known);
  const stepper = method === "stiff" ? createStiffStepper(system) : createExplicitStepper(system);
  const start = createStart(system.size, true);
  const state = Float64Array.from(solution(0));
  const inner = new Float64Array(system.size);
  let dense = 0;
  for (let k = 0; k < n; k++) {
    system.prepare(k / n, state, start, [], true);
    stepper.step(k / n, state, 1 / n, start);
    stepper.at(0.5, inner);
    dense = worst(inner, (k + 0.5) / n);
    state.set(stepper.end);
  }
  return { end: worst(state, 1), dense };
}

function worst(state: Float64Array, t: number): number {
  return Math.max(...solution(t).map((value, i) => Math.abs(value - (state[i] ?? Number.NaN))));
}

describe.each([
  { method: "stiff", order: 5, denseOrder: 4, n: 8 },
  { method: "explicit", order: 8, denseOrder: 7, n: 2 },
] as const)("the $method method", ({ method, order, denseOrder, n }) => {
  it(`is of order ${order}, its dense output of order ${denseOrder}`, () => {
    const coarse = errorsWith(method, n);
    const fine = errorsWith(method, 2 * n);
    expect(Math.log2(coarse.end / fine.end)).toBeGreaterThan(order - 0.5);
    expect(Math.log2(coarse.dense / fine.dense)).toBeGreaterThan(denseOrder - 0.5);
  });

  it("keeps the tolerance and lands on a stop to 1e-12", () => {
    const stop = {
      kind: "stop",
      crosses: "down",
      component: 1,
      value: (_: number, y: Float64Array) => (y[1] ?? 0) - 0.5,
    } as const;
    const state = Float64Array.from(solution(0));
    const course = { tolerance: 1e-10, endS: 10, firstStepS: 0.1, mostSteps: 1000, stiff: method === "stiff" };
    const arrival = integrate(systemOf(known, [stop]), 0, state, course);
    expect(arrival).toMatchObject({ stop: 0, finished: true });
    expect(arrival.timeS).toBeCloseTo(Math.PI / 3, 9);
    expect(state[1]).toBeCloseTo(0.5, 12);
    expect(state[0]).toBeCloseTo(1 / (1 + Math.sin(Math.PI / 3)), 9);
  });

  it("steps to a kink and sees a crossing there and back inside one step", () => {
    // x′ = |t − 0.3|: x(1) = (0.3² + 0.7²)/2.
    const bent: Equation = {
      size: 1,
      rates: (t) => [Math.abs(t - 0.3)],
      jacobian: () => [0],
      timeRates: (t) => [Math.sign(t - 0.3)],
    };
    const kink = { kind: "kink", crosses: "both", value: (t: number) => t - 0.3 } as const;
    const state = new Float64Array(1);
    const course = { tolerance: 1e-6, endS: 1, firstStepS: 1, mostSteps: 1000, stiff: method === "stiff" };
    integrate(systemOf(bent, [kink]), 0, state, course);
    expect(state[0]).toBeCloseTo(0.29, 8);

    const swing = {
      kind: "stop",
      crosses: "down",
      component: 1,
      value: (_: number, y: Float64Array) => (y[1] ?? 0) + 0.999,
    } as const;
    // From 2.2 rad on: v runs towards the border at first and away from it at the end of the one step.
    const swung = Float64Array.from([1, Math.cos(2.2), Math.sin(2.2)]);
    const long = { tolerance: 1, endS: 1, firstStepS: 1, mostSteps: 1000, stiff: method === "stiff" };
    const calm: Equation = {
      ...known,
      rates: (_, [, v = 0, w = 0]) => [0, -w, v],
      jacobian: () => [0, 0, 0, 0, 0, -1, 0, 1, 0],
      timeRates: () => [0, 0, 0],
    };
    expect(integrate(systemOf(calm, [swing]), 0, swung, long).timeS).toBeCloseTo(Math.acos(-0.999) - 2.2, 2);
  });

  it("tells notes without stopping, and ends where steps run out", () => {
    const heard: number[] = [];
    const note = { kind: "note", crosses: "up", value: (t: number) => t - 0.25 } as const;
    const course = { tolerance: 1e-8, endS: 1, firstStepS: 0.2, mostSteps: 1000, stiff: method === "stiff" };
    const state = Float64Array.from(solution(0));
    const end = integrate(systemOf(known, [note]), 0, state, { ...course, onNote: (_, timeS) => heard.push(timeS) });
    expect(end).toMatchObject({ timeS: 1, stop: null, finished: true });
    expect(heard).toHaveLength(1);
    expect(heard[0]).toBeCloseTo(0.25, 12);
    expect(integrate(systemOf(known), 0, Float64Array.from(solution(0)), { ...course, mostSteps: 2 }).finished).toBe(false);
  });
});

describe("the stiff method", () => {
  it("follows a slow course past a time constant of a millionth in few steps", () => {
    // y′ = −1e6·(y − cos t), settled at once to cos t (and a lag of 1e-6·sin t).
    const stiff: Equation = {
      size: 1,
      rates: (t, [y = 0]) => [-1e6 * (y - Math.cos(t))],
      jacobian: () => [-1e6],
      timeRates: (t) => [-1e6 * Math.sin(t)],
    };
    const state = Float64Array.from([0]);
    const arrival = integrate(systemOf(stiff), 0, state, {
      tolerance: 1e-9,
      endS: 1,
      firstStepS: 1e-7,
      mostSteps: 2000,
      stiff: true,
    });
    expect(state[0]).toBeCloseTo(Math.cos(1) + 1e-6 * Math.sin(1), 9);
    expect(arrival.steps).toBeLessThan(500);
  });
});

describe("a small linear system", () => {
  it("is solved with row exchanges", () => {
    const matrix = Float64Array.from([0, 2, 1, 1, -2, -3, -1, 1, 2]);
    const vector = Float64Array.from([7, -12, 7]);
    const pivots = new Int32Array(3);
    factorise(matrix, pivots, 3);
    solveFactorised(matrix, pivots, 3, vector);
    // 2y + z = 7, x − 2y − 3z = −12, −x + y + 2z = 7 has x = 1, y = 2, z = 3.
    expect(Array.from(vector, (value) => Math.round(value * 1e12) / 1e12)).toEqual([1, 2, 3]);
  });
});

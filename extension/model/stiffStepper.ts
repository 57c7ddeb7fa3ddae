/**
 * One step of a Rosenbrock method, for systems whose short time constants would force an explicit method to tiny steps.
 *
 * Deliberately not here: choosing steps and watching for events (integrate.ts), and what is integrated.
 */
import { factorise, solveFactorised } from "./linearSystem.js";
import { ARGUMENT, COUPLING, DENSE, GAMMA, NODES, STAGES, TIME } from "./rodas5p.js";
import type { Rates, Stepper, StepStart } from "./stepper.js";

/** Rodas5P; needs the Jacobian and time derivatives of the start. */
export function createStiffStepper({ size: n, evaluate }: Rates): Stepper {
  const matrix = new Float64Array(n * n);
  const pivots = new Int32Array(n);
  const stages = Array.from({ length: STAGES }, () => new Float64Array(n));
  const bends = Array.from({ length: DENSE.length }, () => new Float64Array(n));
  const [bend1, bend2, bend3] = bends as [Float64Array, Float64Array, Float64Array];
  const begin = new Float64Array(n);
  const argument = new Float64Array(n);
  const end = new Float64Array(n);
  const error = stages[STAGES - 1] as Float64Array;
  let bent = false;

  function step(timeS: number, state: Float64Array, lengthS: number, start: StepStart): void {
    bent = false;
    begin.set(state);
    const diagonal = 1 / (GAMMA * lengthS);
    for (let i = 0; i < n * n; i++) matrix[i] = -(start.jacobian[i] as number);
    for (let i = 0; i < n; i++) (matrix[i * n + i] as number) += diagonal;
    factorise(matrix, pivots, n);
    for (let stage = 0; stage < STAGES; stage++) takeStage(stage, timeS, lengthS, start);
    const last = stages[STAGES - 1] as Float64Array;
    for (let i = 0; i < n; i++) end[i] = (argument[i] as number) + (last[i] as number);
  }

  /** (I/(γh) − J)·u_i = f(t + c_i·h, y + Σ a_ij·u_j) + Σ C_ij·u_j/h + d_i·h·∂f/∂t. */
  function takeStage(stage: number, timeS: number, lengthS: number, start: StepStart): void {
    const u = stages[stage] as Float64Array;
    if (stage === 0) {
      u.set(start.rates);
    } else {
      combine(argument, ARGUMENT[stage] as readonly number[], stages, n);
      for (let i = 0; i < n; i++) (argument[i] as number) += begin[i] as number;
      evaluate(timeS + (NODES[stage] as number) * lengthS, argument, u);
    }
    const coupling = COUPLING[stage] as readonly number[];
    for (let j = 0; j < coupling.length; j++) {
      const weight = (coupling[j] as number) / lengthS;
      const earlier = stages[j] as Float64Array;
      for (let i = 0; i < n; i++) (u[i] as number) += weight * (earlier[i] as number);
    }
    const time = (TIME[stage] as number) * lengthS;
    if (time !== 0) for (let i = 0; i < n; i++) (u[i] as number) += time * (start.timeRates[i] as number);
    solveFactorised(matrix, pivots, n, u);
  }

  function bend(): void {
    if (bent) return;
    bent = true;
    for (let k = 0; k < DENSE.length; k++) combine(bends[k] as Float64Array, DENSE[k] as readonly number[], stages, n);
  }

  function componentAt(share: number, i: number): number {
    bend();
    const rest = 1 - share;
    const inner = (bend1[i] as number) + share * ((bend2[i] as number) + share * (bend3[i] as number));
    return rest * (begin[i] as number) + share * ((end[i] as number) + rest * inner);
  }

  function at(share: number, state: Float64Array): void {
    for (let i = 0; i < n; i++) state[i] = componentAt(share, i);
  }

  function errorSize(scale: Float64Array, tolerance: number): number {
    let worst = 0;
    for (let i = 0; i < n; i++) {
      const size = Math.abs(error[i] as number) / (tolerance * ((scale[i] as number) + Math.abs(end[i] as number)));
      // Not a number must not pass.
      if (!(size <= worst)) worst = size;
    }
    return worst;
  }

  return { end, step, errorSize, growthPower: 0.2, at, componentAt };
}

function combine(into: Float64Array, weights: readonly number[], vectors: readonly Float64Array[], n: number): void {
  into.fill(0);
  for (let j = 0; j < weights.length; j++) {
    const weight = weights[j] as number;
    const vector = vectors[j] as Float64Array;
    for (let i = 0; i < n; i++) (into[i] as number) += weight * (vector[i] as number);
  }
}

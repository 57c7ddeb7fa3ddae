/** General-purpose solvers of ordinary differential equations that the model's own integrator is compared with. */
import { createRequire } from "node:module";
import { all, create } from "mathjs";

export type Rates = (timeS: number, state: number[]) => number[];

interface OdexSolver {
  absoluteTolerance: number;
  relativeTolerance: number;
  maxSteps: number;
  initialStepSize: number;
  solve(
    rates: Rates,
    fromS: number,
    start: number[],
    toS: number,
  ): { readonly y: number[]; readonly outcome: number; readonly nEval: number };
}

// The package's TypeScript sources would be type-checked by our rules; only its JavaScript is wanted.
const { Solver } = createRequire(import.meta.url)("odex") as { readonly Solver: new (size: number) => OdexSolver };

/** Hairer's extrapolation method. */
export function solveByOdex(rates: Rates, start: readonly number[], toS: number, tolerance: number): number[] {
  const solver = new Solver(start.length);
  solver.absoluteTolerance = tolerance;
  solver.relativeTolerance = tolerance;
  solver.initialStepSize = toS / 1000;
  solver.maxSteps = 1_000_000;
  const result = solver.solve(rates, 0, [...start], toS);
  if (result.outcome !== 0) throw new Error(`odex did not converge: outcome ${result.outcome}`);
  return result.y;
}

const math = create(all ?? {}) as unknown as {
  solveODE(
    rates: Rates,
    span: readonly [number, number],
    start: number[],
    options: object,
  ): { readonly t: number[]; readonly y: number[][] };
};

/** Dormand and Prince's method of order 5. */
export function solveByMathjs(rates: Rates, start: readonly number[], toS: number, tolerance: number): number[] {
  const options = { method: "RK45", tol: tolerance, firstStep: toS / 1000, maxIter: 100_000 };
  return math.solveODE(rates, [0, toS], [...start], options).y.at(-1) ?? [];
}

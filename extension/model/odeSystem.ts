/** What can be integrated: rates with watched values. Deliberately only the contract between systems and integrate.ts. */
import type { Rates, StepStart } from "./stepper.js";

/**
 * A watched value of the state: `kink` ends a step where the rates change their formula, `stop` ends the integration, `note`
 * is only reported. A change of sign counts in the given direction.
 */
export interface Watch {
  readonly kind: "kink" | "stop" | "note";
  readonly crosses: "up" | "down" | "both";
  /** Component that the value follows one to one, up to a constant: a crossing there and back inside a step is then seen too. */
  readonly component?: number;
}

export interface OdeSystem extends Rates {
  /** Size of each component that counts as 1 for the tolerance. */
  readonly scale: Float64Array;
  readonly watches: readonly Watch[];
  /** Everything at a point where a step may start: rates and watched values; their derivatives too for a stiff method. */
  readonly prepare: (timeS: number, state: Float64Array, start: StepStart, watched: number[], stiff: boolean) => void;
  /** The point last prepared is taken: a course begins there or a step ends there. */
  readonly accept?: () => void;
  /** The watched values at a point. */
  readonly watch: (timeS: number, state: Float64Array, watched: number[]) => void;
}

/** Arrays for a step's start; derivatives only where a stiff method needs them. */
export function createStart(size: number, stiff: boolean): StepStart {
  const derivatives = stiff ? size : 0;
  return {
    rates: new Float64Array(size),
    jacobian: new Float64Array(derivatives * size),
    timeRates: new Float64Array(derivatives),
  };
}

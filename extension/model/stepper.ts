/** What a method of integration offers for one step. Deliberately only the contract: see stiffStepper.ts and explicitStepper.ts. */

/** dy/dt = f(t, y). */
export interface Rates {
  readonly size: number;
  /** Leading components that rates depend on; the rest are sums that nothing depends on. */
  readonly coupled: number;
  /** f at a point, into `rates`. */
  readonly evaluate: (timeS: number, state: Float64Array, rates: Float64Array) => void;
}

/** f, ∂f/∂y (row-major) and ∂f/∂t at the start of a step. */
export interface StepStart {
  readonly rates: Float64Array;
  readonly jacobian: Float64Array;
  readonly timeRates: Float64Array;
}

export interface Stepper {
  /** State at the end of the last step tried. */
  readonly end: Float64Array;
  /** Tries a step; the result is in `end`. */
  readonly step: (timeS: number, state: Float64Array, lengthS: number, start: StepStart) => void;
  /** Error estimate of the last step tried over what is allowed: at most 1 passes. `scale` counts as 1 beside the value itself. */
  readonly errorSize: (scale: Float64Array, tolerance: number) => number;
  /** The error grows with the step's length to the power of 1 over this. */
  readonly growthPower: number;
  /** State at a share 0…1 of the last step tried. */
  readonly at: (share: number, state: Float64Array) => void;
  /** One component of it. */
  readonly componentAt: (share: number, component: number) => number;
}

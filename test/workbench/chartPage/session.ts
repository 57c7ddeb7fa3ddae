// Hands the running chart host to the test modules of this folder; the run sets it once before it starts them.

import type { ChartHost } from "./chartHost.js";

let current: ChartHost | undefined;

export function useChartHost(host: ChartHost): void {
  current = host;
}

export function chartHost(): ChartHost {
  if (!current) throw new Error("The tests of the chart's page are started by test/run.mjs, which starts their host first.");
  return current;
}

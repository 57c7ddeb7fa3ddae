/** The views of the chart panel by name. A new view adds its file beside this one and a line here. */
import { createMattersFeature } from "./matters.js";
import { operatingPointFeature } from "./operatingPoint.js";
import { createPowerFeature } from "./power.js";
import { createRatioMapFeature } from "./ratioMap.js";
import { travelFeature } from "./travel.js";

/** What some of them keep between two questions lives as long as what this returns. */
export function createChartFeatures() {
  return {
    "operating-point": operatingPointFeature,
    travel: travelFeature,
    "ratio-map": createRatioMapFeature(),
    matters: createMattersFeature(),
    power: createPowerFeature(),
  } as const;
}

export type ChartFeatures = ReturnType<typeof createChartFeatures>;

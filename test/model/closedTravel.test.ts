/** The closed form of a travel against the integrator, which knows nothing of it. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { hasClosedForm } from "../../extension/model/closedTravel.js";
import { plantOf } from "../../extension/model/plant.js";
import { solveTravel } from "../../extension/model/travel.js";
import { goalOf } from "../../extension/model/travelGoal.js";
import { integrateTravel } from "../../extension/model/travelRun.js";
import "./expectShare.js";
import { someDrive } from "./randomDrives.js";

const closed = someDrive.filter((drive) => {
  const plant = plantOf(drive);
  return hasClosedForm(plant) && plant.load.kind !== "roller" && (plant.load.endless || plant.spanRad > 1e-6);
});

describe("a travel in closed form", () => {
  it("agrees with the integrator to 1e-8", () => {
    fc.assert(
      fc.property(closed, (drive) => {
        const plant = plantOf(drive);
        const formula = solveTravel(drive);
        const integrated = integrateTravel(plant, goalOf(plant), {});
        expect(formula?.outcome).toBe(integrated.outcome);
        expect(formula?.timeS ?? 0).toBeCloseToShare(integrated.timeS ?? 0, 1e-8);
        expect(formula?.endSpeed).toBeCloseToShare(integrated.endSpeed, 1e-8);
        // A steady current far below the starting one is a small difference of large voltages: sums are judged by the full current.
        const full = integrated.peakMotorCurrentA ** 2 * integrated.coveredS;
        const square = (travel: typeof integrated | null): number =>
          (travel?.rmsMotorCurrentA ?? 0) ** 2 * (travel?.coveredS ?? 0);
        expect(Math.abs(square(formula) - square(integrated))).toBeLessThanOrEqual(1e-8 * (square(integrated) + 0.1 * full));
        const most = (drive.supply?.openCircuitV ?? drive.motor.voltageV) * integrated.peakSourceCurrentA * integrated.coveredS;
        const energyOff = Math.abs((formula?.sourceEnergyJ ?? 0) - integrated.sourceEnergyJ);
        expect(energyOff).toBeLessThanOrEqual(1e-8 * (integrated.sourceEnergyJ + 0.1 * most));
        expect(formula?.peakMotorCurrentA).toBeCloseToShare(integrated.peakMotorCurrentA, 1e-8);
      }),
      { numRuns: 120, seed: 11 },
    );
  }, 60_000);
});

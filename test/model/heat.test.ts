/** Heat in the long run: closed forms against the integrator, runaway, magnets, repeats. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Drive, ThermalConstants } from "../../extension/model/drive.js";
import {
  heatingCurve,
  heatNetworkOf,
  heatTimeConstants,
  riseToCome,
  steadyHeat,
  timeToTemperature,
} from "../../extension/model/heat.js";
import { solveHeld } from "../../extension/model/heldRun.js";
import { coldState } from "../../extension/model/motionState.js";
import { plantOf } from "../../extension/model/plant.js";
import { solveRelease } from "../../extension/model/release.js";
import { solveRepeats } from "../../extension/model/repeats.js";
import { solveHold, solveStall, solveTurning } from "../../extension/model/runs.js";
import { solveMechanism } from "../../extension/model/solve.js";
import { motorAt } from "../../extension/model/temperature.js";
import { solveTravel } from "../../extension/model/travel.js";
import { armOf, driveOf, liftOf, plainMotor, reduction, rollerOf } from "./drives.js";
import "./expectShare.js";
import { someDrive } from "./randomDrives.js";

const thermal: ThermalConstants = {
  windingToHousingKPerW: 2,
  housingToAmbientKPerW: 8,
  windingTimeS: 12,
  housingTimeS: 600,
  limitC: 120,
};
const warm = { ...plainMotor, thermal };
const network = heatNetworkOf(warm);
if (!network) throw new Error("no network");

describe("holding", () => {
  const drive = driveOf({ motor: warm, load: liftOf(6, 0.05, 1), stages: [reduction(20, 0.9)], holdForS: 60 });

  it("in closed form agrees with the integrator", () => {
    const hold = solveHold(drive);
    // Handing a state on takes the other way: integration from the same cold start.
    const integrated = solveHold(drive, coldState(plantOf(drive)));
    expect(hold?.windingFinalC).toBeCloseToShare(integrated?.windingFinalC ?? 0, 1e-8);
    expect(hold?.carried.housingC).toBeCloseToShare(integrated?.carried.housingC ?? 0, 1e-8);
    // Longer than it is held for, and told all the same.
    expect(hold?.limitAfterS ?? 0).toBeGreaterThan(60);
    expect(hold?.limitAfterS).toBeCloseToShare(integrated?.limitAfterS ?? 0, 1e-7);
    const light = { ...drive, load: liftOf(2, 0.05, 1) };
    expect(solveHold(light)?.limitAfterS).toBeNull();
    expect(solveHold(light, coldState(plantOf(light)))?.limitAfterS).toBeNull();
  });

  it("approaches the steady temperature, which balances the heat", () => {
    const { holdForS, ...forEver } = drive;
    const hold = solveHold(forEver);
    const hot = motorAt(warm, hold?.windingFinalC ?? 0);
    const copper = (hold?.motorCurrentA ?? 0) ** 2 * hot.resistanceOhm;
    expect(holdForS).toBe(60);
    expect((hold?.windingFinalC ?? 0) - 25).toBeCloseToShare(copper * 10, 1e-9);
    expect(heatingCurve(network, { atAmbientW: 0, perKW: 0 }, 1e6).windingC).toBe(25);
  });

  it("says when the heat runs away", () => {
    const hold = solveHold(driveOf({ motor: warm, load: liftOf(40, 0.05, 1) }));
    expect(hold).toMatchObject({ runsAway: true, windingFinalC: null });
    expect(hold?.limitAfterS).toBeGreaterThan(0);
  });

  it("needs more current as magnets weaken, and gets hotter for it", () => {
    const forEver = driveOf({ motor: warm, load: liftOf(3, 0.05, 1), stages: [reduction(20, 0.9)] });
    const plain = solveHold(forEver);
    const magnet = solveHold({ ...forEver, motor: { ...warm, magnet: "ferrite" } });
    expect(magnet?.windingFinalC ?? 0).toBeGreaterThan(plain?.windingFinalC ?? Number.POSITIVE_INFINITY);
  });
});

describe("the share of stall, hot", () => {
  const drive = driveOf({ motor: warm, load: liftOf(4, 0.05, 1), stages: [reduction(20, 0.9)] });
  const hardestOf = (changes: Partial<Drive>) => solveMechanism({ ...drive, ...changes }).hardest;

  it("counts the declared hold, and grows as the copper's resistance does", () => {
    const { hotWindingC, hotStallShare, stallShare } = hardestOf({ holdForS: 40 });
    expect(hotWindingC).toBe(solveHold({ ...drive, holdForS: 40 })?.windingFinalC);
    const hotter = motorAt(warm, hotWindingC ?? 25).resistanceOhm / warm.resistanceOhm;
    expect(hotter).toBeGreaterThan(1.01);
    // Stall torque is k_t·V/R.
    expect(hotStallShare).toBeCloseToShare((stallShare ?? 0) * hotter, 1e-12);
    expect(hardestOf({}).hotWindingC).toBeCloseToShare(solveTravel(drive)?.windingPeakC ?? 0, 1e-12);
  });

  it("counts repeats and what turns on, stops at the limit, and is unknown without thermal data", () => {
    expect(hardestOf({ everyS: 3 }).hotWindingC).toBe(solveRepeats({ ...drive, everyS: 3 })?.windingPeakC);
    const roller = driveOf({ motor: warm, load: rollerOf(0.3), stages: [reduction(10, 0.9)] });
    expect(solveTurning(roller)?.windingFinalC).toBeGreaterThan(30);
    expect(solveMechanism(roller).hardest.hotWindingC).toBe(solveTurning(roller)?.windingFinalC);
    expect(hardestOf({ load: liftOf(40, 0.05, 1), holdForS: 1e6 }).hotWindingC).toBe(120);
    expect(hardestOf({ motor: plainMotor })).toMatchObject({ hotWindingC: null, hotStallShare: null });
  });

  it("weakens magnets too", () => {
    const magnets = hardestOf({ holdForS: 40, motor: { ...warm, magnet: "ferrite" } });
    const rise = (magnets.hotWindingC ?? 25) - 25;
    const hotter = motorAt(warm, magnets.hotWindingC ?? 25).resistanceOhm / warm.resistanceOhm;
    // Ferrite: −0.2 %/K.
    expect(magnets.hotStallShare).toBeCloseToShare(((magnets.stallShare ?? 0) * hotter) / (1 - 0.002 * rise), 1e-9);
  });
});

describe("the two-node curve", () => {
  it("starts at the copper's rate, ends at the steady state, and reaches a temperature when it says", () => {
    const heat = { atAmbientW: 6, perKW: 0.02 };
    const rate = (heatingCurve(network, heat, 1e-4).windingC - 25) / 1e-4;
    expect(rate).toBeCloseToShare(6 / network.windingJPerK, 1e-4);
    const steady = steadyHeat(network, (windingC) => 6 + 0.02 * (windingC - 25));
    const long = heatingCurve(network, heat, 100 * heatTimeConstants(network)[1]);
    expect(long.windingC).toBeCloseToShare(steady?.windingC ?? 0, 1e-9);
    expect(long.housingC).toBeCloseToShare(steady?.housingC ?? 0, 1e-9);
    const when = timeToTemperature(network, heat, 60);
    expect(heatingCurve(network, heat, when ?? 0).windingC).toBeCloseTo(60, 8);
    expect(timeToTemperature(network, heat, 500)).toBeNull();
  });
});

describe("what cycles to come still rise", () => {
  it("is the way to the steady state, from the first of them, whatever their length and however near the time constants", () => {
    for (const housingTimeS of [600, 20]) {
      const near = heatNetworkOf({ ...plainMotor, thermal: { ...thermal, housingTimeS } });
      if (!near) throw new Error("no network");
      for (const cycleS of [1e-3, 5, 300]) {
        const first = heatingCurve(near, { atAmbientW: 6, perKW: 0 }, cycleS);
        const rise = riseToCome(near, cycleS, { windingK: first.windingC - 25, housingK: first.housingC - 25 });
        // 6 W through 2 K/W and 8 K/W.
        expect(rise.windingK).toBeCloseToShare(60, 1e-7);
        expect(rise.housingK).toBeCloseToShare(48, 1e-7);
      }
    }
  });
});

describe("a loaded winding", () => {
  it("is never cooled below ambient by heat, whatever moves", () => {
    fc.assert(
      fc.property(someDrive, fc.double({ min: -20, max: 60, noNaN: true }), (drive, ambientC) => {
        const motor = { ...drive.motor, thermal: { ...thermal, ambientC } };
        const travel = solveTravel({ ...drive, motor });
        if (!travel) return;
        expect(travel.windingPeakC ?? Number.NaN).toBeGreaterThanOrEqual(ambientC);
        expect(travel.carried.windingC).toBeGreaterThanOrEqual(ambientC - 1e-6);
        expect(travel.carried.housingC).toBeGreaterThanOrEqual(ambientC - 1e-6);
      }),
      { numRuns: 60, seed: 3 },
    );
  }, 60_000);

  it("stalled, heats to its limit the sooner the more it draws", () => {
    const full = solveStall(driveOf({ motor: warm }));
    const limited = solveStall(driveOf({ motor: warm, motorCurrentLimitA: 25 }));
    expect(full.limitAfterS ?? 0).toBeGreaterThan(0);
    expect(limited.limitAfterS ?? 0).toBeGreaterThan(full.limitAfterS ?? Number.POSITIVE_INFINITY);
  });
});

describe("turning for long", () => {
  it("heats a roller's motor by copper and its own friction", () => {
    const run = solveTurning(driveOf({ motor: warm, load: rollerOf(0.8), stages: [reduction(10, 0.9)] }));
    expect(run?.windingFinalC).toBeGreaterThan(25);
    expect(run?.trip.opensAfterS).toBeNull();
    expect(solveTurning(driveOf())).toBeNull();
  });

  it("keeps a declared speed by a lowered duty and so draws less from the supply", () => {
    const roller = { ...rollerOf(0.8), speedRadPerS: 10 };
    const slow = solveTurning(driveOf({ motor: warm, load: roller, stages: [reduction(10, 0.9)] }));
    const fast = solveTurning(driveOf({ motor: warm, load: rollerOf(0.8), stages: [reduction(10, 0.9)] }));
    expect(slow?.sourceCurrentA ?? 0).toBeLessThan(fast?.sourceCurrentA ?? 0);
  });
});

describe("repeats", () => {
  it("settle where a cycle's mean copper heat is steady, between one travel and holding the rms current for ever", () => {
    const drive = driveOf({ motor: warm, load: armOf(1, 0.4, -1, 1), stages: [reduction(60, 0.8)], everyS: 6 });
    const repeated = solveRepeats(drive);
    const travel = solveTravel(drive);
    expect(repeated).toMatchObject({ runsAway: false, fits: true, tripsAfterS: null });
    expect(repeated?.windingPeakC ?? 0).toBeGreaterThan(travel?.windingPeakC ?? Number.POSITIVE_INFINITY);
    // Mean copper heat over the cycle, at the peak's resistance, times both resistances bounds the mean rise.
    const meanSquare = ((travel?.rmsMotorCurrentA ?? 0) ** 2 * (travel?.timeS ?? 0)) / 6;
    const bound = 25 + meanSquare * motorAt(warm, repeated?.windingPeakC ?? 25).resistanceOhm * 10;
    const swing = (travel?.windingPeakC ?? 25) - 25;
    expect(repeated?.windingPeakC ?? 0).toBeLessThan(bound + 2 * swing + 1);
    expect(solveRepeats({ ...drive, everyS: 0.2 })?.fits).toBe(false);
  });

  it("of a slow motor come to the balance of mean copper heat, however many cycles that takes", () => {
    // No losses but copper: 2 K/W and 8 K/W carry rms² · R(T) of a cycle much shorter than 300 s and 5000 s.
    const lossless = { ...plainMotor, noLoadCurrentA: 0, torqueConstantNmPerA: plainMotor.backEmfVPerRadPerS };
    const slow = { ...lossless, thermal: { ...thermal, windingTimeS: 300, housingTimeS: 5000 } };
    const drive = driveOf({ motor: slow, load: liftOf(4, 0.05, 1), everyS: 3 });
    const repeated = solveRepeats(drive);
    const travel = solveTravel(drive);
    const meanSquare = ((travel?.rmsMotorCurrentA ?? 0) ** 2 * (travel?.timeS ?? 0)) / 3;
    // T = 25 + 10·rms²·R_25·(1 + α·(T − 25)/(1 + 5α)), solved for T; hot, the travel itself takes a little longer.
    const growth = 0.00393 / (1 + 0.00393 * 5);
    const cold = 10 * meanSquare * slow.resistanceOhm;
    const balance = 25 + cold / (1 - cold * growth);
    expect(cold).toBeGreaterThan(5);
    expect(repeated?.runsAway).toBe(false);
    expect(Math.abs((repeated?.windingPeakC ?? 0) - balance)).toBeLessThan(0.05 * (balance - 25));
  });

  it("that only hot take longer than the time between them leave no rest in the end", () => {
    const weak = { ...plainMotor, resistanceOhm: 3, torqueConstantNmPerA: 0.5, backEmfVPerRadPerS: 1.1, noLoadCurrentA: 0.01 };
    const hot = { ...weak, thermal: { ...thermal, windingToHousingKPerW: 4, windingTimeS: 10, housingTimeS: 300 } };
    const lifting = (massKg: number) => driveOf({ motor: hot, load: liftOf(massKg, 0.02, 0.5), stages: [reduction(1)] });
    const coldS = solveTravel(lifting(4.5))?.timeS ?? 0;
    const repeating = (massKg: number, everyS: number) => solveRepeats({ ...lifting(massKg), everyS });
    expect(repeating(4.5, 20 * coldS)?.fits).toBe(true);
    const tight = repeating(4.5, 1.6 * coldS);
    expect(tight).toMatchObject({ runsAway: false, fits: false });
    expect(Math.abs((tight?.windingPeakC ?? 0) - (repeating(4.5, 0.1)?.windingPeakC ?? 1e9))).toBeLessThan(0.3);
    // Somewhat heavier it does not arrive at all any more once it is hot, though it does when cold.
    expect(solveTravel(lifting(7))?.outcome).toBe("arrives");
    expect(repeating(7, 0.1)).toMatchObject({ runsAway: true, windingPeakC: null });
  });

  it("open a breaker that one travel leaves closed", () => {
    const drive = driveOf({
      load: armOf(4, 0.4, -1, 1),
      stages: [reduction(60, 0.8)],
      everyS: 0.8,
      protection: { kind: "breaker", holdCurrentA: 12, tripsAtA: 24, tripsAfterS: 3, carries: "motor" },
    });
    expect(solveTravel(drive)?.opensAfterS).toBeNull();
    expect(solveRepeats(drive)?.tripsAfterS ?? 0).toBeGreaterThan(0.8);
  });

  it("a flywheel's release takes its energy from all that turns, rotors too", () => {
    const drive = driveOf({
      motor: { ...plainMotor, rotorInertiaKgM2: 2e-5 },
      stages: [reduction(0.5)],
      load: { kind: "flywheel", inertiaKgM2: 1e-3, speedRadPerS: 600, dragNm: 0.05, releaseEnergyJ: 40 },
    });
    const release = solveRelease(drive);
    const inertia = 1e-3 + 2e-5 * 0.25;
    expect(release?.speedAfterRadPerS).toBeCloseToShare(Math.sqrt(600 ** 2 - 80 / inertia), 1e-12);
    expect(release?.recovery.outcome).toBe("arrives");
    expect(release?.recovery.timeS ?? 0).toBeLessThan(solveTravel(drive)?.timeS ?? 0);
  });
});

describe("resting", () => {
  it("cools a warm motor towards ambient", () => {
    const plant = plantOf(driveOf({ motor: warm }));
    const rest = solveHeld(plant, { kind: "held", torqueNm: 0, motorSpeedRadPerS: 0 }, 600, {
      windingC: 100,
      housingC: 80,
      protection: 0,
      fast: 0,
    });
    expect(rest.carried.windingC).toBeLessThan(60);
    expect(rest.carried.windingC).toBeGreaterThan(25);
  });
});

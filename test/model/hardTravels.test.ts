/** Travels that are hard to follow: corners, loads that fade to nothing, speeds that heat puts out of reach, ramps on light wheels. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Curve, Drive, Load } from "../../extension/model/drive.js";
import { operatingPointAt } from "../../extension/model/operatingPoint.js";
import { pieceAround } from "../../extension/model/piece.js";
import { plantOf } from "../../extension/model/plant.js";
import { trainOf } from "../../extension/model/stages.js";
import { solveTravel } from "../../extension/model/travel.js";
import { armOf, driveOf, plainMotor, reduction } from "./drives.js";
import "./expectShare.js";
import { someDrive } from "./randomDrives.js";

const thermal = { windingToHousingKPerW: 3, housingToAmbientKPerW: 9, windingTimeS: 4, housingTimeS: 300, limitC: 130 };

describe("the load between two corners", () => {
  const torqueNm: Curve = [
    [0, 1],
    [1, 5],
    [3, 2],
  ];
  const inertiaKgM2: Curve = [
    [0, 0.4],
    [2, 0.1],
    [3, 0.1],
  ];
  const plant = plantOf(driveOf({ load: { kind: "loadCurve", torqueNm, inertiaKgM2 }, dragNm: 0.5 }));

  it("is the same inside, and goes on straight beyond", () => {
    const { load } = pieceAround(plant, 1.5);
    for (const position of [1, 1.3, 1.99]) {
      expect(load.opposing(position, 1)).toBeCloseTo(plant.load.opposing(position, 1), 12);
      expect(load.inertia(position)).toBeCloseTo(plant.load.inertia(position), 12);
    }
    expect(load.opposing(0.5, 1)).toBeCloseTo(5 + 0.5 * 1.5 + 0.5, 12);
    expect(load.opposing(4, 1)).toBeCloseTo(2 - 1.5 + 0.5, 12);
    // From 0.4 down to 0.1 over 2 rad: half of 0.1 is met a third of a rad further on, and is the least.
    expect(load.inertia(2.2)).toBeCloseTo(0.07, 12);
    expect(load.inertia(3)).toBeCloseTo(0.05, 12);
    expect(load.corners).toEqual([]);
    expect([load.startRad, load.endRad]).toEqual([plant.load.startRad, plant.load.endRad]);
  });

  it("is the plant itself where the load has no curves", () => {
    const arm = plantOf(driveOf({ load: armOf(1, 0.3, -1, 1) }));
    expect(pieceAround(arm, 0)).toBe(arm);
  });

  it("keeps a counterbalance's end value beyond its list", () => {
    const spring: Load = {
      ...armOf(1, 0.3, -1, 1),
      counterbalanceNm: [
        [-0.5, 2],
        [0.5, 1],
      ] as const,
    };
    const whole = plantOf(driveOf({ load: spring }));
    expect(pieceAround(whole, -0.8).load.restTorque(-0.9)).toBeCloseTo(whole.load.restTorque(-0.9), 12);
    expect(pieceAround(whole, 0.9).load.restTorque(0.7)).toBeCloseTo(whole.load.restTorque(0.7), 12);
  });

  it("takes as long as the same curve with points in between", () => {
    const finer = (curve: Curve): Curve =>
      curve.flatMap(([x, y], i) => {
        const next = curve[i + 1];
        return next ? [[x, y] as const, [(x + next[0]) / 2, (y + next[1]) / 2] as const] : [[x, y] as const];
      });
    const timeOf = (load: Load) => solveTravel(driveOf({ load, stages: [reduction(20, 0.9, 1e-5)] }))?.timeS;
    const coarse = timeOf({ kind: "loadCurve", torqueNm, inertiaKgM2 });
    expect(timeOf({ kind: "loadCurve", torqueNm: finer(torqueNm), inertiaKgM2: finer(inertiaKgM2) })).toBeCloseToShare(
      coarse ?? 0,
      1e-8,
    );
  });
});

describe("a flywheel", () => {
  const wheel = (speedRadPerS: number): Load => ({ kind: "flywheel", inertiaKgM2: 0.02, speedRadPerS, dragNm: 2 });

  it("asked for a speed that its motors reach only cold, ends where it is quickest", () => {
    const drive = driveOf({ motor: { ...plainMotor, thermal }, load: wheel(0), stages: [reduction(20, 0.9)] });
    const steady = operatingPointAt(drive, 2 / 0.9 / 20).speedRadPerS / 20;
    const late = solveTravel({ ...drive, load: wheel(steady * (1 - 1e-5)) });
    expect(late).toMatchObject({ outcome: "never-reaches-speed", timeS: null });
    expect(late?.endSpeed).toBeGreaterThan(steady * 0.98);
    expect(late?.endSpeed).toBeLessThan(steady * (1 - 1e-5));
    const beyond = solveTravel({ ...drive, load: wheel(2 * steady) });
    expect(beyond).toMatchObject({ outcome: "never-reaches-speed", timeS: null });
    expect(beyond?.endSpeed).toBeCloseToShare(late?.endSpeed ?? 0, 1e-6);
    expect(solveTravel({ ...drive, load: wheel(0.9 * steady) })?.outcome).toBe("arrives");
  });

  it("starts under a ramp as soon as the command overcomes its drag, however light it is", () => {
    const light = (rampS: number): Drive =>
      driveOf({ load: { kind: "flywheel", inertiaKgM2: 1e-5, speedRadPerS: 5, dragNm: 2 }, stages: [reduction(20, 0.9)], rampS });
    const travel = solveTravel(light(0.4));
    expect(travel?.outcome).toBe("arrives");
    // So light that speed follows the command: d·V = k_e·ω + R·(T/k_t + I_loss(ω)), solved for the share d of the ramp.
    const { backEmfVPerRadPerS: ke, torqueConstantNmPerA: kt, resistanceOhm, noLoadCurrentA, noLoadSpeedRadPerS } = plainMotor;
    const motorSpeed = 5 * 20;
    const needed = ke * motorSpeed + resistanceOhm * (2 / 20 / 0.9 / kt + (noLoadCurrentA * motorSpeed) / noLoadSpeedRadPerS);
    expect(travel?.timeS).toBeCloseToShare((0.4 * needed) / 12, 5e-3);
  });
});

describe("wheels", () => {
  it("that slip until a line too steep for their long step takes over do arrive", () => {
    const motor = {
      ...plainMotor,
      voltageV: 3,
      noLoadCurrentA: 8.6,
      resistanceOhm: 0.015,
      torqueConstantNmPerA: 0.0054,
      backEmfVPerRadPerS: 0.0065,
      noLoadSpeedRadPerS: 440,
      speedLossShare: 0,
      thermal,
    };
    const load: Load = {
      kind: "wheels",
      massKg: 1.23,
      radiusM: 0.01,
      grip: 1.2,
      rolling: 0,
      slopeRad: 0,
      distanceM: 0.266,
      drivenShare: 0.336,
      inertiaKgM2: 0,
    };
    const drive = driveOf({
      motor,
      motorCount: 6,
      stages: [reduction(43, 0.53)],
      load,
      supply: { openCircuitV: 23, resistanceOhm: 1e-6, peukert: 1 },
    });
    const travel = solveTravel(drive);
    expect(travel?.outcome).toBe("arrives");
    // Heat changes next to nothing in half a second; without it the travel has a closed form.
    const { thermal: _, ...cold } = motor;
    expect(travel?.timeS).toBeCloseToShare(solveTravel({ ...drive, motor: cold })?.timeS ?? 0, 1e-3);
  });
});

describe("random mechanisms of every kind", () => {
  const timed = (drive: Drive): number => solveTravel(drive)?.timeS ?? Number.POSITIVE_INFINITY;
  const factor = fc.double({ min: 1, max: 1.6, noNaN: true });
  const supplied = someDrive.map((drive) => ({
    ...drive,
    supply: drive.supply ?? { openCircuitV: drive.motor.voltageV, resistanceOhm: 0, peukert: 1 },
  }));

  it("are never quicker to arrive under more friction", () => {
    fc.assert(
      fc.property(someDrive, factor, (drive, more) => {
        // A train that locks is lowered by the motor: friction that carries part of the load then spares it.
        fc.pre(trainOf(drive.stages).runsBack);
        const slower = timed({ ...drive, dragNm: drive.dragNm * more + (more - 1) });
        expect(slower).toBeGreaterThanOrEqual(timed(drive) * (1 - 2e-8));
      }),
      { numRuns: 200, seed: 5 },
    );
  }, 60_000);

  it("are never slower to arrive on more voltage", () => {
    fc.assert(
      fc.property(supplied, factor, (drive, more) => {
        const { openCircuitV } = drive.supply;
        const raised = timed({ ...drive, supply: { ...drive.supply, openCircuitV: openCircuitV * more } });
        expect(raised).toBeLessThanOrEqual(timed(drive) * (1 + 2e-8));
      }),
      { numRuns: 200, seed: 6 },
    );
  }, 60_000);
});

describe("random mechanisms with heat, ramp and a breaker", () => {
  it("are hardly ever given up", () => {
    const draws = fc.tuple(someDrive, fc.double({ min: 1e-3, max: 0.5, noNaN: true }), fc.boolean());
    const outcomes = fc.sample(draws, { numRuns: 600, seed: 29 }).map(([drive, rampS, ramps]) =>
      solveTravel({
        ...drive,
        rampS: ramps ? rampS : 0,
        motor: { ...drive.motor, thermal },
        protection: { kind: "breaker", holdCurrentA: 8, tripsAtA: 16, tripsAfterS: 2, carries: "supply" },
      }),
    );
    const told = outcomes.filter((travel) => travel !== null);
    expect(told.length).toBeGreaterThan(400);
    expect(told.filter(({ outcome }) => outcome === "unresolved").length).toBeLessThanOrEqual(2);
  });
});

/** Travel against two general solvers on the same physics written a second time, for seeded random mechanisms of every load kind. */
import { describe, expect, it } from "vitest";
import type { Drive, Load } from "../../extension/model/drive.js";
import { solveTravel } from "../../extension/model/travel.js";
import { driveOf, plainMotor, reduction } from "./drives.js";
import "./expectShare.js";
import { solveByMathjs, solveByOdex } from "./generalSolvers.js";
import { PLAIN, plainInstant, plainSpan, plainStart } from "./plainEquations.js";
import { seeded } from "./seeded.js";

const makers: Record<string, (random: (low: number, high: number) => number) => Load> = {
  lift: (random) => ({
    kind: "lift",
    massKg: random(2, 12),
    drumRadiusM: random(0.02, 0.06),
    travelM: random(0.3, 2),
    slopeRad: random(0.3, 1.57),
    carriagePerRope: 1,
    counterbalanceN: random(0, 10),
    frictionForceN: random(0, 5),
  }),
  arm: (random) => ({
    kind: "arm",
    massKg: random(1, 4),
    centreOfMassM: random(0.2, 0.5),
    fromRad: random(-1.5, -0.5),
    toRad: random(0.8, 2),
    slopeRad: Math.PI / 2,
    inertiaKgM2: random(0.2, 0.8),
    counterbalanceNm: [
      [-2, random(-2, 2)],
      [0, random(-2, 2)],
      [2, random(-2, 2)],
    ],
  }),
  wheels: (random) => ({
    kind: "wheels",
    massKg: random(5, 20),
    radiusM: random(0.03, 0.08),
    grip: random(0.15, 0.9),
    rolling: random(0, 0.02),
    slopeRad: random(-0.05, 0.05),
    distanceM: random(1, 5),
    drivenShare: random(0.5, 1),
    inertiaKgM2: random(0, 0.001),
  }),
  flywheel: (random) => ({
    kind: "flywheel",
    inertiaKgM2: random(0.01, 0.05),
    speedRadPerS: random(6, 9),
    dragNm: random(0, 1),
  }),
  screw: (random) => ({
    kind: "screw",
    forceN: random(20, 300),
    leadM: random(0.002, 0.008),
    meanDiameterM: random(0.008, 0.016),
    friction: random(0.05, 0.2),
    travelM: random(0.05, 0.3),
    threadAngleRad: random(0, 0.3),
    massKg: random(1, 10),
  }),
  loadCurve: (random) => ({
    kind: "loadCurve",
    torqueNm: [
      [0, random(-5, 5)],
      [1, random(-5, 10)],
      [2.5, random(-5, 10)],
      [4, random(-5, 5)],
    ],
    inertiaKgM2: [
      [0, random(0.05, 0.3)],
      [2, random(0.05, 0.3)],
      [4, random(0.05, 0.3)],
    ],
  }),
};

const thermal = { windingToHousingKPerW: 3, housingToAmbientKPerW: 9, windingTimeS: 4, housingTimeS: 300, limitC: 130 };

/** Twelve mechanisms, two of each kind, with a different mix of options each. */
const mechanisms = Object.keys(makers).flatMap((kind, k) =>
  [0, 1].map((i) => {
    const random = seeded(100 + 10 * k + i);
    const load = (makers[kind] as (typeof makers)[string])(random);
    const efficiency = random(0.6, 0.95);
    const drive: Drive = driveOf({
      motor: { ...plainMotor, rotorInertiaKgM2: random(1e-6, 2e-5), ...(i === 0 && { thermal, magnet: "ferrite" as const }) },
      motorCount: 1 + i,
      stages: [reduction(load.kind === "screw" ? 2 : random(15, 30), efficiency, 1e-5), reduction(random(1, 2), 0.97)],
      load,
      dragNm: random(0, 0.2),
      wiringOhm: 0.01,
      supply: { openCircuitV: 12.6, resistanceOhm: 0.03, peukert: 1 },
      protection: { kind: "breaker", holdCurrentA: 8, tripsAtA: 16, tripsAfterS: 2, carries: i === 0 ? "motor" : "supply" },
      rampS: i === 0 ? 0.1 : 0,
      ...(i === 1 && { motorCurrentLimitA: random(15, 30), pwmDuty: 0.9 }),
    });
    return [`${kind} ${i + 1}`, drive] as const;
  }),
);

describe.each(mechanisms)("travel of %s", (_, drive) => {
  const travel = solveTravel(drive);
  const timeS = travel?.timeS ?? 0;

  it("agrees with odex to 1e-8", () => {
    expect(travel?.outcome).toBe("arrives");
    const plain = solveByOdex((t, y) => plainInstant(drive, t, y).rates, plainStart(drive), timeS, 1e-12);
    expectArrived(plain, drive, timeS, 1e-8);
    expect(Math.sqrt((plain[PLAIN.squares] ?? 0) / timeS)).toBeCloseToShare(travel?.rmsMotorCurrentA ?? 0, 1e-8);
    expect(plain[PLAIN.energy]).toBeCloseToShare(travel?.sourceEnergyJ ?? 0, 1e-8);
    expect(plain[PLAIN.replica]).toBeCloseToShare(travel?.carried.protection ?? 0, 1e-8);
    expect(plain[PLAIN.winding]).toBeCloseToShare(travel?.carried.windingC ?? 0, 1e-8);
    expect(plain[PLAIN.housing]).toBeCloseToShare(travel?.carried.housingC ?? 0, 1e-8);
  });

  it("agrees with mathjs as far as that goes", () => {
    // It has no way over a jump of the rates, as corners of an inertia make them; a steady inertia stands in for those.
    const smooth = { ...drive, load: withSteadyInertia(drive.load) };
    const smoothTravel = solveTravel(smooth);
    const endS = smoothTravel?.timeS ?? 0;
    // Its absolute tolerance of a step, on states of up to some hundreds, keeps about 1e-6.
    const plain = solveByMathjs((t, y) => plainInstant(smooth, t, y).rates, plainStart(smooth), endS, 1e-7);
    expectArrived(plain, smooth, endS, 1e-6);
    expect(plain[PLAIN.energy]).toBeCloseToShare(smoothTravel?.sourceEnergyJ ?? 0, 1e-6);
    expect(Math.sqrt((plain[PLAIN.squares] ?? 0) / endS)).toBeCloseToShare(smoothTravel?.rmsMotorCurrentA ?? 0, 1e-6);
  });
});

/** An error of the time shows as a way, or of a flywheel a speed, that is missing at that time. */
function expectArrived(plain: readonly number[], { load }: Drive, timeS: number, share: number): void {
  const { [PLAIN.progress]: progress = 0, [PLAIN.speed]: speed = 0 } = plain;
  if (load.kind === "flywheel") {
    expect(speed).toBeCloseToShare(load.speedRadPerS, share);
    return;
  }
  expect(Math.abs(progress - plainSpan(load)) / speed).toBeLessThan(share * timeS);
  expect(progress).toBeCloseToShare(plainSpan(load), share);
}

function withSteadyInertia(load: Load): Load {
  return load.kind === "loadCurve" && typeof load.inertiaKgM2 !== "number"
    ? { ...load, inertiaKgM2: load.inertiaKgM2[0]?.[1] ?? 0 }
    : load;
}

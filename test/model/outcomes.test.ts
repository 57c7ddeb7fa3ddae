/** How a travel can end, and what is legal but extreme. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Curve, Drive } from "../../extension/model/drive.js";
import { solveMechanism, solveMechanismRuns } from "../../extension/model/solve.js";
import { solveTravel } from "../../extension/model/travel.js";
import { armOf, driveOf, liftOf, plainMotor, reduction, rollerOf } from "./drives.js";
import "./expectShare.js";
import { someDrive } from "./randomDrives.js";

const curve = (torqueNm: Curve, inertiaKgM2 = 0.02) => ({ kind: "loadCurve", torqueNm, inertiaKgM2 }) as const;

describe("a travel that does not arrive", () => {
  it("never starts where the load is too heavy from rest", () => {
    const travel = solveTravel(driveOf({ load: liftOf(60, 0.05, 1) }));
    expect(travel).toMatchObject({ outcome: "never-starts", timeS: null, endSpeed: 0, peakMotorCurrentA: 50, sourceEnergyJ: 0 });
    expect(solveTravel(driveOf({ load: liftOf(60, 0.05, 1), rampS: 0.5 }))?.outcome).toBe("never-starts");
  });

  it("stands still where momentum is not enough, and says so even where it creeps up to it", () => {
    const wall: Curve = [
      [0, 0],
      [2, 0],
      [3, 60],
      [5, 60],
    ];
    expect(solveTravel(driveOf({ load: curve(wall) }))).toMatchObject({ outcome: "stands-still", timeS: null });
    const spring: Curve = [
      [0, 0],
      [10, 60],
    ];
    expect(solveTravel(driveOf({ load: curve(spring, 1e-3) }))?.outcome).toBe("stands-still");
    expect(solveTravel(driveOf({ load: curve(spring, 0) }))?.outcome).toBe("stands-still");
  });

  it("gets over a short hill by momentum, though its hardest position stalls", () => {
    const hill: Curve = [
      [0, 0],
      [4, 0],
      [4.1, 30],
      [4.2, 0],
      [8, 0],
    ];
    const drive = driveOf({ load: curve(hill, 0.3) });
    const { hardest, travel } = solveMechanism(drive);
    expect(hardest).toMatchObject({ motorSpeedRadPerS: 0 });
    expect(hardest.stallShare).toBeGreaterThan(1);
    expect(travel?.timeS).toBeGreaterThan(0);
  });

  it("never reaches a speed at or beyond the steady one", () => {
    const wheel = { kind: "flywheel", inertiaKgM2: 0.01, speedRadPerS: 25, dragNm: 0 } as const;
    // No load: 500 rad/s through 20 : 1 is 25 rad/s.
    const travel = solveTravel(driveOf({ load: wheel }));
    expect(travel).toMatchObject({ outcome: "never-reaches-speed", timeS: null });
    expect(travel?.endSpeed).toBeCloseToShare(25, 1e-5);
    expect(solveTravel(driveOf({ load: { ...wheel, speedRadPerS: 24.9 } }))?.outcome).toBe("arrives");
    expect(solveTravel(driveOf({ load: { ...wheel, speedRadPerS: 1, dragNm: 100 } }))?.outcome).toBe("never-starts");
  });

  it("has no travel as a roller, and no time for no way", () => {
    expect(solveTravel(driveOf({ load: rollerOf(1) }))).toBeNull();
    expect(solveTravel(driveOf({ load: liftOf(1, 0.05, 0) }))).toMatchObject({ outcome: "arrives", timeS: 0, sourceEnergyJ: 0 });
  });
});

describe("a ramp", () => {
  it("starts no earlier than the load allows and makes the travel later", () => {
    const at = (rampS: number) => solveTravel(driveOf({ load: liftOf(5, 0.05, 1), rampS }));
    expect(at(0.5)?.timeS ?? 0).toBeGreaterThan(at(0)?.timeS ?? Number.POSITIVE_INFINITY);
    expect(at(1e-9)?.timeS).toBeCloseToShare(at(0)?.timeS ?? 0, 1e-6);
    expect(at(0.5)?.peakMotorCurrentA ?? 0).toBeLessThan(at(0)?.peakMotorCurrentA ?? 0);
  });

  it("starts a load without friction at once", () => {
    const free = driveOf({ load: { ...armOf(1, 0.1, 0, 1), slopeRad: 0 }, rampS: 0.2 });
    expect(solveTravel(free)?.outcome).toBe("arrives");
  });
});

describe("without inertia", () => {
  it("the travel is the way over the steady speed", () => {
    const flat: Curve = [
      [0, 2],
      [4, 2],
    ];
    const travel = solveTravel(driveOf({ load: curve(flat, 0) }));
    const speed = (500 * (1 - 2 / 20 / 1.1)) / 20;
    expect(travel?.timeS).toBeCloseToShare(4 / speed, 1e-9);
    expect(travel?.endSpeed).toBeCloseToShare(speed, 1e-9);
  });

  it("a growing load takes the integral of dx/ω", () => {
    const growing: Curve = [
      [0, 0],
      [4, 11],
    ];
    // ω = 25·(1 − x/8): ∫₀⁴ dx/ω = 8/25·ln 2.
    expect(solveTravel(driveOf({ load: curve(growing, 0) }))?.timeS).toBeCloseToShare((8 / 25) * Math.log(2), 1e-8);
    // A rotor whose time constant is below 1e-5 of the travel counts as none.
    const light = { ...plainMotor, rotorInertiaKgM2: 1e-12 };
    expect(solveTravel(driveOf({ load: curve(growing, 0), motor: light }))?.timeS).toBeCloseToShare((8 / 25) * Math.log(2), 1e-8);
  });
});

describe("without inertia, at a current limit", () => {
  const rising: Curve = [
    [0, 0],
    [4, 20],
  ];
  const limited = (speedLossShare: number) =>
    solveTravel(driveOf({ load: curve(rising, 0), motor: { ...plainMotor, speedLossShare }, motorCurrentLimitA: 30 }));

  it("a constant loss torque stops the motor where the limit's torque is used up", () => {
    const travel = limited(0);
    expect(travel).toMatchObject({ outcome: "stands-still", timeS: null });
    // The limit's 30 A less the loss current of 0.8 A bring k_t·29.2 A·20 at the shaft, where 5·x N·m are asked.
    const stopRad = (plainMotor.torqueConstantNmPerA * (30 - 0.8) * 20) / 5;
    expect(stopRad).toBeLessThan(4);
    // Until then the line's speed: ω·20 = (12 − R·(T/k_t + 0.8))/k_e, falling straight from ω_0 to ω_1: t = Δx·ln(ω_0/ω_1)/(ω_0 − ω_1).
    const speed = (x: number): number =>
      (12 - plainMotor.resistanceOhm * ((5 * x) / 20 / plainMotor.torqueConstantNmPerA + 0.8)) /
      plainMotor.backEmfVPerRadPerS /
      20;
    const [first, last] = [speed(0), speed(stopRad)];
    expect(travel?.coveredS).toBeCloseToShare((stopRad * Math.log(first / last)) / (first - last), 1e-8);
    expect(travel?.peakMotorCurrentA).toBeCloseToShare(30, 1e-8);
  });

  it("a loss that grows with speed lets it slow down to there", () => {
    expect(limited(1)).toMatchObject({ outcome: "stands-still", timeS: null });
  });
});

describe("samples", () => {
  it("run from start to end in order and agree with the numbers", () => {
    const drive = driveOf({ load: armOf(4, 0.4, 1, -1), stages: [reduction(60, 0.8)] });
    const travel = solveTravel(drive, { sampling: true });
    const samples = travel?.samples ?? [];
    expect(samples.length).toBeGreaterThan(20);
    expect(samples[0]).toMatchObject({ timeS: 0, position: 1, speed: 0, motorCurrentA: 50, windingC: null });
    expect(samples.at(-1)?.timeS).toBeCloseTo(travel?.timeS ?? 0, 12);
    expect(samples.at(-1)?.position).toBeCloseTo(-1, 9);
    for (let i = 1; i < samples.length; i++) expect(samples[i]?.timeS).toBeGreaterThanOrEqual(samples[i - 1]?.timeS ?? 0);
  });
});

describe("a supply that must stay above a voltage", () => {
  it("is below it for as long as the current is too high", () => {
    const supply = { openCircuitV: 12, resistanceOhm: 0.05, peukert: 1, mustStayAbove: { voltageV: 10.5, forS: 0 } };
    const travel = solveTravel(driveOf({ load: liftOf(10, 0.05, 1), supply }), { sampling: true });
    expect(travel?.lowestSupplyV).toBeLessThan(10.5);
    expect(travel?.belowFloorS).toBeGreaterThan(0);
    const above = travel?.samples.find((sample) => sample.supplyVoltageV > 10.5);
    expect(travel?.belowFloorS ?? 0).toBeLessThanOrEqual(above?.timeS ?? 0);
  });
});

describe("physics that everyone expects of random mechanisms", () => {
  it("more mass is never faster, more voltage never slower, to arrive", () => {
    const timed = (drive: Drive): number => solveTravel(drive)?.timeS ?? Number.POSITIVE_INFINITY;
    fc.assert(
      fc.property(fc.double({ min: 0.5, max: 15, noNaN: true }), fc.double({ min: 1, max: 1.5, noNaN: true }), (mass, more) => {
        const lift = (massKg: number, openCircuitV = 12) =>
          driveOf({ load: liftOf(massKg, 0.05, 1), supply: { openCircuitV, resistanceOhm: 0.02, peukert: 1 } });
        expect(timed(lift(mass * more))).toBeGreaterThanOrEqual(timed(lift(mass)) * (1 - 1e-9));
        expect(timed(lift(mass, 12 * more))).toBeLessThanOrEqual(timed(lift(mass)) * (1 + 1e-9));
      }),
      { numRuns: 50 },
    );
  });

  it("energy from the supply is load, losses and what still moves, to 1e-7", () => {
    // Ideal supply, no friction but the motor's own: E = m·g·h/1 + ½·J·ω² + copper + the motor's loss, each integrated apart.
    const drive = driveOf({ load: liftOf(8, 0.05, 1), stages: [reduction(20)] });
    const travel = solveTravel(drive);
    const copper = (travel?.rmsMotorCurrentA ?? 0) ** 2 * (travel?.timeS ?? 0) * (12 / 50);
    const kinetic = 0.5 * 8 * (travel?.endSpeed ?? 0) ** 2;
    const work = 8 * 9.80665 * 1;
    const rest = (travel?.sourceEnergyJ ?? 0) - copper - kinetic - work;
    // What is left is the loss torque's work, k_e·∫I_loss·ω dt plus what k_t < k_e keeps: above 0, below the loss at full speed throughout.
    expect(rest).toBeGreaterThan(0);
    const lossless = { ...plainMotor, noLoadCurrentA: 0, torqueConstantNmPerA: plainMotor.backEmfVPerRadPerS };
    const ideal = solveTravel({ ...drive, motor: lossless });
    const idealCopper = (ideal?.rmsMotorCurrentA ?? 0) ** 2 * (ideal?.timeS ?? 0) * (12 / 50);
    expect(ideal?.sourceEnergyJ).toBeCloseToShare(idealCopper + work + 0.5 * 8 * (ideal?.endSpeed ?? 0) ** 2, 1e-8);
  });
});

describe("extreme but legal mechanisms", () => {
  const extreme = fc.constantFrom(1e-9, 1e-6, 1e-3, 1, 1e3, 1e6, 1e9);
  const wild: fc.Arbitrary<Drive> = fc
    .tuple(someDrive, fc.array(extreme, { minLength: 8, maxLength: 8 }), fc.array(fc.boolean(), { minLength: 8, maxLength: 8 }))
    .map(([drive, values, chosen]) => {
      const pick = (i: number, otherwise: number): number => (chosen[i] ? (values[i] ?? otherwise) : otherwise);
      const { motor, load } = drive;
      const wildMotor = {
        ...motor,
        resistanceOhm: pick(0, motor.resistanceOhm),
        torqueConstantNmPerA: pick(1, motor.torqueConstantNmPerA),
        backEmfVPerRadPerS: pick(1, motor.backEmfVPerRadPerS),
        rotorInertiaKgM2: pick(2, motor.rotorInertiaKgM2),
      };
      const thermal = {
        windingToHousingKPerW: pick(3, 2),
        housingToAmbientKPerW: pick(4, 8),
        windingTimeS: pick(5, 10),
        housingTimeS: 500,
        limitC: 120,
      };
      const first =
        Object.keys(load).find((key) => key !== "kind" && typeof load[key as keyof typeof load] === "number") ?? "kind";
      return {
        ...drive,
        motor: chosen[3] ? { ...wildMotor, thermal } : wildMotor,
        load: chosen[6] ? { ...load, [first]: values[6] } : load,
        stages: chosen[7] ? [reduction(values[7] ?? 1, 1e-3)] : drive.stages,
        motorCount: chosen[5] ? 1_000_000 : drive.motorCount,
        protection: {
          kind: "breaker",
          holdCurrentA: pick(4, 5),
          tripsAtA: 2 * pick(4, 5),
          tripsAfterS: pick(5, 1),
          carries: "motor",
        },
      } as Drive;
    });

  it("give finite numbers or null, within a second each", () => {
    fc.assert(
      fc.property(wild, (drive) => {
        const started = performance.now();
        expectFinite(solveMechanismRuns(drive).numbers);
        expect(performance.now() - started).toBeLessThan(5000);
      }),
      { numRuns: 150, seed: 42 },
    );
  }, 60_000);
});

function expectFinite(value: unknown, path = ""): void {
  if (typeof value === "number") expect(Number.isFinite(value), `${path} is ${value}`).toBe(true);
  else if (value && typeof value === "object")
    for (const [key, inner] of Object.entries(value)) expectFinite(inner, `${path}.${key}`);
}

/** Loads and the hardest position, against values worked by hand. */
import { describe, expect, it } from "vitest";
import type { Drive, Load } from "../../extension/model/drive.js";
import { hardestPosition, requiredMotorTorque, slipPoint } from "../../extension/model/hardest.js";
import { holdPoint } from "../../extension/model/hold.js";
import { shaftLoadOf } from "../../extension/model/shaftLoad.js";
import { solveMechanism } from "../../extension/model/solve.js";
import { trainOf, wormStage } from "../../extension/model/stages.js";
import { armOf, driveOf, liftOf, plainMotor, reduction, rollerOf } from "./drives.js";

const G = 9.80665;
const direct = (load: Load, more: Partial<Drive> = {}): Drive => driveOf({ load, stages: [reduction(1)], ...more });

describe("an arm", () => {
  it("is hardest where its weight pulls level, inside the travel", () => {
    const hardest = hardestPosition(direct(armOf(2, 0.5, -1, 2)));
    expect(hardest.position).toBe(0);
    expect(hardest.motorTorqueNm).toBeCloseTo(2 * G * 0.5, 12);
  });

  it("counts the way back: a counterbalance that lifts must be pushed down", () => {
    const load = { ...armOf(1, 0.5, 0, Math.PI / 2), counterbalanceNm: 4 };
    // Upright the weight gives nothing and the spring still 4 N·m, level the rest is 4.903 − 4 N·m.
    expect(hardestPosition(direct(load))).toMatchObject({ position: Math.PI / 2, direction: -1 });
    expect(hardestPosition(direct(load)).motorTorqueNm).toBeCloseTo(4, 12);
  });

  it("finds an interior extreme under a spring that is a list of points", () => {
    // 10·cos θ − (−4 + 8θ/π) over 0…π/2: −10·sin θ = 8/π has no root there, so that the end at 0 is hardest: 14 N·m.
    const falling = {
      ...armOf(10 / (G * 0.5), 0.5, 0, Math.PI / 2),
      counterbalanceNm: [
        [0, -4],
        [Math.PI / 2, 0],
      ] as const,
    };
    expect(hardestPosition(direct(falling)).motorTorqueNm).toBeCloseTo(14, 12);
    // With 10·cos θ + 4·θ the stationary point is asin(0.4).
    const rising = {
      ...falling,
      counterbalanceNm: [
        [0, 0],
        [Math.PI / 2, -2 * Math.PI],
      ] as const,
    };
    const position = Math.asin(0.4);
    expect(hardestPosition(direct(rising)).position).toBeCloseTo(position, 12);
    expect(hardestPosition(direct(rising)).motorTorqueNm).toBeCloseTo(10 * Math.cos(position) + 4 * position, 12);
  });

  it("names the smaller position on a tie, whichever way it travels", () => {
    expect(hardestPosition(direct(armOf(1, 1, 1, -1))).position).toBe(0);
    expect(hardestPosition(direct(armOf(1, 1, 2 * Math.PI + 0.5, -0.5))).position).toBe(0);
    const turntable = { ...armOf(1, 1, 3, -2), slopeRad: 0 };
    expect(hardestPosition(direct(turntable, { dragNm: 0.3 }))).toMatchObject({ position: -2, motorTorqueNm: 0.3 });
  });
});

describe("a lift", () => {
  it("multiplies force and divides turns by the carriage's travel per rope", () => {
    const cascade = shaftLoadOf(direct({ ...liftOf(10, 0.03, 1.2), carriagePerRope: 2 }));
    expect(cascade.opposing(0, 1)).toBeCloseTo(2 * 10 * G * 0.03, 12);
    expect(cascade.endRad).toBeCloseTo(1.2 / 0.06, 12);
    expect(cascade.inertia(0)).toBeCloseTo(10 * 4 * 0.03 ** 2, 12);
  });

  it("adds friction up and subtracts it down, slope and counterbalance included", () => {
    const load = { ...liftOf(10, 0.05, 1), slopeRad: Math.PI / 6, counterbalanceN: 20, frictionForceN: 8 };
    const drive = direct(load, { dragNm: 0.1 });
    const rest = (10 * G * 0.5 - 20) * 0.05;
    expect(requiredMotorTorque(drive, 0.5, 1)).toBeCloseTo(rest + 0.4 + 0.1, 12);
    expect(requiredMotorTorque(drive, 0.5, -1)).toBeCloseTo(-rest + 0.5, 12);
  });

  it("gives its hardest position in metres of travel under a counterbalance over shaft position", () => {
    const spring = [
      [0, 0],
      [10, 60],
      [20, 90],
    ] as const;
    // 98 N against a spring that grows from 0 to 90 N: hardest at the bottom; coming back is never harder.
    expect(hardestPosition(direct({ ...liftOf(10, 0.05, 1), counterbalanceN: spring }))).toMatchObject({
      position: 0,
      direction: 1,
    });
    // 60 N: at the top the spring's 90 N must be pushed down by 30 N, less than the 60 N at the bottom.
    const heavySpring = [
      [0, 0],
      [10, 150],
      [20, 90],
    ] as const;
    const hardest = hardestPosition(direct({ ...liftOf(60 / G, 0.05, 1), counterbalanceN: heavySpring }));
    expect(hardest).toMatchObject({ position: 0.5, direction: -1 });
    expect(hardest.motorTorqueNm).toBeCloseTo(90 * 0.05, 12);
  });
});

describe("wheels", () => {
  const cart: Load = {
    kind: "wheels",
    massKg: 30,
    radiusM: 0.05,
    grip: 0.6,
    rolling: 0.02,
    slopeRad: 0.1,
    distanceM: 3,
    drivenShare: 0.5,
    inertiaKgM2: 0,
  };

  it("need weight and rolling uphill and slip where the ground takes no more", () => {
    const drive = driveOf({ load: cart, stages: [reduction(10, 0.9)], motorCount: 2, dragNm: 0.2 });
    const uphill = 30 * G * (Math.sin(0.1) + 0.02 * Math.cos(0.1)) * 0.05 + 0.2;
    expect(hardestPosition(drive).motorTorqueNm).toBeCloseTo(uphill / (10 * 0.9 * 2), 12);
    const ground = 0.6 * 30 * G * Math.cos(0.1) * 0.5 * 0.05;
    const slip = slipPoint(drive);
    expect(slip?.motorTorqueNm).toBeCloseTo((ground + 0.2) / (10 * 0.9 * 2), 12);
    expect(slip?.canMove).toBe(true);
  });

  it("that cannot grip do not move, however strong the motor", () => {
    const ice = solveMechanism(driveOf({ load: { ...cart, grip: 0.05 } }));
    expect(ice.hardest).toMatchObject({ limitedBy: "grip", motorSpeedRadPerS: 0, shaftPowerW: 0 });
    expect(ice.hardest.motorCurrentA).toBeLessThan(ice.available.stallCurrentA);
    expect(ice.travel?.timeS).toBeNull();
  });
});

describe("what holds a load", () => {
  it("a lift holds its weight with friction and losses left out", () => {
    const hold = holdPoint(
      driveOf({ load: { ...liftOf(10, 0.05, 1), frictionForceN: 30 }, stages: [reduction(20, 0.8)], dragNm: 1 }),
    );
    expect(hold?.motorTorqueNm).toBeCloseTo((10 * G * 0.05) / 20, 12);
    expect(hold?.motorCurrentA).toBeCloseTo((10 * G * 0.05) / 20 / plainMotor.torqueConstantNmPerA, 12);
  });

  it("a worm that does not run back holds for nothing, near its border it is not trusted to", () => {
    const worm = (leadDeg: number) =>
      wormStage({
        ratio: 30,
        leadAngleRad: (leadDeg * Math.PI) / 180,
        friction: 0.1,
        pressureAngleRad: Math.PI / 9,
        inertiaKgM2: 0,
      });
    // Friction angle atan(0.1/cos 20°) = 6.07°.
    expect(holdPoint(driveOf({ stages: [worm(3)] }))?.motorTorqueNm).toBe(0);
    expect(worm(5.5)).toMatchObject({ nearSelfLocking: true });
    expect(worm(5.5).backwardEfficiency).toBeLessThan(0);
    expect(holdPoint(driveOf({ stages: [worm(5.5)] }))?.motorTorqueNm).toBeGreaterThan(0);
    // Lowering costs the motor |η_b·T|/(N·count).
    const stage = worm(3);
    expect(requiredMotorTorque(driveOf({ stages: [stage] }), 0, -1)).toBeCloseTo(
      (-stage.backwardEfficiency * 10 * G * 0.05) / 30,
      12,
    );
  });

  it("a self-locking screw holds for nothing, a ball screw does not", () => {
    const screw: Load = {
      kind: "screw",
      forceN: 1000,
      leadM: 0.004,
      meanDiameterM: 0.014,
      friction: 0.15,
      travelM: 0.2,
      threadAngleRad: 0,
      massKg: 0,
    };
    expect(holdPoint(direct(screw))?.motorTorqueNm).toBe(0);
    expect(holdPoint(direct({ ...screw, efficiency: 0.9 }))?.motorTorqueNm).toBeCloseTo((1000 * 0.004) / (2 * Math.PI), 12);
  });

  it("a flywheel has nothing to hold, a roller its steady torque", () => {
    expect(holdPoint(direct({ kind: "flywheel", inertiaKgM2: 1, speedRadPerS: 1, dragNm: 1 }))).toBeNull();
    expect(holdPoint(direct(rollerOf(2)))).toMatchObject({ position: null, motorTorqueNm: 2 });
  });
});

describe("stages", () => {
  it("refer each inertia through the ratios after it, and multiply losses both ways", () => {
    const train = trainOf([reduction(4, 0.9, 1e-4), reduction(5, 0.8, 2e-3)]);
    expect(train).toMatchObject({ ratio: 20, runsBack: true });
    expect(train.efficiency).toBeCloseTo(0.72, 12);
    expect(train.backwardEfficiency).toBeCloseTo((2 - 1 / 0.9) * (2 - 1 / 0.8), 12);
    expect(train.inertiaKgM2).toBeCloseTo(1e-4 * 25 + 2e-3, 15);
  });

  it("do not run back where one does not, even if two negatives multiply to a plus", () => {
    const train = trainOf([reduction(4, 0.4), reduction(5, 0.4)]);
    expect(train.runsBack).toBe(false);
    expect(train.backwardEfficiency).toBeCloseTo(-0.25, 12);
  });
});

describe("the available line", () => {
  it("has duty, drop, wiring and the supply's resistance of all motors in it", () => {
    const drive = driveOf({
      motorCount: 3,
      pwmDuty: 0.5,
      wiringOhm: 0.02,
      driver: { dropV: 0.6, resistanceOhm: 0.01 },
      supply: { openCircuitV: 13, resistanceOhm: 0.04, peukert: 1 },
    });
    const { available } = solveMechanism(drive);
    const series = 12 / 50 + 0.03 + 0.25 * 3 * 0.04;
    expect(available.stallCurrentA).toBeCloseTo((0.5 * 12.4) / series, 12);
    expect(available.stallTorqueNm).toBeCloseTo((available.stallCurrentA * 1.1) / 50, 12);
    // v = 1: ω = V/(k_e + R·I_0/ω_0).
    expect(available.noLoadSpeedRadPerS).toBeCloseTo((0.5 * 12.4) / (plainMotor.backEmfVPerRadPerS + (series * 0.8) / 500), 9);
  });
});

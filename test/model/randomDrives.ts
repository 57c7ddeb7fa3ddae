/** Random valid mechanisms for property tests. */
import fc from "fast-check";
import type { Drive, Load } from "../../extension/model/drive.js";
import { motorFromSheet } from "../../extension/model/motor.js";
import { wormStage } from "../../extension/model/stages.js";
import { reduction } from "./drives.js";

/** Nothing smaller than 1e-9 but 0 itself: what a declaration may hold. */
const within = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true, noDefaultInfinity: true }).map((value) => (Math.abs(value) < 1e-9 ? 0 : value));

export const someMotor = fc
  .record({
    voltageV: within(3, 48),
    noLoadSpeedRadPerS: within(5, 2000),
    stallCurrentA: within(0.5, 200),
    lossShare: within(0.001, 0.2),
    speedLossShare: within(0, 1),
    torqueShare: within(0.8, 1),
    rotorInertiaKgM2: within(0, 1e-4),
  })
  .map(({ lossShare, torqueShare, ...sheet }) => {
    const noLoadCurrentA = lossShare * sheet.stallCurrentA;
    const backEmf = (sheet.voltageV * (1 - lossShare)) / sheet.noLoadSpeedRadPerS;
    const stallTorqueNm = torqueShare * backEmf * (sheet.stallCurrentA - noLoadCurrentA * (1 - sheet.speedLossShare));
    return motorFromSheet({ ...sheet, noLoadCurrentA, stallTorqueNm });
  });

export const someStages = fc.array(
  fc.oneof(
    fc
      .tuple(within(0.5, 12), within(0.6, 1), within(0, 1e-3))
      .map(([ratio, efficiency, inertia]) => reduction(ratio, efficiency, inertia)),
    fc
      .record({ ratio: within(5, 60), leadAngleRad: within(0.03, 0.7), friction: within(0.01, 0.1) })
      .map((worm) => wormStage({ ...worm, pressureAngleRad: Math.PI / 9, inertiaKgM2: 0 })),
  ),
  { minLength: 0, maxLength: 3 },
);

const someCurve = (low: number, high: number, from: number, to: number) =>
  fc
    .array(within(low, high), { minLength: 2, maxLength: 6 })
    .map((values) => values.map((value, i) => [from + ((to - from) * i) / (values.length - 1), value] as const));

export const someLoad: fc.Arbitrary<Load> = fc.oneof(
  fc.record({
    kind: fc.constant("lift" as const),
    massKg: within(0.01, 200),
    drumRadiusM: within(0.005, 0.2),
    travelM: within(0.01, 5),
    slopeRad: within(0, Math.PI / 2),
    carriagePerRope: fc.constantFrom(0.5, 1, 2),
    counterbalanceN: within(0, 500),
    frictionForceN: within(0, 50),
  }),
  fc.record({
    kind: fc.constant("arm" as const),
    massKg: within(0.01, 20),
    centreOfMassM: within(0.01, 1.5),
    fromRad: within(-4, 4),
    toRad: within(-4, 4),
    slopeRad: within(0, Math.PI / 2),
    inertiaKgM2: within(1e-4, 20),
    counterbalanceNm: fc.oneof(within(-20, 20), someCurve(-20, 20, -4, 4)),
  }),
  fc.record({
    kind: fc.constant("wheels" as const),
    massKg: within(0.5, 200),
    radiusM: within(0.01, 0.3),
    grip: within(0.2, 1.2),
    rolling: within(0, 0.05),
    slopeRad: within(-0.2, 0.2),
    distanceM: within(0.1, 20),
    drivenShare: within(0.3, 1),
    inertiaKgM2: within(0, 0.01),
  }),
  fc.record({
    kind: fc.constant("flywheel" as const),
    inertiaKgM2: within(1e-5, 0.1),
    speedRadPerS: within(1, 600),
    dragNm: within(0, 0.5),
  }),
  fc.record({
    kind: fc.constant("screw" as const),
    forceN: within(0, 5000),
    leadM: within(0.001, 0.02),
    meanDiameterM: within(0.005, 0.04),
    friction: within(0.02, 0.25),
    travelM: within(0.01, 1),
    threadAngleRad: within(0, 0.5),
    massKg: within(0, 100),
  }),
  fc.record({ kind: fc.constant("roller" as const), torqueNm: within(0, 20), inertiaKgM2: within(0, 0.1) }),
  fc.record({ kind: fc.constant("loadCurve" as const), torqueNm: someCurve(-20, 20, 0, 6), inertiaKgM2: within(0, 1) }),
);

export const someSupply = fc.record({ openCircuitV: within(3, 50), resistanceOhm: within(0, 0.5), peukert: fc.constant(1) });

export const someDrive: fc.Arbitrary<Drive> = fc
  .record(
    {
      motor: someMotor,
      motorCount: fc.integer({ min: 1, max: 6 }),
      stages: someStages,
      load: someLoad,
      dragNm: within(0, 1),
      pwmDuty: within(0.2, 1),
      wiringOhm: within(0, 0.1),
      rampS: fc.constant(0),
      supply: someSupply,
      motorCurrentLimitA: within(1, 100),
      driver: fc.record({ dropV: within(0, 1), resistanceOhm: within(0, 0.05) }),
    },
    { requiredKeys: ["motor", "motorCount", "stages", "load", "dragNm", "pwmDuty", "wiringOhm", "rampS"] },
  )
  .map((drive) => drive as Drive);

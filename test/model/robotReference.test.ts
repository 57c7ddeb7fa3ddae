/** A robot of three mechanisms against an independent integration of the same physics by a general solver. */
import { describe, expect, it } from "vitest";
import type { RobotDrive } from "../../extension/model/robotDrive.js";
import { solveRobot } from "../../extension/model/solveRobot.js";
import { armOf, driveOf, liftOf, plainMotor, reduction } from "./drives.js";
import "./expectShare.js";
import { runPlainly } from "./plainRobot.js";

const thermal = { windingToHousingKPerW: 2, housingToAmbientKPerW: 5, windingTimeS: 8, housingTimeS: 400, limitC: 120 };
const ACCURACY = 1e-6;

const lift = driveOf({ motor: { ...plainMotor, thermal }, motorCount: 2, load: liftOf(18, 0.05, 1), wiringOhm: 0.01 });
const arm = driveOf({
  stages: [reduction(40, 0.9)],
  load: armOf(3, 0.5, -1, 1),
  motorCurrentLimitA: 20,
  driver: { dropV: 0.3, resistanceOhm: 0.02 },
  protection: { kind: "breaker", holdCurrentA: 6, tripsAtA: 20, tripsAfterS: 0.3, resetsS: 0.7, carries: "motor" },
});
const flywheel = driveOf({
  motor: { ...plainMotor, speedLossShare: 0.4 },
  stages: [reduction(1.5, 0.95)],
  load: { kind: "flywheel", inertiaKgM2: 0.01, speedRadPerS: 180, dragNm: 0.1 },
});
const robot: RobotDrive = {
  supply: { openCircuitV: 12.6, resistanceOhm: 0.04, peukert: 1 },
  mechanisms: [lift, arm, flywheel],
  steps: [
    { lastsS: 2, moving: [0, 2], holding: [] },
    { lastsS: 2.5, moving: [1, 2], holding: [0] },
    { lastsS: 0.5, moving: [], holding: [] },
  ],
  shared: [],
  cycles: 2,
  ambientC: 25,
};

function check(given: RobotDrive): void {
  const plain = runPlainly(given);
  const { numbers, mechanisms, protectors, cyclesFollowed } = solveRobot(given);
  expect(cyclesFollowed).toBe(given.cycles);
  expect(numbers.lowestVoltageV).toBeCloseToShare(plain.lowestV, ACCURACY);
  expect(numbers.lowestVoltageAtS).toBeCloseToShare(plain.lowestAtS, ACCURACY);
  expect(numbers.peakCurrentA).toBeCloseToShare(plain.peakA, ACCURACY);
  expect(numbers.sourceEnergyJ).toBeCloseToShare(plain.energyJ, ACCURACY);
  expect(numbers.chargeUsedAh).toBeCloseToShare(plain.chargeAs / 3600, ACCURACY);
  mechanisms.forEach((one, i) => {
    expect(one.sourceEnergyJ).toBeCloseToShare(plain.energiesJ[i] as number, ACCURACY);
    if (one.windingEndC !== null) expect(one.windingEndC).toBeCloseToShare(plain.windingsC[i] as number, ACCURACY);
    const first = new Map(one.travels.map(({ step, firstS, arrivals }) => [step, { firstS, arrivals }]));
    for (const [step, { firstS, arrivals }] of first) {
      const times = plain.arrivals
        .filter((arrival) => arrival.mechanism === i && arrival.step === step)
        .map(({ timeS }) => timeS);
      expect(arrivals).toBe(times.length);
      if (times[0] !== undefined) expect(firstS).toBeCloseToShare(times[0], ACCURACY);
    }
    const trips = plain.trips.filter(({ mechanism }) => mechanism === i).map(({ atS }) => atS);
    const opened = protectors.find(({ mechanism }) => mechanism === i)?.openings ?? [];
    expect(opened.length).toBe(trips.length);
    opened.forEach(({ atS }, k) => {
      expect(atS).toBeCloseToShare(trips[k] as number, ACCURACY);
    });
  });
  const sharedOpenings = protectors.filter(({ shared }) => shared !== null).flatMap(({ openings }) => openings);
  expect(sharedOpenings.length).toBe(plain.sharedTripsS.length);
  sharedOpenings.forEach(({ atS }, k) => {
    expect(atS).toBeCloseToShare(plain.sharedTripsS[k] as number, ACCURACY);
  });
}

describe("three mechanisms on one battery, against odex", () => {
  it("agrees over two cycles in which a breaker opens and resets, one mechanism is limited and one has heat", () => {
    const { openings } = solveRobot(robot).protectors[0] as { openings: readonly unknown[] };
    expect(openings.length).toBeGreaterThan(1);
    check(robot);
  });

  it("agrees until and after a shared breaker opens for good", () => {
    const guarded: RobotDrive = {
      ...robot,
      cycles: 1,
      shared: [
        { protection: { kind: "breaker", holdCurrentA: 15, tripsAtA: 60, tripsAfterS: 1.2, carries: "supply" }, feeds: [0, 2] },
      ],
    };
    const own = solveRobot(guarded).protectors.find(({ shared }) => shared === 0);
    expect(own?.count).toBe(1);
    check(guarded);
  });
});

/** Random and extreme robots: finite numbers, no hang, and what must hold for all of them. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Drive, Protection } from "../../extension/model/drive.js";
import type { RobotDrive } from "../../extension/model/robotDrive.js";
import { type BusDemand, createDemand, createSharedBus } from "../../extension/model/sharedBus.js";
import { solveRobot } from "../../extension/model/solveRobot.js";
import { driveOf, liftOf, plainMotor, reduction } from "./drives.js";
import "./expectShare.js";
import { someDrive } from "./randomDrives.js";

const within = (min: number, max: number): fc.Arbitrary<number> => fc.double({ min, max, noNaN: true });

const someProtection: fc.Arbitrary<Protection> = fc.oneof(
  fc
    .record({ kind: fc.constantFrom("breaker" as const, "ptc" as const), hold: within(0.5, 60), tripsAfterS: within(0.01, 30) })
    .chain(({ kind, hold, tripsAfterS }) =>
      fc.record({
        kind: fc.constant(kind),
        holdCurrentA: fc.constant(hold),
        tripsAtA: within(1.05 * hold, 6 * hold),
        tripsAfterS: fc.constant(tripsAfterS),
        resetsS: within(0.1, 5),
        carries: fc.constantFrom("motor" as const, "supply" as const),
      }),
    ),
  fc.record({ kind: fc.constant("fuse" as const), ratingA: within(1, 60), carries: fc.constant("supply" as const) }),
);

const someThermal = fc.record({
  windingToHousingKPerW: within(0.1, 20),
  housingToAmbientKPerW: within(0.1, 40),
  windingTimeS: within(0.5, 60),
  housingTimeS: within(20, 3000),
  limitC: within(80, 200),
});

const somePart: fc.Arbitrary<Drive> = fc
  .record({
    drive: someDrive,
    protection: fc.option(someProtection),
    thermal: fc.option(someThermal),
    rampS: fc.constantFrom(0, 0, 0.5),
  })
  .map(({ drive, protection, thermal, rampS }) => ({
    ...drive,
    rampS,
    ...(protection && { protection }),
    motor: thermal ? { ...drive.motor, thermal } : drive.motor,
  }));

const someRobot: fc.Arbitrary<RobotDrive> = fc.array(somePart, { minLength: 1, maxLength: 4 }).chain((mechanisms) => {
  const some = fc.subarray(mechanisms.map((_, i) => i));
  return fc.record({
    supply: fc.record({
      openCircuitV: within(3, 50),
      resistanceOhm: fc.oneof(fc.constant(0), within(1e-4, 0.5)),
      capacityAh: within(0.001, 10),
      ratedOverH: within(0.5, 20),
      peukert: within(1, 1.3),
      mustStayAbove: fc.record({ voltageV: within(2, 40), forS: within(0, 1) }),
    }),
    mechanisms: fc.constant(mechanisms),
    steps: fc.array(fc.record({ lastsS: within(0.05, 30), moving: some, holding: some }), { minLength: 1, maxLength: 4 }),
    shared: fc.array(fc.record({ protection: someProtection, feeds: some }), { maxLength: 1 }),
    cycles: fc.integer({ min: 1, max: 20 }),
    ambientC: within(-10, 45),
  });
});

/** Every number anywhere in a result. */
function numbersIn(value: unknown): number[] {
  if (typeof value === "number") return [value];
  if (typeof value !== "object" || value === null) return [];
  return Object.values(value).flatMap(numbersIn);
}

describe("any robot", () => {
  it("gives finite numbers that fit each other, and is hardly ever given up", () => {
    let unresolved = 0;
    fc.assert(
      fc.property(someRobot, (robot) => {
        const solution = solveRobot(robot);
        expect(numbersIn(solution).every(Number.isFinite)).toBe(true);
        const { numbers, depletedAh, outcome, coveredS } = solution;
        expect(numbers.lowestVoltageV).toBeLessThanOrEqual(robot.supply.openCircuitV);
        expect(numbers.lowestVoltageV).toBeGreaterThan(0);
        expect(numbers.cyclesDone).toBeLessThanOrEqual(robot.cycles);
        expect(depletedAh).toBeGreaterThanOrEqual(numbers.chargeUsedAh * (1 - 1e-9));
        expect(numbers.sourceEnergyJ).toBeLessThanOrEqual(3600 * numbers.chargeUsedAh * robot.supply.openCircuitV * (1 + 1e-9));
        expect(robot.supply.openCircuitV - robot.supply.resistanceOhm * numbers.peakCurrentA).toBeLessThanOrEqual(
          numbers.lowestVoltageV * (1 + 1e-6) + 1e-9,
        );
        if (outcome === "unresolved") unresolved++;
        if (outcome === "done") expect(numbers.cyclesDone).toBe(robot.cycles);
        for (const { openings } of solution.protectors) for (const { atS } of openings) expect(atS).toBeLessThanOrEqual(coveredS);
      }),
      { numRuns: 60, seed: 11 },
    );
    expect(unresolved).toBeLessThan(4);
  });

  it("is deterministic", () => {
    for (const robot of fc.sample(someRobot, { numRuns: 5, seed: 3 })) expect(solveRobot(robot)).toEqual(solveRobot(robot));
  });

  it("sags further with more resistance, and with one more lift", () => {
    const lift = fc
      .record({ mass: within(1, 40), ratio: within(5, 60), count: fc.integer({ min: 1, max: 3 }) })
      .map(({ mass, ratio, count }) =>
        driveOf({ motorCount: count, stages: [reduction(ratio, 0.9)], load: liftOf(mass, 0.04, 0.5) }),
      );
    fc.assert(
      fc.property(fc.array(lift, { minLength: 2, maxLength: 4 }), within(0.005, 0.2), (mechanisms, resistanceOhm) => {
        const lowest = (count: number, ohm: number): number => {
          const moving = mechanisms.slice(0, count).map((_, i) => i);
          return solveRobot({
            supply: { openCircuitV: 12, resistanceOhm: ohm, peukert: 1 },
            mechanisms,
            steps: [{ lastsS: 1, moving, holding: [] }],
            shared: [],
            cycles: 1,
            ambientC: 25,
          }).numbers.lowestVoltageV;
        };
        const count = mechanisms.length;
        expect(lowest(count, 1.5 * resistanceOhm)).toBeLessThan(lowest(count, resistanceOhm));
        expect(lowest(count, resistanceOhm)).toBeLessThan(lowest(count - 1, resistanceOhm));
      }),
      { numRuns: 25, seed: 5 },
    );
  });
});

describe("extreme but legal robots end", () => {
  const base = { supply: { openCircuitV: 12, resistanceOhm: 0.1, peukert: 1 }, shared: [], cycles: 1, ambientC: 25 };

  it("a breaker that clatters: stops after 10 000 events and says so", () => {
    const protection: Protection = {
      kind: "breaker",
      holdCurrentA: 1,
      tripsAtA: 20,
      tripsAfterS: 0.001,
      resetsS: 0.1,
      carries: "motor",
    };
    const drive = driveOf({ load: liftOf(1000, 0.05, 1), protection });
    const { outcome, protectors } = solveRobot({
      ...base,
      mechanisms: [drive],
      steps: [{ lastsS: 1e5, moving: [0], holding: [] }],
    });
    expect(outcome).toBe("unresolved");
    expect(protectors[0]?.count).toBeGreaterThan(4000);
  });

  it("a million cycles of a year", () => {
    const thermal = { windingToHousingKPerW: 2, housingToAmbientKPerW: 5, windingTimeS: 8, housingTimeS: 400, limitC: 120 };
    const drive = driveOf({ motor: { ...plainMotor, thermal }, load: liftOf(5, 0.05, 1) });
    const steps = [{ lastsS: 30, moving: [0], holding: [] }];
    const { numbers, outcome } = solveRobot({ ...base, mechanisms: [drive], steps, cycles: 1_000_000 });
    expect(outcome).toBe("done");
    expect(numbers.cyclesDone).toBe(1_000_000);
  });

  it("thirty mechanisms at once, a step of a nanosecond, nothing at all", () => {
    const mechanisms = Array.from({ length: 30 }, (_, i) => driveOf({ load: liftOf(1 + i, 0.05, 1) }));
    const many = mechanisms.map((_, i) => i);
    const run = solveRobot({ ...base, mechanisms, steps: [{ lastsS: 5, moving: many, holding: [] }] });
    expect(run.outcome).toBe("done");
    expect(run.numbers.lowestVoltageV).toBeGreaterThan(0);
    const instant = solveRobot({ ...base, mechanisms, steps: [{ lastsS: 1e-9, moving: many, holding: [] }] });
    expect(instant.numbers.lowestVoltageV).toBeCloseToShare(run.numbers.lowestVoltageV, 1e-9);
    const nothing = solveRobot({ ...base, mechanisms: [], steps: [] });
    expect(nothing.numbers.lowestVoltageV).toBe(12);
  });
});

describe("the shared bus", () => {
  const someDemand: fc.Arbitrary<BusDemand> = fc
    .record({
      count: fc.integer({ min: 1, max: 4 }),
      command: within(0.1, 1),
      dropV: within(0, 1),
      seriesOhm: within(0.02, 2),
      backV: within(0, 14),
      capA: fc.oneof(within(0.1, 60), fc.constant(Number.POSITIVE_INFINITY)),
      limitA: fc.constant(Number.POSITIVE_INFINITY),
    })
    .map((fields) => ({ ...createDemand(), ...fields, capV: fields.capA * fields.seriesOhm + fields.backV }));

  /** As the definition has it: d = min(full, what the cap needs). */
  const drawn = ({ count, command, dropV, seriesOhm, backV, capA, capV }: BusDemand, volts: number): number => {
    const head = Math.max(volts - dropV, 0);
    const line = (command * head - backV) / seriesOhm;
    return line > capA ? (count * capA * capV) / head : count * command * line;
  };

  it("finds a voltage that satisfies all, and none lies above it", () => {
    fc.assert(
      fc.property(
        fc.array(someDemand, { minLength: 1, maxLength: 5 }),
        within(0.001, 0.5),
        within(0, 14),
        (demands, ohm, start) => {
          const excess = (volts: number): number => 12 - ohm * demands.reduce((sum, one) => sum + drawn(one, volts), 0) - volts;
          const bus = createSharedBus(12, ohm);
          // The answer must not depend on where the last search ended.
          bus.solve([{ ...createDemand(), seriesOhm: 0.1, backV: start, command: 1 }]);
          const found = bus.solve(demands);
          const near = 1e-9 * Math.max(1, ohm * 1e3);
          expect(excess(found - near)).toBeGreaterThan(-1e-6);
          expect(excess(found + near)).toBeLessThan(1e-6);
          for (let k = 1; k <= 400; k++) expect(excess(found + near + (k / 400) * 30)).toBeLessThanOrEqual(1e-6);
        },
      ),
      { numRuns: 250, seed: 2 },
    );
  });
});

/** Protection under steady and changing currents. */
import { describe, expect, it } from "vitest";
import type { Protection } from "../../extension/model/drive.js";
import { fuseGates, fuseRate, replicaStateAfterReset, thermalReplica, tripVerdict } from "../../extension/model/protection.js";
import { solveHold, solveStall } from "../../extension/model/runs.js";
import { solveTravel } from "../../extension/model/travel.js";
import { armOf, driveOf, liftOf, plainMotor, reduction } from "./drives.js";
import "./expectShare.js";

const breaker: Protection = { kind: "breaker", holdCurrentA: 2, tripsAtA: 4, tripsAfterS: 6, carries: "motor" };

describe("a breaker under a steady current", () => {
  it("opens after its declared time at its declared current", () => {
    expect(tripVerdict(breaker, 4).opensAfterS).toBeCloseTo(6, 12);
  });

  it("tells no time within 5 % of what it holds, and never opens below", () => {
    expect(tripVerdict(breaker, 2.09)).toMatchObject({ opensAfterS: null, borderline: true });
    expect(tripVerdict(breaker, 1.91)).toMatchObject({ opensAfterS: null, borderline: true });
    expect(tripVerdict(breaker, 1.5)).toMatchObject({ opensAfterS: null, borderline: false });
    expect(tripVerdict(breaker, 2.2).opensAfterS).toBeGreaterThan(6);
  });

  it("cools by its own time constant while open", () => {
    const replica = thermalReplica(breaker);
    expect(replicaStateAfterReset(replica, replica.timeConstantS)).toBeCloseTo(Math.exp(-1), 12);
  });

  it("opens under a blocked motor that heats and so draws less and less, later than under the first current", () => {
    const thermal = { windingToHousingKPerW: 2, housingToAmbientKPerW: 8, windingTimeS: 90, housingTimeS: 600, limitC: 120 };
    const slow = { ...breaker, holdCurrentA: 20, tripsAtA: 40, tripsAfterS: 3 };
    const cold = solveStall(driveOf({ protection: slow }));
    const hot = solveStall(driveOf({ protection: slow, motor: { ...plainMotor, thermal } }));
    expect(cold.trip.opensAfterS).toBeCloseTo(tripVerdict(slow, 50).opensAfterS ?? 0, 12);
    expect(hot.trip.opensAfterS ?? 0).toBeGreaterThan(cold.trip.opensAfterS ?? Number.POSITIVE_INFINITY);
    expect(hot.limitAfterS ?? 0).toBeGreaterThan(0);
  });

  it("carries the supply's current where it sits there: less than a motor's under a lowered duty", () => {
    const load = liftOf(15, 0.05, 1);
    const atMotor = solveHold(driveOf({ load, protection: { ...breaker, holdCurrentA: 10, tripsAtA: 16 } }));
    const atSupply = solveHold(driveOf({ load, protection: { ...breaker, holdCurrentA: 10, tripsAtA: 16, carries: "supply" } }));
    expect(atMotor?.motorCurrentA).toBeGreaterThan(15);
    expect(atMotor?.trip.opensAfterS).not.toBeNull();
    expect(atSupply?.trip.opensAfterS).toBeNull();
  });
});

describe("a breaker along a travel", () => {
  it("opens when its replica reaches 1, and the travel's time stays told", () => {
    const drive = driveOf({
      load: armOf(6, 0.5, -1.2, 1.2),
      stages: [reduction(60, 0.8)],
      protection: { ...breaker, holdCurrentA: 5, tripsAtA: 20, tripsAfterS: 0.5 },
    });
    const travel = solveTravel(drive);
    expect(travel?.outcome).toBe("arrives");
    expect(travel?.opensAfterS).toBeGreaterThan(0);
    expect(travel?.opensAfterS ?? 0).toBeLessThan(travel?.timeS ?? 0);
    expect(travel?.carried.protection).toBeGreaterThan(1);
    const patient = solveTravel({ ...drive, protection: { ...breaker, holdCurrentA: 5, tripsAtA: 20, tripsAfterS: 5 } });
    expect(patient?.opensAfterS).toBeNull();
    // θ grows with 1/τ: ten times the τ leaves about a tenth.
    expect(patient?.carried.protection).toBeCloseToShare((travel?.carried.protection ?? 0) / 10, 0.15);
  });
});

describe("a fuse", () => {
  it.each([7.5, 40])("of %s A stays within its gates and passes through their corners", (rating) => {
    for (const [multiple, fastS, slowS] of fuseGates(rating)) {
      expect(1 / fuseRate(rating, multiple * rating, "fast").rate).toBeCloseToShare(fastS, 1e-9);
      expect(1 / fuseRate(rating, multiple * rating, "slow").rate).toBeCloseToShare(slowS, 1e-9);
    }
    for (let multiple = 1.1; multiple < 20; multiple *= 1.01) {
      const [fast, slow] = [fuseRate(rating, multiple * rating, "fast"), fuseRate(rating, multiple * rating, "slow")];
      expect(fast.rate).toBeGreaterThanOrEqual(slow.rate);
      const ahead = fuseRate(rating, multiple * rating * (1 + 1e-7), "slow");
      expect(ahead.rate).toBeGreaterThan(slow.rate);
    }
  });

  it("melts by constant I²t above 600 % and not at all below 110 %", () => {
    const at = (multiple: number) => fuseRate(10, multiple * 10, "slow").rate;
    expect(at(12) / at(6)).toBeCloseTo(4, 12);
    expect(tripVerdict({ kind: "fuse", ratingA: 10, carries: "motor" }, 10.9)).toEqual({
      opensAfterS: null,
      mayOpenAfterS: null,
      borderline: false,
    });
    expect(tripVerdict({ kind: "fuse", ratingA: 10, carries: "motor" }, 20)).toMatchObject({
      opensAfterS: 5,
      mayOpenAfterS: 0.15,
    });
  });

  it("may open on a travel's starting current by its fast gate before it must by its slow one, and then forgets", () => {
    const heavy = { load: armOf(6, 0.5, -1.2, 1.2), stages: [reduction(60, 0.8)] };
    const travel = solveTravel(driveOf({ ...heavy, protection: { kind: "fuse", ratingA: 10, carries: "motor" } }));
    expect(travel?.mayOpenAfterS).toBeGreaterThan(0);
    expect(travel?.opensAfterS).toBeNull();
    const light = solveTravel(driveOf({ load: liftOf(1, 0.05, 3), protection: { kind: "fuse", ratingA: 10, carries: "motor" } }));
    expect(light?.carried).toMatchObject({ protection: 0, fast: 0 });
  });
});

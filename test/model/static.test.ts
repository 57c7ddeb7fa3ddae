/** Properties that every mechanism obeys at steady running, over random valid ones. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { hardestPosition, requiredMotorTorque } from "../../extension/model/hardest.js";
import { availableLine, sheetLine } from "../../extension/model/line.js";
import { lossCurrent } from "../../extension/model/motor.js";
import { operatingPointAt } from "../../extension/model/operatingPoint.js";
import { linePoint, peakEfficiencyPoint, peakPowerPoint } from "../../extension/model/peaks.js";
import { shaftLoadOf } from "../../extension/model/shaftLoad.js";
import { solveMechanism } from "../../extension/model/solve.js";
import "./expectShare.js";
import { driveOf, rollerOf } from "./drives.js";
import { someDrive, someMotor } from "./randomDrives.js";

const share = fc.double({ min: 0, max: 1.3, noNaN: true });

describe("an operating point", () => {
  it("balances power: electrical = shaft + copper + the motor's own loss", () => {
    fc.assert(
      fc.property(someDrive, share, (drive, loadShare) => {
        const point = operatingPointAt(drive, loadShare * availableLine(drive).stallTorqueNm);
        const { motor } = drive;
        const copper = point.currentA ** 2 * motor.resistanceOhm;
        const shaftTorque = point.stalled
          ? 0
          : motor.torqueConstantNmPerA * (point.currentA - lossCurrent(motor, point.speedRadPerS));
        const loss = (motor.backEmfVPerRadPerS * point.currentA - shaftTorque) * point.speedRadPerS;
        expect(point.shaftPowerW + copper + loss).toBeCloseToShare(point.electricalPowerW, 1e-9);
      }),
    );
  });

  it("balances power from the open circuit to the motors' terminals", () => {
    fc.assert(
      fc.property(someDrive, share, (drive, loadShare) => {
        fc.pre(drive.driver === undefined || drive.driver.dropV < (drive.supply?.openCircuitV ?? drive.motor.voltageV));
        const point = operatingPointAt(drive, loadShare * availableLine(drive).stallTorqueNm);
        const supplyOhm = drive.supply?.resistanceOhm ?? 0;
        const given = (drive.supply?.openCircuitV ?? drive.motor.voltageV) * point.sourceCurrentA;
        const leads = drive.wiringOhm + (drive.driver?.resistanceOhm ?? 0);
        const spent =
          drive.motorCount * (point.electricalPowerW + point.currentA ** 2 * leads) +
          point.sourceCurrentA ** 2 * supplyOhm +
          (drive.driver?.dropV ?? 0) * point.sourceCurrentA;
        expect(spent).toBeCloseToShare(given, 1e-9);
      }),
    );
  });

  it("never runs faster under more load, nor on less current", () => {
    fc.assert(
      fc.property(someDrive, share, share, (drive, one, other) => {
        const stall = availableLine(drive).stallTorqueNm;
        const light = operatingPointAt(drive, Math.min(one, other) * stall);
        const heavy = operatingPointAt(drive, Math.max(one, other) * stall);
        expect(heavy.speedRadPerS).toBeLessThanOrEqual(light.speedRadPerS * (1 + 1e-12));
        expect(heavy.currentA).toBeGreaterThanOrEqual(light.currentA * (1 - 1e-12));
      }),
    );
  });

  it("never runs slower on more voltage", () => {
    fc.assert(
      fc.property(someDrive, share, fc.double({ min: 1, max: 2, noNaN: true }), (drive, loadShare, more) => {
        const supply = drive.supply ?? { openCircuitV: drive.motor.voltageV, resistanceOhm: 0, peukert: 1 };
        const raised = { ...drive, supply: { ...supply, openCircuitV: supply.openCircuitV * more } };
        const torque = loadShare * availableLine(drive).stallTorqueNm;
        const before = operatingPointAt(drive, torque).speedRadPerS;
        expect(operatingPointAt(raised, torque).speedRadPerS).toBeGreaterThanOrEqual(before * (1 - 1e-12));
      }),
    );
  });

  it("sag never raises the supply above its open circuit while it gives current", () => {
    fc.assert(
      fc.property(someDrive, share, (drive, loadShare) => {
        const point = operatingPointAt(drive, loadShare * availableLine(drive).stallTorqueNm);
        expect(point.supplyVoltageV).toBeLessThanOrEqual(drive.supply?.openCircuitV ?? drive.motor.voltageV);
      }),
    );
  });

  it("holds the current at the limit and slows down for it", () => {
    const drive = driveOf({ motorCurrentLimitA: 10, load: rollerOf(1) });
    const torque = drive.motor.torqueConstantNmPerA * 9.5;
    const free = operatingPointAt(driveOf(), torque);
    const limited = operatingPointAt(drive, torque);
    expect(free.currentA).toBeGreaterThan(10);
    expect(limited).toMatchObject({ currentA: 10, limitedBy: "limit", stalled: false });
    expect(limited.speedRadPerS).toBeLessThan(free.speedRadPerS);
    expect(operatingPointAt(drive, drive.motor.torqueConstantNmPerA * 10)).toMatchObject({
      speedRadPerS: 0,
      currentA: 10,
      stalled: true,
    });
  });

  it("draws less current at the faster of two points of equal output power", () => {
    // Common practice, no source: of two points of equal output power the faster draws less current.
    fc.assert(
      fc.property(someMotor, fc.double({ min: 0.01, max: 0.49, noNaN: true }), (motor, t) => {
        const line = sheetLine(motor);
        const fast = linePoint(line, t * line.stallTorqueNm);
        const slow = linePoint(line, (1 - t) * line.stallTorqueNm);
        expect(fast.shaftPowerW).toBeCloseToShare(slow.shaftPowerW, 1e-9);
        expect(fast.currentA).toBeLessThan(slow.currentA);
      }),
    );
  });
});

describe("peaks of a line", () => {
  it("no point of the line beats them", () => {
    fc.assert(
      fc.property(someMotor, fc.double({ min: 0, max: 1, noNaN: true }), (motor, t) => {
        const line = sheetLine(motor);
        const point = linePoint(line, t * line.stallTorqueNm);
        expect(point.shaftPowerW).toBeLessThanOrEqual(peakPowerPoint(line).shaftPowerW * (1 + 1e-12));
        expect(point.efficiency).toBeLessThanOrEqual(peakEfficiencyPoint(line).efficiency * (1 + 1e-12));
      }),
    );
  });
});

describe("the hardest position", () => {
  it("is not beaten by any position of the travel, either way", () => {
    fc.assert(
      fc.property(someDrive, fc.double({ min: 0, max: 1, noNaN: true }), (drive, t) => {
        const load = shaftLoadOf(drive);
        const position = (load.startRad + t * (load.endRad - load.startRad)) * load.ownPerRad;
        const hardest = hardestPosition(drive).motorTorqueNm;
        for (const direction of [1, -1] as const) {
          const torque = load.opposing(position / load.ownPerRad, direction);
          if (torque >= 0)
            expect(requiredMotorTorque(drive, position, direction)).toBeLessThanOrEqual(hardest * (1 + 1e-9) + 1e-12);
        }
      }),
    );
  });

  it("doubling the motors halves each one's torque", () => {
    fc.assert(
      fc.property(someDrive, (drive) => {
        const doubled = hardestPosition({ ...drive, motorCount: drive.motorCount * 2 });
        expect(doubled.motorTorqueNm).toBeCloseToShare(hardestPosition(drive).motorTorqueNm / 2, 1e-12);
      }),
    );
  });
});

describe("numbers of a mechanism", () => {
  it("are finite or null, whatever the legal input", () => {
    fc.assert(
      fc.property(someDrive, (drive) => expectFinite(solveMechanism(drive))),
      { numRuns: 300 },
    );
  }, 60_000);
});

function expectFinite(value: unknown, path = ""): void {
  if (typeof value === "number") expect(Number.isFinite(value), `${path} is ${value}`).toBe(true);
  else if (value && typeof value === "object")
    for (const [key, inner] of Object.entries(value)) expectFinite(inner, `${path}.${key}`);
}

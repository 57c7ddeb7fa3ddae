/** The hover's lines about time: which are told, and in which words. The numbers are given, not computed. */
import { describe, expect, it } from "vitest";
import { motor, spur } from "../../extension/declarations/index.js";
import { type RunNumbers, runLines } from "../../extension/features/hovers/runLines.js";
import type { Drive } from "../../extension/model/drive.js";

const THERMAL = {
  windingToHousing: "2 K/W",
  housingToAmbient: "5 K/W",
  windingTime: "20 s",
  housingTime: "600 s",
  limit: "155 degC",
} as const;

function drive(changes: Partial<Drive>, thermal?: typeof THERMAL): Drive {
  const sheet = {
    voltage: "12 V",
    noLoad: { speed: "120 rpm", current: "0.3 A" },
    stall: { torque: "3 N*m", current: "6 A" },
    ...(thermal ? { thermal } : {}),
  } as const;
  return {
    motor: motor(sheet).si,
    motorCount: 1,
    stages: [spur(20, 80).si],
    load: { kind: "roller", torqueNm: 1, inertiaKgM2: 0 },
    dragNm: 0,
    pwmDuty: 1,
    wiringOhm: 0,
    rampS: 0,
    ...changes,
  };
}

const BREAKER = { kind: "breaker", holdCurrentA: 2, tripsAtA: 4, tripsAfterS: 6, carries: "motor" } as const;

const STALL = { motorCurrentA: 6, sourceCurrentA: 6, tripsAfterS: null, windingLimitAfterS: null };
const TRAVEL = {
  timeS: 6.21,
  endSpeed: 0.1,
  peakMotorCurrentA: 5,
  rmsMotorCurrentA: 3,
  sourceEnergyJ: 80,
  windingPeakC: null,
  tripsAfterS: null,
};
const HOLD = { motorCurrentA: 1, tripsAfterS: null, windingFinalC: null, limitAfterS: null };

function numbers(some: Partial<RunNumbers>): RunNumbers {
  return { travel: null, hold: null, stall: STALL, ...some };
}

const FLYWHEEL = { kind: "flywheel", inertiaKgM2: 0.1, speedRadPerS: 10, dragNm: 0 } as const;

describe("runLines", () => {
  it.each<[string, Drive, RunNumbers, string[]]>([
    ["nothing that was not asked or computed", drive({ withinS: 9, holdForS: 5 }), numbers({}), []],
    [
      "a travel against what is allowed",
      drive({ withinS: 9 }),
      numbers({ travel: TRAVEL }),
      ["Travel: 6.21 s of the 9 s allowed"],
    ],
    ["a travel without a wish", drive({}), numbers({ travel: { ...TRAVEL, timeS: 0.25 } }), ["Travel: 250 ms"]],
    [
      "a travel that ends nowhere",
      drive({ withinS: 9 }),
      numbers({ travel: { ...TRAVEL, timeS: null } }),
      ["Travel: never arrives"],
    ],
    ["a flywheel", drive({ load: FLYWHEEL }), numbers({ travel: TRAVEL }), ["Spin-up: 6.21 s"]],
    [
      "a flywheel that is too slow",
      drive({ load: FLYWHEEL }),
      numbers({ travel: { ...TRAVEL, timeS: null } }),
      ["Spin-up: never reaches its speed"],
    ],
    [
      "what opens and what gets hot on the way",
      drive({ protection: BREAKER }, THERMAL),
      numbers({
        travel: { ...TRAVEL, tripsAfterS: 4.1, windingPeakC: 88 },
        stall: { ...STALL, tripsAfterS: 2, windingLimitAfterS: 14 },
      }),
      [
        "Travel: 6.21 s, protection opens after 4.1 s, winding up to 88 °C of 155 °C",
        "Stalled: 6 A, protection opens after 2 s, winding at its limit after 14 s",
      ],
    ],
    [
      "a hold",
      drive({ holdForS: 30, protection: BREAKER }),
      numbers({ hold: { ...HOLD, motorCurrentA: 2.4, tripsAfterS: 12, limitAfterS: 21 }, stall: { ...STALL, tripsAfterS: 2 } }),
      [
        "Hold for 30 s: 2.4 A, protection opens after 12 s, winding at its limit after 21 s",
        "Stalled: 6 A, protection opens after 2 s",
      ],
    ],
    [
      "a hold that stays cool",
      drive({ holdForS: 30 }, THERMAL),
      numbers({ hold: { ...HOLD, windingFinalC: 61 } }),
      ["Hold for 30 s: 1 A, winding at 61 °C of 155 °C", "Stalled: 6 A"],
    ],
    ["no hold that nobody asked for", drive({}), numbers({ hold: HOLD }), []],
    [
      "a stall that nothing ends",
      drive({ protection: BREAKER }),
      numbers({ stall: { ...STALL, motorCurrentA: 1.5 } }),
      ["Stalled: 1.5 A, protection never opens"],
    ],
    [
      "a stall within 5 % of what is held",
      drive({ protection: { ...BREAKER, carries: "supply" } }),
      numbers({ stall: { ...STALL, motorCurrentA: 1, sourceCurrentA: 1.95 } }),
      ["Stalled: 1 A, protection may or may not open"],
    ],
  ])("tells %s", (_, given, computed, expected) => {
    expect(runLines(given, computed)).toEqual(expected);
  });
});

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

describe("runLines", () => {
  it.each<[string, Drive, RunNumbers, string[]]>([
    ["nothing that was not computed", drive({ withinS: 9, holdForS: 5 }), { stall: { motorCurrentA: 6 } }, []],
    [
      "a travel against what is allowed",
      drive({ withinS: 9 }),
      { travel: { timeS: 6.21 } },
      ["Travel: 6.21 s of the 9 s allowed"],
    ],
    [
      "a travel without a wish",
      drive({}),
      { travel: { timeS: 0.25, tripsAfterS: null, windingPeakC: null } },
      ["Travel: 250 ms"],
    ],
    ["a travel that ends nowhere", drive({ withinS: 9 }), { travel: { timeS: null } }, ["Travel: never arrives"]],
    [
      "what opens and what gets hot on the way",
      drive({ protection: BREAKER }, THERMAL),
      { travel: { timeS: 6.2, tripsAfterS: 4.1, windingPeakC: 88 } },
      ["Travel: 6.2 s, protection opens after 4.1 s, winding up to 88 °C of 155 °C"],
    ],
    [
      "a hold",
      drive({ holdForS: 30, protection: BREAKER }, THERMAL),
      { hold: { motorCurrentA: 2.4, tripsAfterS: 12, windingFinalC: 190, limitAfterS: 21 } },
      ["Hold for 30 s: 2.4 A, protection opens after 12 s, winding at its limit after 21 s"],
    ],
    [
      "a hold that stays cool",
      drive({ holdForS: 30 }, THERMAL),
      { hold: { motorCurrentA: 1, tripsAfterS: null, windingFinalC: 61, limitAfterS: null } },
      ["Hold for 30 s: 1 A, winding at 61 °C of 155 °C"],
    ],
    ["no hold that nobody asked for", drive({}, THERMAL), { hold: { motorCurrentA: 1, windingFinalC: 61 } }, []],
    [
      "a stall",
      drive({ protection: BREAKER }, THERMAL),
      { stall: { motorCurrentA: 6, tripsAfterS: 1.2, windingLimitAfterS: 14 } },
      ["Stalled: 6 A, protection opens after 1.2 s, winding at its limit after 14 s"],
    ],
    [
      "a stall that nothing ends",
      drive({ protection: BREAKER }),
      { stall: { motorCurrentA: 1.5, tripsAfterS: null, windingLimitAfterS: null } },
      ["Stalled: 1.5 A, protection never opens"],
    ],
  ])("tells %s", (_, given, numbers, expected) => {
    expect(runLines(given, numbers)).toEqual(expected);
  });
});

/** The words of the declarations: what they return, what they refuse, and where they say it is. */
import { describe, expect, it } from "vitest";
import type { Issue } from "../../extension/declarations/definition.js";
import {
  arm,
  battery,
  between,
  breaker,
  DeclarationError,
  lift,
  mechanism,
  motor,
  planetary,
  reduction,
  spur,
  wheels,
} from "../../extension/declarations/index.js";
import { DEFINITIONS } from "../../extension/declarations/table.js";

const sheet = {
  voltage: "12 V",
  noLoad: { speed: "100 rpm", current: "0.2 A" },
  stall: { torque: "2 N*m", current: "4 A" },
} as const;

const hoist = {
  motor: motor(sheet),
  motorCount: 2,
  stages: [spur(16, 40), reduction(3)],
  load: lift({ mass: "20 kg", drumRadius: "40 mm", travel: "0.8 m" }),
};

describe("built values", () => {
  it("keep their strings, carry SI numbers, and are frozen to the depth", () => {
    const built = motor(sheet);
    expect(built).toMatchObject({ kind: "motor", ...sheet });
    expect(built.si.resistanceOhm).toBe(3);
    expect(Object.isFrozen(built) && Object.isFrozen(built.si)).toBe(true);
    expect("noLoad" in built && Object.isFrozen(built.noLoad)).toBe(true);
  });

  it("leave the caller's own objects alone but for freezing what they hold on to", () => {
    const options = { mass: "2 kg", drumRadius: "10 mm", travel: "1 m" } as const;
    expect(lift(options)).not.toBe(options);
  });

  it("give code the ratio as a number", () => {
    expect(mechanism("hoist", hoist).ratio).toBeCloseTo(7.5, 12);
    // Shigley, planetary with its ring fixed: 1 + 80/20 (from memory).
    expect(planetary(20, 80).ratio).toBe(5);
  });

  it("take the diameter for the radius", () => {
    expect(lift({ mass: "2 kg", drumDiameter: "80 mm", travel: "1 m" }).si.drumRadiusM).toBeCloseTo(0.04, 15);
    expect(wheels({ mass: "2 kg", diameter: "10 cm", grip: 1, distance: "1 m" }).si.radiusM).toBeCloseTo(0.05, 15);
  });

  it("read a range by its middle, and only where both ends are possible", () => {
    expect(arm({ mass: between("2 kg", "3 kg"), centreOfMass: "0.3 m", from: "0 deg", to: "90 deg" }).si.massKg).toBeCloseTo(
      2.5,
      12,
    );
    expect(() => arm({ mass: between("-1 kg", "3 kg"), centreOfMass: "0.3 m", from: "0 deg", to: "90 deg" })).toThrow(
      /-1 kg.*more than 0/,
    );
  });
});

describe("errors thrown to robot code", () => {
  it("are one DeclarationError that names every issue", () => {
    expect(() => motor({ ...sheet, voltage: "12 A" as never, stall: { torque: "2 kg", current: "4 A" } as never })).toThrow(
      DeclarationError,
    );
    expect(() => motor({ ...sheet, voltage: "12 A" as never, stall: { torque: "2 kg", current: "4 A" } as never })).toThrow(
      /motor: voltage: "12 A" is a current.*stall\.torque: "2 kg" is a mass/,
    );
  });
});

describe("issues", () => {
  const good = { mass: "2 kg", centreOfMass: "0.3 m", from: "0 deg", to: "90 deg" };
  it.each<readonly [name: string, args: readonly unknown[], issue: Partial<Issue>, says: RegExp]>([
    ["arm", [{ ...good, mass: "2 A" }], { path: [0, "mass"], at: "value" }, /is a current; here goes a mass/],
    [
      "arm",
      [{ ...good, mass: "-2 kg" }],
      { path: [0, "mass"], at: "value" },
      /"-2 kg" is impossible here: a mass must be more than 0/,
    ],
    ["arm", [{ ...good, mass: 2 }], { path: [0, "mass"], at: "value" }, /here goes a mass such as "20 kg", not 2/],
    ["arm", [{ ...good, centreOfMass: "40 m" }], { path: [0, "centreOfMass"], at: "value" }, /"40 m" is impossible/],
    ["arm", [{ ...good, to: "0 deg" }], { path: [0, "to"], at: "value" }, /is no travel/],
    ["arm", [withoutMass({ ...good })], { path: [0, "mass"], at: "callee" }, /arm needs the field "mass"/],
    ["arm", [{ ...withoutMass(good), mas: "2 kg" }], { path: [0, "mas"], at: "key" }, /did you mean "mass"\?/],
    ["arm", [{ ...good, colour: "red" }], { path: [0, "colour"], at: "key" }, /"colour" is not a field of arm; known here: mass/],
    ["arm", [], { path: [0], at: "callee" }, /arm is missing an argument/],
    ["spur", [0, 40], { path: [0], at: "value" }, /the driver's teeth must be a whole number from 1, not 0/],
    ["spur", [16, 40.5], { path: [1], at: "value" }, /not 40.5/],
    ["spur", [16], { path: [1], at: "callee" }, /spur is missing an argument: the driven gear's teeth/],
    [
      "spur",
      [16, 40, { efficiency: 1.2 }],
      { path: [2, "efficiency"], at: "value" },
      /1.2 is impossible here: it must be more than 0 and at most 1/,
    ],
    ["planetary", [40, 40], { path: [1], at: "value" }, /a ring of 40 teeth does not go around a sun of 40/],
    [
      "motor",
      [{ ...sheet, stall: { torqe: "2 N*m", current: "4 A" } }],
      { path: [0, "stall", "torqe"], at: "key" },
      /motor's "stall"; did you mean "torque"/,
    ],
    [
      "motor",
      [{ voltage: "12 V", resistance: "2 ohm", torqueConstant: "0.02 N*m/A" }],
      { path: [0, "noLoadCurrent"], at: "callee" },
      /needs the field "noLoadCurrent"/,
    ],
    [
      "lift",
      [{ mass: "2 kg", drumDiametre: "5 cm", travel: "1 m" }],
      { path: [0, "drumDiametre"], at: "key" },
      /did you mean "drumDiameter"\?/,
    ],
    ["lift", [{ mass: "2 kg", travel: "1 m" }], { path: [0, "drumRadius"], at: "callee" }, /"drumRadius" or "drumDiameter"/],
    [
      "breaker",
      [{ holdCurrent: "4 A", trips: { at: "2 A", after: "6 s" } }],
      { path: [0, "trips"], at: "value" },
      /"2 A", which is not above the "4 A"/,
    ],
    ["battery", [{ openCircuit: "12 V", resistance: "-90 mohm" }], { path: [0, "resistance"], at: "value" }, /0 or more/],
    ["between", ["4 kg", "4 m"], { path: [1], at: "value" }, /of one kind/],
    ["between", ["5 kg", "4 kg"], { path: [1], at: "value" }, /lies below the low end/],
    [
      "mechanism",
      ["hoist", { ...hoist, stages: [3] }],
      { path: [1, "stages", 0], at: "value" },
      /a stage such as spur\(16, 40\), not 3/,
    ],
    ["mechanism", ["", hoist], { path: [0], at: "value" }, /a name in quotes/],
    ["mechanism", ["hoist", { ...hoist, motor: spur(1, 2) }], { path: [1, "motor"], at: "value" }, /a motor\(…\), not a spur/],
    [
      "loadCurve",
      [
        {
          torque: [
            ["0 deg", "1 N*m"],
            ["90 deg", "2 N*m"],
            ["90 deg", "2 N*m"],
          ],
        },
      ],
      { path: [0, "torque", 2], at: "value" },
      /positions must rise/,
    ],
  ])("%s %j", (name, args, issue, says) => {
    const result = DEFINITIONS.get(name)?.check(args);
    expect(result?.built).toBeUndefined();
    expect(result?.issues).toHaveLength(1);
    expect(result?.issues[0]).toMatchObject(issue);
    expect(result?.issues[0]?.message).toMatch(says);
  });

  it("are all told, one a mistake", () => {
    const issues = DEFINITIONS.get("motor")?.check([
      { voltage: "12", noLoad: { speed: "1 rpm", curent: "1 A" }, stall: { torque: "1 N*m" } },
    ]).issues;
    expect(issues?.map(({ path, at }) => [path.join("."), at])).toEqual([
      ["0.voltage", "value"],
      ["0.noLoad.curent", "key"],
      ["0.stall.current", "callee"],
    ]);
  });

  it("never throw, whatever the arguments", () => {
    for (const definition of DEFINITIONS.values()) {
      for (const odd of [null, Symbol("odd"), 1n, () => 1, new Map(), [[]], { __proto__: null }, Number.NaN]) {
        expect(definition.check([odd, odd, odd, odd]).built).toBeUndefined();
      }
    }
  });
});

describe("batteries and floors", () => {
  it("take a voltage or a voltage for a time", () => {
    const given = { openCircuit: "12 V", resistance: "90 mohm" } as const;
    expect(battery({ ...given, mustStayAbove: "9 V" }).si.mustStayAbove).toEqual({ voltageV: 9, forS: 0 });
    expect(battery({ ...given, mustStayAbove: { voltage: "9 V", for: "20 ms" } }).si.mustStayAbove?.forS).toBeCloseTo(0.02, 15);
    expect(battery({ ...given, capacity: "3 A*h" }).si.capacityAh).toBeCloseTo(3, 12);
  });
  it("protect one motor unless told otherwise", () => {
    expect(breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "6 s" } }).si.carries).toBe("motor");
  });
});

function withoutMass<T extends { mass?: unknown }>({ mass: _, ...rest }: T): Omit<T, "mass"> {
  return rest;
}

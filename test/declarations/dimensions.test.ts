/** The table of dimensions says what the schemas say: each row is asked of them, and so is each field that has no row. */
import { describe, expect, it } from "vitest";
import { dimensionAt } from "../../extension/declarations/dimensions.js";
import { DEFINITIONS } from "../../extension/declarations/table.js";
import { DIMENSIONS, type Dimension } from "../../extension/units/table.js";

type Path = readonly (string | number)[];

/** Where each word has its object, and a way to put something at a path inside it. */
const OBJECT_AT: Readonly<Record<string, number>> = {
  spur: 2,
  chain: 2,
  belt: 2,
  planetary: 2,
  worm: 2,
  reduction: 1,
  mechanism: 1,
  robot: 1,
};

/** Objects with fields of their own. */
const NESTED: Readonly<Record<string, readonly Path[]>> = {
  motor: [["noLoad"], ["stall"], ["rated"], ["thermal"]],
  screw: [["collar"]],
  breaker: [["trips"]],
  ptc: [["trips"]],
  battery: [["mustStayAbove"]],
  mechanism: [["driver"]],
  robot: [["loadCycle", 0]],
};

/** Lists of pairs. */
const CURVES: readonly (readonly [string, string])[] = [
  ["lift", "counterbalance"],
  ["arm", "counterbalance"],
  ["loadCurve", "torque"],
  ["loadCurve", "inertia"],
];

describe("dimensionAt", () => {
  const words = [...DEFINITIONS.keys()].filter((word) => word !== "between");

  it.each(words)("agrees with the schema of %s at every field", (word) => {
    const argument = OBJECT_AT[word] ?? 0;
    const parents: Path[] = [[], ...(NESTED[word] ?? [])];
    const fields = parents.flatMap((parent) => fieldsBelow(word, argument, parent).map((field) => [...parent, field]));
    expect(fields.length).toBeGreaterThan(0);
    for (const path of fields) {
      expect({ path, dimension: dimensionAt(word, [argument, ...path]) }).toEqual({
        path,
        dimension: askedDimension(word, argument, path),
      });
    }
  });

  it("knows both forms of a motor", () => {
    for (const [field, dimension] of [
      ["resistance", "resistance"],
      ["torqueConstant", "torqueConstant"],
      ["noLoadCurrent", "current"],
    ] as const) {
      expect(askedDimension("motor", 0, [field])).toBe(dimension);
      expect(dimensionAt("motor", [0, field])).toBe(dimension);
    }
  });

  it.each(CURVES)("knows both parts of a point of %s's %s", (word, field) => {
    for (const part of [0, 1]) {
      const path = [field, 0, part];
      const asked = askedDimension(word, 0, path);
      expect(asked).toBeDefined();
      expect(dimensionAt(word, [0, ...path])).toBe(asked);
    }
  });

  it("knows nothing of what holds no quantity", () => {
    expect(dimensionAt("spur", [0])).toBeUndefined();
    expect(dimensionAt("mechanism", [1, "motorCount"])).toBeUndefined();
    expect(dimensionAt("mechanism", [1, "constructor"])).toBeUndefined();
    expect(dimensionAt("toString", [0, "length"])).toBeUndefined();
    expect(dimensionAt("motor", [0, "noLoad"])).toBeUndefined();
  });
});

/** The fields that the schema lists when it is given one that it doesn't know. */
function fieldsBelow(word: string, argument: number, parent: Path): string[] {
  const messages = issuesOf(word, argument, [...parent, "zzzzzzzzzz"], 1).map(({ message }) => message);
  const listed = messages.map((message) => /known here: (.*)$/.exec(message)?.[1]).find((one) => one !== undefined);
  return listed?.split(", ") ?? [];
}

/** The dimension that the schema names when it is given a boolean. */
function askedDimension(word: string, argument: number, path: Path): Dimension | undefined {
  const full = JSON.stringify([argument, ...path]);
  const message = issuesOf(word, argument, path, true).find((issue) => JSON.stringify(issue.path) === full)?.message ?? "";
  const found = Object.entries(DIMENSIONS).find(([, { noun, example }]) =>
    message.startsWith(`here goes ${noun} such as "${example}"`),
  );
  return found?.[0] as Dimension | undefined;
}

function issuesOf(word: string, argument: number, path: Path, value: unknown) {
  const args: unknown[] = Array.from({ length: argument }, () => "x");
  args.push(nest(path, value));
  return DEFINITIONS.get(word)?.check(args).issues ?? [];
}

function nest(path: Path, value: unknown): unknown {
  const [key, ...rest] = path;
  if (key === undefined) return value;
  if (typeof key === "number") return Array.from({ length: key + 1 }, () => nest(rest, value));
  return { [key]: nest(rest, value) };
}

/** Units inside strings: which are offered, where, and what accepting one leaves behind. */
import { describe, expect, it } from "vitest";
import { completionsAt } from "../../extension/features/completions.js";
import { analyseWithCursor } from "../support/cursorFixture.js";
import { MOTOR } from "../support/handNumbers.js";

/** The labels at the cursor. */
function labels(source: string): string[] {
  const { analysis, cursor } = analyseWithCursor(source);
  return completionsAt(analysis, cursor.file, cursor.offset).map(({ label }) => label);
}

/** The line of the cursor after the unit was accepted. */
function accepted(source: string, unit: string): string | undefined {
  const { analysis, cursor, files } = analyseWithCursor(source);
  const text = files.get(cursor.file) ?? "";
  const chosen = completionsAt(analysis, cursor.file, cursor.offset).find(({ label }) => label === unit);
  if (chosen === undefined) return undefined;
  const { start, end } = chosen.replaces;
  const changed = text.slice(0, start) + chosen.newText + text.slice(end);
  return changed.slice(changed.lastIndexOf("\n", start) + 1).split("\n")[0];
}

function lift(fields: string): string {
  return `import { between, lift } from "loadmark";\nconst KG = 4;\nconst tray = lift({\n${fields}\n});\n`;
}

const MASSES = ["kg", "g", "lb", "oz"];

describe("completionsAt", () => {
  it.each([
    ["after a number and a space", 'mass: "20 /*|*/"'],
    ["in a unit that is begun", 'mass: "20 k/*|*/"'],
    ["in a unit of another dimension", 'mass: "20 mm/*|*/"'],
    ["after a negative number with an exponent", 'mass: "-2.5e-3 /*|*/"'],
    ["in single quotes", "mass: '20 /*|*/'"],
    ["in a template", "mass: `20 /*|*/`"],
    ["in a template after a value", `mass: \`\${KG} /*|*/\``],
    ["in a template after a value that is not known", `mass: \`\${weigh()} /*|*/\``],
    ["in a string that is not closed", 'mass: "20 /*|*/'],
    ["beside fields that are refused", 'travel: "1 elbow", mass: "20 /*|*/", what: 3'],
    ["beside fields that are not known", 'travel: measure(), mass: "20 /*|*/"'],
    ["in a range", 'mass: between("20 kg", "30 /*|*/")'],
    ["in the first end of a range", 'mass: between("20 /*|*/", "30 kg")'],
    ["in a range of which nothing is there yet", 'mass: between("20 /*|*/", "")'],
  ])("offers masses for a mass %s", (_, field) => {
    expect(labels(lift(field))).toEqual(MASSES);
  });

  it.each([
    ["within the number", 'mass: "2/*|*/0 kg"'],
    ["without a space", 'mass: "20/*|*/"'],
    ["after two spaces", 'mass: "20  /*|*/"'],
    ["after words", 'mass: "about /*|*/"'],
    ["behind the string", 'mass: "20 kg"/*|*/'],
    ["before the string", 'mass: /*|*/"20 kg"'],
    ["in a value within a template", `mass: \`\${K/*|*/G} kg\``],
    ["in a field that is no quantity", 'carriagePerRope: "2 /*|*/"'],
    ["in a field that is not known", 'weight: "2 /*|*/"'],
  ])("offers nothing %s", (_, field) => {
    expect(labels(lift(field))).toEqual([]);
  });

  it.each([
    ["torque first in N*m", MOTOR.replace('"3 N*m"', '"3 /*|*/"'), ["N*m", "mN*m"]],
    ["speeds of rotation", MOTOR.replace('"120 rpm"', '"120 /*|*/"'), ["rpm", "rad/s"]],
    ["currents", MOTOR.replace('"6 A"', '"6 /*|*/"'), ["A", "mA"]],
  ])("offers %s in a nested field", (_, motor, first) => {
    expect(labels(`import { motor } from "loadmark";\nconst slow = ${motor};\n`).slice(0, 2)).toEqual(first);
  });

  it("follows a constant to the field that it feeds, in another file too", () => {
    const source = `//- sizes.ts
export const TRAVEL = "80 /*|*/";
//- robot.ts
import { lift } from "loadmark";
import { TRAVEL } from "./sizes.js";
export const tray = lift({ mass: "1 kg", drumRadius: "1 cm", travel: TRAVEL });
`;
    expect(labels(source)).toEqual(["m", "cm", "mm", "um", "in", "ft"]);
  });

  it("offers both parts of a point of a curve", () => {
    const curve = (first: string, second: string): string => `import { loadCurve } from "loadmark";
export const cam = loadCurve({ torque: [["0 deg", "1 N*m"], ["${first}", "${second}"]] });
`;
    expect(labels(curve("30 /*|*/", "2 N*m"))).toEqual(["deg", "rad", "rev"]);
    expect(labels(curve("30 deg", "2 /*|*/"))[0]).toBe("N*m");
  });

  it.each([
    ['mass: "20 /*|*/",', "lb", 'mass: "20 lb",'],
    ['mass: "20 k/*|*/g",', "lb", 'mass: "20 lb",'],
    ['mass: "20 /*|*/kg",', "oz", 'mass: "20 oz",'],
    [`mass: \`\${KG} k/*|*/\`,`, "kg", `mass: \`\${KG} kg\`,`],
  ])("replaces the unit that is there: %s", (field, unit, line) => {
    expect(accepted(lift(field), unit)).toBe(line);
  });

  it("says what a unit is", () => {
    const { analysis, cursor } = analyseWithCursor(`import { flywheel } from "loadmark";\nflywheel({ inertia: "3 /*|*/" });\n`);
    expect(completionsAt(analysis, cursor.file, cursor.offset)[0]?.detail).toBe("kg·m², a moment of inertia");
  });
});

/** Hovers on constants that are no teeth: masses, quantities, shares, counts. */
import { describe, expect, it } from "vitest";
import { checkStatic, OUTPUT_NM, gearedRobot as robot, row } from "../support/gearedRobot.js";
import { handPoint, liftTorque, MOTOR, perCent, three } from "../support/handNumbers.js";
import { hoverIn } from "../support/hover.js";

describe("a hover on another constant", () => {
  const numbers = (label: string, massKg: number): string[] => {
    const outputNm = liftTorque(massKg, 0.05);
    return row(label, outputNm, handPoint(outputNm, 4, 0.98));
  };

  it("says what a tenth more does, through text and arithmetic", () => {
    const gearing = "export const PINION = 20;\nexport const WHEEL = 80;\nexport const TRAY_KG/*|*/ = 8;";
    const load = `lift({ mass: \`\${TRAY_KG + 2} kg\`, drumRadius: "50 mm", travel: "0.8 m" })`;
    const source = robot({ gearing, load }).replace("{ PINION, WHEEL }", "{ PINION, TRAY_KG, WHEEL }");
    const { rows, markdown } = checkStatic(source, "TRAY_KG");
    expect(rows).toEqual([numbers("hoist", 10), numbers("… with 8.8, 10 % more", 10.8)]);
    expect(markdown).toContain("\nTRAY\\_KG is 8\n");
  });

  it("says it of an expression that is no literal", () => {
    const gearing = "export const PINION = 20;\nexport const WHEEL = 80;\nexport const TOTAL_KG/*|*/ = 8 + 2;";
    const load = `lift({ mass: \`\${TOTAL_KG} kg\`, drumRadius: "50 mm", travel: "0.8 m" })`;
    const source = robot({ gearing, load }).replace("{ PINION, WHEEL }", "{ PINION, TOTAL_KG, WHEEL }");
    expect(checkStatic(source, "TOTAL_KG").rows).toEqual([numbers("hoist", 10), numbers("… with 10 % more", 11)]);
  });

  it("says it of a quantity, with its other units", () => {
    const { rows, markdown } = checkStatic(
      robot({ load: 'lift({ mass: "10 k/*|*/g", drumRadius: "50 mm", travel: "0.8 m" })' }),
      '"10 kg"',
    );
    expect(rows).toEqual([numbers("hoist", 10), numbers("… with 11 kg, 10 % more", 11)]);
    // International pound: 0.45359237 kg.
    expect(markdown).toContain(`mass is 10 kg = 10000 g = ${three(10 / 0.45359237)} lb`);
  });

  it("says what a tenth less does where more is impossible", () => {
    const source = robot({}).replace("spur(PINION, WHEEL)", "spur(PINION, WHEEL, { efficiency: 0.9/*|*/5 })");
    const outputNm = OUTPUT_NM;
    expect(checkStatic(source, "0.95").rows).toEqual([
      row("hoist", outputNm, handPoint(outputNm, 4, 0.95)),
      row("… with 0.855, 10 % less", outputNm, handPoint(outputNm, 4, 0.855)),
    ]);
  });

  it("reaches through the motor and its file", () => {
    const source = robot({}).replace('"3 N*m"', '"3 N/*|*/*m"');
    const { rows } = checkStatic(source, '"3 N*m"');
    // Three tenths more of stall torque: the same line, scaled.
    const share = OUTPUT_NM / (4 * 0.98) / 3.3;
    expect(rows[1]?.[0]).toBe("… with 3.3 N·m, 10 % more");
    expect(rows[1]?.[4]).toBe(perCent(share));
    expect(rows[1]?.[2]).toBe(`${three((120 * (1 - share)) / 4)} rpm`);
  });

  it("reaches the battery of the robot that lists the mechanism", () => {
    const source = `${robot({})}//- pack.ts
import { battery, robot } from "loadmark";
import { hoist } from "./hoist.js";
export default robot("r", { supply: battery({ openCircuit: "12/*|*/ V", resistance: "0 ohm" }), mechanisms: [hoist] });
`;
    const { rows } = checkStatic(source, '"12 V"');
    // Without series resistance the whole line scales with voltage.
    expect(rows[1]?.[4]).toBe(perCent(OUTPUT_NM / (4 * 0.98) / 3.3));
  });

  it("counts motors by one", () => {
    const source = robot({}).replace("motor: slow,", "motor: slow, motorCount: 2/*|*/,");
    const { rows, markdown } = checkStatic(source, "2");
    expect(rows).toEqual([
      row("hoist", OUTPUT_NM, handPoint(OUTPUT_NM, 4, 0.98, 2)),
      row("… with 3, one motor more", OUTPUT_NM, handPoint(OUTPUT_NM, 4, 0.98, 3)),
      row("… with 1, one motor fewer", OUTPUT_NM, handPoint(OUTPUT_NM, 4, 0.98, 1)),
    ]);
    expect(markdown).toContain("\nmotorCount is 2\n");
  });

  it("says so when it feeds nothing", () => {
    const { markdown, rows } = checkStatic(
      `import { motor } from "loadmark";\nexport const spare = ${MOTOR.replace("0.3 A", "0.3/*|*/ A")};\n`,
      '"0.3 A"',
    );
    expect(rows).toEqual([]);
    expect(markdown).toMatch(/^\*\*current is 0.3 A = 300 mA.*\*\* {2}\nFeeds no mechanism\.$/);
  });

  it("is silent about words that are no quantity, and about names of mechanisms", () => {
    const source = robot({}).replace('"3 N*m", current: "6 A" },', '"3 N*m", current: "6 A" }, magnet: "neo/*|*/dymium",');
    expect(hoverIn(source)).toBeUndefined();
  });

  it("keeps hostile names inert", () => {
    const source = robot({}).replaceAll("WHEEL", "$__x").replace("export const $__x", "export const $__x/*|*/");
    expect(checkStatic(source, "$__x").markdown).toContain("$\\_\\_x is 80");
  });
});

/** Hovers on gear constants: wherever one is written, what it does to every mechanism that it feeds, and what one tooth does. */
import { describe, expect, it } from "vitest";
import { checkStatic, OUTPUT_NM, gearedRobot as robot, row } from "../support/gearedRobot.js";
import { type HandPoint, handPoint, liftTime, liftTorque, three } from "../support/handNumbers.js";
import { checkHover } from "../support/hover.js";

/** A spur stage without an efficiency counts 0.98. */
const withTeeth = (driver: number, driven: number): HandPoint => handPoint(OUTPUT_NM, driven / driver, 0.98);

describe("a hover on a gear constant", () => {
  const expected = [
    row("hoist", OUTPUT_NM, withTeeth(20, 80)),
    row("… with 81, one tooth more", OUTPUT_NM, withTeeth(20, 81)),
    row("… with 79, one tooth fewer", OUTPUT_NM, withTeeth(20, 79)),
  ];

  it("shows at its declaration, in another file, what it does to the mechanism", () => {
    const { rows, markdown } = checkStatic(
      robot({ gearing: "export const PINION = 20;\nexport const WH/*|*/EEL = 80;" }),
      "WHEEL",
    );
    expect(rows).toEqual(expected);
    expect(markdown).toMatch(/^\*\*Fine:\*\* hoist, 42 % of stall {2}\nWHEEL is 80\n/);
  });

  it("shows what becomes of the travel's time", () => {
    const gearing = "export const PINION = 20;\nexport const WHEEL/*|*/ = 80;";
    const times = checkHover(robot({ gearing }), "WHEEL").rows.map((cells) => cells[5]);
    expect(times).toEqual([80, 81, 79].map((driven) => `${three(liftTime(10, 0.05, 0.8, driven / 20, 0.98))} s`));
  });

  it("reads like this", () => {
    const gearing = "export const PINION/*|*/ = 20;\nexport const WHEEL = 80;";
    const load = 'roller({ torque: "5 N*m" })';
    expect(checkHover(robot({ gearing, load }).replace("lift, ", "roller, "), "PINION").markdown).toMatchInlineSnapshot(`
      "**Fine:** hoist, 43 % of stall  
      PINION is 20

      | at the hardest position | &ensp;output torque | &ensp;output speed | &ensp;current | &ensp;of stall |
      | --- | ---: | ---: | ---: | ---: |
      | hoist | &ensp;5 N·m of 11.8 N·m | &ensp;17.2 rpm | &ensp;2.72 A | &ensp;43 % |
      | … with 21, one tooth more | &ensp;5 N·m of 11.2 N·m | &ensp;17.4 rpm | &ensp;2.84 A | &ensp;45 % |
      | … with 19, one tooth fewer | &ensp;5 N·m of 12.4 N·m | &ensp;17 rpm | &ensp;2.6 A | &ensp;40 % |

      [Chart](command:loadmark.showChart?%5B%22hoist%22%5D)"
    `);
  });

  it.each([
    ["on its literal", "export const PINION = 20;\nexport const WHEEL = 8/*|*/0;", "80"],
    ["behind an assertion", "export const PINION = 20;\nexport const WHEEL/*|*/ = 80 as const;", "WHEEL"],
    ["with separators", "export const PINION = 20;\nexport const WHEEL/*|*/ = 8_0;", "WHEEL"],
    ["made of another", "const SET = 80;\nexport const PINION = 20;\nexport const WHEEL/*|*/ = SET;", "WHEEL"],
    ["that another is made of", "const SET/*|*/ = 80;\nexport const PINION = 20;\nexport const WHEEL = SET;", "SET"],
    ["that others work out", "const SET/*|*/ = 79;\nexport const PINION = 20;\nexport const WHEEL = SET + 1;", "SET"],
  ])("is the same %s", (_, gearing, about) => {
    const { rows } = checkStatic(robot({ gearing }), about);
    expect(rows.map((cells) => cells.slice(1))).toEqual(expected.map((cells) => cells.slice(1)));
  });

  const hoist = (imports: string, teeth: string): string => `import { lift, mechanism, spur } from "loadmark";
${imports}
import { slow } from "./motors.js";
export const hoist = mechanism("hoist", {
  motor: slow,
  stages: [spur(${teeth})],
  load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }),
});`;

  it.each([
    ["at its use", hoist('import { PINION, WHEEL } from "./gearing.js";', "PINION, WHE/*|*/EL"), "WHEEL"],
    ["in the import", hoist('import { PINION, WH/*|*/EEL } from "./gearing.js";', "PINION, WHEEL"), "WHEEL"],
    ["under another name", hoist('import { PINION, WHEEL as BIG } from "./gearing.js";', "PINION, B/*|*/IG"), "BIG"],
    ["where it is renamed", hoist('import { PINION, WHEEL as B/*|*/IG } from "./gearing.js";', "PINION, BIG"), "BIG"],
    ["before it is renamed", hoist('import { PINION, WH/*|*/EEL as BIG } from "./gearing.js";', "PINION, BIG"), "WHEEL"],
    ["through a namespace", hoist('import * as teeth from "./gearing.js";', "teeth.PINION, teeth.WH/*|*/EEL"), "teeth.WHEEL"],
  ])("is the same %s", (_, source, about) => {
    const { rows } = checkStatic(robot({ hoist: source }), about);
    expect(rows).toEqual(expected);
  });

  it("is the same in a file that only passes it on", () => {
    const source = robot({ hoist: hoist('import { PINION, WHEEL } from "./index.js";', "PINION, WHEEL") });
    expect(checkStatic(`${source}//- index.ts\nexport { PINION, WH/*|*/EEL } from "./gearing.js";\n`, "WHEEL").rows).toEqual(
      expected,
    );
  });

  it("is the same in the import of a default export", () => {
    const gearing = "export const PINION = 20;\nconst WHEEL = 80;\nexport default WHEEL;";
    const source = hoist('import B/*|*/IG, { PINION } from "./gearing.js";', "PINION, BIG");
    expect(checkStatic(robot({ gearing, hoist: source }), "BIG").rows).toEqual(expected);
  });

  it.each([
    ["a member of an enum", "enum Teeth { Pinion = 20, Wh/*|*/eel = 80 }", "Teeth.Pinion, Teeth.Wheel", "Wheel"],
    ["a field of a class", "class Gear { static readonly WH/*|*/EEL = 80; }", "20, Gear.WHEEL", "WHEEL"],
    ["a part of a destructured object", "const { big: B/*|*/IG } = { big: 80 } as const;", "20, BIG", "BIG"],
    ["an item of a list", "const TEETH = [20, 8/*|*/0] as const;", "TEETH[0], TEETH[1]", "80"],
    ["the chosen one of two", "const SMALL = false;\nconst WHEEL = SMALL ? 40 : 8/*|*/0;", "20, WHEEL", "80"],
    ["a variable that never changes", "let WH/*|*/EEL = 80;", "20, WHEEL", "WHEEL"],
  ])("is the same for %s", (_, before, teeth, about) => {
    expect(checkStatic(robot({ hoist: hoist(before, teeth) }), about).rows).toEqual(expected);
  });

  it("is the same for a property, at its name and at its use", () => {
    const gearing = (name: string): string => `export const TEETH = { pinion: 20, ${name}: 80 } as const;`;
    const source = (use: string): string => hoist('import { TEETH } from "./gearing.js";', `TEETH.pinion, TEETH.${use}`);
    expect(checkStatic(robot({ gearing: gearing("wh/*|*/eel"), hoist: source("wheel") }), "wheel").rows).toEqual(expected);
    expect(checkStatic(robot({ gearing: gearing("wheel"), hoist: source("wh/*|*/eel") }), "TEETH.wheel").rows).toEqual(expected);
  });

  it("is the same where nothing is named", () => {
    const { rows, markdown } = checkStatic(robot({ hoist: hoist("", "20, 8/*|*/0") }), "80");
    expect(rows).toEqual(expected);
    expect(markdown).toContain("\n80 teeth\n");
  });

  it("changes only itself when it is made of a constant that others use", () => {
    const gearing = "const SET = 40;\nexport const PINION = SET;\nexport const WHEEL/*|*/ = SET;";
    const { rows } = checkStatic(
      robot({ gearing, load: 'lift({ mass: "3 kg", drumRadius: "50 mm", travel: "0.8 m" })' }),
      "WHEEL",
    );
    const outputNm = liftTorque(3, 0.05);
    expect(rows[1]).toEqual(row("… with 41, one tooth more", outputNm, handPoint(outputNm, 41 / 40, 0.98)));
  });

  it("tells of every mechanism that it feeds, the worst first", () => {
    const source = `import { lift, mechanism, spur } from "loadmark";
import { PINION, WHEEL } from "./gearing.js";
import { slow } from "./motors.js";
const stages = [spur(PINION, WHEEL)];
const load = lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" });
export const pair = mechanism("pair", { motor: slow, motorCount: 2, stages, load });
export const one = mechanism("one", { motor: slow, stages, load });`;
    const { rows, markdown } = checkStatic(
      robot({ gearing: "export const PINION/*|*/ = 26;\nexport const WHEEL = 80;", hoist: source }),
      "PINION",
    );
    const numbers = (label: string, driver: number, count: number): string[] =>
      row(label, OUTPUT_NM, handPoint(OUTPUT_NM, 80 / driver, 0.98, count));
    expect(rows).toEqual([
      numbers("one", 26, 1),
      numbers("… with 27, one tooth more", 27, 1),
      numbers("… with 25, one tooth fewer", 25, 1),
      numbers("pair", 26, 2),
      numbers("… with 27, one tooth more", 27, 2),
      numbers("… with 25, one tooth fewer", 25, 2),
    ]);
    expect(markdown).toMatch(/^\*\*Past its peak of power:\*\* one, 54 % of stall/);
  });

  it("names those that no longer fit the table", () => {
    const names = ["a", "b", "c", "d", "e", "f", "g", "h", "i", "j"];
    const source = `import { lift, mechanism, spur } from "loadmark";
import { PINION, WHEEL } from "./gearing.js";
import { slow } from "./motors.js";
const rest = { motor: slow, stages: [spur(PINION, WHEEL)], load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }) };
${names.map((name) => `export const ${name} = mechanism("${name}", rest);`).join("\n")}`;
    const { rows, markdown } = checkStatic(
      robot({ gearing: "export const PINION/*|*/ = 20;\nexport const WHEEL = 80;", hoist: source }),
      "PINION",
    );
    expect(rows).toHaveLength(9);
    expect(markdown).toContain("Feeds d, e, f, g, h and 2 more too.");
  });

  it("leaves out a step that the declaration would refuse", () => {
    const gearing = "export const PINION/*|*/ = 1;\nexport const WHEEL = 4;";
    const { rows } = checkStatic(robot({ gearing }), "PINION");
    expect(rows.map(([label]) => label)).toEqual(["hoist", "… with 2, one tooth more"]);
  });

  it("says that nothing is checked when it is so", () => {
    const { rows } = checkStatic(
      robot({ load: "lift({})", gearing: "export const PINION/*|*/ = 20;\nexport const WHEEL = 80;" }),
      "PINION",
    );
    expect(rows).toEqual([["hoist", "not checked"]]);
  });
});

/** What is kept from one analysis to the next is what an analysis from nothing gives, and what an edit leaves alone is not made anew. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Analyser, createAnalyser } from "../../extension/analysis/analyser.js";
import type { Analysis } from "../../extension/analysis/analysis.js";
import type { Snapshot } from "../../extension/evaluator/value.js";
import { EditedWorkspace } from "../support/editedWorkspace.js";
import { parser } from "../support/parser.js";

const IMPORTS = 'import { battery, between, breaker, lift, mechanism, motor, robot, spur } from "loadmark";\n';
const HOIST = `mechanism("hoist", {
  motor: slow, stages: [spur(PINION, SIZES.driven)], within: "4 s",
  load: lift({ mass: \`\${MASS} kg\`, drumRadius: "30 mm", travel: "0.5 m" }),
})`;

/** Every way in which one file's findings can rest on another's text. */
const ROBOT: Readonly<Record<string, string>> = {
  "/robot/gearing.ts": "export const PINION = 14;\nexport const SIZES = { driven: 60 };\nexport const MASS = 3;\n",
  "/robot/motors.ts": `${IMPORTS}
export const slow = motor({ voltage: "12 V", noLoad: { speed: "138 rpm", current: "0.31 A" }, stall: { torque: "2.9 N*m", current: "4.7 A" } });
export const pack = battery({ openCircuit: "12.8 V", resistance: "90 mohm" });
`,
  "/robot/hoist.ts": `${IMPORTS}import { MASS, PINION, SIZES } from "./gearing.js";
import { slow } from "./motors.js";
// loadmark-allow unprotected: the rig is watched
export const hoist = ${HOIST};
`,
  "/robot/shelf.ts": `${IMPORTS}import { PINION } from "./gearing.js";
import { slow } from "./motors.js";
export const shelf = mechanism("shelf", { motor: slow, stages: [spur(PINION, 40)], load: lift({ mass: between("2 kg", "5 kg"), drumRadius: "30 mm", travel: "0.5 m" }) });
`,
  "/robot/helper.ts": `${IMPORTS}import { slow } from "./motors.js";
export const tray = (name: string, teeth: number) =>
  mechanism(name, { motor: slow, stages: [spur(12, teeth)], load: lift({ mass: "4 kg", drumRadius: "25 mm", travel: "0.2 m" }) });
`,
  "/robot/trays.ts": 'import { tray } from "./helper.js";\nexport const [one, two] = [tray("tray 1", 50), tray("tray 2", 20)];\n',
  "/robot/index.ts": `${IMPORTS}import { hoist } from "./hoist.js";
import { pack } from "./motors.js";
import { shelf } from "./shelf.js";
export default robot("rig", { supply: pack, mechanisms: [hoist, shelf], loadCycle: [{ lasts: "3 s", moving: [hoist], holding: [shelf] }] });
`,
  "/robot/print.ts": 'import { SIZES } from "./gearing.js";\nimport { show } from "./show.js";\nconsole.log(SIZES.driven);\n',
  "/robot/show.ts": "export const show = (sizes: { driven: number }) => console.log(sizes.driven);\n",
  "/robot/loadmark.json": "{}",
};

/** A text, and texts to put in its place; each may also be undone. */
const EDITS: readonly (readonly [file: string, old: string, ...others: string[]])[] = [
  ["/robot/gearing.ts", "PINION = 14", "PINION = 7", "PINION = 60", "PINION = Math.random()"],
  ["/robot/gearing.ts", "driven: 60", "driven: 20", "driven: 6000", "driven: -1"],
  ["/robot/gearing.ts", "MASS = 3;", "MASS = 30;", "MASS = ;", "MASS = 3; // heavy\n\n"],
  ["/robot/motors.ts", '"12 V"', '"24 V"', '"12 Volts"'],
  ["/robot/motors.ts", '"90 mohm"', '"2 ohm"', "RESISTANCE"],
  ["/robot/motors.ts", "export const pack", "const pack", "\n\nexport const pack"],
  ["/robot/hoist.ts", '"hoist"', '"shelf"', '"winch"'],
  ["/robot/hoist.ts", "unprotected: the", "stalls: the", "unprotected:\n// the"],
  ["/robot/hoist.ts", '"4 s"', '"0.1 s"', '"4'],
  ["/robot/shelf.ts", '"5 kg"', '"50 kg"', '"1 kg"'],
  [
    "/robot/shelf.ts",
    "{ motor: slow,",
    '{ motor: slow, protect: breaker({ holdCurrent: "1 A", trips: { at: "2 A", after: "1 s" } }),',
  ],
  ["/robot/helper.ts", "spur(12, teeth)", "spur(teeth, 12)", "spur(12, 0)"],
  ["/robot/helper.ts", "export const tray", "const tray"],
  ["/robot/trays.ts", "tray 2", "tray 1"],
  ["/robot/trays.ts", ', tray("tray 2", 20)', ""],
  ["/robot/trays.ts", "export const [one", 'import { SIZES } from "./gearing.js";\nSIZES.driven = 9;\nexport const [one'],
  ["/robot/print.ts", "console.log(SIZES.driven)", "show(SIZES)"],
  ["/robot/show.ts", "console.log(sizes.driven)", "(sizes.driven = 30)"],
  ["/robot/index.ts", "mechanisms: [hoist, shelf]", "mechanisms: [shelf, hoist]", "mechanisms: [hoist]"],
  ["/robot/index.ts", 'robot("rig"', 'export const other = robot("other", { supply: pack, mechanisms: [hoist] });\nrobot("rig"'],
  ["/robot/index.ts", '"3 s"', '"300 s"'],
  ["/robot/loadmark.json", "{}", '{ "levels": { "unprotected": "error", "no-headroom": "off" } }', '{ "levels": 3 }'],
];

function rootsOf({ texts }: EditedWorkspace): string[] {
  return Object.keys(ROBOT).filter((file) => file.endsWith(".ts") && (texts.diskText(file) ?? "").includes("loadmark"));
}

/** As a server does: what is looked for in vain is told. */
function analyse(workspace: EditedWorkspace, analyser: Analyser, mechanismsOnly = false): Analysis {
  for (;;) {
    const analysis = analyser.analyse(rootsOf(workspace), workspace.texts.capture(), mechanismsOnly);
    if (analysis.wanted.length === 0) return analysis;
    for (const file of analysis.wanted) workspace.texts.setDiskText(file, null);
  }
}

/** All that an analysis says. */
function told({ findings, findingsIn, mechanisms, motors, robots, files, inFile }: Analysis) {
  return {
    findings,
    sitting: new Map([...findingsIn].sort()),
    mechanisms: mechanisms.map(({ name, at, numbers, assumed, notChecked }) => ({ name, at, numbers, assumed, notChecked })),
    motors: motors.map(({ at, declared }) => ({ at, declared })),
    robots: robots.map(({ name, at, numbers, assumed, notChecked }) => ({ name, at, numbers, assumed, notChecked })),
    files: [...files].map(([file, { calls }]) => ({ file, calls: calls.length })),
    about: [...inFile].map(([file, one]) => ({ file, findings: one.findings })),
  };
}

describe("what is kept from one analysis to the next", () => {
  it("is what an analysis from nothing gives", () => {
    const step = fc.record({
      edit: fc.nat(EDITS.length - 1),
      choice: fc.nat(3),
      kind: fc.constantFrom("edit", "edit", "edit", "what-if", "without robots", "gone and back"),
    });
    fc.assert(
      fc.property(fc.array(step, { minLength: 1, maxLength: 12 }), (steps) => {
        const workspace = new EditedWorkspace(ROBOT);
        const analyser = createAnalyser(parser);
        analyse(workspace, analyser);
        for (const { edit, choice, kind } of steps) {
          const [file, ...choices] = EDITS[edit] as (typeof EDITS)[number];
          const before = workspace.texts.diskText(file) ?? "";
          const written = choices.findLast((one) => one !== "" && before.includes(one)) ?? choices[0] ?? "";
          const after = before.replace(written, () => choices[choice % choices.length] ?? "");
          if (kind === "gone and back") {
            workspace.put(file, null);
            analyse(workspace, analyser);
          }
          if (kind === "what-if") {
            const now = workspace.texts.capture();
            const changed: Snapshot = { ...now, read: (name) => (name === file ? after : now.read(name)) };
            analyser.analyse(rootsOf(workspace), changed);
          } else workspace.put(file, after);
          if (kind === "without robots") analyse(workspace, analyser, true);
          expect(told(analyse(workspace, analyser))).toEqual(told(analyse(workspace, createAnalyser(parser))));
        }
      }),
      { numRuns: 120, seed: 11 },
    );
  }, 60_000);

  it("is made anew only where an edit reaches", () => {
    const workspace = new EditedWorkspace(ROBOT);
    const analyser = createAnalyser(parser);
    const before = analyse(workspace, analyser);
    workspace.put("/robot/shelf.ts", (ROBOT["/robot/shelf.ts"] ?? "").replace('"5 kg"', '"50 kg"'));
    const after = analyse(workspace, analyser);
    const isKept = (file: string) => after.inFile.get(file) === before.inFile.get(file);
    const expected = new Map(
      [...before.inFile.keys()].map((file) => [file, !["/robot/shelf.ts", "/robot/index.ts"].includes(file)]),
    );
    expect(new Map([...after.inFile.keys()].map((file) => [file, isKept(file)]))).toEqual(expected);
    expect(after.findingsIn.get("/robot/shelf.ts")).not.toEqual(before.findingsIn.get("/robot/shelf.ts"));
    expect(after.findingsIn.get("/robot/helper.ts")).toBe(before.findingsIn.get("/robot/helper.ts"));
  });

  it("knows of a file that is read only since another one changed", () => {
    const workspace = new EditedWorkspace(ROBOT);
    const analyser = createAnalyser(parser);
    const isKnown = () => analyse(workspace, analyser).mechanisms.find(({ name }) => name === "hoist")?.numbers !== undefined;
    expect(isKnown()).toBe(true);
    workspace.replace("/robot/print.ts", "console.log(SIZES.driven)", "show(SIZES)");
    expect(isKnown()).toBe(true);
    workspace.replace("/robot/show.ts", "console.log(sizes.driven)", "(sizes.driven = 30)");
    expect(isKnown()).toBe(false);
  });

  it("survives an analysis that fails", () => {
    const workspace = new EditedWorkspace(ROBOT);
    const analyser = createAnalyser(parser);
    analyse(workspace, analyser);
    workspace.put("/robot/shelf.ts", (ROBOT["/robot/shelf.ts"] ?? "").replace('"5 kg"', '"5 pounds"'));
    const now = workspace.texts.capture();
    // A refused value's text is read once more at the end, when most steps are done.
    const failingAt = (last: number): Snapshot => {
      let reads = 0;
      const read = (file: string) => {
        if (file === "/robot/shelf.ts" && ++reads === last) throw new Error("no disk");
        return now.read(file);
      };
      return { ...now, read };
    };
    expect(() => analyser.analyse(rootsOf(workspace), failingAt(3))).toThrow("no disk");
    expect(told(analyse(workspace, analyser))).toEqual(told(analyse(workspace, createAnalyser(parser))));
  });
});

/** A workspace whose texts are edited at random, and its results: real texts, a real analysis. Nothing waits, nothing is sent. */
import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { Result } from "../../extension/server/session.js";
import { Texts } from "../../extension/server/texts.js";
import { MOTOR } from "./handNumbers.js";
import { parser } from "./parser.js";

const IMPORT = 'import { battery, lift, mechanism, motor, robot, spur } from "loadmark";\n';
const LOAD = 'lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" })';

const hoist = (name: string, teeth: string): string =>
  `export const ${name} = mechanism("${name}", { motor: slow, stages: [spur(20, ${teeth})], load: ${LOAD} });\n`;

/** Mechanisms through a helper, in a loop, with gears from elsewhere; robots that list mechanisms of other files, and none. */
export const WORKSPACE: Readonly<Record<string, string>> = {
  "/w/motors.ts": `${IMPORT}export const slow = ${MOTOR};\nexport const pack = battery({ openCircuit: "12 V", resistance: "90 mohm", mustStayAbove: "11.2 V" });\n`,
  "/w/gears.ts": 'import { spur } from "loadmark";\nexport const WHEEL = 60;\nexport const pair = spur(20, 70);\n',
  "/w/make.ts": `${IMPORT}import { slow } from "./motors.js";\nexport const make = (name: string, teeth: number) =>\n  mechanism(name, { motor: slow, stages: [spur(20, teeth)], load: ${LOAD} });\n`,
  "/w/a.ts": `${IMPORT}import { slow } from "./motors.js";\nimport { WHEEL } from "./gears.js";\n${hoist("upper", "80")}${hoist("middle", "WHEEL")}`,
  "/w/b.ts": `${IMPORT}import { slow } from "./motors.js";\nimport { pair } from "./gears.js";\n// loadmark-allow past-peak: known\n${hoist("lower", "50").replace("[spur(20, 50)]", "[pair]")}${hoist("vague", "teeth()")}`,
  "/w/c.ts":
    'import { make } from "./make.js";\nexport const left = make("left", 80);\nexport const right = make("right", 40);\n',
  "/w/names.ts": 'export const NAME = "named";\n',
  "/w/d.ts": `${IMPORT}import { slow } from "./motors.js";\nfor (const name of ["near", "far"]) mechanism(name, { motor: slow, stages: [spur(20, 30)], load: ${LOAD} });\n`,
  "/w/e.ts": `${IMPORT}import { slow, pack } from "./motors.js";\n${hoist("solo", "60").replace(LOAD, `${LOAD}, supply: pack`)}`,
  "/w/robot.ts": `${IMPORT}import { pack } from "./motors.js";\nimport { upper, middle } from "./a.js";\nimport { left } from "./c.js";\nexport default robot("mover", { supply: pack, mechanisms: [upper, left, middle] });\n`,
  "/w/other.ts": `${IMPORT}import { pack } from "./motors.js";\nimport { lower } from "./b.js";\nimport { solo } from "./e.js";\nexport default robot("other", { supply: pack, mechanisms: [lower, solo], loadCycle: [{ lasts: "9 s", moving: [lower, solo] }] });\n`,
  "/w/plain.ts": "export const NOTHING = 1;\n",
};

/** What is replaced by what, in any file that holds it. */
export const EDITS: readonly (readonly [string, string])[] = [
  ["spur(20, 80)", "spur(20, 20)"],
  ["spur(20, 20)", "spur(20, 80)"],
  ["WHEEL = 60", "WHEEL = 20"],
  ["WHEEL = 20", "WHEEL = 60"],
  ["spur(20, 70)", "spur(20, 30)"],
  ["spur(20, 30)", "spur(20, 70)"],
  ["mechanisms: [upper, left, middle]", "mechanisms: [middle]"],
  ["mechanisms: [middle]", "mechanisms: [upper, left, middle]"],
  ['[lower, solo], loadCycle: [{ lasts: "9 s", moving: [lower, solo]', '[lower], loadCycle: [{ lasts: "8 s", moving: [lower]'],
  ['[lower], loadCycle: [{ lasts: "8 s", moving: [lower]', '[lower, solo], loadCycle: [{ lasts: "9 s", moving: [lower, solo]'],
  ['export const left = make("left"', 'import { NAME } from "./names.js"; export const left = make(NAME'],
  ['"named"', '"renamed"'],
  ['"renamed"', '"named"'],
  ['"left", 80', '"left", 60'],
  ['"left", 60', '"upper", 80'],
  ['"upper", 80', '"left", 80'],
  ["past-peak: known", "past-peak"],
  ["loadmark-allow past-peak", "loadmark-allow stalls"],
  ["loadmark-allow stalls", "loadmark-allow past-peak: known"],
  ['["near", "far"]', '["near", "far", "third"]'],
  ['["near", "far", "third"]', '["far"]'],
  ['["far"]', '["near", "far"]'],
  ["load: lift", "lod: lift"],
  ["lod: lift", "load: lift"],
  [" from ", "\nfrom "],
  ["\nfrom ", " from "],
  ['"12 V"', '"9 V"'],
  ['"9 V"', '"12 V"'],
  ['robot("mover"', 'robot("mover two"'],
  ['robot("mover two"', 'robot("mover"'],
  ["NOTHING = 1", "NOTHING = 2"],
  ["NOTHING = 2", "NOTHING = 1"],
  ["export default robot", "robot"],
  ["teeth()", "90"],
];

export class EditedWorkspace {
  readonly texts = new Texts({ keepImporters: (files) => files, canonical: (file) => file });
  readonly #analyse = createAnalyser(parser).analyse;
  #version = 0;

  constructor(files = WORKSPACE) {
    for (const [file, text] of Object.entries(files)) this.put(file, text);
    this.texts.imports.markWhole();
  }

  readonly uriOf = (file: string): string => this.texts.uriOf(file);

  put(file: string, text: string | null): void {
    this.texts.setDiskText(file, text);
    this.texts.imports.setDiskText(file, text);
  }

  text(file: string): string | undefined {
    return this.texts.openText(file)?.text ?? this.texts.diskText(file) ?? undefined;
  }

  /** Types into the document where it is open, else changes the file. False where the file lacks the text. */
  replace(file: string, text: string, replacement: string): boolean {
    const before = this.text(file);
    if (before === undefined || !before.includes(text)) return false;
    const after = before.replace(text, replacement);
    const open = this.texts.openText(file);
    if (open === undefined) this.put(file, after);
    else this.texts.change(open.uri, this.#nextVersion(), [{ text: after }]);
    return true;
  }

  /** By its own address, or by another that means the same. */
  open(file: string, otherwise = false): void {
    const text = this.text(file);
    const uri = `file://${otherwise ? file.replace("/w/", "/%77/") : file}`;
    if (text !== undefined) this.texts.open(uri, this.#nextVersion(), text);
  }

  close(file: string): void {
    const open = this.texts.openText(file);
    if (open !== undefined) this.texts.close(open.uri);
  }

  result(): Result {
    const snapshot = this.texts.capture();
    const roots = [...this.texts.diskKeys()].filter((file) => snapshot.read(file)?.includes('"loadmark"'));
    return { analysis: this.#analyse(roots, snapshot), snapshot, analyse: this.#analyse };
  }

  #nextVersion(): number {
    this.#version += 1;
    return this.#version;
  }
}

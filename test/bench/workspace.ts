// Writes a workspace the way a robot project looks, seeded, so that every run measures the same texts: cells of twenty files, five of
// which declare mechanisms, the others their shared numbers and the code around them. It measures nothing.

import { cp, mkdir, rm, symlink, writeFile } from "node:fs/promises";
import { dirname, join } from "node:path";
import { repositoryRoot } from "../workbench/paths.js";
import { plainFile } from "./plainCode.js";

export interface BenchWorkspace {
  readonly folder: string;
  readonly files: number;
  readonly lines: number;
  /** A file that declares two mechanisms, one of whose numbers is edited. */
  readonly mechanism: EditedFile;
  /** A file of constants that five files of mechanisms use. */
  readonly constants: EditedFile & { readonly users: readonly string[] };
}

/**
 * A file with a number that edits replace. Each of `numberAt` differs from all others, so that no result can be one of before, and from
 * the one before so far that the findings' words differ.
 */
export interface EditedFile {
  readonly path: string;
  readonly text: string;
  /** Where the number stands. */
  readonly start: number;
  readonly end: number;
  numberAt(edit: number): string;
}

const FILES_PER_CELL = 20;
const MECHANISM_FILES_PER_CELL = 5;

/** `files` is a multiple of twenty; a quarter of them declare mechanisms. */
export async function writeWorkspace(folder: string, files: number): Promise<BenchWorkspace> {
  await rm(folder, { recursive: true, force: true });
  const texts = new Map<string, string>([
    ["package.json", '{ "name": "bench-robot", "type": "module", "dependencies": { "loadmark": "*" } }\n'],
    ["tsconfig.json", TSCONFIG],
  ]);
  const cells = Math.floor(files / FILES_PER_CELL);
  for (let cell = 0; cell < cells; cell++) for (const [name, text] of cellFiles(cell)) texts.set(`src/cell${cell}/${name}`, text);
  for (const [name, text] of texts) {
    await mkdir(dirname(join(folder, name)), { recursive: true });
    await writeFile(join(folder, name), text);
  }
  const library = join(folder, "node_modules/loadmark");
  await mkdir(library, { recursive: true });
  await cp(join(repositoryRoot, "package.json"), join(library, "package.json"));
  await cp(join(repositoryRoot, "dist/declarations"), join(library, "dist/declarations"), { recursive: true });
  // Robot code on a small computer is compiled against Node's types, as a rule.
  await mkdir(join(folder, "node_modules/@types"), { recursive: true });
  await symlink(join(repositoryRoot, "node_modules/@types/node"), join(folder, "node_modules/@types/node"));
  const edited = (path: string, name: string, numberAt: (edit: number) => string): EditedFile => {
    const text = texts.get(path) ?? "";
    const { index, 0: declaration } = new RegExp(`(?<=const ${name} = )[^;]+`).exec(text) ?? { index: 0, 0: "" };
    return { path: join(folder, path), text, start: index, end: index + declaration.length, numberAt };
  };
  const lines = [...texts.values()].reduce((sum, text) => sum + text.split("\n").length, 0);
  return {
    folder,
    files: texts.size - 2,
    lines,
    mechanism: edited("src/cell1/mechanism2.ts", "LOAD_KG", (edit) => (5 + (edit % 4001) / 1000 + edit * 1e-7).toFixed(7)),
    constants: {
      ...edited("src/cell1/gearing.ts", "DRUM_RADIUS_MM", (edit) => (30 + (edit % 41) * 0.35 + edit * 1e-6).toFixed(6)),
      users: Array.from({ length: MECHANISM_FILES_PER_CELL }, (_, n) => join(folder, `src/cell1/mechanism${n}.ts`)),
    },
  };
}

function cellFiles(cell: number): [string, string][] {
  const mechanisms = Array.from({ length: MECHANISM_FILES_PER_CELL }, (_, n): [string, string] => [
    `mechanism${n}.ts`,
    mechanismFile(cell, n),
  ]);
  const shared: [string, string][] = [
    ["gearing.ts", gearing()],
    ["motors.ts", motors()],
    ["robot.ts", robotFile(cell)],
  ];
  const plain = Array.from({ length: FILES_PER_CELL - mechanisms.length - shared.length }, (_, n): [string, string] => [
    `part${n}.ts`,
    plainFile(cell, n),
  ]);
  return [...mechanisms, ...shared, ...plain];
}

function mechanismFile(cell: number, n: number): string {
  const name = `${["tray", "lid", "shelf", "drum", "gate"][n]} ${cell}`;
  return `/** Two mechanisms of the cell, and what the rest of the code asks of them. */
import { arm, breaker, lift, mechanism, spur } from "loadmark";
import { DRIVEN, DRUM_RADIUS_MM, PINION } from "./gearing.js";
import { pack, slowMotor } from "./motors.js";

const LOAD_KG = ${(3.5 + n).toFixed(1)};

export const hoist = mechanism("${name} hoist", {
  motor: slowMotor,
  motorCount: 2,
  stages: [spur(PINION, DRIVEN.slow), spur(20, ${30 + n})],
  load: lift({ mass: \`\${LOAD_KG} kg\`, drumRadius: \`\${DRUM_RADIUS_MM} mm\`, travel: "0.7 m" }),
  within: "9 s",
  protect: breaker({ holdCurrent: "3 A", trips: { at: "6 A", after: "4 s" } }),
  supply: pack,
});

export const flap = mechanism("${name} flap", {
  motor: slowMotor,
  stages: [spur(PINION, DRIVEN.fast)],
  load: arm({ mass: "${(0.8 + n / 10).toFixed(1)} kg", centreOfMass: "180 mm", from: "-10 deg", to: "85 deg" }),
});

/** Turns of the motor that raise the load by so much. */
export function turnsFor(metres: number): number {
  return (metres * 1000 * hoist.ratio) / (2 * Math.PI * DRUM_RADIUS_MM);
}

${plainFile(cell, 100 + n)}`;
}

function gearing(): string {
  return `/** Tooth counts of the gears on the bench. */
export const PINION = 14;
export const DRIVEN = { slow: 60, fast: 48 } as const;
export const DRUM_RADIUS_MM = 30.5;
`;
}

function motors(): string {
  return `/** Invented sheets, and the pack that runs them. */
import { battery, motor } from "loadmark";

export const slowMotor = motor({
  voltage: "12 V",
  noLoad: { speed: "138 rpm", current: "0.31 A" },
  stall: { torque: "2.9 N*m", current: "4.7 A" },
});

export const pack = battery({ openCircuit: "12.8 V", resistance: "90 mohm", capacity: "4 A*h", mustStayAbove: "9.5 V" });
`;
}

function robotFile(cell: number): string {
  const numbers = Array.from({ length: MECHANISM_FILES_PER_CELL }, (_, n) => n);
  const imports = numbers.map((n) => `import { flap as flap${n}, hoist as hoist${n} } from "./mechanism${n}.js";`).join("\n");
  return `/** The cell as a whole. */
import { robot } from "loadmark";
${imports}
import { pack } from "./motors.js";

export default robot("cell ${cell}", { supply: pack, mechanisms: [${numbers.map((n) => `hoist${n}, flap${n}`).join(", ")}] });
`;
}

const TSCONFIG = `{
  "compilerOptions": {
    "target": "es2023", "module": "nodenext", "moduleResolution": "nodenext", "lib": ["es2023"], "types": ["node"],
    "strict": true, "noEmit": true, "skipLibCheck": true
  },
  "include": ["src"]
}
`;

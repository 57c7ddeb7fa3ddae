/** Half-typed and garbled files: no feature throws, and every span that one gives lies within its file. */
import { describe, expect, it } from "vitest";
import { operatingPointChart } from "../../extension/features/charts/operatingPoint.js";
import { codeLensesOf } from "../../extension/features/codeLenses.js";
import { completionsAt } from "../../extension/features/completions.js";
import { hoverAt } from "../../extension/features/hover.js";
import { inlayHintsIn } from "../../extension/features/inlayHints.js";
import { quickFixesAt } from "../../extension/features/quickFixes.js";
import { documentSymbolsOf, workspaceSymbolsOf } from "../../extension/features/symbols.js";
import { analyseWithCursor } from "../support/cursorFixture.js";
import { MOTOR } from "../support/handNumbers.js";
import { wholeStatus, wholeTree } from "../support/overview.js";

const WHOLE = `import { arm, battery, between, lift, mechanism, motor, robot, spur } from "loadmark";
import { PINION as SMALL, TEETH } from "./gearing.js";
const slow = ${MOTOR};
const KG = 4;
/* allowed */ // loadmark-allow past-peak: known
export const hoist = mechanism("hoist", {
  motor: slow, motorCount: 2, stages: [spur(SMALL, TEETH.wheel, { efficiency: 0.95 })],
  load: lift({ mass: \`\${KG + 2} kg\`, drumRadius: between("4 cm", "5 cm"), travel: "0.8 m" }), within: "9 s",
});
export const flap = mechanism("flap", { motor: slow, stages: [spur(SMALL, 40)], load: arm({ mass: "1 kg", centreOfMass: "20 cm", from: "0 deg", to: "90 deg" }) });
export default robot("r", { supply: battery({ openCircuit: "12 V", resistance: "90 mohm" }), mechanisms: [hoist, flap] });
`;
const GEARING = "//- gearing.ts\nexport const PINION = 20;\nexport const TEETH = { wheel: 80 } as const;\n";

/** A small generator with a seed (numerical recipes' constants), so that a failure comes again. */
function randomFrom(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
}

function garble(text: string, random: (below: number) => number): string {
  const [from, to] = [random(text.length), random(text.length)].sort((one, other) => one - other) as [number, number];
  const brackets = "()[]{}`\"'\\$/*";
  switch (random(5)) {
    case 0:
      return text.slice(0, from);
    case 1:
      return text.slice(0, from) + text.slice(Math.min(to, from + 30));
    case 2:
      return text.slice(0, from) + (brackets[random(brackets.length)] ?? "") + text.slice(from);
    case 3:
      return text.slice(0, from) + text.slice(from, Math.min(to, from + 60)).repeat(3) + text.slice(from);
    default:
      return text.slice(0, from) + String.fromCharCode(random(0xffff)) + text.slice(from + 1);
  }
}

describe("on garbled text", () => {
  it("features stay calm and within the text", () => {
    const random = randomFrom(20);
    let hovers = 0;
    for (let round = 0; round < 30; round++) {
      const { analysis, analyse, files } = analyseWithCursor(`${GEARING}//- robot.ts\n${garble(WHOLE, random)}`);
      const within = ({ file, start, end }: { readonly file: string; readonly start: number; readonly end: number }): void => {
        expect(0 <= start && start <= end && end <= (files.get(file)?.length ?? -1)).toBe(true);
      };
      for (const [file, text] of files) {
        for (const { span } of codeLensesOf(analysis, file)) within(span);
        for (const { offset } of inlayHintsIn(analysis, file, 0, text.length)) within({ file, start: offset, end: offset });
        for (const { span, selection } of documentSymbolsOf(analysis, file)) for (const one of [span, selection]) within(one);
        for (const { edits } of quickFixesAt(analysis, file, 0, text.length)) edits.forEach(within);
        for (let visit = 0; visit < 8; visit++) {
          const offset = random(text.length + 1);
          for (const { replaces } of completionsAt(analysis, file, offset)) within(replaces);
          const hover = hoverAt(analysis, file, offset, analyse);
          if (hover === undefined) continue;
          hovers += 1;
          within(hover.span);
          expect(hover.markdown).not.toMatch(/\b(?:NaN|Infinity|undefined|null)\b/);
        }
      }
      const { robots, apart } = wholeTree(analysis);
      for (const { at } of [...robots, ...robots.flatMap(({ mechanisms }) => mechanisms), ...apart]) within(at);
      expect(wholeStatus(analysis)?.text).not.toBe("");
      workspaceSymbolsOf(analysis, "o");
      for (const { name } of analysis.mechanisms) operatingPointChart(analysis, name);
    }
    expect(hovers).toBeGreaterThan(50);
  }, 60_000);
});

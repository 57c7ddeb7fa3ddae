/** Proposals on random overloaded robots of every kind of load: each one, applied and checked again, clears its finding and brings nothing new. */
import { type Arbitrary, assert, constantFrom, integer, property, record } from "fast-check";
import { describe, expect, it } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { Analysis, Finding } from "../../extension/analysis/analysis.js";
import { proposalsFor } from "../../extension/analysis/propose.js";
import { withEdits } from "../../extension/analysis/writeChange.js";
import { analyseFixture } from "../support/checkFindings.js";
import { parser } from "../support/parser.js";

const LOADS = {
  lift: (size: number) => `lift({ mass: "${size} kg", drumRadius: "30 mm", travel: "0.6 m" })`,
  arm: (size: number) => `arm({ mass: "${size / 4} kg", centreOfMass: "0.35 m", from: "-20 deg", to: "70 deg" })`,
  wheels: (size: number) => `wheels({ mass: "${size * 3} kg", radius: "40 mm", grip: 0.9, slope: "20 deg", distance: "2 m" })`,
  flywheel: (size: number) => `flywheel({ inertia: "${size * 4} g*m^2", speed: "900 rpm", drag: "${size * 4} mN*m" })`,
  screw: (size: number) =>
    `screw({ force: "${size * 40} N", lead: "4 mm", meanDiameter: "12 mm", friction: 0.15, travel: "60 mm" })`,
  roller: (size: number) => `roller({ torque: "${size / 8} N*m", speed: "40 rpm" })`,
} as const;

const PROTECTION = [
  "",
  'protect: breaker({ holdCurrent: "1.2 A", trips: { at: "2.4 A", after: "3 s" } }),',
  'protect: fuse({ rating: "3 A" }),',
] as const;

const robots = record({
  load: constantFrom(...(Object.keys(LOADS) as (keyof typeof LOADS)[])),
  size: integer({ min: 1, max: 24 }),
  driver: constantFrom(12, 16, 20, 30),
  driven: constantFrom(16, 24, 36, 60),
  protection: constantFrom(...PROTECTION),
  warm: constantFrom(
    "",
    'thermal: { windingToHousing: "4 K/W", housingToAmbient: "11 K/W", windingTime: "7 s", housingTime: "300 s", limit: "90 degC" },',
  ),
  more: constantFrom("", 'within: "4 s",', 'holdFor: "30 s",', 'every: "12 s",'),
  floorV: constantFrom(9, 11.5),
  cycled: constantFrom(true, false),
});

type Random = typeof robots extends Arbitrary<infer Value> ? Value : never;

/** Gears are constants of another file, which a second mechanism uses too. */
function source({ load, size, driver, driven, protection, warm, more, floorV, cycled }: Random): string {
  const cycle = cycled ? ', loadCycle: [{ lasts: "6 s", moving: [first] }, { lasts: "3 s", moving: [second] }], cycles: 9' : "";
  return `//- gears.ts
export const DRIVER = ${driver};
export const DRIVEN = ${driven};
//- robot.ts
import { arm, battery, breaker, flywheel, fuse, lift, mechanism, motor, robot, roller, screw, spur, wheels } from "loadmark";
import { DRIVEN, DRIVER } from "./gears.js";
const sheet = motor({ voltage: "12 V", noLoad: { speed: "110 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" }, ${warm} });
const pack = battery({ openCircuit: "12.4 V", resistance: "0.15 ohm", mustStayAbove: "${floorV} V" });
export const first = mechanism("first", { motor: sheet, stages: [spur(DRIVER, DRIVEN)], load: ${LOADS[load](size)}, ${protection} ${more} });
export const second = mechanism("second", { motor: sheet, stages: [spur(DRIVER, DRIVEN), spur(20, 40)], load: lift({ mass: "2 kg", drumRadius: "20 mm", travel: "0.2 m" }) });
export default robot("cart", { supply: pack, mechanisms: [first, second]${cycle} });
`;
}

const rankOf = ({ level }: Finding): number => ["information", "warning", "error"].indexOf(level);
const aboutOf = ({ rule, mechanism, robot }: Finding): string => `${rule} ${mechanism} ${robot?.subject}`;

function ranks({ findings }: Analysis): Map<string, number> {
  const found = new Map<string, number>();
  for (const one of findings) found.set(aboutOf(one), Math.max(found.get(aboutOf(one)) ?? -1, rankOf(one)));
  return found;
}

describe("proposals for random robots", () => {
  it("clear their finding and bring nothing new at its level", () => {
    const cleared = new Map<string, number>();
    assert(
      property(robots, (random) => {
        const analysis = analyseFixture(source(random));
        const before = ranks(analysis);
        for (const finding of analysis.findings.filter((one) => rankOf(one) > 0)) {
          for (const { edits, summary, touches } of proposalsFor(analysis, finding, createAnalyser(parser).analyse)) {
            if (edits.length === 0) continue;
            const after = createAnalyser(parser).analyse([...analysis.files.keys()], withEdits(analysis.snapshot, edits));
            const worse = after.findings.filter(
              (one) =>
                rankOf(one) >= rankOf(finding) &&
                (aboutOf(one) === aboutOf(finding) || rankOf(one) > (before.get(aboutOf(one)) ?? -1)),
            );
            expect({ summary, worse }).toEqual({ summary, worse: [] });
            // Whoever's numbers change is named.
            const changed = after.mechanisms.filter(({ name, numbers }) => {
              const was = analysis.mechanisms.find((one) => one.name === name)?.numbers;
              return name !== finding.mechanism && JSON.stringify(was) !== JSON.stringify(numbers);
            });
            expect(touches.map(({ mechanism }) => mechanism)).toEqual(changed.map(({ name }) => name));
            cleared.set(finding.rule, (cleared.get(finding.rule) ?? 0) + 1);
          }
        }
      }),
      { seed: 3, numRuns: 40 },
    );
    // Enough of each kind that a search which finds nothing would be seen.
    for (const rule of ["stalls", "past-peak", "trips", "overheats", "late"])
      expect([rule, (cleared.get(rule) ?? 0) > 2]).toEqual([rule, true]);
  });
});

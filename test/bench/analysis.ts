// A full analysis of one mechanism, from text to findings, with and without the sensitivities of every declared number; plain, and with
// heat, which leaves no closed form. Each text holds another number, so that nothing can be remembered. Times are those of the processor.

import { createAnalyser } from "../../extension/analysis/analyser.js";
import { sensitivitiesOf } from "../../extension/analysis/sensitivity.js";
import { parser as typescript } from "../support/parser.js";
import { type Spread, spreadOf } from "./spread.js";

const WARM = 150;
const FILE = "/bench/hoist.ts";

const THERMAL =
  'thermal: { windingToHousing: "3 K/W", housingToAmbient: "9 K/W", windingTime: "4 s", housingTime: "300 s", limit: "130 degC" },';

const textWith = (
  kilograms: number,
  thermal: string,
) => `import { battery, breaker, lift, mechanism, motor, spur } from "loadmark";
const slow = motor({ voltage: "12 V", noLoad: { speed: "138 rpm", current: "0.31 A" }, stall: { torque: "2.9 N*m", current: "4.7 A" }, ${thermal} });
const pack = battery({ openCircuit: "12.8 V", resistance: "90 mohm", mustStayAbove: "9.5 V" });
export const hoist = mechanism("hoist", {
  motor: slow,
  motorCount: 2,
  stages: [spur(16, 40)],
  load: lift({ mass: "${kilograms} kg", drumRadius: "40 mm", travel: "0.8 m" }),
  within: "9 s",
  protect: breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "6 s" } }),
  supply: pack,
});
`;

export interface AnalysisTimes {
  readonly name: string;
  /** ms. */
  readonly without: Spread;
  readonly with: Spread;
  readonly sensitivities: number;
}

export function measureAnalyses(rounds: number): AnalysisTimes[] {
  return [
    { name: "a hoist", ...measure(rounds, "") },
    { name: "a hoist with heat", ...measure(rounds, THERMAL) },
  ];
}

function measure(rounds: number, thermal: string): Omit<AnalysisTimes, "name"> {
  const { analyse } = createAnalyser(typescript);
  const without: number[] = [];
  const whole: number[] = [];
  let sensitivities = 0;
  for (let turn = 0; turn < WARM + rounds; turn++) {
    const text = textWith(12 + turn / 1000, thermal);
    const start = process.cpuUsage();
    const analysis = analyse([FILE], { read: (file) => (file === FILE ? text : null) });
    const analysed = msSince(start);
    const [mechanism] = analysis.mechanisms;
    if (mechanism?.numbers === undefined) throw new Error("The bench's mechanism has no numbers.");
    sensitivities = sensitivitiesOf(analysis, mechanism).length;
    const all = msSince(start);
    if (turn < WARM) continue;
    without.push(analysed);
    whole.push(all);
  }
  return { without: spreadOf(without), with: spreadOf(whole), sensitivities };
}

function msSince(start: NodeJS.CpuUsage): number {
  const { user, system } = process.cpuUsage(start);
  return (user + system) / 1000;
}

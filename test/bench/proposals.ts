// How long it takes to find what clears a finding, from the finished analysis to the proved proposals, and how many candidates a second
// are solved on the way. Each turn has numbers of its own, so that nothing can be remembered.

import { createAnalyser } from "../../extension/analysis/analyser.js";
import { proposalsFor } from "../../extension/analysis/propose.js";
import { parser as typescript } from "../support/parser.js";
import { type Spread, spreadOf } from "./spread.js";

const WARM = 5;
const FILE = "/bench/robot.ts";

const PRELUDE = `import { battery, breaker, lift, mechanism, motor, robot, spur } from "loadmark";
const slow = motor({ voltage: "12 V", noLoad: { speed: "138 rpm", current: "0.31 A" }, stall: { torque: "2.9 N*m", current: "4.7 A" } });
const warm = motor({ voltage: "12 V", noLoad: { speed: "138 rpm", current: "0.31 A" }, stall: { torque: "2.9 N*m", current: "4.7 A" },
  thermal: { windingToHousing: "6 K/W", housingToAmbient: "16 K/W", windingTime: "8 s", housingTime: "400 s", limit: "80 degC" } });
const pack = battery({ openCircuit: "12.8 V", resistance: "90 mohm", mustStayAbove: "11.8 V" });
`;

interface HoistFields {
  readonly motor?: "slow" | "warm";
  readonly driven?: number;
  readonly within?: string;
  readonly protect?: string;
  readonly name?: string;
}

const hoist = (kilograms: number, { motor = "slow", driven = 48, within = "20 s", protect, name = "hoist" }: HoistFields) =>
  `export const ${name} = mechanism("${name}", {
  motor: ${motor},
  stages: [spur(16, ${driven}), spur(20, 30)],
  load: lift({ mass: "${kilograms} kg", drumRadius: "40 mm", travel: "0.8 m" }),
  within: "${within}",${protect === undefined ? "" : `\n  protect: ${protect},`}
  supply: pack,
});
`;

/** One finding each, and what the search for it has to try. */
const CASES: readonly { readonly name: string; readonly rule: string; readonly text: (turn: number) => string }[] = [
  { name: "past its peak", rule: "past-peak", text: (turn) => hoist(18 + turn / 1000, {}) },
  { name: "stalls", rule: "stalls", text: (turn) => hoist(38 + turn / 1000, {}) },
  { name: "late", rule: "late", text: (turn) => hoist(9 + turn / 1000, { driven: 100, within: "6 s" }) },
  {
    name: "trips",
    rule: "trips",
    text: (turn) => hoist(14 + turn / 1000, { protect: 'breaker({ holdCurrent: "1.6 A", trips: { at: "3 A", after: "2 s" } })' }),
  },
  {
    name: "overheats",
    rule: "overheats",
    text: (turn) => hoist(14 + turn / 1000, { motor: "warm", driven: 48, within: "60 s" }),
  },
  {
    name: "past its peak, in a robot with a load cycle of 30 cycles",
    rule: "past-peak",
    text: (turn) =>
      `${hoist(18 + turn / 1000, {})}${hoist(6, { motor: "warm", name: "left" })}${hoist(6, { motor: "warm", name: "right" })}` +
      'export default robot("carrier", { supply: pack, mechanisms: [hoist, left, right], loadCycle: [{ lasts: "12 s", moving: [left] }, { lasts: "12 s", moving: [right] }, { lasts: "25 s", moving: [hoist] }], cycles: 30 });\n',
  },
  {
    name: "a robot that sags",
    rule: "sags",
    text: (turn) =>
      ["left", "right", "rear"].map((name) => hoist(9 + turn / 1000, { name })).join("") +
      'export default robot("carrier", { supply: pack, mechanisms: [left, right, rear], loadCycle: [{ lasts: "12 s", moving: [left, right, rear] }], cycles: 3 });\n',
  },
];

export interface ProposalTimes {
  readonly name: string;
  /** ms. */
  readonly time: Spread;
  readonly candidatesPerSecond: number;
  /** Least number found in a turn. */
  readonly found: number;
}

export function* measureProposals(rounds: number): Generator<ProposalTimes> {
  for (const { name, rule, text } of CASES) {
    const { analyse } = createAnalyser(typescript);
    const trial = createAnalyser(typescript);
    const times: number[] = [];
    const tally = { solved: 0 };
    let found = Number.POSITIVE_INFINITY;
    for (let turn = 0; turn < WARM + rounds; turn++) {
      const source = PRELUDE + text(turn);
      const analysis = analyse([FILE], { read: (file) => (file === FILE ? source : null) });
      const finding = analysis.findings.find((one) => one.rule === rule);
      if (finding === undefined) throw new Error(`The bench's mechanism does not have the finding "${rule}".`);
      if (turn === WARM) tally.solved = 0;
      const start = performance.now();
      const proposals = proposalsFor(analysis, finding, trial.analyse, tally);
      if (turn < WARM) continue;
      times.push(performance.now() - start);
      found = Math.min(found, proposals.filter(({ edits }) => edits.length > 0).length);
    }
    const seconds = times.reduce((sum, ms) => sum + ms, 0) / 1000;
    yield { name, time: spreadOf(times), candidatesPerSecond: tally.solved / seconds, found };
  }
}

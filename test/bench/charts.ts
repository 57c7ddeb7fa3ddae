// The chart panel at its largest: a robot of 30 mechanisms and a load cycle of ten minutes, followed by the model and drawn by the built
// page in a Chromium, under its real policy. Painting is waited for: a canvas that is read has been painted.

import { chromium, type Page } from "playwright-core";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import { createPowerFeature } from "../../extension/features/charts/power.js";
import { solveRobot } from "../../extension/model/solveRobot.js";
import { NO_MEMORY } from "../../extension/protocol/chartMemory.js";
import type { HostMessage } from "../../extension/protocol/chartMessages.js";
import { readFixture } from "../support/fixture.js";
import { parser } from "../support/parser.js";
import { startChartHost } from "../workbench/chartPage/chartHost.js";
import { CHROMIUM_FLAGS, getChromium } from "../workbench/chromium.js";
import { type Spread, spreadOf } from "./spread.js";

export interface ChartTimes {
  readonly mechanisms: number;
  readonly cycleS: number;
  /** Moments that are sent and drawn. */
  readonly moments: number;
  /** Of the message, kB. */
  readonly kilobytes: number;
  /** ms; so are all below. */
  readonly simulation: Spread;
  /** From an analysis to what is sent, the simulation among it. */
  readonly chart: Spread;
  /** Undefined where there is no browser. */
  readonly page: { readonly message: Spread; readonly zoom: Spread; readonly cursor: Spread } | undefined;
}

const MECHANISMS = 30;
const STEPS = 20;
const STEP_S = 30;

export async function measureCharts(rounds: number): Promise<ChartTimes> {
  const { files, snapshot } = readFixture(largeRobot());
  const analysis = createAnalyser(parser).analyse([...files.keys()], snapshot);
  const drive = analysis.robots[0]?.drive;
  if (drive === undefined) throw new Error("The robot of the bench cannot be computed.");
  const want = { span: null, cycle: "first" } as const;
  const chart = createPowerFeature().chartOf(analysis, "large", want);
  if (chart === undefined) throw new Error("The robot of the bench has no chart.");
  const answer = { kind: "chart", view: "power", chart, saved: null, old: null };
  const message = JSON.parse(JSON.stringify({ type: "show", answer })) as HostMessage;
  return {
    mechanisms: chart.mechanisms.length,
    cycleS: chart.cycleS,
    moments: chart.timesS.length,
    kilobytes: JSON.stringify(message).length / 1000,
    simulation: timed(rounds, () => void solveRobot(drive)),
    chart: timed(rounds, () => void createPowerFeature().chartOf(analysis, "large", want)),
    page: await measurePage(message, rounds),
  };
}

function timed(rounds: number, work: () => void): Spread {
  work();
  return spreadOf(
    Array.from({ length: rounds }, () => {
      const start = performance.now();
      work();
      return performance.now() - start;
    }),
  );
}

async function measurePage(message: HostMessage, rounds: number): Promise<ChartTimes["page"]> {
  const found = await getChromium();
  if ("missing" in found) return undefined;
  const browser = await chromium.launch({ executablePath: found.path, args: CHROMIUM_FLAGS });
  const host = await startChartHost(browser);
  try {
    const { page, troubles } = await host.open({ state: { ...NO_MEMORY, view: "power" }, width: 900 });
    const measure = (kind: "message" | "zoom" | "cursor") => timesOf(page, kind, message, rounds);
    const times = { message: await measure("message"), cursor: await measure("cursor"), zoom: await measure("zoom") };
    if (troubles.length > 0) throw new Error(troubles.join("\n"));
    return times;
  } finally {
    await host.stop();
    await browser.close();
  }
}

/** In the page, from the event to painted canvases. */
async function timesOf(page: Page, kind: "message" | "zoom" | "cursor", message: HostMessage, rounds: number): Promise<Spread> {
  const times = await page.evaluate(
    ({ message, rounds, kind }) => {
      const act = (round: number): void => {
        if (kind === "message") window.dispatchEvent(new MessageEvent("message", { data: message }));
        else {
          const key = kind === "cursor" ? "ArrowRight" : round % 2 === 0 ? "+" : "0";
          document.querySelector(".plots")?.dispatchEvent(new KeyboardEvent("keydown", { key, bubbles: true }));
        }
        for (const canvas of document.querySelectorAll("canvas")) canvas.getContext("2d")?.getImageData(0, 0, 1, 1);
      };
      for (let round = 0; round < 4; round++) act(round);
      return Array.from({ length: rounds }, (_, round) => {
        const start = performance.now();
        act(round);
        return performance.now() - start;
      });
    },
    { message, rounds, kind },
  );
  return spreadOf(times);
}

/** Hoists, arms and wheels in turn, each with heat and a breaker; in every step some move and some hold. */
function largeRobot(): string {
  const loads = [
    'lift({ mass: "6 kg", drumRadius: "30 mm", travel: "0.7 m" })',
    'arm({ mass: "1.5 kg", centreOfMass: "0.25 m", from: "-20 deg", to: "80 deg" })',
    'wheels({ mass: "9 kg", radius: "50 mm", grip: 0.7, rolling: 0.02, distance: "6 m" })',
  ];
  const names = Array.from({ length: MECHANISMS }, (_, index) => `part${index}`);
  const declared = names.map(
    (name, index) => `const ${name} = mechanism("${name}", {
  motor: slow, motorCount: 2, stages: [spur(16, ${40 + index})], load: ${loads[index % loads.length]}, supply: pack,
  protect: breaker({ holdCurrent: "8 A", trips: { at: "16 A", after: "4 s" } }),
});`,
  );
  const steps = Array.from({ length: STEPS }, (_, step) => {
    const moving = names.filter((_name, index) => (index + step) % 5 === 0);
    const holding = names.filter((_name, index) => (index + step) % 5 === 1 && index % 3 === 0);
    return `{ lasts: "${STEP_S} s", moving: [${moving.join(", ")}], holding: [${holding.join(", ")}] },`;
  });
  return `import { arm, battery, breaker, lift, mechanism, motor, robot, spur, wheels } from "loadmark";
const pack = battery({ openCircuit: "25 V", resistance: "40 mohm", mustStayAbove: "20 V", capacity: "20 A*h" });
const slow = motor({
  voltage: "24 V", noLoad: { speed: "310 rpm", current: "0.35 A" }, stall: { torque: "2.6 N*m", current: "8.8 A" },
  thermal: { windingToHousing: "4 K/W", housingToAmbient: "9 K/W", windingTime: "12 s", housingTime: "400 s", limit: "120 degC" },
});
${declared.join("\n")}
export default robot("large", {
  supply: pack,
  mechanisms: [${names.join(", ")}],
  loadCycle: [
    ${steps.join("\n    ")}
  ],
});
`;
}

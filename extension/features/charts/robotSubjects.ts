/** Which robot a chart is of: the one at the caret, else the one that lists the mechanism there, else the one that is shown, else any. */
import type { AnalysedMechanism, AnalysedRobot, Analysis } from "../../analysis/analysis.js";
import type { NoChart, Wish } from "./feature.js";

/** Names, the most wanted first. */
export function robotSubjects(analysis: Analysis, wish: Wish): readonly string[] {
  const { robots, mechanisms } = analysis;
  const shown = mechanisms.filter(({ name }) => name === wish.shownMechanism);
  const listing = (some: readonly AnalysedMechanism[]): AnalysedRobot[] =>
    robots.filter((robot) => some.some((mechanism) => lists(robot, mechanism)));
  const wanted = [
    ...wish.robots,
    ...listing(wish.mechanisms),
    ...robots.filter(({ name }) => name === wish.shownRobot),
    ...listing(shown),
    ...robots,
  ];
  const kept = wish.shownRobot === null ? [] : [wish.shownRobot];
  return [...new Set([...wanted.map(({ name }) => name), ...kept])];
}

export function lists({ declared }: AnalysedRobot, mechanism: AnalysedMechanism): boolean {
  return mechanism.declared !== undefined && declared?.mechanisms.includes(mechanism.declared) === true;
}

export function whyRobotIsOld({ robots }: Analysis, name: string): string {
  const robot = robots.find((one) => one.name === name);
  const why =
    robot === undefined ? "The code as it stands does not declare this robot." : (robot.notChecked[0] ?? "A value is missing.");
  return `${why} What is shown is its last result.`;
}

/** What to write, with the names that the code holds already. */
export function noRobot({ robots, mechanisms }: Analysis): NoChart {
  if (mechanisms.length === 0) return { reason: "nothing-declared", says: [], example: null };
  const [robot] = robots;
  if (robot === undefined) {
    return {
      reason: "does-not-apply",
      says: ["No robot is declared yet. Declare one with the supply and the mechanisms that it has, and what moves when:"],
      example: `import { battery, robot } from "loadmark";\n\n${robotExample(mechanisms)}`,
    };
  }
  const hasCycle = robot.declared === undefined || (robot.declared.loadCycle ?? []).length > 0;
  return {
    reason: "does-not-apply",
    says: hasCycle
      ? ["The load cycle cannot be computed yet.", ...robot.notChecked]
      : [`The robot "${robot.name}" declares no load cycle yet. Say what moves when:`],
    example: hasCycle ? null : cycleExample(variablesOf(mechanisms)).join("\n"),
  };
}

function robotExample(mechanisms: readonly AnalysedMechanism[]): string {
  const names = variablesOf(mechanisms);
  return [
    'export default robot("robot", {',
    '  supply: battery({ openCircuit: "12.6 V", resistance: "0.1 ohm", mustStayAbove: "9 V" }),',
    `  mechanisms: [${names.join(", ")}],`,
    ...cycleExample(names).map((line) => `  ${line}`),
    "});",
  ].join("\n");
}

function cycleExample([first = "hoist", second]: readonly string[]): string[] {
  const then = second === undefined ? `holding: [${first}]` : `moving: [${second}], holding: [${first}]`;
  return ["loadCycle: [", `  { lasts: "10 s", moving: [${first}] },`, `  { lasts: "5 s", ${then} },`, "],"];
}

/** The variables that hold mechanisms, as far as there are any. */
function variablesOf(mechanisms: readonly AnalysedMechanism[]): string[] {
  const names = mechanisms.flatMap(({ call }) => (call.binding === undefined ? [] : [call.binding.name]));
  return names.length > 0 ? [...new Set(names)].slice(0, 4) : ["hoist", "arm"];
}

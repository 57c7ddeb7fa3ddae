/** Rules over a robot's load cycle: where they speak, what they say, and where they leave it to a mechanism's own finding. */
import { describe, expect, it } from "vitest";
import { makeReport } from "../../extension/report/report.js";
import { writeText } from "../../extension/report/text.js";
import { analyseFixture, checkFindings } from "../support/checkFindings.js";

/**
 * Motors of 3 ohm (12 V, 4 A at stall), k_t = 2/4 N·m/A; steps and names as the robot's own code would have them. The lifts are
 * light and quick: 0.5 kg on 20 mm.
 */
const HEAD = `import { battery, breaker, between, lift, mechanism, motor, reduction, robot, roller } from "loadmark";
const twelveVolt = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
`;
const lifts = (fields = "") => `
const load = lift({ mass: "5 kg", drumRadius: "20 mm", travel: "0.4 m" });
const one = mechanism("one", { motor: twelveVolt, motorCount: 4, stages: [reduction(4, { efficiency: 1 })], load, ${fields} });
const two = mechanism("two", { motor: twelveVolt, motorCount: 4, stages: [reduction(4, { efficiency: 1 })], load, ${fields} });
`;

const findingsOf = (text: string) =>
  analyseFixture(text)
    .findings.filter(({ level }) => level !== "information")
    .map(({ rule, level, mechanism, message, related }) => ({ rule, level, mechanism, message, related }));

describe("sags over the load cycle", () => {
  // Four stalled motors of 3 ohm are 0.75 ohm: alone 12·0.75/(0.75 + 0.1) = 10.59 V, both together 12·0.375/0.475 = 9.474 V.
  const robotWith = (floor: string, steps: string) => `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "100 mohm", mustStayAbove: ${floor} });
${lifts()}
export const mover = robot("mover", { supply: pack, mechanisms: [one, two], loadCycle: [${steps}], cycles: 3 });`;

  it("speak where two mechanisms start at once, with both numbers, the moment and the movers", () => {
    const [finding, ...others] = findingsOf(robotWith('"10 V"', '{ lasts: "4 s" }, { lasts: "4 s", moving: [one, two] }'));
    expect(others).toEqual([]);
    expect(finding).toMatchObject({ rule: "sags", level: "warning", mechanism: null });
    expect(finding?.message).toContain("falls to 9.47 V, below its 10 V");
    expect(finding?.message).toContain("4 s into cycle 1 (step 2)");
    // (12 − 9.474)/0.1 = 25.26 A, half of it each; (12 − 10)/0.1 = 20 A stay above.
    expect(finding?.message).toContain('"one" (12.6 A)');
    expect(finding?.message).toContain('"two" (12.6 A)');
    expect(finding?.message).toContain("up to 20 A in all instead of 25.3 A");
    expect(finding?.related.map(({ message }) => message)).toContain('"one" moves then, with 12.6 A from the supply.');
  });

  it("do not speak where the steps are staggered", () => {
    expect(findingsOf(robotWith('"10 V"', '{ lasts: "4 s", moving: [one] }, { lasts: "4 s", moving: [two] }'))).toEqual([]);
  });

  it("do not speak where the dip is shorter than is allowed", () => {
    const floor = '{ voltage: "10 V", for: "2 s" }';
    expect(findingsOf(robotWith(floor, '{ lasts: "4 s", moving: [one, two] }'))).toEqual([]);
  });

  it("leave a sag of one mechanism alone to that mechanism", () => {
    const found = findingsOf(robotWith('"11 V"', '{ lasts: "4 s", moving: [one] }, { lasts: "4 s", moving: [two] }'));
    expect(found.map(({ rule, mechanism }) => [rule, mechanism])).toEqual([
      ["sags", "one"],
      ["sags", "two"],
    ]);
  });
});

describe("the battery's charge", () => {
  // A roller of 1 N·m runs at half stall: 2 A and (0.05·… of loss) for ten seconds of each cycle.
  const text = (capacity: string) => `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "0 ohm", capacity: "${capacity}" });
const drum = mechanism("drum", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }), supply: pack });
export const mover = robot("mover", { supply: pack, mechanisms: [drum], loadCycle: [{ lasts: "36 s", moving: [drum] }], cycles: 100 });`;

  it("tells how many cycles it lasts", () => {
    // Loss grows with speed: I = 2 A + 0.2 A·ω/ω_0 with ω = ω_0·(1 − 1/2) by the sheet's line: 2.1 A, 21 mA·h a cycle: 47 of 100 for 1 A·h.
    const [finding, ...others] = findingsOf(text("1 A*h"));
    expect(others).toEqual([]);
    expect(finding?.rule).toBe("sags");
    expect(finding?.message).toContain("empty after 47 of 100 cycles");
    expect(finding?.message).toContain("about 2.1 A·h, and its capacity is 1 A·h");
  });

  it("says nothing where it lasts", () => {
    expect(findingsOf(text("2.2 A*h"))).toEqual([]);
  });
});

describe("trips over the load cycle", () => {
  const shared = (hold: string) => `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "0 ohm" });
const drum = mechanism("drum", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }) });
const reel = mechanism("reel", { motor: twelveVolt, stages: [], load: roller({ torque: "1 N*m" }) });
export const mover = robot("mover", {
  supply: pack,
  mechanisms: [drum, reel],
  shared: [{ protect: breaker({ holdCurrent: "${hold}", trips: { at: "8 A", after: "5 s" } }), feeds: [drum, reel] }],
  loadCycle: [{ lasts: "30 s", moving: [drum, reel] }],
});`;

  it("speak of a shared breaker that carries the sum", () => {
    // 4.2 A through one that holds 3 A: m² = 1.96, τ = 5/ln(64/55) = 32.99 s, ln(1.96/0.96) = 0.7138: 23.5 s.
    const [finding, ...others] = findingsOf(shared("3 A"));
    expect(others).toEqual([]);
    expect(finding).toMatchObject({ rule: "trips", level: "error", mechanism: null });
    expect(finding?.message).toContain(
      "the shared breaker (holds 3 A) opens 23.5 s into the load cycle (step 1), where it carries 4.2 A",
    );
    expect(finding?.message).toContain('"drum" and "reel" then stop where they are, for good');
    expect(finding?.related.map(({ message }) => message)).toEqual(['"drum" is fed through it.', '"reel" is fed through it.']);
  });

  it("say nothing where it holds", () => {
    expect(findingsOf(shared("5 A"))).toEqual([]);
  });

  it("speak of a mechanism's own breaker only where the steps before have warmed it", () => {
    // Held at 1.962 A·… below what it holds; travels that are fine alone trip it when they repeat without rest.
    const text = (rest: string) => `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "0 ohm" });
const hoist = mechanism("hoist", {
  motor: twelveVolt,
  stages: [],
  load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "0.8 m" }),
  protect: breaker({ holdCurrent: "1.5 A", trips: { at: "3 A", after: "12 s" } }),
});
export const mover = robot("mover", { supply: pack, mechanisms: [hoist], loadCycle: [{ lasts: "9 s", moving: [hoist] }, { lasts: "${rest}" }], cycles: 40 });`;
    const hot = findingsOf(text("1 s")).filter(({ rule }) => rule === "trips");
    expect(hot).toHaveLength(1);
    expect(hot[0]?.message).toContain('the breaker of "hoist" (holds 1.5 A)');
    expect(findingsOf(text("60 s")).filter(({ rule }) => rule === "trips")).toEqual([]);
  });
});

describe("overheats over the cycles", () => {
  const text = (rest: string) => `${HEAD}
const warm = motor({
  voltage: "12 V",
  noLoad: { speed: "100 rpm", current: "0.2 A" },
  stall: { torque: "2 N*m", current: "4 A" },
  thermal: { windingToHousing: "3 K/W", housingToAmbient: "6 K/W", windingTime: "10 s", housingTime: "600 s", limit: "90 degC" },
});
const pack = battery({ openCircuit: "12 V", resistance: "0 ohm" });
const hoist = mechanism("hoist", { motor: warm, stages: [], load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "0.8 m" }) });
export const mover = robot("mover", { supply: pack, mechanisms: [hoist], loadCycle: [{ lasts: "9 s", moving: [hoist] }, { lasts: "${rest}" }], cycles: 400 });`;

  it("speak where the heat of many cycles adds up, with the temperature and the moment", () => {
    const [finding, ...others] = findingsOf(text("1 s")).filter(({ rule }) => rule === "overheats");
    expect(others).toEqual([]);
    expect(finding).toMatchObject({ rule: "overheats", level: "warning", mechanism: null });
    expect(finding?.message).toMatch(
      /the winding of "hoist" comes to \d+ °C; its limit is 90 °C\. It passes its limit .* into cycle \d+/,
    );
    expect(finding?.related[0]?.message).toBe('"hoist" gets too hot.');
  });

  it("say nothing with rest enough", () => {
    expect(findingsOf(text("60 s")).filter(({ rule }) => rule === "overheats")).toEqual([]);
  });
});

describe("robots in the analysis and the reports", () => {
  const text = (mass: string, more = "") => `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "100 mohm" });
const hoist = mechanism("hoist", { motor: twelveVolt, stages: [], load: lift({ mass: ${mass}, drumRadius: "20 mm", travel: "0.8 m" }) });
${more}export const mover = robot("mover", { supply: pack, mechanisms: [hoist], loadCycle: [{ lasts: "9 s", moving: [hoist] }], cycles: 4 });`;
  const nothing = { sensitivityOf: () => [], spreadOf: () => undefined, proposals: [] };

  it("carry the contract's fields in this order", () => {
    const { robots } = makeReport(analyseFixture(text('"2 kg"')), (file) => file, nothing);
    expect(robots.map((one) => Object.keys(one))).toEqual([
      ["name", "lowestVoltageV", "lowestVoltageAtS", "peakCurrentA", "sourceEnergyJ", "chargeUsedAh", "cyclesDone"],
    ]);
    // At the start 12·3/(3 + 0.1) V and 12/3.1 A.
    expect(robots[0]?.name).toBe("mover");
    expect(robots[0]?.lowestVoltageV).toBeCloseTo((12 * 3) / 3.1, 8);
    expect(robots[0]?.peakCurrentA).toBeCloseTo(12 / 3.1, 8);
    expect(robots[0]?.cyclesDone).toBe(4);
  });

  it("give a short table in a terminal", () => {
    const told = writeText(analyseFixture(text('"2 kg"')), (file) => file);
    expect(told).toContain("robot mover (");
    expect(told).toMatch(/supply +falls to 11\.6 V after 0 s/);
    expect(told).toMatch(/draws +3\.87 A at most/);
    expect(told).toMatch(/cycles +4 done/);
    expect(told).toContain("How long the battery lasts: it declares no capacity.");
  });

  it("stay silent where a mechanism is unknown, and say why", () => {
    const analysis = analyseFixture(
      text("measured()", "").replace("const pack", "declare function measured(): any;\nconst pack"),
    );
    const [robot] = analysis.robots;
    expect(robot?.name).toBe("mover");
    expect(robot?.numbers).toBeUndefined();
    expect(robot?.notChecked[0]).toMatch(/^Nothing: /);
    const report = makeReport(analysis, (file) => file, nothing);
    expect(report.robots[0]).toMatchObject({ name: "mover", lowestVoltageV: null, cyclesDone: null });
  });

  it("say that ranges count with their middle, and that nothing runs without a load cycle", () => {
    const ranged = analyseFixture(text('between("1 kg", "3 kg")')).robots[0];
    const plain = analyseFixture(text('"2 kg"')).robots[0];
    expect(ranged?.assumed).toContain("Numbers and findings are for the middle of each range.");
    expect(ranged?.numbers?.sourceEnergyJ).toBeCloseTo(plain?.numbers?.sourceEnergyJ ?? 0, 6);
    const still = analyseFixture(text('"2 kg"').replace(/loadCycle: .*?\}\], /, "")).robots[0];
    expect(still?.numbers).toBeUndefined();
    expect(still?.notChecked).toEqual(["The load cycle: none is declared."]);
  });

  it("leave out a mechanism that runs on a supply of its own", () => {
    const more = 'const other = battery({ openCircuit: "12 V", resistance: "0 ohm" });\n';
    const apart = text('"2 kg"', more).replace(
      'travel: "0.8 m" }) });',
      'travel: "0.8 m" }), supply: battery({ openCircuit: "6 V", resistance: "0 ohm" }) });',
    );
    const [robot] = analyseFixture(apart).robots;
    expect(robot?.notChecked[0]).toContain('"hoist" in the load cycle: it runs on a supply of its own.');
    expect(robot?.numbers?.peakCurrentA).toBe(0);
  });

  it("may be silenced above the robot, with a reason", () => {
    const robot = robotText("// loadmark-allow sags: the electronics have a supply of their own\n");
    expect(findingsOf(robot)).toEqual([]);
  });

  it("sit on the robot's variable", () => {
    const held = robotText("").replaceAll("lift({", 'lift({ counterbalance: "49.033 N", frictionForce: "49.033 N",');
    checkFindings(`${held}
//           ^^^^^ warning sags: falls to 9.47 V`);
  });
});

/** Two mechanisms that start at once and sag; nothing runs back. */
function robotText(above: string): string {
  return `${HEAD}
const pack = battery({ openCircuit: "12 V", resistance: "100 mohm", mustStayAbove: "10 V" });
${lifts()}
${above}export const mover = robot("mover", { supply: pack, mechanisms: [one, two], loadCycle: [{ lasts: "4 s", moving: [one, two] }] });`;
}

/** Rules over time: late, trips, cannot-hold, overheats, unprotected, sags. Expected numbers are worked out by hand in the comments. */
import { describe, expect, it } from "vitest";
import { analyseFixture, checkFindings, PRELUDE } from "../support/checkFindings.js";

/** Loss-free and without inertia to speak of: speed follows torque, so that times are travel over speed. */
const PACK = `const stiff = battery({ openCircuit: "12 V", resistance: "0 ohm" });`;

describe("late", () => {
  // 2 kg on 20 mm: 0.39227 N·m, so 100·(1 − 0.39227/2) = 80.39 rpm = 8.418 rad/s = 0.16836 m/s: 1 m in 5.94 s and a short start.
  const hoist = (within: string) => `${PRELUDE}
export const hoist = mechanism("hoist", {
  motor: twelveVolt,
  stages: [],
  load: lift({ mass: "2 kg", drumRadius: "20 mm", travel: "1 m" }),
  within: "${within}",
});`;

  it("speaks where the travel takes longer, with the quickest ratio", () => {
    checkFindings(
      hoist("5.5 s").replace(
        `mechanism("hoist", {`,
        `mechanism("hoist", {
//           ^^^^^ warning late: the travel takes 5.94 s, but may take 5.5 s. The quickest ratio takes
//           ^^^^^ information backdrives: Runs back`,
      ),
    );
  });

  // Power at the peak: 1 N·m at 50 rpm = 5.236 W; 2 kg over 1 m is 19.61 J: never in less than 3.75 s.
  it("says so when no ratio is quick enough", () => {
    checkFindings(
      hoist("3 s").replace(
        `mechanism("hoist", {`,
        `mechanism("hoist", {
//           ^^^^^ warning late: No ratio is quick enough: the best takes 3.7
//           ^^^^^ information backdrives: Runs back`,
      ),
    );
  });

  it("is silent in time", () => {
    checkFindings(
      hoist("6.1 s").replace(
        `mechanism("hoist", {`,
        `mechanism("hoist", {
//           ^^^^^ information backdrives: Runs back`,
      ),
    );
  });
});

describe("trips", () => {
  // A roller at 1 N·m: the line is at 50 rpm and 0.1 A of loss, 2.1 A. Holds 1.5 A, trips at 3 A after 4 s: τ = 4/ln(9/6.75) = 13.9 s;
  // at 2.1 A: 13.904·ln(4.41/2.16) = 9.925 s (IEC 60255-149).
  it("tells when a breaker opens on a load that turns on and on", () => {
    checkFindings(`${PRELUDE}
export const hub = mechanism("hub", {
//           ^^^ error trips: the breaker (holds 1.5 A) opens after 9.92 s
  motor: twelveVolt,
  stages: [],
  load: roller({ torque: "1 N*m" }),
  protect: breaker({ holdCurrent: "1.5 A", trips: { at: "3 A", after: "4 s" } }),
});`);
  });

  it("silences late, and is silenced by stalls", () => {
    checkFindings(`${PRELUDE}
export const slow = mechanism("slow", {
//           ^^^^ error trips: before the travel of
//           ^^^^ information backdrives: Runs back
  motor: twelveVolt,
  stages: [],
  load: lift({ mass: "5 kg", drumRadius: "20 mm", travel: "6 m" }),
  within: "1 s",
  protect: breaker({ holdCurrent: "1 A", trips: { at: "2 A", after: "4 s" } }),
});
export const stuck = mechanism("stuck", {
//           ^^^^^ error stalls: 3 N·m
  motor: twelveVolt,
  stages: [],
  load: roller({ torque: "3 N*m" }),
  protect: breaker({ holdCurrent: "1 A", trips: { at: "2 A", after: "4 s" } }),
});`);
  });

  // 5.09 kg on 20 mm is 0.998 N·m: holding it takes 1.997 A, without loss current.
  it("counts the hold", () => {
    checkFindings(`${PRELUDE}${PACK}
export const hoist = mechanism("hoist", {
//           ^^^^^ error trips: before the hold of 60 s is over; it carries 2 A
//           ^^^^^ information backdrives: Runs back
  motor: twelveVolt,
  stages: [],
  load: lift({ mass: "5.09 kg", drumRadius: "20 mm", travel: "0.05 m" }),
  holdFor: "60 s",
  supply: stiff,
  protect: breaker({ holdCurrent: "1.5 A", trips: { at: "3 A", after: "4 s" } }),
});`);
  });
});

describe("cannot-hold", () => {
  // At rest the load counts without friction: 1 N·m takes 2 A; a limit of 1.8 A gives 0.9 N·m. It stalls on the way up as well.
  it("speaks where the current limit cannot keep the load up", () => {
    checkFindings(`${PRELUDE}
export const hoist = mechanism("hoist", {
//           ^^^^^ error stalls: 1 N·m
//           ^^^^^ error cannot-hold: must keep up 1 N·m, but gives no more than 900 mN·m
//           ^^^^^ information backdrives: Runs back
  motor: twelveVolt,
  stages: [],
  load: lift({ mass: "5.0986 kg", drumRadius: "20 mm", travel: "0.05 m" }),
  holdFor: "60 s",
  motorCurrentLimit: "1.8 A",
});`);
  });
});

const HOT = `${PRELUDE}
const warm = motor({
  voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" },
  thermal: { windingToHousing: "4 K/W", housingToAmbient: "8 K/W", windingTime: "10 s", housingTime: "300 s", limit: "100 degC" },
});`;

describe("overheats and unprotected", () => {
  // 2.1 A in 3 ohm: 13.2 W over 12 K/W is 159 K above 25 °C even without the copper's rise.
  it("tells a winding that gets too hot while turning on and on, and a stall without protection", () => {
    checkFindings(`${HOT}
export const hub = mechanism("hub", { motor: warm, stages: [], load: roller({ torque: "1 N*m" }) });
//           ^^^ warning overheats: turning on and on, the winding passes its limit after
//           ^^^ warning unprotected: stalled at 4 A, the winding passes its limit after`);
  });

  // Lifting 5 kg on 20 mm draws 1.9 A: 11 W over 12 K/W settle far above 100 °C, but one travel of 5 s warms by 20 K only.
  const lifting = (rest: string, mark: string) => `${HOT}
// loadmark-allow unprotected: this is about the work, not about a stall
// loadmark-allow backdrives: it is blocked
export const hub = mechanism("hub", { motor: warm, stages: [spur(20, 21, { efficiency: 1 })],
${mark === "" ? "" : `//           ^^^ ${mark}\n`}  load: lift({ mass: "5 kg", drumRadius: "20 mm", ${rest} });`;
  const often = 'protect: breaker({ holdCurrent: "1.5 A", trips: { at: "3 A", after: "8 s" } })';

  it.each([
    ["a long travel", 'travel: "20 m" })', "warning overheats: in the travel; its limit is 100 °C"],
    [
      "a long hold",
      'travel: "0.5 m" }), holdFor: "300 s"',
      "warning overheats: held for 300 s, the winding passes its limit after",
    ],
    [
      "repeats with too little rest",
      'travel: "0.5 m" }), every: "10 s"',
      "warning overheats: repeated every 10 s, the winding comes to",
    ],
  ])("tells %s", (_, rest, mark) => {
    checkFindings(lifting(rest, mark));
  });

  it.each([
    ["a short travel", 'travel: "0.5 m" })'],
    ["a short hold", 'travel: "0.5 m" }), holdFor: "2 s"'],
    ["repeats with rest enough", 'travel: "0.5 m" }), every: "60 s"'],
  ])("is silent about %s", (_, rest) => {
    checkFindings(lifting(rest, ""));
  });

  it("tells a breaker that one travel leaves closed and repeats do not", () => {
    const rules = (rest: string) =>
      analyseFixture(lifting(`travel: "0.5 m" }), every: "${rest}", ${often}`, "")).findings.map(
        ({ rule, message }) => `${rule}: ${message}`,
      );
    expect(rules("10 s").filter((told) => told.startsWith("trips"))).toEqual([
      expect.stringContaining("before it can repeat every 10 s for long"),
    ]);
    expect(rules("60 s").filter((told) => told.startsWith("trips"))).toEqual([]);
  });

  it("tells a protector that opens too late for a stalled winding, and one that never opens", () => {
    checkFindings(`${HOT}
export const late = mechanism("late", { motor: warm, stages: [], load: roller({ torque: "0.2 N*m" }),
//           ^^^^ warning unprotected: before the breaker (holds 2 A) opens after
  protect: breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "10 s" } }) });
export const never = mechanism("never", { motor: twelveVolt, stages: [], load: roller({ torque: "0.2 N*m" }),
//           ^^^^^ warning unprotected: the breaker (holds 8 A) never opens
  protect: breaker({ holdCurrent: "8 A", trips: { at: "16 A", after: "6 s" } }) });
export const good = mechanism("good", { motor: warm, stages: [], load: roller({ torque: "0.2 N*m" }),
  protect: breaker({ holdCurrent: "1.2 A", trips: { at: "2.4 A", after: "1 s" } }) });`);
  });
});

describe("sags", () => {
  // Four amperes at the start through 1 ohm: 12 V · 3/(3 + 1) = 9 V at the motor's terminals.
  it("tells how deep and for how long", () => {
    const source = (floor: string, marks: string) => `${PRELUDE}
const weak = battery({ openCircuit: "12 V", resistance: "1 ohm", mustStayAbove: ${floor} });
export const hoist = mechanism("hoist", {
${marks}//           ^^^^^ information backdrives: Runs back
  motor: twelveVolt,
  stages: [],
  load: lift({ mass: "2 kg", drumRadius: "20 mm", travel: "1 m" }),
  supply: weak,
});`;
    checkFindings(source('"9.5 V"', "//           ^^^^^ warning sags: the supply falls to 9 V, below its 9.5 V\n"));
    checkFindings(source('{ voltage: "9.5 V", for: "1 s" }', ""));
    checkFindings(source('"8.9 V"', ""));
  });
});

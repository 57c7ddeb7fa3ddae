/** The travel's chart against the equations of motor and load, written out by hand. */
import { describe, expect, it } from "vitest";
import type { Wish } from "../../../extension/features/charts/feature.js";
import { travelChart, travelFeature } from "../../../extension/features/charts/travel.js";
import { type TravelChart, travelChartSchema } from "../../../extension/protocol/charts/travel.js";
import { readMessage } from "../../../extension/protocol/readMessage.js";
import { analyseFixture } from "../../support/chartFixture.js";
import { handPoint, liftTime, liftTorque, MOTOR, SHEET } from "../../support/handNumbers.js";

function source(load: string, rest = "", stages = "spur(20, 80)"): string {
  return `import { arm, breaker, flywheel, lift, mechanism, motor, roller, spur } from "loadmark";
const slow = ${MOTOR};
export const hoist = mechanism("hoist", { motor: slow, stages: [${stages}], load: ${load}, ${rest} });
`;
}

const LIFT = 'lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" })';
const ARM = 'arm({ mass: "4 kg", centreOfMass: "0.5 m", from: "80 deg", to: "-30 deg" })';

/** As it travels: what its message does not take is no chart. */
function chartOf(text: string): TravelChart {
  const chart = travelChart(analyseFixture(text), "hoist");
  const travelled = readMessage(travelChartSchema, JSON.parse(JSON.stringify(chart ?? null)));
  if (travelled === undefined) throw new Error("There is no chart, or it is not what its message says.");
  return travelled;
}

const wish: Wish = { mechanisms: [], robots: [], file: undefined, shownMechanism: null, shownRobot: null };

describe("the chart of a travel", () => {
  it("needs the same torque all along a lift, and gives what the line does at its speed", () => {
    const chart = chartOf(source(LIFT));
    const hand = handPoint(liftTorque(10, 0.05), 4, 0.98);
    expect(chart).toMatchObject({ coordinate: "length", outcome: "arrives", travel: { from: 0, to: 0.8 }, hold: null });
    for (const { torqueNm } of chart.needed) expect(torqueNm).toBeCloseTo(hand.motorNm, 9);
    expect(chart.stallTorqueNm).toBeCloseTo(SHEET.stallNm, 9);
    for (const [index, given] of chart.givenNm.entries()) {
      // Metres per second on a drum of 50 mm behind 4 : 1, as rpm of the motor.
      const rpm = ((((chart.speeds[index] ?? 0) / 0.05) * 4) / (2 * Math.PI)) * 60;
      const share = 1 - rpm / SHEET.noLoadRpm;
      expect(given).toBeCloseTo(SHEET.stallNm * share, 6);
      expect(chart.currentA[index]).toBeCloseTo(SHEET.noLoadA + (SHEET.stallA - SHEET.noLoadA) * share, 6);
      expect(chart.neededNm[index]).toBeCloseTo(hand.motorNm, 9);
    }
    expect(chart.timesS.at(-1)).toBeCloseTo(liftTime(10, 0.05, 0.8, 4, 0.98), 4);
    expect(chart.positions.at(-1)).toBeCloseTo(0.8, 6);
  });

  it("follows an arm's torque along its way, backwards as well", () => {
    const { needed, travel, coordinate, positions } = chartOf(source(ARM, "", "spur(20, 120)"));
    expect(coordinate).toBe("angle");
    expect(travel?.from).toBeCloseTo((80 * Math.PI) / 180, 12);
    expect(needed[0]?.position).toBeCloseTo((80 * Math.PI) / 180, 9);
    expect(positions.at(-1)).toBeCloseTo((-30 * Math.PI) / 180, 6);
    for (const { position, torqueNm } of needed) {
      // Falling towards smaller angles the load drives where it pulls that way: m·g·r·cos φ, through the train.
      const weight = -4 * 9.80665 * 0.5 * Math.cos(position);
      expect(torqueNm).toBeLessThan(0);
      expect(torqueNm).toBeGreaterThanOrEqual(weight / 6 - 1e-9);
    }
  });

  it("has the numbers of the report, and the events in their order", () => {
    const chart = chartOf(
      source(
        LIFT,
        'ramp: "0.5 s", within: "4 s", holdFor: "20 s", motorCurrentLimit: "4 A", protect: breaker({ holdCurrent: "1 A", trips: { at: "3 A", after: "1 s" } })',
      ),
    );
    const [mechanism] = analyseFixture(
      source(
        LIFT,
        'ramp: "0.5 s", within: "4 s", holdFor: "20 s", motorCurrentLimit: "4 A", protect: breaker({ holdCurrent: "1 A", trips: { at: "3 A", after: "1 s" } })',
      ),
    ).mechanisms;
    expect(chart.numbers).toEqual(mechanism?.numbers?.travel);
    expect(chart.withinS).toBe(4);
    const times = chart.events.map(({ timeS }) => timeS);
    expect(times).toEqual([...times].sort((one, other) => one - other));
    expect(chart.events[0]).toEqual({ kind: "ramp-ends", timeS: 0.5 });
    expect(chart.events.at(-1)?.kind).toBe("arrives");
    const trips = chart.events.find(({ kind }) => kind === "trips");
    expect(trips?.timeS).toBeCloseTo(chart.numbers.tripsAfterS ?? Number.NaN, 6);
    expect(chart.currentA.every((current) => current <= 4 * (1 + 1e-9))).toBe(true);
    // Held without friction and loss: T/(N·count) over torque per ampere, of a motor whose loss grows with speed the stall torque over the stall current.
    expect(chart.hold).toMatchObject({ forS: 20 });
    expect(chart.hold?.torqueNm).toBeCloseTo(liftTorque(10, 0.05) / 4, 9);
    expect(chart.hold?.currentA).toBeCloseTo(((liftTorque(10, 0.05) / 4) * SHEET.stallA) / SHEET.stallNm, 6);
  });

  it("marks where a growing command comes to the current limit, and where speed brings it below again", () => {
    const { events } = chartOf(
      source('flywheel({ inertia: "400 kg*m^2", speed: "20 rpm" })', 'ramp: "3 s", motorCurrentLimit: "4 A"'),
    );
    expect(events.map(({ kind }) => kind)).toEqual(["limit-begins", "ramp-ends", "limit-ends", "arrives"]);
    // Nearly at rest the motor is 12 V / 6 A: two thirds of the command drive 4 A.
    expect(Math.abs((events[0]?.timeS ?? Number.NaN) / 2 - 1)).toBeLessThan(0.05);
  });

  it("shows what is needed along the way that a stalled motor never goes", () => {
    const chart = chartOf(source('lift({ mass: "90 kg", drumRadius: "50 mm", travel: "0.8 m" })'));
    expect(chart.outcome).toBe("never-starts");
    expect(chart.numbers.timeS).toBeNull();
    expect(chart.needed.every(({ torqueNm }) => torqueNm > chart.stallTorqueNm)).toBe(true);
  });

  it("is without a position where the load only spins up", () => {
    const chart = chartOf(source('flywheel({ inertia: "0.2 kg*m^2", speed: "20 rpm" })'));
    expect(chart).toMatchObject({ coordinate: null, travel: null, needed: [], outcome: "arrives" });
  });

  it("is none of another mechanism where the one that is meant only turns", () => {
    const analysis = analyseFixture(
      `${source(LIFT)}export const drum = mechanism("drum", { motor: slow, stages: [], load: roller({ torque: "0.3 N*m" }) });\n`,
    );
    const meant = { ...wish, shownMechanism: "drum" };
    expect(travelFeature.subjects(analysis, meant)).toEqual([]);
    const { reason, says } = travelFeature.nothing(analysis, meant);
    expect(reason).toBe("does-not-apply");
    expect(says.join(" ")).toContain('"drum" turns on and on');
    expect(travelFeature.subjects(analysis, { ...wish, shownMechanism: "hoist" })[0]).toBe("hoist");
  });
});

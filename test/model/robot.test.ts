/** Robots whose circuits, trips and resets can be worked out by hand. */
import { describe, expect, it } from "vitest";
import type { Protection } from "../../extension/model/drive.js";
import { solveRobot } from "../../extension/model/solveRobot.js";
import { driveOf, liftOf } from "./drives.js";
import "./expectShare.js";
import { breaker, EXACT, G, hold, INTEGRATED, KT, move, R, rest, robotOf, stuck } from "./handRobots.js";

describe("circuits of two mechanisms", () => {
  it("stalled at full command they are two resistors behind the battery's", () => {
    // One motor of R; two motors at half duty, which the battery sees as R/(2·0.5²) = 2·R.
    // Conductance 1/R + 1/(2R) = 6.25 S; V_b = 12/(1 + 0.1·6.25) = 7.384615 V.
    const drives = [stuck, { ...stuck, motorCount: 2, pwmDuty: 0.5 }];
    const volts = 12 / (1 + 0.1 * (1 / R + 1 / (2 * R)));
    const { numbers, mechanisms } = solveRobot(robotOf(drives, [move(3, 0, 1)]));
    expect(volts).toBeCloseTo(7.384615, 6);
    expect(numbers.lowestVoltageV).toBeCloseToShare(volts, EXACT);
    expect(numbers.peakCurrentA).toBeCloseToShare((12 - volts) / 0.1, EXACT);
    expect(numbers.sourceEnergyJ).toBeCloseToShare(3 * volts * ((12 - volts) / 0.1), EXACT);
    expect(mechanisms[0]?.sourceEnergyJ).toBeCloseToShare((3 * volts * volts) / R, EXACT);
    expect(mechanisms.map(({ stallsAtS }) => stallsAtS)).toEqual([0, 0]);
  });

  it("a hold draws a constant power beside a stalled motor", () => {
    // T = m·g·r/N, I = T/k_t, P = I²·R. V² − V·V_oc + R_s·(P + V²/R) = 0: V = (V_oc + √(V_oc² − 4·(1 + R_s/R)·R_s·P))/(2·(1 + R_s/R)).
    const torque = (20 * G * 0.05) / 20;
    const power = (torque / KT) ** 2 * R;
    const share = 1 + 0.1 / R;
    const volts = (12 + Math.sqrt(144 - 4 * share * 0.1 * power)) / (2 * share);
    const { numbers } = solveRobot(robotOf([driveOf({ load: liftOf(20, 0.05, 1) }), stuck], [{ ...move(1, 1), holding: [0] }]));
    expect(numbers.lowestVoltageV).toBeCloseToShare(volts, EXACT);
  });

  it("two holds take the higher of the two voltages that would do", () => {
    const torque = (20 * G * 0.05) / 20;
    const power = 2 * (torque / KT) ** 2 * R;
    const volts = (12 + Math.sqrt(144 - 4 * 0.1 * power)) / 2;
    const lift = driveOf({ load: liftOf(20, 0.05, 1) });
    const { numbers, collapsesAtS } = solveRobot(robotOf([lift, lift], [hold(1, 0, 1)]));
    expect(numbers.lowestVoltageV).toBeCloseToShare(volts, EXACT);
    expect(collapsesAtS).toBeNull();
  });

  it("where no voltage would do, the supply breaks down and the holds get all that full command gives", () => {
    // 2·I²·R = 400 W; a battery of 0.1 ohm at 12 V gives at most V²/(4·R_s) = 360 W.
    const mass = (Math.sqrt(200 / R) * KT * 20) / (G * 0.05);
    const lift = driveOf({ load: liftOf(mass, 0.05, 1) });
    const { numbers, collapsesAtS } = solveRobot(robotOf([lift, lift], [hold(1, 0, 1)]));
    expect(collapsesAtS).toBe(0);
    expect(numbers.lowestVoltageV).toBeCloseToShare(12 / (1 + (0.1 * 2) / R), EXACT);
  });

  it("a lift too heavy for the sagging battery waits for its neighbour, and then goes", () => {
    // Starts where k_t·V/(R + …)·20 > m·g·r; alone V = 12·R/(R + 0.1), with an equal neighbour at its start V = 12·R/(R + 0.2).
    const limits = [0.1, 0.2].map((behind) => ((12 / (R + behind)) * KT * 20) / (G * 0.05));
    const heavy = driveOf({ load: liftOf(0.7 * (limits[0] ?? 0) + 0.3 * (limits[1] ?? 0), 0.05, 0.1) });
    const blocker = { ...stuck, protection: breaker({ tripsAfterS: 1 }) };
    const { mechanisms, protectors } = solveRobot(robotOf([heavy, blocker], [move(8, 0, 1)]));
    const freedAtS = protectors[0]?.openings[0]?.atS ?? 0;
    expect(mechanisms[0]?.stallsAtS).toBe(0);
    expect(freedAtS).toBeGreaterThan(0.1);
    expect(mechanisms[0]?.travels[0]?.firstS).toBeGreaterThan(freedAtS);
  });
});

describe("protection in a load cycle", () => {
  // Stalled alone: I = 12/(R + 0.1) = 35.294 A, m² = (I/20)²; τ = 2/ln(40²/(40² − 20²)).
  const current = 12 / (R + 0.1);
  const square = (current / 20) ** 2;
  const tau = 2 / Math.log(1600 / 1200);
  const afterRest = tau * Math.log(square / (square - 1));

  it("a breaker opens, resets and opens earlier each time, as its replica says", () => {
    const { protectors } = solveRobot(robotOf([{ ...stuck, protection: breaker({ resetsS: 3 }) }], [move(30, 0)]));
    const again = tau * Math.log((square - Math.exp(-3 / tau)) / (square - 1));
    const openings = protectors[0]?.openings ?? [];
    expect(openings.length).toBe(1 + Math.floor((30 - afterRest) / (3 + again)));
    openings.forEach(({ atS, closesAtS, currentA }, k) => {
      expect(atS).toBeCloseToShare(afterRest + k * (3 + again), INTEGRATED);
      expect(closesAtS).toBeCloseToShare(atS + 3, EXACT);
      expect(currentA).toBeCloseToShare(current, EXACT);
    });
    expect(again).toBeLessThan(afterRest);
  });

  it("what an earlier step left in a breaker makes it open earlier", () => {
    // One second at I: θ = m²·(1 − e^(−1/τ)); half a second without: θ·e^(−0.5/τ).
    const drive = { ...stuck, protection: breaker() };
    const left = square * -Math.expm1(-1 / tau) * Math.exp(-0.5 / tau);
    const { protectors } = solveRobot(robotOf([drive], [move(1, 0), rest(0.5), move(5, 0)]));
    expect(protectors[0]?.count).toBe(1);
    expect(protectors[0]?.openings[0]?.atS).toBeCloseToShare(1.5 + tau * Math.log((square - left) / (square - 1)), INTEGRATED);
    expect(protectors[0]?.openings[0]?.closesAtS).toBeNull();
  });

  it("a shared breaker carries the sum, and stops all that it feeds and nothing else", () => {
    const drives = [stuck, stuck, stuck];
    const each = 12 / (R + 0.3);
    const m2 = ((2 * each) / 30) ** 2;
    const shared = { protection: { ...breaker(), holdCurrentA: 30, tripsAtA: 60 }, feeds: [0, 2] } as const;
    const { protectors, mechanisms } = solveRobot(robotOf(drives, [move(20, 0, 1, 2)], { shared: [shared] }));
    const atS = tau * Math.log(m2 / (m2 - 1));
    expect(protectors.map(({ shared: index }) => index)).toEqual([0]);
    expect(protectors[0]?.openings[0]?.atS).toBeCloseToShare(atS, INTEGRATED);
    const alone = 12 / (R + 0.1);
    expect(mechanisms[0]?.sourceEnergyJ).toBeCloseToShare(each * each * R * atS, INTEGRATED);
    expect(mechanisms[1]?.sourceEnergyJ).toBeCloseToShare(each * each * R * atS + alone * alone * R * (20 - atS), INTEGRATED);
  });

  it("a shared fuse melts by its slow gate, and may melt from its fast gate on", () => {
    // 35.294 A through 17.647 A of rating: twice, 5 s and 0.15 s by ISO 8820-3.
    const shared = { protection: { kind: "fuse", ratingA: current / 2, carries: "supply" }, feeds: [0] } as const;
    const { protectors } = solveRobot(robotOf([stuck], [move(20, 0)], { shared: [shared] }));
    expect(protectors[0]?.mayOpenAtS).toBeCloseToShare(0.15, INTEGRATED);
    expect(protectors[0]?.openings.map(({ atS }) => atS)[0]).toBeCloseToShare(5, INTEGRATED);
  });

  it("a PTC stays open while its mechanism is driven, and conducts again after a rest", () => {
    const ptc: Protection = { kind: "ptc", holdCurrentA: 20, tripsAtA: 40, tripsAfterS: 2, carries: "motor" };
    const drive = { ...stuck, protection: ptc };
    const through = solveRobot(robotOf([drive], [move(4, 0), move(40, 0)]));
    expect(through.protectors[0]?.count).toBe(1);
    const rested = solveRobot(robotOf([drive], [move(4, 0), rest(5), move(40, 0)]));
    const [first, second] = rested.protectors[0]?.openings ?? [];
    expect(first?.atS).toBeCloseToShare(afterRest, INTEGRATED);
    expect(first?.closesAtS).toBe(4);
    // Kept warm until 4 s, then cooling for 5 s.
    expect(second?.atS).toBeCloseToShare(9 + tau * Math.log((square - Math.exp(-5 / tau)) / (square - 1)), INTEGRATED);
  });

  it("a lift that trips on its way stays where it is and arrives after the reset", () => {
    const lift = driveOf({ load: liftOf(25, 0.05, 2) });
    const free = solveRobot(robotOf([lift], [move(20, 0)]));
    const tripped = solveRobot(robotOf([{ ...lift, protection: breaker({ tripsAfterS: 0.3, resetsS: 2 }) }], [move(60, 0)]));
    const [alone, waited] = [free, tripped].map(({ mechanisms }) => mechanisms[0]?.travels[0]?.firstS ?? 0);
    const count = tripped.protectors[0]?.openings.filter(({ atS }) => atS < (waited ?? 0)).length ?? 0;
    expect(count).toBeGreaterThan(0);
    expect(waited).toBeGreaterThan((alone ?? 0) + 2 * count);
    expect(waited).toBeLessThan((alone ?? 0) + 2.5 * count);
  });
});

/** Robots whose numbers can be worked out by hand: circuits, trips and resets, energy, charge, repeating cycles. */
import { describe, expect, it } from "vitest";
import type { Drive, Protection, Supply } from "../../extension/model/drive.js";
import type { RobotDrive, RobotStep } from "../../extension/model/robotDrive.js";
import { solveRobot } from "../../extension/model/solveRobot.js";
import { armOf, driveOf, liftOf, plainMotor, reduction, rollerOf } from "./drives.js";
import "./expectShare.js";

const G = 9.80665;
const EXACT = 1e-9;
const INTEGRATED = 1e-6;

/** Of the plain motor: V/I_s, (V − R·I_0)/ω_0, T_s/I_s (its loss grows with speed). */
const R = 12 / 50;
const KE = (12 - R * 0.8) / 500;
const KT = 1.1 / 50;

const pack: Supply = { openCircuitV: 12, resistanceOhm: 0.1, peukert: 1 };
/** Far beyond what the motor lifts. */
const stuck = driveOf({ load: liftOf(1000, 0.05, 1) });

function robotOf(mechanisms: readonly Drive[], steps: readonly RobotStep[], fields: Partial<RobotDrive> = {}): RobotDrive {
  return { supply: pack, mechanisms, steps, shared: [], cycles: 1, ambientC: 25, ...fields };
}

const all = (drives: readonly Drive[]): number[] => drives.map((_, i) => i);
const move = (lastsS: number, ...moving: number[]): RobotStep => ({ lastsS, moving, holding: [] });
const hold = (lastsS: number, ...holding: number[]): RobotStep => ({ lastsS, moving: [], holding });
const rest = (lastsS: number): RobotStep => ({ lastsS, moving: [], holding: [] });

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

/** Holds 20 A, opens after `tripsAfterS` at 40 A. */
function breaker(fields: { tripsAfterS?: number; resetsS?: number; carries?: "motor" | "supply" } = {}): Protection {
  return { kind: "breaker", holdCurrentA: 20, tripsAtA: 40, tripsAfterS: 2, carries: "motor", ...fields };
}

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

describe("energy and charge", () => {
  it("what the battery gives is lifted, wound up, lost in gears or warms motors, to 1e-6 of the whole", () => {
    // Housings that lose nothing keep what motors turn into heat: C_w·ΔT_w + C_h·ΔT_h for each motor. At the end of a travel the
    // moving masses' energy goes into the stop.
    const thermal = { windingToHousingKPerW: 2, housingToAmbientKPerW: 1e9, windingTimeS: 8, housingTimeS: 1e11, limitC: 400 };
    const motor = { ...plainMotor, thermal, rotorInertiaKgM2: 2e-5, speedLossShare: 0.5 };
    const lift = driveOf({
      motor,
      motorCount: 2,
      stages: [reduction(18, 0.9)],
      load: { ...liftOf(15, 0.05, 1.2), frictionForceN: 9 },
    });
    const arm = driveOf({
      motor,
      stages: [reduction(60, 0.8)],
      load: armOf(4, 0.4, -0.6, 1.1),
      motorCurrentLimitA: 25,
      dragNm: 0.4,
    });
    const drives = [lift, arm];
    const { numbers, mechanisms } = solveRobot(robotOf(drives, [move(3, 0, 1), { ...move(3, 1), holding: [0] }, rest(1)]));
    let total = 0;
    drives.forEach(({ motorCount, stages, load }, i) => {
      const history = mechanisms[i];
      const heated = ((history?.windingEndC ?? 0) - 25) * (8 / 2) + ((history?.housingEndC ?? 0) - 25) * (1e11 / 1e9);
      let spent = motorCount * heated;
      for (const { arrivals, endSpeed } of history?.travels ?? []) {
        expect(arrivals).toBe(1);
        const { ratio, efficiency } = stages[0] ?? { ratio: 1, efficiency: 1 };
        const shaftSpeed = load.kind === "lift" ? (endSpeed ?? 0) / load.drumRadiusM : (endSpeed ?? 0);
        const rotors = 0.5 * motorCount * 2e-5 * (ratio * shaftSpeed) ** 2;
        const done =
          load.kind === "lift"
            ? (15 * G + 9) * 1.2 + 0.5 * 15 * (endSpeed ?? 0) ** 2
            : 4 * G * 0.4 * (Math.sin(1.1) - Math.sin(-0.6)) + 0.4 * 1.7 + 0.5 * 4 * 0.4 ** 2 * (endSpeed ?? 0) ** 2;
        spent += rotors + done / efficiency;
      }
      expect(history?.sourceEnergyJ).toBeCloseToShare(spent, INTEGRATED);
      total += spent;
    });
    expect(numbers.sourceEnergyJ).toBeCloseToShare(total, INTEGRATED);
  });

  it("a light roller that turns for ten minutes: the exponential of its start, then steady", () => {
    // Behind R + R_s the motor's line with loss: current and speed go by e^(−t/T); ∫I and ∫I² of an exponential.
    const inertia = 1e-6;
    const roller = driveOf({ stages: [], load: { ...rollerOf(0.2), inertiaKgM2: inertia } });
    const series = R + 0.1;
    const loss = 0.8 / 500;
    const steadySpeed = (12 - series * (0.2 / KT)) / (KE + series * loss);
    const steady = (12 - KE * steadySpeed) / series;
    const start = 12 / series;
    const time = inertia / (KT * (KE / series + loss));
    const lasts = 600;
    const charge = steady * lasts + (start - steady) * time;
    const squares = steady ** 2 * lasts + 2 * steady * (start - steady) * time + ((start - steady) ** 2 * time) / 2;
    const { numbers } = solveRobot(robotOf([roller], [move(lasts, 0)]));
    expect(time).toBeLessThan(0.002);
    expect(numbers.chargeUsedAh).toBeCloseToShare(charge / 3600, INTEGRATED);
    expect(numbers.sourceEnergyJ).toBeCloseToShare(12 * charge - 0.1 * squares, INTEGRATED);
    expect(numbers.peakCurrentA).toBeCloseToShare(start, EXACT);
  });

  it("a battery that empties ends the run: the cycles done and the moment", () => {
    // 12/(R + 0.1) A from 0.5 A·h: 51 s; cycles of 6 s of which 4 are driven: 12 whole ones, then 3 s.
    const supply: Supply = { ...pack, capacityAh: 0.5 };
    const { numbers, outcome, emptyAtS, cyclesFollowed } = solveRobot(
      robotOf([stuck], [move(4, 0), rest(2)], { supply, cycles: 100 }),
    );
    expect(outcome).toBe("empty");
    expect(emptyAtS).toBeCloseToShare(72 + (0.5 * 3600) / (12 / (R + 0.1)) - 48, INTEGRATED);
    expect(numbers.cyclesDone).toBe(12);
    expect(numbers.chargeUsedAh).toBeCloseToShare(0.5, INTEGRATED);
    expect(cyclesFollowed).toBeLessThan(4);
  });

  it("Peukert's law empties it sooner, by (I·H/C)^(k − 1)", () => {
    const current = 12 / (R + 0.1);
    const supply: Supply = { ...pack, capacityAh: 0.5, ratedOverH: 1, peukert: 1.1 };
    const { emptyAtS, depletedAh, numbers } = solveRobot(robotOf([stuck], [move(100, 0)], { supply }));
    expect(emptyAtS).toBeCloseToShare((0.5 * 3600) / (current * (current / 0.5) ** 0.1), INTEGRATED);
    expect(depletedAh).toBeCloseToShare(0.5, INTEGRATED);
    expect(numbers.chargeUsedAh).toBeCloseToShare(((emptyAtS ?? 0) * current) / 3600, INTEGRATED);
  });
});

describe("sags", () => {
  it("tells when, how deep, how long, and what moved", () => {
    // A stalled motor alone: 12·R/(R + 0.1) = 8.47 V for the 1.5 s of the second step.
    const supply: Supply = { ...pack, mustStayAbove: { voltageV: 9, forS: 0 } };
    const idle = driveOf({ load: liftOf(1, 0.05, 1) });
    const { sags } = solveRobot(robotOf([idle, stuck], [hold(2, 0), { ...move(1.5, 1), holding: [0] }, hold(1, 0)], { supply }));
    expect(sags.count).toBe(1);
    expect(sags.longest?.startS).toBe(2);
    expect(sags.longest?.lastsS).toBeCloseToShare(1.5, EXACT);
    expect(sags.longest?.moved).toEqual([1]);
    expect(sags.longest?.lowestV).toBeLessThan((12 * R) / (R + 0.1));
  });

  it("ends at the moment in a start at which the motors have sped up enough", () => {
    // I(t) of a lift without rotor losses is an exponential; the floor is crossed where I = (12 − 9.5)/0.1 = 25 A.
    const supply: Supply = { ...pack, mustStayAbove: { voltageV: 9.5, forS: 0 } };
    const lift = driveOf({ load: liftOf(10, 0.05, 3) });
    const series = R + 0.1;
    const loss = 0.8 / 500;
    const steadySpeed = (12 - series * ((10 * G * 0.05) / 20 / KT)) / (KE + series * loss);
    const steady = (12 - KE * steadySpeed) / series;
    const time = (10 * 0.05 ** 2) / 400 / (KT * (KE / series + loss));
    const { sags } = solveRobot(robotOf([lift], [move(5, 0)], { supply }));
    expect(sags.longest?.lastsS).toBeCloseToShare(time * Math.log((12 / series - steady) / (25 - steady)), INTEGRATED);
  });
});

describe("cycles that repeat", () => {
  const thermal = { windingToHousingKPerW: 2, housingToAmbientKPerW: 4, windingTimeS: 10, housingTimeS: 600, limitC: 500 };
  const heated = driveOf({ motor: { ...plainMotor, thermal }, load: liftOf(5, 0.05, 1) });

  it("without heat and protection the second cycle is the first", () => {
    const steps = [move(2, 0), rest(1)];
    const drives = [driveOf()];
    const once = solveRobot(robotOf(drives, steps));
    const often = solveRobot(robotOf(drives, steps, { cycles: 500 }));
    expect(often.cyclesFollowed).toBe(1);
    expect(often.periodic).toBe(true);
    expect(often.numbers.cyclesDone).toBe(500);
    expect(often.coveredS).toBe(1500);
    expect(often.numbers.sourceEnergyJ).toBeCloseToShare(500 * once.numbers.sourceEnergyJ, EXACT);
    expect(often.numbers.lowestVoltageAtS).toBe(0);
  });

  it("a hold cut into cycles heats up as one hold does, however few of the cycles are followed", () => {
    const whole = solveRobot(robotOf([heated], [hold(6000, 0)]));
    const cut = solveRobot(robotOf([heated], [hold(6, 0)], { cycles: 1000 }));
    expect(cut.cyclesFollowed).toBeLessThan(500);
    expect(cut.mechanisms[0]?.windingEndC).toBeCloseTo(whole.mechanisms[0]?.windingEndC ?? 0, 0);
    expect(cut.numbers.sourceEnergyJ).toBeCloseToShare(whole.numbers.sourceEnergyJ, 1e-3);
    // The slow housing must have risen all the way, not have been cut off while it still rose a little in each cycle.
    expect((whole.mechanisms[0]?.windingEndC ?? 0) - 25).toBeGreaterThan(20);
  });

  it("the first cycles of many are the cycles of few", () => {
    const steps = [move(2, 0), rest(1)];
    const few = solveRobot(robotOf([heated], steps, { cycles: 2 }));
    const first = solveRobot(robotOf([heated], steps));
    expect(few.cyclesFollowed).toBe(2);
    expect(few.numbers.sourceEnergyJ).toBeGreaterThan(first.numbers.sourceEnergyJ);
    expect(few.mechanisms[0]?.windingEndC).toBeGreaterThan(first.mechanisms[0]?.windingEndC ?? 0);
  });

  it("tells when a winding passes its limit in the cycles", () => {
    const motor = { ...plainMotor, thermal: { ...thermal, limitC: 60 } };
    const { mechanisms } = solveRobot(robotOf([{ ...heated, motor }], [hold(6, 0)], { cycles: 1000 }));
    expect(mechanisms[0]?.windingLimitAtS).toBeGreaterThan(6);
    expect(mechanisms[0]?.windingPeakC).toBeGreaterThan(60);
  });
});

describe("flywheels and rollers", () => {
  const flywheel = driveOf({ stages: [], load: { kind: "flywheel", inertiaKgM2: 0.002, speedRadPerS: 200, dragNm: 0.05 } });

  it("keep turning from step to step, and start again after a rest", () => {
    const { mechanisms } = solveRobot(robotOf([flywheel], [move(4, 0), move(4, 0), rest(1), move(4, 0)]));
    const times = mechanisms[0]?.travels.map(({ firstS }) => firstS ?? -1) ?? [];
    expect(times[0]).toBeGreaterThan(0.1);
    expect(times[1]).toBe(0);
    expect(times[2]).toBeCloseToShare(times[0] ?? 0, INTEGRATED);
  });

  it("fall off their speed while the battery sags too far, and come back", () => {
    // At 300 rad/s the flywheel needs about 8 V; three stalled motors leave 12·R/(R + 0.3) = 5.3 V.
    const fast = { ...flywheel, load: { ...flywheel.load, speedRadPerS: 300 } as Drive["load"] };
    const blocker = { ...stuck, motorCount: 3 };
    const { mechanisms } = solveRobot(robotOf([fast, blocker], [move(6, 0), move(2, 0, 1), move(6, 0)]));
    const [first, second, third] = mechanisms[0]?.travels ?? [];
    expect(first?.firstS).toBeGreaterThan(0);
    expect(second?.firstS).toBe(0);
    expect(third?.firstS).toBeGreaterThan(0.01);
    expect(third?.firstS).toBeLessThan(first?.firstS ?? 0);
  });
});

describe("samples for charts", () => {
  it("are bounded, and hold the lowest voltage and each mechanism's power", () => {
    const lift = driveOf({ protection: breaker({ resetsS: 0.2, tripsAfterS: 0.05 }) });
    const drives = [lift, driveOf({ load: liftOf(8, 0.04, 0.5) })];
    const robot = robotOf(drives, [move(3, ...all(drives)), move(3, 1)], { cycles: 50 });
    const { samples, numbers } = solveRobot(robot, { sampled: { fromS: 0, toS: 300 } });
    expect(samples.length).toBeGreaterThan(100);
    expect(samples.length).toBeLessThanOrEqual(3000);
    expect(Math.min(...samples.map(({ supplyVoltageV }) => supplyVoltageV))).toBeCloseToShare(numbers.lowestVoltageV, EXACT);
    for (const { supplyVoltageV, supplyCurrentA, powerW } of samples) {
      const sum = powerW.reduce((total, one) => total + one, 0);
      expect(Math.abs(sum - supplyVoltageV * supplyCurrentA)).toBeLessThan(1e-9 * (1 + Math.abs(sum)));
    }
    const times = samples.map(({ timeS }) => timeS);
    expect(times).toEqual([...times].sort((one, other) => one - other));
  });
});

/** Energy, charge, sags and repeating cycles of robots, worked out by hand. */
import { describe, expect, it } from "vitest";
import type { Drive, Supply } from "../../extension/model/drive.js";
import { solveRobot } from "../../extension/model/solveRobot.js";
import { armOf, driveOf, liftOf, plainMotor, reduction, rollerOf } from "./drives.js";
import "./expectShare.js";
import { all, breaker, EXACT, G, hold, INTEGRATED, KE, KT, move, pack, R, rest, robotOf, stuck } from "./handRobots.js";

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
  const thermal = { windingToHousingKPerW: 2, housingToAmbientKPerW: 5, windingTimeS: 8, housingTimeS: 400, limitC: 400 };

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
    // What is looked at for a chart changes nothing of the run.
    const unseen = solveRobot(robot).numbers;
    for (const [name, value] of Object.entries(numbers)) {
      expect(unseen[name as keyof typeof unseen], name).toBeCloseToShare(value, 1e-12);
    }
    expect(times).toEqual([...times].sort((one, other) => one - other));
  });

  it("hold each winding as it is at their time", () => {
    const warm = driveOf({ motor: { ...plainMotor, thermal } });
    const { samples, mechanisms } = solveRobot(robotOf([warm], [hold(20, 0)], {}), { sampled: { fromS: 0, toS: 20 } });
    const windings = samples.map(({ windingC }) => windingC[0] ?? Number.NaN);
    // Held at one current it only warms, from sample to sample.
    for (const [index, one] of windings.entries())
      if (index > 0) expect(one).toBeGreaterThanOrEqual(windings[index - 1] ?? Number.NaN);
    expect(windings.at(-1)).toBeCloseTo(mechanisms[0]?.windingEndC ?? Number.NaN, 9);
  });

  it("can be of the last cycle that is followed", () => {
    const warm = driveOf({ motor: { ...plainMotor, thermal } });
    const robot = robotOf([warm], [hold(20, 0)], { cycles: 7 });
    const { lastFollowed } = solveRobot(robot);
    const { samples } = solveRobot(robot, { sampled: { fromS: lastFollowed * 20, toS: (lastFollowed + 1) * 20 } });
    expect(samples.length).toBeGreaterThan(2);
    expect(samples.every(({ timeS }) => timeS >= lastFollowed * 20)).toBe(true);
  });
});

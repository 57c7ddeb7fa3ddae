/** Hovers on motors, stages and loads. */
import { describe, expect, it } from "vitest";
import { handPoint, liftTorque, MOTOR, perCent, SHEET, three } from "../support/handNumbers.js";
import { checkHover, hoverIn } from "../support/hover.js";

const OUTPUT_NM = liftTorque(10, 0.05);

function robot(parts: { motor?: string; stages?: string; load?: string; use?: string }): string {
  return `import { arm, flywheel, lift, mechanism, motor, reduction, spur, worm } from "loadmark";
export const ${parts.motor ?? "slow"} = ${MOTOR};
export const hoist = mechanism("hoist", {
  motor: ${parts.use ?? "slow"},
  stages: [${parts.stages ?? "spur(20, 60), reduction(2, { efficiency: 0.9 })"}],
  load: ${parts.load ?? 'lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" })'},
});
`;
}

describe("a hover on a motor", () => {
  it.each([
    ["declaration", robot({ motor: "slow/*|*/" }), "slow"],
    ["use", robot({ use: "slow/*|*/" }), "slow"],
    ["word", robot({}).replace("= motor(", "= mo/*|*/tor("), "motor"],
  ])("shows its constants and points at its %s", (_, source, about) => {
    const { rows, markdown } = checkHover(source, about);
    // R = V/Is, k_t = Ts/Is, k_e = (V − R·I0)/ω0 of a motor whose loss grows with speed.
    const resistance = SHEET.voltageV / SHEET.stallA;
    const noLoad = (SHEET.noLoadRpm * Math.PI) / 30;
    const backEmf = (SHEET.voltageV - resistance * SHEET.noLoadA) / noLoad;
    expect(markdown).toContain(
      `winding ${three(resistance)} Ω · torque constant ${three((SHEET.stallNm / SHEET.stallA) * 1000)} mN·m/A · back-emf ${three(backEmf * 1000)} mV·s/rad`,
    );
    const root = Math.sqrt(SHEET.noLoadA / SHEET.stallA);
    const best = root / (1 + root);
    const point = (share: number) => {
      const current = SHEET.noLoadA + (SHEET.stallA - SHEET.noLoadA) * share;
      const power = share * SHEET.stallNm * (1 - share) * noLoad;
      return {
        torque: share * SHEET.stallNm,
        rpm: SHEET.noLoadRpm * (1 - share),
        current,
        power,
        efficiency: power / (SHEET.voltageV * current),
      };
    };
    const [atBest, atPeak] = [point(best), point(0.5)];
    expect(rows).toEqual([
      ["no load", "0 N·m", "120 rpm", "300 mA", "0 W", "0 %"],
      [
        "best efficiency",
        `${three(atBest.torque * 1000)} mN·m`,
        `${three(atBest.rpm)} rpm`,
        `${three(atBest.current)} A`,
        `${three(atBest.power)} W`,
        perCent(atBest.efficiency),
      ],
      [
        "peak output power",
        `${three(atPeak.torque)} N·m`,
        "60 rpm",
        `${three(atPeak.current)} A`,
        `${three(atPeak.power)} W`,
        perCent(atPeak.efficiency),
      ],
      ["stall", "3 N·m", "0 rpm", "6 A", "0 W", "0 %"],
    ]);
    expect(markdown).toContain("Drives hoist");
  });

  it("says that a sheet contradicts itself, and computes nothing from it", () => {
    const { markdown, rows } = checkHover(robot({ motor: "slow/*|*/" }).replace('"3 N*m"', '"30 N*m"'), "slow");
    expect(markdown).toMatch(/^\*\*The sheet contradicts itself:\*\* slow/);
    expect(rows).toEqual([]);
  });

  it("says that the declaration is not accepted", () => {
    expect(checkHover(robot({ motor: "slow/*|*/" }).replace('"6 A"', '"-6 A"'), "slow").markdown).toMatch(
      /^\*\*Not checked:\*\* slow/,
    );
  });
});

describe("a hover on a stage", () => {
  it("shows torque and speed before and behind it", () => {
    const first = checkHover(robot({ stages: "sp/*|*/ur(20, 60), reduction(2, { efficiency: 0.9 })" }), "spur");
    const hand = handPoint(OUTPUT_NM, 6, 0.98 * 0.9);
    const shaft = (torqueNm: number, rpm: number): string =>
      `${torqueNm < 1 ? `${three(torqueNm * 1000)} mN·m` : `${three(torqueNm)} N·m`}, ${three(rpm)} rpm`;
    const motorSide = shaft(hand.motorNm, hand.motorRpm);
    const between = shaft(hand.motorNm * 3 * 0.98, hand.motorRpm / 3);
    expect(first.rows).toEqual([["hoist", motorSide, between]]);
    expect(first.markdown).toMatch(/^\*\*spur:\*\* ratio 3 {2}\nefficiency 98 % \(assumed: customary for this kind\)/);
    const second = checkHover(robot({ stages: "spur(20, 60), redu/*|*/ction(2, { efficiency: 0.9 })" }), "reduction");
    expect(second.rows).toEqual([["hoist", between, shaft(OUTPUT_NM, hand.outputRpm)]]);
    // The same loss torque with the load driving: 2 − 1/η.
    expect(second.markdown).toContain(`efficiency 90 % · driven back ${perCent(2 - 1 / 0.9)}`);
  });

  it("says that a stage does not run back", () => {
    const source = robot({ stages: 'wo/*|*/rm(1, 40, { leadAngle: "3 deg", friction: 0.1, inertia: "0 kg*m^2" })' });
    expect(checkHover(source, "worm").markdown).toContain("does not run back");
  });
});

describe("a hover on a load", () => {
  it("shows what it asks of the output shaft", () => {
    const { rows, markdown } = checkHover(
      robot({ load: 'li/*|*/ft({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" })' }),
      "lift",
    );
    const inertia = 10 * 0.05 ** 2;
    const turns = 0.8 / (2 * Math.PI * 0.05);
    expect(rows).toEqual([
      ["hoist", `${three(OUTPUT_NM)} N·m`, "all along its travel", `${three(inertia * 1000)} g·m²`, `${three(turns)} turns`],
    ]);
    expect(markdown).toMatch(/^\*\*lift:\*\* moved by hoist/);
  });

  it("says where an arm is hardest", () => {
    const { rows } = checkHover(
      robot({ load: 'a/*|*/rm({ mass: "4 kg", centreOfMass: "30 cm", from: "-90 deg", to: "60 deg" })' }),
      "arm",
    );
    const torque = 4 * 9.80665 * 0.3;
    expect(rows[0]?.slice(0, 3)).toEqual(["hoist", `${three(torque)} N·m`, "at 0°"]);
  });

  it("says that it turns on and on", () => {
    const { rows } = checkHover(
      robot({ load: 'fly/*|*/wheel({ inertia: "0.1 kg*m^2", speed: "10 rpm", drag: "1 N*m" })' }),
      "flywheel",
    );
    expect(rows[0]?.slice(2)).toEqual(["while it turns", "100 g·m²", "turns on"]);
  });

  it("says that nothing moves it yet", () => {
    const { markdown } = checkHover(
      'import { lift } from "loadmark";\nconst spare = li/*|*/ft({ mass: "1 kg", drumRadius: "1 cm", travel: "1 m" });\n',
      "lift",
    );
    expect(markdown).toBe("**lift:** moved by no mechanism yet");
  });
});

describe("a hover on what has none of its own", () => {
  it("is absent", () => {
    expect(
      hoverIn(
        'import { battery } from "loadmark";\nexport const pack/*|*/ = battery({ openCircuit: "12 V", resistance: "0 ohm" });\n',
      ),
    ).toBeUndefined();
  });
});

describe("a hover on a quantity", () => {
  it.each([
    // Exact by definition: pound-force inch 0.112984829 N·m (NIST SP 811), degree π/180, Celsius 273.15 K.
    ['noLoad: { speed: "120 r/*|*/pm", current', "speed is 120 rpm = 12.6 rad/s = 2 rev/s = 720°/s"],
    [
      'torque: "3 N/*|*/*m"',
      "torque is 3 N·m = 3000 mN·m = 300 N·cm = 3000 N·mm = 0.306 kgf·m = 30.6 kgf·cm = 30600 gf·cm = 2.21 lbf·ft = 26.6 lbf·in = 425 ozf·in",
    ],
  ])("%s", (marked, line) => {
    const source = robot({}).replace(marked.replace("/*|*/", ""), marked);
    expect(source).toContain("/*|*/");
    const { markdown } = checkHover(source, /"[^"]*"/.exec(marked.replace("/*|*/", ""))?.[0] ?? "");
    expect(markdown).toContain(`\n${line}\n`);
  });
});

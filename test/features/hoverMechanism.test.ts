/** Hovers on mechanisms: the verdict first, then what is needed against what is available. */
import { describe, expect, it } from "vitest";
import { handPoint, liftTime, liftTorque, MOTOR, perCent, SHEET, three } from "../support/handNumbers.js";
import { checkHover, hoverIn } from "../support/hover.js";

function hoist(driven: number, rest = "", cursor: "name" | "label" | "word" = "name"): string {
  const mark = (at: string): string => (at === cursor ? "/*|*/" : "");
  return `
import { breaker, lift, mechanism, motor, spur } from "loadmark";
export const slow = ${MOTOR};
export const hoist${mark("name")} = mechanism${mark("word")}(${mark("label")}"tray hoist", {
  motor: slow,
  stages: [spur(20, ${driven})],
  load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }),
  ${rest}
});
`;
}

/** 10 kg on 50 mm; a spur stage without an efficiency counts 0.98. */
const OUTPUT_NM = liftTorque(10, 0.05);

describe("a hover on a mechanism", () => {
  it("shows what is needed and what is there, by hand calculation", () => {
    const { rows, markdown } = checkHover(hoist(80), "hoist");
    const hand = handPoint(OUTPUT_NM, 4, 0.98);
    const radPerRpm = Math.PI / 30;
    const shaftW = hand.motorNm * hand.motorRpm * radPerRpm;
    const electricalW = SHEET.voltageV * hand.currentA;
    // Half the stall torque at half the no-load speed.
    const peakW = (SHEET.stallNm / 2) * (SHEET.noLoadRpm / 2) * radPerRpm;
    // Greatest share of T·ω in V·I on a straight line: t = √a/(1 + √a), a = I0/Is; then t·(1 − t)/(a + (1 − a)·t) of Ts·ω0/(V·Is).
    const a = SHEET.noLoadA / SHEET.stallA;
    const t = Math.sqrt(a) / (1 + Math.sqrt(a));
    const best =
      ((t * (1 - t)) / (a + (1 - a) * t)) * ((SHEET.stallNm * SHEET.noLoadRpm * radPerRpm) / (SHEET.voltageV * SHEET.stallA));
    expect(rows).toEqual([
      ["torque", `${three(hand.motorNm)} N·m`, "3 N·m at stall"],
      ["speed", `${three(hand.motorRpm)} rpm`, "120 rpm at no load"],
      ["current", `${three(hand.currentA)} A`, "6 A at stall"],
      ["output power", `${three(shaftW)} W`, `${three(peakW)} W at its peak`],
      ["efficiency", perCent(shaftW / electricalW), `${perCent(best)} at best`],
    ]);
    expect(markdown.startsWith(`**Fine:** ${perCent(hand.share)} of stall `)).toBe(true);
    expect(markdown).toContain(
      `needs ${three(OUTPUT_NM)} N·m of ${three(hand.outputStallNm)} N·m at stall, at ${three(hand.outputRpm)} rpm`,
    );
  });

  it("tells how long the travel takes, by the closed form", () => {
    const { markdown } = checkHover(hoist(80, 'within: "9 s",'), "hoist");
    expect(markdown).toContain(`\nTravel: ${three(liftTime(10, 0.05, 0.8, 4, 0.98))} s of the 9 s allowed  \n`);
    expect(checkHover(hoist(20, 'within: "9 s",'), "hoist").markdown).toContain("\nTravel: never arrives  \n");
  });

  it("reads like this", () => {
    const source = hoist(80)
      .replace(/lift\(\{[^}]*\}\)/, 'roller({ torque: "5 N*m" })')
      .replace("lift, ", "roller, ");
    expect(checkHover(source, "hoist").markdown).toMatchInlineSnapshot(`
      "**Fine:** 43 % of stall  
      tray hoist · 1 motor · ratio 4 · turning on  
      Output shaft: needs 5 N·m of 11.8 N·m at stall, at 17.2 rpm

      | per motor | &ensp;hardest | &ensp;available |
      | --- | ---: | ---: |
      | torque | &ensp;1.28 N·m | &ensp;3 N·m at stall |
      | speed | &ensp;69 rpm | &ensp;120 rpm at no load |
      | current | &ensp;2.72 A | &ensp;6 A at stall |
      | output power | &ensp;9.21 W | &ensp;9.42 W at its peak |
      | efficiency | &ensp;28 % | &ensp;35 % at best |

      Feedforward, at the output shaft: 5 V (42 % of the supply) holds the load, 3.82 V per rad/s  
      Assumed: Motor at the 25 °C of its sheet. Stage 1 (spur): customary efficiency 0.98. The motor's no-load loss grows with its speed. And 1 more.  
      Not checked: Heat: the motor has no thermal data. Protection: none is declared.  
      Most by: torque, motor stall torque, stage 1 driven

      [Chart](command:loadmark.showChart?%5B%22tray%20hoist%22%5D) · [Ratio map](command:loadmark.showRatioMap?%5B%22tray%20hoist%22%5D) · [Motor](command:loadmark.reveal?%5B%7B%22file%22%3A%22%2Frobot%2Frobot.ts%22%2C%22start%22%3A82%2C%22end%22%3A86%7D%5D)"
    `);
  });

  it("tells the fraction that the teeth make", () => {
    expect(checkHover(hoist(75), "hoist").markdown).toContain(" · ratio 3.75 (15/4) · ");
    expect(checkHover(hoist(80), "hoist").markdown).toContain(" · ratio 4 · ");
  });

  it("tells the share of stall once the winding is hot", () => {
    const heat =
      'thermal: { windingToHousing: "1 K/W", housingToAmbient: "2 K/W", windingTime: "20 s", housingTime: "300 s", limit: "130 degC" } })';
    const source = hoist(80, 'holdFor: "20 h",').replace(MOTOR, MOTOR.replace(/\}\)$/, heat));
    const { markdown } = checkHover(source, "hoist");
    // Held for ever: T = 25 + 3·I²·R(T), I = m·g·r/N/k_t with 6 A for 3 N·m; the share grows as R does.
    const [amperes, growth] = [(OUTPUT_NM / 4) * (6 / 3), 0.00393 / (1 + 0.00393 * 5)];
    const cold = 3 * amperes ** 2 * (SHEET.voltageV / SHEET.stallA);
    const riseK = cold / (1 - cold * growth);
    const hot = handPoint(OUTPUT_NM, 4, 0.98).share * (1 + growth * riseK);
    expect(markdown).toContain(`\nHot, winding at ${three(25 + riseK)} °C: ${perCent(hot)} of stall  \n`);
    expect(checkHover(hoist(80), "hoist").markdown).not.toContain("Hot,");
  });

  it("tells how far motors of the declared tolerance spread", () => {
    const source = hoist(80).replace(MOTOR, MOTOR.replace(/\}\)$/, "tolerance: 0.1 })"));
    expect(source).toContain("tolerance");
    const { markdown } = checkHover(source, "hoist");
    const told =
      /\nSpread: nine of ten take (\S+) s to (\S+) s and draw (\S+) A to (\S+) A \(200 draws over ±10 % of the motor\) {2}\n/.exec(
        markdown,
      );
    const [fast = 0, slow = 0, least = 0, most = 0] = told?.slice(1).map(Number) ?? [];
    const time = liftTime(10, 0.05, 0.8, 4, 0.98);
    const { currentA } = handPoint(OUTPUT_NM, 4, 0.98);
    expect(fast).toBeGreaterThan(0.85 * time);
    expect(fast).toBeLessThan(time);
    expect(slow).toBeGreaterThan(time);
    expect(slow).toBeLessThan(1.25 * time);
    expect(least).toBeLessThan(currentA);
    expect(most).toBeGreaterThan(currentA);
    expect(checkHover(hoist(80), "hoist").markdown).not.toContain("Spread");
  });

  it.each(["name", "label", "word"] as const)("stands at its %s", (cursor) => {
    const about = { name: "hoist", label: '"tray hoist"', word: "mechanism" }[cursor];
    expect(checkHover(hoist(80, "", cursor), about).rows).toHaveLength(5);
  });

  it("begins with the worst finding", () => {
    expect(checkHover(hoist(60), "hoist").markdown).toMatch(/^\*\*Past its peak of power:\*\* 56 % of stall/);
    const stalled = checkHover(hoist(20), "hoist");
    expect(stalled.markdown).toMatch(/^\*\*Stalls:\*\* 167 % of stall/);
    expect(stalled.markdown).toContain("at stall, stalled");
  });

  it("names the current limit where it is what counts", () => {
    const { rows } = checkHover(hoist(80, 'motorCurrentLimit: "3 A",'), "hoist");
    expect(rows[2]?.[2]).toBe("3 A limit");
    // On this line 3 A flow at (3 − 0.3)/(6 − 0.3) of the stall torque, below half of it: the limit takes the peak away.
    const share = (3 - 0.3) / (6 - 0.3);
    const power = share * 3 * 120 * (1 - share) * (Math.PI / 30);
    expect(rows[3]?.[2]).toBe(`${three(power)} W at its peak`);
  });

  it("shows a mechanism where it is used", () => {
    const hover = checkHover(
      `import { battery, lift, mechanism, motor, robot, spur } from "loadmark";
const slow = ${MOTOR};
const hoist = mechanism("tray hoist", {
  motor: slow, stages: [spur(20, 80)], load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }),
});
export default robot("r", { supply: battery({ openCircuit: "12 V", resistance: "0 ohm" }), mechanisms: [ho/*|*/ist] });
`,
      "hoist",
    );
    expect(hover.markdown).toContain("tray hoist · 1 motor · ratio 4");
    expect(hover.markdown).toContain('Supply of the robot "r".');
  });

  it("counts the supply of its robot", () => {
    const { rows } = checkHover(
      `import { battery, lift, mechanism, motor, robot, spur } from "loadmark";
const slow = ${MOTOR};
const hoist/*|*/ = mechanism("tray hoist", {
  motor: slow, motorCount: 2, stages: [spur(20, 80)], load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }),
});
export default robot("r", { supply: battery({ openCircuit: "11 V", resistance: "100 mohm" }), mechanisms: [hoist] });
`,
      "hoist",
    );
    // Two motors on one resistance: each sees R + 2·R_supply.
    const stallA = 11 / (12 / 6 + 2 * 0.1);
    const stallNm = stallA * (3 / 6);
    expect(rows[0]).toEqual(["torque", `${three((OUTPUT_NM / (4 * 0.98 * 2)) * 1000)} mN·m`, `${three(stallNm)} N·m at stall`]);
    expect(rows[2]?.[2]).toBe(`${three(stallA)} A at stall`);
  });

  it("says why nothing is checked, and never shows old numbers", () => {
    const unknown = checkHover(hoist(80).replace('"10 kg"', `\`\${Math.random()} kg\``), "hoist");
    expect(unknown.rows).toEqual([]);
    expect(unknown.markdown).toMatch(/^\*\*A value is not constant:\*\* tray hoist/);
    expect(unknown.markdown).toContain("Math.random");
    const refused = checkHover(hoist(80).replace('"10 kg"', '"-10 kg"'), "hoist").markdown;
    expect(refused).toMatch(/^\*\*Declaration not accepted:\*\* tray hoist/);
    expect(refused).toContain('"-10 kg" is impossible here');
  });

  it("says what is wrong in another file", () => {
    const { markdown } = checkHover(
      `//- loads.ts
import { lift } from "loadmark";
export const tray = lift({ mass: "10 kilo", drumRadius: "50 mm", travel: "0.8 m" });
//- hoist.ts
import { mechanism, motor } from "loadmark";
import { tray } from "./loads.js";
export const hoist/*|*/ = mechanism("tray hoist", { motor: ${MOTOR}, stages: [], load: tray });
`,
      "hoist",
    );
    expect(markdown).toMatch(/^\*\*Not checked:\*\* tray hoist/);
    expect(markdown).toContain('"kilo" is not a known unit');
  });

  it("describes the worst of those that one text declares, and names the others", () => {
    const { markdown } = checkHover(
      `import { lift, mechanism, motor, spur } from "loadmark";
const slow = ${MOTOR};
for (const [name, driven] of [["left", 80], ["right", 60]] as const) {
  /*|*/mechanism(name, {
    motor: slow, stages: [spur(20, driven)], load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" }),
  });
}
`,
      "mechanism",
    );
    expect(markdown).toMatch(/^\*\*Past its peak of power:\*\* 56 % of stall/);
    expect(markdown).toContain("right · 1 motor · ratio 3");
    expect(markdown).toContain("Declared by the same text: left.");
  });

  it("keeps hostile names inert", () => {
    const name = "**x** <img src=y> [a](command:b) $(bug) | \u202Egnp `c`\\n\\n# h";
    const { markdown } = checkHover(hoist(80).replace("tray hoist", name), "hoist");
    expect(markdown).toContain("\\*\\*x\\*\\* &lt;img src=y&gt; \\[a\\](command:b) $ (bug) \\| gnp \\`c\\` \\# h ·");
    expect(markdown).not.toContain("\u202E");
    expect(markdown.match(/\]\(command:/g)).toHaveLength(4);
  });

  it("is absent in plain code", () => {
    expect(
      hoverIn(hoist(80).replace("/*|*/", "").replace("export default", "").concat("\nconst other/*|*/ = 1;\n")),
    ).toBeUndefined();
  });
});

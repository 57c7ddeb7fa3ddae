import { describe, expect, it } from "vitest";
import { checkFindings } from "../support/checkFindings.js";

const IMPORTS = 'import { mechanism, motor, roller } from "loadmark";';

describe("sheet-contradicts", () => {
  // 4 A and 12 V at stall, 200 rpm without load: k_e = (12 - 3·0.2)/20.944 = 0.544; k_t = 3/4 = 0.75.
  it("speaks where more power would come out than goes in", () => {
    checkFindings(`${IMPORTS}
const dream = motor({ voltage: "12 V", noLoad: { speed: "200 rpm", current: "0.2 A" }, stall: { torque: "3 N*m", current: "4 A" } });
//    ^^^^^ warning sheet-contradicts: 0.75 N·m per ampere at stall, but only 0.544 V·s/rad`);
  });

  it("leaves five per cent for the rounding of printed sheets", () => {
    checkFindings(`${IMPORTS}
const rounded = motor({ voltage: "12 V", noLoad: { speed: "200 rpm", current: "0.2 A" }, stall: { torque: "2.28 N*m", current: "4 A" } });`);
  });

  it("speaks of a no-load current above the stall current, and runs no physics on such a motor", () => {
    const analysis = checkFindings(`${IMPORTS}
const odd = motor({ voltage: "12 V", noLoad: { speed: "200 rpm", current: "5 A" }, stall: { torque: "2 N*m", current: "4 A" } });
//    ^^^ warning sheet-contradicts: a no-load current of 5 A leaves nothing of the 4 A at stall
export const hub = mechanism("hub", { motor: odd, stages: [], load: roller({ torque: "30 N*m" }) });`);
    expect(analysis.mechanisms[0]?.numbers).toBeUndefined();
    expect(analysis.mechanisms[0]?.notChecked).toEqual(["Nothing: the motor's sheet contradicts itself."]);
  });

  it("speaks of a rating above the stall torque", () => {
    checkFindings(`${IMPORTS}
const proud = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" }, rated: { torque: "2.5 N*m" } });
//    ^^^^^ warning sheet-contradicts: a rated torque of 2.5 N·m is above the stall torque of 2 N·m`);
  });
});

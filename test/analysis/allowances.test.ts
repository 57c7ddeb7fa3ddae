/** `// loadmark-allow rule: reason` above a mechanism. */
import { describe, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

const HUB = 'mechanism("hub", { motor: twelveVolt, stages: [], load: roller({ torque: "1.2 N*m" }) });';

describe("allowances", () => {
  it("silence one rule at one mechanism", () => {
    checkFindings(`${PRELUDE}
// loadmark-allow past-peak: short bursts only
export const hub = ${HUB}
export const other = ${HUB.replace('"hub"', '"other"')}
//           ^^^^^ warning past-peak: 1.2 N·m`);
  });

  it("may stand among other comments, and several together", () => {
    checkFindings(`${PRELUDE}
// The hub of the wheel.
// loadmark-allow past-peak: short bursts only
// loadmark-allow backdrives: a brake holds it
export const hub = mechanism("hub", { motor: twelveVolt, stages: [], load: lift({ mass: "6 kg", drumRadius: "20 mm", travel: "1 m" }) });`);
  });

  it("need a reason", () => {
    checkFindings(`${PRELUDE}
   // loadmark-allow past-peak
// ^^^^^^^^^^^^^^^^^^^^^^^^^^^ error bad-declaration: The allowance of "past-peak" needs a reason
export const hub = ${HUB}
//           ^^^ warning past-peak: 1.2 N·m`);
  });

  it("need the name of a rule", () => {
    checkFindings(`${PRELUDE}
   // loadmark-allow past-peek: short bursts
// ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^ error bad-declaration: did you mean "past-peak"?
export const hub = ${HUB}
//           ^^^ warning past-peak: 1.2 N·m`);
  });

  it("are told when they match nothing", () => {
    checkFindings(`${PRELUDE}
   // loadmark-allow stalls: it has a spring
// ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^ warning bad-declaration: Nothing to allow: "stalls" does not speak here
export const hub = ${HUB}
//           ^^^ warning past-peak: 1.2 N·m`);
  });

  const LIST = '[["left", "1.2 N*m"], ["fine", "0.2 N*m"], ["right", "1.5 N*m"]] as const';

  it("hold for all mechanisms that a loop declares, and match where one of them has the finding", () => {
    checkFindings(`${PRELUDE}
for (const [name, torque] of ${LIST}) {
  // loadmark-allow past-peak: short bursts only
  mechanism(name, { motor: twelveVolt, stages: [], load: roller({ torque }) });
}`);
  });

  it("in a loop are told once", () => {
    checkFindings(`${PRELUDE}
for (const [name, torque] of ${LIST}) {
     // loadmark-allow stalls: it has a spring
  // ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^ warning bad-declaration: Nothing to allow
  mechanism(name, { motor: twelveVolt, stages: [], load: roller({ torque }) });
  //        ^^^^ warning past-peak: left
  //        ^^^^ warning past-peak: right
}`);
  });
});

import { describe, expect, it } from "vitest";
import { checkFindings, PRELUDE } from "../support/checkFindings.js";

describe("not-constant", () => {
  it("names the expression at the use, the chain to it, and what to write instead", () => {
    const { findings, mechanisms } = checkFindings(`${PRELUDE}
const teeth = Number(process.env.TEETH);
export const hub = mechanism("hub", {
  motor: twelveVolt,
  stages: [spur(16, teeth)],
//                  ^^^^^ warning not-constant: \`process\` exists only when the program runs
  load: roller({ torque: "1.9 N*m" }),
});
export const other = mechanism("other", { motor: twelveVolt, stages: [], load: roller({ torque: "1.9 N*m" }) });
//           ^^^^^ warning past-peak: 1.9 N·m`);
    expect(findings[0]?.related).not.toEqual([]);
    expect(findings[0]?.mechanism).toBe("hub");
    expect(mechanisms[0]?.notChecked.join()).toContain("Nothing");
  });

  it("is told once for one cause, however many mechanisms it reaches", () => {
    const { findings } = checkFindings(`${PRELUDE}
const torque = Math.random();
export const one = mechanism("one", { motor: twelveVolt, stages: [reduction(torque)], load: roller({ torque: "1 N*m" }) });
//                                                                          ^^^^^^ warning not-constant: Math.random
export const two = mechanism("two", { motor: twelveVolt, stages: [reduction(torque)], load: roller({ torque: "1 N*m" }) });`);
    expect(findings[0]?.related.map(({ message }) => message)).toContain("This depends on it too.");
  });

  it("is silent where nothing declared depends on it", () => {
    checkFindings(`${PRELUDE}
let mode = Math.random();
mode += 1;`);
  });

  it("tells a cycle once", () => {
    checkFindings(`${PRELUDE}
//- a.ts
import { B } from "./b.js";
export const A = B + 1;
//- b.ts
import { A } from "./a.js";
export const B = A + 1;
//- use.ts
${PRELUDE}import { A } from "./a.js";
export const hub = mechanism("hub", { motor: twelveVolt, stages: [reduction(A)], load: roller({ torque: "1 N*m" }) });
//                                                                          ^ warning not-constant: \`A\` is defined in terms of itself`);
  });
});

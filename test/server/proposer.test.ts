/** Proposals of the server: found in slices, kept, and stopped by a change of the text. */

import { describe, expect, it } from "vitest";
import { createAnalyser } from "../../extension/analysis/analyser.js";
import type { Finding } from "../../extension/analysis/analysis.js";
import { createProposer } from "../../extension/server/proposer.js";
import type { Result } from "../../extension/server/session.js";
import { analyseFixture, PRELUDE } from "../support/checkFindings.js";
import { parser as ts } from "../support/parser.js";

/** A hoist past its peak: what may clear it is searched over gears and motors. */
function resultWithFinding(): { readonly result: Result; readonly finding: Finding; readonly analyses: { count: number } } {
  const analysis = analyseFixture(`${PRELUDE}
export const hoist = mechanism("hoist", {
  motor: twelveVolt,
  stages: [spur(16, 60)],
  load: lift({ mass: "10 kg", drumRadius: "50 mm", travel: "1 m" }),
});`);
  const finding = analysis.findings.find(({ rule }) => rule === "past-peak");
  if (finding === undefined) throw new Error("the hoist is not past its peak");
  const analyses = { count: 0 };
  const { analyse } = createAnalyser(ts);
  const counted: Result["analyse"] = (...args) => {
    analyses.count += 1;
    return analyse(...args);
  };
  // Nothing else of a result is looked at.
  return { result: { analysis, analyse: counted } as unknown as Result, finding, analyses };
}

describe("the server's proposals", () => {
  it("are searched once for a finding, also by two who ask at once", async () => {
    const { result, finding, analyses } = resultWithFinding();
    const propose = createProposer({ moment: () => 0 });
    const [one, other] = await Promise.all([propose(result, finding), propose(result, finding)]);
    expect(one?.length).toBeGreaterThan(0);
    expect(other).toBe(one);
    const { count } = analyses;
    expect(await propose(result, finding)).toBe(one);
    expect(analyses.count).toBe(count);
  });

  it("let others have their turn, and stop when the text changes", async () => {
    const { result, finding, analyses } = resultWithFinding();
    let moment = 0;
    const propose = createProposer({ moment: () => moment, sliceMs: 0 });
    const search = propose(result, finding);
    const { count } = analyses;
    moment = 1;
    expect(await search).toBeUndefined();
    // At most the candidate in hand was finished.
    expect(analyses.count).toBeLessThanOrEqual(count + 1);
    expect((await propose(result, finding))?.length).toBeGreaterThan(0);
  });
});

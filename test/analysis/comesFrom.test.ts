/** The places that a finding leads to: where the numbers that it blames are declared, when that is elsewhere. */
import { describe, expect, it } from "vitest";
import { analyseFixture } from "../support/checkFindings.js";
import { readFixture } from "../support/fixture.js";

const MOTORS = `//- motors.ts
import { motor } from "loadmark";
export const slow = motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } });
`;

/** At a ratio of 2 and 0.98, 2.5 N·m behind the stage are 1.28 N·m of the motor's 2 N·m. */
const LOAD = 'load: roller({ torque: "2.5 N*m" })';

/** "message" at the text that it lies on, for the finding past the peak. */
function relatedOf(fixture: string): string[] {
  const { files } = readFixture(fixture);
  const { findings } = analyseFixture(fixture);
  const past = findings.find(({ rule }) => rule === "past-peak");
  return (past?.related ?? []).map(({ at, message }) => `${message} ${files.get(at.file)?.slice(at.start, at.end)}`);
}

describe("a finding leads to", () => {
  it("the constants of other places that went into what it blames, and to the motor", () => {
    const fixture = `${MOTORS}
//- gears.ts
export const GEARS = { driver: 20, driven: 4 * 10 } as const;
//- hub.ts
import { mechanism, roller, spur } from "loadmark";
import { GEARS } from "./gears.js";
import { slow } from "./motors.js";
export const hub = mechanism("hub", { motor: slow, stages: [spur(GEARS.driver, GEARS.driven)], ${LOAD} });
`;
    expect(relatedOf(fixture)).toEqual([
      '"stages" takes 20 from here. 20',
      '"stages" takes 40 from here. 4',
      '"stages" takes 40 from here. 10',
      '"motor" takes slow from here. slow',
    ]);
  });

  it("a stage that is made elsewhere, once however often it is used", () => {
    const fixture = `${MOTORS}
//- hub.ts
import { mechanism, roller, reduction } from "loadmark";
import { slow } from "./motors.js";
const box = reduction(1.5);
export const hub = mechanism("hub", { motor: slow, stages: [box, box], ${LOAD} });
`;
    expect(relatedOf(fixture)).toEqual(['"stages" takes box from here. box', '"motor" takes slow from here. slow']);
  });

  it("nowhere, where all of it stands in the declaration itself", () => {
    const fixture = `//- hub.ts
import { mechanism, motor, roller, spur } from "loadmark";
export const hub = mechanism("hub", {
  motor: motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" }, stall: { torque: "2 N*m", current: "4 A" } }),
  stages: [spur(20, 40)],
  ${LOAD},
});
`;
    expect(analyseFixture(fixture).findings.map(({ rule }) => rule)).toContain("past-peak");
    expect(relatedOf(fixture)).toEqual([]);
  });
});

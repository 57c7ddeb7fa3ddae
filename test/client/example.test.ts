/** The example that the editor opens: accepted as written, and worth looking at. */
import { describe, expect, it } from "vitest";
import { EXAMPLE_ROBOT } from "../../extension/client/exampleRobot.js";
import { analyseFixture } from "../support/chartFixture.js";

describe("the example", () => {
  const { findings, mechanisms, robots } = analyseFixture(EXAMPLE_ROBOT);

  it("is a robot whose load cycle runs, without a warning", () => {
    expect(mechanisms.map(({ name, numbers }) => [name, numbers !== undefined])).toEqual([
      ["hoist", true],
      ["flap", true],
    ]);
    expect(robots[0]?.numbers?.cyclesDone).toBe(1);
    expect(findings.filter(({ level }) => level !== "information")).toEqual([]);
  });

  it("says that its numbers are invented", () => {
    expect(EXAMPLE_ROBOT).toContain("Invented numbers");
  });
});

/** How a finding's sentences become the lines of a diagnostic. */
import { describe, expect, it } from "vitest";
import { inLines } from "../../extension/server/diagnostics.js";

describe("inLines", () => {
  it.each([
    ["each motor gives 1.55 N·m. A ratio of 1.46 takes it back.", "each motor gives 1.55 N·m.\nA ratio of 1.46 takes it back."],
    ["Runs back. Block it! Stages hold it.", "Runs back.\nBlock it!\nStages hold it."],
    ["Late: 11.2 s of 10 s at 22.5 : 1", "Late: 11.2 s of 10 s at 22.5 : 1"],
    ['"x.Y" is not a field; did you mean "y"? known here: z', '"x.Y" is not a field; did you mean "y"? known here: z'],
    ["", ""],
  ])("%j", (message, lines) => {
    expect(inLines(message)).toBe(lines);
  });
});

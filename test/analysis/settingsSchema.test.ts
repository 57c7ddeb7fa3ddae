/** The shipped JSON Schema and the settings that the analysis takes say the same. */
import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { parseSettings } from "../../extension/analysis/settings.js";
import { RULES } from "../../extension/rules/table.js";
import { parser as ts } from "../support/parser.js";

const schema = JSON.parse(readFileSync(path.join(import.meta.dirname, "../../extension/analysis/loadmark.schema.json"), "utf8"));

describe("loadmark.schema.json", () => {
  it("is draft-07, which the editor supports", () => {
    expect(schema.$schema).toBe("http://json-schema.org/draft-07/schema#");
  });

  it("lists every rule with its own level", () => {
    const listed = Object.entries<{ readonly default: string }>(schema.properties.levels.properties).map(([id, one]) => [
      id,
      one.default,
    ]);
    expect(listed.sort()).toEqual(RULES.map(({ id, level }) => [id, level]).sort());
  });

  it("knows the settings that the analysis knows", () => {
    for (const [name, sample] of Object.entries({ levels: {}, toothCounts: [12], leaveOut: ["old"], $schema: "x" })) {
      expect(schema.properties).toHaveProperty([name]);
      expect(parseSettings(ts, "/loadmark.json", JSON.stringify({ [name]: sample })).finding, name).toBeUndefined();
    }
    expect(Object.keys(schema.properties).sort()).toEqual(["$schema", "leaveOut", "levels", "toothCounts"]);
  });
});

describe("a malformed settings file", () => {
  it.each([
    ["{", /not JSON/, 1],
    ['{ "levels": { "past-peak": "loud" } }', /a level is "error", "warning", "information" or "off"/, 27],
    ['{ "colour": 1 }', /"colour" is not a setting/, 2],
    ['{ "toothCounts": [12, 0.5] }', /Defaults are used/, 22],
    ["[]", /Defaults are used/, 0],
    ["", /Defaults are used/, 0],
  ])("%s gives one located finding, and defaults", (text, says, start) => {
    const { finding, settings } = parseSettings(ts, "/loadmark.json", text);
    expect(finding?.message).toMatch(says);
    expect(finding?.at.start).toBe(start);
    expect(settings).toEqual({});
  });
});

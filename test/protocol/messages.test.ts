import { describe, expect, it } from "vitest";
import { placeSchema, spanSchema } from "../../extension/protocol/place.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { NO_STATE, type State, stateSchema } from "../../extension/protocol/state.js";

const place = { uri: "file:///a.ts", range: { start: { line: 0, character: 1 }, end: { line: 2, character: 3 } } };
const mechanism = { name: "a", label: "a", description: "58 % of stall", tooltip: "Fine", standing: "fine", place } as const;

const state: State = {
  robots: [{ name: "robot", label: "robot", description: "", tooltip: "", standing: "warning", place, mechanisms: [mechanism] }],
  apart: [{ ...mechanism, standing: "unknown" }],
  status: { text: "1 warning", tooltip: "2 mechanisms", standing: "warning" },
};

describe("messages", () => {
  it("arrive as they were sent", () => {
    expect(readMessage(stateSchema, JSON.parse(JSON.stringify(state)))).toEqual(state);
    expect(readMessage(stateSchema, NO_STATE)).toEqual(NO_STATE);
    expect(readMessage(placeSchema, place)).toEqual(place);
    expect(readMessage(spanSchema, { file: "/a.ts", start: 0, end: 3 })).toEqual({ file: "/a.ts", start: 0, end: 3 });
  });

  it.each([
    ["nothing", undefined],
    ["a text", "state"],
    ["a part", { robots: [] }],
    ["a standing that there isn't", { ...state, status: { ...state.status, standing: "splendid" } }],
    ["a mechanism without a place", { ...state, apart: [{ ...mechanism, place: undefined }] }],
  ])("that are %s are dropped", (_what, message) => {
    expect(readMessage(stateSchema, message)).toBeUndefined();
  });

  it.each([-1, 0.5, Number.NaN, Number.POSITIVE_INFINITY, "0", null])("with the offset %j are dropped", (start) => {
    expect(readMessage(spanSchema, { file: "/a.ts", start, end: 3 })).toBeUndefined();
  });
});

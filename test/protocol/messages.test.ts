import { describe, expect, it } from "vitest";
import { placeSchema, spanSchema } from "../../extension/protocol/place.js";
import { readMessage } from "../../extension/protocol/readMessage.js";
import { NO_STATE, resolveState, type State, type StateMessage, stateMessageSchema } from "../../extension/protocol/state.js";

const place = { uri: "file:///a.ts", range: { start: { line: 0, character: 1 }, end: { line: 2, character: 3 } } };
const mechanism = { name: "a", label: "a", description: "58 % of stall", tooltip: "Fine", standing: "fine", place } as const;

const robot = { name: "robot", label: "robot", description: "", tooltip: "", standing: "warning", place } as const;

const state: StateMessage = {
  robots: [{ ...robot, mechanisms: [mechanism], like: null }],
  apart: [{ ...mechanism, standing: "unknown" }],
  status: { text: "1 warning", tooltip: "2 mechanisms", standing: "warning" },
};

describe("messages", () => {
  it("arrive as they were sent", () => {
    expect(readMessage(stateMessageSchema, JSON.parse(JSON.stringify(state)))).toEqual(state);
    expect(readMessage(stateMessageSchema, NO_STATE)).toEqual(NO_STATE);
    expect(readMessage(placeSchema, place)).toEqual(place);
    expect(readMessage(spanSchema, { file: "/a.ts", start: 0, end: 3 })).toEqual({ file: "/a.ts", start: 0, end: 3 });
  });

  it.each([
    ["nothing", undefined],
    ["a text", "state"],
    ["a part", { robots: [] }],
    ["a standing that there isn't", { ...state, status: { ...state.status, standing: "splendid" } }],
    ["nothing that is kept", { ...state, apart: [{ from: 0, kept: 0 }] }],
    ["a place before the first", { ...state, apart: [{ from: -1, kept: 1 }] }],
    ["a mechanism without a place", { ...state, apart: [{ ...mechanism, place: undefined }] }],
  ])("that are %s are dropped", (_what, message) => {
    expect(readMessage(stateMessageSchema, message)).toBeUndefined();
  });

  it.each([-1, 0.5, Number.NaN, Number.POSITIVE_INFINITY, "0", null])("with the offset %j are dropped", (start) => {
    expect(readMessage(spanSchema, { file: "/a.ts", start, end: 3 })).toBeUndefined();
  });
});

describe("a state told by the one before", () => {
  const named = (name: string) => ({ ...mechanism, name });
  const before: State = {
    robots: [
      { ...robot, mechanisms: [named("a"), named("b")] },
      { ...robot, name: "other", mechanisms: [named("c")] },
    ],
    apart: [named("d"), named("e"), named("f")],
    status: null,
  };
  const resolved = (message: Partial<StateMessage>) => resolveState(before, { robots: [], apart: [], status: null, ...message });

  it("keeps what it names, in the order in which it names it", () => {
    const apart = [{ from: 2, kept: 1 }, named("x"), { from: 0, kept: 2 }];
    expect(resolved({ apart })?.apart.map(({ name }) => name)).toEqual(["f", "x", "d", "e"]);
    expect(resolved({ apart })?.apart[0]).toBe(before.apart[2]);
    expect(resolved({ robots: [{ from: 1, kept: 1 }] })?.robots).toEqual([before.robots[1]]);
  });

  it("takes a robot's mechanisms from the robot that it is like", () => {
    const mechanisms = [named("x"), { from: 0, kept: 1 }];
    const told = { ...robot, name: "renamed", mechanisms };
    const names = (like: number) => resolved({ robots: [{ ...told, like }] })?.robots[0]?.mechanisms.map(({ name }) => name);
    expect(names(0)).toEqual(["x", "a"]);
    expect(names(1)).toEqual(["x", "c"]);
    expect(resolved({ robots: [{ ...told, like: 0 }] })?.robots[0]).not.toHaveProperty("like");
  });

  it("is whole by itself where it names nothing", () => {
    expect(resolved(state)).toEqual(resolveState(NO_STATE, state));
    expect(resolveState(NO_STATE, state)).toEqual({ ...state, robots: [{ ...robot, mechanisms: [mechanism] }] });
  });

  it.each<[string, Partial<StateMessage>]>([
    ["mechanisms", { apart: [{ from: 2, kept: 2 }] }],
    ["robots", { robots: [{ from: 2, kept: 1 }] }],
    ["mechanisms of a robot", { robots: [{ ...robot, mechanisms: [{ from: 1, kept: 1 }], like: 1 }] }],
    ["a robot to be like", { robots: [{ ...robot, mechanisms: [{ from: 0, kept: 1 }], like: 2 }] }],
    ["mechanisms of no robot", { robots: [{ ...robot, mechanisms: [{ from: 0, kept: 1 }], like: null }] }],
  ])("is none where it names %s that there are not", (_what, message) => {
    expect(resolved(message)).toBeUndefined();
  });
});

import { describe, expect, it } from "vitest";
import { NO_VIEW } from "../../extension/protocol/chartView.js";
import type { Stop } from "../../webview/stops.js";
import { actionOfKey, changeView } from "../../webview/viewState.js";

const stops: readonly Stop[] = Array.from({ length: 31 }, (_, index) => ({
  torqueNm: index / 10,
  shareOfStall: index / 30,
  available: null,
  sheet: null,
  names: [],
}));
const NEEDED = 1.21;

function press(keys: readonly string[], cursorNm: number | null = null): number | null {
  let view = { ...NO_VIEW, cursorNm };
  for (const key of keys) {
    const action = actionOfKey(key, stops, NEEDED);
    if (action === undefined) throw new Error(`${key} does nothing.`);
    view = changeView(view, action);
  }
  return view.cursorNm;
}

describe("keys", () => {
  it("put the cursor where the load is, at the first step", () => {
    expect(press(["ArrowRight"])).toBe(1.2);
    expect(press(["ArrowLeft"])).toBe(1.2);
  });

  it("move it from there by one stop, and by ten", () => {
    expect(press(["ArrowRight", "ArrowRight"])).toBe(1.3);
    expect(press(["ArrowRight", "ArrowLeft", "ArrowLeft"])).toBe(1);
    expect(press(["ArrowUp"], 0.5)).toBe(0.6);
    expect(press(["ArrowDown"], 0.5)).toBe(0.4);
    expect(press(["PageUp"], 0.5)).toBe(1.5);
    expect(press(["PageDown"], 2.5)).toBe(1.5);
  });

  it("go to the ends, and no further", () => {
    expect(press(["Home"])).toBe(0);
    expect(press(["End"])).toBe(3);
    expect(press(["Home", "ArrowLeft"])).toBe(0);
    expect(press(["End", "ArrowRight", "PageUp"])).toBe(3);
  });

  it("take it away", () => {
    expect(press(["End", "Escape"])).toBeNull();
  });

  it("leave other keys to the page", () => {
    for (const key of ["Tab", "a", "Enter", " "]) expect(actionOfKey(key, stops, NEEDED)).toBeUndefined();
  });

  it("do nothing where there is no stop", () => {
    const action = actionOfKey("ArrowRight", [], NEEDED);
    expect(action && changeView(NO_VIEW, action)).toBe(NO_VIEW);
  });
});

describe("the page's state", () => {
  const view = { mechanism: "hoist", cursorNm: 1, tableOpen: true };

  it("keeps the cursor while the same mechanism is shown, and drops it with another", () => {
    expect(changeView(view, { type: "show", mechanism: "hoist" })).toBe(view);
    expect(changeView(view, { type: "show", mechanism: "arm" })).toEqual({ ...view, mechanism: "arm", cursorNm: null });
  });

  it("remembers the table", () => {
    expect(changeView(view, { type: "openTable", open: false })).toEqual({ ...view, tableOpen: false });
  });

  it("is the same object when nothing changes", () => {
    expect(changeView(view, { type: "place", torqueNm: 1 })).toBe(view);
  });
});

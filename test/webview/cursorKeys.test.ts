import { describe, expect, it } from "vitest";
import { NO_MEMORY } from "../../extension/protocol/chartMemory.js";
import { cursorAfterKey } from "../../webview/frame/cursorKeys.js";
import { withSubject, withView } from "../../webview/frame/memory.js";

const stops = Array.from({ length: 31 }, (_, index) => index / 10);
const NEEDED = 1.21;

function press(keys: readonly string[], start: number | null = null): number | null {
  let cursor = start;
  for (const key of keys) {
    const next = cursorAfterKey(key, cursor, stops, NEEDED);
    if (next === undefined) throw new Error(`${key} does nothing.`);
    cursor = next;
  }
  return cursor;
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
    for (const key of ["Tab", "a", "Enter", " "]) expect(cursorAfterKey(key, 1, stops, NEEDED)).toBeUndefined();
  });

  it("leave the cursor where there is no stop", () => {
    expect(cursorAfterKey("ArrowRight", null, [], NEEDED)).toBeNull();
  });
});

describe("what the page remembers", () => {
  const memory = withView({ ...NO_MEMORY, mechanism: "hoist", tableOpen: true }, "operating-point", { cursor: 1 });

  it("keeps the cursor while the same mechanism is shown, and drops it with another", () => {
    expect(withSubject(memory, "operating-point", { mechanism: "hoist" })).toBe(memory);
    const other = withSubject(memory, "operating-point", { mechanism: "arm" });
    expect(other).toMatchObject({ mechanism: "arm", tableOpen: true, views: { "operating-point": { cursor: null } } });
  });

  it("is the same object when nothing changes", () => {
    expect(withView(memory, "operating-point", { cursor: 1 })).toBe(memory);
  });
});

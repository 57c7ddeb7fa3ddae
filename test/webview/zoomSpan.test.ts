import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Zoom } from "../../webview/frame/sheet.js";
import { afterKey, moved, scaled, spanned } from "../../webview/frame/zoomSpan.js";

const zoom = (from: number, to: number): Zoom => ({ from, to, least: 0, greatest: 100, words: () => "" });

describe("a zoom", () => {
  it("keeps what lies below the pointer where it is", () => {
    expect(scaled(zoom(20, 60), 0.5, 40)).toEqual({ from: 30, to: 50 });
    expect(scaled(zoom(20, 60), 0.5, 20)).toEqual({ from: 20, to: 40 });
    expect(scaled(zoom(20, 60), 2, 40)).toEqual({ from: 0, to: 80 });
    expect(scaled(zoom(20, 80), 2, 40)).toBeNull();
  });

  it("moves, and stops at the ends", () => {
    expect(moved(zoom(20, 60), 0.25)).toEqual({ from: 30, to: 70 });
    expect(moved(zoom(70, 90), 1)).toEqual({ from: 80, to: 100 });
    expect(moved(zoom(5, 25), -1)).toEqual({ from: 0, to: 20 });
  });

  it("takes a dragged span in either direction, and nothing where that is a click", () => {
    expect(spanned(zoom(0, 100), 30, 10)).toEqual({ from: 10, to: 30 });
    expect(spanned(zoom(0, 100), -5, 40)).toEqual({ from: 0, to: 40 });
    expect(spanned(zoom(0, 100), 30, 30.001)).toBeUndefined();
  });

  it("follows keys, and leaves others to the page", () => {
    expect(afterKey(zoom(0, 100), "+", false, 50)).toEqual({ from: 25, to: 75 });
    expect(afterKey(zoom(25, 75), "-", false, 50)).toBeNull();
    expect(afterKey(zoom(25, 75), "0", false, 50)).toBeNull();
    expect(afterKey(zoom(20, 60), "ArrowRight", true, 50)).toEqual({ from: 30, to: 70 });
    expect(afterKey(zoom(20, 60), "ArrowRight", false, 50)).toBeUndefined();
    expect(afterKey(zoom(20, 60), "a", false, 50)).toBeUndefined();
  });

  it("never leaves the ends, nor comes to nothing", () => {
    const key = fc.constantFrom("+", "-", "ArrowLeft", "ArrowRight");
    fc.assert(
      fc.property(fc.array(key, { maxLength: 60 }), fc.double({ min: 0, max: 100, noNaN: true }), (keys, about) => {
        let shown = zoom(0, 100);
        for (const one of keys) {
          const next = afterKey(shown, one, true, about);
          shown = next ? zoom(next.from, next.to) : zoom(0, 100);
          expect(shown.from).toBeGreaterThanOrEqual(0);
          expect(shown.to).toBeLessThanOrEqual(100 + 1e-9);
          expect(shown.to - shown.from).toBeGreaterThan(0.009);
        }
      }),
    );
  });
});

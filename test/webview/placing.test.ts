import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Box, placeLabels, placesAlong, placesWithin, type WantedLabel } from "../../webview/plots/placing.js";

const area: Box = { left: 0, top: 0, right: 400, bottom: 200 };

function label(places: WantedLabel["places"], more: Partial<WantedLabel> = {}): WantedLabel {
  return { width: 60, height: 14, places, optional: false, ...more };
}

const at = (x: number, y: number) => ({ x, y, upright: false });

describe("words in a plot", () => {
  it("take their first place where it is free", () => {
    expect(placeLabels([label([at(100, 50), at(100, 150)])], area, [])).toEqual([at(100, 50)]);
  });

  it("do not lie on a curve, even where it crosses them between two of its points", () => {
    const curve = [
      { x: 0, y: 0 },
      { x: 400, y: 200 },
    ];
    expect(placeLabels([label([at(200, 100), at(200, 30)])], area, [curve])).toEqual([at(200, 30)]);
  });

  it("do not lie on each other, nor on what is taken", () => {
    const places = [at(100, 50), at(110, 55), at(300, 50)];
    expect(placeLabels([label(places), label(places)], area, [])).toEqual([at(100, 50), at(300, 50)]);
    const taken = { left: 90, right: 120, top: 40, bottom: 60 };
    expect(placeLabels([label(places)], area, [], [taken])).toEqual([at(300, 50)]);
  });

  it("stay inside", () => {
    expect(placeLabels([label([at(10, 50), at(395, 50), at(50, 50)])], area, [])).toEqual([at(50, 50)]);
  });

  it("are left out rather than put across a curve, where they may be", () => {
    const curve = [
      { x: 0, y: 100 },
      { x: 400, y: 100 },
    ];
    const across = [at(200, 100)];
    expect(placeLabels([label(across, { optional: true }), label(across)], area, [curve])).toEqual([null, at(200, 100)]);
  });

  it("turn upright where a strip is too narrow, and go beside it where it is narrower still", () => {
    expect(placesWithin(100, 300, area, 60, 14)[0]?.upright).toBe(false);
    expect(placesWithin(100, 130, area, 60, 14).every(({ upright }) => upright)).toBe(true);
    const beside = placesWithin(100, 104, area, 60, 14);
    expect(beside.length).toBeGreaterThan(0);
    expect(beside.every(({ x, upright }) => !upright && Math.abs(x - 100) > 30)).toBe(true);
  });

  it("find a place beside any straight line through the plot", () => {
    const inside = fc.integer({ min: 20, max: 180 });
    fc.assert(
      fc.property(inside, inside, (from, to) => {
        const curve = Array.from({ length: 50 }, (_, step) => ({ x: step * 8, y: from + ((to - from) * step) / 49 }));
        const places = placesAlong(curve, 60, 14, [0.2, 0.4, 0.6, 0.8]);
        const [place] = placeLabels([label(places, { optional: true })], area, [curve]);
        expect(place).not.toBeNull();
      }),
    );
  });
});

/** Fewer moments with every extreme: by property, for any series. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { keptMoments } from "../../../extension/features/charts/keptMoments.js";

const series = fc
  .array(fc.record({ gap: fc.double({ min: 0, max: 2, noNaN: true }), value: fc.integer({ min: -50, max: 50 }) }), {
    minLength: 1,
    maxLength: 600,
  })
  .map((steps) => {
    let timeS = 0;
    const timesS = steps.map(({ gap }) => {
      timeS += gap;
      return timeS;
    });
    return { timesS, values: steps.map(({ value }) => value) };
  });

const extremes = (values: readonly number[]) => [Math.min(...values), Math.max(...values)];

describe("kept moments", () => {
  it("rise, begin and end where the series does, and hold its extremes, whichever series it is", () => {
    fc.assert(
      fc.property(series, fc.integer({ min: 1, max: 40 }), ({ timesS, values }, spans) => {
        for (const [guides, others] of [
          [[values], []],
          [[], [values]],
        ]) {
          const kept = keptMoments(timesS, guides ?? [], others ?? [], spans);
          expect(kept).toEqual([...new Set(kept)].sort((one, other) => one - other));
          expect([kept[0], kept.at(-1)]).toEqual([0, timesS.length - 1]);
          expect(extremes(kept.map((index) => values[index] ?? Number.NaN))).toEqual(extremes(values));
        }
      }),
    );
  });

  it("are bounded by the spans, each with its own extremes", () => {
    const timesS = Array.from({ length: 10_000 }, (_, index) => index);
    const values = timesS.map((timeS) => Math.sin(timeS));
    const kept = keptMoments(timesS, [values], [], 50);
    expect(kept.length).toBeLessThanOrEqual(50 * 4);
    for (let span = 0; span < 50; span++) {
      const inside = kept.filter((index) => Math.floor(index / 200) === span).map((index) => values[index] ?? 0);
      expect(extremes(inside)).toEqual(extremes(values.slice(span * 200, (span + 1) * 200)));
    }
  });

  it("are all of them where these are few", () => {
    expect(keptMoments([0, 1, 2], [[5, 5, 5]], [], 10)).toEqual([0, 1, 2]);
    expect(keptMoments([], [], [], 10)).toEqual([]);
  });
});

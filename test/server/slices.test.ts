/** Long work in slices: others get their turn, and a change of a text ends it. */
import { describe, expect, it } from "vitest";
import { runInSlices } from "../../extension/server/slices.js";

function* counting(steps: number, done: number[]): Generator<undefined, number> {
  for (let step = 0; step < steps; step++) {
    done.push(step);
    yield;
  }
  return steps;
}

describe("work in slices", () => {
  it("gives its result, and lets others have their turn meanwhile", async () => {
    const done: number[] = [];
    const seen: number[] = [];
    const work = runInSlices(counting(5, done), { moment: () => 0, sliceMs: 0 });
    const watch = (async () => {
      for (let turn = 0; turn < 4; turn++) {
        await new Promise((resolve) => setTimeout(resolve, 0));
        seen.push(done.length);
      }
    })();
    expect(await work).toEqual({ result: 5 });
    await watch;
    expect(seen[0]).toBeLessThan(5);
  });

  it("ends after the step in hand when a text changes", async () => {
    const done: number[] = [];
    let moment = 0;
    const work = runInSlices(counting(100, done), { moment: () => moment, sliceMs: 0 });
    moment = 1;
    expect(await work).toBeUndefined();
    expect(done).toHaveLength(1);
  });

  it("does short work at once", async () => {
    const done: number[] = [];
    const work = runInSlices(counting(3, done), { moment: () => 0 });
    expect(done).toHaveLength(3);
    expect(await work).toEqual({ result: 3 });
  });
});

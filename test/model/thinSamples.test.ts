/** Fewer samples of a run: what is left out lies on the lines between those that are kept, and jumps stay jumps. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { RobotSample } from "../../extension/model/robotSolution.js";
import { thinSamples } from "../../extension/model/thinSamples.js";

function sample(timeS: number, supplyVoltageV: number, powerW: readonly number[] = [0]): RobotSample {
  return { timeS, supplyVoltageV, supplyCurrentA: 0, powerW, windingC: powerW.map(() => null), open: [] };
}

/** Voltage on the lines through samples; of two at one time the later one. */
function lineAt(samples: readonly RobotSample[], timeS: number): number {
  const after = samples.findIndex((one) => one.timeS > timeS);
  const [one, other] = after < 0 ? samples.slice(-1) : samples.slice(Math.max(after - 1, 0), after + 1);
  if (one === undefined || other === undefined) return one?.supplyVoltageV ?? Number.NaN;
  const share = (timeS - one.timeS) / (other.timeS - one.timeS);
  return one.supplyVoltageV + share * (other.supplyVoltageV - one.supplyVoltageV);
}

describe("thinned samples", () => {
  it("are the ends alone of a straight line, and all where there are few", () => {
    const straight = Array.from({ length: 500 }, (_, i) => sample(i, 12 - i / 1000));
    expect(thinSamples(straight, 10).map(({ timeS }) => timeS)).toEqual([0, 499]);
    expect(thinSamples(straight.slice(0, 9), 10)).toHaveLength(9);
    expect(thinSamples([], 10)).toEqual([]);
  });

  it("keep a jump upright, however long nothing happened before it", () => {
    const quiet = Array.from({ length: 300 }, (_, i) => sample(i / 10, 12));
    const jump = [sample(30, 12), sample(30, 9), ...Array.from({ length: 300 }, (_, i) => sample(30 + i / 10, 9 + i / 1000))];
    const kept = thinSamples([...quiet, ...jump], 20);
    expect(kept.filter(({ timeS }) => timeS === 30).map(({ supplyVoltageV }) => supplyVoltageV)).toEqual([12, 9]);
    expect(lineAt(kept, 29.99)).toBeCloseTo(12, 9);
  });

  it("keep what one mechanism does while the supply stays as it is", () => {
    const swap = Array.from({ length: 400 }, (_, i) => sample(i, 12, i < 200 ? [10, 0] : [0, 10]));
    const kept = thinSamples(swap, 20);
    expect(kept.some(({ timeS, powerW }) => timeS === 199 && powerW[0] === 10)).toBe(true);
    expect(kept.some(({ timeS, powerW }) => timeS === 200 && powerW[1] === 10)).toBe(true);
  });

  it("hold the extremes exactly, and lines near to what they leave out", () => {
    const steps = fc.array(
      fc.record({ gap: fc.double({ min: 0.01, max: 3, noNaN: true }), volts: fc.double({ min: 8, max: 13, noNaN: true }) }),
      {
        minLength: 30,
        maxLength: 300,
      },
    );
    fc.assert(
      fc.property(steps, (given) => {
        let timeS = 0;
        const samples = given.map(({ gap, volts }, i) => {
          timeS += gap;
          return sample(timeS, i % 7 === 0 ? volts : 12);
        });
        const kept = thinSamples(samples, samples.length - 1);
        const voltages = (some: readonly RobotSample[]) => some.map(({ supplyVoltageV }) => supplyVoltageV);
        expect(Math.min(...voltages(kept))).toBe(Math.min(...voltages(samples)));
        expect(Math.max(...voltages(kept))).toBe(Math.max(...voltages(samples)));
        expect(kept[0]).toBe(samples[0]);
        expect(kept.at(-1)).toBe(samples.at(-1));
        // One step of the tolerance is enough to leave out a sample: three shares of 1e-5 of 13 V, and the cone's other half.
        for (const { timeS: at, supplyVoltageV } of samples) {
          const left = kept.some((one) => one.timeS === at);
          if (!left) expect(Math.abs(lineAt(kept, at) - supplyVoltageV)).toBeLessThan(13 * 1e-4);
        }
      }),
    );
  });
});

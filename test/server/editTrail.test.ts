import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { carryBack, carryForward, carrySpan, type Edit } from "../../extension/server/editTrail.js";

const edits = (before: string) =>
  fc.array(fc.record({ at: fc.nat(before.length + 9), removed: fc.nat(4), inserted: fc.nat(4) }), { maxLength: 6 });

/** Makes edits that fit, and the text that they lead to; inserted characters are `+`. */
function apply(before: string, wished: readonly { at: number; removed: number; inserted: number }[]) {
  let text = before;
  const made: Edit[] = [];
  for (const { at, removed, inserted } of wished) {
    const start = Math.min(at, text.length);
    const edit = { start, removed: Math.min(removed, text.length - start), inserted };
    text = text.slice(0, start) + "+".repeat(inserted) + text.slice(start + edit.removed);
    made.push(edit);
  }
  return { text, made };
}

const BEFORE = "abcdefghijklmnopqrstuvwxyz";

describe("carrying places over edits", () => {
  it("keeps every character that survives at its place, both ways", () => {
    fc.assert(
      fc.property(edits(BEFORE), (wished) => {
        const { text, made } = apply(BEFORE, wished);
        for (const character of text.replaceAll("+", "")) {
          const old = BEFORE.indexOf(character);
          const now = text.indexOf(character);
          expect(carryForward(made, old)).toBe(now);
          expect(carryBack(made, now)).toBe(old);
        }
      }),
    );
  });

  it("goes back to the place before an edit and after it", () => {
    const made = [{ start: 3, removed: 2, inserted: 4 }];
    expect(carryBack(made, 2)).toBe(2);
    expect(carryBack(made, 3)).toBe(3);
    expect(carryBack(made, 5)).toBeUndefined();
    expect(carryBack(made, 7)).toBe(5);
    expect(carryBack(made, 9)).toBe(7);
  });

  it("goes back over several edits in their order", () => {
    const { text, made } = apply("0123456789", [
      { at: 2, removed: 0, inserted: 3 },
      { at: 7, removed: 2, inserted: 0 },
    ]);
    expect(text).toBe("01+++236789");
    expect(carryBack(made, text.indexOf("9"))).toBe(9);
  });

  it("leaves text that is put in at a span's ends outside", () => {
    const span = { start: 4, end: 6 };
    expect(carrySpan([{ start: 4, removed: 0, inserted: 2 }], span)).toEqual({ start: 6, end: 8 });
    expect(carrySpan([{ start: 6, removed: 0, inserted: 2 }], span)).toEqual(span);
    expect(carrySpan([{ start: 5, removed: 0, inserted: 2 }], span)).toEqual({ start: 4, end: 8 });
  });

  it("never turns a span around", () => {
    fc.assert(
      fc.property(edits(BEFORE), fc.nat(26), fc.nat(26), (wished, a, b) => {
        const { text, made } = apply(BEFORE, wished);
        const { start, end } = carrySpan(made, { start: Math.min(a, b), end: Math.max(a, b) });
        expect(start).toBeLessThanOrEqual(end);
        expect(start).toBeGreaterThanOrEqual(0);
        expect(end).toBeLessThanOrEqual(text.length);
      }),
    );
  });
});

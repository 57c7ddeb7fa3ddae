/** Matcher for relative closeness: `expect(a).toBeCloseToShare(b, 1e-9)` means |a − b| ≤ 1e-9·max(|a|, |b|), or both below 1e-12. */
import { expect } from "vitest";

declare module "vitest" {
  interface Matchers<T> {
    toBeCloseToShare: (expected: number, share: number) => T;
  }
}

expect.extend({
  toBeCloseToShare(received: number, expected: number, share: number) {
    const off = Math.abs(received - expected);
    const size = Math.max(Math.abs(received), Math.abs(expected));
    return {
      pass: off <= share * size || size < 1e-12,
      message: () => `${received} is off ${expected} by a share of ${off / size}, allowed ${share}`,
    };
  },
});

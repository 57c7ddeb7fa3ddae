import { describe, expect, it } from "vitest";
import { createRestartLimit } from "../../extension/client/restartLimit.js";

const MINUTE = 60_000;

describe("restarting a server that ended by itself", () => {
  it("is allowed four times within three minutes, and not a fifth time", () => {
    const mayRestart = createRestartLimit(() => 0);
    expect([1, 2, 3, 4, 5].map(() => mayRestart())).toEqual([true, true, true, true, false]);
  });

  it("is always allowed for a server that ends now and then", () => {
    let time = 0;
    const mayRestart = createRestartLimit(() => time);
    for (time = 0; time < 100 * MINUTE; time += MINUTE) expect(mayRestart()).toBe(true);
  });
});

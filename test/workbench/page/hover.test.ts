// What a person reads when hovering over a gear constant: its torque in every mechanism that it feeds.

import assert from "node:assert/strict";
import { perCent, three } from "../../support/handNumbers.js";
import { trayHoist, wateringArm } from "../host/handDemo.js";
import { workbench } from "./session.js";

describe("the hover on a gear constant in another file", () => {
  it("shows the resulting torque of each mechanism", async () => {
    const editor = await workbench().open("gearing.ts");
    const text = await editor.hover("PINION", /watering arm\t/);
    for (const [name, { outputNm, motorNm, stallNm, share }] of [
      ["tray hoist", trayHoist()],
      ["watering arm", wateringArm()],
    ] as const) {
      const row = text.split("\n").find((line) => line.startsWith(`${name}\t`));
      const torque = `${three(outputNm)} N·m of ${three((outputNm / motorNm) * stallNm)} N·m`;
      for (const part of [torque, `\t${perCent(share)}`]) assert.ok(row?.includes(part), `"${row}" has not "${part}".`);
    }
  });

  it("follows an edit of another constant of the same stage", async () => {
    const editor = await workbench().open("gearing.ts");
    await editor.hover("PINION", /tray hoist\t/);
    await editor.leaveHover();
    await editor.retype("54;", "40;");
    const { share } = trayHoist({ driven: 40 });
    await editor.hover("PINION", new RegExp(`tray hoist\\t.*\\t${perCent(share)}`));
  });
});

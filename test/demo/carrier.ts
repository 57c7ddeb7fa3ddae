/** The seedling carrier: trays up, water on, lid closed. */
import { lidArm } from "./mechanisms/lidArm.js";
import { shelfLift } from "./mechanisms/shelfLift.js";
import { trayHoist, turnsFor } from "./mechanisms/trayHoist.js";
import { wateringArm } from "./mechanisms/wateringArm.js";

const SHELF_HEIGHT_M = 0.62;

/** Ratios and set points as the motor controllers want them. */
export const setPoints = {
  trayTurns: turnsFor(SHELF_HEIGHT_M),
  ratios: [trayHoist, shelfLift, wateringArm, lidArm].map(({ name, ratio }) => ({ name, ratio })),
};

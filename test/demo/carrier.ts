/** The seedling carrier: trays up, water on, lid closed. */
import { robot } from "loadmark";
import { driveBase } from "./mechanisms/driveBase.js";
import { lidArm } from "./mechanisms/lidArm.js";
import { seedDrum } from "./mechanisms/seedDrum.js";
import { shelfLift } from "./mechanisms/shelfLift.js";
import { soilPress } from "./mechanisms/soilPress.js";
import { trayHoist, turnsFor } from "./mechanisms/trayHoist.js";
import { wateringArm } from "./mechanisms/wateringArm.js";
import { pack } from "./power.js";

const SHELF_HEIGHT_M = 0.62;

/** Ratios and set points as the motor controllers want them. */
export const setPoints = {
  trayTurns: turnsFor(SHELF_HEIGHT_M),
  ratios: [trayHoist, shelfLift, wateringArm, lidArm].map(({ name, ratio }) => ({ name, ratio })),
};

export const carrier = robot("seedling carrier", {
  supply: pack,
  mechanisms: [trayHoist, shelfLift, wateringArm, lidArm, driveBase, seedDrum, soilPress],
  // One row of trays: drive there, lift a tray, press its soil while the drum meters out seeds, open the lid, and on with the shelf.
  loadCycle: [
    { lasts: "5 s", moving: [driveBase] },
    { lasts: "5 s", moving: [trayHoist, seedDrum] },
    { lasts: "13 s", moving: [soilPress, seedDrum], holding: [trayHoist] },
    { lasts: "2 s", moving: [lidArm] },
    { lasts: "10 s", moving: [driveBase, shelfLift, lidArm] },
  ],
  cycles: 30,
});

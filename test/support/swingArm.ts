/**
 * A robot small enough to judge by hand, for tests of the server: 1 kg at 0.3 m asks 2.94 N·m (1 kg · 9.80665 m/s² · 0.3 m) of one motor
 * with 2.4 N·m at stall. Through 48 : 16 that is 0.98 N·m before losses, well below half of stall; through 24 : 16 it is 1.96 N·m, past half of
 * it; through 16 : 16 more than stall.
 */
export const SWING_ARM = `import { arm, mechanism, motor, spur } from "loadmark";
import { DRIVEN } from "./gears.js";

const sheet = motor({
  voltage: "12 V",
  noLoad: { speed: "150 rpm", current: "0.3 A" },
  stall: { torque: "2.4 N*m", current: "4 A" },
});

export const swing = mechanism("swing arm", {
  motor: sheet,
  stages: [spur(16, DRIVEN)],
  load: arm({ mass: "1 kg", centreOfMass: "0.3 m", from: "0 deg", to: "80 deg" }),
});
`;

export const gears = (driven: number) => `export const DRIVEN = ${driven};\n`;

export const FINE = 48;
export const PAST_PEAK = 24;
export const STALLS = 16;

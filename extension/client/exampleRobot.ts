/** The text of a small robot to start from. Its numbers are invented, and it says so. */
export const EXAMPLE_ROBOT = `import { arm, battery, breaker, lift, mechanism, motor, reduction, robot, spur } from "loadmark";

// Invented numbers: take those of your own motor's sheet.
const gearmotor = motor({
  voltage: "12 V",
  noLoad: { speed: "144 rpm", current: "0.3 A" },
  stall: { torque: "2.6 N*m", current: "4.4 A" },
});

const pack = battery({ openCircuit: "12.6 V", resistance: "100 mohm", mustStayAbove: "9 V" });

export const hoist = mechanism("hoist", {
  motor: gearmotor,
  motorCount: 2,
  stages: [spur(16, 40)],
  load: lift({ mass: "9 kg", drumRadius: "35 mm", travel: "0.8 m" }),
  within: "6 s",
  protect: breaker({ holdCurrent: "3 A", trips: { at: "6 A", after: "4 s" } }),
  supply: pack,
});

export const flap = mechanism("flap", {
  motor: gearmotor,
  stages: [reduction(3)],
  load: arm({ mass: "1.2 kg", centreOfMass: "25 cm", from: "0 deg", to: "80 deg" }),
  supply: pack,
});

export default robot("tray mover", {
  supply: pack,
  mechanisms: [hoist, flap],
  loadCycle: [
    { lasts: "6 s", moving: [hoist] },
    { lasts: "2 s", moving: [flap], holding: [hoist] },
  ],
});
`;

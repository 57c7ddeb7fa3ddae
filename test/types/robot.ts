/** Robot code against the published declarations: right code compiles, every wrong line is refused. Compiled, never run. */
import {
  type ArmInput,
  arm,
  battery,
  between,
  breaker,
  lift,
  type Mechanism,
  type MotorSheet,
  mechanism,
  motor,
  reduction,
  robot,
  spur,
  worm,
} from "loadmark";

const MASS_KG = 4;

export const sheetMotor = motor({
  voltage: "12 V",
  noLoad: { speed: "100 rpm", current: "0.2 A" },
  stall: { torque: "2 N*m", current: "4 A" },
});
export const constantsMotor = motor({
  voltage: "12 V",
  resistance: "2 ohm",
  torqueConstant: "400 rpm/V",
  noLoadCurrent: "80 mA",
});
export const pack = battery({ openCircuit: "12.8 V", resistance: "90 mohm", mustStayAbove: { voltage: "9 V", for: "20 ms" } });
export const shared = { mass: "2 kg", centreOfMass: "0.3 m", from: "0 deg", to: "90 deg" } satisfies ArmInput;
export const sheet: MotorSheet = {
  voltage: "6 V",
  noLoad: { speed: "10 rad/s", current: "0 A" },
  stall: { torque: "15 in*lbf", current: "2 A" },
};

export const hoist: Mechanism = mechanism("hoist", {
  motor: sheetMotor,
  stages: [spur(16, 40, { efficiency: between(0.9, 0.98) }), reduction(3), worm(1, 30, { leadAngle: "5 deg" })],
  load: lift({ mass: `${MASS_KG} kg`, drumRadius: between("38 mm", "42 mm"), travel: "0.8 m" }),
  protect: breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "6 s" } }),
  within: "9 s",
  supply: pack,
});
export const ratio: number = hoist.ratio;
export const wheel = mechanism("wheel", { motor: constantsMotor, stages: [], load: arm(shared) });
export default robot("carrier", {
  supply: pack,
  mechanisms: [hoist, wheel],
  loadCycle: [{ lasts: "12 s", moving: [hoist] }],
  cycles: 20,
});

// @ts-expect-error a voltage is not a current
battery({ openCircuit: "12 A", resistance: "90 mohm" });
// @ts-expect-error no unit
lift({ mass: "20", drumRadius: "40 mm", travel: "1 m" });
// @ts-expect-error a plain number where a quantity goes
lift({ mass: 20, drumRadius: "40 mm", travel: "1 m" });
// @ts-expect-error an unknown unit
lift({ mass: "20 stone", drumRadius: "40 mm", travel: "1 m" });
// @ts-expect-error a range of another kind
lift({ mass: between("20 mm", "30 mm"), drumRadius: "40 mm", travel: "1 m" });
// @ts-expect-error a mistyped field
arm({ ...shared, centerOfMass: "0.3 m" });
// @ts-expect-error a missing field
arm({ mass: "2 kg", from: "0 deg", to: "90 deg" });
// @ts-expect-error teeth are plain numbers
spur("16", 40);
// @ts-expect-error a worm needs its lead angle
worm(1, 30);
// @ts-expect-error a load is not a motor
mechanism("odd", { motor: arm(shared), stages: [], load: arm(shared) });
// @ts-expect-error built values are read-only
hoist.ratio = 3;
// @ts-expect-error the sheet's form and the constants' form do not mix by halves
motor({ voltage: "12 V", noLoad: { speed: "100 rpm", current: "0.2 A" } });

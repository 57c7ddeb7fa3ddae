/** Invented gearmotors: no such motors are made, and these numbers belong to nobody's sheet. */
import { motor } from "loadmark";

/** Slow and strong; numbers at the gearbox's output shaft. */
export const steadyMotor = motor({
  voltage: "12 V",
  noLoad: { speed: "152 rpm", current: "0.28 A" },
  stall: { torque: "2.4 N*m", current: "4.1 A" },
});

/** Twice as quick, half as strong. */
export const quickMotor = motor({
  voltage: "12 V",
  noLoad: { speed: "310 rpm", current: "0.35 A" },
  stall: { torque: "1.3 N*m", current: "4.4 A" },
});

/** Small and fast, for reductions of its own; with the heat data of its winding. */
export const wheelMotor = motor({
  voltage: "12 V",
  noLoad: { speed: "4600 rpm", current: "0.22 A" },
  stall: { torque: "0.11 N*m", current: "4.9 A" },
  speedLossShare: 0.4,
  rotorInertia: "8 g*cm^2",
  rated: { torque: "35 mN*m" },
  thermal: {
    windingToHousing: "6 K/W",
    housingToAmbient: "14 K/W",
    windingTime: "9 s",
    housingTime: "380 s",
    limit: "110 degC",
  },
});

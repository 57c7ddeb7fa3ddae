/**
 * What the model is told: one mechanism in SI units, as plain data.
 *
 * Every field that a declaration may leave out is either optional here (it then does not apply) or
 * already filled with the default that model.md names. No unit strings, no sources, no names.
 */

/** One motor at the sheet's 25 °C. */
export interface MotorConstants {
  /** Voltage that the sheet speaks of, V. */
  readonly voltageV: number;
  /** Winding resistance, ohm. */
  readonly resistanceOhm: number;
  /** Torque per ampere while motoring, N·m/A. */
  readonly torqueConstantNmPerA: number;
  /** Back-emf per speed, V·s/rad. */
  readonly backEmfVPerRadPerS: number;
  /** Current at no load and `voltageV`, A. */
  readonly noLoadCurrentA: number;
  /** Speed at no load and `voltageV`, rad/s. */
  readonly noLoadSpeedRadPerS: number;
  /** Share of the no-load current that grows with speed: 0 is a constant friction torque, 1 a loss that scales with speed. */
  readonly speedLossShare: number;
  /** Rotor inertia at the shaft that the sheet speaks of, kg·m². */
  readonly rotorInertiaKgM2: number;
  readonly rated?: { readonly torqueNm: number; readonly currentA?: number };
  readonly thermal?: ThermalConstants;
  readonly magnet?: Magnet;
  /** Spread of resistance and back-emf as a share: 0.1 is ±10 %. */
  readonly tolerance?: number;
}

export type Magnet = "ferrite" | "neodymium" | "samarium-cobalt";

/** Two-node network, winding and housing. */
export interface ThermalConstants {
  readonly windingToHousingKPerW: number;
  readonly housingToAmbientKPerW: number;
  readonly windingTimeS: number;
  readonly housingTimeS: number;
  /** Highest winding temperature, °C. */
  readonly limitC: number;
  /** Ambient, °C; absent: 25 °C or the robot's. */
  readonly ambientC?: number;
}

/** One stage; the first is at the motor. */
export interface Stage {
  readonly kind: "spur" | "chain" | "belt" | "planetary" | "worm" | "reduction";
  /** Input turns per output turn. */
  readonly ratio: number;
  /** Output power per input power, motor driving. */
  readonly efficiency: number;
  /** The same with the load driving; not above 0 where the stage does not run back. */
  readonly backwardEfficiency: number;
  /** True where the friction angle is within 20 % of the lead angle: self-locking is then never claimed. */
  readonly nearSelfLocking: boolean;
  /** Inertia at the stage's driven shaft, kg·m². */
  readonly inertiaKgM2: number;
  /** Greatest torque at the driven shaft, N·m. */
  readonly maxTorqueNm?: number;
}

/** A quantity over output-shaft position (rad): points in rising position, linear between. */
export type Curve = readonly (readonly [positionRad: number, value: number])[];

export type Load =
  | {
      readonly kind: "lift";
      readonly massKg: number;
      readonly drumRadiusM: number;
      readonly travelM: number;
      /** Slope from horizontal, rad; π/2 is vertical. */
      readonly slopeRad: number;
      readonly carriagePerRope: number;
      /** Force that helps to raise, N; or over the output shaft's position. */
      readonly counterbalanceN: number | Curve;
      readonly frictionForceN: number;
    }
  | {
      readonly kind: "arm";
      readonly massKg: number;
      readonly centreOfMassM: number;
      /** Angles from horizontal, rad; may run either way. */
      readonly fromRad: number;
      readonly toRad: number;
      /** π/2 swings in a vertical plane, 0 is a turntable. */
      readonly slopeRad: number;
      /** About the pivot, kg·m². */
      readonly inertiaKgM2: number;
      /** Torque towards greater angle, N·m. */
      readonly counterbalanceNm: number | Curve;
    }
  | {
      readonly kind: "wheels";
      readonly massKg: number;
      readonly radiusM: number;
      readonly grip: number;
      readonly rolling: number;
      readonly slopeRad: number;
      readonly distanceM: number;
      readonly drivenShare: number;
      /** Of the wheels themselves, at the wheel shaft, beside m·r², kg·m². */
      readonly inertiaKgM2: number;
    }
  | {
      readonly kind: "flywheel";
      readonly inertiaKgM2: number;
      readonly speedRadPerS: number;
      readonly dragNm: number;
      readonly releaseEnergyJ?: number;
    }
  | {
      readonly kind: "screw";
      readonly forceN: number;
      readonly leadM: number;
      readonly meanDiameterM: number;
      readonly friction: number;
      readonly travelM: number;
      /** Half angle of the thread, rad. */
      readonly threadAngleRad: number;
      readonly collar?: { readonly meanDiameterM: number; readonly friction: number };
      readonly massKg: number;
      /** Replaces the friction equations (a ball screw). */
      readonly efficiency?: number;
    }
  | { readonly kind: "roller"; readonly torqueNm: number; readonly speedRadPerS?: number; readonly inertiaKgM2: number }
  | { readonly kind: "loadCurve"; readonly torqueNm: Curve; readonly inertiaKgM2: number | Curve };

export interface Supply {
  readonly openCircuitV: number;
  readonly resistanceOhm: number;
  /** Rated charge, A·h. */
  readonly capacityAh?: number;
  /** The time over which the charge is rated, h. */
  readonly ratedOverH?: number;
  /** Peukert exponent; 1 has no effect. */
  readonly peukert: number;
  readonly mustStayAbove?: { readonly voltageV: number; readonly forS: number };
}

export type Protection =
  | {
      readonly kind: "breaker" | "ptc";
      readonly holdCurrentA: number;
      readonly tripsAtA: number;
      readonly tripsAfterS: number;
      /** Time open before it closes again, s; absent: stays open. */
      readonly resetsS?: number;
      readonly carries: "motor" | "supply";
    }
  | { readonly kind: "fuse"; readonly ratingA: number; readonly carries: "motor" | "supply" };

/** One mechanism. */
export interface Drive {
  readonly motor: MotorConstants;
  readonly motorCount: number;
  readonly stages: readonly Stage[];
  readonly load: Load;
  /** Friction torque at the output shaft that opposes motion, N·m. */
  readonly dragNm: number;
  readonly withinS?: number;
  readonly holdForS?: number;
  readonly everyS?: number;
  readonly motorCurrentLimitA?: number;
  /** Share of full command, 1 when not given. */
  readonly pwmDuty: number;
  readonly driver?: { readonly dropV: number; readonly resistanceOhm: number };
  /** Per motor, ohm. */
  readonly wiringOhm: number;
  /** Time from rest to full command, s. */
  readonly rampS: number;
  readonly protection?: Protection;
  /** Absent: an ideal supply at the motor's own voltage. */
  readonly supply?: Supply;
}

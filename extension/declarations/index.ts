/**
 * What robot code imports from "loadmark": the words that declare motors, stages, loads, supplies, mechanisms and robots.
 *
 * Each checks its arguments, throws one clear error, and returns frozen plain values.
 */
export { between } from "./between.js";
export { DeclarationError } from "./definition.js";
export { type Arm, type ArmInput, arm } from "./loads/arm.js";
export type { ForceCurve, InertiaCurve, TorqueCurve } from "./loads/curvePoints.js";
export { type Flywheel, type FlywheelInput, flywheel } from "./loads/flywheel.js";
export { type Lift, type LiftInput, lift } from "./loads/lift.js";
export type { Load } from "./loads/load.js";
export { type LoadCurve, type LoadCurveInput, loadCurve } from "./loads/loadCurve.js";
export { type Roller, type RollerInput, roller } from "./loads/roller.js";
export { type Screw, type ScrewInput, screw } from "./loads/screw.js";
export { type Wheels, type WheelsInput, wheels } from "./loads/wheels.js";
export { type Mechanism, type MechanismInput, mechanism } from "./mechanism.js";
export { type Motor, type MotorByConstants, type MotorInput, type MotorSheet, type MotorThermal, motor } from "./motor.js";
export {
  type BreakerInput,
  breaker,
  type Carries,
  type FuseInput,
  fuse,
  type Protection,
  type PtcInput,
  ptc,
} from "./protection.js";
export type {
  Angle,
  Charge,
  Current,
  Energy,
  Force,
  Inertia,
  Length,
  Mass,
  Range,
  Resistance,
  Speed,
  Temperature,
  ThermalResistance,
  Time,
  Torque,
  TorqueConstant,
  Voltage,
} from "./quantities.js";
export { type LoadCycleStep, type Robot, type RobotInput, robot } from "./robot.js";
export {
  belt,
  chain,
  planetary,
  reduction,
  type Stage,
  type StageOptions,
  spur,
  type WormOptions,
  worm,
} from "./stages.js";
export { type Battery, type BatteryInput, battery } from "./supply.js";

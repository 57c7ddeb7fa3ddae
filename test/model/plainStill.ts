/** The plain equations of a mechanism that does not travel: held, turning at a steady speed, or without current. */
import type { Drive, Protection } from "../../extension/model/drive.js";
import { PLAIN } from "./plainEquations.js";

const G = 9.80665;

export type PlainDoing = "off" | "moving" | "holding" | "turning" | "open";

/** Holding still, turning at a speed, or without current. */
export function stillAt(
  drive: Drive,
  doing: PlainDoing,
  state: readonly number[],
  volts: number,
): { supplyA: number; rates: number[] } {
  const { motor, load, motorCount: count } = drive;
  const windingC = state[PLAIN.winding] as number;
  const housingC = state[PLAIN.housing] as number;
  const resistance = motor.resistanceOhm * (motor.thermal ? (1 + 0.00393 * (windingC - 20)) / (1 + 0.00393 * 5) : 1);
  const series = resistance + drive.wiringOhm + (drive.driver?.resistanceOhm ?? 0);
  const head = volts - (drive.driver?.dropV ?? 0);
  const ratio = drive.stages.reduce((product, stage) => product * stage.ratio, 1);
  const efficiency = drive.stages.reduce((product, stage) => product * stage.efficiency, 1);
  let current = 0;
  let speed = 0;
  let torque = 0;
  if (doing === "holding") {
    torque = holdingTorque(drive) / (ratio * count);
    current = torque / motor.torqueConstantNmPerA;
  } else if (doing === "turning" && load.kind === "flywheel") {
    speed = load.speedRadPerS * ratio;
    torque = (load.dragNm + drive.dragNm) / (efficiency * ratio * count);
    const share = motor.speedLossShare;
    current =
      torque / motor.torqueConstantNmPerA + motor.noLoadCurrentA * (1 - share + (share * speed) / motor.noLoadSpeedRadPerS);
  }
  const needed = current * series + motor.backEmfVPerRadPerS * speed;
  let duty = current === 0 ? 0 : needed / head;
  if (duty > drive.pwmDuty && speed === 0) {
    duty = drive.pwmDuty;
    current = (duty * head) / series;
  }
  const supplyA = count * duty * current;
  const rates = [0, 0, 0, 0, 0, current * current, volts * Math.max(supplyA, 0)];
  if (doing === "turning") rates[PLAIN.progress] = speed / ratio;
  if (motor.thermal) {
    const { windingToHousingKPerW: rwh, housingToAmbientKPerW: rha, windingTimeS, housingTimeS, ambientC = 25 } = motor.thermal;
    rates[PLAIN.winding] = (current * current * resistance - (windingC - housingC) / rwh) / (windingTimeS / rwh);
    rates[PLAIN.housing] =
      ((windingC - housingC) / rwh + (motor.backEmfVPerRadPerS * current - torque) * speed - (housingC - ambientC) / rha) /
      (housingTimeS / rha);
  }
  const { protection } = drive;
  if (protection) {
    rates[PLAIN.replica] = replicaRate(
      protection,
      protection.carries === "supply" ? supplyA : current,
      state[PLAIN.replica] as number,
    );
  }
  return { supplyA, rates };
}

/** Greatest torque of the load at rest, at the output shaft. */
function holdingTorque({ load }: Drive): number {
  if (load.kind === "lift" && typeof load.counterbalanceN === "number") {
    const force = load.massKg * G * Math.sin(load.slopeRad) - load.counterbalanceN;
    return Math.abs(force) * load.carriagePerRope * load.drumRadiusM;
  }
  if (load.kind === "arm") {
    const level = Math.min(load.fromRad, load.toRad) <= 0 && Math.max(load.fromRad, load.toRad) >= 0;
    const nearest = level ? 1 : Math.max(Math.abs(Math.cos(load.fromRad)), Math.abs(Math.cos(load.toRad)));
    return load.massKg * G * load.centreOfMassM * Math.sin(load.slopeRad) * nearest;
  }
  throw new Error("this check does not know how to hold such a load");
}

/** Of a breaker or PTC. */
export function replicaRate(protection: Protection, currentA: number, theta: number): number {
  if (protection.kind === "fuse") return 0;
  const { holdCurrentA, tripsAtA, tripsAfterS } = protection;
  const tau = tripsAfterS / Math.log(tripsAtA ** 2 / (tripsAtA ** 2 - holdCurrentA ** 2));
  return ((currentA / holdCurrentA) ** 2 - theta) / tau;
}

/**
 * The same physics written a second time, the slow way, to check the model against general solvers: no derivatives, roots found
 * by bisection, one formula after the other as the textbook has them. It shares no code with the model but the load's data.
 */
import type { Curve, Drive, Load } from "../../extension/model/drive.js";

const G = 9.80665;

/** Indices of the plain state. */
export const PLAIN = { progress: 0, speed: 1, winding: 2, housing: 3, replica: 4, squares: 5, energy: 6, size: 7 } as const;

export interface PlainInstant {
  readonly currentA: number;
  readonly supplyA: number;
  readonly supplyV: number;
  readonly rates: number[];
}

export function plainStart(drive: Drive): number[] {
  const ambient = drive.motor.thermal?.ambientC ?? 25;
  return [0, 0, ambient, ambient, 0, 0, 0];
}

/** Length of the travel at the output shaft, rad. */
export function plainSpan(load: Load): number {
  switch (load.kind) {
    case "lift":
      return load.travelM / (load.carriagePerRope * load.drumRadiusM);
    case "arm":
      return Math.abs(load.toRad - load.fromRad);
    case "wheels":
      return load.distanceM / load.radiusM;
    case "screw":
      return (load.travelM * 2 * Math.PI) / load.leadM;
    case "loadCurve":
      return (load.torqueNm.at(-1)?.[0] ?? 0) - (load.torqueNm[0]?.[0] ?? 0);
    default:
      return 0;
  }
}

export function plainInstant(drive: Drive, timeS: number, state: readonly number[]): PlainInstant {
  const { motor, motorCount: count } = drive;
  const [progress = 0, speed = 0, windingC = 25, housingC = 25, replica = 0] = state;
  const hot = motor.thermal ? windingC : 25;
  const resistance = (motor.resistanceOhm * (1 + 0.00393 * (hot - 20))) / (1 + 0.00393 * 5);
  const magnet = motor.magnet
    ? 1 + { ferrite: -0.002, neodymium: -0.0011, "samarium-cobalt": -0.0004 }[motor.magnet] * (hot - 25)
    : 1;
  const ke = motor.backEmfVPerRadPerS * magnet;
  const kt = motor.torqueConstantNmPerA * magnet;
  const ratio = drive.stages.reduce((product, stage) => product * stage.ratio, 1);
  const w = ratio * speed;
  const duty = drive.pwmDuty * (drive.rampS > 0 ? Math.min(timeS / drive.rampS, 1) : 1);
  const open = drive.supply?.openCircuitV ?? motor.voltageV;
  const inner = drive.supply?.resistanceOhm ?? 0;
  const leads = drive.wiringOhm + (drive.driver?.resistanceOhm ?? 0);
  const drop = drive.driver?.dropV ?? 0;
  const loss = motor.noLoadCurrentA * (1 - motor.speedLossShare + (motor.speedLossShare * w) / motor.noLoadSpeedRadPerS);

  // At full command the bus voltage solves V = V_oc − R·n·d·I(V), by bisection.
  const currentOn = (bus: number): number => (duty * (bus - drop) - ke * w) / (resistance + leads);
  const line = currentOn(root((bus) => bus - open + inner * count * duty * currentOn(bus), -10 * open, 10 * open));
  const limit = drive.motorCurrentLimitA ?? Number.POSITIVE_INFINITY;
  let current = Math.max(-limit, Math.min(limit, line));
  const torqueOf = (amperes: number): number => (amperes >= loss ? kt : Math.max(kt, ke)) * (amperes - loss);

  const load = plainLoad(drive, progress, speed);
  const rotor = count * motor.rotorInertiaKgM2 * ratio * ratio;
  let acceleration = accelerationOf(drive, load, rotor, count * ratio * torqueOf(current));
  if (load.grip) {
    const most = (load.grip.limit - load.grip.ground) / load.grip.mass;
    if (acceleration > most) {
      acceleration = most;
      const torque = root((guess) => accelerationOf(drive, load, rotor, count * ratio * guess) - most, -1e6, 1e6);
      current = torque / (torque >= 0 ? kt : Math.max(kt, ke)) + loss;
    }
  }
  // The stop at the start: nothing runs backwards.
  const stopped = progress <= 0 && speed <= 0 && acceleration < 0;
  if (stopped) acceleration = 0;
  const torque = torqueOf(current);

  let supplyA = count * duty * current;
  if (current !== line) {
    // Below full command: the smallest duty, and so the highest bus voltage, that brings the current.
    const needed = current * (resistance + leads) + ke * w;
    const misses = (share: number): number => share * (open - inner * count * share * current - drop) - needed;
    const top = inner * count * Math.abs(current) > 0 ? (open - drop) / (2 * inner * count * Math.abs(current)) : 1e3;
    supplyA = count * current * (needed >= 0 ? root(misses, 0, Math.min(top, 1e3)) : root(misses, -1e3, 0));
  }
  const supplyV = open - inner * supplyA;

  const rates = [speed, acceleration, 0, 0, 0, current * current, supplyV * Math.max(supplyA, 0)];
  if (motor.thermal) {
    const { windingToHousingKPerW: rwh, housingToAmbientKPerW: rha, windingTimeS, housingTimeS, ambientC = 25 } = motor.thermal;
    rates[PLAIN.winding] = (current * current * resistance - (windingC - housingC) / rwh) / (windingTimeS / rwh);
    rates[PLAIN.housing] =
      ((windingC - housingC) / rwh + (ke * current - torque) * w - (housingC - ambientC) / rha) / (housingTimeS / rha);
  }
  if (drive.protection && drive.protection.kind !== "fuse") {
    const { holdCurrentA, tripsAtA, tripsAfterS, carries } = drive.protection;
    const tau = tripsAfterS / Math.log(tripsAtA ** 2 / (tripsAtA ** 2 - holdCurrentA ** 2));
    rates[PLAIN.replica] = (((carries === "supply" ? supplyA : current) / holdCurrentA) ** 2 - replica) / tau;
  }
  return { currentA: current, supplyA, supplyV, rates };
}

interface PlainLoad {
  readonly torque: number;
  readonly inertia: number;
  /** ½·J′·ω² of an inertia that changes with position. */
  readonly turning: number;
  readonly grip?: { readonly limit: number; readonly ground: number; readonly mass: number };
}

/** Load torque against the travel, and inertia with the stages' at the output shaft. */
function plainLoad(drive: Drive, progress: number, speed: number): PlainLoad {
  const { load, dragNm } = drive;
  let stageInertia = 0;
  drive.stages.forEach((stage, i) => {
    const after = drive.stages.slice(i + 1).reduce((product, later) => product * later.ratio, 1);
    stageInertia += stage.inertiaKgM2 * after * after;
  });
  const still = { turning: 0 };
  switch (load.kind) {
    case "lift": {
      const lever = load.carriagePerRope * load.drumRadiusM;
      const help = at(load.counterbalanceN, progress);
      const force = load.massKg * G * Math.sin(load.slopeRad) + load.frictionForceN - help;
      return { ...still, torque: force * lever + dragNm, inertia: load.massKg * lever ** 2 + stageInertia };
    }
    case "arm": {
      const sign = Math.sign(load.toRad - load.fromRad);
      const angle = load.fromRad + sign * progress;
      const weight = load.massKg * G * load.centreOfMassM * Math.sin(load.slopeRad) * Math.cos(angle);
      return {
        ...still,
        torque: sign * (weight - at(load.counterbalanceNm, angle)) + dragNm,
        inertia: load.inertiaKgM2 + stageInertia,
      };
    }
    case "wheels": {
      const weight = load.massKg * G;
      const ground = weight * (Math.sin(load.slopeRad) + load.rolling * Math.cos(load.slopeRad)) * load.radiusM;
      const mass = load.massKg * load.radiusM ** 2;
      const limit = load.grip * weight * Math.cos(load.slopeRad) * load.drivenShare * load.radiusM;
      return {
        ...still,
        torque: ground + dragNm,
        inertia: mass + load.inertiaKgM2 + stageInertia,
        grip: { limit, ground, mass },
      };
    }
    case "flywheel":
      return { ...still, torque: load.dragNm + dragNm, inertia: load.inertiaKgM2 + stageInertia };
    case "roller":
      return { ...still, torque: load.torqueNm + dragNm, inertia: load.inertiaKgM2 + stageInertia };
    case "screw": {
      const { forceN: force, leadM: lead, meanDiameterM: diameter, friction, threadAngleRad, collar } = load;
      const rubbing = friction / Math.cos(threadAngleRad);
      const thread = load.efficiency
        ? (force * lead) / (2 * Math.PI * load.efficiency)
        : ((force * diameter) / 2) * ((lead + Math.PI * rubbing * diameter) / (Math.PI * diameter - rubbing * lead));
      const rest = collar && load.efficiency === undefined ? (force * collar.friction * collar.meanDiameterM) / 2 : 0;
      return { ...still, torque: thread + rest + dragNm, inertia: load.massKg * (lead / (2 * Math.PI)) ** 2 + stageInertia };
    }
    case "loadCurve": {
      const position = (load.torqueNm[0]?.[0] ?? 0) + progress;
      const inertia = at(load.inertiaKgM2, position);
      return {
        torque: at(load.torqueNm, position) + dragNm,
        inertia: inertia + stageInertia,
        turning: 0.5 * speed * speed * slopeAt(load.inertiaKgM2, position),
      };
    }
  }
}

/** Solves n·N·T = J_rotors·α + Φ(T_load + J·α) for α by bisection. */
function accelerationOf(drive: Drive, load: PlainLoad, rotor: number, driving: number): number {
  const efficiency = drive.stages.reduce((product, stage) => product * stage.efficiency, 1);
  const backs = drive.stages.map((stage) => stage.backwardEfficiency);
  const runsBack = backs.every((share) => share > 0);
  const back = backs.reduce((product, share) => product * share, 1);
  const through = (torque: number): number => (torque >= 0 ? torque / efficiency : (runsBack ? back : -Math.abs(back)) * torque);
  const asked = (rate: number): number =>
    runsBack
      ? through(load.torque + load.turning + load.inertia * rate)
      : through(load.torque) + (load.turning + load.inertia * rate) / efficiency;
  const size =
    (Math.abs(driving) + Math.abs(load.torque) / efficiency + 1) / (rotor + load.inertia * Math.min(runsBack ? back : 1, 1) || 1);
  return root((rate) => rotor * rate + asked(rate) - driving, -10 * size, 10 * size);
}

function at(quantity: number | Curve, position: number): number {
  if (typeof quantity === "number") return quantity;
  const next = quantity.findIndex(([x]) => x > position);
  if (next === 0) return quantity[0]?.[1] ?? 0;
  if (next < 0) return quantity.at(-1)?.[1] ?? 0;
  const [x0, y0] = quantity[next - 1] ?? [0, 0];
  const [x1, y1] = quantity[next] ?? [1, 0];
  return y0 + ((y1 - y0) * (position - x0)) / (x1 - x0);
}

function slopeAt(quantity: number | Curve, position: number): number {
  if (typeof quantity === "number") return 0;
  const next = quantity.findIndex(([x]) => x > position);
  const [x0, y0] = quantity[next - 1] ?? [0, 0];
  const [x1, y1] = quantity[next] ?? [1, 0];
  return next <= 0 ? 0 : (y1 - y0) / (x1 - x0);
}

/** Root of a function that changes sign once between two points. */
function root(value: (x: number) => number, low: number, high: number): number {
  let [from, to] = [low, high];
  const rising = value(to) > value(from);
  for (let i = 0; i < 200; i++) {
    const middle = (from + to) / 2;
    if (middle === from || middle === to) break;
    if (value(middle) > 0 === rising) to = middle;
    else from = middle;
  }
  return (from + to) / 2;
}

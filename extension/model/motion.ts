/**
 * The equations of motion of one mechanism that turns: current, torque and acceleration with their derivatives.
 *
 * No mode flags: the current is the least of what line, limit and grip give, and every formula changes where it meets the next,
 * so that the rates stay continuous. The winding's inductance is left out: that holds where L/R is a small part of the mechanical time
 * constant, as in geared motors with brushes (about 1 ms against 10 ms to seconds), and costs about L/R of the time; where the two are
 * alike only steady speeds hold (test/model/inductance.test.ts). Deliberately not here: standstill and motion without inertia (stillMotion.ts), heat and
 * protection (motionSystem.ts).
 */
import { BY_HEAT, BY_PROGRESS, BY_SPEED, BY_TIME, type Instant, setConditions, setGradient } from "./instant.js";
import type { Plant } from "./plant.js";
import { setSupply } from "./supplyCurrent.js";

/**
 * Fills `at` for a progress (rad from the start), an output speed along the travel (rad/s), a winding temperature and a time;
 * its derivatives only where asked for.
 */
export function moveAt(
  plant: Plant,
  timeS: number,
  progress: number,
  speed: number,
  windingC: number,
  at: Instant,
  derive: boolean,
): void {
  setConditions(plant, timeS, windingC, at);
  const { ratio } = plant.train;
  at.motorSpeed = ratio * speed;
  const onLine = setCurrent(plant, at, derive);
  setTorque(plant, at, derive);
  const slips = accelerate(plant, progress, speed, at, derive);
  at.startGap = at.speedRate;
  at.progressRate = speed;
  if (derive) {
    setGradient(at.motorSpeedBy, 0, ratio, 0, 0);
    setGradient(at.progressRateBy, 0, 1, 0, 0);
  }
  setSupply(plant, at, onLine && !slips, derive);
}

/** min(line, limit), both ways. True on the line. */
function setCurrent(plant: Plant, at: Instant, derive: boolean): boolean {
  const line = (at.command * at.headV - at.backEmf * at.motorSpeed) / at.seriesOhm;
  at.limitGap = plant.limitA - Math.abs(line);
  if (at.limitGap < 0) {
    at.currentA = Math.sign(line) * plant.limitA;
    at.currentBy.fill(0);
    return false;
  }
  at.currentA = line;
  if (derive) {
    setGradient(
      at.currentBy,
      0,
      (-at.backEmf * plant.train.ratio) / at.seriesOhm,
      (-at.backEmfByHeat * at.motorSpeed - line * at.resistanceByHeat) / at.seriesOhm,
      (at.commandByTime * at.headV - line * at.seriesByTime) / at.seriesOhm,
    );
  }
  return true;
}

/** T = k·(I − I_loss), k the larger constant where the shaft drives the motor. */
function setTorque(plant: Plant, at: Instant, derive: boolean): void {
  const useful = at.currentA - plant.breakawayA - plant.lossSlopeAsPerRad * at.motorSpeed;
  const driven = useful < -plant.fadedA;
  const constant = driven ? at.drivenConstant : at.torqueConstant;
  const constantByHeat = driven ? at.drivenConstantByHeat : at.torqueConstantByHeat;
  at.drivenGap = useful + plant.fadedA;
  at.torqueNm = constant * useful + (driven ? plant.fadedA * (constant - at.torqueConstant) : 0);
  if (!derive) return;
  const by = at.currentBy;
  setGradient(
    at.torqueBy,
    constant * (by[BY_PROGRESS] as number),
    constant * ((by[BY_SPEED] as number) - plant.lossSlopeAsPerRad * plant.train.ratio),
    constant * (by[BY_HEAT] as number) + constantByHeat * useful,
    constant * (by[BY_TIME] as number),
  );
}

/**
 * n·N·T = J_rotors·α + Φ(T_load + J·α + ½·J′·ω²), Φ(x) = x/η for x ≥ 0, else η_b·x; where the train does not run back, Φ is
 * judged on the static torque and inertia counts by 1/η. ½·J′·ω² is what a turning inertia that changes with position asks
 * (Lagrange's equation, any textbook of mechanisms). A load that only fades to nothing, as on a level turntable, stays on the driving
 * side, so that no rounding makes it cross: Φ bends not at 0 but a hair below, and so does the motor's T. Wheels: no more than the ground takes; then torque and current follow from
 * the acceleration. True where they slip.
 */
function accelerate(plant: Plant, progress: number, speed: number, at: Instant, derive: boolean): boolean {
  const { load, direction, train } = plant;
  const position = load.startRad + direction * progress;
  const opposing = load.opposing(position, direction);
  const inertia = load.inertia(position) + train.inertiaKgM2;
  const inertiaSlope = direction * load.inertiaSlope(position);
  const centrifugal = 0.5 * inertiaSlope * speed * speed;
  const drive = plant.count * train.ratio;

  const forward = 1 / train.efficiency;
  let torqueShare = forward;
  let inertiaShare = forward;
  let slack = 0;
  at.trainGap = opposing;
  if (!train.runsBack) {
    if (opposing < 0) torqueShare = train.backwardEfficiency;
  } else {
    const asDriving = (drive * at.torqueNm - forward * (opposing + centrifugal)) / (plant.rotorKgM2 + forward * inertia);
    at.trainGap = opposing + centrifugal + inertia * asDriving + plant.fadedNm;
    if (at.trainGap < 0) {
      torqueShare = train.backwardEfficiency;
      inertiaShare = train.backwardEfficiency;
      slack = plant.fadedNm * (forward - train.backwardEfficiency);
    }
  }
  const total = plant.rotorKgM2 + inertiaShare * inertia;
  const rate = (drive * at.torqueNm - torqueShare * opposing - inertiaShare * centrifugal + slack) / total;
  at.speedRate = rate;
  if (derive) {
    const by = at.torqueBy;
    setGradient(
      at.speedRateBy,
      (drive * (by[BY_PROGRESS] as number) - torqueShare * load.slope(position) - inertiaShare * inertiaSlope * rate) / total,
      (drive * (by[BY_SPEED] as number) - inertiaShare * inertiaSlope * speed) / total,
      (drive * (by[BY_HEAT] as number)) / total,
      (drive * (by[BY_TIME] as number)) / total,
    );
  }
  return load.traction !== undefined && gripping(plant, load.traction, opposing, at);
}

function gripping(plant: Plant, traction: NonNullable<Plant["load"]["traction"]>, opposing: number, at: Instant): boolean {
  const most = (traction.limitNm - (opposing - traction.besideGroundNm)) / traction.groundInertiaKgM2;
  at.gripGap = most - at.speedRate;
  if (at.gripGap >= 0) return false;
  const { train } = plant;
  const inertia = plant.load.inertia(0) + train.inertiaKgM2;
  const asked = opposing + inertia * most;
  const share = asked >= 0 ? 1 / train.efficiency : train.backwardEfficiency;
  at.speedRate = most;
  at.speedRateBy.fill(0);
  at.torqueNm = (plant.rotorKgM2 * most + share * asked) / (plant.count * train.ratio);
  at.torqueBy.fill(0);
  const constant = at.torqueNm < 0 ? at.drivenConstant : at.torqueConstant;
  const constantByHeat = at.torqueNm < 0 ? at.drivenConstantByHeat : at.torqueConstantByHeat;
  at.currentA = at.torqueNm / constant + plant.breakawayA + plant.lossSlopeAsPerRad * at.motorSpeed;
  setGradient(at.currentBy, 0, plant.lossSlopeAsPerRad * train.ratio, (-at.torqueNm * constantByHeat) / (constant * constant), 0);
  return true;
}

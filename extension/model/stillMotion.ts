/**
 * Motion without acceleration: blocked, held, and so light that its speed follows the torque at once.
 *
 * Deliberately not here: motion with inertia (motion.ts).
 */
import { BY_HEAT, BY_PROGRESS, type Instant, setConditions, setGradient } from "./instant.js";
import type { Plant } from "./plant.js";
import { throughTrain } from "./stages.js";
import { setSupply } from "./supplyCurrent.js";

/** Full command (or what the ramp allows) with the shaft blocked: min(line, limit). */
export function blockedAt(plant: Plant, timeS: number, windingC: number, at: Instant): void {
  setConditions(plant, timeS, windingC, at);
  stop(at);
  const line = (at.command * at.headV) / at.seriesOhm;
  at.limitGap = plant.limitA - line;
  const onLine = at.limitGap >= 0;
  at.currentA = onLine ? line : plant.limitA;
  if (onLine) {
    const byTime = (at.commandByTime * at.headV - line * at.seriesByTime) / at.seriesOhm;
    setGradient(at.currentBy, 0, 0, (-line * at.resistanceByHeat) / at.seriesOhm, byTime);
  } else {
    at.currentBy.fill(0);
  }
  at.torqueNm = at.torqueConstant * Math.max(at.currentA - plant.breakawayA, 0);
  setSupply(plant, at, onLine, true);
}

/** A controller that keeps a torque at one motor's shaft at a speed; at standstill I = T/k_t without loss current. */
export function heldAt(plant: Plant, torqueNm: number, motorSpeedRadPerS: number, windingC: number, at: Instant): void {
  setConditions(plant, plant.rampS, windingC, at);
  stop(at);
  const loss = motorSpeedRadPerS > 0 ? plant.breakawayA + plant.lossSlopeAsPerRad * motorSpeedRadPerS : 0;
  const torqueCurrent = torqueNm / at.torqueConstant;
  at.motorSpeed = motorSpeedRadPerS;
  at.torqueNm = torqueNm;
  at.currentA = torqueCurrent + loss;
  setGradient(at.currentBy, 0, 0, (-torqueCurrent * at.torqueConstantByHeat) / at.torqueConstant, 0);
  setSupply(plant, at, false, true);
}

function stop(at: Instant): void {
  at.progressRate = 0;
  at.progressRateBy.fill(0);
  at.speedRate = 0;
  at.speedRateBy.fill(0);
  at.motorSpeed = 0;
  at.motorSpeedBy.fill(0);
  at.torqueBy.fill(0);
}

/** As a share of the limit. */
const BEYOND_LIMIT = 0.5;

/** No inertia: the speed at which min(line, limit, grip) brings the load's torque; 0 where it does not. */
export function followAt(plant: Plant, timeS: number, progress: number, windingC: number, at: Instant): void {
  setConditions(plant, timeS, windingC, at);
  const { load, direction, train } = plant;
  const position = load.startRad + direction * progress;
  const opposing = load.opposing(position, direction);
  const perMotor = plant.count * train.ratio;
  const share = opposing >= 0 ? 1 / train.efficiency : train.backwardEfficiency;
  const torque = throughTrain(train, opposing) / perMotor;
  const torqueByProgress = (share * load.slope(position)) / perMotor;
  at.trainGap = opposing;
  at.drivenGap = torque;
  at.gripGap = load.traction ? load.traction.limitNm - (opposing - load.traction.besideGroundNm) : 1;

  const driven = torque < 0;
  const constant = driven ? at.drivenConstant : at.torqueConstant;
  const constantByHeat = driven ? at.drivenConstantByHeat : at.torqueConstantByHeat;
  const asked = torque / constant + plant.breakawayA;
  const askedByHeat = (-torque * constantByHeat) / (constant * constant);
  const stiffness = at.backEmf + at.seriesOhm * plant.lossSlopeAsPerRad;
  const lineSpeed = (at.command * at.headV - at.seriesOhm * asked) / stiffness;
  const lineCurrent = asked + plant.lossSlopeAsPerRad * lineSpeed;
  at.limitGap = plant.limitA - lineCurrent;
  // A loss that grows with speed lets it slow down at the limit; without one it stops there at once. The line is then followed a little
  // beyond, so that a step across shows where that is.
  const fades = plant.lossSlopeAsPerRad > 0;
  const onLine = at.limitGap >= 0 || !fades;
  const speed = onLine ? lineSpeed : (plant.limitA - asked) / plant.lossSlopeAsPerRad;
  const moves = fades || at.limitGap >= -BEYOND_LIMIT * plant.limitA;
  at.startGap = at.gripGap < 0 ? -1 : fades ? speed : Math.min(speed, (at.limitGap * at.seriesOhm) / stiffness);
  if (!(speed > 0) || at.gripGap < 0 || !moves) {
    blockedAt(plant, timeS, windingC, at);
    return;
  }
  at.motorSpeed = speed;
  at.torqueNm = torque;
  setGradient(at.torqueBy, torqueByProgress, 0, 0, 0);
  const askedByProgress = torqueByProgress / constant;
  if (onLine) {
    const stiffnessByHeat = at.backEmfByHeat + at.resistanceByHeat * plant.lossSlopeAsPerRad;
    const stiffnessByTime = at.seriesByTime * plant.lossSlopeAsPerRad;
    setGradient(
      at.motorSpeedBy,
      (-at.seriesOhm * askedByProgress) / stiffness,
      0,
      (-at.resistanceByHeat * asked - at.seriesOhm * askedByHeat - speed * stiffnessByHeat) / stiffness,
      (at.commandByTime * at.headV - at.seriesByTime * asked - speed * stiffnessByTime) / stiffness,
    );
  } else {
    setGradient(at.motorSpeedBy, -askedByProgress / plant.lossSlopeAsPerRad, 0, -askedByHeat / plant.lossSlopeAsPerRad, 0);
  }
  at.currentA = onLine ? lineCurrent : plant.limitA;
  for (let q = 0; q < 4; q++) at.currentBy[q] = onLine ? plant.lossSlopeAsPerRad * (at.motorSpeedBy[q] as number) : 0;
  if (onLine) {
    (at.currentBy[BY_PROGRESS] as number) += askedByProgress;
    (at.currentBy[BY_HEAT] as number) += askedByHeat;
  }
  at.progressRate = speed / train.ratio;
  for (let q = 0; q < 4; q++) at.progressRateBy[q] = (at.motorSpeedBy[q] as number) / train.ratio;
  at.speedRate = 0;
  at.speedRateBy.fill(0);
  setSupply(plant, at, onLine, true);
}

/** From a declared robot to what the model is told of it, and in what words what was left out or taken for granted is told. */
import type { Mechanism } from "../declarations/mechanism.js";
import type { Robot } from "../declarations/robot.js";
import type { RobotDrive } from "../model/robotDrive.js";
import { isImpossible } from "../rules/sheetContradicts.js";

export interface RobotModel {
  readonly drive: RobotDrive;
  /** By index in `drive.mechanisms`. */
  readonly mechanisms: readonly Mechanism[];
}

/** null where nothing can be run; `notChecked` says why, and what else is left out. */
export function robotDriveOf(robot: Robot): { readonly model: RobotModel | null; readonly notChecked: readonly string[] } {
  const { supply, loadCycle = [], shared = [] } = robot;
  const listed = [...new Set(robot.mechanisms)];
  if (loadCycle.length === 0) return { model: null, notChecked: ["The load cycle: none is declared."] };
  const impossible = listed.find(({ motor }) => isImpossible(motor));
  if (impossible)
    return { model: null, notChecked: [`The load cycle: the sheet of the motor of "${impossible.name}" contradicts itself.`] };
  const elsewhere = listed.filter((mechanism) => mechanism.supply !== undefined && mechanism.supply !== supply);
  const mechanisms = listed.filter((mechanism) => !elsewhere.includes(mechanism));
  const indices = (some: readonly Mechanism[] = []): number[] =>
    [...new Set(some)].map((one) => mechanisms.indexOf(one)).filter((index) => index >= 0);
  const drive: RobotDrive = {
    supply: supply.si,
    mechanisms: mechanisms.map(({ si }) => si),
    steps: loadCycle.map(({ moving, holding }, i) => ({
      lastsS: robot.si.stepsS[i] ?? 0,
      moving: indices(moving),
      holding: indices(holding),
    })),
    shared: shared.map(({ protect, feeds }) => ({ protection: protect.si, feeds: indices(feeds) })),
    cycles: robot.si.cycles,
    ambientC: robot.si.ambientC,
  };
  return { model: { drive, mechanisms }, notChecked: tellNotChecked(robot, elsewhere) };
}

function tellNotChecked({ supply }: Robot, elsewhere: readonly Mechanism[]): string[] {
  const told = elsewhere.map(({ name }) => `"${name}" in the load cycle: it runs on a supply of its own.`);
  if (supply.si.mustStayAbove === undefined) told.push('Sags in the load cycle: the battery declares no "mustStayAbove".');
  if (supply.si.capacityAh === undefined) told.push("How long the battery lasts: it declares no capacity.");
  return told;
}

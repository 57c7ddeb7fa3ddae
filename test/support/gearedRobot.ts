/** A robot in three files whose constants are hovered, and the table's rows as the hand works them out. */
import { type HandPoint, liftTorque, MOTOR, perCent, three } from "./handNumbers.js";
import { checkHover, type HoverShown } from "./hover.js";

/** The hover with the table's columns about standing torque. */
export function checkStatic(source: string, about: string): HoverShown {
  const shown = checkHover(source, about);
  return { ...shown, rows: shown.rows.map((cells) => cells.slice(0, 5)) };
}

/** Files of a robot whose hoist has a spur stage of PINION to WHEEL. */
export function gearedRobot(marks: { gearing?: string; hoist?: string; load?: string }): string {
  return `//- motors.ts
import { motor } from "loadmark";
export const slow = ${MOTOR};
//- gearing.ts
${marks.gearing ?? "export const PINION = 20;\nexport const WHEEL = 80;"}
//- hoist.ts
${
  marks.hoist ??
  `import { lift, mechanism, spur } from "loadmark";
import { PINION, WHEEL } from "./gearing.js";
import { slow } from "./motors.js";
export const hoist = mechanism("hoist", {
  motor: slow,
  stages: [spur(PINION, WHEEL)],
  load: ${marks.load ?? 'lift({ mass: "10 kg", drumRadius: "50 mm", travel: "0.8 m" })'},
});`
}
`;
}

/** The hoist's load at its drum, N·m. */
export const OUTPUT_NM = liftTorque(10, 0.05);

/** One row, up to the share of stall. */
export function row(label: string, outputNm: number, hand: HandPoint): string[] {
  const stalls = hand.share >= 1;
  return [
    label,
    `${three(outputNm)} N·m of ${three(hand.outputStallNm)} N·m`,
    stalls ? "stalled" : `${three(hand.outputRpm)} rpm`,
    `${three(hand.currentA)} A`,
    perCent(hand.share),
  ];
}

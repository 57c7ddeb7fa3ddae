/** Every word of the declarations, for the evaluator. */
import { betweenDefinition } from "./between.js";
import type { Definition } from "./definition.js";
import { armDefinition } from "./loads/arm.js";
import { flywheelDefinition } from "./loads/flywheel.js";
import { liftDefinition } from "./loads/lift.js";
import { loadCurveDefinition } from "./loads/loadCurve.js";
import { rollerDefinition } from "./loads/roller.js";
import { screwDefinition } from "./loads/screw.js";
import { wheelsDefinition } from "./loads/wheels.js";
import { mechanismDefinition } from "./mechanism.js";
import { motorDefinition } from "./motor.js";
import { breakerDefinition, fuseDefinition, ptcDefinition } from "./protection.js";
import { robotDefinition } from "./robot.js";
import {
  beltDefinition,
  chainDefinition,
  planetaryDefinition,
  reductionDefinition,
  spurDefinition,
  wormDefinition,
} from "./stages.js";
import { batteryDefinition } from "./supply.js";

/** The module that robot code imports. */
export const SPECIFIER = "loadmark";

export const DEFINITIONS: ReadonlyMap<string, Pick<Definition, "name" | "check">> = new Map(
  [
    motorDefinition,
    spurDefinition,
    chainDefinition,
    beltDefinition,
    planetaryDefinition,
    wormDefinition,
    reductionDefinition,
    liftDefinition,
    armDefinition,
    wheelsDefinition,
    flywheelDefinition,
    screwDefinition,
    rollerDefinition,
    loadCurveDefinition,
    breakerDefinition,
    fuseDefinition,
    ptcDefinition,
    batteryDefinition,
    mechanismDefinition,
    robotDefinition,
    betweenDefinition,
  ].map((definition) => [definition.name, definition]),
);

/** Names of the arguments that stand in a row, for telling where a value is; words that take one object are not listed. */
export const ARGUMENT_NAMES: ReadonlyMap<string, readonly string[]> = new Map<string, readonly string[]>([
  ...["spur", "chain", "belt"].map((word) => [word, ["driver", "driven"]] as const),
  ["planetary", ["sun", "ring"]],
  ["worm", ["starts", "wheelTeeth"]],
  ["reduction", ["ratio"]],
]);

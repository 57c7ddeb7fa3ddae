/** Any load. */
import type { Arm } from "./arm.js";
import type { Flywheel } from "./flywheel.js";
import type { Lift } from "./lift.js";
import type { LoadCurve } from "./loadCurve.js";
import type { Roller } from "./roller.js";
import type { Screw } from "./screw.js";
import type { Wheels } from "./wheels.js";

export type Load = Lift | Arm | Wheels | Flywheel | Screw | Roller | LoadCurve;

export const LOAD_KINDS: readonly Load["kind"][] = ["lift", "arm", "wheels", "flywheel", "screw", "roller", "loadCurve"];

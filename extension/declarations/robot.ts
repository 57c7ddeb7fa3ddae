/** `robot(…)`: mechanisms on one supply, and how a run of the robot moves them. */
import * as v from "valibot";
import { define } from "./define.js";
import type { Definition } from "./definition.js";
import { builtBy, count, fields, name, POSITIVE, quantity, together } from "./fields.js";
import type { Mechanism } from "./mechanism.js";
import { PROTECTION_KINDS, type Protection } from "./protection.js";
import type { Range, Temperature, Time } from "./quantities.js";
import { read, readOr } from "./read.js";
import type { Battery } from "./supply.js";

export interface LoadCycleStep {
  readonly lasts: Time | Range<Time>;
  /** Each restarts its travel with the step, and holds when done. */
  readonly moving?: readonly Mechanism[];
  /** Each holds its load for the whole step. */
  readonly holding?: readonly Mechanism[];
}

export interface RobotInput {
  readonly supply: Battery;
  readonly mechanisms: readonly Mechanism[];
  /** Protection that several mechanisms' supply current goes through. */
  readonly shared?: readonly { readonly protect: Protection; readonly feeds: readonly Mechanism[] }[];
  readonly loadCycle?: readonly LoadCycleStep[];
  /** How often the load cycle runs; left out: once. */
  readonly cycles?: number;
  readonly ambient?: Temperature | Range<Temperature>;
}

export interface Robot extends RobotInput {
  readonly kind: "robot";
  readonly name: string;
  readonly si: { readonly cycles: number; readonly stepsS: readonly number[]; readonly ambientC: number };
}

const mechanisms = v.array(builtBy<Mechanism>(["mechanism"], "a mechanism(…)"), "here goes a list of mechanisms");

const input: v.GenericSchema<unknown, RobotInput> = together(
  fields({
    supply: builtBy<Battery>(["battery"], "a battery(…)"),
    mechanisms,
    shared: v.optional(
      v.array(
        fields({ protect: builtBy<Protection>(PROTECTION_KINDS, "a breaker(…), fuse(…) or ptc(…)"), feeds: mechanisms }),
        "here goes a list",
      ),
    ),
    loadCycle: v.optional(
      v.array(
        fields({ lasts: quantity<Time>("time", POSITIVE), moving: v.optional(mechanisms), holding: v.optional(mechanisms) }),
        "here goes a list of steps",
      ),
    ),
    cycles: v.optional(count("the number of cycles")),
    ambient: v.optional(quantity<Temperature>("temperature", POSITIVE)),
  }),
  ({ mechanisms: listed, loadCycle = [], shared = [] }) => {
    const strangerOf = (used: readonly Mechanism[]) => used.find((one) => !listed.includes(one));
    const inCycle = strangerOf(loadCycle.flatMap((step) => [...(step.moving ?? []), ...(step.holding ?? [])]));
    if (inCycle) return { field: "loadCycle", message: `the load cycle moves "${inCycle.name}", which the robot does not list` };
    const inShared = strangerOf(shared.flatMap((one) => one.feeds));
    return inShared && { field: "shared", message: `shared protection feeds "${inShared.name}", which the robot does not list` };
  },
);

export const robotDefinition: Definition<[string, RobotInput], Robot> = define(
  "robot",
  v.strictTuple([name, input], "robot takes a name and one object"),
  (label, given) => ({
    ...given,
    kind: "robot",
    name: label,
    si: {
      cycles: given.cycles ?? 1,
      stepsS: (given.loadCycle ?? []).map((step) => read(step.lasts)),
      ambientC: given.ambient === undefined ? 25 : readOr(given.ambient, 0) - 273.15,
    },
  }),
);

/** The whole robot on one supply. */
export function robot(name: string, input: RobotInput): Robot {
  return robotDefinition.build(name, input);
}

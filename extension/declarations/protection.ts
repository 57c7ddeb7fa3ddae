/** `breaker`, `fuse`, `ptc`: what opens a circuit before wires and windings suffer. */
import * as v from "valibot";
import type { Protection as ProtectionNumbers } from "../model/drive.js";
import { define } from "./define.js";
import type { Definition } from "./definition.js";
import { fields, type Limits, POSITIVE, quantity, together, word } from "./fields.js";
import type { Current, Range, Time } from "./quantities.js";
import { present, read, readOr } from "./read.js";

/** Whose current goes through: one motor's (a protector at each motor), or the supply current of all of them. */
export type Carries = "motor" | "supply";

export interface PtcInput {
  /** The current that it carries for ever. */
  readonly holdCurrent: Current | Range<Current>;
  /** One point of its curve: opens at this current after this time, from cold. */
  readonly trips: { readonly at: Current | Range<Current>; readonly after: Time | Range<Time> };
  readonly carries?: Carries;
}

export interface BreakerInput extends PtcInput {
  /** Time open before it closes by itself; left out: stays open. */
  readonly resets?: Time | Range<Time>;
}

export interface FuseInput {
  readonly rating: Current | Range<Current>;
  readonly carries?: Carries;
}

export type Protection =
  | (BreakerInput & { readonly kind: "breaker"; readonly si: ProtectionNumbers })
  | (PtcInput & { readonly kind: "ptc"; readonly si: ProtectionNumbers })
  | (FuseInput & { readonly kind: "fuse"; readonly si: ProtectionNumbers });

export const PROTECTION_KINDS: readonly Protection["kind"][] = ["breaker", "fuse", "ptc"];

const RESET: Limits = { min: 0.1, say: '"0.1 s" or more' };

const thermal = {
  holdCurrent: quantity<Current>("current", POSITIVE),
  trips: fields({ at: quantity<Current>("current", POSITIVE), after: quantity<Time>("time", POSITIVE) }),
  carries: v.optional(word("motor", "supply")),
};
const breakerInput: v.GenericSchema<unknown, BreakerInput> = together(
  fields({ ...thermal, resets: v.optional(quantity<Time>("time", RESET)) }),
  refuseTripBelowHold,
);
const ptcInput: v.GenericSchema<unknown, PtcInput> = together(fields(thermal), refuseTripBelowHold);
const fuseInput: v.GenericSchema<unknown, FuseInput> = fields({
  rating: quantity<Current>("current", POSITIVE),
  carries: v.optional(word("motor", "supply")),
});

export const breakerDefinition: Definition<[BreakerInput], Protection> = define(
  "breaker",
  v.strictTuple([breakerInput], "breaker takes one object"),
  (given) => ({
    ...given,
    kind: "breaker",
    si: { kind: "breaker", ...thermalNumbers(given), ...present({ resetsS: readOr(given.resets, undefined) }) },
  }),
);

export const ptcDefinition: Definition<[PtcInput], Protection> = define(
  "ptc",
  v.strictTuple([ptcInput], "ptc takes one object"),
  (given) => ({
    ...given,
    kind: "ptc",
    si: { kind: "ptc", ...thermalNumbers(given) },
  }),
);

export const fuseDefinition: Definition<[FuseInput], Protection> = define(
  "fuse",
  v.strictTuple([fuseInput], "fuse takes one object"),
  (given) => ({
    ...given,
    kind: "fuse",
    si: { kind: "fuse", ratingA: read(given.rating), carries: given.carries ?? "motor" },
  }),
);

/** A thermal circuit breaker. */
export function breaker(input: BreakerInput): Protection {
  return breakerDefinition.build(input);
}

/** A resettable polymer or ceramic protector. */
export function ptc(input: PtcInput): Protection {
  return ptcDefinition.build(input);
}

/** A blade fuse. */
export function fuse(input: FuseInput): Protection {
  return fuseDefinition.build(input);
}

function thermalNumbers(given: PtcInput) {
  return {
    holdCurrentA: read(given.holdCurrent),
    tripsAtA: read(given.trips.at),
    tripsAfterS: read(given.trips.after),
    carries: given.carries ?? "motor",
  };
}

function refuseTripBelowHold({ holdCurrent, trips }: PtcInput) {
  if (read(trips.at) > read(holdCurrent)) return undefined;
  return {
    field: "trips",
    message: `trips at ${tellCurrent(trips.at)}, which is not above the ${tellCurrent(holdCurrent)} that it holds`,
  };
}

function tellCurrent(current: Current | Range<Current>): string {
  return typeof current === "string" ? `"${current}"` : `"${current.low}" to "${current.high}"`;
}

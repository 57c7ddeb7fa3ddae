/**
 * The stages between motor and load: `spur`, `chain`, `belt`, `planetary`, `worm`, `reduction`.
 *
 * A stage that is given no efficiency gets the customary one of its kind, marked as assumed.
 */
import * as v from "valibot";
import type { Stage as StageNumbers } from "../model/drive.js";
import { ASSUMED_EFFICIENCY, backwardEfficiency, wormStage } from "../model/stages.js";
import { define } from "./define.js";
import type { Definition } from "./definition.js";
import { count, fields, NOT_NEGATIVE, number, POSITIVE, POSITIVE_SHARE, quantity } from "./fields.js";
import type { Angle, Inertia, Range, Torque } from "./quantities.js";
import { present, read, readOr } from "./read.js";

export interface StageOptions {
  /** Share of the power that comes through; left out: the customary value of this kind of stage. */
  readonly efficiency?: number | Range<number>;
  /** Inertia at the stage's driven shaft. */
  readonly inertia?: Inertia | Range<Inertia>;
  /** Greatest torque that the driven side bears. */
  readonly maxTorque?: Torque | Range<Torque>;
}

export interface WormOptions extends StageOptions {
  readonly leadAngle: Angle | Range<Angle>;
  /** Coefficient of friction in the mesh; left out: 0.05. */
  readonly friction?: number | Range<number>;
  /** Left out: 20 degrees. */
  readonly pressureAngle?: Angle | Range<Angle>;
}

export interface Stage {
  readonly kind: "spur" | "chain" | "belt" | "planetary" | "worm" | "reduction";
  /** Input turns per output turn. */
  readonly ratio: number;
  /** What the stage was made of: tooth counts in the order of the call, or the plain ratio. */
  readonly given: readonly (number | Range<number>)[];
  /** True where the efficiency is the customary one. */
  readonly efficiencyAssumed: boolean;
  readonly options: StageOptions;
  readonly si: StageNumbers;
}

const common = {
  efficiency: v.optional(number(POSITIVE_SHARE)),
  inertia: v.optional(quantity<Inertia>("inertia", NOT_NEGATIVE)),
  maxTorque: v.optional(quantity<Torque>("torque", POSITIVE)),
};
const options = v.optional(fields(common));
const wormOptions = fields({
  ...common,
  leadAngle: quantity<Angle>("angle", { above: 0, max: (85 * Math.PI) / 180, say: "more than 0 and at most 85 deg" }),
  friction: v.optional(number({ min: 0, max: 1, say: "from 0 to 1" })),
  pressureAngle: v.optional(quantity<Angle>("angle", { min: 0, max: Math.PI / 4, say: "from 0 to 45 deg" })),
});

export const spurDefinition = pairDefinition("spur", "the driver's teeth", "the driven gear's teeth");
export const chainDefinition = pairDefinition("chain", "the driver's teeth", "the driven sprocket's teeth");
export const beltDefinition = pairDefinition("belt", "the driver's teeth", "the driven pulley's teeth");

export const planetaryDefinition: Definition<[number, number, StageOptions?], Stage> = define(
  "planetary",
  v.pipe(
    v.strictTuple([count("the sun's teeth"), count("the ring's teeth"), options], "planetary takes sun, ring and options"),
    v.rawCheck(({ dataset, addIssue }) => {
      if (!dataset.typed) return;
      const [sun, ring] = dataset.value;
      // The smallest planet has one tooth: ring = sun + 2 planets.
      if (ring >= sun + 2) return;
      const message = `a ring of ${ring} teeth does not go around a sun of ${sun}`;
      addIssue({ message, path: [{ type: "array", origin: "value", input: dataset.value, key: 1, value: ring }] });
    }),
  ),
  // Ring fixed, carrier driven: 1 + ring / sun.
  (sun, ring, given) => simpleStage("planetary", 1 + ring / sun, [sun, ring], given),
);

export const reductionDefinition: Definition<[number | Range<number>, StageOptions?], Stage> = define(
  "reduction",
  v.strictTuple([number(POSITIVE), options], "reduction takes a ratio and options"),
  (ratio, given) => simpleStage("reduction", read(ratio), [ratio], given),
);

export const wormDefinition: Definition<[number, number, WormOptions], Stage> = define(
  "worm",
  v.strictTuple(
    [count("the worm's starts"), count("the wheel's teeth"), wormOptions],
    "worm takes starts, wheel teeth and an object with leadAngle",
  ),
  (starts, wheelTeeth, given) => ({
    kind: "worm",
    ratio: wheelTeeth / starts,
    given: [starts, wheelTeeth],
    efficiencyAssumed: given.efficiency === undefined && given.friction === undefined,
    options: given,
    si: wormStage({
      ratio: wheelTeeth / starts,
      leadAngleRad: read(given.leadAngle),
      friction: readOr(given.friction, 0.05),
      pressureAngleRad: readOr(given.pressureAngle, Math.PI / 9),
      ...present({ efficiency: readOr(given.efficiency, undefined), maxTorqueNm: readOr(given.maxTorque, undefined) }),
      inertiaKgM2: readOr(given.inertia, 0),
    }),
  }),
);

/** A pair of spur gears. */
export function spur(driver: number, driven: number, options?: StageOptions): Stage {
  return spurDefinition.build(driver, driven, options);
}

/** A roller chain over two sprockets. */
export function chain(driver: number, driven: number, options?: StageOptions): Stage {
  return chainDefinition.build(driver, driven, options);
}

/** A toothed belt over two pulleys. */
export function belt(driver: number, driven: number, options?: StageOptions): Stage {
  return beltDefinition.build(driver, driven, options);
}

/** A planetary stage with its ring fixed: sun drives, carrier is driven. */
export function planetary(sun: number, ring: number, options?: StageOptions): Stage {
  return planetaryDefinition.build(sun, ring, options);
}

/** A worm and its wheel. */
export function worm(starts: number, wheelTeeth: number, options: WormOptions): Stage {
  return wormDefinition.build(starts, wheelTeeth, options);
}

/** Any reduction known only by its ratio: input turns per output turn. */
export function reduction(ratio: number | Range<number>, options?: StageOptions): Stage {
  return reductionDefinition.build(ratio, options);
}

function pairDefinition(
  kind: "spur" | "chain" | "belt",
  driver: string,
  driven: string,
): Definition<[number, number, StageOptions?], Stage> {
  return define(
    kind,
    v.strictTuple([count(driver), count(driven), options], `${kind} takes driver, driven and options`),
    (from, to, given) => simpleStage(kind, to / from, [from, to], given),
  );
}

function simpleStage(
  kind: Exclude<Stage["kind"], "worm">,
  ratio: number,
  teeth: Stage["given"],
  given: StageOptions = {},
): Stage {
  const efficiency = readOr(given.efficiency, ASSUMED_EFFICIENCY[kind]);
  return {
    kind,
    ratio,
    given: teeth,
    efficiencyAssumed: given.efficiency === undefined,
    options: given,
    si: {
      kind,
      ratio,
      efficiency,
      backwardEfficiency: backwardEfficiency(efficiency),
      nearSelfLocking: false,
      inertiaKgM2: readOr(given.inertia, 0),
      ...present({ maxTorqueNm: readOr(given.maxTorque, undefined) }),
    },
  };
}

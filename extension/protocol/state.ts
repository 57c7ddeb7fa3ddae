/**
 * Server to client: what is declared and how it stands, after each analysis that changed it.
 *
 * Each message is told by the state before: what stayed the same is named by its place there. The first of a server names nothing, and so
 * is whole by itself, whatever the client had.
 */
import * as v from "valibot";
import { placeSchema } from "./place.js";

export const STATE = "loadmark/state";

/** The worst that was found: `unknown` where a value is missing that the physics needs. */
const standingSchema = v.picklist(["error", "warning", "fine", "unknown"]);

const mechanismSchema = v.object({
  /** As declared: what commands about it take. */
  name: v.string(),
  /** What is shown; names in it are harmless text. */
  label: v.string(),
  description: v.string(),
  tooltip: v.string(),
  standing: standingSchema,
  place: placeSchema,
});

/** `null` where nothing is declared. */
const statusSchema = v.nullable(v.object({ text: v.string(), tooltip: v.string(), standing: standingSchema }));

const count = v.pipe(v.number(), v.integer(), v.minValue(0));

/** So many of the list before, from there on. */
const keptSchema = v.object({ from: count, kept: v.pipe(count, v.minValue(1)) });

const changedRobotSchema = v.object({
  ...mechanismSchema.entries,
  mechanisms: v.array(v.union([keptSchema, mechanismSchema])),
  /** The robot before whose mechanisms those that are kept are; `null` where none is. */
  like: v.nullable(count),
});

export const stateMessageSchema = v.object({
  robots: v.array(v.union([keptSchema, changedRobotSchema])),
  /** Mechanisms that no robot lists. */
  apart: v.array(v.union([keptSchema, mechanismSchema])),
  status: statusSchema,
});

export type Standing = v.InferOutput<typeof standingSchema>;
export type MechanismState = v.InferOutput<typeof mechanismSchema>;
export type RobotState = MechanismState & { readonly mechanisms: readonly MechanismState[] };
export type Kept = v.InferOutput<typeof keptSchema>;
export type ChangedRobot = v.InferOutput<typeof changedRobotSchema>;
export type StateMessage = v.InferOutput<typeof stateMessageSchema>;

export interface State {
  readonly robots: readonly RobotState[];
  readonly apart: readonly MechanismState[];
  readonly status: StateMessage["status"];
}

export const NO_STATE: State = { robots: [], apart: [], status: null };

/** The state that a message tells, by the one before; `undefined` where it names what that one does not have. */
export function resolveState(before: State, { robots, apart, status }: StateMessage): State | undefined {
  const resolved = {
    robots: resolveList(before.robots, robots, (robot) => resolveRobot(before.robots, robot)),
    apart: resolveList(before.apart, apart, (mechanism) => mechanism),
  };
  return resolved.robots && resolved.apart && { robots: resolved.robots, apart: resolved.apart, status };
}

function resolveRobot(before: State["robots"], { like, mechanisms: told, ...head }: ChangedRobot): RobotState | undefined {
  const mechanisms = resolveList((like === null ? undefined : before[like]?.mechanisms) ?? [], told, (one) => one);
  return mechanisms && { ...head, mechanisms };
}

function resolveList<Item, Told extends object>(
  before: readonly Item[],
  told: readonly (Kept | Told)[],
  resolve: (told: Told) => Item | undefined,
): Item[] | undefined {
  const items: Item[] = [];
  for (const one of told) {
    if ("kept" in one) {
      if (one.from + one.kept > before.length) return undefined;
      for (const item of before.slice(one.from, one.from + one.kept)) items.push(item);
    } else {
      const item = resolve(one);
      if (item === undefined) return undefined;
      items.push(item);
    }
  }
  return items;
}

/** What the client's view and status bar show, as one message, and whether it differs from the one before. */

import type { Span } from "../evaluator/value.js";
import { createNodeReader, type MechanismNode, mechanismTree } from "../features/mechanismTree.js";
import { statusOf } from "../features/status.js";
import type { Place } from "../protocol/place.js";
import type { MechanismState, State } from "../protocol/state.js";
import { sameItems } from "./diagnostics.js";
import type { LineMap } from "./lineMap.js";
import type { Result } from "./session.js";

export type StateOf = (result: Result, uriOf: (file: string) => string) => State;

interface Written {
  readonly lines: LineMap;
  readonly uri: string;
  readonly state: MechanismState;
}

/** Most mechanisms are those of the last result: what is shown of them is the same object then. */
export function createStateReader(): StateOf {
  const nodeOf = createNodeReader();
  const known = new WeakMap<MechanismNode, Written>();
  return ({ analysis, snapshot }, uriOf) => {
    const placeOf = (at: Span): Place => ({ uri: uriOf(at.file), range: snapshot.lineMap(at.file).rangeOf(at) });
    const mechanismOf = (node: MechanismNode): MechanismState => {
      const { name, label, description, tooltip, at, state: standing } = node;
      const lines = snapshot.lineMap(at.file);
      const uri = uriOf(at.file);
      const before = known.get(node);
      if (before?.lines === lines && before.uri === uri) return before.state;
      const state = { name, label, description, tooltip, standing, place: placeOf(at) };
      known.set(node, { lines, uri, state });
      return state;
    };
    const { robots, apart } = mechanismTree(analysis, nodeOf);
    const status = statusOf(analysis);
    return {
      robots: robots.map(({ name, label, description, tooltip, at, state, mechanisms }) => ({
        name,
        label,
        description,
        tooltip,
        standing: state,
        place: placeOf(at),
        mechanisms: mechanisms.map(mechanismOf),
      })),
      apart: apart.map(mechanismOf),
      status: status === undefined ? null : { text: status.text, tooltip: status.tooltip, standing: status.state },
    };
  };
}

/** True for states of one reader that show the same. */
export function sameState(one: State, other: State): boolean {
  return (
    sameItems(one.apart, other.apart) &&
    one.robots.length === other.robots.length &&
    one.robots.every((robot, index) => {
      const like = other.robots[index];
      return like !== undefined && sameItems(robot.mechanisms, like.mechanisms) && headOf(robot) === headOf(like);
    }) &&
    JSON.stringify(one.status) === JSON.stringify(other.status)
  );
}

function headOf({ mechanisms: _, ...head }: State["robots"][number]): string {
  return JSON.stringify(head);
}

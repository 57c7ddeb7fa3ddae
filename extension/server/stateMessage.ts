/**
 * What the client's view and status bar show, as a message that tells what differs from the one before.
 *
 * Keeps what was told by file. A file's part is looked at where its tree is another, or a text that it has a place in.
 */
import type { Analysis } from "../analysis/analysis.js";
import { sameItems } from "../analysis/lists.js";
import { addListing } from "../features/analysisChanges.js";
import type { IndexOf, MechanismIndex } from "../features/mechanismIndex.js";
import { createTreeReader, type FileTree, type MechanismNode, type RobotNode } from "../features/mechanismTree.js";
import { createFindingCounter, statusOf } from "../features/status.js";
import type { ChangedRobot, Kept, MechanismState, RobotState, StateMessage } from "../protocol/state.js";
import { keepItems, tellItems } from "./keptItems.js";
import type { ResultChanges } from "./resultChanges.js";
import type { Result } from "./session.js";

/** `changes`: from the result given before; absent: everything is looked at. Gives nothing where the client has been told all of it. */
export type StateOf = (result: Result, uriOf: (file: string) => string, changes?: ResultChanges) => StateMessage | undefined;

interface Told {
  readonly robots: readonly RobotState[];
  readonly apart: readonly MechanismState[];
  /** Where they begin in the lists of the whole state that was told last. */
  robotsFrom: number;
  apartFrom: number;
}

/** `knowsNothing`: of a client to which an empty state is no news. */
export function createStateReader(indexOf: IndexOf, knowsNothing: boolean): StateOf {
  const treesOf = createTreeReader(indexOf);
  const findingsOf = createFindingCounter();
  const told = new Map<string, Told>();
  let statusTold = knowsNothing ? JSON.stringify(null) : undefined;
  let isFirst = true;
  return (result, uriOf, since) => {
    const { analysis } = result;
    const changes = isFirst ? undefined : since;
    isFirst = false;
    const { byFile, changed, counts } = treesOf(analysis, changes?.touched);
    const seen = changes?.texts && filesShowing(changes.texts, analysis, indexOf(analysis));
    const replaced = new Map<string, Told | undefined>();
    for (const file of seen ? new Set([...changed, ...seen]) : new Set([...told.keys(), ...byFile.keys()])) {
      const before = told.get(file);
      const tree = byFile.get(file);
      const now = tree && tellFile(tree, result, uriOf, before);
      if (now === before) continue;
      replaced.set(file, before);
      if (now === undefined) told.delete(file);
      else told.set(file, now);
    }
    const status = statusOf(counts, findingsOf(analysis, changes?.found));
    const statusNow = status === undefined ? null : { text: status.text, tooltip: status.tooltip, standing: status.state };
    if (replaced.size === 0 && JSON.stringify(statusNow) === statusTold) return undefined;
    statusTold = JSON.stringify(statusNow);
    return { ...tellLists(analysis, told, replaced), status: statusNow };
  };
}

/** Files whose mechanisms and robots are told with a place in one of the texts. */
function filesShowing(texts: ReadonlySet<string>, analysis: Analysis, index: MechanismIndex): ReadonlySet<string> {
  const files = new Set([...texts].flatMap((file) => [...index.standingIn(file)]));
  addListing(files, analysis, index);
  return files;
}

function tellLists(
  { inFile }: Analysis,
  told: ReadonlyMap<string, Told>,
  replaced: ReadonlyMap<string, Told | undefined>,
): Pick<StateMessage, "robots" | "apart"> {
  const robots: (Kept | ChangedRobot)[] = [];
  const apart: (Kept | MechanismState)[] = [];
  let [robotsFrom, apartFrom] = [0, 0];
  for (const file of inFile.keys()) {
    const now = told.get(file);
    if (now === undefined) continue;
    if (replaced.has(file)) {
      const before = replaced.get(file) ?? NOTHING;
      tellItems(robots, now.robots, before.robots, before.robotsFrom, (robot) => tellRobot(robot, before));
      tellItems(apart, now.apart, before.apart, before.apartFrom, (mechanism) => mechanism);
    } else {
      keepItems(robots, now.robotsFrom, now.robots.length);
      keepItems(apart, now.apartFrom, now.apart.length);
    }
    now.robotsFrom = robotsFrom;
    now.apartFrom = apartFrom;
    robotsFrom += now.robots.length;
    apartFrom += now.apart.length;
  }
  return { robots, apart };
}

const NOTHING: Readonly<Told> = { robots: [], apart: [], robotsFrom: 0, apartFrom: 0 };

function tellRobot(robot: RobotState, { robots, robotsFrom }: Readonly<Told>): ChangedRobot {
  const position = robots.findIndex(({ name }) => name === robot.name);
  const mechanisms: (Kept | MechanismState)[] = [];
  tellItems(mechanisms, robot.mechanisms, robots[position]?.mechanisms ?? [], 0, (mechanism) => mechanism);
  return { ...robot, mechanisms, like: position < 0 ? null : robotsFrom + position };
}

/** `before` itself where it says the same, and what of it does. */
function tellFile(tree: FileTree, result: Result, uriOf: (file: string) => string, before: Told | undefined): Told {
  const tell = ({ name, label, description, tooltip, at, state }: MechanismNode | RobotNode): MechanismState => {
    const place = { uri: uriOf(at.file), range: result.snapshot.lineMap(at.file).rangeOf(at) };
    return { name, label, description, tooltip, standing: state, place };
  };
  const tellAll = (nodes: readonly MechanismNode[], like: readonly MechanismState[] = []): readonly MechanismState[] =>
    nodes.map((node, index) => likeBefore(tell(node), like[index]));
  const robots = tree.robots.map((robot, index): RobotState => {
    const like = before?.robots[index];
    const mechanisms = tellAll(robot.mechanisms, like?.mechanisms);
    const now = { ...tell(robot), mechanisms };
    const isSame = like !== undefined && sameItems(like.mechanisms, mechanisms) && headOf(like) === headOf(now);
    return isSame ? like : now;
  });
  const apart = tellAll(tree.apart, before?.apart);
  const isSame = before !== undefined && sameItems(before.robots, robots) && sameItems(before.apart, apart);
  return isSame ? before : { robots, apart, robotsFrom: 0, apartFrom: 0 };
}

function likeBefore(now: MechanismState, before: MechanismState | undefined): MechanismState {
  return before !== undefined && JSON.stringify(before) === JSON.stringify(now) ? before : now;
}

function headOf({ mechanisms: _, ...head }: RobotState): string {
  return JSON.stringify(head);
}

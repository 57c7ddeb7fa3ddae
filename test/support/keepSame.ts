/** An analysis in which whatever is as it was in another is the same object: a file's, a list of findings, a finding, a robot. */
import type { AnalysedMechanism, AnalysedRobot, Analysis, FileAnalysis, Finding } from "../../extension/analysis/analysis.js";

export function keepSame(before: Analysis, now: Analysis): Analysis {
  const inFile = mapOver(now.inFile, (file, own) => keepFile(before.inFile.get(file), own));
  const findingsIn = mapOver(now.findingsIn, (file, own) => keepList(before.findingsIn.get(file), own, keepFinding));
  const kept = new Map(
    [...now.findingsIn].flatMap(([file, own]) => own.map((one, at) => [one, findingsIn.get(file)?.[at] ?? one])),
  );
  const lists = mapOver(now.findingsByMechanism, (_, own) => own.map((one) => kept.get(one) ?? one));
  const robots = [...inFile.values()].flatMap((one) => one.robots);
  const mechanisms = [...inFile.values()].flatMap((one) => one.mechanisms);
  return {
    ...now,
    inFile,
    findingsIn,
    findingsByMechanism: lists,
    robots,
    mechanisms,
    findings: now.findings.map((one) => kept.get(one) ?? one),
  };
}

function mapOver<Value>(all: ReadonlyMap<string, Value>, change: (key: string, value: Value) => Value): Map<string, Value> {
  return new Map([...all].map(([key, value]) => [key, change(key, value)]));
}

function keepFile(before: FileAnalysis | undefined, now: FileAnalysis): FileAnalysis {
  if (before === undefined) return now;
  const robots = keepList(before.robots, now.robots, keepRobot);
  const mechanisms = keepList(before.mechanisms, now.mechanisms, keepMechanism);
  const isSame =
    before.evaluation === now.evaluation &&
    before.robots === robots &&
    before.mechanisms === mechanisms &&
    keepList(before.motors, now.motors, (_, one) => one) === before.motors;
  return isSame ? before : { ...now, robots, mechanisms };
}

function keepRobot(before: AnalysedRobot, now: AnalysedRobot): AnalysedRobot {
  const isSame = before.call === now.call && before.declared === now.declared && before.solution === now.solution;
  return isSame && JSON.stringify(before.notChecked) === JSON.stringify(now.notChecked) ? before : now;
}

function keepMechanism(before: AnalysedMechanism, now: AnalysedMechanism): AnalysedMechanism {
  const isSame = before.call === now.call && before.declared === now.declared && before.numbers === now.numbers;
  return isSame && JSON.stringify([before.assumed, before.notChecked]) === JSON.stringify([now.assumed, now.notChecked])
    ? before
    : now;
}

function keepFinding(before: Finding, now: Finding): Finding {
  return JSON.stringify(before) === JSON.stringify(now) ? before : now;
}

function keepList<Item>(
  before: readonly Item[] = [],
  now: readonly Item[],
  keep: (before: Item, now: Item) => Item,
): readonly Item[] {
  const items = now.map((one, index) => {
    const like = before[index];
    return like === undefined ? one : keep(like, one);
  });
  return items.length === before.length && items.every((one, index) => one === before[index]) ? before : items;
}

/**
 * A number or quantity that mechanisms are made of, wherever it is declared: what it does to each of them, and what a little more or less
 * of it would do.
 */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { sameSpan } from "../../analysis/spans.js";
import type { MechanismNumbers } from "../../model/numbers.js";
import { writeQuantity, writeShare } from "../../units/write.js";
import { feedsOf, keyOf, type Leaf, originsOf } from "../feeds.js";
import { inertMarkdown } from "../inertText.js";
import { chartLink } from "../links.js";
import { outputShaftOf } from "../shaft.js";
import { type Committed, movedSince } from "../sinceCommit.js";
import { countedBy, stepsOf } from "../step.js";
import type { Constant } from "../subject.js";
import { type Analyse, variantOf } from "../variant.js";
import { verdictOf, worse } from "../verdict.js";
import { type Table, writeBlock } from "./block.js";
import { quantityLine } from "./quantity.js";

/** Mechanisms that are shown with their variants; a longer table is no longer read. */
const SHOWN = 3;

/** Mechanisms beyond them that are named. */
const NAMED = 5;

/** `undefined` for a text that is no quantity, such as the name of a magnet. */
export function describeConstant(
  analysis: Analysis,
  constant: Constant,
  analyse: Analyse,
  committed: Committed,
): string | undefined {
  const { plain } = constant;
  if (typeof plain === "string" && quantityLine(plain) === undefined) return undefined;
  const fed = fedBy(analysis, constant);
  const title = titleOf(analysis, constant);
  if (fed.length === 0) return writeBlock({ verdict: title, lines: ["Feeds no mechanism."] });
  const shown = fed.slice(0, SHOWN).map(({ mechanism }) => mechanism);
  const more = fed.slice(SHOWN).map(({ mechanism }) => inertMarkdown(mechanism.name));
  const others = `${more.slice(0, NAMED).join(", ")}${more.length > NAMED ? ` and ${more.length - NAMED} more` : ""}`;
  const charted = shown.find(({ numbers }) => numbers !== undefined);
  return writeBlock({
    verdict: verdictOfAll(analysis, fed),
    lines: [title],
    table: withoutEmptyColumns(HEAD, rowsOf(analysis, constant, fed, shown, analyse)),
    notes: [...shown.flatMap((one) => changesOf(committed, one)), ...(more.length === 0 ? [] : [`Feeds ${others} too.`])],
    links: charted === undefined ? [] : [chartLink(charted.name)],
  });
}

/** "hoist: current 1.9 → 2.7 A since the last commit"; none for what is new: the mechanism's own hover says that. */
function changesOf(committed: Committed, mechanism: AnalysedMechanism): string[] {
  const [first] = movedSince(committed, mechanism);
  return first === undefined ? [] : [`${inertMarkdown(mechanism.name)}: ${first} since the last commit`];
}

const HEAD = ["at the hardest position", "output torque", "output speed", "current", "of stall", "travel"];

/** Each mechanism as it is, and below it what each step makes of it. */
function rowsOf(
  analysis: Analysis,
  constant: Constant,
  fed: readonly Fed[],
  shown: readonly AnalysedMechanism[],
  analyse: Analyse,
): string[][] {
  const rows = shown.map((mechanism) => [rowOf(inertMarkdown(mechanism.name), mechanism)]);
  const computed = shown.filter(({ numbers }) => numbers !== undefined);
  if (computed.length === 0) return rows.flat();
  for (const { rewrites } of stepsOf(constant, fed)) {
    for (const { label, rewrite } of rewrites) {
      const changed = variantOf(analysis, constant.origin, rewrite, computed, analyse);
      if (changed === undefined) continue;
      shown.forEach((mechanism, row) => {
        const one = changed[computed.indexOf(mechanism)];
        if (one !== undefined) rows[row]?.push(rowOf(`… with ${label}`, one));
      });
      break;
    }
  }
  return rows.flat();
}

interface Fed {
  readonly mechanism: AnalysedMechanism;
  readonly leaves: readonly Leaf[];
}

/** Mechanisms that the constant feeds, the worst first. */
function fedBy(analysis: Analysis, { key }: Constant): Fed[] {
  const fed = analysis.mechanisms.flatMap((mechanism) => {
    const leaves = feedsOf(analysis, mechanism).filter(({ value }) =>
      [...originsOf(value)].some((one) => sameSpan(keyOf(one), key)),
    );
    return leaves.length === 0 ? [] : [{ mechanism, leaves }];
  });
  return fed.toSorted((one, other) => shareOf(other) - shareOf(one));
}

function shareOf({ mechanism }: Fed): number {
  return mechanism.numbers?.hardest.stallShare ?? -1;
}

function verdictOfAll(analysis: Analysis, fed: readonly Fed[]): string {
  const verdicts = fed.map(({ mechanism }) => ({ name: inertMarkdown(mechanism.name), verdict: verdictOf(analysis, mechanism) }));
  const worst = verdicts.map(({ verdict }) => verdict.state).reduce(worse);
  const { name, verdict } = verdicts.find((one) => one.verdict.state === worst) ?? { name: "" };
  return `${verdict?.words}: ${[name, ...listed(verdict?.share)].join(", ")}`;
}

/** "PINION is 16", "mass is 20 kg = 44.1 lb", "16 teeth". */
function titleOf({ snapshot }: Analysis, { key, origin, plain, field }: Constant): string {
  const declared = origin.declaredAt ? snapshot.read(key.file)?.slice(key.start, key.end) : undefined;
  const isWhole = origin === field.value.origin;
  const written = field.path.findLast((part) => typeof part === "string");
  const name = declared ?? (isWhole ? written : undefined);
  // A number as it is given, not rounded: it is what the reader sees in the code.
  const value = typeof plain === "string" ? quantityLine(plain) : plain;
  const counted = isWhole && name === undefined ? countedBy(field) : undefined;
  if (value === undefined) return name === undefined ? "This expression" : inertMarkdown(name);
  if (name !== undefined) return `${inertMarkdown(name)} is ${value}`;
  return counted === "tooth" ? `${value} teeth` : counted === undefined ? String(value) : `${value} ${counted}s`;
}

function rowOf(label: string, mechanism: AnalysedMechanism): string[] {
  const shaft = outputShaftOf(mechanism);
  const { numbers } = mechanism;
  if (shaft === undefined || numbers === undefined) return [label, "not checked", "", "", "", ""];
  const { motorCurrentA, stallShare } = numbers.hardest;
  return [
    label,
    `${writeQuantity(shaft.torqueNm, "torque")} of ${writeQuantity(shaft.stallTorqueNm, "torque")}`,
    shaft.speedRadPerS === 0 ? "stalled" : writeQuantity(shaft.speedRadPerS, "speed"),
    writeQuantity(motorCurrentA, "current"),
    stallShare === null ? "" : writeShare(stallShare),
    travelIn(numbers),
  ];
}

function travelIn({ travel }: MechanismNumbers): string {
  if (travel === null) return "";
  return travel.timeS === null ? "never arrives" : writeQuantity(travel.timeS, "time");
}

function withoutEmptyColumns(head: readonly string[], rows: readonly (readonly string[])[]): Table {
  const kept = head.map((_, column) => column).filter((column) => rows.some((cells) => cells[column]));
  const keep = (cells: readonly string[]): string[] => kept.map((column) => cells[column] ?? "");
  return { head: keep(head), rows: rows.map(keep) };
}

function listed<Item>(item: Item | undefined): Item[] {
  return item === undefined ? [] : [item];
}

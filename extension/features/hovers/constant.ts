/**
 * A number or quantity that mechanisms are made of, wherever it is declared: what it does to each of them, and what a little more or less
 * of it would do.
 */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import { writeQuantity, writeShare } from "../../units/write.js";
import { feedsOf, keyOf, type Leaf, originsOf, sameSpan } from "../feeds.js";
import { inertMarkdown } from "../inertText.js";
import { chartLink } from "../links.js";
import { outputShaftOf } from "../shaft.js";
import { countedBy, stepsOf } from "../step.js";
import type { Constant } from "../subject.js";
import { type Analyse, variantOf } from "../variant.js";
import { verdictOf, worse } from "../verdict.js";
import { writeBlock } from "./block.js";
import { quantityLine } from "./quantity.js";

/** Mechanisms that are shown with their variants; a longer table is no longer read. */
const SHOWN = 3;

/** `undefined` for a text that is no quantity, such as the name of a magnet. */
export function describeConstant(analysis: Analysis, constant: Constant, analyse: Analyse): string | undefined {
  const { plain } = constant;
  if (typeof plain === "string" && quantityLine(plain) === undefined) return undefined;
  const fed = fedBy(analysis, constant);
  const title = titleOf(analysis, constant);
  if (fed.length === 0) return writeBlock({ verdict: title, lines: ["Feeds no mechanism."] });
  const shown = fed.slice(0, SHOWN);
  const rows = shown.map(({ mechanism }) => [rowOf(inertMarkdown(mechanism.name), mechanism)]);
  for (const step of stepsOf(constant, fed)) {
    const indices = shown.filter(({ mechanism }) => mechanism.numbers !== undefined).map(({ index }) => index);
    const variant = step.rewrites
      .map(({ label, rewrite }) => ({ label, mechanisms: variantOf(analysis, constant.origin, rewrite, indices, analyse) }))
      .find(({ mechanisms }) => mechanisms !== undefined);
    shown.forEach(({ index }, position) => {
      const changed = variant?.mechanisms?.[index];
      if (changed?.numbers !== undefined && variant !== undefined)
        rows[position]?.push(rowOf(`… with ${variant.label}`, changed));
    });
  }
  const more = fed.slice(SHOWN).map(({ mechanism }) => inertMarkdown(mechanism.name));
  return writeBlock({
    verdict: verdictOfAll(analysis, fed),
    lines: [title],
    table: {
      head: ["at the hardest position", "output torque, of stall", "output speed", "current", "of stall"],
      rows: rows.flat(),
    },
    notes:
      more.length === 0
        ? []
        : [`Feeds ${more.slice(0, 5).join(", ")}${more.length > 5 ? ` and ${more.length - 5} more` : ""} too.`],
    links: shown
      .filter(({ mechanism }) => mechanism.numbers)
      .slice(0, 1)
      .map(({ mechanism }) => chartLink(mechanism.name)),
  });
}

interface Fed {
  readonly index: number;
  readonly mechanism: AnalysedMechanism;
  readonly leaves: readonly Leaf[];
}

/** Mechanisms that the constant feeds, the worst first. */
function fedBy(analysis: Analysis, { key }: Constant): Fed[] {
  const fed = analysis.mechanisms.flatMap((mechanism, index) => {
    const leaves = feedsOf(analysis, mechanism).filter(({ value }) =>
      [...originsOf(value)].some((one) => sameSpan(keyOf(one), key)),
    );
    return leaves.length === 0 ? [] : [{ index, mechanism, leaves }];
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
  if (shaft === undefined || numbers === undefined) return [label, "not checked", "", "", ""];
  const { motorCurrentA, stallShare } = numbers.hardest;
  return [
    label,
    `${writeQuantity(shaft.torqueNm, "torque")} of ${writeQuantity(shaft.stallTorqueNm, "torque")}`,
    shaft.speedRadPerS === 0 ? "stalled" : writeQuantity(shaft.speedRadPerS, "speed"),
    writeQuantity(motorCurrentA, "current"),
    stallShare === null ? "" : writeShare(stallShare),
  ];
}

function listed<Item>(item: Item | undefined): Item[] {
  return item === undefined ? [] : [item];
}

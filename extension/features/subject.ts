/**
 * What stands under the cursor: a mechanism, another built thing, or a constant that such things are made of.
 *
 * Places only; what to say about the subject is up to the hovers.
 */
import type { AnalysedMechanism, Analysis } from "../analysis/analysis.js";
import { groupBy } from "../analysis/lists.js";
import { sameSpan, spanKey } from "../analysis/spans.js";
import type { DefinitionCall, Origin, Span, Value } from "../evaluator/value.js";
import { keyOf, type Leaf, leavesOf, originsOf, passedThrough } from "./feeds.js";
import { importedAt } from "./importedAt.js";
import { writtenValue } from "./writtenValue.js";

export type Subject =
  | { readonly kind: "mechanism"; readonly span: Span; readonly mechanisms: readonly AnalysedMechanism[] }
  | { readonly kind: "built"; readonly span: Span; readonly call: DefinitionCall }
  | { readonly kind: "constant"; readonly span: Span; readonly constant: Constant };

/** A written value that others are made of. */
export interface Constant {
  /** Tells it from others: its declaration's identifier, or the literal. */
  readonly key: Span;
  /** One of its occurrences; the way down to what it is made of. */
  readonly origin: Origin;
  /** Its value, where a field is exactly it, or where it is written as a literal. */
  readonly plain?: string | number;
  /** A field that it reaches. */
  readonly field: Leaf;
}

/** The innermost subject at an offset; ends of words count, so that a caret right behind one finds it. */
export function subjectAt(analysis: Analysis, file: string, offset: number): Subject | undefined {
  const here = listSubjects(analysis, file, ({ span }) => span.file === file && span.start <= offset && offset <= span.end);
  const best = here.reduce<Subject | undefined>((inner, one) => (inner && !isBetter(one, inner) ? inner : one), undefined);
  if (best !== undefined) return best;
  const word = importedAt(analysis, file, offset);
  const [key] = word?.keys ?? [];
  if (word === undefined || key === undefined) return undefined;
  const [imported] = listSubjects(analysis, key.file, (place) => isAt(place, key));
  return imported && { ...imported, span: word.span };
}

/** Where a subject is, and which place stands for all of its occurrences. */
type Place = Pick<Subject, "kind" | "span"> & { readonly key: Span };

/** Subjects at certain places of a file: only declarations that read the file can have any there. */
function listSubjects(analysis: Analysis, file: string, isMeant: (place: Place) => boolean): Subject[] {
  const near = [...analysis.inFile.values()].filter(({ evaluation }) => evaluation.dependencies.includes(file));
  const calls = near.flatMap(({ evaluation }) => evaluation.calls);
  const mechanismsOf = indexByPlace(analysis.mechanisms);
  return [
    ...calls.flatMap((call) => subjectsOf(mechanismsOf, call)).filter((one) => isMeant({ ...one, key: one.span })),
    ...calls.flatMap(leavesOf).flatMap((leaf) => constantsOf(analysis, leaf, isMeant)),
  ];
}

type MechanismsOf = (call: DefinitionCall) => readonly AnalysedMechanism[];

/** A loop declares several mechanisms by one piece of text. */
function indexByPlace(mechanisms: readonly AnalysedMechanism[]): MechanismsOf {
  const byPlace = groupBy(mechanisms, ({ call }) => spanKey(call.span));
  return ({ span }) => byPlace.get(spanKey(span)) ?? [];
}

function subjectsOf(mechanismsOf: MechanismsOf, call: DefinitionCall): Subject[] {
  const own = [call.callee, ...(call.binding ? [call.binding.span] : [])];
  const label = call.definition === "mechanism" || call.definition === "robot" ? call.args[0] : undefined;
  if (label?.known && label.origin.kind === "literal") own.push(label.origin.span);
  return [
    ...own.flatMap((span) => subjectOf(mechanismsOf, call, span)),
    ...call.args.flatMap((arg) => usesIn(arg)).flatMap(({ span, call: used }) => subjectOf(mechanismsOf, used, span)),
  ];
}

function subjectOf(mechanismsOf: MechanismsOf, call: DefinitionCall, span: Span): Subject[] {
  if (call.definition !== "mechanism") return [{ kind: "built", span, call }];
  const mechanisms = mechanismsOf(call);
  return mechanisms.length === 0 ? [] : [{ kind: "mechanism", span, mechanisms }];
}

/** Names among the arguments that stand for something built, at the use and where they are declared. */
function usesIn(value: Value): { readonly span: Span; readonly call: DefinitionCall }[] {
  if (!value.known) return [];
  const { data } = value;
  if (data.kind === "array") return data.items.flatMap(usesIn);
  if (data.kind === "object") return [...data.entries.values()].flatMap(usesIn);
  if (data.kind !== "built") return [];
  return passedThrough(value.origin)
    .filter(({ kind }) => kind === "name" || kind === "access")
    .flatMap((origin) => (origin.declaredAt ? [origin.span, origin.declaredAt] : [origin.span]))
    .map((span) => ({ span, call: data.call }));
}

function constantsOf(analysis: Analysis, leaf: Leaf, isMeant: (place: Place) => boolean): Subject[] {
  if (isLabel(leaf)) return [];
  const unchanged = new Set(passedThrough(leaf.value.origin));
  return [...originsOf(leaf.value)].flatMap((origin): Subject[] => {
    const key = keyOf(origin);
    const all = origin.declaredAt ? [origin.span, origin.declaredAt] : [origin.span];
    const spans = all.filter((span) => isMeant({ kind: "constant", span, key }));
    if (spans.length === 0) return [];
    const plain = unchanged.has(origin) ? leaf.plain : writtenValue(analysis.snapshot, origin);
    const constant: Constant = { key, origin, field: leaf, ...(plain === undefined ? {} : { plain }) };
    return spans.map((span) => ({ kind: "constant", span, constant }));
  });
}

/** The name of a mechanism or robot is no number that anything is computed from. */
function isLabel({ call, path }: Leaf): boolean {
  return path.length === 1 && path[0] === 0 && (call.definition === "mechanism" || call.definition === "robot");
}

function isAt({ kind, span, key }: Place, wanted: Span): boolean {
  return sameSpan(kind === "constant" ? key : span, wanted);
}

/** Inner before outer; of two alike, the one whose value is known. */
function isBetter(one: Subject, other: Subject): boolean {
  const difference = length(one) - length(other);
  return difference < 0 || (difference === 0 && isKnown(one) && !isKnown(other));
}

function isKnown(subject: Subject): boolean {
  return subject.kind !== "constant" || subject.constant.plain !== undefined;
}

function length({ span }: Subject): number {
  return span.end - span.start;
}

/**
 * From a changed load cycle to edits of text: steps put in behind the step that they come from, lists of mechanisms written anew.
 *
 * Only a cycle that is written out as a list of objects is edited; mechanisms are written by the names that the robot's own declaration
 * uses for them.
 */
import type { Mechanism } from "../declarations/mechanism.js";
import type { DefinitionCall, Known, Snapshot, Span, Value } from "../evaluator/value.js";
import type { RobotDrive } from "../model/robotDrive.js";
import { type PlannedStep, planSteps, type RobotSetting } from "../proposals/robotChange.js";
import { valueAt } from "./places.js";
import { type Edit, sourceOf, writeOver } from "./writeChange.js";

/** What the cycle stands in, and how mechanisms are called there. */
interface Cycle {
  readonly text: string;
  readonly array: Span;
  readonly items: readonly Known[];
  readonly nameOf: (mechanism: number) => string | undefined;
}

/** `mechanisms`: by their index in the drive. `undefined` where the cycle is not written out. Limits are written elsewhere. */
export function editsForSteps(
  call: DefinitionCall,
  drive: RobotDrive,
  mechanisms: readonly Mechanism[],
  sets: readonly RobotSetting[],
  snapshot: Snapshot,
): Edit[] | undefined {
  const cycles = sets.find((one) => one.kind === "cycles")?.cycles;
  const input = call.args[1];
  if (cycles !== undefined) {
    const written = input && valueAt(input, ["cycles"]);
    return written && [writeOver(written.origin, String(cycles), snapshot)];
  }
  const steps = sets.filter(({ kind }) => kind !== "limit");
  if (steps.length === 0) return [];
  const cycle = cycleOf(call, mechanisms, snapshot);
  if (cycle === undefined) return undefined;
  const plan = planSteps(drive, steps);
  const edits: Edit[] = [];
  for (const [index, item] of cycle.items.entries()) {
    const [kept, ...added] = plan.filter(({ from }) => from === index);
    const before = drive.steps[index];
    if (kept === undefined || before === undefined) return undefined;
    for (const key of ["moving", "holding"] as const) {
      if (kept[key].join() === before[key].join()) continue;
      const edit = writeList(cycle, item, key, kept[key]);
      if (edit === undefined) return undefined;
      edits.push(edit);
    }
    const rests = index === cycle.items.length - 1 ? plan.filter(({ from }) => from === null) : [];
    const written = [...added, ...rests].map((step) => writeStep(cycle, item, step));
    if (written.some((one) => one === undefined)) return undefined;
    const gap = gapBefore(cycle, index);
    const at = sourceOf(item.origin).span.end;
    const newText = written.map((one) => `,${gap}${one}`).join("");
    if (newText !== "") edits.push({ file: cycle.array.file, start: at, end: at, newText });
  }
  return edits;
}

function cycleOf(call: DefinitionCall, mechanisms: readonly Mechanism[], snapshot: Snapshot): Cycle | undefined {
  const input = call.args[1];
  const value = input && valueAt(input, ["loadCycle"]);
  if (input === undefined || value?.known !== true || value.data.kind !== "array") return undefined;
  const { kind, span: array } = sourceOf(value.origin);
  const text = snapshot.read(array.file);
  const items = value.data.items.filter((one) => one.known);
  const isPlain = items.every((item) => isWithin(sourceOf(item.origin).span, array) && sourceOf(item.origin).kind === "object");
  if (kind !== "array" || typeof text !== "string" || items.length !== value.data.items.length || !isPlain) return undefined;
  const names = namesIn(input, array.file, text);
  return { text, array, items, nameOf: (mechanism) => names.get(mechanisms[mechanism]) };
}

/** How the robot's declaration writes each mechanism that it names, in the file of the cycle. */
function namesIn(input: Value, file: string, text: string): ReadonlyMap<object | undefined, string> {
  const names = new Map<object | undefined, string>();
  const visit = (value: Value): void => {
    if (!value.known) return;
    const { data, origin } = value;
    if (data.kind === "array") data.items.forEach(visit);
    if (data.kind === "object") for (const inner of data.entries.values()) visit(inner);
    if (data.kind !== "built" || data.call.definition !== "mechanism" || origin.span.file !== file) return;
    const written = text.slice(origin.span.start, origin.span.end);
    if (NAME.test(written) && !names.has(data.built)) names.set(data.built, written);
  };
  visit(input);
  return names;
}

/** A variable or a property of one: a call would declare another mechanism. */
const NAME = /^[\p{ID_Start}$_][\p{ID_Continue}$]*(?:\.[\p{ID_Start}$_][\p{ID_Continue}$]*)*$/u;

function writeList(cycle: Cycle, item: Known, key: "moving" | "holding", mechanisms: readonly number[]): Edit | undefined {
  const list = listText(cycle, mechanisms);
  const { file, start, end } = sourceOf(item.origin).span;
  const written = valueAt(item, [key]);
  if (list === undefined) return undefined;
  if (written !== undefined) {
    const source = sourceOf(written.origin);
    // A list that is declared elsewhere may serve other steps: then the step gets one of its own.
    const place = source.kind === "array" && isWithin(source.span, { file, start, end }) ? source.span : written.origin.span;
    return isWithin(place, { file, start, end }) ? { ...place, newText: list } : undefined;
  }
  const inner = cycle.text.slice(start + 1, end - 1);
  const at = start + 1 + inner.trimEnd().length;
  const comma = /,\s*$/.test(inner) || inner.trim() === "" ? "" : ",";
  return { file, start: at, end: at, newText: `${comma} ${key}: ${list}` };
}

function writeStep({ text, ...cycle }: Cycle, item: Known, { lastsS, moving, holding }: PlannedStep): string | undefined {
  const lasts = valueAt(item, ["lasts"]);
  const quote = lasts === undefined ? '"' : text[sourceOf(lasts.origin).span.start];
  const mark = quote === "'" ? "'" : '"';
  const [movers, holders] = [moving, holding].map((one) => listText({ text, ...cycle }, one));
  if (movers === undefined || holders === undefined) return undefined;
  const parts = [
    `lasts: ${mark}${lastsS} s${mark}`,
    ...(moving.length === 0 ? [] : [`moving: ${movers}`]),
    ...(holding.length === 0 ? [] : [`holding: ${holders}`]),
  ];
  return `{ ${parts.join(", ")} }`;
}

function listText({ nameOf }: Cycle, mechanisms: readonly number[]): string | undefined {
  const names = mechanisms.map(nameOf);
  return names.some((name) => name === undefined) ? undefined : `[${names.join(", ")}]`;
}

/** What sets a step apart from the one before it: a new line with its indent, or a space. */
function gapBefore({ text, array, items }: Cycle, index: number): string {
  const item = items[index];
  const start = item === undefined ? array.start : sourceOf(item.origin).span.start;
  const before = items[index - 1];
  const from = before === undefined ? array.start + 1 : sourceOf(before.origin).span.end;
  return /\r?\n[ \t]*$/.exec(text.slice(from, start))?.[0] ?? " ";
}

function isWithin(span: Span, around: Span): boolean {
  return span.file === around.file && around.start <= span.start && span.end <= around.end;
}

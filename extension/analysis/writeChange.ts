/** From a change of declared numbers to edits of text: where each number is written, in whichever file that is. */
import type { DefinitionCall, Origin, Snapshot, Span, Value } from "../evaluator/value.js";
import type { Change, Setting } from "../proposals/change.js";
import { valueAt } from "./places.js";

export interface Edit extends Span {
  readonly newText: string;
}

/** `undefined` where a number is not written anywhere that can be edited. */
export function editsFor(call: DefinitionCall, change: Change, snapshot: Snapshot): Edit[] | undefined {
  const edits: Edit[] = [];
  for (const setting of change.sets) {
    const made = editsOf(call, setting, snapshot);
    if (made === undefined) return undefined;
    edits.push(...made);
  }
  return edits;
}

/** The texts with the edits applied; edits of one file must not overlap. */
export function withEdits(snapshot: Snapshot, edits: readonly Edit[]): Snapshot {
  const changed = new Map<string, string>();
  for (const edit of [...edits].sort((a, b) => b.start - a.start)) {
    const text = changed.get(edit.file) ?? snapshot.read(edit.file) ?? "";
    changed.set(edit.file, text.slice(0, edit.start) + edit.newText + text.slice(edit.end));
  }
  return { ...snapshot, read: (file) => changed.get(file) ?? snapshot.read(file) };
}

function editsOf(call: DefinitionCall, setting: Setting, snapshot: Snapshot): Edit[] | undefined {
  const input = call.args[1];
  if (input === undefined) return undefined;
  if ("addSpur" in setting) return addStage(call, valueAt(input, ["stages"]), setting.addSpur, snapshot);
  if ("stage" in setting) {
    const stage = valueAt(input, ["stages", setting.stage]);
    const argument = stage?.known && stage.data.kind === "built" ? stage.data.call.args[setting.argument] : undefined;
    return argument && [writeOver(argument.origin, String(setting.value), snapshot)];
  }
  const present = valueAt(input, [setting.field]);
  const written = typeof setting.value === "string" ? JSON.stringify(setting.value) : String(setting.value);
  return present === undefined
    ? addField(input, setting.field, written, snapshot)
    : [writeOver(present.origin, written, snapshot)];
}

/** The literal that the value comes from unchanged, else the expression at the use. Quotes stay as they are. */
export function writeOver(origin: Origin, written: string, snapshot: Snapshot): Edit {
  const source = sourceOf(origin);
  const place = source.kind === "literal" ? source.span : origin.span;
  const quote = snapshot.read(place.file)?.[place.start];
  const keepsQuote = written.startsWith('"') && (quote === "'" || quote === "`");
  return { ...place, newText: keepsQuote ? `${quote}${written.slice(1, -1)}${quote}` : written };
}

/** Through names, properties and choices, none of which changes the value. */
export function sourceOf(origin: Origin): Origin {
  const passes = origin.kind === "name" || origin.kind === "access" || origin.kind === "choice";
  const [from] = origin.from;
  return passes && from !== undefined ? sourceOf(from) : origin;
}

/** After the opening brace, in the way that the first field is set apart. */
function addField(input: Value, field: string, written: string, snapshot: Snapshot): Edit[] | undefined {
  const { kind, span } = sourceOf(input.origin);
  const text = snapshot.read(span.file)?.slice(span.start, span.end);
  if (kind !== "object" || !text?.startsWith("{")) return undefined;
  const gap = /^\{(\s*)/.exec(text)?.[1] ?? " ";
  const at = span.start + 1;
  return [{ file: span.file, start: at, end: at, newText: `${gap}${field}: ${written},` }];
}

function addStage(
  call: DefinitionCall,
  stages: Value | undefined,
  [driver, driven]: readonly [number, number],
  snapshot: Snapshot,
): Edit[] | undefined {
  if (stages === undefined) return undefined;
  const { kind, span } = sourceOf(stages.origin);
  const text = snapshot.read(span.file);
  if (kind !== "array" || typeof text !== "string" || text[span.end - 1] !== "]") return undefined;
  const inner = text.slice(span.start + 1, span.end - 1);
  const callee = /^(.*?)mechanism$/s.exec(text.slice(call.callee.start, call.callee.end))?.[1] ?? "";
  const stage = `${callee}spur(${driver}, ${driven})`;
  const lead = inner.trim() === "" || /,\s*$/.test(inner) ? (inner.trim() === "" ? "" : " ") : ", ";
  const at = span.start + 1 + inner.trimEnd().length;
  const imported = callee === "" ? importOf(span.file, text) : [];
  return imported && [...imported, { file: span.file, start: at, end: at, newText: `${lead}${stage}` }];
}

/** Adds `spur` to the file's import, where it is not there yet; `undefined` where there is no list to add it to. */
function importOf(file: string, text: string): Edit[] | undefined {
  const list = /import\s*\{([^}]*)\}\s*from\s*["']loadmark["']/.exec(text);
  if (list === null) return undefined;
  if (/(?:^|,)\s*spur\s*(?:,|$)/.test(list[1] ?? "")) return [];
  const at = list.index + list[0].indexOf("{") + 1;
  return [{ file, start: at, end: at, newText: " spur," }];
}

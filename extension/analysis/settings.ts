/**
 * Project settings: data in the nearest `loadmark.json` above each file.
 *
 * A malformed file gives one finding in it, and defaults are used. Holds what changes findings; how they are shown is the editor's business.
 */
import * as v from "valibot";
import { readJsonText } from "../evaluator/jsonText.js";
import type { TypeScript } from "../evaluator/typescript.js";
import type { Snapshot } from "../evaluator/value.js";
import { badDeclaration } from "../rules/badDeclaration.js";
import type { Level, RuleId } from "../rules/rule.js";
import { RULES } from "../rules/table.js";
import type { Finding, Levels } from "./analysis.js";

export const SETTINGS_FILE = "loadmark.json";

const level = v.picklist(["error", "warning", "information", "off"], 'a level is "error", "warning", "information" or "off"');
const settingsSchema = v.pipe(
  v.custom<object>(
    (input) => typeof input === "object" && input !== null && !Array.isArray(input),
    "the settings are not an object",
  ),
  v.strictObject({
    $schema: v.optional(v.string()),
    levels: v.optional(v.record(v.picklist(RULES.map(({ id }) => id)), level)),
    toothCounts: v.optional(v.array(v.pipe(v.number(), v.integer(), v.minValue(1)))),
    leaveOut: v.optional(v.array(v.string())),
  }),
);

export type Settings = v.InferOutput<typeof settingsSchema>;

export interface ReadSettings {
  readonly findings: readonly Finding[];
  readonly wanted: readonly string[];
  readonly toothCounts: ReadonlyMap<string, readonly number[]>;
  readonly levels: ReadonlyMap<string, Levels>;
  /** Findings with the levels of the settings nearest to each; those turned off are left out. The list is a new one. */
  applyLevels(findings: readonly Finding[]): Finding[];
}

export function createSettingsReader(typescript: TypeScript): (files: readonly string[], snapshot: Snapshot) => ReadSettings {
  const read = new Map<string, { readonly text: string; readonly result: Parsed }>();
  const parse = (file: string, text: string): Parsed => {
    const before = read.get(file);
    if (before?.text === text) return before.result;
    const result = parseSettings(typescript, file, text);
    read.set(file, { text, result });
    return result;
  };
  let last: ReadSettings | undefined;
  return (files, snapshot) => {
    const wanted = new Set<string>();
    const findings = new Map<string, Finding>();
    const nearestOf = new Map<string, Settings>();
    // Files of one folder share their settings: a workspace has far fewer folders than files.
    const byFolder = new Map<string, Settings | undefined>();
    const nearestAbove = (file: string): Settings | undefined => {
      for (const candidate of candidatesAbove(file)) {
        const text = snapshot.read(candidate);
        if (text === undefined) wanted.add(candidate);
        if (typeof text !== "string") continue;
        const parsed = parse(candidate, text);
        if (parsed.finding) findings.set(candidate, parsed.finding);
        return parsed.settings;
      }
      return undefined;
    };
    for (const file of files) {
      const folder = file.slice(0, file.lastIndexOf("/"));
      if (!byFolder.has(folder)) byFolder.set(folder, nearestAbove(file));
      const settings = byFolder.get(folder);
      if (settings !== undefined) nearestOf.set(file, settings);
    }
    const settings: ReadSettings = {
      findings: [...findings.values()],
      wanted: [...wanted],
      toothCounts: new Map(
        [...nearestOf].flatMap(([file, { toothCounts }]) =>
          toothCounts ? [[file, [...toothCounts].sort((a, b) => a - b)] as const] : [],
        ),
      ),
      levels: new Map([...nearestOf].flatMap(([file, { levels }]) => (levels ? [[file, levels] as const] : []))),
      applyLevels: (found) =>
        found.flatMap((finding) => {
          const wished = nearestOf.get(finding.at.file)?.levels?.[finding.rule as RuleId];
          return wished === "off" ? [] : [wished === undefined ? finding : { ...finding, level: wished as Level }];
        }),
    };
    // The same object as long as it says the same: all findings rest on it.
    if (last === undefined || !sameSettings(last, settings)) last = settings;
    return last;
  };
}

function sameSettings(one: ReadSettings, other: ReadSettings): boolean {
  const content = ({ findings, wanted, levels, toothCounts }: ReadSettings) =>
    JSON.stringify([findings, wanted, [...levels], [...toothCounts]]);
  return content(one) === content(other);
}

interface Parsed {
  readonly settings: Settings;
  readonly finding?: Finding;
}

/** Reads settings text; also for hosts that need `leaveOut` before anything is analysed. */
export function parseSettings(typescript: TypeScript, file: string, text: string): Parsed {
  const json = readJsonText(typescript, file, text);
  const refuse = (message: string, place: { readonly start: number; readonly end: number }): Parsed => ({
    settings: {},
    finding: {
      rule: badDeclaration.id,
      level: badDeclaration.level,
      mechanism: null,
      message: `${message} Defaults are used.`,
      at: { file, ...place },
      related: [],
    },
  });
  if (json.broken !== undefined) return refuse(`This settings file is not JSON: ${json.broken.message}`, json.broken);
  const parsed = v.safeParse(settingsSchema, json.data);
  if (parsed.success) return { settings: parsed.output };
  const issue = parsed.issues[0];
  const path = (issue.path ?? []).map((item) => String(item.key));
  const isKey = issue.path?.at(-1)?.origin === "key" || (issue.kind === "schema" && issue.expected === "never");
  const message = issue.expected === "never" ? `"${path.at(-1)}" is not a setting.` : `${issue.message}.`;
  return refuse(message, json.placeOf(path, isKey ? "key" : "value"));
}

/** `loadmark.json` in the file's folder, then in each folder above it. */
function* candidatesAbove(file: string): Generator<string> {
  for (let end = file.lastIndexOf("/"); end >= 0; end = file.lastIndexOf("/", end - 1)) {
    yield `${file.slice(0, end)}/${SETTINGS_FILE}`;
    if (end === 0 || file[end - 1] === "/" || file[end - 1] === ":") return;
  }
}

/**
 * From a schema of the argument tuple to a word of the declarations.
 *
 * The schema sits on the tuple so that an issue's path leads from the call back to characters. Does not know any particular word.
 */
import * as v from "valibot";
import { nearest } from "../units/nearest.js";
import { DeclarationError, type Definition, type Issue } from "./definition.js";

/** `argsSchema` accepts exactly what `build` takes; `build` sees only accepted arguments and must not throw on them. */
export function define<Args extends readonly unknown[], Built extends object>(
  name: string,
  argsSchema: v.GenericSchema<unknown, Args>,
  build: (...args: Args) => Built,
): Definition<Args, Built> {
  const check = (args: readonly unknown[]) => {
    const parsed = v.safeParse(argsSchema, args);
    if (parsed.success) return { issues: [], built: freezeDeep(build(...parsed.output)) };
    return { issues: tellIssues(name, parsed.issues) };
  };
  return {
    name,
    check,
    build(...args) {
      const { issues, built } = check(args);
      if (built === undefined) throw new DeclarationError(`${name}: ${issues.map(tellPlace).join("; ")}`);
      return built;
    },
  };
}

/** A missing field whose likely misspelling is there is one issue, at the misspelling. */
function tellIssues(name: string, raw: readonly v.BaseIssue<unknown>[]): Issue[] {
  const missing = raw.filter(isMissing);
  const claimed = new Set<v.BaseIssue<unknown>>();
  const misspelt: Issue[] = [];
  const issues: Issue[] = [];
  for (const issue of raw) {
    if (isMissing(issue)) continue;
    if (!isUnknownField(issue)) {
      if (!isMissingChoice(issue)) issues.push(tellIssue(name, issue));
      continue;
    }
    const path = pathOf(issue);
    const siblings = missing.filter((other) => !claimed.has(other) && sameParent(pathOf(other), path));
    const word = String(path.at(-1));
    const intended =
      nearest(
        word,
        siblings.map((other) => String(pathOf(other).at(-1))),
      ) ?? nearest(word, fieldsOf(issue));
    for (const other of siblings) if (pathOf(other).at(-1) === intended) claimed.add(other);
    const hint = intended === undefined ? `known here: ${fieldsOf(issue).join(", ")}` : `did you mean "${intended}"?`;
    const told: Issue = { message: `"${word}" is not a field of ${placeName(name, path)}; ${hint}`, path, at: "key" };
    if (intended !== undefined) misspelt.push(told);
    issues.push(told);
  }
  // One of several fields is needed, and none is there: perhaps the misspelt one was meant, so that comes first.
  for (const issue of raw.filter(isMissingChoice)) {
    if (!misspelt.some(({ path }) => sameParent(path, pathOf(issue)))) issues.push(tellIssue(name, issue));
  }
  for (const issue of missing) {
    if (claimed.has(issue)) continue;
    const path = pathOf(issue);
    issues.push({ message: `${placeName(name, path)} needs the field "${path.at(-1)}"`, path, at: "callee" });
  }
  return issues;
}

function tellIssue(name: string, issue: v.BaseIssue<unknown>): Issue {
  const path = pathOf(issue);
  const last = issue.path?.at(-1);
  if (last === undefined || last.value !== undefined) return { message: issue.message, path, at: "value" };
  const message = path.length === 1 ? `${name} is missing an argument: ${issue.message}` : issue.message;
  return { message, path, at: "callee" };
}

function isMissing(issue: v.BaseIssue<unknown>): boolean {
  return issue.type === "loose_object" && issue.path?.at(-1)?.origin === "key" && issue.received === "undefined";
}

/** A check over several fields that blames one that is not there. */
function isMissingChoice(issue: v.BaseIssue<unknown>): boolean {
  const last = issue.path?.at(-1);
  return issue.type === "raw_check" && last?.origin === "value" && last.value === undefined;
}

function isUnknownField(issue: v.BaseIssue<unknown>): boolean {
  return issue.type === "raw_check" && issue.path?.at(-1)?.origin === "key";
}

/** `fields` puts the known names into `expected`, which is text for the reader of the raw issue. */
function fieldsOf(issue: v.BaseIssue<unknown>): string[] {
  return issue.expected?.split(", ") ?? [];
}

function pathOf(issue: v.BaseIssue<unknown>): (string | number)[] {
  return (issue.path ?? []).map((item) => (typeof item.key === "number" ? item.key : String(item.key)));
}

function sameParent(a: readonly unknown[], b: readonly unknown[]): boolean {
  return a.length === b.length && a.slice(0, -1).every((key, index) => key === b[index]);
}

function placeName(name: string, path: readonly (string | number)[]): string {
  const parents = path.slice(1, -1).filter((key) => typeof key === "string");
  return parents.length === 0 ? name : `${name}'s "${parents.join(".")}"`;
}

function tellPlace(issue: Issue): string {
  const place = issue.at === "value" ? issue.path.slice(1).join(".") : "";
  return place === "" ? issue.message : `${place}: ${issue.message}`;
}

function freezeDeep<T extends object>(value: T): T {
  for (const inner of Object.values(value)) {
    if (typeof inner === "object" && inner !== null && !Object.isFrozen(inner)) freezeDeep(inner);
  }
  return Object.freeze(value);
}

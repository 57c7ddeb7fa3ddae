/**
 * Findings about the declarations themselves: refused arguments, names used twice, values that cannot be known.
 *
 * Names and causes are compared over all files, but only where a file changed that has something to compare.
 */
import type { FileEvaluation, Snapshot, Span } from "../evaluator/value.js";
import type { Finding } from "./analysis.js";
import { type ByFile, createKeeper } from "./byFile.js";
import type { Declared } from "./declared.js";
import { groupBy, sameContent, union } from "./lists.js";
import { distinctPlaces } from "./spans.js";
import { readTextFacts, type TextFacts } from "./textFacts.js";
import { findUnknowns } from "./unknownFindings.js";
import { createNameCounter, findNamesTwice } from "./usedNames.js";

export interface DeclarationFindings extends ByFile<readonly Finding[]> {
  /** By file, those that sit where nothing is analysed. */
  readonly outside: ReadonlyMap<string, readonly Finding[]>;
}

type Finder = (evaluations: ByFile<FileEvaluation>, declared: ByFile<Declared>, snapshot: Snapshot) => DeclarationFindings;

/** By the file that they sit in; files without are absent. */
export function createDeclarationFinder(): Finder {
  const facts = createKeeper<TextFacts>();
  const compare = createComparer();
  const kept = createKeeper<readonly Finding[]>();
  return ({ of, changed }, declared, snapshot) => {
    const before = new Map([...changed].map((file) => [file, facts.of.get(file)]));
    const known = facts.update(of, changed, (file) => {
      const evaluation = of.get(file);
      return evaluation && orNothing(readTextFacts(evaluation, snapshot));
    });
    const between = compare(known, before);
    const result = kept.update(
      of,
      union(changed, between.changed),
      (file) => {
        const findings = mergeAlike([...(known.of.get(file)?.findings ?? []), ...(between.of.get(file) ?? [])]);
        if (findings.length === 0) return undefined;
        const around = (at: Span) => mechanismAround(at, declared.of.get(at.file));
        return findings.map((finding) => ({ ...finding, mechanism: finding.mechanism ?? around(finding.at) }));
      },
      sameContent,
    );
    return { ...result, outside: new Map([...between.of].filter(([file]) => !of.has(file))) };
  };
}

/** Most files say nothing that would have to be kept. */
function orNothing(facts: TextFacts): TextFacts | undefined {
  const { findings, strays, unknowns, names } = facts;
  return findings.length + strays.length + unknowns.length + names.length === 0 ? undefined : facts;
}

type Between = Pick<ByFile<readonly Finding[]>, "of" | "changed">;

/** What only several files together tell, by the file that it sits in. */
function createComparer(): (facts: ByFile<TextFacts>, before: ReadonlyMap<string, TextFacts | undefined>) => Between {
  const names = createNameCounter();
  /** Files with unknowns or strays. */
  const special = new Set<string>();
  let last: ReadonlyMap<string, readonly Finding[]> = new Map();
  return ({ of, changed }, before) => {
    let isOld = names.isAnyTwice && changed.size > 0;
    for (const file of changed) {
      const now = of.get(file);
      names.replace(before.get(file)?.names ?? [], now?.names ?? []);
      if (special.delete(file)) isOld = true;
      if (now === undefined || now.unknowns.length + now.strays.length === 0) continue;
      special.add(file);
      isOld = true;
    }
    if (changed.size > 0 && names.isAnyTwice) isOld = true;
    if (!isOld) return { of: last, changed: new Set() };
    const found = groupBy(compareAll(of, special, names.isAnyTwice), ({ at }) => at.file);
    const differs = (file: string) => !sameContent(last.get(file) ?? [], found.get(file) ?? []);
    const result = { of: found, changed: new Set([...union(last.keys(), found.keys())].filter(differs)) };
    last = found;
    return result;
  };
}

function compareAll(facts: ReadonlyMap<string, TextFacts>, special: ReadonlySet<string>, isAnyTwice: boolean): Finding[] {
  const some = [...special].sort().flatMap((file) => facts.get(file) ?? []);
  const names = isAnyTwice ? [...facts.values()].flatMap((one) => one.names) : [];
  return [
    ...some.flatMap(({ strays }) => strays),
    ...findNamesTwice("mechanism", names),
    ...findNamesTwice("robot", names),
    ...findUnknowns(some.flatMap(({ unknowns }) => unknowns)),
  ];
}

/** The runs of a loop or a helper say the same of its text: told once, with all that is related. */
function mergeAlike(findings: readonly Finding[]): Finding[] {
  const merged = new Map<string, Finding>();
  for (const finding of findings) {
    const { at, rule, message, related } = finding;
    const key = JSON.stringify([at.file, at.start, at.end, rule, message]);
    const before = merged.get(key);
    merged.set(key, { ...(before ?? finding), related: distinctPlaces([...(before?.related ?? []), ...related], at) });
  }
  return [...merged.values()];
}

function mechanismAround(at: Span, declared: Declared | undefined): string | null {
  const around = declared?.mechanisms.find(
    ({ call: { span } }) => span.file === at.file && span.start <= at.start && at.end <= span.end,
  );
  return around?.name ?? null;
}

/** Names of mechanisms and robots that are used twice in a workspace. */
import type { Span } from "../evaluator/value.js";
import { badDeclaration, tellNameTwice } from "../rules/badDeclaration.js";
import type { Finding } from "./analysis.js";
import type { GivenName } from "./textFacts.js";

/** Counts names, so that those of all files are compared only where one is used twice. */
export interface NameCounter {
  replace(before: readonly GivenName[], now: readonly GivenName[]): void;
  readonly isAnyTwice: boolean;
}

export function createNameCounter(): NameCounter {
  const counts = new Map<string, number>();
  let twice = 0;
  const add = ({ kind, name }: GivenName, step: 1 | -1) => {
    const key = `${kind} ${name}`;
    const before = counts.get(key) ?? 0;
    const now = before + step;
    if (now === 0) counts.delete(key);
    else counts.set(key, now);
    twice += Number(now > 1) - Number(before > 1);
  };
  return {
    replace(before, now) {
      for (const one of before) add(one, -1);
      for (const one of now) add(one, 1);
    },
    get isAnyTwice() {
      return twice > 0;
    },
  };
}

export function findNamesTwice(wanted: GivenName["kind"], names: readonly GivenName[]): Finding[] {
  const first = new Map<string, Span>();
  const findings: Finding[] = [];
  for (const { kind, name, at } of names) {
    if (kind !== wanted) continue;
    const before = first.get(name);
    if (before === undefined) first.set(name, at);
    else {
      findings.push({
        ...badDeclaration,
        rule: badDeclaration.id,
        mechanism: kind === "mechanism" ? name : null,
        message: tellNameTwice(kind, name),
        at,
        related: [{ at: before, message: "First used here." }],
      });
    }
  }
  return findings;
}

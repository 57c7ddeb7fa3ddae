/** Findings about values that cannot be known: one for each root cause, however many declarations depend on it. */
import type { Unknown } from "../evaluator/value.js";
import { badDeclaration, tellMissing } from "../rules/badDeclaration.js";
import { notConstant, tellUnknown } from "../rules/notConstant.js";
import type { Finding } from "./analysis.js";
import { groupBy } from "./lists.js";
import { distinctPlaces, sameSpan } from "./spans.js";

/** At the use that lies nearest to it; other uses are related. */
export function findUnknowns(unknowns: readonly Unknown[]): Finding[] {
  const byRoot = groupBy(unknowns, (unknown) => {
    const root = rootOf(unknown);
    return JSON.stringify([root.origin.span, root.reason.code]);
  });
  return [...byRoot.values()].map((uses) => {
    const nearest = uses.reduce((best, use) => (depthOf(use) < depthOf(best) ? use : best));
    const { message, chain } = tellUnknown(nearest);
    const root = rootOf(nearest);
    const missing = isMissing(root);
    const steps = chain.map((link) => ({
      at: link.origin.span,
      message: link === root ? "This cannot be known." : "It comes through here.",
    }));
    const others = uses
      .filter((use) => use !== nearest && !sameSpan(use.origin.span, nearest.origin.span))
      .map((use) => ({ at: use.origin.span, message: "This depends on it too." }));
    return {
      rule: missing ? badDeclaration.id : notConstant.id,
      level: missing ? badDeclaration.level : notConstant.level,
      mechanism: null,
      message: missing ? tellMissing(root) : message,
      at: nearest.origin.span,
      related: distinctPlaces([...steps, ...others], nearest.origin.span),
    };
  });
}

/** Whether nothing is written there yet. */
export function isMissing(unknown: Unknown): boolean {
  return rootOf(unknown).reason.code === "missing";
}

function rootOf(unknown: Unknown): Unknown {
  return unknown.cause === undefined ? unknown : rootOf(unknown.cause);
}

function depthOf(unknown: Unknown): number {
  return unknown.cause === undefined ? 0 : 1 + depthOf(unknown.cause);
}

/** `trips` over the load cycle: shared protection opens, or a mechanism's own does with the heat of the steps before. */
import type { Protection } from "../model/drive.js";
import type { ProtectorHistory } from "../model/robotSolution.js";
import { writeQuantity } from "../units/write.js";
import { tellProtection } from "./protector.js";
import type { RobotFacts, RobotRule, RobotVerdict } from "./robotRule.js";
import { tellMoment, tellNames } from "./tellRun.js";

export const robotTrips: RobotRule = { id: "trips", level: "error", judge };

function judge(facts: RobotFacts): RobotVerdict[] {
  return facts.solution.protectors.flatMap((history): RobotVerdict[] => {
    const { mechanism } = history;
    if (mechanism !== null && (facts.isTold(mechanism, "trips") || facts.isTold(mechanism, "stalls"))) return [];
    const protection = protectionOf(facts, history);
    if (protection === undefined) return [];
    const verdict = opening(facts, history, protection) ?? mayOpen(facts, history, protection);
    return verdict === undefined ? [] : [verdict];
  });
}

function opening(facts: RobotFacts, history: ProtectorHistory, protection: Protection): RobotVerdict | undefined {
  const [first] = history.openings;
  if (first === undefined) return undefined;
  const { atS, currentA, borderline, closesAtS } = first;
  const often = history.count > 1 ? ` It opens ${history.count} times.` : "";
  const fed = fedNames(facts, history);
  const then = closesAtS === null ? "for good" : "until it closes again";
  return {
    message:
      `Trips: ${nameOf(facts, history, protection)} ${borderline ? "may open" : "opens"} ${tellMoment(facts.drive, atS)}, where it carries ` +
      `${writeQuantity(currentA, "current")}; ${tellNames(fed)} then ${fed.length > 1 ? "stop where they are" : "stops where it is"}, ${then}.${often} ` +
      "Rest longer between moves, or move fewer at once; never raise the rating to silence this.",
    ...placesOf(facts, history),
    ...(borderline ? { level: "warning" as const } : {}),
  };
}

function mayOpen(facts: RobotFacts, history: ProtectorHistory, protection: Protection): RobotVerdict | undefined {
  if (history.mayOpenAtS === null || history.mayOpenA === null) return undefined;
  return {
    message:
      `Trips: ${nameOf(facts, history, protection)} may open ${tellMoment(facts.drive, history.mayOpenAtS)}, where it carries ` +
      `${writeQuantity(history.mayOpenA, "current")}. Move fewer at once; never raise the rating to silence this.`,
    ...placesOf(facts, history),
    level: "warning",
  };
}

function placesOf(facts: RobotFacts, history: ProtectorHistory): Pick<RobotVerdict, "subject" | "about" | "blames"> {
  const fed = fedBy(facts, history);
  return {
    subject: subjectOf(facts, history),
    about: fed.map((mechanism) => ({ mechanism, says: `"${facts.names[mechanism]}" is fed through it.` })),
    blames: history.shared === null ? [] : [["shared", history.shared, "protect"]],
  };
}

function nameOf(facts: RobotFacts, { mechanism }: ProtectorHistory, protection: Protection): string {
  const told = tellProtection(protection);
  return mechanism === null ? told.replace("the ", "the shared ") : told.replace(" (", ` of "${facts.names[mechanism]}" (`);
}

/** Which protector: a shared one by its place in the list. */
function subjectOf({ names }: RobotFacts, { mechanism, shared }: ProtectorHistory): string {
  return mechanism === null ? `shared ${shared}` : `protection of ${names[mechanism]}`;
}

function protectionOf({ drive }: RobotFacts, { mechanism, shared }: ProtectorHistory): Protection | undefined {
  return mechanism === null ? drive.shared[shared ?? -1]?.protection : drive.mechanisms[mechanism]?.protection;
}

function fedBy({ drive }: RobotFacts, { mechanism, shared }: ProtectorHistory): readonly number[] {
  return mechanism === null ? (drive.shared[shared ?? -1]?.feeds ?? []) : [mechanism];
}

function fedNames(facts: RobotFacts, history: ProtectorHistory): string[] {
  return fedBy(facts, history).map((mechanism) => facts.names[mechanism] ?? "");
}

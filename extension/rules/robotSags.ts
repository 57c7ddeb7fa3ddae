/** `sags` over the load cycle: several mechanisms together draw the supply below the voltage that it must stay above. */
import type { SagStretch } from "../model/robotSolution.js";
import { writeQuantity } from "../units/write.js";
import type { RobotFacts, RobotRule, RobotVerdict } from "./robotRule.js";
import { tellMoment, tellNames } from "./tellRun.js";

export const robotSags: RobotRule = { id: "sags", level: "warning", judge };

/** Currents below this share of the supply's are not worth a name. */
const LEAST_SHARE = 0.02;
/** A supply that breaks down is a deeper sag, not another finding. */
const VOLTAGE = "voltage";

function judge(facts: RobotFacts): RobotVerdict[] {
  const floor = facts.drive.supply.mustStayAbove;
  const worst = floor && worstSag(facts, floor.forS);
  if (floor === undefined || worst === undefined) return collapse(facts);
  const drawing = drawingThen(worst);
  // One mechanism alone: its own finding says it already.
  if (drawing.length === 1 && facts.isTold(drawing[0]?.mechanism ?? -1, "sags")) return [];
  const { count } = facts.solution.sags;
  const { openCircuitV, resistanceOhm } = facts.drive.supply;
  const sumA = worst.supplyA.reduce((sum, one) => sum + one, 0);
  const allowedA = Math.max(openCircuitV - floor.voltageV, 0) / resistanceOhm;
  const allowed = floor.forS > 0 ? `, where ${writeQuantity(floor.forS, "time")} is allowed` : "";
  const often = count > 1 ? `, the worst of ${count} times` : "";
  const names = drawing.map(({ mechanism, amperes }) => `"${facts.names[mechanism]}" (${writeQuantity(amperes, "current")})`);
  const wayOut =
    drawing.length > 1
      ? "Let them start one after the other, or limit the current of one"
      : "Limit its current, or give it a ramp";
  return [
    {
      message:
        `Sags: the supply falls to ${writeQuantity(worst.lowestV, "voltage")}, below its ${writeQuantity(floor.voltageV, "voltage")}, for ` +
        `${writeQuantity(worst.lastsS, "time")}${allowed}, ${tellMoment(facts.drive, worst.startS)}${often}, while it feeds ${names.join(", ")}. ` +
        `${wayOut}: up to ${writeQuantity(allowedA, "current")} in all instead of ${writeQuantity(sumA, "current")} it stays up.`,
      subject: VOLTAGE,
      about: drawing.map(({ mechanism, amperes, moved }) => ({
        mechanism,
        says: `"${facts.names[mechanism]}" ${moved ? "moves" : "holds"} then, with ${writeQuantity(amperes, "current")} from the supply.`,
      })),
      blames: [["supply"]],
    },
  ];
}

/** The deepest of those that last longer than is allowed. */
function worstSag({ solution }: RobotFacts, allowedS: number): SagStretch | undefined {
  const { stretches, longest } = solution.sags;
  const all = longest === null ? stretches : [...stretches, longest];
  return all
    .filter(({ lastsS }) => lastsS > allowedS)
    .reduce<SagStretch | undefined>(
      (worst, one) => (worst === undefined || one.lowestV < worst.lowestV ? one : worst),
      undefined,
    );
}

interface Drawing {
  readonly mechanism: number;
  readonly amperes: number;
  readonly moved: boolean;
}

/** By falling current. */
function drawingThen({ supplyA, moved }: SagStretch): Drawing[] {
  const sumA = supplyA.reduce((sum, one) => sum + Math.max(one, 0), 0);
  return supplyA
    .map((amperes, mechanism) => ({ mechanism, amperes, moved: moved.includes(mechanism) }))
    .filter(({ amperes }) => amperes > LEAST_SHARE * sumA)
    .sort((one, other) => other.amperes - one.amperes);
}

/** Without a voltage to stay above: a supply that does not bring what a hold needs. */
function collapse({ drive, solution, names, isTold }: RobotFacts): RobotVerdict[] {
  const { collapsesAtS, numbers } = solution;
  const own = names.some((_, i) => isTold(i, "cannot-hold") || isTold(i, "stalls"));
  if (collapsesAtS === null || own) return [];
  return [
    {
      message:
        `Sags: ${tellMoment(drive, collapsesAtS)} the supply of ${writeQuantity(drive.supply.openCircuitV, "voltage")} cannot bring what ` +
        `is asked of it, with ${tellNames(names.filter((_, i) => isUsed(drive.steps, i)))} on it; it falls to ${writeQuantity(numbers.lowestVoltageV, "voltage")}. ` +
        "Let them move one after the other, or limit the current of one.",
      subject: VOLTAGE,
      about: [],
      blames: [["supply"]],
    },
  ];
}

function isUsed(steps: RobotFacts["drive"]["steps"], mechanism: number): boolean {
  return steps.some(({ moving, holding }) => moving.includes(mechanism) || holding.includes(mechanism));
}

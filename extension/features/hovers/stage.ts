/** A stage: its ratio and losses, and the torque and speed before and behind it in every mechanism that it is part of. */
import type { Analysis } from "../../analysis/analysis.js";
import type { Stage } from "../../declarations/stages.js";
import type { DefinitionCall } from "../../evaluator/value.js";
import { writeNumber, writeQuantity, writeShare } from "../../units/write.js";
import { inertMarkdown } from "../inertText.js";
import { type ShaftPoint, shaftsOf } from "../shaft.js";
import { type Table, writeBlock } from "./block.js";

/** Rows of the table; a longer one is no longer read. */
const SHOWN = 6;

export function describeStage(analysis: Analysis, call: DefinitionCall): string {
  const stage = call.built as Stage | undefined;
  if (stage === undefined)
    return writeBlock({ verdict: `Not checked: ${call.definition}`, notes: ["The declaration is not accepted."] });
  return writeBlock({
    verdict: `${stage.kind}: ratio ${writeNumber(stage.ratio)}`,
    lines: [lossesOf(stage)],
    table: tableOf(analysis, stage),
  });
}

function lossesOf({ si, efficiencyAssumed }: Stage): string {
  const forward = `efficiency ${writeShare(si.efficiency)}${efficiencyAssumed ? " (assumed: customary for this kind)" : ""}`;
  if (si.nearSelfLocking) return `${forward} · close to self-locking, not relied upon`;
  return `${forward} · ${si.backwardEfficiency > 0 ? `driven back ${writeShare(si.backwardEfficiency)}` : "does not run back"}`;
}

function tableOf({ mechanisms }: Analysis, stage: Stage): Table {
  const rows = mechanisms.flatMap((mechanism) => {
    const shafts = shaftsOf(mechanism);
    const stages = mechanism.declared?.stages ?? [];
    return stages.flatMap((one, index) => {
      const [before, after] = [shafts[index], shafts[index + 1]];
      return one === stage && before && after ? [[inertMarkdown(mechanism.name), writeShaft(before), writeShaft(after)]] : [];
    });
  });
  return { head: ["at the hardest position", "before", "behind"], rows: rows.slice(0, SHOWN) };
}

function writeShaft({ torqueNm, speedRadPerS }: ShaftPoint): string {
  return `${writeQuantity(torqueNm, "torque")}, ${speedRadPerS === 0 ? "stalled" : writeQuantity(speedRadPerS, "speed")}`;
}

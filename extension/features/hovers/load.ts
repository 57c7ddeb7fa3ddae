/** A load: the torque and inertia that it puts on the output shaft of every mechanism that moves it. */
import type { AnalysedMechanism, Analysis } from "../../analysis/analysis.js";
import type { Load } from "../../declarations/loads/load.js";
import type { DefinitionCall } from "../../evaluator/value.js";
import { hardestPosition } from "../../model/hardest.js";
import { shaftLoadOf } from "../../model/shaftLoad.js";
import { writeNumber, writeQuantity } from "../../units/write.js";
import { inertMarkdown } from "../inertText.js";
import { positionWords } from "../positionWords.js";
import { type Table, writeBlock } from "./block.js";

/** Rows of the table; a longer one is no longer read. */
const SHOWN = 6;

export function describeLoad(analysis: Analysis, call: DefinitionCall): string {
  const load = call.built as Load | undefined;
  if (load === undefined)
    return writeBlock({ verdict: `Not checked: ${call.definition}`, notes: ["The declaration is not accepted."] });
  const moving = analysis.mechanisms.filter(({ declared }) => declared?.load === load);
  const rows = moving.slice(0, SHOWN).flatMap((mechanism) => rowOf(mechanism));
  return writeBlock({
    verdict: `${load.kind}: ${
      moving.length === 0
        ? "moved by no mechanism yet"
        : `moved by ${moving
            .slice(0, SHOWN)
            .map(({ name }) => inertMarkdown(name))
            .join(", ")}`
    }`,
    table: { head: ["at the output shaft", "torque needed", "where", "greatest inertia", "travel"], rows } satisfies Table,
  });
}

function rowOf(mechanism: AnalysedMechanism): string[][] {
  const { drive } = mechanism;
  if (drive === undefined) return [];
  const load = shaftLoadOf(drive);
  const { outputTorqueNm } = hardestPosition(drive);
  const inertia = Math.max(...[load.startRad, ...load.corners, load.endRad].map(load.inertia));
  const turns = Math.abs(load.endRad - load.startRad) / (2 * Math.PI);
  return [
    [
      inertMarkdown(mechanism.name),
      writeQuantity(outputTorqueNm, "torque"),
      positionWords(drive, mechanism),
      writeQuantity(inertia, "inertia"),
      load.endless ? "turns on" : `${writeNumber(turns)} turns`,
    ],
  ];
}

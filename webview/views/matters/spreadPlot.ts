/** The spread of the draws as rows over one axis: where nine of ten lie, as a share of the middle one. */
import type { MattersChart } from "../../../extension/protocol/charts/matters.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeShare } from "../../../extension/units/write.js";
import { PER_CENT } from "../../plots/axisUnit.js";
import { fixedAxis } from "../../plots/series/axes.js";
import { EMPTY_DRAWING, type SeriesDrawing, type StateRow } from "../../plots/series/drawing.js";
import { type Write, writerIn } from "../../quantity.js";

type Spread = NonNullable<MattersChart["spread"]>;

/** Room beside the widest row, as a share of it. */
const ROOM = 0.15;

export function drawSpread(spread: Spread, system: UnitSystem): SeriesDrawing {
  const rows = rowsOf(spread, writerIn(system));
  const ends = rows.flatMap(({ spans }) => spans.flatMap(({ from, to }) => [from, to]));
  const [least, greatest] = [Math.min(-1, ...ends), Math.max(1, ...ends)];
  const room = (greatest - least) * ROOM;
  return {
    ...EMPTY_DRAWING,
    across: fixedAxis("Away from the middle of the draws", PER_CENT, least - room, greatest + room),
    uprights: [{ x: 0, words: "", kind: "event" }],
    rows,
  };
}

/** In words, for facts and for those who hear it. */
export function spreadWords(spread: Spread, system: UnitSystem): (readonly [string, string])[] {
  const write = writerIn(system);
  const { motorCurrentA, timeS, trippingShare, draws, seed } = spread;
  return [
    ["Current, nine of ten", `${write(motorCurrentA.p5, "current")} to ${write(motorCurrentA.p95, "current")}`],
    ...(timeS === null ? [] : [["Travel, nine of ten", timeWords(timeS, write)] as const]),
    ...(trippingShare === null ? [] : [["Protection opens", `in ${writeShare(trippingShare)} of the draws`] as const]),
    ["Drawn", `${draws} times over ${overWords(spread)}, seed ${seed}`],
  ];
}

function rowsOf({ motorCurrentA, timeS }: Spread, write: Write): StateRow[] {
  const perCent = (value: number, middle: number): number => (value / middle - 1) * 100;
  const rows: StateRow[] = [];
  const { p5, p50, p95 } = motorCurrentA;
  if (p50 > 0)
    rows.push({
      words: `Current: half below ${write(p50, "current")}`,
      spans: [{ from: perCent(p5, p50), to: perCent(p95, p50) }],
      plain: true,
    });
  if (timeS?.p5 != null && timeS.p50 != null) {
    const late = timeS.p95 === null ? "; some never arrive" : "";
    const to = timeS.p95 ?? timeS.p50;
    rows.push({
      words: `Travel: half within ${write(timeS.p50, "time")}${late}`,
      spans: [{ from: perCent(timeS.p5, timeS.p50), to: perCent(to, timeS.p50) }],
      plain: true,
    });
  }
  return rows;
}

function timeWords({ p5, p95 }: NonNullable<Spread["timeS"]>, write: Write): string {
  if (p5 === null) return "never arrive";
  return p95 === null ? `${write(p5, "time")} or more, some never arrive` : `${write(p5, "time")} to ${write(p95, "time")}`;
}

function overWords({ tolerance, ranges }: Spread): string {
  const parts = [
    ...(tolerance > 0 ? [`±${writeShare(tolerance)} of the motor`] : []),
    ...(ranges > 0 ? [ranges === 1 ? "1 range" : `${ranges} ranges`] : []),
  ];
  return parts.join(" and ");
}

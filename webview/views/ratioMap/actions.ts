/** What can be written into the code from the ratio map: the best ratios, and what stock gives nearest to the cursor. */
import type { RatioMapChart, RatioMapPoint } from "../../../extension/protocol/charts/ratioMap.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeNumber } from "../../../extension/units/write.js";
import type { SheetAction } from "../../frame/sheet.js";
import { timeText } from "./numbers.js";

/** `cursor`: the ratio where it stands, or null. */
export function ratioActions(chart: RatioMapChart, cursor: number | null, system: UnitSystem): SheetAction[] {
  const { fastest, bestEfficiency } = chart.toWrite;
  const write = (words: string, ratio: number): SheetAction => ({
    words,
    message: { type: "writeToCode", want: { view: "ratio-map", write: { mechanism: chart.mechanism, ratio } } },
  });
  const best = (label: string, point: (RatioMapPoint & { readonly words: string }) | null): SheetAction[] =>
    point === null
      ? []
      : [
          write(
            `Write the ${label}: ${point.words}, ratio ${writeNumber(point.ratio)}, ${chart.hasTravel ? "travel" : "output"} ${timeText(chart, point, system)}`,
            point.ratio,
          ),
        ];
  const near = cursor === null ? undefined : nearestTo(chart, cursor);
  const isOther = near !== undefined && ![fastest?.ratio, bestEfficiency?.ratio, chart.now.ratio].includes(near.ratio);
  return [
    ...best("fastest", fastest),
    ...(bestEfficiency?.ratio === fastest?.ratio ? [] : best("most efficient", bestEfficiency)),
    ...(near !== undefined && isOther
      ? [
          write(
            `Write what is nearest to the cursor: ${near.words}, ratio ${writeNumber(near.ratio)}${near.keeps ? "" : " (breaks a rule)"}`,
            near.ratio,
          ),
        ]
      : []),
  ];
}

interface Near {
  readonly ratio: number;
  readonly words: string;
  readonly keeps: boolean;
}

function nearestTo({ stock, anyRatio, kept }: RatioMapChart, cursor: number): Near | undefined {
  if (anyRatio) {
    const ratio = Number(cursor.toPrecision(3));
    const keeps = kept.some(({ from, to }) => from <= ratio && ratio <= to);
    return { ratio, words: "a plain reduction", keeps };
  }
  return stock.reduce<Near | undefined>(
    (best, one) =>
      best === undefined || Math.abs(Math.log(one.ratio / cursor)) < Math.abs(Math.log(best.ratio / cursor)) ? one : best,
    undefined,
  );
}

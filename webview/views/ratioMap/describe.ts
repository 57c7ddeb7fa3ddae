/** The plots over the ratio in sentences, for those who hear them. */
import type { RatioMapChart } from "../../../extension/protocol/charts/ratioMap.js";
import type { UnitSystem } from "../../../extension/units/systems.js";
import { writeNumber } from "../../../extension/units/write.js";
import { ratioFacts } from "./numbers.js";

export function describeStrip({ kept, broken, stock, anyRatio }: RatioMapChart): string {
  const span = ({ from, to }: { readonly from: number; readonly to: number }) => `${writeNumber(from)} to ${writeNumber(to)}`;
  const one = stock.filter(({ gears }) => gears === 1).length;
  return [
    kept.length === 0 ? "No ratio keeps every rule." : `Every rule is kept at ratios from ${kept.map(span).join(", and from ")}.`,
    ...broken.map(({ words, spans }) => `${words}: from ${spans.map(span).join(", and from ")}.`),
    anyRatio ? "Any ratio can be had." : `${one} ratios can be had with one gear from stock.`,
  ].join(" ");
}

export function describeTime(chart: RatioMapChart, system: UnitSystem): string {
  const what = chart.hasTravel ? "Travel time over the ratio." : "Output speed over the ratio.";
  const marks = ratioFacts(chart, system).filter(([name]) => name !== "Keeps every rule");
  return [what, ...marks.map(([name, text]) => `${name}: ${text}.`)].join(" ");
}

export function describeCurrent({ samples }: RatioMapChart): string {
  const [first, last] = [samples[0], samples.at(-1)];
  const tell = (ratio: number | undefined) => writeNumber(ratio ?? 0);
  return `Current and share of stall at the hardest position, one motor, over ratios from ${tell(first?.ratio)} to ${tell(last?.ratio)}: both fall as the ratio rises.`;
}

/** What the mechanism needs and gets at its hardest position, with the numbers of the saved result where they differ. */
import type { OperatingPointChart } from "../../extension/protocol/chart.js";
import { QUANTITIES } from "../plots/quantities.js";
import { type ChartUnits, NOTHING, shareText, writeTorque, writeValue } from "../units.js";
import { element } from "./element.js";

export interface Fact {
  readonly name: string;
  readonly now: string;
  /** Of the saved result; null where it reads the same. */
  readonly was: string | null;
}

export function factsOf(chart: OperatingPointChart, saved: OperatingPointChart | null, units: ChartUnits): readonly Fact[] {
  const before = new Map(saved === null ? [] : written(saved, units));
  return written(chart, units).map(([name, now]) => {
    const was = before.get(name) ?? null;
    return { name, now, was: was === now ? null : was };
  });
}

export function showFacts(list: HTMLElement, facts: readonly Fact[]): void {
  list.replaceChildren(
    ...facts.map(({ name, now, was }) =>
      element("div", { class: "fact" }, [
        element("dt", { text: name }),
        element("dd", {}, [
          element("span", { class: "now", text: now }),
          ...(was === null ? [] : [element("span", { class: "was", text: `was ${was}` })]),
        ]),
      ]),
    ),
  );
}

function written(chart: OperatingPointChart, units: ChartUnits): [name: string, text: string][] {
  const { hardest, available } = chart;
  return [
    ["Torque needed", writeTorque(units, hardest.torqueNm)],
    ["Torque at stall", writeTorque(units, available.stallTorqueNm)],
    ["Share of stall", shareText(hardest.stallShare)],
    ["Hardest", hardest.where ?? NOTHING],
    ...QUANTITIES.map((quantity): [string, string] => [quantity.title, writeValue(units, quantity, hardest)]),
  ];
}

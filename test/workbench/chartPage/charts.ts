// The charts that the page's tests show: a hoist in several states, computed as the product computes them.

import type { OperatingPointChart } from "../../../extension/protocol/chart.js";
import type { ShownChart } from "../../../extension/protocol/chartMessages.js";
import { chartIn, type HoistNumbers, hoistSource, shownChart } from "../../support/chartFixture.js";

export function hoistChart(numbers: HoistNumbers = {}): OperatingPointChart {
  return chartIn(hoistSource(numbers), numbers.name ?? "tray hoist");
}

export const fine = (): ShownChart => shownChart(hoistChart());

/** Another ratio than the saved one, past the peak of power. */
export const pastPeak = (): ShownChart => shownChart(hoistChart({ driven: 40 }), { saved: hoistChart() });

/** Limited, protected and stalled at once: as full as a plot gets. */
export const crowded = (): ShownChart =>
  shownChart(
    hoistChart({
      more: ' motorCurrentLimit: "3 A", protect: breaker({ holdCurrent: "2 A", trips: { at: "4 A", after: "6 s" } }),',
    }),
    { saved: hoistChart({ stallTorque: "1 N*m" }), old: "A value is missing. What is shown is its last result." },
  );

/** By hand, for the hoist as it is: N·m, from 5.9 kg on 30 mm through 54 : 16 and the customary 0.98 of a spur stage. */
export const NEEDED_NM = (5.9 * 9.80665 * 0.03) / ((54 / 16) * 0.98);

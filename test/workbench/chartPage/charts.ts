// The charts that the page's tests show: a hoist in several states, computed as the product computes them.

import { type ChartMemory, NO_MEMORY } from "../../../extension/protocol/chartMemory.js";
import type { Nothing } from "../../../extension/protocol/chartMessages.js";
import type { OperatingPointChart } from "../../../extension/protocol/charts/operatingPoint.js";
import type { ShownChart as AnyShownChart, ViewName } from "../../../extension/protocol/charts/views.js";
import { withView } from "../../../webview/frame/memory.js";
import { chartIn, type HoistNumbers, hoistSource, type ShownChart, shownChart } from "../../support/chartFixture.js";
import { cartSource, powerShown, probeShown, travelShown } from "../../support/viewFixture.js";

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

export function nothingDeclared(view: ViewName = "operating-point"): Nothing {
  return { kind: "nothing", view, reason: "nothing-declared", says: [], example: null };
}

/** A memory of the page, with a cursor in the view of the operating point. */
export function remembered({ cursor = null, ...rest }: Partial<ChartMemory> & { readonly cursor?: number | null }): ChartMemory {
  return withView({ ...NO_MEMORY, ...rest }, "operating-point", { cursor });
}

export const travel = (): AnyShownChart<"travel"> => travelShown(cartSource(), "tray hoist", cartSource().replace("54", "60"));

/** What is sent back, a breaker, windings above their limit, a saved result beside it. */
export const power = (): AnyShownChart<"power"> => powerShown(cartSource(), "cart", cartSource({ lasts: "6 s" }));

export const probed = (torqueNm: number): ShownChart => probeShown(hoistSource(), "tray hoist", { torqueNm });

export function noRobot(): Nothing {
  const says = ["No robot is declared yet."];
  return { kind: "nothing", view: "power", reason: "does-not-apply", says, example: 'export default robot("robot", {});' };
}

/** By hand, for the hoist as it is: N·m, from 5.9 kg on 30 mm through 54 : 16 and the customary 0.98 of a spur stage. */
export const NEEDED_NM = (5.9 * 9.80665 * 0.03) / ((54 / 16) * 0.98);

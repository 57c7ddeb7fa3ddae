/** How what the page remembers changes. Pure: the same object where nothing does. */
import type { ChartMemory } from "../../extension/protocol/chartMemory.js";
import type { ViewMemory, ViewName } from "../../extension/protocol/charts/views.js";

/** Another mechanism or robot is shown: a place in one means nothing in another. */
export function withSubject(
  memory: ChartMemory,
  view: ViewName,
  { mechanism = memory.mechanism, robot = memory.robot }: { readonly mechanism?: string | null; readonly robot?: string | null },
): ChartMemory {
  if (memory.mechanism === mechanism && memory.robot === robot) return memory;
  const places = ["cursor", "probe", "span"].filter((place) => place in memory.views[view]);
  return withView({ ...memory, mechanism, robot }, view, Object.fromEntries(places.map((place) => [place, null])));
}

/** Changes some of what is remembered of one view. */
export function withView<V extends ViewName>(memory: ChartMemory, view: V, change: Partial<ViewMemory<V>>): ChartMemory {
  const before = memory.views[view];
  const isSame = Object.entries(change).every(([key, value]) => before[key as keyof typeof before] === value);
  return isSame ? memory : { ...memory, views: { ...memory.views, [view]: { ...before, ...change } } };
}

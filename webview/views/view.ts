/** What the frame needs of a view. Everything else about it is the view's own. */
import type { ShownChart, ViewMemory, ViewName, Want } from "../../extension/protocol/charts/views.js";
import type { UnitSystem } from "../../extension/units/systems.js";
import type { Sheet } from "../frame/sheet.js";

export interface View<V extends ViewName> {
  readonly name: V;
  /** On its tab. */
  readonly title: string;
  /** What the page asks for, after what it remembers. */
  want(memory: ViewMemory<V>): Want;
  /** Names of what is shown: a cursor of one means nothing on another. */
  subject(shown: ShownChart<V>): { readonly mechanism?: string; readonly robot?: string };
  sheet(shown: ShownChart<V>, memory: ViewMemory<V>, system: UnitSystem): Sheet;
  /** What is remembered of a probe. Absent where there is none. */
  probed?(at: number | null): Partial<ViewMemory<V>>;
  /** What is remembered of a choice that the sheet offers; the choice itself under its key where absent. */
  chosen?(key: string, value: string): Partial<ViewMemory<V>>;
  /** What is remembered of a span that someone zooms to; null for all. Absent where there is no zoom. */
  zoomed?(span: { readonly from: number; readonly to: number } | null): Partial<ViewMemory<V>>;
}

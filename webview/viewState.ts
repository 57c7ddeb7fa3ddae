/** How the page's own state changes: which mechanism is shown, where the cursor stands, whether the table is open. Pure. */
import type { ChartView } from "../extension/protocol/chartView.js";
import { nearestStop, type Stop } from "./stops.js";

export type ViewAction =
  | { readonly type: "show"; readonly mechanism: string }
  | { readonly type: "place"; readonly torqueNm: number | null }
  /** Along the stops; a large step ends at an end. */
  | { readonly type: "step"; readonly by: number; readonly stops: readonly Stop[]; readonly from: number }
  | { readonly type: "openTable"; readonly open: boolean };

export function changeView(view: ChartView, action: ViewAction): ChartView {
  switch (action.type) {
    case "show":
      // A torque of one mechanism means nothing on another.
      return view.mechanism === action.mechanism ? view : { ...view, mechanism: action.mechanism, cursorNm: null };
    case "place":
      return view.cursorNm === action.torqueNm ? view : { ...view, cursorNm: action.torqueNm };
    case "step": {
      const { stops, by, from } = action;
      // Without a cursor the first step goes where it matters most.
      const next =
        view.cursorNm === null && Number.isFinite(by) && Math.abs(by) < stops.length
          ? nearestStop(stops, from)
          : nearestStop(stops, view.cursorNm ?? 0) + by;
      const stop = stops[Math.min(Math.max(next, 0), stops.length - 1)];
      return stop === undefined ? view : { ...view, cursorNm: stop.torqueNm };
    }
    case "openTable":
      return { ...view, tableOpen: action.open };
  }
}

/** What a key does on the plots; undefined leaves it to the page. */
export function actionOfKey(key: string, stops: readonly Stop[], needed: number): ViewAction | undefined {
  const step = (by: number): ViewAction => ({ type: "step", by, stops, from: needed });
  switch (key) {
    case "ArrowRight":
    case "ArrowUp":
      return step(1);
    case "ArrowLeft":
    case "ArrowDown":
      return step(-1);
    case "PageUp":
      return step(10);
    case "PageDown":
      return step(-10);
    case "Home":
      return step(-stops.length);
    case "End":
      return step(stops.length);
    case "Escape":
      return { type: "place", torqueNm: null };
    default:
      return undefined;
  }
}

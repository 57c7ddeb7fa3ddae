/** The views by name. A new view adds its folder beside this file and a line here. */
import type { ViewName } from "../../extension/protocol/charts/views.js";
import { mattersView } from "./matters/view.js";
import { operatingPointView } from "./operatingPoint/view.js";
import { powerView } from "./power/view.js";
import { ratioMapView } from "./ratioMap/view.js";
import { travelView } from "./travel/view.js";
import type { View } from "./view.js";

export const VIEWS: { readonly [V in ViewName]: View<V> } = {
  "operating-point": operatingPointView,
  travel: travelView,
  "ratio-map": ratioMapView,
  matters: mattersView,
  power: powerView,
};

/** Commands that the server's texts lead to. A client says which of them it has; a link to any other is left out. */

export const SHOW_CHART = "loadmark.showChart";
export const SHOW_TRAVEL = "loadmark.showTravel";
export const SHOW_RATIO_MAP = "loadmark.showRatioMap";
export const SHOW_MATTERS = "loadmark.showMatters";
export const SHOW_POWER = "loadmark.showPower";
export const REVEAL = "loadmark.reveal";

/** What the client tells the server when it starts it. */
export interface StartOptions {
  readonly commands: readonly string[];
}

/** The four quantities that are plotted over torque: what they are called, where they stand and how they are drawn apart. */
import type { CurveValues } from "../../../extension/protocol/charts/operatingPoint.js";
import type { Dimension } from "../../../extension/units/table.js";

export type QuantityName = "speed" | "current" | "power" | "efficiency";

export interface Quantity {
  readonly name: QuantityName;
  readonly title: string;
  /** `share`: shown as per cent. */
  readonly dimension: Dimension | "share";
  readonly read: (values: CurveValues) => number | null;
  readonly side: "left" | "right";
  /** Curves of one plot differ by dash and by marker, so that no one needs their colours. */
  readonly dash: readonly number[];
  readonly marker: "circle" | "triangle" | "rect" | "rectRot";
}

const LONG_SHORT = [9, 3, 2, 3];

export const SPEED: Quantity = {
  name: "speed",
  title: "Speed",
  dimension: "speed",
  read: (values) => values.speedRadPerS,
  side: "left",
  dash: [],
  marker: "circle",
};

export const CURRENT: Quantity = {
  name: "current",
  title: "Current",
  dimension: "current",
  read: (values) => values.currentA,
  side: "right",
  dash: LONG_SHORT,
  marker: "triangle",
};

export const POWER: Quantity = {
  name: "power",
  title: "Output power",
  dimension: "power",
  read: (values) => values.shaftPowerW,
  side: "left",
  dash: [],
  marker: "rect",
};

export const EFFICIENCY: Quantity = {
  name: "efficiency",
  title: "Efficiency",
  dimension: "share",
  read: (values) => values.efficiency,
  side: "right",
  dash: LONG_SHORT,
  marker: "rectRot",
};

export const QUANTITIES: readonly Quantity[] = [SPEED, CURRENT, POWER, EFFICIENCY];

/**
 * The units of one chart: what its axes show, its words, facts and table show as well.
 */
import type { CurveValues } from "../../../extension/protocol/charts/operatingPoint.js";
import { writeNumber, writeShare } from "../../../extension/units/write.js";
import type { AxisUnit } from "../../plots/axisUnit.js";
import type { Drawing } from "./drawing.js";
import type { Quantity, QuantityName } from "./quantities.js";

export interface ChartUnits {
  readonly torque: AxisUnit;
  readonly of: Readonly<Record<QuantityName, AxisUnit>>;
}

/** What stands where there is no number. */
export const NOTHING = "–";

export function unitsOf({ torque, motion, power }: Drawing): ChartUnits {
  return {
    torque: torque.unit,
    of: { speed: motion.left.unit, current: motion.right.unit, power: power.left.unit, efficiency: power.right.unit },
  };
}

/** Without its unit, which then stands in the head of a column. */
export function valueNumber(units: ChartUnits, quantity: Quantity, values: CurveValues | null): string {
  const value = values && quantity.read(values);
  return value === null ? NOTHING : writeNumber(units.of[quantity.name].fromSi(value));
}

export function writeValue(units: ChartUnits, quantity: Quantity, values: CurveValues | null): string {
  const value = values && quantity.read(values);
  if (value !== null && quantity.dimension === "share") return writeShare(value);
  const text = valueNumber(units, quantity, values);
  return text === NOTHING ? text : `${text} ${units.of[quantity.name].text}`;
}

export function shareNumber(share: number | null): string {
  return share === null ? NOTHING : writeNumber(share * 100);
}

export function shareText(share: number | null): string {
  return share === null ? NOTHING : writeShare(share);
}

export function torqueNumber(units: ChartUnits, torqueNm: number): string {
  return writeNumber(units.torque.fromSi(torqueNm));
}

export function writeTorque(units: ChartUnits, torqueNm: number): string {
  return `${torqueNumber(units, torqueNm)} ${units.torque.text}`;
}

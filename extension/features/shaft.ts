/** A mechanism's numbers at its shafts: the output shaft, and the shaft behind each stage. All motors together. */
import type { AnalysedMechanism } from "../analysis/analysis.js";

/** Running steadily at the hardest position: N·m, rad/s. */
export interface ShaftPoint {
  readonly torqueNm: number;
  /** 0 where it stalls. */
  readonly speedRadPerS: number;
  /** Torque here when the motors stall. */
  readonly stallTorqueNm: number;
}

/** The shaft behind each stage, the first being at the motors; the last is the output shaft. Empty where there are no numbers. */
export function shaftsOf({ declared, numbers }: AnalysedMechanism): readonly ShaftPoint[] {
  if (declared === undefined || numbers === undefined) return [];
  const { hardest, available } = numbers;
  const shafts: ShaftPoint[] = [
    {
      torqueNm: hardest.motorTorqueNm * declared.si.motorCount,
      speedRadPerS: hardest.motorSpeedRadPerS,
      stallTorqueNm: available.stallTorqueNm * declared.si.motorCount,
    },
  ];
  for (const { ratio, efficiency } of declared.si.stages) {
    const before = shafts.at(-1);
    if (before === undefined) break;
    const gain = ratio * efficiency;
    shafts.push({
      torqueNm: before.torqueNm * gain,
      speedRadPerS: before.speedRadPerS / ratio,
      stallTorqueNm: before.stallTorqueNm * gain,
    });
  }
  return shafts;
}

export function outputShaftOf(mechanism: AnalysedMechanism): ShaftPoint | undefined {
  return shaftsOf(mechanism).at(-1);
}

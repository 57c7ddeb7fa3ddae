/**
 * Where the cursor can stand along the torque axis, and what is known there; the rows of table and file too.
 *
 * Only points that were computed: nothing is interpolated.
 */
import type { ChartSample, OperatingPointChart } from "../../../extension/protocol/charts/operatingPoint.js";

export interface Stop extends ChartSample {
  readonly shareOfStall: number | null;
  /** What the torque is known for, such as "peak output power". */
  readonly names: readonly string[];
}

/** A point without a name this close to one with a name, as a share of the axis, says nothing new. */
const SAME = 1e-6;

/** In rising torque. */
export function stopsOf(chart: OperatingPointChart): readonly Stop[] {
  const { samples, hardest, peakPower, bestEfficiency, available, limits } = chart;
  const named: readonly [string, number | undefined][] = [
    ["needed", hardest.torqueNm],
    ["best efficiency", bestEfficiency?.torqueNm],
    ["peak output power", peakPower?.torqueNm],
    ["current limit", limits.current?.fromNm],
    ["standstill", limits.stopsAtNm],
  ];
  const reached = new Set(samples.map(({ torqueNm }) => torqueNm));
  const beyond: ChartSample[] = reached.has(hardest.torqueNm)
    ? []
    : [{ torqueNm: hardest.torqueNm, available: null, sheet: null }];
  const end = samples.at(-1)?.torqueNm ?? 0;
  const nameOf = (torqueNm: number): readonly string[] => named.filter(([, known]) => known === torqueNm).map(([name]) => name);
  const isRepeated = ({ torqueNm }: ChartSample): boolean =>
    nameOf(torqueNm).length === 0 && named.some(([, known]) => known !== undefined && Math.abs(known - torqueNm) < end * SAME);
  return [...samples, ...beyond]
    .filter((sample) => !isRepeated(sample))
    .sort((one, other) => one.torqueNm - other.torqueNm)
    .map((sample) => ({
      ...sample,
      shareOfStall: available.stallTorqueNm > 0 ? sample.torqueNm / available.stallTorqueNm : null,
      names: nameOf(sample.torqueNm),
    }));
}

/** The rows of a table: every named stop, and of the others about as many as asked for, none right beside a named one. */
export function thinned(stops: readonly Stop[], rows: number): readonly Stop[] {
  const named = stops.filter(({ names }) => names.length > 0);
  const plain = stops.filter(({ names }) => names.length === 0);
  const near = (stops.at(-1)?.torqueNm ?? 0) / (4 * rows);
  const step = Math.max(1, Math.round(plain.length / rows));
  const kept = plain.filter((stop, index) => {
    const isBeside = named.some(({ torqueNm }) => Math.abs(torqueNm - stop.torqueNm) < near);
    return index % step === 0 && (index === 0 || !isBeside);
  });
  return [...named, ...kept].sort((one, other) => one.torqueNm - other.torqueNm);
}

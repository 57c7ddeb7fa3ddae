/** A travel as moments that a cursor can stand at, along time or along position. Pure; nothing is interpolated but where events lie. */
import type { TravelChart } from "../../../extension/protocol/charts/travel.js";

export type Over = "time" | "position";

/** What is known at one place; null what is not. */
export interface Moment {
  readonly timeS: number | null;
  readonly position: number | null;
  readonly neededNm: number;
  readonly givenNm: number | null;
  readonly currentA: number | null;
  readonly sourceCurrentA: number | null;
  readonly speed: number | null;
  readonly voltageV: number | null;
  readonly windingC: number | null;
}

/** What can lie across: a load that only turns has no position, one that never moves no time. */
export function whatLiesAcross(chart: TravelChart, wanted: Over): Over {
  if (chart.coordinate === null) return "time";
  return moves(chart) ? wanted : "position";
}

export function moves({ timesS }: TravelChart): boolean {
  return (timesS.at(-1) ?? 0) > 0;
}

/** In rising abscissa. Along position what is needed goes on to the end of the travel, though it may not get there. */
export function momentsOf(chart: TravelChart, over: Over): readonly Moment[] {
  const reached = moves(chart) ? samplesOf(chart) : [];
  if (over === "time") return reached;
  const last = reached.at(-1)?.position ?? null;
  const isBack = chart.travel !== null && chart.travel.to < chart.travel.from;
  const ahead = chart.needed.filter(({ position }) => last === null || (isBack ? position < last : position > last));
  const all = [...reached, ...ahead.map(({ position, torqueNm }) => ({ ...UNKNOWN, position, neededNm: torqueNm }))];
  const rising = isBack ? all.reverse() : all;
  return rising.filter(({ position }, index) => index === 0 || position !== rising[index - 1]?.position);
}

export function abscissaOf({ timeS, position }: Moment, over: Over): number {
  return (over === "time" ? timeS : position) ?? 0;
}

/** Where it is at a time, between the moments that were computed. */
export function positionAt({ timesS, positions }: TravelChart, timeS: number): number {
  const next = timesS.findIndex((one) => one >= timeS);
  if (next <= 0) return positions[next === 0 ? 0 : positions.length - 1] ?? 0;
  const [fromS = 0, toS = 0] = [timesS[next - 1], timesS[next]];
  const [from = 0, to = 0] = [positions[next - 1], positions[next]];
  return toS > fromS ? from + ((timeS - fromS) / (toS - fromS)) * (to - from) : to;
}

const UNKNOWN: Omit<Moment, "position" | "neededNm"> = {
  timeS: null,
  givenNm: null,
  currentA: null,
  sourceCurrentA: null,
  speed: null,
  voltageV: null,
  windingC: null,
};

/** Of two samples at one time the later one counts. */
function samplesOf(chart: TravelChart): Moment[] {
  const { timesS, positions, neededNm, givenNm, currentA, sourceCurrentA, speeds, voltageV, windingC, coordinate } = chart;
  return timesS.flatMap((timeS, index): Moment[] => {
    if (timesS[index + 1] === timeS) return [];
    return [
      {
        timeS,
        position: coordinate === null ? null : (positions[index] ?? null),
        neededNm: neededNm[index] ?? 0,
        givenNm: givenNm[index] ?? null,
        currentA: currentA[index] ?? null,
        sourceCurrentA: sourceCurrentA[index] ?? null,
        speed: speeds[index] ?? null,
        voltageV: voltageV[index] ?? null,
        windingC: windingC?.[index] ?? null,
      },
    ];
  });
}

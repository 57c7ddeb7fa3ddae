/**
 * The load between two corners of its curves, as if their straight lines went on beyond: a step that reaches past a corner then
 * meets no bend, and the corner is found where the step crosses it.
 *
 * Deliberately not here: where the corners are (shaftLoad.ts) and what a course does there (travelRun.ts).
 */
import type { Curve, Load } from "./drive.js";
import type { Plant } from "./plant.js";
import { shaftLoadOf } from "./shaftLoad.js";

/** The plant whose load is that of the piece around an output-shaft position (rad), without corners; itself where it has no curves. */
export function pieceAround(plant: Plant, positionRad: number): Plant {
  const load = straightened(plant.drive.load, positionRad);
  if (load === plant.drive.load) return plant;
  const { startRad, endRad } = plant.load;
  return { ...plant, load: { ...shaftLoadOf({ ...plant.drive, load }), startRad, endRad, corners: [] } };
}

function straightened(load: Load, position: number): Load {
  switch (load.kind) {
    case "lift": {
      const { counterbalanceN: force } = load;
      return typeof force === "number" ? load : { ...load, counterbalanceN: straight(force, position) };
    }
    case "arm": {
      const { counterbalanceNm: torque } = load;
      return typeof torque === "number" ? load : { ...load, counterbalanceNm: straight(torque, position) };
    }
    case "loadCurve": {
      const { torqueNm, inertiaKgM2: inertia } = load;
      return {
        ...load,
        torqueNm: straight(torqueNm, position),
        inertiaKgM2: typeof inertia === "number" ? inertia : straightInertia(inertia, position),
      };
    }
    default:
      return load;
  }
}

type Point = Curve[number];

/** Beyond the curve's ends its value stays. */
function segmentAround(curve: Curve, position: number): readonly [Point, Point] | null {
  const next = curve.findIndex(([at]) => at > position);
  const [start, end] = [curve[next - 1], curve[next]];
  return start && end ? [start, end] : null;
}

/** One segment, longer by its own width on both sides. */
function straight(curve: Curve, position: number): Curve {
  const segment = segmentAround(curve, position);
  if (!segment) return constant(position, curve);
  return lengthened(segment, 1, 1);
}

/** The same, but never below half of the lesser end: no inertia is nothing or less. */
function straightInertia(curve: Curve, position: number): Curve {
  const segment = segmentAround(curve, position);
  if (!segment) return constant(position, curve);
  const [[, from], [, to]] = segment;
  const fall = Math.abs(to - from);
  const most = fall > 0 ? Math.min(1, Math.min(from, to) / 2 / fall) : 1;
  return lengthened(segment, from < to ? most : 1, to < from ? most : 1);
}

function lengthened([[from, low], [to, high]]: readonly [Point, Point], before: number, after: number): Curve {
  const [width, rise] = [to - from, high - low];
  return [
    [from - before * width, low - before * rise],
    [to + after * width, high + after * rise],
  ];
}

function constant(position: number, curve: Curve): Curve {
  const first = curve[0];
  const last = curve.at(-1);
  const value = (first && position < first[0] ? first : last)?.[1] ?? 0;
  return [[position, value]];
}

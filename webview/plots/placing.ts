/**
 * Finds places for words in a plot where they hide neither curves nor each other.
 *
 * Geometry in pixels, y downwards. Greedy: who comes first has the better choice. Measures and draws nothing.
 */

export interface Point {
  readonly x: number;
  readonly y: number;
}

export interface Box {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

export interface Place extends Point {
  /** Read from bottom to top. */
  readonly upright: boolean;
}

export interface WantedLabel {
  /** Of the words, lying. */
  readonly width: number;
  readonly height: number;
  /** Centres, the best first. */
  readonly places: readonly Place[];
  /** Rather left out than put across a curve or other words. */
  readonly optional: boolean;
}

const OUTSIDE = 1000;
const ON_WORDS = 100;
const ON_CURVE = 10;
const LATER = 0.02;
const MARGIN = 2;

/** A place for each label, in their order; null where an optional one found none. */
export function placeLabels(
  labels: readonly WantedLabel[],
  area: Box,
  curves: readonly (readonly Point[])[],
  taken: readonly Box[] = [],
): readonly (Place | null)[] {
  const boxes = [...taken];
  return labels.map((label) => {
    const rated = label.places.map((place, index) => {
      const box = boxOf(label, place);
      return { place, box, cost: costOf(box, area, curves, boxes) + index * LATER };
    });
    const best = rated.reduce<(typeof rated)[number] | null>((one, other) => (one && one.cost <= other.cost ? one : other), null);
    if (best === null || (label.optional && best.cost >= ON_CURVE)) return null;
    boxes.push(best.box);
    return best.place;
  });
}

/** Places beside points along a curve: above and below, leaning to either side. */
export function placesAlong(curve: readonly Point[], width: number, height: number, shares: readonly number[]): readonly Place[] {
  const gap = 6;
  return shares.flatMap((share) => {
    const point = curve[Math.round(share * (curve.length - 1))];
    if (point === undefined) return [];
    const rise = height / 2 + gap;
    const lean = width / 2 + gap;
    return [
      { x: point.x + lean, y: point.y - rise },
      { x: point.x - lean, y: point.y - rise },
      { x: point.x + lean, y: point.y + rise },
      { x: point.x - lean, y: point.y + rise },
      { x: point.x, y: point.y - rise },
      { x: point.x, y: point.y + rise },
    ].map((centre) => ({ ...centre, upright: false }));
  });
}

/** Places in a strip, from its middle outwards: lying where that fits, then upright, then beside a strip that is too narrow for either. */
export function placesWithin(left: number, right: number, area: Box, width: number, height: number): readonly Place[] {
  const room = right - left;
  const lying = room < width + 2 * MARGIN ? [] : spread(left, right, width);
  const upright = room < height ? [] : spread(left, right, height);
  return [
    ...lying.flatMap((x) => downwards(area, 19).map((y) => ({ x, y, upright: false }))),
    ...upright.flatMap((x) => downwards(area, 19).map((y) => ({ x, y, upright: true }))),
    ...(lying.length + upright.length > 0 ? [] : placesBeside(left, area, width, height)),
  ];
}

/** Places beside an upright line, on its right or left, from the top down. */
export function placesBeside(x: number, area: Box, width: number, height: number): readonly Place[] {
  return downwards(area, 12).flatMap((y) =>
    [x + width / 2 + height / 2, x - width / 2 - height / 2].map((centre) => ({ x: centre, y, upright: false })),
  );
}

/** Places along an upright line, turned to run with it, on its far side first. */
export function placesUpright(x: number, area: Box, height: number): readonly Place[] {
  const far = x + height / 2 + BAND;
  const near = x - height / 2 - 2 * MARGIN;
  return [far, near].flatMap((centre) => downwards(area, 19).map((y) => ({ x: centre, y, upright: true })));
}

/** Room for the hatch behind a boundary. */
const BAND = 9;

function downwards({ top, bottom }: Box, count: number): readonly number[] {
  return Array.from({ length: count }, (_, step) => top + ((step + 0.5) / count) * (bottom - top));
}

/** Centres of words of a size between two ends. */
function spread(left: number, right: number, size: number): readonly number[] {
  const middle = (left + right) / 2;
  const free = (right - left - size) / 2 - MARGIN;
  return free <= 0 ? [middle] : [middle, middle - free / 2, middle + free / 2, middle - free, middle + free];
}

function boxOf({ width, height }: WantedLabel, { x, y, upright }: Place): Box {
  const [across, down] = upright ? [height, width] : [width, height];
  return { left: x - across / 2, right: x + across / 2, top: y - down / 2, bottom: y + down / 2 };
}

function costOf(box: Box, area: Box, curves: readonly (readonly Point[])[], boxes: readonly Box[]): number {
  const outside = box.left < area.left || box.right > area.right || box.top < area.top || box.bottom > area.bottom;
  const words = boxes.filter((other) => overlap(box, other)).length;
  const crossed = curves.filter((curve) => curve.some((point, index) => crosses(grown(box), curve[index - 1] ?? point, point)));
  return (outside ? OUTSIDE : 0) + words * ON_WORDS + crossed.length * ON_CURVE;
}

function grown({ left, top, right, bottom }: Box): Box {
  return { left: left - MARGIN, top: top - MARGIN, right: right + MARGIN, bottom: bottom + MARGIN };
}

function overlap(one: Box, other: Box): boolean {
  return one.left < other.right && other.left < one.right && one.top < other.bottom && other.top < one.bottom;
}

/** Whether a line from a to b touches the box: what is left of it after clipping at each side (Liang and Barsky, 1984). */
function crosses(box: Box, a: Point, b: Point): boolean {
  let from = 0;
  let to = 1;
  const run = b.x - a.x;
  const rise = b.y - a.y;
  const sides: readonly [number, number][] = [
    [-run, a.x - box.left],
    [run, box.right - a.x],
    [-rise, a.y - box.top],
    [rise, box.bottom - a.y],
  ];
  for (const [direction, distance] of sides) {
    if (direction === 0) {
      if (distance < 0) return false;
      continue;
    }
    const share = distance / direction;
    if (direction < 0) from = Math.max(from, share);
    else to = Math.min(to, share);
  }
  return from <= to;
}

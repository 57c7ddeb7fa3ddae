/**
 * Where a torque of the form A·cos θ − h(θ), h linear between corners, can have its greatest and smallest value.
 *
 * Deliberately not here: which of these positions is the hardest (hardest.ts).
 */

interface Range {
  readonly startRad: number;
  readonly endRad: number;
}

/**
 * Candidate positions, rising: ends, corners, and in each piece the roots of −A·sin θ = h′.
 * A piece may hold many turns; with a steady slope the outermost turns hold its extremes, so that no more are listed.
 */
export function torqueExtremes(
  range: Range,
  corners: readonly number[],
  amplitude: number,
  helperSlope: (position: number) => number,
): number[] {
  const low = Math.min(range.startRad, range.endRad);
  const high = Math.max(range.startRad, range.endRad);
  const ends = [low, ...corners, high];
  const found = new Set<number>(ends);
  for (let piece = 0; piece + 1 < ends.length; piece++) {
    const from = ends[piece] ?? low;
    const to = ends[piece + 1] ?? high;
    for (const position of stationary(amplitude, helperSlope((from + to) / 2), from, to)) found.add(position);
  }
  return [...found].sort((one, other) => one - other);
}

const TURN = 2 * Math.PI;

function stationary(amplitude: number, slope: number, from: number, to: number): number[] {
  const sine = -slope / amplitude;
  if (amplitude === 0 || Math.abs(sine) > 1) return [];
  const principal = Math.asin(sine);
  return [principal, Math.PI - principal].flatMap((root) => {
    const first = root + TURN * Math.ceil((from - root) / TURN);
    const last = root + TURN * Math.floor((to - root) / TURN);
    return [first, last].filter((position) => position > from && position < to);
  });
}

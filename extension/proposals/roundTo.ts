/** Numbers that a person would write: two digits, to the side that still helps. */

export function roundUp(value: number): number {
  return twoDigits(value, Math.ceil);
}

export function roundDown(value: number): number {
  return twoDigits(value, Math.floor);
}

function twoDigits(value: number, round: (value: number) => number): number {
  if (!(value > 0)) return 0;
  const step = 10 ** (Math.floor(Math.log10(value)) - 1);
  // What already has two digits stays as it is, however binary fractions put it.
  return Number((round(Number((value / step).toPrecision(12))) * step).toPrecision(2));
}

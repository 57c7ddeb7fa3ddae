/** Offsets to lines and columns that count from 1, columns in UTF-16 units. */

export interface Place {
  readonly line: number;
  readonly column: number;
}

/** Answers for one text; the line starts are found once. */
export function createLineFinder(text: string): (offset: number) => Place {
  const starts = [0];
  // The line ends of ECMAScript source.
  for (const match of text.matchAll(/\r\n|[\n\r\u2028\u2029]/g)) starts.push(match.index + match[0].length);
  return (offset) => {
    let low = 0;
    let high = starts.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((starts[middle] ?? 0) <= offset) low = middle;
      else high = middle - 1;
    }
    return { line: low + 1, column: offset - (starts[low] ?? 0) + 1 };
  };
}

/** Where a key moves the cursor along the stops of a sheet. Pure. */

/** Index of the stop nearest to an abscissa; -1 where there is none. */
export function nearestStop(stops: readonly number[], abscissa: number): number {
  let best = stops.length > 0 ? 0 : -1;
  for (const [index, stop] of stops.entries()) {
    if (Math.abs(stop - abscissa) < Math.abs((stops[best] ?? 0) - abscissa)) best = index;
  }
  return best;
}

/** A key where stops lie below each other, as one for stops that lie beside each other. */
export function downwards(key: string): string {
  return { ArrowDown: "ArrowRight", ArrowUp: "ArrowLeft", PageDown: "PageUp", PageUp: "PageDown" }[key] ?? key;
}

/** The cursor after a key: an abscissa, null for none; `undefined` leaves the key to the page. Without a cursor the first step goes to `restsAt`. */
export function cursorAfterKey(
  key: string,
  cursor: number | null,
  stops: readonly number[],
  restsAt: number,
): number | null | undefined {
  const to = (index: number): number | null => stops[Math.min(Math.max(index, 0), stops.length - 1)] ?? cursor;
  const step = (by: number): number | null => to(cursor === null ? nearestStop(stops, restsAt) : nearestStop(stops, cursor) + by);
  switch (key) {
    case "ArrowRight":
    case "ArrowUp":
      return step(1);
    case "ArrowLeft":
    case "ArrowDown":
      return step(-1);
    case "PageUp":
      return step(10);
    case "PageDown":
      return step(-10);
    case "Home":
      return to(0);
    case "End":
      return to(stops.length - 1);
    case "Escape":
      return null;
    default:
      return undefined;
  }
}

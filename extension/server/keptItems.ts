/** Lists told by the list before: what stayed the same object is named by its place there, many in a row at once. */
import type { Kept } from "../protocol/state.js";

/** Says that so many of the list before come next, from there on. */
export function keepItems<Told extends object>(told: (Kept | Told)[], from: number, kept: number): void {
  if (kept === 0) return;
  const last = told.at(-1);
  if (last !== undefined && isKept(last) && last.from + last.kept === from) last.kept += kept;
  else told.push({ from, kept });
}

/** Says which items come next. `before`: what there was in their stead, from `from` on in the list before. */
export function tellItems<Item extends object, Told extends object>(
  told: (Kept | Told)[],
  items: readonly Item[],
  before: readonly Item[],
  from: number,
  tell: (item: Item) => Told,
): void {
  const places = new Map(before.map((item, place) => [item, place]));
  for (const item of items) {
    const place = places.get(item);
    if (place === undefined) told.push(tell(item));
    else keepItems(told, from + place, 1);
  }
}

function isKept(one: object): one is Kept {
  return "kept" in one;
}

/** Lists and sets compared, joined and grouped. */

/** Each file once. */
export function union(...sets: readonly Iterable<string>[]): ReadonlySet<string> {
  const all = new Set<string>();
  for (const set of sets) for (const file of set) all.add(file);
  return all;
}

/** The same objects in the same order. */
export function sameItems<Item>(one: readonly Item[], other: readonly Item[]): boolean {
  return one === other || (one.length === other.length && one.every((item, index) => item === other[index]));
}

/** True for lists of plain data that read the same. */
export function sameContent(one: readonly unknown[], other: readonly unknown[]): boolean {
  return sameItems(one, other) || (one.length === other.length && JSON.stringify(one) === JSON.stringify(other));
}

/** In the order in which keys and items are met. */
export function groupBy<Item>(items: readonly Item[], keyOf: (item: Item) => string): ReadonlyMap<string, readonly Item[]> {
  const groups = new Map<string, Item[]>();
  for (const item of items) {
    const key = keyOf(item);
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [item]);
    else group.push(item);
  }
  return groups;
}

/** Sets and maps that are replaced, not changed: what shows them notices. */

/** The set with a member put in or taken out; the same set when that changes nothing. */
export function withMember(set: ReadonlySet<string>, member: string, isIn: boolean): ReadonlySet<string> {
  if (set.has(member) === isIn) return set;
  const next = new Set(set);
  if (isIn) next.add(member);
  else next.delete(member);
  return next;
}

/** The map with an entry set. */
export function withEntry<V>(map: ReadonlyMap<string, V>, key: string, value: V): ReadonlyMap<string, V> {
  return new Map(map).set(key, value);
}

/** The place of each item by its key. */
export function placesByKey(items: readonly { readonly key: string }[]): ReadonlyMap<string, number> {
  return new Map(items.map((item, index) => [item.key, index]));
}

/** An empty set, for a beginning. */
export const NO_MEMBERS: ReadonlySet<string> = new Set();

/** An empty map, for a beginning. */
export const NO_ENTRIES: ReadonlyMap<string, never> = new Map<string, never>();

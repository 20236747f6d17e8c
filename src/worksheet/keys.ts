/**
 * The order of keys in the document's objects: the order in which the file writes them.
 * Holds: known keys come first, in these orders; keys that this version does not know follow, in the order they were met.
 * Because every object keeps that order, taking a key away and setting it again gives back the same text.
 */
import { CHAIN_INPUTS, STAGE_FIELDS } from './chain';
import { isChainSection, isCurveSection, isPoolSection, type Section } from './document';

export const WORKSHEET_KEYS = ['id', 'title', 'summary', 'cases', 'sections', 'recorded'] as const;
export const CASE_KEYS = ['id', 'name'] as const;
const SECTION_KEYS = ['id', 'kind', 'title', 'lines'] as const;
const POOL_KEYS = ['id', 'kind', 'symbol', 'title', 'unit', 'requirement', 'lines'] as const;
const CHAIN_KEYS = ['id', 'kind', 'symbol', 'title', ...CHAIN_INPUTS, 'intercept', 'accepted', 'stages'] as const;
const CURVE_KEYS = ['id', 'kind', 'symbol', 'title', 'x', 'y', 'interpolation', 'logarithmic', 'points'] as const;
export const STAGE_KEYS = [
  'id',
  'symbol',
  'label',
  'off',
  ...STAGE_FIELDS,
  'byCase',
  'tolerance',
  'source',
  'note',
  'accepted',
] as const;
export const LINE_KEYS = [
  'id',
  'symbol',
  'label',
  'entry',
  'unit',
  'quantity',
  'side',
  'byCase',
  'off',
  'digits',
  'tolerance',
  'requirement',
  'source',
  'note',
  'accepted',
  'signOff',
] as const;

/** The keys of a section, by its kind. */
export function sectionKeys(section: Section): readonly string[] {
  if (isPoolSection(section)) return POOL_KEYS;
  if (isChainSection(section)) return CHAIN_KEYS;
  return isCurveSection(section) ? CURVE_KEYS : SECTION_KEYS;
}

/** The object with its known keys in the given order and the others after them; values are kept as they are. */
export function inOrder<T extends object>(object: T, order: readonly string[]): T {
  const known = order.filter((key) => Object.hasOwn(object, key));
  const entries = new Map(Object.entries(object));
  const sorted = known.map((key) => [key, entries.get(key)] as const);
  for (const key of known) entries.delete(key);
  return Object.fromEntries([...sorted, ...entries]) as T;
}

/**
 * The object with one key set, or taken away when `value` is undefined. The same object when nothing changes.
 * Holds: an object whose keys stand in `order` gives one whose keys stand in `order`.
 */
export function withKey<T extends object, K extends keyof T & string>(
  object: T,
  key: K,
  value: T[K] | undefined,
  order: readonly string[],
): T {
  const isThere = Object.hasOwn(object, key);
  if (isThere ? object[key] === value : value === undefined) return object;
  if (isThere && value !== undefined) return { ...object, [key]: value };
  const entries = Object.entries(object).filter(([name]) => name !== key);
  if (value !== undefined) {
    const rank = order.indexOf(key);
    const later = entries.findIndex(([name]) => {
      const other = order.indexOf(name);
      return other < 0 || other > rank;
    });
    entries.splice(later < 0 ? entries.length : later, 0, [key, value]);
  }
  return Object.fromEntries(entries) as T;
}

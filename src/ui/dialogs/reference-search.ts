/**
 * Searching the reference: functions, constants and unit words, as their own catalogues tell them.
 * Holds: an empty search finds everything; what is found keeps the order of the catalogues.
 */
import { CONSTANTS, FUNCTIONS, signatureOf } from '../../formula';
import type { Constant, FunctionEntry, FunctionGroup } from '../../formula';
import { UNIT_WORDS, findUnit, type Unit } from '../../quantity';

/** What the reference is divided into. */
export type Chapter = FunctionGroup | 'Constants' | 'Units';

/** The groups in the order in which the catalogue first comes to them. */
const GROUPS: readonly FunctionGroup[] = [...new Set(FUNCTIONS.map((entry) => entry.group))];

/** The chapters that have something in them, in order. */
export const CHAPTERS: readonly Chapter[] = [...GROUPS, 'Constants', 'Units'];

/** What a search found. */
export interface ReferenceFinds {
  readonly groups: readonly { readonly group: FunctionGroup; readonly entries: readonly FunctionEntry[] }[];
  readonly constants: readonly Constant[];
  readonly units: readonly Unit[];
  readonly count: number;
}

const UNITS: readonly Unit[] = UNIT_WORDS.flatMap((word) => findUnit(word) ?? []);

/** What holds every word of the search, in one chapter or in all. */
export function searchReference(search: string, chapter?: Chapter): ReferenceFinds {
  const words = search.toLowerCase().split(/\s+/).filter(Boolean);
  const matches = (...texts: readonly string[]): boolean => {
    const text = texts.join(' ').toLowerCase();
    return words.every((word) => text.includes(word));
  };
  const isIn = (one: Chapter): boolean => chapter === undefined || chapter === one;
  const groups = GROUPS.filter(isIn).flatMap((group) => {
    const entries = FUNCTIONS.filter(
      (entry) =>
        entry.group === group &&
        matches(
          signatureOf(entry),
          entry.group,
          entry.text,
          entry.formula,
          entry.source,
          ...entry.parameters.map((parameter) => parameter.text),
        ),
    );
    return entries.length === 0 ? [] : [{ group, entries }];
  });
  const constants = isIn('Constants') ? CONSTANTS.filter((one) => matches(one.name, one.text, 'constants')) : [];
  const units = isIn('Units') ? UNITS.filter((one) => matches(one.word, one.description, 'units')) : [];
  const functions = groups.reduce((sum, { entries }) => sum + entries.length, 0);
  return { groups, constants, units, count: functions + constants.length + units.length };
}

/**
 * An entry cut up for setting: typed literals apart from the rest, and the place that a finding is about marked.
 * Holds: the segments put together are the entry, letter for letter.
 */
import { scanEntry } from '../../formula';
import type { Place, Severity } from '../../findings';

/** A stretch of an entry that is set in one way. */
export interface EntrySegment {
  readonly text: string;
  readonly literal: boolean;
  readonly marked: Severity | null;
  /** Whether it is what is searched for. */
  readonly found: boolean;
}

/** A place in the entry that a finding is about. */
export interface EntryMark {
  readonly place: Place;
  readonly severity: Severity;
}

/** The segments of an entry. An entry that cannot be read has no literals. */
export function entrySegments(entry: string, mark?: EntryMark, found: readonly Place[] = []): readonly EntrySegment[] {
  if (entry === '') return [];
  const scan = scanEntry(entry);
  const literals = scan.ok ? scan.value.tokens.filter((token) => token.type === 'literal') : [];
  const cuts = new Set([0, entry.length]);
  for (const { start, end } of [...literals, ...(mark === undefined ? [] : [mark.place]), ...found])
    cuts.add(start).add(end);
  const places = [...cuts].filter((at) => at >= 0 && at <= entry.length).sort((a, b) => a - b);
  return places.slice(0, -1).map((start, i) => {
    const end = places[i + 1] ?? entry.length;
    const isIn = (place: Place): boolean => place.start <= start && end <= place.end;
    return {
      text: entry.slice(start, end),
      literal: literals.some(isIn),
      marked: mark !== undefined && isIn(mark.place) ? mark.severity : null,
      found: found.some(isIn),
    };
  });
}

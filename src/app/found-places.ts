/**
 * Where a text holds what is searched for.
 * Holds: capitals do not matter, and places count the letters of the text as it stands.
 */
import type { Place } from '../findings';

/** A text without its capitals, letter for letter as long as it was: a few letters grow when they are made small. */
export function withoutCapitals(text: string): string {
  const small = text.toLowerCase();
  if (small.length === text.length) return small;
  return Array.from({ length: text.length }, (_, i) => {
    const letter = text.charAt(i).toLowerCase();
    return letter.length === 1 ? letter : text.charAt(i);
  }).join('');
}

/** The places, none over another; none for an empty search. */
export function foundPlaces(text: string, searched: string): Place[] {
  const wanted = withoutCapitals(searched.trim());
  if (wanted === '') return [];
  const within = withoutCapitals(text);
  const places: Place[] = [];
  for (let start = within.indexOf(wanted); start >= 0; start = within.indexOf(wanted, start + wanted.length))
    places.push({ start, end: start + wanted.length });
  return places;
}

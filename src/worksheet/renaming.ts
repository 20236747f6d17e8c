/**
 * Renaming symbols in a line: in every text of it that may be an expression, and nowhere else.
 * Holds: a text without the symbols is the same text, and a line without them the same object. No new name may be one of the
 * old ones, since names are replaced one after the other.
 */
import { renameSymbol } from '../formula/rename';
import type { AcceptedFinding, Line } from './document';
import { LINE_KEYS, withKey } from './keys';
import { symbolWords } from './symbols';

/** The line with symbols renamed in its entries, tolerance, requirement and accepted findings; its own symbol stays. */
export function withRenamedSymbols(line: Line, renamed: ReadonlyMap<string, string>): Line {
  const inText = (text: string): string => {
    let result = text;
    for (const word of symbolWords(text)) {
      const to = renamed.get(word);
      if (to !== undefined) result = renameSymbol(result, word, to);
    }
    return result;
  };
  const byCase = line.byCase && mapTexts(line.byCase, Object.keys(line.byCase), inText);
  const tolerance = line.tolerance && mapTexts(line.tolerance, ['favourable', 'adverse', 'below', 'above'], inText);
  const requirement = line.requirement && mapTexts(line.requirement, ['atLeast', 'atMost'], inText);
  let after = withKey(line, 'entry', inText(line.entry), LINE_KEYS);
  after = withKey(after, 'byCase', byCase, LINE_KEYS);
  after = withKey(after, 'tolerance', tolerance, LINE_KEYS);
  after = withKey(after, 'requirement', requirement, LINE_KEYS);
  return withKey(after, 'accepted', line.accepted && mapAcceptances(line.accepted, inText), LINE_KEYS);
}

function mapAcceptances(
  accepted: readonly AcceptedFinding[],
  map: (text: string) => string,
): readonly AcceptedFinding[] {
  const mapped = accepted.map((one) => mapTexts(one, ['entry'], map));
  return mapped.every((one, i) => one === accepted[i]) ? accepted : mapped;
}

/** The record with the texts under these keys mapped; the same record when none changes. */
function mapTexts<T extends object>(record: T, keys: readonly string[], map: (text: string) => string): T {
  const entries = Object.entries(record).map(([key, value]: [string, unknown]) => ({
    key,
    value,
    mapped: typeof value === 'string' && keys.includes(key) ? map(value) : value,
  }));
  if (entries.every(({ value, mapped }) => value === mapped)) return record;
  return Object.fromEntries(entries.map(({ key, mapped }) => [key, mapped])) as T;
}

/**
 * Renaming symbols in a line or a chain: in every text of it that may be an expression, and nowhere else.
 * Holds: a text without the symbols is the same text, and a line without them the same object. No new name may be one of the
 * old ones, since names are replaced one after the other.
 */
import { renameSymbol } from '../formula/rename';
import { CHAIN_INPUTS, STAGE_FIELDS, type ChainSection, type Stage } from './chain';
import type { AcceptedFinding, Line } from './document';
import { LINE_KEYS, STAGE_KEYS, withKey } from './keys';
import { symbolWords } from './symbols';

/** What renames symbols in one text. */
function renamer(renamed: ReadonlyMap<string, string>): (text: string) => string {
  // By the first word, since a text is split into words: a stage is renamed as rx.lna.
  const byWord = new Map<string, { from: string; to: string }[]>();
  for (const [from, to] of renamed) {
    const word = from.split('.')[0] ?? from;
    byWord.set(word, [...(byWord.get(word) ?? []), { from, to }]);
  }
  return (text) => {
    let result = text;
    for (const word of symbolWords(text))
      for (const { from, to } of byWord.get(word) ?? []) result = renameSymbol(result, from, to);
    return result;
  };
}

const DEVIATIONS = ['favourable', 'adverse', 'below', 'above'] as const;

/** The line with symbols renamed in its entries, tolerance, requirement and accepted findings; its own symbol stays. */
export function withRenamedSymbols(line: Line, renamed: ReadonlyMap<string, string>): Line {
  const inText = renamer(renamed);
  const byCase = line.byCase && mapTexts(line.byCase, Object.keys(line.byCase), inText);
  const tolerance = line.tolerance && mapTexts(line.tolerance, DEVIATIONS, inText);
  const requirement = line.requirement && mapTexts(line.requirement, ['atLeast', 'atMost'], inText);
  let after = withKey(line, 'entry', inText(line.entry), LINE_KEYS);
  after = withKey(after, 'byCase', byCase, LINE_KEYS);
  after = withKey(after, 'tolerance', tolerance, LINE_KEYS);
  after = withKey(after, 'requirement', requirement, LINE_KEYS);
  return withKey(after, 'accepted', line.accepted && mapAcceptances(line.accepted, inText), LINE_KEYS);
}

/** The chain with symbols renamed in its expressions and its stages' values; its own symbol and its stages' stay. */
export function withRenamedInChain(chain: ChainSection, renamed: ReadonlyMap<string, string>): ChainSection {
  const inText = renamer(renamed);
  const after = mapTexts(chain, CHAIN_INPUTS, inText);
  const stages = mapList(after.stages, (stage) => withRenamedInStage(stage, inText));
  return stages === after.stages ? after : { ...after, stages };
}

function withRenamedInStage(stage: Stage, inText: (text: string) => string): Stage {
  const { byCase, tolerance, accepted } = stage;
  let after = mapTexts(stage, STAGE_FIELDS, inText);
  if (byCase !== undefined) {
    const mapped = mapRecord(byCase, (values) => mapTexts(values, STAGE_FIELDS, inText));
    after = withKey(after, 'byCase', mapped, STAGE_KEYS);
  }
  if (tolerance !== undefined) {
    const mapped = mapRecord(tolerance, (one) => mapTexts(one, DEVIATIONS, inText));
    after = withKey(after, 'tolerance', mapped, STAGE_KEYS);
  }
  if (accepted === undefined) return after;
  const mapped = mapRecord(accepted, (list) => mapAcceptances(list, inText));
  return withKey(after, 'accepted', mapped, STAGE_KEYS);
}

function mapRecord<T>(record: Readonly<Record<string, T>>, map: (value: T) => T): Readonly<Record<string, T>> {
  const entries = Object.entries(record).map(([key, value]) => ({ key, value, mapped: map(value) }));
  if (entries.every(({ value, mapped }) => value === mapped)) return record;
  return Object.fromEntries(entries.map(({ key, mapped }) => [key, mapped]));
}

function mapList<T>(list: readonly T[], map: (item: T) => T): readonly T[] {
  const mapped = list.map(map);
  return mapped.every((item, i) => item === list[i]) ? list : mapped;
}

function mapAcceptances(
  accepted: readonly AcceptedFinding[],
  map: (text: string) => string,
): readonly AcceptedFinding[] {
  return mapList(accepted, (one) => mapTexts(one, ['entry'], map));
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

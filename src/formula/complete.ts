/** Completion: what can stand at the caret of an entry — symbols, functions, constants, and units behind a number. */
import type { Place } from '../findings';
import { findUnit, UNIT_WORDS } from '../quantity';
import { CONSTANTS } from './atoms';
import { FUNCTIONS, signatureOf, type FunctionEntry } from './catalogue';

export interface Completion {
  readonly kind: 'symbol' | 'function' | 'constant' | 'unit';
  /** What is listed. */
  readonly text: string;
  /** What replaces `replace` in the entry. */
  readonly insert: string;
  /** Where the caret stands afterwards, in the new entry. */
  readonly caretAfter: number;
  /** A label, a signature with its sentence, or a unit's description. */
  readonly detail: string;
  readonly replace: Place;
}

const LIMIT = 40;
const NAME_BEFORE = /[\p{L}][\p{L}\p{M}\p{N}_.]*$/u;
const UNIT_BEFORE = /(?:^|[^\p{L}\p{N}_.])((?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?) ?([A-Za-zµμΩ°%][^\s+*();,]*)?$/u;

/** Completions at the caret, best first: those that begin as typed, then those that hold it. */
export function completionsAt(
  entry: string,
  caret: number,
  symbols: readonly { readonly symbol: string; readonly label: string }[],
): readonly Completion[] {
  const before = entry.slice(0, caret);
  if (isInsideText(before)) return [];
  const unit = UNIT_BEFORE.exec(before);
  if (unit !== null) return unitCompletions(unit[2] ?? '', caret);
  const typed = NAME_BEFORE.exec(before)?.[0] ?? '';
  if (typed === '') return [];
  const replace = { start: caret - typed.length, end: caret };
  const followsBracket = /^\s*\(/.test(entry.slice(caret));
  const candidates: Completion[] = [
    ...symbols
      .filter(({ symbol }) => symbol !== '')
      .map(({ symbol, label }) => make('symbol', symbol, symbol, label, replace)),
    ...CONSTANTS.map(({ name, text }) => make('constant', name, name, text, replace)),
    ...FUNCTIONS.map((entryOf) => functionCompletion(entryOf, replace, followsBracket)),
  ];
  return best(typed, candidates);
}

function make(kind: Completion['kind'], text: string, insert: string, detail: string, replace: Place): Completion {
  return { kind, text, insert, caretAfter: replace.start + insert.length, detail, replace };
}

function functionCompletion(entry: FunctionEntry, replace: Place, followsBracket: boolean): Completion {
  const insert = followsBracket ? entry.name : `${entry.name}()`;
  return {
    kind: 'function',
    text: entry.name,
    insert,
    caretAfter: replace.start + entry.name.length + 1,
    detail: `${signatureOf(entry)} — ${entry.text}`,
    replace,
  };
}

function unitCompletions(typed: string, caret: number): readonly Completion[] {
  const replace = { start: caret - typed.length, end: caret };
  const words = UNIT_WORDS.filter((word) => word !== '1').map((word) =>
    make('unit', word, word, findUnit(word)?.description ?? '', replace),
  );
  return typed === '' ? words.slice(0, 12) : best(typed.replace(/^u/, 'µ').replace(/^dBu/, 'dBµ'), words);
}

function best(typed: string, candidates: readonly Completion[]): readonly Completion[] {
  const wanted = typed.toLowerCase();
  const rank = ({ text }: Completion): number => {
    if (text === typed) return 0;
    if (text.startsWith(typed)) return 1;
    const lower = text.toLowerCase();
    if (lower.startsWith(wanted)) return 2;
    return lower.includes(wanted) ? 3 : 4;
  };
  return candidates
    .map((candidate) => ({ candidate, rank: rank(candidate) }))
    .filter(({ rank: place }) => place < 4)
    .sort((a, b) => a.rank - b.rank)
    .slice(0, LIMIT)
    .map(({ candidate }) => candidate);
}

/** True when the caret stands inside a quoted text. */
const isInsideText = (before: string): boolean => (before.match(/"/g)?.length ?? 0) % 2 === 1;

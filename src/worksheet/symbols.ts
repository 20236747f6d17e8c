/**
 * Symbols: which names a line may carry, which are taken, free ones beside taken ones, and how a symbol is split for display.
 * Holds: a symbol that `symbolProblem` accepts is read by the scanner as one symbol.
 */
import type { Worksheet } from './document';
import { isLinesSection, isOtherSection } from './document';

const SYMBOL = /^\p{L}[\p{L}\p{M}\p{N}_]*$/u;
const SYMBOLS_IN_TEXT = /\p{L}[\p{L}\p{M}\p{N}_]*/gu;

/** Constants, which no line may be named after. */
export const RESERVED_SYMBOLS: ReadonlySet<string> = new Set(['pi', 'c_0', 'k_B', 'T_0']);

/** Words that the worksheet file refuses as keys, and values are recorded by symbol. */
const REFUSED_SYMBOLS: ReadonlySet<string> = new Set(['constructor', 'prototype']);

/** True for a text that has the form of a symbol: a letter of any script, then letters, digits and `_`. */
export function isSymbol(text: string): boolean {
  return SYMBOL.test(text);
}

/** What is wrong with a symbol by itself, as a sentence for the user, or undefined. An empty symbol is no symbol. */
export function symbolFault(symbol: string): string | undefined {
  if (symbol === '') return 'A symbol needs at least one letter.';
  if (!/^\p{L}/u.test(symbol)) return 'A symbol begins with a letter, for example P_tx.';
  if (!isSymbol(symbol)) return 'A symbol holds letters, digits and _ only, for example P_tx.';
  if (RESERVED_SYMBOLS.has(symbol)) return `${symbol} is a constant; choose another symbol, for example ${symbol}_2.`;
  if (REFUSED_SYMBOLS.has(symbol)) return `${symbol} cannot be a symbol; choose another, for example ${symbol}_2.`;
  return undefined;
}

/** Every symbol that is in use: of lines, pools, chains and curves, and of sections of other kinds. */
export function symbolsIn(worksheet: Worksheet): Set<string> {
  const symbols = new Set<string>();
  const add = (holder: object): void => {
    if ('symbol' in holder && typeof holder.symbol === 'string' && holder.symbol !== '') symbols.add(holder.symbol);
  };
  for (const section of worksheet.sections) {
    add(isOtherSection(section) ? section.content : section);
    if (isLinesSection(section)) section.lines.forEach(add);
  }
  return symbols;
}

/**
 * What speaks against giving the line this symbol, as a sentence for the user, or undefined.
 * `id` is that of the line or section; without it the symbol is meant for a new one.
 */
export function symbolProblem(worksheet: Worksheet, symbol: string, id?: string): string | undefined {
  const fault = symbolFault(symbol);
  if (fault !== undefined) return fault;
  return isTakenByAnother(worksheet, symbol, id)
    ? `Another line has the symbol ${symbol}; choose a free one.`
    : undefined;
}

/** True when a line or section other than the one named carries the symbol. */
export function isTakenByAnother(worksheet: Worksheet, symbol: string, id?: string): boolean {
  return worksheet.sections.some((section) => {
    const holder = isOtherSection(section) ? section.content : section;
    if ('symbol' in holder && holder['symbol'] === symbol && section.id !== id) return true;
    return isLinesSection(section) && section.lines.some((line) => line.symbol === symbol && line.id !== id);
  });
}

/**
 * The symbol itself when it is free, else the first free one of `P_tx_2`, `P_tx_3`, …; `P_1` goes on with `P_2`, `N_0`, in
 * which the nought has a meaning, with `N_0_2`. An empty symbol stays empty. Whoever asks for many hands in `counts`, which
 * remembers up to where the numbers are taken.
 */
export function freeSymbol(
  symbol: string,
  taken: ReadonlySet<string>,
  counts: Map<string, number> = new Map<string, number>(),
): string {
  const isFree = (name: string): boolean => !taken.has(name) && !RESERVED_SYMBOLS.has(name);
  if (symbol === '' || isFree(symbol)) return symbol;
  const counted = /^(.*_)([1-9]\d{0,5})$/su.exec(symbol);
  const stem = counted?.[1] ?? `${symbol}_`;
  let number = Math.max(counted === null ? 2 : Number(counted[2]) + 1, counts.get(stem) ?? 0);
  while (!isFree(`${stem}${String(number)}`)) number++;
  counts.set(stem, number + 1);
  return `${stem}${String(number)}`;
}

/** The words of a text that have the form of symbols, each once. */
export function symbolWords(text: string): Set<string> {
  return new Set(text.match(SYMBOLS_IN_TEXT) ?? []);
}

/** A symbol as it is set in type. */
export interface SplitSymbol {
  readonly base: string;
  /** What stands below the line, its parts set apart by commas: `P_tx_2` has `tx,2`. */
  readonly subscript?: string;
}

/** Splits a symbol at its first `_` into base and subscript; without one, or with nothing on a side of it, all is base. */
export function splitSymbol(symbol: string): SplitSymbol {
  const parts = symbol.split('_').filter((part) => part !== '');
  const [base, ...below] = parts;
  if (base === undefined || below.length === 0 || symbol.startsWith('_')) return { base: symbol };
  return { base, subscript: below.join(',') };
}

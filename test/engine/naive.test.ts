/**
 * Against an evaluator of the simplest kind: plain recursion over numbers, no graph, no order, no marks, no units. It reads
 * sheets of ratios in dB alone, in which there is nothing to find, so that every line has a figure unless it rests on a loop
 * or on an empty line.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { applyAll, type Change, type Line } from '../../src/worksheet';
import { sheetOfLines, valueOf } from './notation';

type Term = { readonly coefficient: number; readonly symbol: string };

type Entry =
  | { readonly form: 'figure'; readonly figure: number }
  | { readonly form: 'empty' }
  | { readonly form: 'sum'; readonly terms: readonly Term[]; readonly constant: number }
  | { readonly form: 'powersum' | 'max' | 'min'; readonly symbols: readonly string[] }
  | { readonly form: 'choice'; readonly symbols: readonly [string, string, string] };

const SYMBOLS = Array.from({ length: 12 }, (_, at) => `x_${String(at)}`);
const symbols = fc.constantFrom(...SYMBOLS);
const figures = fc.integer({ min: -400, max: 400 }).map((tenths) => tenths / 10);

const entriesOf = fc.oneof(
  { weight: 3, arbitrary: fc.record({ form: fc.constant('figure' as const), figure: figures }) },
  { weight: 1, arbitrary: fc.constant({ form: 'empty' as const }) },
  {
    weight: 5,
    arbitrary: fc.record({
      form: fc.constant('sum' as const),
      terms: fc.array(fc.record({ coefficient: fc.constantFrom(1, 1, 1, -1, 2, -3, 0.5), symbol: symbols }), {
        minLength: 1,
        maxLength: 4,
      }),
      constant: figures,
    }),
  },
  {
    weight: 3,
    arbitrary: fc.record({
      form: fc.constantFrom('powersum' as const, 'max' as const, 'min' as const),
      symbols: fc.array(symbols, { minLength: 1, maxLength: 3 }),
    }),
  },
  {
    weight: 1,
    arbitrary: fc.record({ form: fc.constant('choice' as const), symbols: fc.tuple(symbols, symbols, symbols) }),
  },
);

const dB = (figure: number): string => (figure < 0 ? `(${String(figure)} dB)` : `${String(figure)} dB`);

function textOf(entry: Entry): string {
  switch (entry.form) {
    case 'figure':
      return `${String(entry.figure)} dB`;
    case 'empty':
      return '';
    case 'sum':
      return [
        ...entry.terms.map(({ coefficient, symbol }) =>
          coefficient === 1 ? symbol : `(${String(coefficient)})*${symbol}`,
        ),
        dB(entry.constant),
      ].join(' + ');
    case 'choice':
      return `if(${entry.symbols[0]} > 0 dB, ${entry.symbols[1]}, ${entry.symbols[2]})`;
    default:
      return `${entry.form}(${entry.symbols.join(', ')})`;
  }
}

/** The figure of a symbol; undefined where it rests on a loop, an empty line or nothing. */
function naive(sheet: ReadonlyMap<string, Entry>, symbol: string, above: readonly string[] = []): number | undefined {
  const entry = sheet.get(symbol);
  if (entry === undefined || above.includes(symbol)) return undefined;
  const valueIn = (name: string): number | undefined => naive(sheet, name, [...above, symbol]);
  const all = (names: readonly string[]): readonly number[] | undefined => {
    const values = names.map(valueIn);
    return values.some((value) => value === undefined) ? undefined : (values as number[]);
  };
  switch (entry.form) {
    case 'figure':
      return entry.figure;
    case 'empty':
      return undefined;
    case 'sum':
      return all(entry.terms.map((term) => term.symbol))?.reduce(
        (sum, value, at) => sum + (entry.terms[at]?.coefficient ?? 0) * value,
        entry.constant,
      );
    case 'choice': {
      const values = all(entry.symbols);
      return values === undefined ? undefined : (values[0] as number) > 0 ? values[1] : values[2];
    }
    case 'powersum': {
      const values = all(entry.symbols);
      return values && 10 * Math.log10(values.reduce((sum, value) => sum + 10 ** (value / 10), 0));
    }
    default: {
      const values = all(entry.symbols);
      return values && Math[entry.form](...values);
    }
  }
}

/** Ratios so large that the naive sum of powers overflows or drowns are left out of the comparison. */
const isComparable = (value: number | undefined): boolean => value === undefined || Math.abs(value) < 2000;

function compare(sheet: ReadonlyMap<string, Entry>, evaluation: Evaluation): void {
  for (const symbol of sheet.keys()) {
    const expected = naive(sheet, symbol);
    if (!isComparable(expected)) continue;
    const found = valueOf(evaluation, symbol);
    if (expected === undefined) expect(typeof found).toBe('string');
    else expect(found).toBeCloseTo(expected, 6);
  }
}

const lineOf = (symbol: string, entry: Entry): Line => ({
  id: `line-${symbol}`,
  symbol,
  label: '',
  entry: textOf(entry),
});

describe('evaluation of ratios in dB', () => {
  it('is what plain recursion gives, from the start and after every edit', { timeout: 60_000 }, () => {
    fc.assert(
      fc.property(
        fc.array(entriesOf, { minLength: 2, maxLength: 12 }),
        fc.array(fc.record({ at: fc.nat(11), entry: entriesOf }), { maxLength: 8 }),
        (first, edits) => {
          const sheet = new Map(first.map((entry, at) => [SYMBOLS[at] ?? '', entry]));
          let worksheet = sheetOfLines([...sheet].map(([symbol, entry]) => lineOf(symbol, entry)));
          const evaluation = new Evaluation(worksheet);
          compare(sheet, evaluation);
          for (const { at, entry } of edits) {
            const symbol = SYMBOLS[at % first.length] ?? '';
            const changes: Change[] = [
              { kind: 'set-line', lineId: `line-${symbol}`, field: 'entry', value: textOf(entry) },
            ];
            sheet.set(symbol, entry);
            worksheet = applyAll(worksheet, changes).worksheet;
            evaluation.edit(worksheet, changes);
            compare(sheet, evaluation);
          }
        },
      ),
      { numRuns: 150 },
    );
  });

  it('finds nothing but loops, empty lines and those that wait for them', { timeout: 60_000 }, () => {
    fc.assert(
      fc.property(fc.array(entriesOf, { minLength: 2, maxLength: 12 }), (first) => {
        const evaluation = new Evaluation(sheetOfLines(first.map((entry, at) => lineOf(SYMBOLS[at] ?? '', entry))));
        const codes = new Set(evaluation.sheetFindings().map(({ code }) => code));
        expect([...codes].filter((code) => !['loop', 'waiting', 'unknown-symbol'].includes(code))).toEqual([]);
      }),
      { numRuns: 150 },
    );
  });
});

import { describe, expect, it } from 'vitest';

import type { TrialsOutcome } from '../../../src/jobs';
import { findUnit } from '../../../src/quantity';
import { Evaluation } from '../../../src/engine';
import {
  countWords,
  driverRows,
  faultWords,
  percentWords,
  readSeed,
  remarksOf,
} from '../../../src/ui/analysis/trials-words';
import { sheetOf } from '../../engine/notation';

const EVALUATION = new Evaluation(sheetOf('a = 1 dB\nb = 2 dB'));
const idOf = (symbol: string): string => EVALUATION.lineOf(symbol)?.id ?? '';

describe('words of trials', () => {
  it.each([
    [0, '0 %'],
    [1, '100 %'],
    [0.5, '50.0 %'],
    [0.8044, '80.4 %'],
    [0.99991, '99.9910 %'],
    [0.0000012, '0.00012 %'],
  ])('a share of %f is %s', (share, words) => {
    expect(percentWords(share)).toBe(words);
  });

  it('counts have their thousands apart', () => {
    expect([999, 10_000, 10_000_000].map(countWords)).toEqual(['999', '10\u202f000', '10\u202f000\u202f000']);
  });

  it('a seed is a whole number that doubles can hold', () => {
    expect(['7', ' 0 ', '-1', '1.5', '', '1e3', '9007199254740992'].map(readSeed)).toEqual([
      7,
      0,
      ...new Array<undefined>(5).fill(undefined),
    ]);
  });

  it('shifts are said by their size and way, with bars from the middle on one scale', () => {
    const rows = driverRows(
      [
        { lineId: idOf('a'), shift: -2 },
        { lineId: idOf('b'), shift: 0.5 },
        { lineId: idOf('b'), shift: 0.001 },
      ],
      EVALUATION,
    );
    expect(rows.map(({ words }) => words)).toEqual(['2.00 σ lower', '0.50 σ higher', 'as in all trials']);
    expect(rows[0]).toMatchObject({ symbol: 'a', start: 0, length: 0.5 });
    expect(rows[1]).toMatchObject({ start: 0.5, length: 0.125 });
  });

  it('what is left out, assumed, binned or done again is said', () => {
    const outcome = {
      ...{ isBinned: true, quantileError: 0.00123, lostWorkers: 1 },
      statistics: { withheld: 1200 },
    } as unknown as TrialsOutcome;
    const account = {
      isDirectionAssumed: true,
      troubles: [{ lineId: idOf('a'), why: 'it cannot vary.' }],
    } as unknown as Parameters<typeof remarksOf>[1];
    expect(remarksOf(outcome, account, EVALUATION, findUnit('dBm'))).toEqual([
      'a: it cannot vary.',
      'Higher is taken for better here; a requirement, or a kind and side, would tell.',
      'In 1\u202f200 trials there is no figure; these meet no requirement.',
      'Percentiles are counted in bins, each 0.0012 dB wide; all else is exact.',
      'The browser ended a worker on the way; their part was done again.',
    ]);
  });

  it('every fault has a sentence', () => {
    expect(faultWords({ kind: 'stopped' })).toBe('Stopped.');
    expect(faultWords({ kind: 'worker-died' })).toMatch(/ended the worker twice/);
    expect(faultWords({ kind: 'failed', why: 'no memory' })).toMatch(/could not be computed: no memory/);
  });
});

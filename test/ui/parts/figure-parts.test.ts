// Figures taken apart at the decimal point, and the words in their place.
import { describe, expect, it } from 'vitest';

import type { Figure } from '../../../src/engine';
import { findUnit } from '../../../src/quantity';
import { figureParts, figureText, linearText } from '../../../src/ui/parts/figure-parts';

function value(figure: number, word: string): Figure {
  const unit = findUnit(word);
  if (unit === undefined) throw new Error(word);
  return { state: 'value', value: figure, unit, isFitted: false };
}

describe('a figure’s parts', () => {
  it.each([
    [value(14, 'dBm'), '14', '.00', 'dBm'],
    [value(-117.018, 'dBm'), '−117', '.02', 'dBm'],
    [value(125, 'kHz'), '125', '', 'kHz'],
    [value(868.3, 'MHz'), '868', '.3', 'MHz'],
    [value(0.5, '1'), '0', '.5', ''],
    [value(-Infinity, 'dBm'), 'no power', '', ''],
  ] as const)('%o', (figure, whole, fraction, unit) => {
    expect(figureParts(figure)).toMatchObject({ kind: 'figure', whole, fraction, unit });
  });

  it('put together are the figure', () => {
    expect(figureText(value(-117.018, 'dBm'))).toBe('−117.02 dBm');
    expect(figureText(value(-117.018, 'dBm'), 1)).toBe('−117.0 dBm');
    expect(figureText(value(3, '1'))).toBe('3');
  });

  it('hold the linear value of decibel figures alone', () => {
    expect(linearText(value(14, 'dBm'))).toBe('25.12 mW');
    expect(linearText(value(-3, 'dB'))).toBe('× 0.5012');
    expect(linearText(value(125, 'kHz'))).toBeUndefined();
  });

  it.each<[Figure, string]>([
    [{ state: 'withheld', code: 'levels-summed' }, 'withheld'],
    [{ state: 'waiting', roots: ['N_tot'] }, 'waits for N_tot'],
    [{ state: 'waiting', roots: ['N', 'I'] }, 'waits for N, I'],
    [{ state: 'waiting', roots: [] }, 'waits'],
    [{ state: 'empty' }, ''],
  ])('%o says %s', (figure, words) => {
    expect(figureText(figure)).toBe(words);
  });
});

import { expect, it } from 'vitest';

import { findUnit, type Unit } from '../../../src/quantity';
import type { Permitted } from '../../../src/review';
import { writePermitted } from '../../../src/ui/panels/pool-words';

const unit = (word: string): Unit => {
  const found = findUnit(word);
  if (found === undefined) throw new Error(word);
  return found;
};

const value = (bound: 'at least' | 'at most', figure: number, word: string, room: number): Permitted => ({
  ...{ state: 'value', bound, value: figure, unit: unit(word), room },
});

it.each([
  [value('at most', -86.654, 'dBm', 3.346), '≤ −86.65 dBm', '3.35 dB to spare', true],
  [value('at most', 5, 'K', -58), '≤ 5 K', '58 K too much', false],
  [value('at least', 22.3, 'dB', -2.3), '≥ 22.30 dB', '2.30 dB too little', false],
  [value('at least', 12, 'dB', 0), '≥ 12.00 dB', '0.00 dB to spare', true],
  [value('at most', -86.654, 'dBm', -0.001), '≤ −86.65 dBm', 'less than 0.01 dB too much', false],
  [value('at most', -Infinity, 'dBm', -Infinity), 'no power', '', false],
])('a value %#', (permitted, bound, distance, isKept) => {
  expect(writePermitted(permitted, 'at most')).toEqual({ bound, distance, isKept });
});

it('says why no value would do, or any', () => {
  expect(writePermitted({ state: 'none' }, 'at most').distance).toBe('the others alone exceed it');
  expect(writePermitted({ state: 'none' }, 'at least').distance).toBe('the others alone fall short of it');
  expect(writePermitted({ state: 'any' }, 'at least')).toMatchObject({ bound: 'any', isKept: true });
});

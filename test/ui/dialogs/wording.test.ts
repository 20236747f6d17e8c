import { describe, expect, it } from 'vitest';

import { writeCount, writeSize, writeWhen } from '../../../src/ui/dialogs/wording';

const at = (...parts: [number, number, number, number, number]): number => new Date(...parts).getTime();

describe('when something was', () => {
  const now = at(2026, 10, 3, 15, 0);

  it.each([
    [at(2026, 10, 3, 14, 2), 'today 14:02'],
    [at(2026, 10, 3, 0, 0), 'today 00:00'],
    [at(2026, 10, 2, 23, 59), 'yesterday 23:59'],
    [at(2026, 10, 1, 12, 0), '1 Nov 2026, 12:00'],
    [at(2025, 10, 3, 9, 5), '3 Nov 2025, 09:05'],
  ])('%i is %s', (when, words) => expect(writeWhen(when, now)).toBe(words));

  it('yesterday may be in the month before', () => {
    expect(writeWhen(at(2026, 1, 28, 8, 0), at(2026, 2, 1, 8, 0))).toBe('yesterday 08:00');
  });
});

describe('sizes', () => {
  it.each([
    [0, '0 B'],
    [840, '840 B'],
    [3_400, '3.4 kB'],
    [14_200, '14 kB'],
    [1_660_000, '1.7 MB'],
    [10_700_000_000, '10.7 GB'],
  ])('%i is %s', (bytes, words) => expect(writeSize(bytes)).toBe(words));
});

describe('counts', () => {
  it.each([
    [0, '0 lines'],
    [1, '1 line'],
    [9_999, '9999 lines'],
    [10_000, '10\u202f000 lines'],
    [1_234_567, '1\u202f234\u202f567 lines'],
  ])('%i', (count, words) => expect(writeCount(count, 'line')).toBe(words));

  it('takes an irregular plural', () => expect(writeCount(2, 'entry', 'entries')).toBe('2 entries'));
});

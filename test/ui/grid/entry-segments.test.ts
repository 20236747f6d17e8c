// Entries cut up for setting: nothing is lost, literals and marked places stand apart.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { entrySegments } from '../../../src/ui/grid/entry-segments';

describe('segments of an entry', () => {
  it('set typed literals apart', () => {
    expect(
      entrySegments('0.35 dB/m * len + 0.4 dB').map(({ text, literal }) => (literal ? `[${text}]` : text)),
    ).toEqual(['[0.35 dB/m]', ' * len + ', '[0.4 dB]']);
  });

  it('mark the place of a finding, across literals too', () => {
    const segments = entrySegments('N + 3 dB', { place: { start: 2, end: 8 }, severity: 'error' });
    expect(segments.map(({ text, literal, marked }) => [text, literal, marked])).toEqual([
      ['N ', false, null],
      ['+ ', false, 'error'],
      ['3 dB', true, 'error'],
    ]);
  });

  it('leave an entry that cannot be read in one piece', () => {
    expect(entrySegments('3 dB + (')).toEqual([{ text: '3 dB + (', literal: false, marked: null, found: false }]);
    expect(entrySegments('')).toEqual([]);
  });

  it('put together are the entry, whatever it is and wherever the mark', () => {
    const entry = fc.oneof(fc.string(), fc.constantFrom('P_tx - L + 2.15 dBi', 'powersum(N, -112 dBm)'));
    fc.assert(
      fc.property(entry, fc.nat(30), fc.nat(30), (text, start, length) => {
        const mark = { place: { start, end: start + length }, severity: 'warning' } as const;
        expect(
          entrySegments(text, mark)
            .map((one) => one.text)
            .join(''),
        ).toBe(text);
      }),
    );
  });
});

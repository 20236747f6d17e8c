import { describe, expect, it } from 'vitest';

import { barLength, writeRequirement, writeShare, writeStanding } from '../../../src/ui/panels/working-parts';

describe('shares', () => {
  it.each([
    [1, '100 %'],
    [0.739, '74 %'],
    [0.0996, '10 %'],
    [0.042, '4.2 %'],
    [0.001, '0.1 %'],
    [0.0004, 'under 0.1 %'],
    [0, '0 %'],
    [-0.25, '−25 %'],
  ])('%d', (share, words) => expect(writeShare(share)).toBe(words));

  it.each([
    [0.5, 0.5],
    [1.25, 1],
    [-0.25, 0],
  ])('%d fills %d of a bar', (share, length) => expect(barLength(share)).toBe(length));
});

describe('how a line stands to its requirement', () => {
  const standing = (margin: number, unit: string) =>
    writeStanding({ bound: 'at least', limit: 0, met: margin >= 0, margin, unit });

  it.each([
    [2.96, 'dB', 'met, 2.96 dB to spare'],
    [0, 'dB', 'met, 0.00 dB to spare'],
    [-0.4, 'dB', 'not met, 0.40 dB short'],
    [-0.001, 'dB', 'not met, less than 0.01 dB short'],
    [0.0049, 'dB', 'met, less than 0.01 dB to spare'],
    [12.5, 'K', 'met, 12.5 K to spare'],
    [-0.0004, 'K', 'not met, 400×10⁻⁶ K short'],
  ])('%d %s', (margin, unit, words) => expect(standing(margin, unit)).toBe(words));
});

describe('a requirement', () => {
  it('is written with its bound as typed', () => {
    expect(writeRequirement({ atLeast: '3 dB' })).toBe('at least 3 dB');
    expect(writeRequirement({ atMost: '-100 dBm' })).toBe('at most -100 dBm');
  });
});

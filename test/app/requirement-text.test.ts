// Requirements as people type them, and back.
import { describe, expect, it } from 'vitest';

import { readRequirement, writeRequirement } from '../../src/app/requirement-text';

describe('reading a requirement', () => {
  it.each([
    ['>= 3 dB', { atLeast: '3 dB' }],
    ['≥3 dB', { atLeast: '3 dB' }],
    ['at least 3 dB', { atLeast: '3 dB' }],
    ['At Least  P_min', { atLeast: 'P_min' }],
    ['3 dB', { atLeast: '3 dB' }],
    ['min. 3 dB', { atLeast: '3 dB' }],
    ['<= -100 dBm', { atMost: '-100 dBm' }],
    ['≤ −100 dBm', { atMost: '−100 dBm' }],
    ['at most 16 dBm', { atMost: '16 dBm' }],
    ['  ', undefined],
    ['>=', null],
    ['at most', null],
  ] as const)('%s', (text, requirement) => {
    expect(readRequirement(text)).toEqual(requirement);
  });

  it('does not take a symbol that begins like a comparison for one', () => {
    expect(readRequirement('min_level')).toEqual({ atLeast: 'min_level' });
  });
});

describe('writing a requirement', () => {
  it.each([{ atLeast: '3 dB' }, { atMost: '-100 dBm' }] as const)('reads back: %o', (requirement) => {
    expect(readRequirement(writeRequirement(requirement))).toEqual(requirement);
  });

  it('is empty without one', () => {
    expect(writeRequirement(undefined)).toBe('');
  });
});

// The call around the caret, marked by | in the entries.
import { describe, expect, it } from 'vitest';

import { callAt, signatureParts } from '../../../src/ui/grid/call-at';

describe('the call at the caret', () => {
  it.each([
    ['thermal_noise(|', 'thermal_noise', 0],
    ['thermal_noise(T_0, |', 'thermal_noise', 1],
    ['thermal_noise(T_0; B|)', 'thermal_noise', 1],
    ['powersum(a, db(b), |c)', 'powersum', 2],
    ['powersum(a, db(b|), c)', 'db', 0],
    ['powersum(a, (b + |c))', 'powersum', 1],
    ['N + I|', undefined, 0],
    ['db(x) + |', undefined, 0],
    ['(a + |b)', undefined, 0],
  ] as const)('%s', (marked, name, argument) => {
    const caret = marked.indexOf('|');
    const call = callAt(marked.replace('|', ''), caret);
    expect(call?.name).toBe(name);
    if (name !== undefined) expect(call?.argument).toBe(argument);
  });
});

describe('the signature with its argument', () => {
  it.each([
    [0, ['thermal_noise(', 'T', ', B)']],
    [1, ['thermal_noise(T, ', 'B', ')']],
    [7, ['thermal_noise(T, ', 'B', ')']],
  ] as const)('argument %i', (argument, parts) => {
    expect(signatureParts('thermal_noise(T, B)', argument)).toEqual(parts);
  });

  it('without brackets is left whole', () => {
    expect(signatureParts('pi', 0)).toEqual(['pi', '', '']);
  });
});

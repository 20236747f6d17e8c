/** Meaning exponents: the table of kinds, the nets that budgets have, and what a net makes of a result. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  combineMeanings,
  describeNet,
  hasAllowedNet,
  kindOfNet,
  meaningOf,
  NEUTRAL,
  QUANTITY_KINDS,
  SIDES,
  type Meaning,
} from '../../src/quantity';

const net = (w: number, u: number, l = 0, f = 0): Meaning => ({ w, u, f, l, declared: true });
const exponents = ({ w, u, f, l }: Meaning): readonly number[] => [w, u, f, l];

describe('the exponents (w, u, f, l) of a line', () => {
  it.each([
    ['level', 'wanted', [1, 0, 0, 0]],
    ['level', 'unwanted', [0, 1, 0, 0]],
    ['level', undefined, [0, 0, 0, 1]],
    ['temperature', undefined, [0, 1, 0, 0]],
    ['signal ratio', undefined, [1, -1, 0, 0]],
    ['impairment ratio', undefined, [-1, 1, 0, 0]],
    ['figure of merit', undefined, [0, -1, 0, 0]],
    ['noise figure', undefined, [0, 0, 1, 0]],
    ['gain', undefined, [0, 0, 0, 0]],
    ['loss', undefined, [0, 0, 0, 0]],
    ['bandwidth', undefined, [0, 0, 0, 0]],
    ['plain', undefined, [0, 0, 0, 0]],
  ] as const)('%s, %s: %j', (kind, side, expected) => {
    expect(exponents(meaningOf(kind, side, true))).toEqual(expected);
  });
});

describe('allowed nets', () => {
  it.each([
    [0, 0, 'a gain'],
    [1, 0, 'a wanted level'],
    [0, 1, 'noise'],
    [1, -1, 'C/N'],
    [-1, 1, 'EVM'],
    [0, -1, 'G/T'],
    [-1, 0, 'the inverse of a level'],
  ])('w = %d, u = %d: %s', (w, u) => {
    expect(hasAllowedNet(net(w, u))).toBe(true);
  });

  it.each([
    [2, 0],
    [0, 2],
    [1, 1],
    [2, -1],
    [2, -2],
    [-1, 2],
    [-2, 2],
    [1, -2],
    [0, -2],
    [-1, -1],
  ])('w = %d, u = %d is none', (w, u) => {
    expect(hasAllowedNet(net(w, u))).toBe(false);
  });

  it.each([
    [0, 0, 1, true, 'a level of unsaid side'],
    [1, -1, 1, true, 'level + S/N: a wanted level if that was noise'],
    [-1, 1, 1, true, 'level + dBc'],
    [0, 0, -1, true, 'something less a level'],
    [1, 0, -1, true, 'wanted less a level: a ratio'],
    [0, -1, 1, true, 'a level less noise'],
    [2, -2, 1, false, 'level + two S/N'],
    [0, 0, 2, false, 'two levels'],
    [1, 0, 1, false, 'a wanted level and another'],
  ])('with unsaid levels, w = %d, u = %d, l = %d: %s (%s)', (w, u, l, expected) => {
    expect(hasAllowedNet(net(w, u, l))).toBe(expected);
  });
});

describe('what a net makes', () => {
  it.each([
    [net(1, 0), false, { kind: 'level', side: 'wanted' }],
    [net(0, 1), false, { kind: 'level', side: 'unwanted' }],
    [net(0, 0, 1), false, { kind: 'level' }],
    [net(1, -1), true, { kind: 'signal ratio' }],
    [net(-1, 1), true, { kind: 'impairment ratio' }],
    [net(0, -1), false, { kind: 'figure of merit' }],
    [net(0, 0), true, { kind: 'gain' }],
    [net(0, 0, 0, 1), true, { kind: 'noise figure' }],
    [net(0, 0), false, undefined],
    [net(2, -1), true, undefined],
  ] as const)('%j', (meaning, dimensionless, expected) => {
    expect(kindOfNet(meaning, dimensionless)).toEqual(expected);
  });
});

describe('meanings', () => {
  const meanings = fc
    .tuple(fc.constantFrom(...QUANTITY_KINDS), fc.option(fc.constantFrom(...SIDES), { nil: undefined }), fc.boolean())
    .map(([kind, side, declared]) => meaningOf(kind, side, declared));

  it('add like dimensions: a·b, and a·a⁻¹ is neutral', () => {
    fc.assert(
      fc.property(meanings, meanings, (a, b) => {
        expect(exponents(combineMeanings(a, b))).toEqual(exponents(combineMeanings(b, a)));
        expect(exponents(combineMeanings(a, a, -1)).every((exponent) => exponent === 0)).toBe(true);
        expect(exponents(combineMeanings(NEUTRAL, a, 2))).toEqual(exponents(combineMeanings(a, a)));
      }),
    );
  });

  it('are declared only where everything in them is', () => {
    fc.assert(
      fc.property(meanings, meanings, (a, b) => {
        expect(combineMeanings(a, b).declared).toBe(a.declared && b.declared);
      }),
    );
  });

  it('are told in words', () => {
    expect(describeNet(net(2, -1))).toContain('2');
    expect(describeNet(NEUTRAL)).toBe('nothing');
  });
});

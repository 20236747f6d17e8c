// Tolerances as people type them, and back.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { editedTolerance, readTolerance, writeTolerance } from '../../src/app/tolerance-text';
import type { Tolerance } from '../../src/worksheet';

const read = (text: string): Tolerance | undefined => {
  const result = readTolerance(text);
  if (!result.ok) throw new Error(result.fault);
  return result.value;
};

describe('reading a tolerance', () => {
  it.each<[string, Tolerance | undefined]>([
    ['', undefined],
    ['  ', undefined],
    ['±0.5 dB', { below: '0.5 dB', above: '0.5 dB' }],
    ['+/- 0.5 dB', { below: '0.5 dB', above: '0.5 dB' }],
    ['+-0.5', { below: '0.5', above: '0.5' }],
    ['0.5 dB', { below: '0.5 dB', above: '0.5 dB' }],
    ['±2 %', { below: '2 %', above: '2 %' }],
    ['+0.3/-0.8 dB triangular', { above: '0.3 dB', below: '0.8 dB', shape: 'triangular' }],
    ['+0.3 dB -0.8 dB normal', { above: '0.3 dB', below: '0.8 dB', shape: 'normal' }],
    ['−0.8 dB, +0.3 dB', { above: '0.3 dB', below: '0.8 dB' }],
    ['+0.3-0.8 dB', { above: '0.3 dB', below: '0.8 dB' }],
    ['-1 dB', { below: '1 dB' }],
    ['+1e-3/-2e-3 MHz', { above: '1e-3 MHz', below: '2e-3 MHz' }],
    ['0.5 dB / 1 dB', { favourable: '0.5 dB', adverse: '1 dB' }],
    ['0.5/1 dB', { favourable: '0.5 dB', adverse: '1 dB' }],
    ['0.1 dB/km / 0.2 dB/km', { favourable: '0.1 dB/km', adverse: '0.2 dB/km' }],
    ['fav 0.5 dB adv 1 dB', { favourable: '0.5 dB', adverse: '1 dB' }],
    ['adverse 1 dB, favourable 0,5 dB', { favourable: '0,5 dB', adverse: '1 dB' }],
    ['adv 1 dB', { adverse: '1 dB' }],
    ['±0.5 dB group supply', { below: '0.5 dB', above: '0.5 dB', group: 'supply' }],
    ['±0.5 dB arcsine, group north mast', { below: '0.5 dB', above: '0.5 dB', shape: 'arcsine', group: 'north mast' }],
    ['Uniform ±1 K', { below: '1 K', above: '1 K', shape: 'uniform' }],
  ])('%s', (text, tolerance) => {
    expect(read(text)).toEqual(tolerance);
  });

  it.each([
    ['±1 dB normal 3σ', '1 dB'],
    ['±1 dB normal (2σ)', '1.5 dB'],
    ['±0.1 dB 1 σ', '0.3 dB'],
    ['±0.2 dB sigma', '0.6 dB'],
    ['±2 % 2 sigma', '3 %'],
  ])('puts limits at three deviations: %s', (text, at) => {
    expect(read(text)).toEqual({ below: at, above: at, shape: 'normal' });
  });

  it.each([
    ['±', /missing|no quantity/],
    ['triangular', /missing/],
    ['±0.5 dB group', /no name/],
    ['±0.5 parsnips', /“0.5 parsnips” is no quantity/],
    ['+0.3 +0.5 dB', /twice/],
    ['0.1/0.2/0.3 dB', /more than two/],
    ['±-0.5 dB', /sign too many/],
    ['fav 1 dB +1 dB', /“1 dB \+1 dB”/],
    ['±1 dB uniform 2σ', /not of a uniform/],
    ['±1 dB 0σ', /1σ, 2σ or 3σ/],
  ])('refuses with a sentence: %s', (text, fault) => {
    const result = readTolerance(text);
    expect(result.ok ? '' : result.fault).toMatch(fault);
  });
});

describe('writing a tolerance', () => {
  it.each<[Tolerance, string]>([
    [{ below: '0.5 dB', above: '0.5 dB' }, '±0.5 dB'],
    [{ below: '0.8 dB', above: '0.3 dB', shape: 'triangular' }, '+0.3/−0.8 dB triangular'],
    [{ below: '1 K', above: '2 %' }, '+2 % −1 K'],
    [{ favourable: '0.5 dB', adverse: '1 dB', shape: 'normal' }, 'fav 0.5 dB adv 1 dB normal 3σ'],
    [{ above: '1 dB', group: 'supply' }, '+1 dB group supply'],
  ])('%o', (tolerance, text) => {
    expect(writeTolerance(tolerance)).toBe(text);
  });

  it('is empty without one', () => {
    expect(writeTolerance(undefined)).toBe('');
  });

  it('reads back', () => {
    const magnitude = fc
      .tuple(
        fc.oneof(
          fc.integer({ min: 0, max: 999_999 }).map(String),
          fc.double({ min: 0, max: 1e6, noNaN: true }).map(String),
          fc.constantFrom('0,25', '1 000', '1e-3', '.5'),
        ),
        fc.constantFrom('', ' dB', ' %', ' MHz', ' dB/km', ' 1/K', ' K', ' µV', 'km'),
      )
      .map(([number, unit]) => number + unit);
    const withUnit = magnitude.filter((text) => /[^\d.,e\s+-]/u.test(text));
    // A bare magnitude beside one with a unit would take that unit: in a text they share it.
    const pair = fc.oneof(
      fc.tuple(withUnit, withUnit),
      fc.tuple(fc.integer({ min: 0 }).map(String), fc.integer({ min: 0 }).map(String)),
    );
    const sides = fc.oneof(
      pair.map(([below, above]) => ({ below, above })),
      pair.map(([favourable, adverse]) => ({ favourable, adverse })),
      magnitude.map((below) => ({ below })),
      magnitude.map((above) => ({ above })),
      magnitude.map((adverse) => ({ adverse })),
    );
    const tolerance = fc
      .tuple(
        sides,
        fc.option(fc.constantFrom('uniform', 'triangular', 'normal', 'arcsine' as const), { nil: undefined }),
        fc.option(fc.constantFrom('supply', 'north mast', 'normal group 2'), { nil: undefined }),
      )
      .map(([deviations, shape, group]) => ({
        ...deviations,
        ...(shape && { shape }),
        ...(group && { group }),
      })) as fc.Arbitrary<Tolerance>;
    fc.assert(
      fc.property(tolerance, (one) => {
        expect(read(writeTolerance(one))).toEqual(one);
      }),
      { numRuns: 500 },
    );
  });
});

describe('changing a tolerance', () => {
  const odd = { below: '-1 dB', above: '2 dB', later: 'kept' } as unknown as Tolerance;

  it('leaves one alone whose text has not changed, also one that does not read', () => {
    expect(editedTolerance(odd, writeTolerance(odd))).toEqual({ ok: true, value: odd });
  });

  it('keeps what it does not know, and takes nothing else over', () => {
    expect(editedTolerance(odd, 'adv 1 dB')).toEqual({ ok: true, value: { later: 'kept', adverse: '1 dB' } });
    expect(editedTolerance(odd, '')).toEqual({ ok: true, value: undefined });
  });
});

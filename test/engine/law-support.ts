/** What the property tests of chains, pools and curves have in common: worksheets of a few sections, and figures read from them. */
import fc from 'fast-check';
import { expect } from 'vitest';
import { Evaluation } from '../../src/engine';
import type { Section } from '../../src/worksheet';
import { valueOf } from './notation';

export const sheet = (...sections: readonly Section[]): Evaluation =>
  new Evaluation({ id: 'w', title: 'laws', cases: [{ id: 'nominal', name: 'Nominal' }], sections });

/** The figure of a symbol; a test that compares with none fails. */
export function figure(evaluation: Evaluation, symbol: string): number {
  const found = valueOf(evaluation, symbol);
  if (typeof found !== 'number') throw new Error(`${symbol}: ${found}`);
  return found;
}

/** Equal to one part in 10⁹, and to 10⁻⁹ of the unit near nothing. */
export const expectSame = (found: number, wanted: number): void => {
  expect(Math.abs(found - wanted)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(wanted)));
};

export const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true }).map(round);
/** To six decimals: figures are typed. */
export const round = (x: number): number => Math.round(x * 1e6) / 1e6 + 0;
export const written = (x: number, unit: string): string => `${x.toFixed(6)} ${unit}`;

/** Sweeps against single evaluations, and solving against roots that are known. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { brent, figuresAt, placesIn, solve, usualRange, type Range } from '../../src/analysis';
import { Evaluation } from '../../src/engine';
import { findUnit } from '../../src/quantity';
import { sheetOf } from '../engine/notation';
import { idOf } from './support';

const BUDGET = `d = 10 km
f = 868 MHz
P | dBm = 14 dBm - free_space_loss(d, f)
N = -120 dBm
I = -118 dBm
z = P - powersum(N, I)`;

describe('places of a sweep', () => {
  it('go from one end to the other, by equal steps or equal factors', () => {
    expect([...placesIn({ from: 0, to: 10, isLogarithmic: false }, 4)]).toEqual([0, 2.5, 5, 7.5, 10]);
    expect([...placesIn({ from: 100, to: 1, isLogarithmic: true }, 2)]).toEqual([100, expect.closeTo(10, 12), 1]);
    expect([...placesIn({ from: 3, to: -1, isLogarithmic: false }, 1)]).toEqual([3, -1]);
  });

  it('end exactly where they are to', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 1e6, noNaN: true }),
        fc.double({ min: 0.1, max: 1e6, noNaN: true }),
        fc.integer({ min: 1, max: 99 }),
        (from, to, steps) => {
          const places = placesIn({ from, to, isLogarithmic: true }, steps);
          expect([places.length, places[0], places[steps]]).toEqual([steps + 1, from, to]);
        },
      ),
    );
  });
});

describe('a sweep', () => {
  it('is what single evaluations give', () => {
    const evaluation = new Evaluation(sheetOf(BUDGET));
    const places = placesIn({ from: 0.5, to: 50, isLogarithmic: true }, 40);
    const symbols = ['z', 'P', 'N'];
    const columns = figuresAt(
      evaluation,
      idOf(evaluation, 'd'),
      'nominal',
      symbols.map((symbol) => idOf(evaluation, symbol)),
      places,
    );
    places.forEach((x, at) => {
      const single = new Evaluation(sheetOf(BUDGET.replace('d = 10 km', `d = ${String(x)} km`)));
      symbols.forEach((symbol, line) => {
        const figure = single.figure(idOf(single, symbol), 'nominal');
        expect(figure.state === 'value' ? figure.value : NaN).toBeCloseTo(columns[line]?.[at] ?? NaN, 10);
      });
    });
  });

  it('is withheld where the line is', () => {
    const evaluation = new Evaluation(sheetOf('x = 2\nz = log10(x)'));
    const [column] = figuresAt(
      evaluation,
      idOf(evaluation, 'x'),
      'nominal',
      [idOf(evaluation, 'z')],
      Float64Array.of(-1, 0, 10),
    );
    expect([...(column ?? [])]).toEqual([NaN, NaN, 1]);
  });
});

function rootsIn(text: string, wanted: number, range: Range): number[] {
  const evaluation = new Evaluation(sheetOf(text));
  return solve(evaluation, idOf(evaluation, 'x'), idOf(evaluation, 'z'), 'nominal', wanted, range);
}

const from = (low: number, high: number, isLogarithmic = false): Range => ({ from: low, to: high, isLogarithmic });
const close = (values: readonly number[], digits = 8): unknown[] =>
  values.map((value) => expect.closeTo(value, digits) as unknown);

describe('solving', () => {
  it('finds the figure, and the line then has the value wanted', () => {
    const evaluation = new Evaluation(sheetOf(BUDGET));
    const [d = NaN, ...more] = solve(
      evaluation,
      idOf(evaluation, 'd'),
      idOf(evaluation, 'z'),
      'nominal',
      10,
      from(0.1, 1000, true),
    );
    expect(more).toEqual([]);
    const single = new Evaluation(sheetOf(BUDGET.replace('d = 10 km', `d = ${String(d)} km`)));
    expect(single.figure(idOf(single, 'z'), 'nominal')).toMatchObject({ value: expect.closeTo(10, 9) as number });
  });

  it('finds every crossing of a line that rises and falls', () => {
    const roots = rootsIn('x = 1\nz = x^3 - 6*x^2 + 11*x', 6, from(-10, 10));
    expect(roots).toEqual(close([1, 2, 3]));
    expect(rootsIn('x = 1\nz = sin(x)', 0.5, from(0, 19))).toEqual(
      close([0, 1, 2].flatMap((k) => [Math.PI / 6 + 2 * k * Math.PI, (5 * Math.PI) / 6 + 2 * k * Math.PI])),
    );
  });

  it('finds two crossings nearer to each other than the places it looks at', () => {
    const middle = 1.2345;
    const text = `x = 1\nz = (x - ${String(middle)})^2`;
    expect(rootsIn(text, 1e-8, from(-10, 10))).toEqual(close([middle - 1e-4, middle + 1e-4]));
  });

  it('finds where a line only touches the value', () => {
    expect(rootsIn('x = 1\nz = (x - 1.2345)^2 + 3', 3, from(-10, 10))).toEqual(close([1.2345], 4));
  });

  it('finds crossings at the ends and at the places it looks at, once', () => {
    expect(rootsIn('x = 1\nz = x*(x - 8)', 0, from(0, 8))).toEqual(close([0, 8]));
    expect(rootsIn('x = 1\nz = 2*x', 0, from(-512, 512))).toEqual(close([0]));
  });

  it('finds none where there is none, or where nothing reaches the line', () => {
    expect(rootsIn('x = 1\nz = x^2 + 1', 0, from(-10, 10))).toEqual([]);
    expect(rootsIn('x = 1\nz = 3 dB', 3, from(-10, 10))).toEqual([]);
  });

  it('takes no jump for a crossing', () => {
    expect(rootsIn('x = 1\nz = if(x > 1.2345, 10, 0)', 5, from(-10, 10))).toEqual([]);
    expect(rootsIn('x = 1\nz = 1/(x - 1.2345)', 0, from(-10, 10))).toEqual([]);
    expect(rootsIn('x = 1\nz = floor(x) + x', 4.5, from(0, 10))).toEqual(close([2.5]));
  });

  it('tells the ends of a stretch on which the line keeps the value, as near as it looks', () => {
    const [low = NaN, high = NaN, ...more] = rootsIn('x = 1\nz = max(-2, min(x, 3)) + 0*x', 3, from(-5, 5));
    expect(more).toEqual([]);
    expect([low - 3, high]).toEqual([expect.closeTo(0, 1), 5]);
  });

  it('passes over gaps in which the line is withheld', () => {
    expect(rootsIn('x = 1\nz = sqrt(x^2 - 4)', 3, from(-10, 10))).toEqual(close([-Math.sqrt(13), Math.sqrt(13)]));
  });

  it('finds the roots of any polynomial with roots apart', () => {
    fc.assert(
      fc.property(fc.uniqueArray(fc.integer({ min: -90, max: 90 }), { minLength: 1, maxLength: 4 }), (tenths) => {
        const roots = tenths.map((tenth) => tenth / 10 + 0.0123).sort((a, b) => a - b);
        const product = roots.map((root) => `(x - (${String(root)}))`).join('*');
        expect(rootsIn(`x = 1\nz = ${product}`, 0, from(-10, 10))).toEqual(close(roots, 7));
      }),
      { numRuns: 40 },
    );
  });

  it('is exact to the last digits', () => {
    expect(brent((x) => x ** 2 - 2, 0, 2, -2, 2)).toBeCloseTo(Math.SQRT2, 15);
    expect(brent((x) => Math.exp(x) - 5, -100, 100, -5, 1e43)).toBeCloseTo(Math.log(5), 13);
  });
});

describe('where to look when nobody says', () => {
  it.each([
    ['dBm', -30, -90, 30, false],
    ['km', 5, 0.005, 5000, true],
    ['°C', 15, -135, 165, false],
    ['1', -2, -22, 18, false],
    ['1', 0, -100, 100, false],
  ])('%s, from %d', (word, figure, low, high, isLogarithmic) => {
    const unit = findUnit(word);
    if (unit === undefined) throw new Error(word);
    expect(usualRange(figure, unit)).toEqual({ from: low, to: high, isLogarithmic });
    expect(usualRange(NaN, unit)).toBeUndefined();
  });
});

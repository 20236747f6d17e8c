/** Percentiles against sorted arrays, moments, and the interval of a share against known values. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { momentsOf, PERCENTS, percentilesOf, select, shareOf } from '../../src/analysis';

const figures = fc.array(
  fc.oneof(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.integer({ min: -3, max: 3 }), fc.constant(-Infinity)),
  { minLength: 1, maxLength: 400 },
);

function bySorting(values: readonly number[], percent: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  const rank = (percent * (sorted.length - 1)) / 100;
  const [low = NaN, high = NaN] = [sorted[Math.floor(rank)], sorted[Math.ceil(rank)]];
  return low === high ? low : low + (rank - Math.floor(rank)) * (high - low);
}

describe('percentiles', () => {
  it('are those of the sorted figures', () => {
    fc.assert(
      fc.property(figures, (values) => {
        const found = percentilesOf(Float64Array.from(values), PERCENTS);
        PERCENTS.forEach((percent, at) => {
          const expected = bySorting(values, percent);
          if (Number.isFinite(expected)) expect(found[at]).toBeCloseTo(expected, 9);
          else expect(found[at]).toBe(expected);
        });
      }),
    );
  });

  it('are those of sorted, reversed and constant columns as well', () => {
    const ascending = Float64Array.from({ length: 1001 }, (_, i) => i);
    expect(percentilesOf(ascending.slice(), PERCENTS)).toEqual([1, 10, 50, 500, 950, 990, 999]);
    expect(percentilesOf(ascending.slice().reverse(), PERCENTS)).toEqual([1, 10, 50, 500, 950, 990, 999]);
    expect(percentilesOf(new Float64Array(500).fill(2.5), PERCENTS)).toEqual(PERCENTS.map(() => 2.5));
  });

  it('select every rank', () => {
    fc.assert(
      fc.property(figures, fc.nat(399), (values, seed) => {
        const rank = seed % values.length;
        const sorted = [...values].sort((a, b) => a - b);
        expect(select(Float64Array.from(values), rank, 0, values.length - 1)).toBe(sorted[rank]);
      }),
    );
  });

  it('of none are none', () => {
    expect(percentilesOf(new Float64Array(0), PERCENTS)).toEqual(PERCENTS.map(() => NaN));
  });
});

describe('moments', () => {
  it('are the mean and the standard deviation of a sample', () => {
    expect(momentsOf(Float64Array.of(2, 4, 4, 4, 5, 5, 7, 9))).toEqual({
      mean: 5,
      standardDeviation: Math.sqrt(32 / 7),
    });
    expect(momentsOf(Float64Array.of(3))).toEqual({ mean: 3, standardDeviation: 0 });
    expect(momentsOf(new Float64Array(0)).mean).toBeNaN();
  });

  it('keep small deviations of large figures', () => {
    const values = Float64Array.from({ length: 1000 }, (_, i) => 1e6 + (i % 2 === 0 ? 0.001 : -0.001));
    expect(momentsOf(values).standardDeviation).toBeCloseTo(0.001 * Math.sqrt(1000 / 999), 9);
  });
});

describe('the 95 % interval of a share', () => {
  // The roots of (p̂ − p)² = z²·p(1 − p)/n, which define it.
  it('solves its defining equation', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1000 }), fc.nat(1000), (count, part) => {
        const met = Math.min(part, count);
        const { share, low, high } = shareOf(met, count);
        for (const p of [low, high]) {
          if ((p === 0 && met === 0) || (p === 1 && met === count)) continue;
          expect((share - p) ** 2).toBeCloseTo((1.959963984540054 ** 2 * p * (1 - p)) / count, 10);
        }
        expect(low).toBeLessThanOrEqual(share);
        expect(high).toBeGreaterThanOrEqual(share);
      }),
    );
  });

  it('is 0 to 27.75 % for none of ten, and 23.66 to 76.34 % for five', () => {
    expect(shareOf(0, 10)).toEqual({ share: 0, low: 0, high: expect.closeTo(0.27753, 5) as number });
    expect(shareOf(5, 10).low).toBeCloseTo(0.23659, 5);
    expect(shareOf(5, 10).high).toBeCloseTo(0.76341, 5);
  });
});

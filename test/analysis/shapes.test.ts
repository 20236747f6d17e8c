/** Shapes: quantiles against the moments of the contract by quadrature, and the normal quantile against tables and its own density. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { meanDeviation, normalQuantile, quantileOf, varianceOf, type Spread } from '../../src/analysis';

const SHAPES = ['uniform', 'triangular', 'normal', 'arcsine'] as const;

const spreads = fc.record({
  below: fc.double({ min: 0, max: 10, noNaN: true }),
  above: fc.double({ min: 0.01, max: 10, noNaN: true }),
  shape: fc.constantFrom(...SHAPES),
});

/** Mean of a function of the deviation, by the midpoint rule over its quantiles. */
function meanOf(spread: Spread, of: (deviation: number) => number): number {
  const count = 40_000;
  let sum = 0;
  for (let i = 0; i < count; i++) sum += of(quantileOf(spread, (i + 0.5) / count));
  return sum / count;
}

describe('shapes', () => {
  it('have the mean and the variance of the contract', () => {
    fc.assert(
      fc.property(spreads, (spread) => {
        const width = spread.below + spread.above;
        const mean = meanOf(spread, (x) => x);
        const variance = meanOf(spread, (x) => (x - mean) ** 2);
        expect(Math.abs(mean - meanDeviation(spread))).toBeLessThan(1e-3 * width);
        expect(Math.abs(variance / varianceOf(spread) - 1)).toBeLessThan(2e-3);
      }),
      { numRuns: 40 },
    );
  });

  it.each([
    ['uniform', 0.5, 9 / 12],
    ['triangular', 1 / 3, (4 + 1 + 2) / 18],
    ['normal', 0.5, (3 / 6) ** 2],
    ['arcsine', 0.5, 9 / 8],
  ] as const)('%s of 2 above and 1 below', (shape, mean, variance) => {
    const spread = { below: 1, above: 2, shape };
    expect(meanDeviation(spread)).toBeCloseTo(mean, 14);
    expect(varianceOf(spread)).toBeCloseTo(variance, 14);
  });

  it('end at their limits, but for the normal one, whose limits are at three standard deviations', () => {
    for (const shape of SHAPES) {
      const spread = { below: 1, above: 3, shape };
      const [low, high] = [quantileOf(spread, 1e-14), quantileOf(spread, 1 - 1e-14)];
      if (shape === 'normal') {
        expect(quantileOf(spread, 0.0013498980316300933)).toBeCloseTo(-1, 12);
        expect(low).toBeLessThan(-3);
      } else {
        expect(low).toBeCloseTo(-1, 6);
        expect(high).toBeCloseTo(3, 6);
      }
    }
  });

  it('have quantiles that never fall, and a triangle its mode at the value', () => {
    fc.assert(
      fc.property(spreads, fc.double({ min: 1e-12, max: 0.999, noNaN: true }), (spread, p) => {
        expect(quantileOf(spread, p + 1e-4)).toBeGreaterThanOrEqual(quantileOf(spread, p));
      }),
    );
    expect(quantileOf({ below: 1, above: 3, shape: 'triangular' }, 0.25)).toBeCloseTo(0, 15);
  });

  it('of one side alone stay on that side', () => {
    for (const shape of ['uniform', 'triangular', 'arcsine'] as const) {
      expect(quantileOf({ below: 0, above: 2, shape }, 1e-9)).toBeGreaterThanOrEqual(0);
      expect(quantileOf({ below: 2, above: 0, shape }, 1 - 1e-9)).toBeLessThanOrEqual(0);
    }
  });
});

describe('the normal quantile', () => {
  // Tabulated: M. Abramowitz and I. A. Stegun, Handbook of Mathematical Functions, table 26.5, and the usual two-sided points.
  it.each([
    [0.5, 0],
    [0.975, 1.959963984540054],
    [0.99, 2.3263478740408408],
    [0.999, 3.090232306167813],
    [0.999999, 4.753424308822899],
    [1e-10, -6.361340902404056],
    [1e-300, -37.0470962993612],
  ])('of %d', (p, expected) => {
    expect(Math.abs(normalQuantile(p) - expected)).toBeLessThan(5e-12 * Math.max(1, Math.abs(expected)));
  });

  it('is odd, and its slope is one over the density', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 0.5, noNaN: true }), (p) => {
        expect(Math.abs(normalQuantile(p) + normalQuantile(1 - p))).toBeLessThan(1e-9);
        const x = normalQuantile(p);
        const density = Math.exp(-(x ** 2) / 2) / Math.sqrt(2 * Math.PI);
        const h = 1e-4 * p;
        const slope = (normalQuantile(p + h) - normalQuantile(p - h)) / (2 * h);
        expect(Math.abs(slope * density - 1)).toBeLessThan(1e-5);
      }),
    );
  });
});

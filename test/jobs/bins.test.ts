/** Statistics in memory that does not grow: against those of all figures, within the error that is stated. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { PERCENTS, percentilesOf, statisticsOf } from '../../src/analysis';
import { BINS, countInto, gridOver, quantilesOf } from '../../src/jobs/bins';
import { exactStatistics } from '../../src/jobs/exact';
import { coarsened, SPECTRUM_BINS, spectrumOf } from '../../src/jobs/spectrum';
import { runJob } from '../../src/analysis';
import { openInline } from '../../src/jobs/inline-runner';
import { exactly, outcomeOf, runOf } from './support';

const quantiles = (
  figures: Float64Array,
  sample: number,
  percents: readonly number[],
): { found: number[]; step: number } => {
  const grid = gridOver(figures.subarray(0, sample));
  const bins = new Uint32Array(BINS);
  const off = countInto(bins, grid, figures);
  const least = figures.reduce((a, b) => Math.min(a, b), Infinity);
  const greatest = figures.reduce((a, b) => Math.max(a, b), -Infinity);
  return { found: quantilesOf({ bins, ...off }, grid, { least, greatest }, percents), step: grid.step };
};

describe('quantiles from bins', () => {
  it('differ by less than a bin, whatever the figures', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -200, max: 200, noNaN: true }), { minLength: 1, maxLength: 300 }),
        (list) => {
          const figures = Float64Array.from(list);
          const percents = [0, ...PERCENTS, 100];
          const { found, step } = quantiles(figures, figures.length, percents);
          const expected = percentilesOf(figures.slice(), percents);
          found.forEach((figure, at) =>
            expect(Math.abs(figure - (expected[at] as number))).toBeLessThanOrEqual(step * 1.001),
          );
        },
      ),
    );
  });

  it('of equal figures are that figure, and of none NaN', () => {
    expect(quantiles(new Float64Array(50).fill(3.7), 10, [1, 50, 99]).found).toEqual([3.7, 3.7, 3.7]);
    expect(quantiles(new Float64Array(0), 0, [50]).found).toEqual([NaN]);
  });

  it('off the grid are the least and the greatest', () => {
    const figures = Float64Array.from([0, 1, 0.5, 100, 100, -100, -Infinity]);
    expect(quantiles(figures, 3, [0, 100]).found).toEqual([-Infinity, 100]);
  });
});

describe('a run that keeps no figures', () => {
  it('has exact counts, mean and deviation to rounding, and percentiles within a bin', async () => {
    const count = 2_000_001;
    const outcome = await outcomeOf(runOf(count), openInline, { size: 1, chunk: 32 * 8192 });
    const figures = runJob({ ...runOf(count), from: 0, to: count });
    const expected = exactly(figures);
    const { statistics, quantileError } = outcome;
    expect(statistics.met).toEqual(expected.met);
    expect(statistics.count).toBe(count);
    expect(Math.abs(statistics.mean / expected.mean - 1)).toBeLessThan(1e-13);
    expect(Math.abs(statistics.standardDeviation / expected.standardDeviation - 1)).toBeLessThan(1e-12);
    // A bin is a small part of a decibel here.
    expect(quantileError).toBeLessThan(0.001);
    statistics.percentiles.forEach((figure, at) =>
      expect(Math.abs(figure - (expected.percentiles[at] as number))).toBeLessThan(quantileError),
    );
    const { counts, below, above } = outcome.spectrum;
    expect(counts.reduce((sum, one) => sum + one, below + above)).toBe(count);
    expect(counts.length).toBeLessThanOrEqual(SPECTRUM_BINS);
  });
});

describe('a spectrum', () => {
  it('has every finite figure in a bin, the greatest too', () => {
    const { counts, from, step } = spectrumOf(Float64Array.from([1, 2, 3, 3, NaN, -Infinity]));
    expect([counts[0], counts[256], counts.at(-1)]).toEqual([1, 1, 2]);
    expect(from + step * SPECTRUM_BINS).toBe(3);
  });

  it('of equal figures is one bin, and of none an empty one', () => {
    expect(spectrumOf(Float64Array.from([2, 2]))).toMatchObject({ from: 2, step: 0, counts: Float64Array.of(2) });
    expect(spectrumOf(Float64Array.of(NaN))).toMatchObject({ counts: Float64Array.of(0) });
  });

  it('joined from finer bins keeps their sum and their places', () => {
    const figures = Float64Array.from({ length: 4000 }, (_, i) => Math.sin(i) * 5);
    const grid = gridOver(figures);
    const bins = new Uint32Array(BINS);
    const off = countInto(bins, grid, figures);
    const { from, step, counts } = coarsened({ bins, ...off }, grid, 0);
    expect(counts.reduce((a, b) => a + b)).toBe(4000);
    expect(from).toBeLessThanOrEqual(-5 + grid.step);
    expect(Math.abs(from + step * counts.length - 5)).toBeLessThan(2 * step);
    const { mean } = statisticsOf(figures, undefined);
    const binned = counts.reduce((sum, count, bin) => sum + count * (from + (bin + 0.5) * step), 0) / 4000;
    expect(Math.abs(binned - mean)).toBeLessThan(step);
  });
});

describe('exact statistics', () => {
  const figure = fc.oneof(
    fc.double({ min: -200, max: 200, noNaN: true }),
    fc.constantFrom(-Infinity, NaN, 0, 1, -69),
    fc.integer({ min: -80, max: -60 }),
  );

  it('are those of analysis bit for bit', () => {
    fc.assert(
      fc.property(fc.array(figure, { maxLength: 400 }), (list) => {
        const figures = Float64Array.from(list);
        const expected = exactly(figures);
        expect(exactStatistics(figures, { bound: 'at least', limit: -69, met: true, margin: 0, unit: 'dB' })).toEqual(
          expected,
        );
      }),
      { numRuns: 1000 },
    );
  });
});

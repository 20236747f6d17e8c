import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import type { Spectrum } from '../../../src/jobs';
import {
  layoutHistogram,
  slicesOf,
  type HistogramLayout,
  type HistogramMark,
  type HistogramOptions,
} from '../../../src/ui/analysis/histogram-layout';
import { boxesMeet, isWithin } from '../../../src/ui/plots/boxes';

/** A triangle of trials from 0 to 10, 100 at its top. */
const SPECTRUM: Spectrum = {
  ...{ from: 0, step: 0.1, below: 0, above: 0 },
  counts: Float64Array.from({ length: 100 }, (_, i) => (i < 50 ? 2 * i + 1 : 2 * (99 - i) + 1)),
};
const ALL = SPECTRUM.counts.reduce((sum, count) => sum + count, 0);

const mark = (name: string, value: number): HistogramMark => ({ name, value, style: 'limit' });
const layout = (
  marks: readonly HistogramMark[] = [],
  more: Partial<HistogramOptions> = {},
  spectrum = SPECTRUM,
): HistogramLayout =>
  layoutHistogram(spectrum, marks, { widthPx: 640, form: 'bars', given: ALL, xTitle: 'M, dB', ...more });

const NAMES = ['required at least', 'nominal', 'all adverse', 'all favourable', 'mean − 3σ', 'mean + 3σ'];

describe('slices', () => {
  it('join bins and hold every trial once', () => {
    const slices = slicesOf(SPECTRUM, ALL, 30);
    expect(slices).toHaveLength(25);
    expect(slices.reduce((sum, { count }) => sum + count, 0)).toBe(ALL);
    expect(slices.reduce((sum, { percent }) => sum + percent, 0)).toBeCloseTo(100, 9);
    expect(slices[12]?.atOrBelow).toBeGreaterThan(50);
    expect(slices.at(-1)?.atOrBelow).toBeCloseTo(100, 9);
  });

  it('begin above what is below all bins, such as no power', () => {
    const [first] = slicesOf({ ...SPECTRUM, above: 100 }, ALL + 300, 100);
    // 200 of the 300 others are below.
    expect(first?.atOrBelow).toBeCloseTo((100 * 201) / (ALL + 300), 9);
  });
});

describe('bars', () => {
  it('stand on the axis, touch but do not overlap, and are as high as their share', () => {
    const { bars, plot, yTicks } = layout();
    const [zero] = yTicks;
    expect(zero).toEqual({ y: plot.bottom, text: '0' });
    bars.forEach((bar, index) => {
      expect(bar.y + bar.height).toBeCloseTo(plot.bottom, 9);
      expect(bar.y).toBeGreaterThanOrEqual(plot.top);
      const next = bars[index + 1];
      if (next !== undefined) expect(next.x).toBeGreaterThanOrEqual(bar.x + bar.width);
    });
    const highest = Math.max(...bars.map(({ height }) => height));
    const lowest = bars[0]?.height ?? 0;
    const slices = slicesOf(SPECTRUM, ALL, bars.length);
    expect(lowest / highest).toBeCloseTo((slices[0]?.count ?? 0) / Math.max(...slices.map(({ count }) => count)), 9);
  });

  it('are hollow on the side that fails', () => {
    const below = layout([], { failing: { side: 'below', limit: 5 } }).bars;
    const above = layout([], { failing: { side: 'above', limit: 5 } }).bars;
    below.forEach((bar, index) => expect(bar.isFailing).toBe(above[index]?.isFailing === false));
    expect(below[0]?.isFailing).toBe(true);
    expect(below.at(-1)?.isFailing).toBe(false);
  });

  it('of equal figures are one', () => {
    const { bars } = layout(
      [mark('nominal', 3)],
      { given: 7 },
      {
        ...{ from: 3, step: 0, below: 0, above: 0 },
        counts: Float64Array.of(7),
      },
    );
    expect(bars).toHaveLength(1);
    expect(bars[0]?.width).toBe(2);
  });
});

describe('the cumulative curve', () => {
  it('rises from none to all and never falls', () => {
    const { curve, plot, bars, yTicks } = layout([], { form: 'cumulative' });
    expect(bars).toEqual([]);
    expect(yTicks.at(-1)?.text).toBe('100');
    expect(curve[0]?.y).toBe(plot.bottom);
    expect(curve.at(-1)?.y).toBeCloseTo(plot.top, 9);
    curve.slice(1).forEach(({ x, y }, index) => {
      expect(x).toBeGreaterThan(curve[index]?.x ?? Infinity);
      expect(y).toBeLessThanOrEqual(curve[index]?.y ?? -Infinity);
    });
    // Half of the trials are up to the middle.
    expect(curve[50]?.y).toBeCloseTo((plot.top + plot.bottom) / 2, 9);
  });
});

describe('marks', () => {
  it('stand at their figures, on an axis that holds them', () => {
    const { marks, plot, xTicks } = layout([mark('all adverse', -4), mark('all favourable', 15)]);
    expect(xTicks.map(({ text }) => text)).toEqual(['−4', '−2', '0', '2', '4', '6', '8', '10', '12', '14', '16']);
    expect(marks.map(({ text }) => text)).toEqual(['all adverse', 'all favourable']);
    expect(marks[0]?.x).toBe(plot.left);
    expect(marks[1]?.x).toBeCloseTo(plot.left + (19 / 20) * (plot.right - plot.left), 9);
  });

  it('that are far off or no figures are left out, the former told in words', () => {
    const { marks, outside } = layout([mark('nominal', NaN), mark('required at least', -40), mark('mean + 3σ', 99)]);
    expect(marks).toEqual([]);
    expect(outside).toEqual([
      'Not drawn: “required at least”, far below all trials.',
      'Not drawn: “mean + 3σ”, far above all trials.',
    ]);
  });

  it('have words that meet nothing, wherever they are and however narrow the place', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -8, max: 18, noNaN: true }), { minLength: 6, maxLength: 6 }),
        fc.integer({ min: 290, max: 900 }),
        (values, widthPx) => {
          const { marks, width, height } = layout(
            NAMES.map((name, index) => mark(name, values[index] ?? 0)),
            { widthPx },
          );
          const edge = { left: 0, top: 0, right: width, bottom: height };
          for (const one of marks) {
            expect(one.text).toBe(one.name);
            expect(isWithin(one.box, edge)).toBe(true);
            for (const other of marks) {
              if (other === one) continue;
              expect(boxesMeet(one.box, other.box)).toBe(false);
              const crosses = other.x > one.box.left && other.x < one.box.right && other.y < one.box.bottom;
              expect(crosses).toBe(false);
            }
          }
        },
      ),
      { numRuns: 300 },
    );
  });
});

// Where swing bars and swept curves are drawn.
import { describe, expect, it } from 'vitest';

import { sweepView } from '../../../src/app/analysis-sweep';
import { variedInputs } from '../../../src/app/analysis-varied';
import { describeSweep, layoutSweep } from '../../../src/ui/analysis/sweep-layout';
import { layoutSwings, type SwingInput } from '../../../src/ui/analysis/swing-layout';
import { textWidth } from '../../../src/ui/plots/boxes';
import { evaluationOf } from '../../app/analysis-sheet';

describe('swing bars', () => {
  const inputs: readonly SwingInput[] = [
    { adverse: -3, favourable: 2, adverseText: '−3.00 dB', favourableText: '+2.00 dB' },
    { adverse: -1, favourable: -0.5, adverseText: '−1.00 dB', favourableText: '−0.50 dB' },
    { adverse: NaN, favourable: 0, adverseText: '—', favourableText: '0.00 dB' },
  ];
  const layout = layoutSwings(inputs, 'higher', 300);

  it('are on one scale, worse to the left', () => {
    const [first, second] = layout.rows;
    expect(first?.adverse.x).toBeLessThan(layout.middle);
    expect(first?.favourable.x).toBe(layout.middle);
    expect((first?.favourable.width ?? 0) / (first?.adverse.width ?? 1)).toBeCloseTo(2 / 3, 9);
    expect((second?.adverse.width ?? 0) / (first?.adverse.width ?? 1)).toBeCloseTo(1 / 3, 9);
    // An input that worsens the line at both of its limits has both bars there.
    expect((second?.favourable.x ?? 0) + (second?.favourable.width ?? 0)).toBe(layout.middle);
  });

  it('turn round where lower is better', () => {
    const lower = layoutSwings([{ ...inputs[0], adverse: 3, favourable: -2 } as SwingInput], 'lower', 300);
    expect(lower.rows[0]?.adverse.x).toBeLessThan(lower.middle);
  });

  it.each([150, 300, 900])('have room for their labels in %d px', (width) => {
    const { rows, width: whole } = layoutSwings(inputs, 'higher', width);
    for (const { left, right } of rows) {
      expect(left.x - textWidth(left.text, 11)).toBeGreaterThanOrEqual(-1e-9);
      expect(right.x + textWidth(right.text, 11)).toBeLessThanOrEqual(whole + 1e-9);
    }
  });

  it('have strokes within the bar alone', () => {
    const { adverse } = layout.rows[0] ?? {};
    const xs = [...(adverse?.hatch ?? '').matchAll(/[ML](-?[\d.]+) /g)].map(([, x]) => Number(x));
    expect(xs.length).toBeGreaterThan(10);
    for (const x of xs) {
      expect(x).toBeGreaterThanOrEqual((adverse?.x ?? 0) - 0.1);
      expect(x).toBeLessThanOrEqual((adverse?.x ?? 0) + (adverse?.width ?? 0) + 0.1);
    }
  });

  it('are none where nothing moves the line', () => {
    const still = layoutSwings([{ adverse: 0, favourable: 0, adverseText: '', favourableText: '' }], 'higher', 300);
    expect(still.rows[0]?.adverse).toMatchObject({ width: 0, hatch: '' });
  });
});

describe('a sweep', () => {
  const evaluation = evaluationOf();
  const { cases } = evaluation.worksheet;
  const input = variedInputs(evaluation, 'S', 'calm').find(({ symbol }) => symbol === 'd');
  if (input === undefined) throw new Error('d is an input');
  const view = (from: number, to: number, isLogarithmic: boolean, steps = 40) =>
    sweepView(evaluation, 'S', input, cases, { from, to, isLogarithmic }, steps);

  it.each([
    [1, 10, true],
    [10, 1, true],
    [1, 10, false],
    [-1, 3, false],
  ] as const)('from %d to %d, logarithmic %s, stays within its frame', (from, to, isLogarithmic) => {
    const layout = layoutSweep(view(from, to, isLogarithmic), 400);
    if (layout === undefined) throw new Error('there are figures');
    const { plot } = layout;
    for (const { path } of layout.curves) {
      const points = [...path.matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)].map(
        ([, x, y]) => [Number(x), Number(y)] as const,
      );
      expect(points.length).toBeGreaterThan(5);
      for (const [x, y] of points) {
        expect(x).toBeGreaterThanOrEqual(plot.left - 0.1);
        expect(x).toBeLessThanOrEqual(plot.right + 0.1);
        expect(y).toBeGreaterThanOrEqual(plot.top - 0.1);
        expect(y).toBeLessThanOrEqual(plot.bottom + 0.1);
      }
    }
    for (const { x } of layout.xTicks) {
      expect(x).toBeGreaterThanOrEqual(plot.left - 0.1);
      expect(x).toBeLessThanOrEqual(plot.right + 0.1);
    }
  });

  it('marks crossings on the bound, where the curve meets it', () => {
    const layout = layoutSweep(view(1, 10, true), 700);
    const [limit] = layout?.limits ?? [];
    expect(limit?.label?.text).toBe('at least 3.00 dB');
    expect(layout?.crossings).toHaveLength(2);
    for (const { x, y } of layout?.crossings ?? []) {
      expect(y).toBe(limit?.y);
      const share = (x - (layout?.plot.left ?? 0)) / ((layout?.plot.right ?? 1) - (layout?.plot.left ?? 0));
      expect(10 ** share).toBeCloseTo(2.36248, 4);
    }
  });

  it('sets the names at the ends apart, and strokes by which curves differ', () => {
    const layout = layoutSweep(view(1, 10, true), 700);
    const [first, second] = layout?.curves ?? [];
    expect([first?.label?.text, second?.label?.text]).toEqual(['Calm', 'Storm']);
    expect(Math.abs((first?.label?.y ?? 0) - (second?.label?.y ?? 0))).toBeGreaterThanOrEqual(15);
    expect(first?.dash).not.toBe(second?.dash);
  });

  it('leaves gaps, and is none without figures', () => {
    const layout = layoutSweep(view(-1, 3, false), 400);
    expect(layout?.curves[0]?.path.match(/M/g)).toHaveLength(1);
    expect(layoutSweep(view(-3, -1, false), 400)).toBeUndefined();
  });

  it('says what it shows', () => {
    expect(describeSweep(view(1, 10, true))).toBe(
      'S while d goes from 1 km to 10 km, by its logarithm. 3.00 dB is reached at 2.362 km (Calm). 3.00 dB is reached at 2.362 km (Storm).',
    );
  });
});

/** The laws of pools and curves, as properties of the whole way from the document to the figure. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CurveSection, Line, PoolSection } from '../../src/worksheet';
import { between, expectSame, figure, round, sheet, written } from './law-support';
import { valueOf } from './notation';

describe('a pool', () => {
  const level = between(-150, -50);
  const contributions = fc.array(fc.record({ level, off: fc.boolean() }), { minLength: 1, maxLength: 7 });
  const poolOf = (lines: readonly Line[]): PoolSection => ({
    id: 'p',
    kind: 'pool',
    symbol: 'N_I',
    title: 'Pool',
    unit: 'dBm',
    lines,
  });
  const lineOf = (dBm: number, index: number, off = false): Line => ({
    id: `l${String(index)}`,
    symbol: `I_${String(index)}`,
    label: '',
    entry: written(dBm, 'dBm'),
    ...(off ? { off: true } : {}),
  });

  it('has the power sum of its lines as total, in whatever order they stand', () => {
    fc.assert(
      fc.property(fc.array(level, { minLength: 1, maxLength: 7 }), fc.infiniteStream(fc.nat()), (levels, keys) => {
        const lines = levels.map((dBm, i) => lineOf(dBm, i));
        const shuffled = lines
          .map((line) => ({ line, key: keys.next().value as number }))
          .sort((a, b) => a.key - b.key)
          .map(({ line }) => line);
        const sum = 10 * Math.log10(levels.reduce((total, dBm) => total + 10 ** (dBm / 10), 0));
        expectSame(figure(sheet(poolOf(lines)), 'N_I'), sum);
        expectSame(figure(sheet(poolOf(shuffled)), 'N_I'), sum);
        const asSum = { id: 's', kind: 'lines', title: '', lines: [...lines, summing(lines)] } as const;
        expectSame(figure(sheet(asSum), 'sum'), sum);
      }),
    );
  });

  const summing = (lines: readonly Line[]): Line => ({
    id: 'sum',
    symbol: 'sum',
    label: '',
    entry: `powersum(${lines.map(({ symbol }) => symbol).join(', ')})`,
  });

  it('counts a line that is switched off as one that is not there', () => {
    fc.assert(
      fc.property(contributions, (list) => {
        const lines = list.map(({ level: dBm, off }, i) => lineOf(dBm, i, off));
        const on = lines.filter(({ off }) => off !== true);
        if (on.length === 0) return;
        expect(valueOf(sheet(poolOf(lines)), 'N_I')).toBe(figure(sheet(poolOf(on)), 'N_I'));
      }),
    );
  });
});

describe('a curve', () => {
  const points = fc
    .uniqueArray(fc.tuple(between(-80, 80), between(-50, 50)), { minLength: 2, maxLength: 8, selector: ([x]) => x })
    .filter((list) => list.every(([x], i) => list.every(([other], j) => i === j || Math.abs(x - other) > 1e-3)));
  const interpolation = fc.constantFrom('linear' as const, 'monotone' as const);
  const curveOf = (list: CurveSection['points'], kind: 'linear' | 'monotone'): CurveSection => ({
    id: 'c',
    kind: 'curve',
    symbol: 'C',
    title: 'Curve',
    x: { label: 'Angle', unit: 'deg' },
    y: { label: 'Gain', unit: 'dB', quantity: 'gain' },
    interpolation: kind,
    points: list,
  });
  const readAt = (curve: CurveSection, x: number): number | string =>
    valueOf(
      sheet(curve, {
        id: 's',
        kind: 'lines',
        title: '',
        lines: [{ id: 'y', symbol: 'y', label: '', entry: `C(${written(x, 'deg')})`, unit: 'dB' }],
      }),
      'y',
    );

  it('gives at its points the points, in whatever order they are typed', () => {
    fc.assert(
      fc.property(points, interpolation, (list, kind) => {
        for (const [x, y] of list) expect(readAt(curveOf(list, kind), x)).toBeCloseTo(y, 5);
        const sorted = [...list].sort(([a], [b]) => a - b);
        const [middle] = sorted;
        expect(readAt(curveOf(sorted, kind), middle?.[0] ?? NaN)).toBe(readAt(curveOf(list, kind), middle?.[0] ?? NaN));
      }),
    );
  });

  it('stays between the points beside it', () => {
    fc.assert(
      fc.property(points, interpolation, fc.double({ min: 0.001, max: 0.999, noNaN: true }), (list, kind, share) => {
        const sorted = [...list].sort(([a], [b]) => a - b);
        for (const [i, [x1, y1]] of sorted.slice(1).entries()) {
          const [x0, y0] = sorted[i] ?? [NaN, NaN];
          const found = readAt(curveOf(list, kind), round(x0 + share * (x1 - x0)));
          expect(found).toBeGreaterThanOrEqual(Math.min(y0, y1) - 1e-9);
          expect(found).toBeLessThanOrEqual(Math.max(y0, y1) + 1e-9);
        }
      }),
    );
  });

  it('is withheld beyond its first and its last point', () => {
    fc.assert(
      fc.property(points, interpolation, between(0.001, 50), fc.boolean(), (list, kind, beyond, isAbove) => {
        const xs = list.map(([x]) => x);
        const x = isAbove ? Math.max(...xs) + beyond : Math.min(...xs) - beyond;
        expect(readAt(curveOf(list, kind), x)).toBe('withheld: outside-curve');
      }),
    );
  });
});

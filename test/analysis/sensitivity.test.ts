/** Slopes against differences and closed forms, shares of variance, and the statistics of a design control table. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sensitivityOf, slopesOf, slopeUnit, loosened, type Sensitivity } from '../../src/analysis';
import { Evaluation } from '../../src/engine';
import { findUnit, powerShares } from '../../src/quantity';
import type { Tolerance } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';
import { figuresNear, randomSheet } from './random-sheets';
import { both, idOf, toleranced } from './support';

const sensitivityIn = (
  text: string,
  tolerances: Readonly<Record<string, Tolerance>> = {},
  symbol = 'z',
): Sensitivity => {
  const evaluation = toleranced(text, tolerances);
  return sensitivityOf(evaluation, idOf(evaluation, symbol), 'nominal');
};

/** A figure's row, by the place of its line: ids are l0, l1 … */
const row = ({ inputs }: Sensitivity, at: number): Sensitivity['inputs'][number] => {
  const found = inputs.find(({ lineId }) => lineId === `l${String(at)}`);
  if (found === undefined) throw new Error(`there is no l${String(at)}`);
  return found;
};

describe('slopes', () => {
  it('are those of differences, on random lines', () => {
    let compared = 0;
    fc.assert(
      fc.property(randomSheet, (sheet) => {
        const evaluation = new Evaluation(sheetOf(sheet.text));
        const varied = sheet.inputs.map(({ symbol }) => ({ lineId: idOf(evaluation, symbol) }));
        const targets = sheet.computed.map((symbol) => idOf(evaluation, symbol));
        const free = loosened(
          evaluation,
          varied.map(({ lineId }) => lineId),
          targets,
          'nominal',
        ).evaluation;
        targets.forEach((target, at) => {
          const { slopes, isInexact } = slopesOf(free, target, 'nominal', varied);
          expect(isInexact).toEqual(varied.map(() => false));
          sheet.inputs.forEach(({ symbol, figure }, input) => {
            const { below, above, here, step } = figuresNear(free, varied, input, target, figure);
            // Kinks (a largest term, a condition) and steep places are no places for differences.
            const [left, right] = [(here - below) / step, (above - here) / step];
            const size = Math.max(1e-3, Math.abs(left), Math.abs(right));
            if (!Number.isFinite(left + right) || Math.abs(left - right) > 1e-3 * size) return;
            compared++;
            const found = slopes[input] ?? NaN;
            if (!(Math.abs(found - (left + right) / 2) <= 1e-4 * size))
              expect.fail(
                `${sheet.text}\nc${String(at)} by ${symbol}: ${String(found)}, not ${String((left + right) / 2)}`,
              );
          });
        });
      }),
      { numRuns: 150 },
    );
    expect(compared).toBeGreaterThan(2000);
  });

  it('of a power sum are its shares', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -1400, max: -600 }), { minLength: 2, maxLength: 6 }), (tenths) => {
        const levels = tenths.map((tenth) => tenth / 10);
        const text = levels.map((level, at) => `x${String(at)} = ${String(level)} dBm`).join('\n');
        const found = sensitivityIn(`${text}\nz = powersum(${levels.map((_, at) => `x${String(at)}`).join(', ')})`);
        powerShares(levels).forEach((share, at) => {
          expect(row(found, at).slope).toBeCloseTo(share, 12);
        });
      }),
    );
  });

  it.each<readonly [string, string, number]>([
    ['x = 4', 'sqrt(x)', 0.25],
    ['x = 2', 'x^3', 12],
    ['x = 2', '3^x', 9 * Math.log(3)],
    ['x = 0.5', 'asin(x) + acos(x) + atan(x)', 0.8],
    ['x = 2', 'atan2(x, 1)', -0.2],
    ['x = 0.3', 'tan(x)', 1 / Math.cos(0.3) ** 2],
    ['x = 2', 'ln(x) + log10(x) + exp(x)', 0.5 + Math.LOG10E / 2 + Math.exp(2)],
    ['x = -2', 'abs(x)', -1],
    ['x = 2.3', 'round(x) + floor(x) + ceil(x)', 0],
    ['x = 3', 'min(x, 5) + max(x, 5) + mean(x, 5)', 1.5],
    ['x = 2.5', 'interpolate(x, 1, 10, 2, 20, 3, 50)', 30],
    ['x = 100 K', 'noise_figure(x)', 10 / Math.LN10 / 390],
    ['x = 3 dB', 'noise_temperature(x)', (290 * 10 ** 0.3 * Math.LN10) / 10],
    ['x = 1 MHz', 'db(x)', 10 / Math.LN10],
    ['x = 20 dB', 'capacity(1 MHz, x)', (1e6 * 100 * Math.LN10) / 10 / 101 / Math.LN2],
    ['x = -103 dBm', 'powerdiff(-100 dBm, x)', -(10 ** -0.3) / (1 - 10 ** -0.3)],
    ['x | dB | loss = 2 dB', 'passive_nf(x, 145 K)', (10 ** 0.2 * 0.5) / (1 + (10 ** 0.2 - 1) / 2)],
  ])('of %s in %s', (line, entry, expected) => {
    const found = row(sensitivityIn(`${line}\nz = ${entry}`), 0);
    expect(found.slope / (expected || 1)).toBeCloseTo(expected === 0 ? 0 : 1, 10);
    expect(found.exact).toBe(true);
  });

  it.each([0, 1, 2, 3, 4])('of cascade_nf by argument %d', (at) => {
    const values = [1, 15, 8, -3, 6];
    const names = ['NF1', 'G1', 'NF2', 'G2', 'NF3'];
    const text = values.map(
      (value, i) => `${names[i] ?? ''} | dB | ${i % 2 === 0 ? 'noise figure' : 'gain'} = ${String(value)} dB`,
    );
    const cascade = (figures: readonly number[]): number => {
      const factor = (x: number): number => 10 ** (x / 10);
      const [f1 = 0, g1 = 0, f2 = 0, g2 = 0, f3 = 0] = figures;
      return 10 * Math.log10(factor(f1) + (factor(f2) - 1) / factor(g1) + (factor(f3) - 1) / factor(g1 + g2));
    };
    const moved = (by: number): number[] => values.map((value, i) => (i === at ? value + by : value));
    const expected = (cascade(moved(1e-4)) - cascade(moved(-1e-4))) / 2e-4;
    const found = row(sensitivityIn(`${text.join('\n')}\nz = cascade_nf(${names.join(', ')})`), at);
    expect(found.slope).toBeCloseTo(expected, 7);
    expect(found.exact).toBe(true);
  });

  it('through a curve come by differences, and say so', () => {
    const sheet = sheetOf('x = 5 deg\ny = 1 dB\nz = G_scan(x) + y');
    const evaluation = new Evaluation({
      ...sheet,
      sections: [
        ...sheet.sections,
        {
          id: 'scan',
          kind: 'curve',
          symbol: 'G_scan',
          title: '',
          x: { label: 'angle', unit: 'deg' },
          y: { label: 'gain', unit: 'dBi', quantity: 'gain' },
          points: [
            [0, 32],
            [10, 31],
          ],
        },
      ],
    });
    const found = sensitivityOf(evaluation, idOf(evaluation, 'z'), 'nominal');
    expect(row(found, 0)).toMatchObject({
      slope: expect.closeTo(-0.1, 8) as number,
      exact: false,
      slopeUnit: 'dB/deg',
    });
    expect(row(found, 1)).toMatchObject({ slope: 1, exact: true });
  });

  it('of chains are those of their formulas, exact where all functions on the way are known', () => {
    const sheet = sheetOf('z = rx.gain + 1 dB');
    const evaluation = new Evaluation({
      ...sheet,
      sections: [
        ...sheet.sections,
        {
          id: 'rx',
          kind: 'chain',
          symbol: 'rx',
          title: '',
          signal: '-90 dBm',
          noise: '150 K',
          bandwidth: '1 MHz',
          stages: [
            { id: 's1', symbol: 'a', label: '', gain: '15 dB', noiseFigure: '1 dB', outputIntercept: '20 dBm' },
            { id: 's2', symbol: 'b', label: '', gain: '-7 dB', noiseFigure: '8 dB', inputIntercept: '12 dBm' },
          ],
        },
      ],
    });
    const find = (symbol: string, input: string): Sensitivity['inputs'][number] | undefined =>
      sensitivityOf(evaluation, idOf(evaluation, symbol), 'nominal').inputs.find(
        ({ lineId }) => lineId === idOf(evaluation, input),
      );
    const factor = (decibels: number): number => 10 ** (decibels / 10);
    expect(find('z', 'rx.a.gain')).toMatchObject({ slope: 1, exact: true });
    // NF: the derivative of Friis' formula by the first noise figure and the first gain.
    const whole = factor(1) + (factor(8) - 1) / factor(15);
    expect(find('rx.nf', 'rx.a.nf')).toMatchObject({
      slope: expect.closeTo(factor(1) / whole, 12) as number,
      exact: true,
    });
    expect(find('rx.nf', 'rx.a.gain')).toMatchObject({
      slope: expect.closeTo(-(factor(8) - 1) / factor(15) / whole, 12) as number,
      exact: true,
    });
    // S/N over T_source + Tₑ.
    const temperature = 150 + 290 * (whole - 1);
    const ratio = find('rx.snr', 'rx.a.nf');
    expect(ratio?.slope).toBeCloseTo((-290 * factor(1)) / temperature, 9);
    // Intercepts in phase: shares of 1/IIP3. That cascade has no entry in the table.
    const [first, second] = [1 / factor(20 - 15), 1 / factor(12 - 15)];
    const intercept = find('rx.iip3', 'rx.b.iip3');
    expect(intercept?.slope).toBeCloseTo(second / (first + second), 9);
    expect(intercept?.exact).toBe(false);
  });

  it('have the units of both lines', () => {
    const unit = (word: string): ReturnType<typeof findUnit> => findUnit(word);
    expect(slopeUnit(unit('dBm'), unit('MHz'))).toBe('dB/MHz');
    expect(slopeUnit(unit('dB'), unit('dBi'))).toBe('dB/dB');
    expect(slopeUnit(unit('K'), unit('1'))).toBe('K');
    expect(slopeUnit(unit('1'), unit('dB'))).toBe('1/dB');
    expect(slopeUnit(unit('bit/s'), unit('dB/m'))).toBe('(bit/s)/(dB/m)');
  });
});

describe('sensitivity', () => {
  const text = 'a = 10 dB\nb = 4 dB\nc = 2 dB\nd = 1 dB\nz = a - b + 2*c + d';
  const found = sensitivityIn(text, {
    a: both('1 dB', 'uniform'),
    b: { below: '0.5 dB', above: '3 dB', shape: 'triangular' },
    c: both('0.25 dB', 'normal'),
  });

  it('puts the largest effect first, and what has no tolerance last', () => {
    expect(found.inputs.map(({ lineId }) => lineId)).toEqual(['l1', 'l0', 'l2', 'l3']);
    expect(found.inputs.map(({ slope }) => slope)).toEqual([-1, 1, 2, 1]);
  });

  it('tells what each tolerance does by itself', () => {
    expect(found.inputs.map(({ adverse, favourable }) => [adverse, favourable])).toEqual([
      [-3, 0.5],
      [-1, 1],
      [-0.5, 0.5],
      [undefined, undefined],
    ]);
  });

  it('shares out the variance', () => {
    const variances = [(9 + 0.25 + 1.5) / 18, 1 / 3, 4 * (0.5 / 6) ** 2];
    const whole = variances.reduce((sum, variance) => sum + variance, 0);
    found.inputs.slice(0, 3).forEach(({ share }, at) => {
      expect(share).toBeCloseTo((variances[at] ?? 0) / whole, 12);
    });
    expect(found.inputs[3]?.share).toBe(0);
    expect(found.rootSumSquare.standardDeviation).toBeCloseTo(Math.sqrt(whole), 12);
    expect(found.rootSumSquare.mean).toBeCloseTo(11 - 2.5 / 3, 12);
    expect(found.rootSumSquare.lower).toBeCloseTo(11 - 2.5 / 3 - 3 * Math.sqrt(whole), 12);
    expect(found.rootSumSquare.upper).toBeCloseTo(11 - 2.5 / 3 + 3 * Math.sqrt(whole), 12);
  });

  it('adds deviations within a group, and variances between groups', () => {
    const group = { favourable: '1 dB', adverse: '1 dB', shape: 'uniform', group: 'heat' } as const;
    const lines = 'G | dB | gain = 10 dB\nL | dB | loss = 4 dB\nx = 1 dB\nz = G - L + x\ny = G + L + x';
    const tolerances = { G: group, L: group, x: both('1 dB', 'uniform') };
    const apart = sensitivityIn(lines, tolerances);
    expect(apart.rootSumSquare.standardDeviation).toBeCloseTo(Math.sqrt((4 + 1) / 3), 12);
    expect(apart.inputs.map(({ share }) => share)).toEqual(
      [0.4, 0.4, 0.2].map((share) => expect.closeTo(share, 12) as number),
    );
    const together = sensitivityIn(lines, tolerances, 'y');
    expect(together.rootSumSquare.standardDeviation).toBeCloseTo(Math.sqrt(1 / 3), 12);
  });

  it('counts the deviation of a line with an entry of its own beside those that come through it', () => {
    const found = sensitivityIn('a = 10 dB\nb = a + 1 dB\nz = 2*b', {
      a: both('1 dB', 'uniform'),
      b: both('0.5 dB', 'uniform'),
    });
    expect([row(found, 0), row(found, 1)]).toMatchObject([
      { slope: 2, adverse: -2, favourable: 2, share: expect.closeTo(0.8, 12) as number },
      { slope: 2, adverse: -1, favourable: 1, share: expect.closeTo(0.2, 12) as number },
    ]);
    expect(found.rootSumSquare.mean).toBe(22);
  });

  it('goes by the requirement where there is one', () => {
    const limited = sensitivityIn('a = 10 dB\nz = a require <= 12 dB', { a: { below: '1 dB', above: '2 dB' } });
    expect(limited).toMatchObject({ direction: 'lower', isDirectionAssumed: false });
    expect(limited.inputs[0]).toMatchObject({ adverse: 2, favourable: -1 });
    expect(sensitivityIn('z = 10 MHz', { z: both('1 MHz', 'uniform') }).isDirectionAssumed).toBe(true);
  });
});

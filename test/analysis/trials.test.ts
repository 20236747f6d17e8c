/** Trials: closed forms and quadrature, seeds and streams, groups, and what a worker would do. */
import { describe, expect, it } from 'vitest';
import { momentsOf, percentilesOf, runJob, statisticsOf } from '../../src/analysis';
import { Evaluation } from '../../src/engine';
import type { Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';
import { both, idOf, inputsOfLine, toleranced, trialsOf, withTolerances } from './support';

const COUNT = 200_000;
const momentsIn = (evaluation: Evaluation, symbol = 'z'): ReturnType<typeof momentsOf> =>
  momentsOf(trialsOf(evaluation, symbol, { count: COUNT }));

/** Within so many standard errors of a mean. */
const expectMean = (found: number, expected: number, deviation: number): void => {
  expect(Math.abs(found - expected)).toBeLessThan((4.5 * deviation) / Math.sqrt(COUNT));
};

describe('closed forms', () => {
  it('a sum of normal deviations is normal', () => {
    const evaluation = toleranced('a = 10 dB\nb = 4 dB\nc = 2 dB\nz = a - b - 2*c', {
      a: both('3 dB', 'normal'),
      b: { below: '1 dB', above: '2 dB', shape: 'normal' },
      c: both('1.5 dB', 'normal'),
    });
    const figures = trialsOf(evaluation, 'z', { count: COUNT });
    const deviation = Math.hypot(1, 0.5, 2 * 0.5);
    const mean = 10 - 4.5 - 4;
    const moments = momentsOf(figures);
    expectMean(moments.mean, mean, deviation);
    expect(Math.abs(moments.standardDeviation / deviation - 1)).toBeLessThan(0.01);
    const [low = NaN, high = NaN] = percentilesOf(figures, [2.275013194817921, 99.86501019683699]);
    expect(low).toBeCloseTo(mean - 2 * deviation, 1);
    expect(high).toBeCloseTo(mean + 3 * deviation, 0);
  });

  it('the sum of two uniform deviations is a triangle', () => {
    const evaluation = toleranced('a = 1 dB\nb = 1 dB\nz = a + b', {
      a: both('1 dB', 'uniform'),
      b: both('1 dB', 'uniform'),
    });
    const figures = trialsOf(evaluation, 'z', { count: COUNT });
    const moments = momentsOf(figures);
    expectMean(moments.mean, 2, Math.sqrt(2 / 3));
    // P(z < x) = x²/8 for x up to 2.
    const share = figures.filter((figure) => figure < 1).length / COUNT;
    expect(Math.abs(share - 1 / 8)).toBeLessThan(4.5 * Math.sqrt(((1 / 8) * (7 / 8)) / COUNT));
    expect(Math.min(...figures.slice(0, 100_000))).toBeGreaterThanOrEqual(0);
  });

  it('every shape has its mean and variance in a line by itself', () => {
    for (const [shape, mean, variance] of [
      ['uniform', 0.5, 0.75],
      ['triangular', 1 / 3, 7 / 18],
      ['normal', 0.5, 0.25],
      ['arcsine', 0.5, 9 / 8],
    ] as const) {
      const moments = momentsIn(toleranced('z = 10 dB', { z: { below: '1 dB', above: '2 dB', shape } }));
      expectMean(moments.mean, 10 + mean, Math.sqrt(variance));
      expect(Math.abs(moments.standardDeviation ** 2 / variance - 1)).toBeLessThan(0.015);
    }
  });

  it('a power sum of two levels has the mean and variance of its double integral', () => {
    const evaluation = toleranced('a = -100 dBm\nb = -97 dBm\nz = powersum(a, b)', {
      a: both('6 dB', 'uniform'),
      b: both('4 dB', 'uniform'),
    });
    // Midpoints over both deviations.
    const steps = 1000;
    let [sum, squares] = [0, 0];
    for (let i = 0; i < steps; i++)
      for (let j = 0; j < steps; j++) {
        const a = -106 + (12 * (i + 0.5)) / steps;
        const b = -101 + (8 * (j + 0.5)) / steps;
        const z = 10 * Math.log10(10 ** (a / 10) + 10 ** (b / 10));
        sum += z;
        squares += z * z;
      }
    const mean = sum / steps ** 2;
    const variance = squares / steps ** 2 - mean ** 2;
    const moments = momentsIn(evaluation);
    expectMean(moments.mean, mean, Math.sqrt(variance));
    expect(Math.abs(moments.standardDeviation / Math.sqrt(variance) - 1)).toBeLessThan(0.01);
  });
});

const TEXT = 'a = 10 dB\nb = 4 dB\nz = a - b';
const TOLERANCES = { a: both('1 dB', 'uniform'), b: both('2 dB', 'triangular') };

describe('seeds and streams', () => {
  const evaluation = toleranced(TEXT, TOLERANCES);

  it('give the same trials again, whatever the block and the order', () => {
    const whole = trialsOf(evaluation, 'z', { count: 5000 });
    expect(trialsOf(evaluation, 'z', { count: 5000, blockSize: 7 })).toEqual(whole);
    expect(trialsOf(evaluation, 'z', { count: 5000, blockSize: 2048 })).toEqual(whole);
    const [late, early] = [
      trialsOf(evaluation, 'z', { from: 1234, count: 3766 }),
      trialsOf(evaluation, 'z', { count: 1234 }),
    ];
    expect([...early, ...late]).toEqual([...whole]);
  });

  it('give others for another seed', () => {
    expect(trialsOf(evaluation, 'z', { seed: 2, count: 10 })).not.toEqual(trialsOf(evaluation, 'z', { count: 10 }));
    expect(trialsOf(evaluation, 'z', { seed: 2 ** 40, count: 10 })).not.toEqual(
      trialsOf(evaluation, 'z', { seed: 0, count: 10 }),
    );
  });

  it('do not change when lines are added, moved, or get tolerances of their own', () => {
    const worksheet = withTolerances(sheetOf(TEXT), TOLERANCES);
    const [section] = worksheet.sections;
    if (section?.kind !== 'lines' || !('lines' in section)) throw new Error('the sheet has one section of lines');
    const more: Worksheet = {
      ...worksheet,
      sections: [
        {
          ...section,
          lines: [
            { id: 'new', symbol: 'x', label: '', entry: '1 dB', tolerance: both('1 dB', 'normal') },
            ...[...section.lines].reverse(),
            { id: 'y', symbol: 'y', label: '', entry: 'z + x' },
          ],
        },
      ],
    };
    expect(trialsOf(new Evaluation(more), 'z')).toEqual(trialsOf(evaluation, 'z'));
  });

  it('are what a job from plain data gives', () => {
    const worksheet = JSON.parse(JSON.stringify(withTolerances(sheetOf(TEXT), TOLERANCES))) as Worksheet;
    const job = { worksheet, lineId: idOf(evaluation, 'z'), caseId: 'nominal', seed: 5, from: 100, to: 400 };
    expect(runJob(structuredClone(job))).toEqual(trialsOf(evaluation, 'z', { seed: 5, from: 100, count: 300 }));
  });

  it('stop when told to', () => {
    const done: number[] = [];
    const job = {
      worksheet: evaluation.worksheet,
      lineId: idOf(evaluation, 'z'),
      caseId: 'nominal',
      seed: 5,
      from: 0,
      to: 10_000,
    };
    runJob(job, (count) => {
      done.push(count);
      return done.length === 3;
    });
    expect(done).toEqual([1024, 2048, 3072]);
  });
});

describe('groups', () => {
  it('deviate together in the sense of favourable', () => {
    const text = 'G | dB | gain = 10 dB\nL | dB | loss = 4 dB\nz = G - L\ny = G + L';
    const together = toleranced(text, {
      G: { favourable: '1 dB', adverse: '1 dB', shape: 'uniform', group: 'heat' },
      L: { favourable: '1 dB', adverse: '1 dB', shape: 'uniform', group: 'heat' },
    });
    // A good deviation of the gain comes with one of the loss: in the difference they add, in the sum they cancel.
    expect(momentsIn(together).standardDeviation).toBeCloseTo(2 / Math.sqrt(3), 2);
    expect(momentsIn(together, 'y').standardDeviation).toBeLessThan(1e-12);
  });

  it('of different shapes share the quantile', () => {
    const evaluation = toleranced('a = 0 dB\nb = 0 dB\nz = a - b', {
      a: both('3 dB', 'normal', { group: 'g' }),
      b: both('1 dB', 'uniform', { group: 'g' }),
    });
    const [first] = [trialsOf(evaluation, 'z', { count: 1000 })];
    const a = trialsOf(evaluation, 'a', { count: 1000 });
    const b = trialsOf(evaluation, 'b', { count: 1000 });
    expect([...first]).toEqual([...a].map((figure, at) => figure - (b[at] ?? 0)));
    // Both rise with one number: the order of trials is the same.
    const order = (figures: Float64Array): number[] =>
      [...figures.keys()].sort((i, j) => (figures[i] ?? 0) - (figures[j] ?? 0));
    expect(order(a)).toEqual(order(b));
  });
});

describe('what varies', () => {
  it('is every figure above the line with a tolerance, added to what an entry gives', () => {
    const evaluation = toleranced('a = 10 dB\nb = a + 1 dB\nz = b + 1 dB', {
      a: both('1 dB', 'uniform'),
      b: both('0.5 dB', 'uniform'),
      z: both('0.25 dB', 'uniform'),
    });
    const { inputs } = inputsOfLine(evaluation, 'z');
    expect(inputs.map(({ isAdded, figure }) => [isAdded, figure])).toEqual([
      [false, 10],
      [true, 11],
      [true, 12],
    ]);
    const variance = (1 + 0.25 + 0.0625) / 3;
    const moments = momentsIn(evaluation);
    expectMean(moments.mean, 12, Math.sqrt(variance));
    expect(Math.abs(moments.standardDeviation ** 2 / variance - 1)).toBeLessThan(0.01);
  });

  it('follows the case', () => {
    const worksheet = withTolerances(sheetOf('a = 10 dB @ storm: 20 dB\nz = a + 1 dB', 'calm', 'storm'), {
      a: both('1 dB', 'uniform'),
    });
    const evaluation = new Evaluation(worksheet);
    const [calm, storm] = ['calm', 'storm'].map((id) => trialsOf(evaluation, 'z', { count: 50 }, id));
    expect([...(storm ?? [])]).toEqual([...(calm ?? [])].map((figure) => expect.closeTo(figure + 10, 9) as number));
  });

  it('is a number that says how often a level counts, too', () => {
    const evaluation = toleranced('n = 2\nL_0 = 3 dB\nz = n * L_0', { n: both('10 %', 'uniform') });
    const figures = trialsOf(evaluation, 'z');
    expect(Math.min(...figures)).toBeGreaterThan(5.4);
    expect(Math.max(...figures)).toBeLessThan(6.6);
    expect(momentsOf(figures).standardDeviation).toBeCloseTo(0.6 / Math.sqrt(3), 1);
  });

  it('leaves trials withheld in which the line has no figure', () => {
    const evaluation = toleranced('a = -100 dBm\nz = powerdiff(-100 dBm, a)', { a: both('1 dB', 'uniform') });
    const statistics = statisticsOf(trialsOf(evaluation, 'z', { count: 10_000 }), undefined);
    expect(statistics.withheld / 10_000).toBeCloseTo(0.5, 1);
    expect(Number.isFinite(statistics.mean)).toBe(true);
    expect(statistics.met).toBeUndefined();
  });

  it('counts as met what keeps the bound, and never a withheld trial', () => {
    const figures = Float64Array.of(1, 2, 3, NaN);
    const requirement = { limit: 2, met: true, margin: 0, unit: 'dB' };
    expect(statisticsOf(figures, { ...requirement, bound: 'at least' }).met?.share).toBe(0.5);
    expect(statisticsOf(figures, { ...requirement, bound: 'at most' }).met?.share).toBe(0.5);
    expect(statisticsOf(figures, { ...requirement, limit: 2.5, bound: 'at least' }).met?.share).toBe(0.25);
  });
});

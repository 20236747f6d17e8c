/** Contributions to sums of powers: shares that add to 1 and are how much the sum moves when a part does. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { workingOfLast } from './support';

const sharesIn = (text: string): readonly number[] => workingOfLast(text).terms.map(({ share }) => share ?? NaN);

/** The value of the last line. */
function valueIn(text: string): number {
  const { figure } = workingOfLast(text).reading;
  if (figure.state !== 'value') throw new Error(`the line is ${figure.state}`);
  return figure.value;
}

/** Lines a0, a1 … in a unit, and their sum x. */
const sumOf = (name: string, unit: string, figures: readonly number[], kind = ''): string =>
  [
    ...figures.map((figure, at) => `a${String(at)} | ${unit} | ${kind} = ${String(figure)}`),
    `x | ${unit} = ${name}(${figures.map((_, at) => `a${String(at)}`).join(', ')})`,
  ].join('\n');

const SUMS = [
  ['powersum', 'dBm', ''],
  ['powersum', 'dBµV', ''],
  ['powersum', 'dBm/Hz', ''],
  ['powersum', 'dBK', ''],
  ['meanpower', 'dBm', ''],
  ['meanpower', 'dBµV/m', ''],
  ['ratiosum', 'dB', 'signal ratio'],
  ['ratiosum', 'dB', 'impairment ratio'],
] as const;

describe.each(SUMS)('%s of figures in %s %s', (name, unit, kind) => {
  const figures = fc.array(
    fc.integer({ min: -3000, max: 3000 }).map((hundredths) => hundredths / 100),
    { minLength: 1, maxLength: 6 },
  );

  it('has shares that add to 1, each the change of the sum by that of the part', () => {
    fc.assert(
      fc.property(figures, (of) => {
        const shares = sharesIn(sumOf(name, unit, of, kind));
        expect(shares).toHaveLength(of.length);
        expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12);
        const step = 1e-4;
        for (const [at, share] of shares.entries()) {
          const moved = (by: number): number =>
            valueIn(
              sumOf(
                name,
                unit,
                of.map((figure, index) => (index === at ? figure + by : figure)),
                kind,
              ),
            );
          expect(share).toBeCloseTo((moved(step) - moved(-step)) / (2 * step), 6);
        }
      }),
      { numRuns: 15 },
    );
  });
});

it('a power taken off has a negative share, and they still add to 1', () => {
  const shares = sharesIn('a = -90 dBm\nb = -93 dBm\nx = powerdiff(a, b)');
  const move = (a: number, b: number): number =>
    valueIn(`a = ${String(a)} dBm\nb = ${String(b)} dBm\nx = powerdiff(a, b)`);
  const step = 1e-4;
  expect(shares[0]).toBeCloseTo((move(-90 + step, -93) - move(-90 - step, -93)) / (2 * step), 5);
  expect(shares[1]).toBeCloseTo((move(-90, -93 + step) - move(-90, -93 - step)) / (2 * step), 5);
  expect(shares[1]).toBeLessThan(0);
  expect((shares[0] ?? NaN) + (shares[1] ?? NaN)).toBeCloseTo(1, 12);
});

describe('parts of every form', () => {
  it.each([
    ['powers in watts and dBm', 'a = -90 dBm\nx = powersum(a, 3 pW)', [0.25, 0.75]],
    ['expressions', 'T = 290 K\nx | dBm = powersum(k_B*T*(1 Hz), thermal_noise(T, 3 Hz))', [0.25, 0.75]],
    ['temperatures', 'T = 75 K\nx | dBK = powersum(T, 225 K)', [0.25, 0.75]],
    ['temperatures in °C', 'T = 26.85 °C\nx | dBK = powersum(T, 100 K)', [0.75, 0.25]],
    ['voltages, by their squares', 'u = 1 mV\nx = powersum(u, 3 mV)', [0.1, 0.9]],
    ['voltages in dBµV', 'u = 60 dBµV\nv = 80 dBµV\nx = powersum(u, v)', [1 / 101, 100 / 101]],
    ['bare numbers, which count as decibels', 'a = 4 dB\nx = powersum(a, 4)', [0.5, 0.5]],
    ['ratios of powers', 'a = 0 dB\nx = powersum(a, (3 mW)/(1 mW))', [0.25, 0.75]],
    ['ratios of voltages, by their squares', 'a = 0 dB\nx = powersum(a, (3 mV)/(1 mV))', [0.1, 0.9]],
    ['one line twice', 'a = -90 dBm\nx = powersum(a, a)', [0.5, 0.5]],
    ['no power beside some', 'a | dBm = 0 W\nb = -90 dBm\nx = powersum(a, b)', [0, 1]],
    ['impairments of −∞', 'a | dB | impairment ratio = db(1) - 20 dB\nx = ratiosum(a, a)', [0.5, 0.5]],
  ])('%s', (_, text, expected) => {
    const working = workingOfLast(text);
    expect(working.shares).toBe(true);
    expect(working.terms.map(({ share }) => share)).toEqual(
      expected.map((share) => expect.closeTo(share, 10) as number),
    );
  });
});

describe('there are no shares', () => {
  it.each([
    ['of no power at all', 'a | dBm = 0 W\nx = powersum(a, a)'],
    ['when a power is taken off its like', 'a = -90 dBm\nx = powerdiff(a, a)'],
    ['of ratios one of which is none', 'C | dBm = 0 W\nN = -100 dBm\nR = 20 dB\nx = ratiosum(C - N, R)'],
    ['of fields in phase', 'a = -90 dBm\nx = fieldsum(a, a)'],
    ['of plain sums', 'a = -90 dBm\nx = a + 3 dB'],
    ['in a sum with more in it', 'a = -90 dBm\nx = powersum(a, a) + 3 dB'],
    ['while a part is withheld', 'a | dBm = 1/0\nb = 0 dBm\nx = powersum(a, b)'],
  ])('%s', (_, text) => {
    const working = workingOfLast(text);
    expect(working.shares).toBe(false);
    expect(working.terms.every(({ share }) => share === undefined)).toBe(true);
    expect(working.terms.length).toBeGreaterThan(0);
  });
});

it('each contribution has its figure: of a line, or of what is written in its place', () => {
  const { terms } = workingOfLast('N = -110 dBm # Noise\nL = 3 dB\nx = powersum(N, N - L, 2 fW, k_B*(290 K)*(1 MHz))');
  expect(terms.map(({ symbol, label, text, unit, lineId }) => [symbol, label, text, unit, lineId])).toEqual([
    ['N', 'Noise', '−110.00', 'dBm', 'l0'],
    ['N - L', '', '−113.00', 'dBm', undefined],
    ['2 fW', '', '2', 'fW', undefined],
    ['k_B*(290 K)*(1 MHz)', '', '4.004', 'fW', undefined],
  ]);
});

/** The step in linear terms: as it reads, and that it gives the result when somebody works it out. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { linearValue, type Unit } from '../../src/quantity';
import type { Working } from '../../src/review';
import { STARTERS } from '../../src/starters';
import { Evaluation } from '../../src/engine';
import { readWorksheetFile } from '../../src/exchange';
import { rounding, stepValue } from './step-value';
import { stepOf, stepText, workingIn, workingOfLast } from './support';

/** What the result is in SI: watts, volts, ratios. */
function resultOf({ reading }: Working): number {
  const { figure } = reading;
  if (figure.state !== 'value') throw new Error(`the line is ${figure.state}`);
  const inSi = (value: number, unit: Unit): number =>
    unit.form === 'linear' ? value * unit.factor + unit.shift : (linearValue(value, unit)?.value ?? NaN);
  return inSi(figure.value, figure.unit);
}

/** Works the step out and compares it with the result, within what the rounding of its figures allows. */
function expectToGiveResult(working: Working): void {
  const pieces = stepOf(working, 'in linear terms');
  if (pieces === undefined) throw new Error('there is no step');
  const result = resultOf(working);
  expect(stepValue(pieces) / result, stepText(working, 'in linear terms')).toBeGreaterThan(1 - rounding(pieces));
  expect(stepValue(pieces) / result, stepText(working, 'in linear terms')).toBeLessThan(1 + rounding(pieces));
}

describe('sums of decibels are products', () => {
  it.each([
    ['P = 14 dBm\nL = 2 dB\nx = P - L + 3 dBi', '25.12 mW × 1.995 ÷ 1.585'],
    ['P = 25 mW\nG = 3 dB\nx | dBm = db(P) + G', '25 mW × 1.995'],
    ['C = -90 dBm\nN = -117 dBm\nx = C - N', '1 pW ÷ 1.995 fW'],
    ['N = -174 dBm/Hz\nB = 125 kHz\nx | dBm = N + db(B) + 6 dB', '3.981 zW/Hz × 125 kHz × 3.981'],
    ['L = 3 dB\nx = -L', '1 ÷ 1.995'],
    ['L = 3 dB\nM = 1 dB\nx = -L - M', '1 ÷ 1.995 ÷ 1.259'],
    ['a = 4 dB/m\nl = 2 m\nx = a*l + 0.2 dB', '6.31 × 1.047'],
    ['L = 3 dB\nx = 2*L - 1 dB', '1.995^2 ÷ 1.259'],
    ['P1 | dBm = 0 dBm\nIM = -40 dBm\nx | dBm = 1.5*P1 - 0.5*IM', '(1 mW)^1.5 ÷ (100 nW)^0.5'],
    ['G = 2 dBd\nP = 10 dBm\nx = P + G', '10 mW × 2.6'],
    ['T = 300 K\nG = 35 dBi\nx | dB/K = G - db(T)', '3162 ÷ 300 K'],
    [
      'GT = 12 dB/K\nP = 10 dBW\nx | dBHz = P + GT - db(k_B) - 160 dB',
      '10 W × (15.85 1/K) ÷ (13.81×10⁻²⁴ J/K) ÷ 10×10¹⁵',
    ],
    ['C = 70 dBHz\nR = 4 Mbit/s\nx | dB = C - db(R)', '10 MHz ÷ (4 Mbit/s)'],
    ['d = 3 km\nP = 40 dBm\nx | dBm/m² = P - db(4*pi) - 20*log10(d)', '10 W ÷ 12.57 ÷ (3 km)^2'],
    ['T = 15 °C\nG = 3 dBi\nx | dB/K = G - db(T)', '1.995 ÷ 288.1 K'],
    ['U = 2 mV\nG = 6 dB\nx | dBµV = db(U) + G', '2 mV × 1.995'],
    ['P = 25 mW\nL = 3 dB\nx | mW = db(P) - L', '25 mW ÷ 1.995'],
    // With a voltage as the result the factors are ratios of voltages.
    ['U = 60 dBµV\nG = 6 dB\nx = U + G', '1 mV × 1.995'],
    ['U = 60 dBµV\nG = 20 dB\nx | mV = U + G', '1 mV × 10'],
    ['U = 60 dBµV\nAF = 20 dB(1/m)\nx | dBµV/m = U + AF', '1 mV × (10 1/m)'],
    // With a power as the result a voltage enters with its square.
    ['U = 60 dBµV\nx | dBm = U - db(50 ohm)', '(1 mV)^2 ÷ 50 Ω'],
    ['P = -30 dBm\nx | dBµV = P + db(50 ohm)', '(1 µW)^0.5 × (50 Ω)^0.5'],
    ['E = 40 dBµV/m\nx | dBW/m² = E - db(377 ohm)', '(100 µV/m)^2 ÷ 377 Ω'],
    // Logarithms over a written reference are levels in a line that asks for one.
    ['P = 25 mW\nL = 3 dB\nx | dBm = 10*log10(P/(1 mW)) - L', '25 mW ÷ 1.995'],
    ['N = -174 dBm/Hz\nB = 125 kHz\nx | dBm = N + 10*log10(B/(1 Hz)) + 3 dB', '3.981 zW/Hz × 125 kHz × 1.995'],
    ['V = 2 mV\nx | dBµV = 20*log10(V/(1 uV)) + 6 dB', '2 mV × 1.995'],
    // A bare reference that is nowhere in the line's unit: the product gives the figure, if not the unit.
    ['B = 125 kHz\nx | dB = 10*log10(B/(1 Hz)) - 3 dB', '125000 ÷ 1.995'],
    ['P = 3 dBm\nx = P + 0 dB', '1.995 mW × 1'],
  ])('%j is %s', (text, step) => {
    const working = workingOfLast(text);
    expect(stepText(working, 'in linear terms')).toBe(step);
    expectToGiveResult(working);
  });
});

describe('sums of powers are sums', () => {
  it.each([
    ['a = -100 dBm\nb = -97 dBm\nx = powersum(a, b)', '100 fW + 199.5 fW'],
    ['a = -100 dBm\nx = powersum(a, 1 pW)', '100 fW + 1 pW'],
    ['a = 3 dB\nx = powersum(a, 4)', '1.995 + 2.512'],
    ['a = -100 dBm\nL = 3 dB\nx = powersum(a - L, a)', '100 fW ÷ 1.995 + 100 fW'],
    ['T = 75 K\nx | dBK = powersum(T, 290 K)', '75 K + 290 K'],
    ['T = 75 K\nB = 1 MHz\nx | dBm = powersum(k_B*T*B, -110 dBm)', '1.035 fW + 10 fW'],
    ['a = -90 dBm\nb = -93 dBm\nx = powerdiff(a, b)', '1 pW − 501.2 fW'],
    ['a = -90 dBm\nL = 3 dB\nx = powerdiff(a, a - L)', '1 pW − (1 pW ÷ 1.995)'],
    ['a = 0 dBm\nb = -30 dBm\nx = meanpower(a, b)', '(1 mW + 1 µW) ÷ 2'],
    ['a = 20 dB\nb = 17 dB\nx = ratiosum(a, b)', '1 ÷ (1 ÷ 100 + 1 ÷ 50.12)'],
    [
      'C = -90 dBm\nN = -110 dBm\nI = -107 dBm\nx = ratiosum(C - N, C - I)',
      '1 ÷ (1 ÷ (1 pW ÷ 10 fW) + 1 ÷ (1 pW ÷ 19.95 fW))',
    ],
    [
      'a = 20 dB\nb = 17 dB\nc = 15 dB\nx = ratiosum(ratiosum(a, b), c)',
      '1 ÷ (1 ÷ (1 ÷ (1 ÷ 100 + 1 ÷ 50.12)) + 1 ÷ 31.62)',
    ],
    ['a | dB | impairment ratio = -20 dB\nb | dB | impairment ratio = -17 dB\nx = ratiosum(a, b)', '0.01 + 0.01995'],
    ['a = -100 dBm\nx = powersum(a, meanpower(a, a))', '100 fW + (100 fW + 100 fW) ÷ 2'],
    // Powers of voltages are their squares; the sum is a voltage again.
    ['a = 60 dBµV\nb = 3 mV\nx = powersum(a, b)', '√((1 mV)^2 + (3 mV)^2)'],
    ['a = 60 dBµV\nG = 6 dB\nx = powersum(a + G, a)', '√((1 mV × 1.995)^2 + (1 mV)^2)'],
    ['a = 1 mV\nb = 3 mV\nx | dBµV = meanpower(a, b)', '√(((1 mV)^2 + (3 mV)^2) ÷ 2)'],
    ['u = 2 mV\nv = 1 mV\na = 3 dB\nx = powersum(a, u/v)', '1.995 + 2^2'],
  ])('%j is %s', (text, step) => {
    const working = workingOfLast(text);
    expect(stepText(working, 'in linear terms')).toBe(step);
    expectToGiveResult(working);
  });
});

describe('there is no step', () => {
  it.each([
    ['for a quantity', 'x = 14 dBm'],
    ['for another line as it is', 'a = 14 dBm\nx = a'],
    ['for a single model', 'x = free_space_loss(3 km, 868 MHz)'],
    ['for linear arithmetic', 'T = 75 K\nx = T + 290 K'],
    ['for rates', 'a = 3 dB/m\nx = a + a'],
    ['while the value is withheld', 'a = 1 dBm\nx = a + a'],
    ['while the line waits', 'b = 1/0\na = 1 dB\nx = lin(a)*b'],
    ['beyond the range of numbers', 'a = 4000 dB\nx = a + 1 dB'],
  ])('%s', (_, text) => {
    expect(stepOf(workingOfLast(text), 'in linear terms')).toBeUndefined();
  });
});

it('shows no power as nought', () => {
  const working = workingOfLast('a | dBm = 0 W\nL = 3 dB\nx = a - L');
  expect(stepText(working, 'in linear terms')).toBe('0 W ÷ 1.995');
  expect(stepText(working, 'result')).toBe('no power = 0 W');
});

it('links the factors that are lines to their lines', () => {
  const pieces = stepOf(workingOfLast('P = 14 dBm\nL = 2 dB\nx = P - L + 3 dB'), 'in linear terms');
  expect(
    pieces?.filter(({ type }) => type === 'figure').map((piece) => ('lineId' in piece ? piece.lineId : undefined)),
  ).toEqual(['l0', undefined, 'l1']);
  const shares = stepOf(workingOfLast('a = -100 dBm\nb = 2 pW\nx = powersum(a, b)'), 'in linear terms');
  expect(shares?.filter(({ type }) => type === 'figure')).toMatchObject([{ lineId: 'l0' }, { lineId: 'l1' }]);
});

it.each(STARTERS)('gives the result for every line of $title that has the step', ({ text }) => {
  const read = readWorksheetFile(text);
  if (!read.ok) throw new Error(read.fault.sentence);
  const { worksheet } = read.value;
  const workings = new Evaluation(worksheet)
    .lines()
    .flatMap(({ symbol }) => worksheet.cases.map(({ id }) => workingIn(worksheet, symbol, id)));
  const written = workings.filter(
    (working) => stepOf(working, 'in linear terms') !== undefined && resultOf(working) > 0,
  );
  expect(written.length).toBeGreaterThan(10);
  for (const working of written) expectToGiveResult(working);
});

describe('any sum of a level and ratios', () => {
  const figure = fc.integer({ min: -9000, max: 9000 }).map((hundredths) => hundredths / 100);
  const level = fc.constantFrom(
    'dBm',
    'dBW',
    'dBµV',
    'dBV',
    'dBm/Hz',
    'dBHz',
    'dBK',
    'dB/K',
    'dBµV/m',
    'dBW/m²',
    'dBi',
    'dBd',
  );

  it('multiplies to the result', () => {
    fc.assert(
      fc.property(
        level,
        figure,
        fc.array(fc.tuple(figure, fc.constantFrom('+', '-'), fc.constantFrom('', '2*', '0.5*')), {
          minLength: 1,
          maxLength: 5,
        }),
        (unit, first, ratios) => {
          const lines = ratios.map(([ratio], at) => `r${String(at)} | dB | plain = ${String(ratio)} dB`);
          const sum = ratios.map(([, sign, factor], at) => ` ${sign} ${factor}r${String(at)}`).join('');
          expectToGiveResult(
            workingOfLast([`a = ${String(first)} ${unit}`, ...lines, `x | ${unit} = a${sum}`].join('\n')),
          );
        },
      ),
      { numRuns: 100 },
    );
  });

  it('adds to the result, of powers', () => {
    const terms = fc.array(figure, { minLength: 2, maxLength: 6 });
    fc.assert(
      fc.property(
        fc.constantFrom('dBm', 'dBW', 'dBµV', 'dB', 'dBK'),
        fc.constantFrom('powersum', 'meanpower', 'ratiosum'),
        terms,
        (unit, name, figures) => {
          const lines = figures.map((one, at) => `a${String(at)} = ${String(one)} ${unit}`);
          const list = figures.map((_, at) => `a${String(at)}`).join(', ');
          expectToGiveResult(
            workingOfLast(
              [...lines, `x = ${name === 'ratiosum' ? (unit === 'dB' ? name : 'powersum') : name}(${list})`].join('\n'),
            ),
          );
        },
      ),
      { numRuns: 100 },
    );
  });
});

/** Products, quotients and powers: linear dimensions, multiples of decibels, rates times lengths, and the logarithm idioms. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { sheetOf, valueOf } from '../engine/notation';

const GIVEN = `P = 20 dBm
               U = 60 dBµV
               G_1 = 10 dB
               W_1 = 2 W
               V_1 = 2 mV
               V_2 = 1 mV
               R = 50 ohm
               d = 5 km
               f = 900 MHz
               B = 200 kHz
               T = 290 K
               n = 3
               r = 0.5 dB/m
               l = 10 m`;

const read = (entry: string, head = 'y'): { figure: string; codes: readonly string[] } => {
  const evaluation = new Evaluation(sheetOf(`${GIVEN}\n${head} = ${entry}`));
  const { id } = evaluation.lines().at(-1) ?? { id: '' };
  const figure = evaluation.figure(id, 'nominal');
  return {
    figure: figure.state === 'value' ? `${Number(figure.value.toPrecision(6))} ${figure.unit.word}` : figure.state,
    codes: evaluation.findings(id).map(({ code }) => code),
  };
};

describe('linear products', () => {
  it.each([
    ['W_1*3', '6 W'],
    ['3 m*4 m', '12 m²'],
    ['V_1^2/R', '8e-8 W'],
    ['V_1*V_2', '0.000002 V²'],
    ['V_1/R', '0.00004 A'],
    ['W_1/B', '0.00001 J'],
    ['k_B*T*B', '8.00776e-16 W'],
    ['1/d', '0.0002 1/m'],
    ['c_0/f', '0.333103 m'],
    ['d/(1 km)', '5 1'],
    ['W_1/W_1', '1 1'],
    ['f*1 µs', '900 1'],
    ['W_1/(4*pi*d^2)', '6.3662e-9 W/m²'],
    ['sqrt(30 ohm*W_1)/d', '0.00154919 V/m'],
    ['2^10', '1024 1'],
    ['d^2', '25000000 m²'],
    ['d^0.5', '70.7107 m⁰·⁵'],
    ['n^2', '9 1'],
    ['f^-1', '1.11111e-9 s'],
  ])('%s = %s', (entry, figure) => {
    expect(read(entry)).toEqual({ figure, codes: [] });
  });

  it.each([
    ['2^(3 m)', 'unit-mismatch'],
    ['d^n2', 'unknown-symbol'],
    ['d^(1/d)', 'unit-mismatch'],
    ['d^B', 'unit-mismatch'],
  ])('%s: %s', (entry, code) => {
    expect(read(entry).codes).toEqual([code]);
  });

  it('a power whose exponent is a line holding a bare number is known by it', () => {
    expect(read('d^n')).toEqual({ figure: '125000000000 m³', codes: [] });
  });
});

describe('multiples of decibels', () => {
  it.each([
    ['2*G_1', '20 dB'],
    ['G_1*2', '20 dB'],
    ['G_1/2', '5 dB'],
    ['n*G_1', '30 dB'],
    ['G_1*n', '30 dB'],
    ['-G_1', '-10 dB'],
    ['G_1*50 %', '5 dB'],
    ['G_1/G_1', '1 1'],
    ['(G_1 + 2 dB)/(4 dB)', '3 1'],
  ])('%s = %s', (entry, figure) => {
    expect(read(entry)).toEqual({ figure, codes: [] });
  });

  it.each([
    ['G_1*G_1', 'decibels-multiplied'],
    ['P*G_1', 'decibels-multiplied'],
    ['P/G_1', 'decibels-multiplied'],
    ['P/P', 'decibels-multiplied'],
    ['3/G_1', 'decibels-multiplied'],
    ['G_1*W_1', 'decibels-multiplied'],
    ['W_1/G_1', 'decibels-multiplied'],
    ['G_1^2', 'decibels-multiplied'],
    ['2^G_1', 'decibels-multiplied'],
    ['10^G_1', 'decibels-multiplied'],
    ['3*P', 'levels-summed'],
  ])('%s: %s', (entry, code) => {
    expect(read(entry)).toEqual({ figure: 'withheld', codes: [code] });
  });
});

describe('rates', () => {
  it.each([
    ['r*l', '5 dB'],
    ['l*r', '5 dB'],
    ['r*l/2', '2.5 dB'],
    ['0.2 dB/km*d', '1 dB'],
    ['22 dB/100m*l', '2.2 dB'],
    ['1 dB/ft*1 m', '3.28084 dB'],
    ['2*r', '1 dB/m'],
    ['r/2', '0.25 dB/m'],
    ['r*n', '1.5 dB/m'],
  ])('%s = %s', (entry, figure) => {
    expect(read(entry)).toEqual({ figure, codes: [] });
  });

  it.each(['r*B', 'r*r', 'r*G_1', 'B/r'])('%s is refused', (entry) => {
    expect(read(entry).codes).toEqual(['rate-without-length']);
  });

  it('are losses once they have a length', () => {
    const evaluation = new Evaluation(sheetOf(`${GIVEN}\ny = r*l\nz = P + y`));
    expect(evaluation.reading('l14', 'nominal').kind).toEqual({ kind: 'loss', origin: 'expression' });
    expect(evaluation.findings('l15').map(({ code }) => code)).toEqual(['loss-added']);
  });
});

describe('the logarithm idioms', () => {
  it.each([
    ['10*log10(W_1)', '3.0103 dBW'],
    ['log10(W_1)*10', '3.0103 dBW'],
    ['-10*log10(W_1/2 W)', '0 dB'],
    ['10*log10(B)', '53.0103 dBHz'],
    ['10*log10(T)', '24.624 dBK'],
    ['10*log10(R)', '16.9897 dBΩ'],
    ['10*log10(100)', '20 dB'],
    ['20*log10(100)', '40 dB'],
    ['20*log10(V_1)', '-53.9794 dBV'],
    ['20*log10(V_1/V_2)', '6.0206 dB'],
    ['20*log10(d)', '73.9794 dBm²'],
    ['20*log10(W_1/1 W)', '6.0206 dB'],
    ['10*log10((V_1/V_2)^2)', '6.0206 dB'],
    ['2*10*log10(100)', '40 dB'],
    ['10*log10(d/(1 km))', '6.9897 dB'],
    ['35*log10(100)', '70 1'],
    ['ln(100)', '4.60517 1'],
  ])('%s = %s', (entry, figure) => {
    expect(read(entry)).toEqual({ figure, codes: [] });
  });

  it.each([
    ['10*log10(V_1)', ['log-of-dimension'], 'withheld'],
    ['10*log10(V_1/V_2)', ['field-ratio-in-power-log'], '3.0103 dB'],
    ['10*log10(3 mA/(1 mA))', ['field-ratio-in-power-log'], '4.77121 dB'],
    ['10*log10(sqrt(W_1/1 W))', ['field-ratio-in-power-log'], '1.50515 dB'],
    ['10*log10(P)', ['decibels-multiplied'], 'withheld'],
    ['20*log10(G_1)', ['decibels-multiplied'], 'withheld'],
    ['log10(W_1)', ['log-of-dimension'], 'withheld'],
    ['35*log10(d)', ['log-of-dimension'], 'withheld'],
    ['10*ln(W_1)', ['log-of-dimension'], 'withheld'],
    ['10*log10(0)', ['no-power'], 'withheld'],
    ['10*log10(-W_1)', ['no-power'], 'withheld'],
  ])('%s: %j', (entry, codes, figure) => {
    expect(read(entry)).toEqual({ figure, codes });
  });

  it('10*log10(x) is db(x), and 20*log10(x) is db of x², whatever x is', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('W', 'Hz', 'K', 'ohm', 'm', '1', 's', 'W/m²'),
        fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
        (unit, x) => {
          const literal = unit === '1' ? String(x) : `${String(x)} ${unit}`;
          const evaluation = new Evaluation(
            sheetOf(`x = ${literal}\na = 10*log10(x)\nb = db(x)\nc = 20*log10(x)\nd = db(x^2)`),
          );
          const values = ['a', 'b', 'c', 'd'].map((symbol) => Number(valueOf(evaluation, symbol)));
          expect(values[0]).toBe(values[1]);
          expect(values[2]).toBeCloseTo(values[3] ?? NaN, 9);
        },
      ),
      { numRuns: 60 },
    );
  });
});

describe('the exponential idioms', () => {
  it.each([
    ['10^(P/10)', '0.1 W'],
    ['10^(0.1*P)', '0.1 W'],
    ['10^((P - 3 dB)/10)', '0.0501187 W'],
    ['10^(G_1/10)', '10 1'],
    ['10^(-G_1/10)', '0.1 1'],
    ['10^(G_1/20)', '3.16228 1'],
    ['10^(U/20)', '0.001 V'],
    ['10^(U/10)', '0.000001 V²'],
    ['10^(3/10)', '1.99526 1'],
    ['1 mW*10^(P/10)', '0.1 W'],
    ['10*log10(10^(P/10) + 10^(P/10))', '-6.9897 dBW'],
  ])('%s = %s', (entry, figure) => {
    const { figure: found, codes } = read(entry);
    expect(codes).toEqual([]);
    // Sums of powers may be shown over the watt or in the unit that went in.
    expect(entry.startsWith('10*log10(10^') ? ['-6.9897 dBW', '23.0103 dBm'] : [figure]).toContain(found);
  });

  it('10^(x/10) is lin(x)', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('dBm', 'dBW', 'dB', 'dBHz', 'dBK', 'dBm/Hz'),
        fc.double({ min: -100, max: 100, noNaN: true }),
        (unit, x) => {
          const evaluation = new Evaluation(
            sheetOf(`x = ${String(Number(x.toFixed(6)))} ${unit}\na = 10^(x/10)\nb = lin(x)`),
          );
          const [a, b] = ['a', 'b'].map((symbol) => Number(valueOf(evaluation, symbol)));
          expect(Math.abs((a ?? NaN) / (b ?? NaN) - 1)).toBeLessThan(1e-12);
        },
      ),
      { numRuns: 60 },
    );
  });
});

/** Sums: figures, dimensions and meanings of decibel terms together; linear sums; what a result is taken to be. */
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { expectLines, sheetOf } from '../engine/notation';

const GIVEN = `P = 20 dBm
               Q = 7 dBm
               W = -10 dBW
               N_0 = -174 dBm/Hz
               B = 1 MHz
               G_1 = 10 dB
               L_1 = 3 dB
               SNR = 12 dB
               NF = 5 dB
               EVM = -30 dB
               GT = 11 dB/K
               T = 290 K
               S_w | dBm | level | wanted = -90 dBm
               N_u | dBm | level | unwanted = -105 dBm
               n = 3
               x_d = 2 dB`;

const read = (entry: string, head = 'y'): { figure: string; kind: string; side: string; codes: readonly string[] } => {
  const evaluation = new Evaluation(sheetOf(`${GIVEN}\n${head} = ${entry}`));
  const { id } = evaluation.lines().at(-1) ?? { id: '' };
  const { figure, kind, side } = evaluation.reading(id, 'nominal');
  return {
    figure: figure.state === 'value' ? `${figure.value.toFixed(2)} ${figure.unit.word}` : figure.state,
    kind: kind?.kind ?? '',
    side: side?.side ?? '',
    codes: evaluation.findings(id).map(({ code }) => code),
  };
};

describe('figures and dimensions of decibel sums', () => {
  it.each([
    ['P - L_1 + G_1', '27.00 dBm'],
    ['P - Q', '13.00 dB'],
    ['P - W', '0.00 dB'],
    ['W - P', '0.00 dB'],
    ['N_0 + db(B)', '-114.00 dBm'],
    ['P - db(B)', '-40.00 dBm/Hz'],
    ['P - N_0', '194.00 dBHz'],
    ['3*P - 2*Q', '46.00 dBm'],
    ['2*P - Q', '33.00 dBm'],
    ['P + (P - Q)/2', '26.50 dBm'],
    ['-(L_1 - P)', '17.00 dBm'],
    ['P - (L_1 + (G_1 - 1 dB))', '8.00 dBm'],
    ['0.5*(G_1 + x_d)', '6.00 dB'],
    ['(G_1 + x_d)/2', '6.00 dB'],
    ['n*L_1', '9.00 dB'],
    ['L_1*n/2', '4.50 dB'],
    ['-n*L_1', '-9.00 dB'],
    ['G_1 - db(T)', '-14.62 dB/K'],
    ['W + GT - db(k_B)', '229.60 dBHz'],
    ['sum(P, -L_1, G_1)', '27.00 dBm'],
    ['P + 0 dB', '20.00 dBm'],
    ['60 dBµV - db(50 ohm)', '-46.99 dBm'],
    ['P + db(50 ohm) - P', '16.99 dBΩ'],
    ['4 dBi + 2 dBd', '6.00 dBd'],
    ['P + 2 dBd', '24.15 dBm'],
  ])('%s = %s', (entry, figure) => {
    expect(read(entry)).toMatchObject({ figure, codes: [] });
  });

  it('keep the unit of the one term that has the result’s dimension, as written', () => {
    expect([read('W - L_1').figure, read('P - L_1').figure, read('N_0 + NF').figure]).toEqual([
      '-13.00 dBW',
      '17.00 dBm',
      '-169.00 dBm/Hz',
    ]);
  });

  it('add figures as written, without going through powers of ten', () => {
    const evaluation = new Evaluation(sheetOf('a = -174 dBm/Hz\nb = 60 dBHz\nx = a + b + 3 dB'));
    expect(evaluation.figure('l2', 'nominal')).toMatchObject({ value: -111 });
  });

  it('of no power are no power', () => {
    const evaluation = new Evaluation(sheetOf('a | dBm = 0 W\nx = a + 3 dB\ny | W = x\nz = 3 dBm - a'));
    expect([1, 2].map((at) => evaluation.figure(`l${at}`, 'nominal'))).toMatchObject([
      { value: -Infinity },
      { value: 0 },
    ]);
    expect(evaluation.figure('l3', 'nominal').state).toBe('withheld');
  });
});

describe('what a sum makes, where the line does not say', () => {
  it.each([
    ['S_w - L_1', 'level', 'wanted'],
    ['N_u - L_1', 'level', 'unwanted'],
    ['N_u + NF', 'level', 'unwanted'],
    ['P - L_1', 'level', ''],
    ['S_w - N_u', 'signal ratio', ''],
    ['N_u - S_w', 'impairment ratio', ''],
    ['N_u + SNR', 'level', 'wanted'],
    ['S_w - SNR', 'level', 'unwanted'],
    ['S_w + EVM', 'level', 'unwanted'],
    ['SNR - SNR', 'gain', ''],
    ['SNR - 3 dB', 'signal ratio', ''],
    ['-EVM', 'signal ratio', ''],
    ['G_1 - db(T)', 'figure of merit', ''],
    ['S_w + GT - db(k_B)', 'signal ratio', ''],
    ['NF + 0.1 dB', 'noise figure', ''],
    ['L_1 + L_1', 'loss', ''],
    ['L_1 - G_1', 'loss', ''],
    ['G_1 - L_1', 'gain', ''],
    ['P - Q', 'gain', ''],
    ['db(k_B) + db(T) + db(B)', 'level', 'unwanted'],
    ['N_0 + db(B)', 'level', ''],
  ])('%s: %s %s', (entry, kind, side) => {
    expect(read(entry)).toMatchObject({ kind, side });
  });
});

describe('declared kinds, named kinds, and nets', () => {
  it.each([
    ['a declared kind comes first', 'y | dB | gain', 'SNR - SNR', 'gain'],
    ['then the name', 'SNR_2', 'x_d + 1 dB', 'signal ratio'],
    ['then the net', 'y', 'S_w - N_u', 'signal ratio'],
    ['then the unit', 'y | dBHz', '60 dBHz', 'bandwidth'],
    ['and nothing where nothing tells', 'y', 'x_d + 1 dB', ''],
  ])('%s', (_, head, entry, kind) => {
    expect(read(entry, head).kind).toBe(kind);
  });

  it('assumed sides are shown and not judged by: an interferer’s P_tx is nobody’s mistake', () => {
    const evaluation = expectLines(`S = -90 dBm
      N = -110 dBm
      a = S - N               => 20.00 dB
      b = S + SNR             => -78.00 dBm
      SNR = 12 dB`);
    expect(evaluation.reading('l0', 'nominal').side).toEqual({ side: 'wanted', origin: 'name' });
  });
});

describe('linear sums', () => {
  it.each([
    ['1 W + 500 mW', '1.50 W', []],
    ['1 km + 200 m - 5 cm', '1.20 km', []],
    ['300 K + 20 K', '320.00 K', []],
    ['2 + 3*4', '14.00 1', []],
    ['1 MHz + 200 kbit/s', '1.20 MHz', []],
    ['50 % + 0.25', '75.00 %', []],
    ['10 µV - 3 µV', '7.00 µV', []],
  ])('%s = %s', (entry, figure, codes) => {
    expect(read(entry)).toMatchObject({ figure, codes });
  });

  it.each([
    ['1 W + 3 K', 'unit-mismatch'],
    ['1 W + 3', 'unit-mismatch'],
    ['1 W + 3 dBm', 'mixed-forms'],
    ['3 dB/km + 1 km', 'rate-without-length'],
    ['(1 > 2) + 3', 'wrong-arguments'],
    ['"a" + 3', 'wrong-arguments'],
    ['3 dB/km - 3', 'rate-without-length'],
  ])('%s: %s', (entry, code) => {
    expect(read(entry).codes).toEqual([code]);
  });

  it('of rates are rates', () => {
    expect(read('2 dB/km + 1 dB/m')).toMatchObject({ figure: '1002.00 dB/km', codes: [] });
  });
});

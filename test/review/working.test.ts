/** The working of a line: its steps in symbols and with values, what it rests on, and the remarks. */
import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../src/engine';
import { workingOf } from '../../src/review';
import { sheetOf, sheetOfLines } from '../engine/notation';
import { stepOf, stepText, workingIn, workingOfLast } from './support';

const INPUTS = [
  'C = -92.75 dBm',
  'N = -117.01 dBm',
  'L = -0.5 dB',
  'd = 1839 km',
  'v = 3e8 m/s',
  'T = 15 °C',
  'P | dBm = 0 W',
].join('\n');
const shown = (entry: string): ReturnType<typeof workingOfLast> => workingOfLast(`${INPUTS}\nx = ${entry}`);

describe('with values', () => {
  it.each([
    // A minus sign in front of a negative figure is told from the figure's own.
    ['C - N', '−92.75 dBm − (−117.01 dBm)'],
    ['C + L', '−92.75 dBm + (−0.50 dB)'],
    ['C - L - L', '−92.75 dBm − (−0.50 dB) − (−0.50 dB)'],
    ['-L', '−(−0.50 dB)'],
    ['- L + 3 dB', '−(−0.50 dB) + 3 dB'],
    ['2*L', '2 × (−0.50 dB)'],
    ['L*2', '−0.50 dB × 2'],
    ['(C) - (N)', '(−92.75 dBm) − (−117.01 dBm)'],
    ['powersum(C, N)', 'powersum(−92.75 dBm, −117.01 dBm)'],
    ['max(-L, L)', 'max(−(−0.50 dB), −0.50 dB)'],
    ['if(L < 0 dB, C, N)', 'if(−0.50 dB < 0 dB, −92.75 dBm, −117.01 dBm)'],
    ['if(L <> L, C, N)', 'if(−0.50 dB ≠ −0.50 dB, −92.75 dBm, −117.01 dBm)'],
    ['C - -3 dB', '−92.75 dBm − (−3 dB)'],
    ['C − −3 dB', '−92.75 dBm − (−3 dB)'],
    // A unit that is raised with its figure, or that is a quotient in a place below.
    ['d^2', '(1839 km)^2'],
    ['sqrt(d^2 + d*d)', 'sqrt((1839 km)^2 + 1839 km × 1839 km)'],
    ['d/v', '1839 km / (300×10⁶ m/s)'],
    ['v/d', '300×10⁶ m/s / 1839 km'],
    ['db(k_B*T_0*(1 MHz))', 'db(13.80649×10⁻²⁴ J/K × 290 K × (1 MHz))'],
    ['1/k_B', '1 / (13.80649×10⁻²⁴ J/K)'],
    ['db(4*pi*d^2)', 'db(4 × 3.141593 × (1839 km)^2)'],
    ['pi^2', '3.141593^2'],
    ['10^(L/10)', '10^(−0.50 dB / 10)'],
    ['noise_density(T)', 'noise_density(15 °C)'],
    ['powersum(P, C)', 'powersum(no power, −92.75 dBm)'],
  ])('%s reads %s', (entry, text) => {
    expect(stepText(shown(entry), 'with values')).toBe(text);
  });

  it('is left out where there are no symbols', () => {
    expect(stepOf(shown('3 dB + 4 dB'), 'with values')).toBeUndefined();
  });

  it('keeps the symbol of a line that has no figure', () => {
    const working = workingOfLast('N = 1 dBm + 2 dBm\nL = 3 dB\nx = N - L');
    expect(stepText(working, 'with values')).toBe('N − 3.00 dB');
    expect(working.terms).toMatchObject([
      { symbol: 'N', text: 'withheld', unit: '' },
      { symbol: 'L', text: '3.00', unit: 'dB' },
    ]);
    expect(stepOf(working, 'result')).toBeUndefined();
  });

  it('shows figures as their lines show them: digits, typed digits and prefixes', () => {
    const worksheet = sheetOfLines([
      { id: 'a', symbol: 'a', label: '', entry: '2.3456 dB', digits: 3 },
      { id: 'b', symbol: 'b', label: '', entry: '2.244875 GHz' },
      { id: 'c', symbol: 'c', label: '', entry: 'b*2' },
      { id: 'x', symbol: 'x', label: '', entry: 'a + db(b/c)' },
    ]);
    expect(stepText(workingIn(worksheet, 'x'), 'with values')).toBe('2.346 dB + db(2.244875 GHz / 4.49 GHz)');
  });
});

describe('in symbols', () => {
  it.each([
    ['C-N', 'C − N'],
    ['2*L/4', '2 × L / 4'],
    ['L·2 ÷ 3', 'L × 2 / 3'],
    ['powersum( C ,N )', 'powersum(C, N)'],
    ['powersum(C;N)', 'powersum(C, N)'],
    ['-L--3dB', '−L − (−3dB)'],
    ['-(L)', '−(L)'],
    ['if(L>=0 dB, C, N)', 'if(L ≥ 0 dB, C, N)'],
  ])('%s reads %s', (entry, text) => {
    expect(stepText(shown(entry), 'in symbols')).toBe(text);
  });

  it('links symbols to their lines, and constants and functions to none', () => {
    const pieces = stepOf(workingOfLast('L = 1 dB\nx = L + db(pi)'), 'in symbols');
    expect(pieces?.filter(({ type }) => type === 'symbol')).toEqual([
      { type: 'symbol', symbol: 'L', lineId: 'l0' },
      { type: 'symbol', symbol: 'pi' },
    ]);
  });

  it.each([
    ['-0.5 dBd', '−0.5 dBd'],
    ['25 mW', '25 mW'],
    ['15,5 dB', '15,5 dB'],
    ['3 dB+(', '3 dB+('],
    ['3 dB +', '3 dB +'],
    ['two times five', 'two times five'],
  ])('is headed “as entered” for %j, which has none', (entry, text) => {
    const working = workingOfLast(`x = ${entry}`);
    expect(stepText(working, 'as entered')).toBe(text);
    expect(stepOf(working, 'in symbols')).toBeUndefined();
  });
});

describe('the result', () => {
  it.each([
    ['x = 14 dBm', '14.00 dBm = 25.12 mW'],
    ['x = 3 dB', '3.00 dB = × 1.995'],
    ['x | dBi = -0.5 dBd', '1.65 dBi = × 1.462'],
    ['x = 60 dBµV', '60.00 dBµV = 1 mV'],
    ['x = 290 K', '290 K'],
    ['x | dBm = 0 W', 'no power = 0 W'],
    ['x = 3 dB/km', '3.00 dB/km'],
  ])('of %s is %s', (text, result) => {
    expect(stepText(workingOfLast(text), 'result')).toBe(result);
  });

  it('is the only step missing from a line that has none, and there are no steps for an empty one', () => {
    expect(workingOfLast('x = ').steps).toEqual([]);
    expect(workingOfLast('x = 1/0').steps.map(({ title }) => title)).toEqual(['in symbols']);
  });
});

describe('what it rests on', () => {
  it('is every symbol once, lines with their labels and constants with their texts', () => {
    const { terms, shares } = workingOfLast(
      'G = 3 dB # Gain\nT = 290 K # Noise\nx | dB/K = G - db(T) + db(T) - db(T_0)',
    );
    expect(shares).toBe(false);
    expect(terms).toEqual([
      { symbol: 'G', label: 'Gain', text: '3.00', unit: 'dB', lineId: 'l0' },
      { symbol: 'T', label: 'Noise', text: '290', unit: 'K', lineId: 'l1' },
      { symbol: 'T_0', label: 'reference noise temperature', text: '290', unit: 'K' },
    ]);
  });

  it('says what the lines without figures are', () => {
    const { terms } = workingOfLast('a = 1/0\nb = a + 1\nc = \nx = a + b + c');
    expect(terms.map(({ symbol, text }) => [symbol, text])).toEqual([
      ['a', 'withheld'],
      ['b', 'waits'],
      ['c', 'no entry'],
    ]);
  });

  it('keeps a symbol that nothing stands for', () => {
    expect(workingOfLast('x = Q + 1 dB').terms).toEqual([{ symbol: 'Q', label: '', text: '', unit: '' }]);
  });
});

describe('cases', () => {
  it('have their own entries, figures and shares', () => {
    const text = 'N = -110 dBm\nI = -110 dBm @ storm: -100 dBm\nx = powersum(N, I) @ storm: powersum(N, I, I)';
    const calm = workingOfLast(text, 'calm', 'calm', 'storm');
    const storm = workingOfLast(text, 'storm', 'calm', 'storm');
    expect(stepText(calm, 'with values')).toBe('powersum(−110.00 dBm, −110.00 dBm)');
    expect(stepText(storm, 'with values')).toBe('powersum(−110.00 dBm, −100.00 dBm, −100.00 dBm)');
    expect(stepText(calm, 'in linear terms')).toBe('10 fW + 10 fW');
    expect(stepText(storm, 'in linear terms')).toBe('10 fW + 100 fW + 100 fW');
    expect(storm.terms.map(({ share }) => share?.toFixed(3))).toEqual(['0.048', '0.476', '0.476']);
    expect([calm.caseId, storm.caseId]).toEqual(['calm', 'storm']);
  });

  it('of a loop are all withheld, with the symbols to follow it by', () => {
    const working = workingOfLast('a = b + 1\nb = a + 1\nx = b');
    expect(working.reading.figure).toMatchObject({ state: 'waiting' });
    const loop = workingIn(sheetOf('a = b + 1\nb = a + 1'), 'a');
    expect(loop.reading.figure).toEqual({ state: 'withheld', code: 'loop' });
    expect(loop.steps).toEqual([
      {
        title: 'in symbols',
        pieces: [
          { type: 'symbol', symbol: 'b', lineId: 'l1' },
          { type: 'text', text: ' + ' },
          { type: 'text', text: '1' },
        ],
      },
      {
        title: 'with values',
        pieces: [
          { type: 'symbol', symbol: 'b', lineId: 'l1' },
          { type: 'text', text: ' + ' },
          { type: 'text', text: '1' },
        ],
      },
    ]);
  });

  it('are none of a line that does not exist', () => {
    expect(workingOf(new Evaluation(sheetOf('x = 1 dB')), 'nowhere', 'nominal')).toBeUndefined();
  });
});

describe('remarks', () => {
  it('give the formula and source of each model, once', () => {
    const { remarks } = workingOfLast('d = 3 km\nf = 868 MHz\nx = free_space_loss(d, f) - free_space_loss(2*d, f)');
    expect(remarks).toEqual([
      'free_space_loss: L = 20 log₁₀(4π·d·f/c) (ITU-R P.525, free-space basic transmission loss)',
    ]);
  });

  it('reach into what stands in other calls', () => {
    const { remarks } = workingOfLast('L = 2 dB\nx = cascade_nf(passive_nf(L), -L, 4 dB)');
    expect(remarks.map((remark) => remark.split(':')[0])).toEqual(['cascade_nf', 'passive_nf']);
  });

  const ROOT = 'db of a voltage, current or field, or of a ratio of two: 20 log₁₀';
  it.each([
    ['x = db(2 mV)', [ROOT]],
    ['x = db((2 mV)/(1 mV))', [ROOT]],
    ['E = 3 mV/m\nx | dBµV/m = db(E) + 3 dB', [ROOT]],
    ['x = max(db(3 mA), db(2 mA))', [ROOT]],
    ['x = db(2 mW)', []],
    ['x = db((2 mW)/(1 mW))', []],
    ['x = db(3 km)', []],
    ['x = db((2 mV)^2/(50 ohm))', []],
    ['x = powersum(-90 dBm, -93 dBm)', []],
    ['x = 3 dB', []],
  ])('on %s: %j', (text, remarks) => {
    expect(workingOfLast(text).remarks).toEqual(remarks);
  });
});

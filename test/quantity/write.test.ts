/** Figures written for people: decimals and significant figures, prefixes, signs, no power, linear values. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  findUnit,
  linearFigure,
  linearValue,
  writeFigure,
  writeQuantity,
  writeSignificant,
  type Unit,
  type WritingOptions,
} from '../../src/quantity';

const unit = (word: string): Unit => {
  const found = findUnit(word);
  if (found === undefined) throw new Error(`no unit ${word}`);
  return found;
};

describe('decibel figures', () => {
  it.each([
    [14, 'dBm', {}, '14.00 dBm'],
    [-174, 'dBm/Hz', {}, '−174.00 dBm/Hz'],
    [-174, 'dBm/Hz', { minus: '-' }, '-174.00 dBm/Hz'],
    [12.345, 'dB', { digits: 1 }, '12.3 dB'],
    [12.345, 'dB', { digits: 0 }, '12 dB'],
    [-0.001, 'dB', {}, '0.00 dB'],
    [-0, 'dB', {}, '0.00 dB'],
    [-Infinity, 'dBm', {}, 'no power'],
    [0.35, 'dB/m', {}, '0.35 dB/m'],
    [2, 'dBi', { typedDigits: 5 }, '2.00 dBi'],
  ] as const)('%d %s with %j is %s', (value, word, options, text) => {
    expect(writeQuantity(value, unit(word), options as WritingOptions)).toBe(text);
  });
});

describe('linear figures', () => {
  it.each([
    [868, 'MHz', {}, '868 MHz'],
    [868.123456, 'MHz', {}, '868.1 MHz'],
    [868.123456, 'MHz', { digits: 7 }, '868.1235 MHz'],
    [868.123, 'MHz', { typedDigits: 6 }, '868.123 MHz'],
    [0.5, '1', {}, '0.5'],
    [3, '1', {}, '3'],
    [1234.5, '1', {}, '1235'],
    [999_999, '1', {}, '1×10⁶'],
    [1_234_567, '1', {}, '1.235×10⁶'],
    [0.000123456, '1', {}, '123.5×10⁻⁶'],
    [-273.25, '°C', {}, '−273.3 °C'],
    [0, 'W', {}, '0 W'],
    [99.99999, 'W', {}, '100 W'],
  ] as const)('%d %s with %j is %s', (value, word, options, text) => {
    expect(writeQuantity(value, unit(word), options as WritingOptions)).toBe(text);
  });

  it.each([
    [2e-12, 'W', '2 pW'],
    [0.0126, 'W', '12.6 mW'],
    [1e9, 'Hz', '1 GHz'],
    [0.9999999, 'W', '1 W'],
    [999.96, 'W', '1 kW'],
    [0, 'W', '0 W'],
    [-0.002, 'V', '−2 mV'],
    [1e30, 'W', '1×10³⁰ W'],
    [75.09, 'K', '75.09 K'],
    [7.5e-4, 'K', '750×10⁻⁶ K'],
  ])('%d %s, the unit not chosen by anybody, is %s', (value, word, text) => {
    expect(writeQuantity(value, unit(word), { isFitted: true })).toBe(text);
  });

  it('with a prefix leave one to three digits before the point', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-20, max: 1e11, noNaN: true }), (value) => {
        const { text, unit: word } = writeFigure(value, unit('W'), { isFitted: true });
        fc.pre(!text.includes('×'));
        expect(Number(text)).toBeGreaterThanOrEqual(1);
        expect(Number(text)).toBeLessThan(1000);
        const written = unit(word);
        expect(written.form === 'linear' && Math.abs((Number(text) * written.factor) / value - 1)).toBeLessThan(6e-4);
      }),
    );
  });

  it('with n significant figures are within half a unit of the last', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 9e5, noNaN: true }), fc.integer({ min: 1, max: 9 }), (value, digits) => {
        const text = writeSignificant(value, digits);
        fc.pre(!text.includes('×'));
        expect(Math.abs(Number(text) - value)).toBeLessThanOrEqual(
          0.5000001 * 10 ** (Math.floor(Math.log10(value)) + 1 - digits) + Math.abs(value) * 1e-12,
        );
      }),
    );
  });
});

describe('the linear value behind decibels', () => {
  it.each([
    [14, 'dBm', '25.12 mW'],
    [-100, 'dBm', '100 fW'],
    [3, 'dBW', '1.995 W'],
    [-1.1, 'dB', '0.7762 ×'],
    [3, 'dBi', '1.995 ×'],
    [2, 'dBd', '2.6 ×'],
    [60, 'dBµV', '1 mV'],
    [40, 'dBµV/m', '100 µV/m'],
    [60, 'dBHz', '1 MHz'],
    [20, 'dBK', '100 K'],
    [17, 'dBΩ', '50.12 Ω'],
    [-174, 'dBm/Hz', '3.981 zW/Hz'],
    [12, 'dB/K', '15.85 1/K'],
    [-60, 'dBc', '1×10⁻⁶ ×'],
    [54, 'dB(bit/s)', '251.2 kbit/s'],
    [0, 'dBm²', '1 m²'],
    [-228.6, 'dBW/K/Hz', '13.8×10⁻²⁴ J/K'],
  ])('of %d %s is %s', (value, word, text) => {
    const written = linearFigure(value, unit(word));
    expect(written && `${written.text} ${written.unit}`).toBe(text);
  });

  it.each(['W', 'MHz', 'K', 'dB/km', '1'])('is not given for %s', (word) => {
    expect(linearFigure(3, unit(word))).toBeUndefined();
  });

  it('is not given for no power', () => {
    expect(linearFigure(-Infinity, unit('dBm'))).toEqual({ text: '0', unit: 'W' });
    expect(linearValue(-Infinity, unit('dBm'))).toEqual({ value: 0, unit: 'W' });
  });

  it('is volts, not their square, for levels of voltage', () => {
    expect(linearValue(120, unit('dBµV'))).toEqual({ value: 1, unit: 'V' });
  });
});

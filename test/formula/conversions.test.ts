/** A line's unit: every way from the form and reference of a result to those of the line, and what has no way. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { findUnit, UNIT_WORDS } from '../../src/quantity';
import { sheetOf, valueOf } from '../engine/notation';

const shown = (entry: string, unit: string): string => {
  const evaluation = new Evaluation(sheetOf(`x | ${unit} = ${entry}`));
  const figure = evaluation.figure('l0', 'nominal');
  const codes = evaluation.findings('l0').map(({ code }) => code);
  return figure.state === 'value' ? [Number(figure.value.toPrecision(7)), ...codes].join(' ') : codes.join(' ');
};

describe('between references and prefixes', () => {
  it.each([
    ['30 dBm', 'dBW', '0'],
    ['0 dBW', 'dBm', '30'],
    ['2 dBd', 'dBi', '4.15'],
    ['5 dBi', 'dBd', '2.85'],
    ['60 dBµV', 'dBmV', '0'],
    ['60 dBµV', 'dBV', '-60'],
    ['-174 dBm/Hz', 'dBm/MHz', '-114'],
    ['-174 dBm/Hz', 'dBW/Hz', '-204'],
    ['-174 dBm/Hz', 'dBm/100kHz', '-124'],
    ['60 dBHz', 'dBkHz', '30'],
    ['-100 dBW/m²', 'dBm/m²', '-70'],
    ['868 MHz', 'GHz', '0.868'],
    ['3 m', 'cm', '300'],
    ['1 mi', 'km', '1.609344'],
    ['1 nmi', 'km', '1.852'],
    ['25 °C', 'K', '298.15'],
    ['0 K', '°C', '-273.15'],
    ['30 deg', 'rad', '0.5235988'],
    ['256 kbit/s', 'bit/s', '256000'],
    ['1 MHz', 'Mbit/s', '1'],
    ['2 dB/100m', 'dB/km', '20'],
    ['1 h', 's', '3600'],
    ['1 hPa', 'Pa', '100'],
  ])('%s in %s: %s', (entry, unit, expected) => {
    expect(shown(entry, unit)).toBe(expected);
  });
});

describe('between the forms', () => {
  it.each([
    ['10 W', 'dBW', '10'],
    ['10 W', 'dBm', '40'],
    ['40 dBm', 'W', '10'],
    ['14 dBm', 'mW', '25.11886'],
    ['1 mV', 'dBµV', '60'],
    ['60 dBµV', 'mV', '1'],
    ['1 mV/m', 'dBµV/m', '60'],
    ['60 dBµV/m', 'µV/m', '1000'],
    ['1 MHz', 'dBHz', '60'],
    ['60 dBHz', 'kHz', '1000'],
    ['100 K', 'dBK', '20'],
    ['26.85 °C', 'dBK', '24.77121'],
    ['20 dBK', '°C', '-173.15'],
    ['50 Ω', 'dBΩ', '16.9897'],
    ['100 m²', 'dBm²', '20'],
    ['256 kbit/s', 'dB(bit/s)', '54.0824'],
    ['k_B', 'dBW/K/Hz', '-228.5992'],
    ['2 W/(1 W)', 'dB', '3.0103'],
    ['2 V/(1 V)', 'dB', '6.0206'],
    ['3 dB', '1', '1.995262'],
    ['-3 dB', '%', '50.11872'],
    ['0 W', 'dBm', '-Infinity'],
    ['2 W + 3 W', 'dBW', '6.9897'],
    ['lin(3 dBm) + 1 mW', 'dBm', '4.764349'],
    ['10 dBm - 3 dBm', '1', '5.011872'],
    ['lin(38 dBi)/(400 K)', 'dB/K', '11.9794'],
    ['-60 dBc', 'dB', '-60'],
    ['10 dBm²', 'm²', '10'],
  ])('%s in %s: %s', (entry, unit, expected) => {
    expect(shown(entry, unit)).toBe(expected);
  });
});

describe('bare numbers', () => {
  it.each([
    ['14', 'dBm', '14'],
    ['-174', 'dBm/Hz', '-174'],
    ['20', 'MHz', '20'],
    ['25', '°C', '25'],
    ['20 - 3', 'dBm', '17'],
    ['2*5', 'dB', '10'],
    ['0.35', 'dB/m', '0.35'],
    ['14,5', 'dBm', '14.5'],
    ['50', '%', '50'],
    ['0.25', '%', '0.25'],
    ['3', '1', '3'],
  ])('%s in %s is taken in that unit: %s', (entry, unit, expected) => {
    expect(shown(entry, unit)).toBe(expected);
  });
});

describe('what has no way', () => {
  it.each([
    ['10 dBm', 'dB', 'unit-mismatch'],
    ['10 dBm', 'K', 'unit-mismatch'],
    ['10 dBm', 'dBm/Hz', 'unit-mismatch'],
    ['10 dBm', 'dBµV', 'field-and-power'],
    ['3 mV', 'dBm', 'field-and-power'],
    ['60 dBµV', 'W', 'field-and-power'],
    ['10 W', 'Hz', 'unit-mismatch'],
    ['3 m', 's', 'unit-mismatch'],
    ['0.3 dB/m', 'dB', 'rate-without-length'],
    ['3 dB', 'dB/m', 'unit-mismatch'],
    ['1 > 2', 'dB', 'bad-entry'],
    ['"x"', 'dB', 'bad-entry'],
    ['3 dB', 'furlong', 'bad-entry'],
    ['10 dBm/Hz', 'dBW', 'unit-mismatch'],
    ['20 dBi', 'dBW', 'unit-mismatch'],
  ])('%s in %s: %s', (entry, unit, code) => {
    expect(shown(entry, unit)).toBe(code);
  });
});

describe('there and back', () => {
  const pairs = UNIT_WORDS.flatMap((word) => {
    const unit = findUnit(word);
    return unit === undefined || unit.form === 'rate'
      ? []
      : UNIT_WORDS.filter((other) => {
          const second = findUnit(other);
          return (
            second !== undefined &&
            second.form !== 'rate' &&
            second.dimension.every((n, at) => n === unit.dimension[at]) &&
            word !== other
          );
        }).map((other) => [word, other] as const);
  });

  it('any two units of one dimension give the figure back', () => {
    fc.assert(
      fc.property(fc.constantFrom(...pairs), fc.double({ min: 0.5, max: 90, noNaN: true }), ([word, other], value) => {
        const figure = Number(value.toFixed(5));
        const evaluation = new Evaluation(
          sheetOf(`x | ${word} = ${String(figure)}\ny | ${other} = x\nz | ${word} = y`),
        );
        const back = valueOf(evaluation, 'z');
        expect([word, other, typeof back]).toEqual([word, other, 'number']);
        expect(Math.abs(Number(back) - figure)).toBeLessThan(1e-8 * (1 + Math.abs(figure) + (word === '°C' ? 300 : 0)));
      }),
      { numRuns: 300 },
    );
  });
});

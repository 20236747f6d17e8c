/** Mistakes seen in other libraries, each a test here. */
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { sheetOf, valueOf } from '../engine/notation';

const value = (text: string, symbol = 'x'): number | string => valueOf(new Evaluation(sheetOf(text)), symbol);

describe('mistakes seen elsewhere', () => {
  it('−0.5 dB/cm × 10 cm gave +9.5 dB; it is −5 dB', () => {
    expect(value('x = -0.5 dB/cm*10 cm')).toBe(-5);
    expect(value('r = -0.5 dB/cm\nl = 10 cm\nx = r*l')).toBe(-5);
    expect(value('x = 10 cm*-0.5 dB/cm')).toBe(-5);
  });

  it('20 dBm − 10 dBm gave 19.5 dBm; it is 10 dB', () => {
    expect(value('x = 20 dBm - 10 dBm')).toBe(10);
    const evaluation = new Evaluation(sheetOf('x = 20 dBm - 10 dBm'));
    expect(evaluation.figure('l0', 'nominal')).toMatchObject({ unit: { word: 'dB' } });
    expect(value('x = powerdiff(20 dBm, 10 dBm)')).toBeCloseTo(19.5424, 4);
  });

  it('the mean of 0 and −30 dBm gave −15 dBm; the mean power is −3.0 dBm', () => {
    expect(value('x = meanpower(0 dBm, -30 dBm)')).toBeCloseTo(-3.006, 4);
    const evaluation = new Evaluation(sheetOf('x = mean(0 dBm, -30 dBm)'));
    expect(evaluation.findings('l0').map(({ code }) => code)).toEqual(['decibels-averaged']);
  });

  it('10 dBm + 2 dB gave 10.64 dBm; it is 12 dBm', () => {
    expect(value('x = 10 dBm + 2 dB')).toBe(12);
  });

  it('20 dB(V) gave 100 V; it is 10 V', () => {
    expect(value('x | V = 20 dBV')).toBe(10);
    expect(value('x | V = 20 dB(V)')).toBe(10);
    expect(value('x = lin(20 dBV)')).toBe(10);
  });

  it('dBΩ of 50 Ω gave 34; it is 16.99', () => {
    expect(value('x | dBΩ = 50 Ω')).toBeCloseTo(16.9897, 4);
    expect(value('x = db(50 ohm)')).toBeCloseTo(16.9897, 4);
  });

  it('a dimensionless m/cm turned into dB lost a factor; it is 20 dB', () => {
    expect(value('x | dB = 1 m/(1 cm)')).toBeCloseTo(20, 12);
    expect(value('x = db(1 m/(1 cm))')).toBeCloseTo(20, 12);
    expect(value('a = 3 m\nb = 3 cm\nx = 10*log10(a/b)')).toBeCloseTo(20, 12);
  });

  it('dBW + dBm were added as figures; differences and powers go over one reference', () => {
    expect(value('x = 10 dBm - 0 dBW')).toBe(-20);
    expect(value('x = powersum(0 dBW, 30 dBm)')).toBeCloseTo(3.0103, 4);
    expect(value('x = 0 dBW + 0 dBm')).toBe('withheld: levels-summed');
    expect(value('x = if(0 dBW > 29 dBm, 1, 0)')).toBe(1);
  });

  it('20 dBm came back as 20.000000000000004; it comes back as 20', () => {
    expect(value('x = 20 dBm')).toBe(20);
    expect(value('y = 20 dBm\nx = y')).toBe(20);
    expect(value('y | dBW = 20 dBm\nx | dBm = y')).toBe(20);
  });

  it('a field ratio of 10 is 20 dB, a power ratio of 10 is 10 dB', () => {
    expect(value('x = db(10 V/1 V)')).toBe(20);
    expect(value('x = db(10 W/1 W)')).toBe(10);
    expect(value('x = db(10)')).toBe(10);
    expect(value('x = db((10 V)^2/(1 V)^2)')).toBe(20);
    expect(value('x = db(sqrt(100 W/1 W))')).toBe(20);
  });

  it('0 W is no power, not an error and not a large negative number', () => {
    expect(value('x | dBm = 0 W')).toBe(-Infinity);
    expect(value('a | dBm = 0 W\nx = powersum(a, 3 dBm)')).toBe(3);
    expect(value('a | dBm = 0 W\nx = a - 3 dB')).toBe(-Infinity);
    expect(value('a | dBm = 0 W\nx | W = a')).toBe(0);
  });

  it('20 °C + 20 K is 40 °C; −3 dB of 20 °C is asked for in kelvin', () => {
    expect(value('x | °C = 20 °C + 20 K')).toBeCloseTo(40, 10);
    expect(value('t = 20 °C\nx = db(t) - 3 dB')).toBeCloseTo(10 * Math.log10(293.15) - 3, 10);
  });
});

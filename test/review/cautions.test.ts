/** Which lines tell how strongly something radiates, and what stands beside them. */
import { describe, expect, it } from 'vitest';

import { findUnit } from '../../src/quantity';
import { CAUTIONS, RADIATION_CAUTION, tellsRadiation } from '../../src/review';

const tells = (symbol: string, label: string, word?: string): boolean => {
  const unit = word === undefined ? undefined : findUnit(word);
  if (word !== undefined && unit === undefined) throw new Error(`${word} is no unit`);
  return tellsRadiation({ symbol, label }, unit);
};

describe('lines that tell of radiation', () => {
  it.each([
    ['EIRP', '', 'dBm'],
    ['EIRP_ferry', '', 'dBm'],
    ['P_eirp', '', 'dBW'],
    ['ERP', '', 'dBm'],
    ['eirp2', '', undefined],
    ['P', 'Equivalent isotropically radiated power', 'dBm'],
    ['P', 'Effective radiated power', 'W'],
    ['P', 'e.i.r.p. towards the horizon', 'dBm'],
    ['P', 'Ferry, EIRP', 'dBm'],
    ['S', 'Flux', 'W/m²'],
    ['S', '', 'dBW/m²'],
    ['PFD', '', 'dBW/m²/4kHz'],
    ['E', '', 'V/m'],
    ['E', '', 'dBµV/m'],
    ['H', '', 'A/m'],
    ['H', '', 'dBA/m'],
  ])('%s, %j, in %s', (symbol, label, word) => {
    expect(tells(symbol, label, word)).toBe(true);
  });
});

describe('lines that do not', () => {
  it.each([
    ['P_tx', 'Transmit power', 'dBm'],
    ['C', 'Carrier', 'dBm'],
    ['N_0', 'Noise density', 'dBm/Hz'],
    ['SERPENT', 'Serpentine', 'dB'],
    ['x', 'Interpretation', 'dB'],
    ['interp', 'Interpolated loss', 'dB'],
    ['V', 'Voltage', 'dBµV'],
    ['a', 'Attenuation', 'dB/m'],
    ['AF', 'Antenna factor', 'dB(1/m)'],
    ['A_eff', 'Area', 'm²'],
    ['', '', undefined],
  ])('%s, %j, in %s', (symbol, label, word) => {
    expect(tells(symbol, label, word)).toBe(false);
  });
});

it('the cautions name measurement, the licence, and exposure', () => {
  expect(CAUTIONS).toHaveLength(3);
  expect(CAUTIONS.join('\n')).toMatch(/measurement[^]*licence[^]*Exposure of people/);
  expect(RADIATION_CAUTION).toMatch(/licence.*Exposure of people is not assessed/);
});

/** Unit words: the table of the algebra, word for word; spellings; references written out; what may be shown instead. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readPlainQuantity } from '../../src/formula';
import {
  alternativeUnits,
  describeDimension,
  findUnit,
  matchUnit,
  UNIT_WORDS,
  writeQuantity,
  type Unit,
} from '../../src/quantity';

const dimensionOf = (unit: Unit): string => (unit.form === 'rate' ? 'rate' : describeDimension(unit.dimension));

describe('every unit word', () => {
  it.each(UNIT_WORDS)('%s reads, writes and reads back', (word) => {
    const unit = findUnit(word);
    if (unit === undefined) throw new Error('no unit');
    expect(unit.word).toBe(word);
    const text = writeQuantity(-12.25, unit, { minus: '-' });
    const back = readPlainQuantity(text);
    expect(back?.figure).toBe(-12.25);
    expect(back?.unit?.word ?? '1').toBe(word);
  });

  it.each(UNIT_WORDS)('%s has a description', (word) => {
    expect(findUnit(word)?.description.length).toBeGreaterThan(2);
  });

  it('stands in the table once', () => {
    expect(new Set(UNIT_WORDS).size).toBe(UNIT_WORDS.length);
  });
});

describe('the decibel units of the algebra', () => {
  it.each([
    ['dBW', 'W', 0, 'level'],
    ['dBm', 'W', -30, 'level'],
    ['dBW/Hz', 'J', 0, 'level'],
    ['dBm/Hz', 'J', -30, 'level'],
    ['dBm/kHz', 'J', -60, 'level'],
    ['dBm/MHz', 'J', -90, 'level'],
    ['dBW/4kHz', 'J', -36.0206, 'level'],
    ['dBW/K/Hz', 'J/K', 0, 'plain'],
    ['dBV', 'V²', 0, 'level'],
    ['dBmV', 'V²', -60, 'level'],
    ['dBµV', 'V²', -120, 'level'],
    ['dBV/m', 'V²/m²', 0, 'level'],
    ['dBµV/m', 'V²/m²', -120, 'level'],
    ['dBW/m²', 'W/m²', 0, 'level'],
    ['dBm/m²', 'W/m²', -30, 'level'],
    ['dBW/m²/Hz', 'J/m²', 0, 'level'],
    ['dBW/m²/MHz', 'J/m²', -60, 'level'],
    ['dBW/m²/4kHz', 'J/m²', -36.0206, 'level'],
    ['dBHz', 'Hz', 0, 'bandwidth'],
    ['dBK', 'K', 0, 'temperature'],
    ['dBΩ', 'Ω', 0, 'plain'],
    ['dB(bit/s)', 'Hz', 0, 'plain'],
    ['dB/K', '1/K', 0, 'figure of merit'],
    ['dB', '1', 0, undefined],
    ['dBi', '1', 0, 'gain'],
    ['dBd', '1', 2.15, 'gain'],
    ['dBc', '1', 0, 'impairment ratio'],
    ['dBc/Hz', 's', 0, 'impairment ratio'],
    ['dBFS', '1', 0, 'level'],
    ['dBm²', 'm²', 0, 'plain'],
  ])('%s: %s, offset %d dB, %s', (word, dimension, offsetDb, kind) => {
    const unit = findUnit(word);
    expect(unit?.form).toBe('decibel');
    if (unit?.form !== 'decibel') return;
    expect(dimensionOf(unit)).toBe(dimension);
    expect(unit.offsetDb).toBeCloseTo(offsetDb, 4);
    expect(unit.defaultKind).toBe(kind);
  });

  it.each(['dBm', 'dBW', 'dBµV', 'dBm/Hz', 'dBm/MHz', 'dBK', 'dBHz', 'dBd'])(
    '%s has a reference that is a written constant',
    (word) => {
      const unit = findUnit(word);
      expect(unit?.form === 'decibel' && Number(unit.offsetDb.toFixed(4))).toBe(
        unit?.form === 'decibel' && unit.offsetDb,
      );
    },
  );

  it.each([
    ['dB/m', 1],
    ['dB/km', 1000],
    ['dB/100m', 100],
  ])('%s is a rate per %d m', (word, lengthM) => {
    expect(findUnit(word)).toMatchObject({ form: 'rate', lengthM });
  });
});

describe('the linear units of the algebra', () => {
  it.each([
    ['W mW µW nW pW kW MW', 'W', [1, 1e-3, 1e-6, 1e-9, 1e-12, 1e3, 1e6]],
    ['Hz kHz MHz GHz THz', 'Hz', [1, 1e3, 1e6, 1e9, 1e12]],
    ['K', 'K', [1]],
    ['m km mm cm µm ft mi nmi', 'm', [1, 1e3, 1e-3, 1e-2, 1e-6, 0.3048, 1609.344, 1852]],
    ['s ms µs ns ps fs min h', 's', [1, 1e-3, 1e-6, 1e-9, 1e-12, 1e-15, 60, 3600]],
    ['V mV µV nV', 'V', [1, 1e-3, 1e-6, 1e-9]],
    ['V/m mV/m µV/m', 'V/m', [1, 1e-3, 1e-6]],
    ['A mA', 'A', [1, 1e-3]],
    ['Ω kΩ', 'Ω', [1, 1e3]],
    ['J W/Hz', 'J', [1, 1]],
    ['W/m²', 'W/m²', [1]],
    ['bit/s kbit/s Mbit/s Gbit/s', 'Hz', [1, 1e3, 1e6, 1e9]],
    ['Bd kBd MBd', 'Hz', [1, 1e3, 1e6]],
    ['rad mrad % ppm 1', '1', [1, 1e-3, 1e-2, 1e-6, 1]],
    ['mm/h', 'm/s', [1e-3 / 3600]],
    ['g/m³', 'kg/m³', [1e-3]],
    ['hPa', 'J/m³', [100]],
  ])('%s', (words, dimension, factors) => {
    const units = words.split(' ').map((word) => findUnit(word));
    expect(units.map((unit) => (unit?.form === 'linear' ? unit.factor : undefined))).toEqual(factors);
    expect(new Set(units.map((unit) => (unit?.form === 'linear' ? unit.dimension.join() : '')))).toEqual(
      new Set([units[0]?.form === 'linear' ? units[0].dimension.join() : 'none']),
    );
    if (units[0] !== undefined) expect([dimension, 'kg/m/s²']).toContain(dimensionOf(units[0]));
  });

  it('°C is taken and shown over 273.15 K', () => {
    expect(findUnit('°C')).toMatchObject({ factor: 1, shift: 273.15, defaultKind: 'temperature' });
  });

  it('degrees are radians', () => {
    expect(findUnit('deg')).toMatchObject({ factor: Math.PI / 180 });
  });

  it('K suggests a temperature, W a level, Hz nothing', () => {
    expect(['K', 'W', 'Hz', 'm'].map((word) => findUnit(word)?.defaultKind)).toEqual([
      'temperature',
      'level',
      undefined,
      undefined,
    ]);
  });
});

describe('spellings', () => {
  it.each([
    ['uW', 'µW'],
    ['μW', 'µW'],
    ['dBuV', 'dBµV'],
    ['dBuV/m', 'dBµV/m'],
    ['uV/m', 'µV/m'],
    ['us', 'µs'],
    ['um', 'µm'],
    ['uA', 'µA'],
    ['ohm', 'Ω'],
    ['kohm', 'kΩ'],
    ['\u2126', 'Ω'],
    ['dBohm', 'dBΩ'],
    ['dB-Hz', 'dBHz'],
    ['dB-K', 'dBK'],
    ['bps', 'bit/s'],
    ['kbps', 'kbit/s'],
    ['Mbps', 'Mbit/s'],
    ['Mb/s', 'Mbit/s'],
    ['dBbps', 'dB(bit/s)'],
    ['dBi/K', 'dB/K'],
    ['dB(1/K)', 'dB/K'],
    ['dB(K^-1)', 'dB/K'],
    ['dBW/m2', 'dBW/m²'],
    ['dBW/m^2', 'dBW/m²'],
    ['W/m2', 'W/m²'],
    ['m2', 'm²'],
    ['dBsm', 'dBm²'],
    ['dBm2', 'dBm²'],
    ['dBW/(K·Hz)', 'dBW/K/Hz'],
    ['dBW/Hz/K', 'dBW/K/Hz'],
    ['degC', '°C'],
    ['°', 'deg'],
    ['dB (1 mW)', 'dBm'],
    ['dB(1 mW)', 'dBm'],
    ['dB(mW)', 'dBm'],
    ['dB(W)', 'dBW'],
    ['dB(1 µV/m)', 'dBµV/m'],
    ['dB(µV)', 'dBµV'],
    ['dB(Hz)', 'dBHz'],
    ['dB(K)', 'dBK'],
    ['dB(W/m²)', 'dBW/m²'],
    ['dB(m²)', 'dBm²'],
    ['dB(J/K)', 'dBW/K/Hz'],
  ])('%s is %s', (spelling, word) => {
    expect(findUnit(spelling)?.word).toBe(word);
  });

  it.each([
    'dbm',
    'DBM',
    'Dbm',
    'mhz',
    'khz',
    'dBmW',
    'dBq',
    'furlong',
    '',
    'dB(',
    'dB()',
    'dB(furlong)',
    'dBm/',
    '/Hz',
    'dBm/0kHz',
    'dBm dBm',
    'x'.repeat(50),
    '__proto__',
    'constructor',
  ])('“%s” is none', (word) => {
    expect(findUnit(word)).toBeUndefined();
  });

  it.each([
    ['dBm/100kHz', -30 - 50],
    ['dBm/10kHz', -30 - 40],
    ['dBW/36MHz', -10 * Math.log10(36e6)],
    ['dBm/3.84MHz', -30 - 10 * Math.log10(3.84e6)],
  ])('%s is a density over a stated bandwidth', (word, offsetDb) => {
    const unit = findUnit(word);
    expect(unit).toMatchObject({ form: 'decibel', word, defaultKind: 'level' });
    expect(unit?.form === 'decibel' && unit.offsetDb).toBeCloseTo(offsetDb, 9);
  });

  it.each([
    ['dB(W·s/K)', 'J/K', 0],
    ['dB(W/K)', 'W/K', 0],
    ['dB(mW/K)', 'W/K', -30],
    ['dB(W²)', 'W²', 0],
    ['dB(mV·Hz)', 'V/s', -30],
    ['dB(km)', 'm', 30],
  ])('%s is a reference written out', (word, dimension, offsetDb) => {
    const unit = findUnit(word);
    expect(unit?.form === 'decibel' && [dimensionOf(unit), Number(unit.offsetDb.toFixed(9))]).toEqual([
      dimension,
      offsetDb,
    ]);
  });
});

describe('matching inside an entry', () => {
  it.each([
    ['dBm/Hz + x', 'dBm/Hz', 6],
    ['dBm/Hzz', 'dBm', 3],
    ['dB-L', 'dB', 2],
    ['dB-Hz', 'dBHz', 5],
    ['W/m', 'W', 1],
    ['W/m²', 'W/m²', 4],
    ['m*3', 'm', 1],
    ['%', '%', 1],
  ])('%s begins with %s', (text, word, end) => {
    const found = matchUnit(text, 0);
    expect(found && [found.unit.word, found.end]).toEqual([word, end]);
  });

  it.each(['x', 'dBmm', '3', '', '(', 'dB_1'])('“%s” begins with none', (text) => {
    expect(matchUnit(text, 0)).toBeUndefined();
  });
});

describe('what a line may be shown in instead', () => {
  it.each([
    ['dBm', ['dBm', 'dBW']],
    ['MHz', ['Hz', 'kHz', 'MHz', 'GHz']],
    ['K', ['K', '°C']],
    ['dB/km', ['dB/m', 'dB/km', 'dB/100m']],
    ['dBµV', ['dBV', 'dBmV', 'dBµV']],
  ])('%s: among others %j', (word, some) => {
    const unit = findUnit(word);
    const words = unit === undefined ? [] : alternativeUnits(unit).map((other) => other.word);
    expect(words).toEqual(expect.arrayContaining(some));
  });

  it('has the same form and dimension', () => {
    fc.assert(
      fc.property(fc.constantFrom(...UNIT_WORDS), (word) => {
        const unit = findUnit(word);
        if (unit === undefined) throw new Error('no unit');
        const others = alternativeUnits(unit);
        expect(others).toContain(unit);
        expect(others.every((other) => other.form === unit.form && dimensionOf(other) === dimensionOf(unit))).toBe(
          true,
        );
      }),
    );
  });
});

describe('dimensions in words', () => {
  it.each([
    [[0, 0, 0, 0, 0], '1'],
    [[1, 2, -3, 0, 0], 'W'],
    [[2, 4, -6, 0, 0], 'W²'],
    [[1, 2, -2, 0, 0], 'J'],
    [[0, 0, -1, 0, 0], 'Hz'],
    [[0, 0, 1, 0, 0], 's'],
    [[1, 2, -3, -1, 0], 'V'],
    [[2, 4, -6, -2, 0], 'V²'],
    [[1, 2, -3, 0, -1], 'W/K'],
    [[0, 0, 0, 0, -1], '1/K'],
    [[0, 2, 0, 0, 0], 'm²'],
    [[0.5, 1, -1.5, 0, 0], 'W⁰·⁵'],
  ] as const)('%j is %s', (dimension, text) => {
    expect(describeDimension(dimension)).toBe(text);
  });
});

/**
 * The table of unit words: what may stand behind a number or in a line's unit.
 * Holds: `offsetDb` is a written constant, so decibel figures are added as written; dB(1/K) and the like are other spellings.
 * Sources of notation: ISO 80000-1, IEC 60027-3, ITU-R V.574.
 */
import {
  AREA,
  CURRENT,
  ENTROPY,
  FIELD,
  FREQUENCY,
  IMPEDANCE,
  LENGTH,
  MAGNETIC_FIELD,
  NO_DIMENSION,
  POWER,
  POWER_DENSITY,
  POWER_FLUX,
  TEMPERATURE,
  TIME,
  VOLTAGE,
  combineDimensions,
  raiseDimension,
  type Dimension,
} from './dimension';
import type { QuantityKind } from './kinds';
import type { Unit } from './unit';

/** Units by every accepted spelling. */
export const table = new Map<string, Unit>();

const words: string[] = [];

function add(unit: Unit, ...otherSpellings: string[]): void {
  if (!table.has(unit.word)) words.push(unit.word);
  for (const spelling of [unit.word, ...otherSpellings]) table.set(spelling, unit);
}

const decibel = (
  word: string,
  dimension: Dimension,
  offsetDb: number,
  description: string,
  defaultKind?: QuantityKind,
  ...other: string[]
): void => {
  add(
    { form: 'decibel', word, dimension, offsetDb, description, ...(defaultKind === undefined ? {} : { defaultKind }) },
    ...other,
  );
};

const linear = (
  word: string,
  dimension: Dimension,
  factor: number,
  description: string,
  defaultKind?: QuantityKind,
  ...other: string[]
): void => {
  add(
    {
      form: 'linear',
      word,
      dimension,
      factor,
      shift: 0,
      description,
      ...(defaultKind === undefined ? {} : { defaultKind }),
    },
    ...other,
  );
};

const rate = (word: string, lengthM: number, description: string, ...other: string[]): void => {
  add({ form: 'rate', word, lengthM, description }, ...other);
};

const INVERSE_TEMPERATURE = raiseDimension(TEMPERATURE, -1);
const VOLTAGE_SQUARED = raiseDimension(VOLTAGE, 2);
const FIELD_SQUARED = raiseDimension(FIELD, 2);
const CURRENT_SQUARED = raiseDimension(CURRENT, 2);
const MAGNETIC_FIELD_SQUARED = raiseDimension(MAGNETIC_FIELD, 2);
const FLUX_DENSITY = combineDimensions(POWER_FLUX, TIME);

decibel('dB', NO_DIMENSION, 0, 'decibel: a ratio of powers');
decibel('dBm', POWER, -30, 'level over 1 mW; ISO writes dB (1 mW)', 'level');
decibel('dBW', POWER, 0, 'level over 1 W; ISO writes dB (1 W)', 'level');
decibel('dBkW', POWER, 30, 'level over 1 kW', 'level');
decibel('dBµW', POWER, -60, 'level over 1 µW', 'level');
decibel('dBpW', POWER, -120, 'level over 1 pW', 'level');
decibel('dBm/Hz', POWER_DENSITY, -30, 'power density over 1 mW/Hz', 'level');
decibel('dBW/Hz', POWER_DENSITY, 0, 'power density over 1 W/Hz', 'level');
decibel('dBm/kHz', POWER_DENSITY, -60, 'power density over 1 mW/kHz', 'level');
decibel('dBm/MHz', POWER_DENSITY, -90, 'power density over 1 mW/MHz', 'level');
decibel('dBW/kHz', POWER_DENSITY, -30, 'power density over 1 W/kHz', 'level');
decibel('dBW/MHz', POWER_DENSITY, -60, 'power density over 1 W/MHz', 'level');
decibel('dBW/4kHz', POWER_DENSITY, -36.020599913279625, 'power density over 1 W in 4 kHz', 'level');
decibel(
  'dBW/K/Hz',
  ENTROPY,
  0,
  'Boltzmann-like: power density over temperature',
  'plain',
  'dBW/Hz/K',
  'dBW/(K·Hz)',
  'dBW/(Hz·K)',
  'dBW/(K*Hz)',
  'dBW/(Hz*K)',
  'dBJ/K',
  'dBW/K-Hz',
  'dBW/Hz-K',
);
decibel(
  'dBm/K/Hz',
  ENTROPY,
  -30,
  'Boltzmann-like: power density over temperature',
  'plain',
  'dBm/Hz/K',
  'dBm/(K·Hz)',
  'dBm/(Hz·K)',
  'dBm/(K*Hz)',
  'dBm/(Hz*K)',
  'dBm/K-Hz',
  'dBm/Hz-K',
);
decibel('dBV', VOLTAGE_SQUARED, 0, 'voltage level over 1 V', 'level');
decibel('dBmV', VOLTAGE_SQUARED, -60, 'voltage level over 1 mV', 'level');
decibel('dBµV', VOLTAGE_SQUARED, -120, 'voltage level over 1 µV', 'level');
decibel('dBV/m', FIELD_SQUARED, 0, 'field level over 1 V/m', 'level');
decibel('dBmV/m', FIELD_SQUARED, -60, 'field level over 1 mV/m', 'level');
decibel('dBµV/m', FIELD_SQUARED, -120, 'field level over 1 µV/m', 'level');
decibel('dBA/m', MAGNETIC_FIELD_SQUARED, 0, 'magnetic field level over 1 A/m', 'level');
decibel('dBµA/m', MAGNETIC_FIELD_SQUARED, -120, 'magnetic field level over 1 µA/m', 'level');
decibel('dBµA', CURRENT_SQUARED, -120, 'current level over 1 µA', 'level');
decibel('dBmA', CURRENT_SQUARED, -60, 'current level over 1 mA', 'level');
decibel('dBW/m²', POWER_FLUX, 0, 'power flux density over 1 W/m²', 'level');
decibel('dBm/m²', POWER_FLUX, -30, 'power flux density over 1 mW/m²', 'level', 'dBmW/m²');
decibel('dBW/m²/Hz', FLUX_DENSITY, 0, 'spectral power flux density', 'level');
decibel('dBW/m²/MHz', FLUX_DENSITY, -60, 'spectral power flux density', 'level');
decibel('dBW/m²/4kHz', FLUX_DENSITY, -36.020599913279625, 'spectral power flux density', 'level');
decibel('dBHz', FREQUENCY, 0, 'bandwidth over 1 Hz', 'bandwidth', 'dB-Hz');
decibel('dBkHz', FREQUENCY, 30, 'bandwidth over 1 kHz', 'bandwidth', 'dB-kHz');
decibel('dBMHz', FREQUENCY, 60, 'bandwidth over 1 MHz', 'bandwidth', 'dB-MHz');
decibel('dBK', TEMPERATURE, 0, 'temperature over 1 K', 'temperature', 'dB-K');
decibel('dBΩ', IMPEDANCE, 0, 'impedance over 1 Ω, 10 log10', 'plain', 'dBohm');
decibel('dB(bit/s)', FREQUENCY, 0, 'bit rate over 1 bit/s', 'plain', 'dBbit/s', 'dBbps', 'dB(bps)');
decibel('dB(Bd)', FREQUENCY, 0, 'symbol rate over 1 Bd', 'plain', 'dBBd');
decibel(
  'dB/K',
  INVERSE_TEMPERATURE,
  0,
  'figure of merit G/T',
  'figure of merit',
  'dBi/K',
  'dB(1/K)',
  'dB(K^-1)',
  'dB(K⁻¹)',
);
decibel('dBi', NO_DIMENSION, 0, 'antenna gain over an isotropic radiator', 'gain');
decibel('dBd', NO_DIMENSION, 2.15, 'antenna gain over a half-wave dipole', 'gain');
decibel('dBc', NO_DIMENSION, 0, 'ratio of an unwanted to the carrier power', 'impairment ratio');
decibel('dBc/Hz', TIME, 0, 'phase noise density over the carrier', 'impairment ratio');
decibel('dBFS', NO_DIMENSION, 0, 'level over full scale', 'level');
decibel('dBm²', AREA, 0, 'area (aperture, radar cross-section) over 1 m²', 'plain', 'dBsm');

rate('dB/m', 1, 'attenuation per metre');
rate('dB/km', 1000, 'attenuation per kilometre');
rate('dB/100m', 100, 'attenuation per hundred metres');
rate('dB/cm', 0.01, 'attenuation per centimetre');
rate('dB/mm', 0.001, 'attenuation per millimetre');
rate('dB/ft', 0.3048, 'attenuation per foot');
rate('dB/100ft', 30.48, 'attenuation per hundred feet');
rate('dB/mi', 1609.344, 'attenuation per statute mile');

/** SI prefixes by their sign, as powers of ten (SI Brochure, 9th edition 2019 with the 2022 additions). */
export const SI_PREFIXES: readonly (readonly [sign: string, exponent: number])[] = [
  ['q', -30],
  ['r', -27],
  ['y', -24],
  ['z', -21],
  ['a', -18],
  ['f', -15],
  ['p', -12],
  ['n', -9],
  ['µ', -6],
  ['m', -3],
  ['', 0],
  ['k', 3],
  ['M', 6],
  ['G', 9],
  ['T', 12],
  ['P', 15],
];

/** Powers of ten as written decimal constants, so that 3 MHz is exactly 3 000 000 Hz. */
const power10 = (exponent: number): number => Number(`1e${exponent}`);

interface Family {
  readonly base: string;
  readonly tail?: string;
  readonly dimension: Dimension;
  readonly prefixes: string;
  readonly description: string;
  readonly kind?: QuantityKind;
  readonly other?: readonly string[];
}

const FAMILIES: readonly Family[] = [
  { base: 'W', dimension: POWER, prefixes: 'qryzafpnµm kMG', description: 'power', kind: 'level' },
  { base: 'Hz', dimension: FREQUENCY, prefixes: 'µm kMGT', description: 'frequency or bandwidth' },
  { base: 's', dimension: TIME, prefixes: 'afpnµm ', description: 'time' },
  { base: 'V', dimension: VOLTAGE, prefixes: 'fpnµm k', description: 'voltage', kind: 'level' },
  { base: 'A', dimension: CURRENT, prefixes: 'pnµm k', description: 'current', kind: 'level' },
  { base: 'Ω', dimension: IMPEDANCE, prefixes: 'm kM', description: 'impedance', other: ['ohm', 'Ohm'] },
  { base: 'J', dimension: POWER_DENSITY, prefixes: 'qryzafpnµm kM', description: 'energy', kind: 'level' },
  { base: 'K', dimension: TEMPERATURE, prefixes: 'm ', description: 'temperature', kind: 'temperature' },
  {
    base: 'W',
    tail: '/Hz',
    dimension: POWER_DENSITY,
    prefixes: 'qryzafpnµm k',
    description: 'power density',
    kind: 'level',
  },
  {
    base: 'W',
    tail: '/m²',
    dimension: POWER_FLUX,
    prefixes: 'zafpnµm k',
    description: 'power flux density',
    kind: 'level',
  },
  { base: 'V', tail: '/m', dimension: FIELD, prefixes: 'npµm k', description: 'field strength', kind: 'level' },
  {
    base: 'A',
    tail: '/m',
    dimension: MAGNETIC_FIELD,
    prefixes: 'npµm ',
    description: 'magnetic field strength',
    kind: 'level',
  },
  {
    base: 'bit/s',
    dimension: FREQUENCY,
    prefixes: ' kMGT',
    description: 'bit rate',
    kind: 'plain',
    other: ['bps', 'b/s', 'bits/s'],
  },
  {
    base: 'Bd',
    dimension: FREQUENCY,
    prefixes: ' kMG',
    description: 'symbol rate',
    kind: 'plain',
    other: ['baud', 'sym/s', 'Sym/s'],
  },
  {
    base: 'J',
    tail: '/K',
    dimension: ENTROPY,
    prefixes: ' ',
    description: 'energy per temperature',
    other: ['W/K/Hz', 'W/Hz/K'],
  },
];

for (const { base, tail = '', dimension, prefixes, description, kind, other = [] } of FAMILIES) {
  for (const [sign, exponent] of SI_PREFIXES) {
    if (!prefixes.includes(sign === '' ? ' ' : sign)) continue;
    linear(sign + base + tail, dimension, power10(exponent), description, kind, ...other.map((word) => sign + word));
  }
}

linear('1', NO_DIMENSION, 1, 'plain number or ratio');
linear('%', NO_DIMENSION, 0.01, 'hundredth', undefined, 'percent');
linear('ppm', NO_DIMENSION, 1e-6, 'millionth');
linear('rad', NO_DIMENSION, 1, 'angle', 'plain');
linear('mrad', NO_DIMENSION, 1e-3, 'angle', 'plain');
linear('deg', NO_DIMENSION, Math.PI / 180, 'angle in degrees', 'plain', '°');
linear('m', LENGTH, 1, 'length');
linear('km', LENGTH, 1000, 'length');
linear('cm', LENGTH, 0.01, 'length');
linear('mm', LENGTH, 0.001, 'length');
linear('µm', LENGTH, 1e-6, 'length');
linear('nm', LENGTH, 1e-9, 'length');
linear('ft', LENGTH, 0.3048, 'length, foot');
linear('mi', LENGTH, 1609.344, 'length, statute mile');
linear('nmi', LENGTH, 1852, 'length, nautical mile', undefined, 'NM');
linear('m²', AREA, 1, 'area');
linear('cm²', AREA, 1e-4, 'area');
linear('mm²', AREA, 1e-6, 'area');
linear('km²', AREA, 1e6, 'area');
linear('min', TIME, 60, 'time, minute');
linear('h', TIME, 3600, 'time, hour');
linear('m/s', combineDimensions(LENGTH, TIME, -1), 1, 'speed');
linear('km/s', combineDimensions(LENGTH, TIME, -1), 1000, 'speed');
linear('km/h', combineDimensions(LENGTH, TIME, -1), 1 / 3.6, 'speed');
linear('mm/h', combineDimensions(LENGTH, TIME, -1), 0.001 / 3600, 'rain rate');
linear('1/s', FREQUENCY, 1, 'rate', undefined, 's⁻¹');
linear('1/m', raiseDimension(LENGTH, -1), 1, 'reciprocal length', undefined, 'm⁻¹');
linear('1/K', INVERSE_TEMPERATURE, 1, 'gain over temperature', 'figure of merit', 'K⁻¹');
linear('mW/cm²', POWER_FLUX, 10, 'power flux density', 'level');
linear('µW/cm²', POWER_FLUX, 0.01, 'power flux density', 'level');
linear('g/m³', [1, -3, 0, 0, 0], 1e-3, 'vapour density');
linear('kg/m³', [1, -3, 0, 0, 0], 1, 'density');
linear('Pa', [1, -1, -2, 0, 0], 1, 'pressure');
linear('hPa', [1, -1, -2, 0, 0], 100, 'pressure');
linear('kPa', [1, -1, -2, 0, 0], 1000, 'pressure');
add(
  {
    form: 'linear',
    word: '°C',
    dimension: TEMPERATURE,
    factor: 1,
    shift: 273.15,
    defaultKind: 'temperature',
    description: 'temperature over 273.15 K',
  },
  'degC',
);

/** Every unit word of the table in its standard spelling. */
export const UNIT_WORDS: readonly string[] = words;

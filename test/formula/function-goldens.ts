/**
 * Golden cases of the function catalogue, worked out by hand: each function's own example, calls that must be refused (with the
 * finding's code), and what happens outside its domain.
 */
export interface FunctionGolden {
  /** What the catalogue's example gives. */
  readonly example: readonly [figure: number, unit: string];
  readonly derivation: string;
  readonly more?: readonly (readonly [entry: string, figure: number, unit: string])[];
  readonly refused: readonly (readonly [entry: string, code: string])[];
  /** Calls without a figure, or with a remark; empty for functions that take anything. */
  readonly outside: readonly (readonly [entry: string, code: string])[];
}

export const FUNCTION_GOLDENS: Readonly<Record<string, FunctionGolden>> = {
  db: {
    example: [3.0103, 'dBW'],
    derivation: '10 log10 2 = 3.0103 over 1 W',
    more: [
      ['db(10 V)', 20, 'dBV'],
      ['db(10)', 10, 'dB'],
      ['db(50 ohm)', 16.9897, 'dBΩ'],
      ['db(1 MHz)', 60, 'dBHz'],
      ['db(290 K)', 24.624, 'dBK'],
      ['db(2 mV/1 mV)', 6.0206, 'dB'],
      ['db(3 A)', 129.5424, 'dBµA'],
      ['db(2 m²)', 3.0103, 'dBm²'],
    ],
    refused: [
      ['db()', 'wrong-arguments'],
      ['db(1, 2)', 'wrong-arguments'],
      ['db(3 dB)', 'decibels-multiplied'],
      ['db("x")', 'wrong-arguments'],
      ['db(1 > 2)', 'wrong-arguments'],
      ['db(3 dB/km)', 'wrong-arguments'],
    ],
    outside: [
      ['db(0 W)', 'no-power'],
      ['db(-1)', 'no-power'],
    ],
  },
  lin: {
    example: [0.00199526, 'W'],
    derivation: '10^0.3 mW = 1.99526 mW',
    more: [
      ['lin(20 dBV)', 10, 'V'],
      ['lin(60 dBµV/m)', 0.001, 'V/m'],
      ['lin(3 dB)', 1.995262, '1'],
      ['lin(60 dBHz)', 1e6, 'Hz'],
      ['lin(2.15 dBd)', 2.691535, '1'],
      ['lin(-3 dB)', 0.501187, '1'],
    ],
    refused: [
      ['lin()', 'wrong-arguments'],
      ['lin(3 W)', 'wrong-arguments'],
      ['lin(3 dB, 4 dB)', 'wrong-arguments'],
      ['lin("x")', 'wrong-arguments'],
    ],
    outside: [
      ['lin(5000 dB)', 'not-finite'],
      ['lin(3)', 'number-as-decibels'],
    ],
  },
  powersum: {
    example: [-95.2357, 'dBm'],
    derivation: '10 log10(1 + 10^0.3) = 10 log10 2.995262 = 4.7644 above −100 dBm',
    more: [
      ['powersum(3 dBm)', 3, 'dBm'],
      ['powersum(0 dBW, 30 dBm)', 3.0103, 'dBW'],
      ['powersum(10 dBm, 5 mW)', 11.7609, 'dBm'],
      ['powersum(3 dBm, 0 W)', 3, 'dBm'],
      ['powersum(3 dB, 3 dB)', 6.0103, 'dB'],
      ['powersum(20 dBK, 20 dBK)', 23.0103, 'dBK'],
    ],
    refused: [
      ['powersum()', 'wrong-arguments'],
      ['powersum(3 dBm, 3 K)', 'unit-mismatch'],
      ['powersum(3 dBm, 3 dBm/Hz)', 'density-and-level'],
      ['powersum(3 dBm, 3 dBµV)', 'field-and-power'],
      ['powersum(3 dB/km, 3 dB)', 'rate-without-length'],
      ['powersum("x")', 'wrong-arguments'],
    ],
    outside: [['powersum(-1 W, 2 W)', 'no-power']],
  },
  powerdiff: {
    example: [-103.0206, 'dBm'],
    derivation: '10 log10(1 − 10^−0.3) = 10 log10 0.498813 = −3.0206',
    more: [
      ['powerdiff(3 W, 1 W)', 3.0103, 'dBW'],
      ['powerdiff(10 dBm, 0 W)', 10, 'dBm'],
    ],
    refused: [
      ['powerdiff(3 dBm)', 'wrong-arguments'],
      ['powerdiff(3 dBm, 2 dBm, 1 dBm)', 'wrong-arguments'],
      ['powerdiff(3 dBm, 2 dB)', 'unit-mismatch'],
    ],
    outside: [
      ['powerdiff(-100 dBm, -90 dBm)', 'no-power'],
      ['powerdiff(-100 dBm, -100.1 dBm)', 'cancellation'],
    ],
  },
  fieldsum: {
    example: [-93.9794, 'dBm'],
    derivation: 'two equal fields in phase: 20 log10 2 = 6.0206 up',
    more: [
      ['fieldsum(20 dBµV, 14 dBµV)', 23.5287, 'dBµV'],
      ['fieldsum(3 dBm)', 3, 'dBm'],
    ],
    refused: [
      ['fieldsum()', 'wrong-arguments'],
      ['fieldsum(3 dBm, 3 dB)', 'unit-mismatch'],
    ],
    outside: [],
  },
  meanpower: {
    example: [-3.006, 'dBm'],
    derivation: '10 log10((1 + 0.001)/2) = −3.0060',
    more: [
      ['meanpower(3 dBm)', 3, 'dBm'],
      ['meanpower(1 W, 3 W)', 3.0103, 'dBW'],
    ],
    refused: [
      ['meanpower()', 'wrong-arguments'],
      ['meanpower(3 dBm, 3 K)', 'unit-mismatch'],
    ],
    outside: [],
  },
  ratiosum: {
    example: [15.2357, 'dB'],
    derivation: '−10 log10(10^−2 + 10^−1.7) = −10 log10 0.0299526 = 15.2357',
    more: [
      ['ratiosum(-60 dBc, -60 dBc)', -56.9897, 'dBc'],
      ['ratiosum(100 dBHz, 87 dBHz)', 86.7876, 'dBHz'],
      ['ratiosum(20 dB)', 20, 'dB'],
    ],
    refused: [
      ['ratiosum()', 'wrong-arguments'],
      ['ratiosum(20 dB, -60 dBc)', 'wrong-arguments'],
      ['ratiosum(20 dB, 87 dBHz)', 'unit-mismatch'],
    ],
    outside: [],
  },
  pool: {
    example: [-95.2357, 'dBm'],
    derivation: '10 log10(10^−10 + 10^−9.7) = 10 log10 2.995262e-10 = −95.2357',
    more: [
      ['pool(40 K; 60 K)', 100, 'K'],
      ['pool(1 W; 3 W)', 4, 'W'],
      ['pool(30 dBm; 1 W)', 33.0103, 'dBm'],
      ['pool(-60 dBc; -60 dBc)', -56.9897, 'dBc'],
    ],
    refused: [
      ['pool()', 'wrong-arguments'],
      ['pool(3 dBm; 290 K)', 'pool-mixed'],
      ['pool(-100 dBm; -174 dBm/Hz)', 'pool-mixed'],
    ],
    outside: [],
  },
  rebase: {
    example: [-107.4473, 'dBm'],
    derivation: '10 log10(180/1000) = −7.4473',
    more: [
      ['rebase(-100 dBm, 60 dBHz, 1 MHz)', -100, 'dBm'],
      ['rebase(-100 dBm, 10 kHz, 1 MHz)', -80, 'dBm'],
    ],
    refused: [
      ['rebase(-100 dBm, 1 MHz)', 'wrong-arguments'],
      ['rebase(-100 dBm, 1 km, 1 MHz)', 'wrong-arguments'],
      ['rebase(1 W, 1 MHz, 2 MHz)', 'wrong-arguments'],
    ],
    outside: [['rebase(-100 dBm, 1 MHz, 0 Hz)', 'no-power']],
  },
  noise_density: {
    example: [-173.975187, 'dBm/Hz'],
    derivation: '10 log10(1.380649e−23 · 290) + 30',
    more: [
      ['noise_density()', -173.975187, 'dBm/Hz'],
      ['noise_density(20 dBK)', -178.599167, 'dBm/Hz'],
      ['noise_density(16.85 °C)', -173.975187, 'dBm/Hz'],
    ],
    refused: [
      ['noise_density(290)', 'wrong-arguments'],
      ['noise_density(3 dB)', 'wrong-arguments'],
      ['noise_density(1 K, 2 K)', 'wrong-arguments'],
    ],
    outside: [['noise_density(-5 K)', 'not-finite']],
  },
  thermal_noise: {
    example: [-113.975187, 'dBm'],
    derivation: '−173.975187 + 60',
    more: [
      ['thermal_noise(290 K, 60 dBHz)', -113.975187, 'dBm'],
      ['thermal_noise(T_0, 1000 kHz)', -113.975187, 'dBm'],
    ],
    refused: [
      ['thermal_noise(290 K)', 'wrong-arguments'],
      ['thermal_noise(290, 1 MHz)', 'wrong-arguments'],
      ['thermal_noise(1 MHz, 290 K)', 'wrong-arguments'],
      ['thermal_noise(290 K, 3 dB)', 'wrong-arguments'],
    ],
    outside: [['thermal_noise(290 K, -1 Hz)', 'not-finite']],
  },
  noise_temperature: {
    example: [288.626071, 'K'],
    derivation: '290 · (10^0.3 − 1)',
    more: [
      ['noise_temperature(lin(3 dB))', 288.626071, 'K'],
      ['noise_temperature(0 dB)', 0, 'K'],
    ],
    refused: [
      ['noise_temperature()', 'wrong-arguments'],
      ['noise_temperature(3 dBm)', 'wrong-arguments'],
      ['noise_temperature(3 K)', 'wrong-arguments'],
    ],
    outside: [
      ['noise_temperature(-1 dB)', 'negative-figure'],
      ['noise_temperature(3)', 'number-as-decibels'],
    ],
  },
  noise_figure: {
    example: [3.0103, 'dB'],
    derivation: '10 log10(1 + 290/290)',
    more: [
      ['noise_figure(0 K)', 0, 'dB'],
      ['noise_figure(16.85 °C)', 3.0103, 'dB'],
    ],
    refused: [
      ['noise_figure(3 dB)', 'wrong-arguments'],
      ['noise_figure()', 'wrong-arguments'],
    ],
    outside: [['noise_figure(-5 K)', 'not-finite']],
  },
  passive_nf: {
    example: [2.10915, 'dB'],
    derivation: 'F = 1 + 0.584893 · 310/290 = 1.625230',
    more: [
      ['passive_nf(2 dB)', 2, 'dB'],
      ['passive_nf(3 dB, 0 K)', 0, 'dB'],
    ],
    refused: [
      ['passive_nf()', 'wrong-arguments'],
      ['passive_nf(2 dBm)', 'wrong-arguments'],
      ['passive_nf(2 dB, 3 dB)', 'wrong-arguments'],
    ],
    outside: [
      ['passive_nf(-2 dB)', 'not-finite'],
      ['passive_nf(2 dB, -3 K)', 'not-finite'],
    ],
  },
  cascade_nf: {
    example: [1.54372, 'dB'],
    derivation: 'F = 1.258925 + 5.309573/31.622777 = 1.426829',
    more: [
      ['cascade_nf(1 dB)', 1, 'dB'],
      ['cascade_nf(1 dB, 15 dB, 8 dB, 99 dB)', 1.54372, 'dB'],
      ['cascade_nf(2 dB, -2 dB, 3 dB)', 5, 'dB'],
    ],
    refused: [
      ['cascade_nf()', 'wrong-arguments'],
      ['cascade_nf(1 dB, 15 dBm, 8 dB)', 'wrong-arguments'],
      ['cascade_nf(1 K, 15 dB)', 'wrong-arguments'],
    ],
    outside: [['cascade_nf(1 dB, 15, 8 dB)', 'number-as-decibels']],
  },
  free_space_loss: {
    example: [111.2182, 'dB'],
    derivation: '32.44778 + 20 log10 10 + 20 log10 868',
    more: [
      ['free_space_loss(10 km, 868e6 Hz)', 111.2182, 'dB'],
      ['free_space_loss(1 mi, 1 MHz)', 36.58076, 'dB'],
    ],
    refused: [
      ['free_space_loss(10 km)', 'wrong-arguments'],
      ['free_space_loss(868 MHz, 10 km)', 'wrong-arguments'],
      ['free_space_loss(10, 868)', 'wrong-arguments'],
    ],
    outside: [
      ['free_space_loss(1 m, 1 MHz)', 'outside-validity'],
      ['free_space_loss(0 m, 1 MHz)', 'not-finite'],
    ],
  },
  capacity: {
    example: [5.02780767e6, 'bit/s'],
    derivation: '10^6 · log2(1 + 31.622777) = 5.0278077e6',
    more: [
      ['capacity(60 dBHz, 0 dB)', 1e6, 'bit/s'],
      ['capacity(1 MHz, lin(0 dB))', 1e6, 'bit/s'],
    ],
    refused: [
      ['capacity(1 MHz)', 'wrong-arguments'],
      ['capacity(15 dB, 1 MHz)', 'wrong-arguments'],
      ['capacity(1 MHz, 15 dBm)', 'wrong-arguments'],
    ],
    outside: [
      ['capacity(-1 MHz, 3 dB)', 'not-finite'],
      ['capacity(1 MHz, 31)', 'number-as-decibels'],
    ],
  },
  abs: {
    example: [3, '1'],
    derivation: '|−3|',
    more: [
      ['abs(-3 dB)', 3, 'dB'],
      ['abs(-2 V)', 2, 'V'],
    ],
    refused: [
      ['abs()', 'wrong-arguments'],
      ['abs(-3 dBm)', 'wrong-arguments'],
      ['abs("x")', 'wrong-arguments'],
    ],
    outside: [],
  },
  min: {
    example: [1, 'dBm'],
    derivation: 'the lesser',
    more: [
      ['min(3 m, 200 cm)', 2, 'm'],
      ['min(20 dBm, 0 dBW)', 20, 'dBm'],
      ['min(5)', 5, '1'],
    ],
    refused: [
      ['min()', 'wrong-arguments'],
      ['min(3 dB, 5 dBm)', 'unit-mismatch'],
      ['min(3 dBm, 3 mW)', 'mixed-forms'],
    ],
    outside: [],
  },
  max: {
    example: [3, 'dBm'],
    derivation: 'the greater',
    more: [
      ['max(3 m, 200 cm)', 3, 'm'],
      ['max(20 dBm, 0 dBW)', 30, 'dBm'],
    ],
    refused: [
      ['max()', 'wrong-arguments'],
      ['max(3 dB, 5 dBm)', 'unit-mismatch'],
      ['max(3 dBm, -174 dBm/Hz)', 'density-and-level'],
    ],
    outside: [],
  },
  sqrt: {
    example: [4, '1'],
    derivation: '√16',
    more: [
      ['sqrt(4 W*9 W)', 6, 'W'],
      ['sqrt(4 W*25 ohm)', 10, 'V'],
      ['sqrt(9 m²)', 3, 'm'],
    ],
    refused: [
      ['sqrt(3 dB)', 'decibels-multiplied'],
      ['sqrt()', 'wrong-arguments'],
    ],
    outside: [['sqrt(-1)', 'not-finite']],
  },
  exp: {
    example: [2.71828183, '1'],
    derivation: 'e',
    refused: [
      ['exp(3 dB)', 'decibels-multiplied'],
      ['exp(3 m)', 'log-of-dimension'],
      ['exp()', 'wrong-arguments'],
    ],
    outside: [['exp(1000)', 'not-finite']],
  },
  ln: {
    example: [2.30258509, '1'],
    derivation: 'ln 10',
    refused: [
      ['ln(3 dB)', 'decibels-multiplied'],
      ['ln(3 m)', 'log-of-dimension'],
    ],
    outside: [
      ['ln(0)', 'no-power'],
      ['ln(-1)', 'no-power'],
    ],
  },
  log10: {
    example: [3, '1'],
    derivation: 'log10 1000',
    more: [['log10(5 km/(1 km))', 0.69897, '1']],
    refused: [
      ['log10(3 dB)', 'decibels-multiplied'],
      ['log10(3 W)', 'log-of-dimension'],
      ['log10(1, 2)', 'wrong-arguments'],
    ],
    outside: [['log10(0)', 'no-power']],
  },
  round: {
    example: [2.35, '1'],
    derivation: 'halves away from zero',
    more: [
      ['round(-2.5)', -3, '1'],
      ['round(2.5)', 3, '1'],
      ['round(12.34 dB, 1)', 12.3, 'dB'],
      ['round(1234, -2)', 1200, '1'],
    ],
    refused: [
      ['round()', 'wrong-arguments'],
      ['round(3 W)', 'wrong-arguments'],
      ['round(3 dBm)', 'wrong-arguments'],
      ['round(1, 2, 3)', 'wrong-arguments'],
    ],
    outside: [],
  },
  floor: {
    example: [2, '1'],
    derivation: 'down',
    more: [
      ['floor(-2.1)', -3, '1'],
      ['floor(2.7 dB)', 2, 'dB'],
    ],
    refused: [['floor(3 W)', 'wrong-arguments']],
    outside: [],
  },
  ceil: {
    example: [3, '1'],
    derivation: 'up',
    more: [
      ['ceil(-2.1)', -2, '1'],
      ['ceil(2.1 dB)', 3, 'dB'],
    ],
    refused: [['ceil(3 dBm)', 'wrong-arguments']],
    outside: [],
  },
  sin: {
    example: [0.5, '1'],
    derivation: 'sin 30°',
    more: [['sin(pi/2)', 1, '1']],
    refused: [
      ['sin(3 m)', 'log-of-dimension'],
      ['sin(3 dB)', 'decibels-multiplied'],
    ],
    outside: [],
  },
  cos: {
    example: [0.5, '1'],
    derivation: 'cos 60°',
    more: [['cos(0)', 1, '1']],
    refused: [['cos(3 m)', 'log-of-dimension']],
    outside: [],
  },
  tan: { example: [1, '1'], derivation: 'tan 45°', refused: [['tan(3 Hz)', 'log-of-dimension']], outside: [] },
  asin: {
    example: [0.52359878, 'rad'],
    derivation: '30° = π/6',
    refused: [['asin(3 m)', 'log-of-dimension']],
    outside: [['asin(2)', 'not-finite']],
  },
  acos: {
    example: [1.04719755, 'rad'],
    derivation: '60° = π/3',
    refused: [['acos(3 dB)', 'decibels-multiplied']],
    outside: [['acos(-1.5)', 'not-finite']],
  },
  atan: {
    example: [0.78539816, 'rad'],
    derivation: '45° = π/4',
    refused: [['atan(3 m)', 'log-of-dimension']],
    outside: [],
  },
  atan2: {
    example: [0.78539816, 'rad'],
    derivation: '45° = π/4',
    more: [
      ['atan2(3 m, 400 cm)', 0.92729522, 'rad'],
      ['atan2(0, 1)', 1.57079633, 'rad'],
    ],
    refused: [
      ['atan2(1)', 'wrong-arguments'],
      ['atan2(1 m, 1 s)', 'unit-mismatch'],
      ['atan2(1 dB, 1 dB)', 'decibels-multiplied'],
    ],
    outside: [],
  },
  if: {
    example: [1, 'dB'],
    derivation: '3 dB is more than 2 dB',
    more: [
      ['if(1 > 2, 1 dBm, 0 dBW)', 30, 'dBm'],
      ['if(1, 2, 3)', 2, '1'],
    ],
    refused: [
      ['if(1 > 2, 1 dB)', 'wrong-arguments'],
      ['if(3 dB, 1, 2)', 'wrong-arguments'],
      ['if(1 < 2, 3 dB, 5 dBm)', 'unit-mismatch'],
      ['if(1 < 2, 3 W, 5 dBm)', 'mixed-forms'],
    ],
    outside: [['if(log10(0) > 1, 1, 2)', 'no-power']],
  },
  and: {
    example: [1, '1'],
    derivation: 'both hold',
    more: [['if(and(1 < 2, 2 > 3), 1, 0)', 0, '1']],
    refused: [
      ['and(1 < 2, 3 dB)', 'wrong-arguments'],
      ['and(1 < 2)', 'bad-entry'],
    ],
    outside: [],
  },
  or: {
    example: [1, '1'],
    derivation: 'the second holds',
    more: [['if(or(1 > 2, 2 > 3), 1, 0)', 0, '1']],
    refused: [
      ['or(3 dB)', 'wrong-arguments'],
      ['or(1 < 2)', 'bad-entry'],
    ],
    outside: [],
  },
  not: {
    example: [1, '1'],
    derivation: '1 > 2 does not hold',
    refused: [
      ['not(3 dB)', 'wrong-arguments'],
      ['not(1 < 2)', 'bad-entry'],
      ['not()', 'wrong-arguments'],
    ],
    outside: [],
  },
  sum: {
    example: [6, 'dB'],
    derivation: '1 + 2 + 3',
    more: [
      ['sum(3 dBm, 2 dB)', 5, 'dBm'],
      ['sum(1 W, 500 mW)', 1.5, 'W'],
    ],
    refused: [
      ['sum()', 'wrong-arguments'],
      ['sum(1 dBm, 2 dBm)', 'levels-summed'],
      ['sum(1 W, 3 K)', 'unit-mismatch'],
      ['sum(1 W, 3 dB)', 'mixed-forms'],
    ],
    outside: [],
  },
  mean: {
    example: [3, '1'],
    derivation: '9/3',
    more: [['mean(300 K, 100 K)', 200, 'K']],
    refused: [
      ['mean()', 'wrong-arguments'],
      ['mean(1 W, 3 K)', 'unit-mismatch'],
    ],
    outside: [['mean(0 dBm, -30 dBm)', 'decibels-averaged']],
  },
  interpolate: {
    example: [2, 'dB'],
    derivation: 'half way from 0 dB to 4 dB',
    more: [
      ['interpolate(1, 1, 5 dB, 3, 4 dB)', 5, 'dB'],
      ['interpolate(2.5 GHz, 1 GHz, 1, 2000 MHz, 2, 3 GHz, 4)', 3, '1'],
    ],
    refused: [
      ['interpolate(2, 1, 0 dB)', 'wrong-arguments'],
      ['interpolate(2, 1, 0 dB, 3)', 'wrong-arguments'],
      ['interpolate(2 m, 1 s, 0 dB, 3 s, 4 dB)', 'unit-mismatch'],
      ['interpolate(2, 1, 0 dB, 3, 4 dBm)', 'unit-mismatch'],
    ],
    outside: [
      ['interpolate(5, 1, 0 dB, 3, 4 dB)', 'not-finite'],
      ['interpolate(0, 1, 0 dB, 3, 4 dB)', 'not-finite'],
    ],
  },
};

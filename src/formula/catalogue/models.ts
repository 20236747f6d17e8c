/** Functions from `radio`: noise, cascade, propagation, capacity. Adding a function is adding one entry to such a list. */
import {
  capacityBitPerS,
  cascadeNoiseFigureDb,
  freeSpaceLossDb,
  isBeyondNearField,
  noiseDensityDbmPerHz,
  noiseFigureDb,
  noiseTemperatureK,
  passiveNoiseFigureDb,
  thermalNoiseDbm,
} from '../../radio';
import type { OrdinaryFunction, Parameter } from './entry';

const temperature = (name: string, text: string, standard?: string): Parameter => ({
  name,
  text,
  takes: 'temperature',
  unit: 'K',
  ...(standard === undefined ? {} : { default: standard }),
});

const ordinary = (
  entry: Omit<OrdinaryFunction, 'form' | 'repeats' | 'compute'> & {
    repeats?: number;
    compute: (...values: never[]) => number;
  },
): OrdinaryFunction => ({
  ...entry,
  form: 'ordinary',
  repeats: entry.repeats ?? 0,
  compute: entry.compute as (...values: number[]) => number,
});

export const NOISE_FUNCTIONS: readonly OrdinaryFunction[] = [
  ordinary({
    name: 'noise_density',
    group: 'Noise',
    parameters: [temperature('T', 'noise temperature', 'T_0')],
    text: 'Thermal noise power per hertz at a noise temperature.',
    formula: 'N₀ = k·T',
    source: 'ITU-R P.372, section 2; k of the SI Brochure, 9th edition 2019',
    result: 'a power density, unwanted',
    example: 'noise_density(290 K)',
    compute: noiseDensityDbmPerHz,
    resultUnit: 'dBm/Hz',
    resultKind: 'level',
    resultSide: 'unwanted',
    temperatureFrom: 'T',
  }),
  ordinary({
    name: 'thermal_noise',
    group: 'Noise',
    parameters: [
      temperature('T', 'noise temperature'),
      { name: 'B', text: 'bandwidth', takes: 'bandwidth', unit: 'Hz' },
    ],
    text: 'Thermal noise power in a bandwidth.',
    formula: 'N = k·T·B',
    source: 'ITU-R P.372, section 2; k of the SI Brochure, 9th edition 2019',
    result: 'a level, unwanted',
    example: 'thermal_noise(290 K, 1 MHz)',
    compute: thermalNoiseDbm,
    resultUnit: 'dBm',
    resultKind: 'level',
    resultSide: 'unwanted',
    bandwidthFrom: 'B',
    temperatureFrom: 'T',
  }),
  ordinary({
    name: 'noise_temperature',
    group: 'Noise',
    parameters: [{ name: 'NF', text: 'noise figure', takes: 'noise figure', unit: 'dB' }],
    text: 'Equivalent input noise temperature of a noise figure.',
    formula: 'Tₑ = T₀·(F − 1), T₀ = 290 K',
    source: 'ITU-R V.573-5, noise factor',
    result: 'a temperature',
    example: 'noise_temperature(3 dB)',
    compute: noiseTemperatureK,
    resultUnit: 'K',
    resultKind: 'temperature',
  }),
  ordinary({
    name: 'noise_figure',
    group: 'Noise',
    parameters: [temperature('T_e', 'equivalent input noise temperature')],
    text: 'Noise figure of an equivalent input noise temperature.',
    formula: 'F = 1 + Tₑ/T₀, T₀ = 290 K',
    source: 'ITU-R V.573-5, noise factor',
    result: 'a noise figure',
    example: 'noise_figure(290 K)',
    compute: noiseFigureDb,
    resultUnit: 'dB',
    resultKind: 'noise figure',
  }),
  ordinary({
    name: 'passive_nf',
    group: 'Noise',
    parameters: [
      { name: 'L', text: 'loss', takes: 'loss', unit: 'dB' },
      temperature('T', 'physical temperature', 'T_0'),
    ],
    text: 'Noise figure of a passive loss at a physical temperature.',
    formula: 'F = 1 + (L − 1)·T/T₀',
    source: 'definition of noise factor for an attenuator in thermal equilibrium; common practice',
    result: 'a noise figure',
    example: 'passive_nf(2 dB, 310 K)',
    compute: passiveNoiseFigureDb,
    resultUnit: 'dB',
    resultKind: 'noise figure',
  }),
  ordinary({
    name: 'cascade_nf',
    group: 'Noise',
    parameters: [
      { name: 'NF1', text: 'noise figure of a stage', takes: 'noise figure', unit: 'dB' },
      { name: 'G1', text: 'its gain (a loss is a negative gain)', takes: 'gain', unit: 'dB' },
    ],
    repeats: 2,
    mayEndEarly: true,
    text: 'Noise figure of stages in signal order; a gain behind the last stage does not count.',
    formula: 'F = F₁ + (F₂ − 1)/G₁ + (F₃ − 1)/(G₁G₂) + …',
    source: 'H. T. Friis, Noise figures of radio receivers, Proc. IRE, July 1944',
    result: 'a noise figure',
    example: 'cascade_nf(1 dB, 15 dB, 8 dB)',
    compute: cascadeNoiseFigureDb,
    resultUnit: 'dB',
    resultKind: 'noise figure',
  }),
];

export const PROPAGATION_FUNCTIONS: readonly OrdinaryFunction[] = [
  ordinary({
    name: 'free_space_loss',
    group: 'Propagation',
    parameters: [
      { name: 'd', text: 'distance', takes: 'length', unit: 'km' },
      { name: 'f', text: 'frequency', takes: 'frequency', unit: 'MHz' },
    ],
    text: 'Basic transmission loss in free space between isotropic antennas.',
    formula: 'L = 20 log₁₀(4π·d·f/c)',
    source: 'ITU-R P.525, free-space basic transmission loss',
    result: 'a loss',
    example: 'free_space_loss(10 km, 868 MHz)',
    compute: freeSpaceLossDb,
    resultUnit: 'dB',
    resultKind: 'loss',
    validity: {
      range: 'distances beyond the near field, d ≥ λ/2π',
      parameter: 'd',
      holds: isBeyondNearField,
    },
  }),
];

export const CAPACITY_FUNCTIONS: readonly OrdinaryFunction[] = [
  ordinary({
    name: 'capacity',
    group: 'Capacity',
    parameters: [
      { name: 'B', text: 'bandwidth', takes: 'bandwidth', unit: 'Hz' },
      { name: 'SNR', text: 'signal-to-noise ratio', takes: 'signal ratio', unit: 'dB' },
    ],
    text: 'Greatest bit rate over a channel with white Gaussian noise.',
    formula: 'C = B·log₂(1 + S/N)',
    source: 'C. E. Shannon, Communication in the presence of noise, Proc. IRE, January 1949, theorem 2',
    result: 'a bit rate',
    example: 'capacity(1 MHz, 15 dB)',
    compute: capacityBitPerS,
    resultUnit: 'bit/s',
    resultKind: 'plain',
  }),
];

/**
 * Chains of stages: noise carried in temperatures, intercept and compression points referred to the chain's input.
 * Figures are decibels and dBm unless the name says otherwise. NaN: not known.
 */
import { BOLTZMANN, REFERENCE_TEMPERATURE_K } from './noise';

const factorOf = (decibels: number): number => 10 ** (decibels / 10);
const decibelsOf = (factor: number): number => 10 * Math.log10(factor);

/**
 * Equivalent input noise temperature of a stage without a noise figure of its own, K: (L − 1)·T of a loss L at the physical
 * temperature T; NaN of a stage that amplifies. Source: as passiveNoiseFigureDb.
 */
export function passiveTemperatureK(gainDb: number, temperatureK: number): number {
  return gainDb <= 0 && temperatureK >= 0 ? (factorOf(-gainDb) - 1) * temperatureK : NaN;
}

/** Noise temperature at the chain's input with one more stage: T + Tₛ/G, G the gain ahead of it. Source: Friis 1944. */
export function cascadedTemperatureK(aheadK: number, gainAheadDb: number, stageK: number): number {
  return aheadK + stageK / factorOf(gainAheadDb);
}

/** Share of a noise temperature that stands behind a gain in the total at the input, 0 to 1. */
export function noiseShare(stageK: number, gainAheadDb: number, totalK: number): number {
  return totalK > 0 ? stageK / factorOf(gainAheadDb) / totalK : NaN;
}

/** Noise level k·T·B·G behind a gain, dBm; T is referred to the input, K; B in Hz. −∞, no power, at 0 K. */
export function noiseBehindDbm(temperatureK: number, bandwidthHz: number, gainDb: number): number {
  return temperatureK >= 0 && bandwidthHz > 0 ? decibelsOf(BOLTZMANN * temperatureK * bandwidthHz) + 30 + gainDb : NaN;
}

/** Noise figure of a noise temperature, dB, referred to 290 K; negative temperatures have none. */
export function figureOfTemperatureDb(temperatureK: number): number {
  return temperatureK >= 0 ? decibelsOf(1 + temperatureK / REFERENCE_TEMPERATURE_K) : NaN;
}

/**
 * How intermodulation of stages adds: `coherent`, in phase, the worst case, or `power`. `order` 3 also serves compression points,
 * which are combined as third-order intercepts are (common practice).
 */
export interface Addition {
  readonly isCoherent: boolean;
  readonly order: 2 | 3;
}

/**
 * The exponent n with which reciprocals of input-referred intercepts add, Σ 1/IPⁿ = 1/IPⁿ_total. A product of order m has an
 * amplitude in IP^(−(m−1)/2): in phase n = (m − 1)/2, as powers n = m − 1.
 */
export function additionExponent({ isCoherent, order }: Addition): number {
  return isCoherent ? (order - 1) / 2 : order - 1;
}

/**
 * Input intercept of what stands ahead with one more stage, dBm. `aheadDbm` is referred to the chain's input, `stageDbm` to the
 * stage's own. Source: in-phase and non-coherent cascade of intercepts, Pozar, Microwave Engineering, 4th edition, section 10.3.
 */
export function cascadedInterceptDbm(
  aheadDbm: number,
  gainAheadDb: number,
  stageDbm: number,
  exponent: number,
): number {
  const a = -aheadDbm * exponent;
  const b = (gainAheadDb - stageDbm) * exponent;
  const largest = Math.max(a, b);
  return -(largest + decibelsOf(factorOf(a - largest) + factorOf(b - largest))) / exponent;
}

/** Share of a stage in the reciprocal sum of intercepts, 0 to 1; shares of a chain sum to 1. */
export function interceptShare(totalDbm: number, gainAheadDb: number, stageDbm: number, exponent: number): number {
  return factorOf((totalDbm + gainAheadDb - stageDbm) * exponent);
}

/** Spurious-free dynamic range ⅔·(IIP3 − floor), dB: third-order products of two tones just at the noise floor. */
export function spuriousFreeRangeDb(inputInterceptDbm: number, floorDbm: number): number {
  return (2 / 3) * (inputInterceptDbm - floorDbm);
}

/**
 * Level of products of an order at the output for two equal tones at the input, dBm: m·P − (m − 1)·IIP + G.
 * Holds well below compression only. Source: definition of the intercept point.
 */
export function productLevelDbm(toneDbm: number, inputInterceptDbm: number, gainDb: number, order: 2 | 3): number {
  return order * toneDbm - (order - 1) * inputInterceptDbm + gainDb;
}

/** Rise of a noise level when another power is added to it, dB. */
export function riseDb(addedDbm: number, noiseDbm: number): number {
  return decibelsOf(1 + factorOf(addedDbm - noiseDbm));
}

/**
 * Gain that a weak signal loses beside one strong interferer, dB: −20·log10(1 − 2·P/IIP3). NaN from half the intercept on, where a
 * third-order model has nothing left. Source: third-order expansion of a memoryless stage (Razavi, RF Microelectronics; from memory).
 */
export function blockingDb(interfererDbm: number, inputInterceptDbm: number): number {
  const left = 1 - 2 * factorOf(interfererDbm - inputInterceptDbm);
  return left > 0 ? -20 * Math.log10(left) : NaN;
}

/** Thermal noise, noise figure and noise temperature, as pure functions of SI numbers and decibels where the name says so. */

/** Boltzmann constant, J/K; SI Brochure, 9th edition 2019, exact. */
export const BOLTZMANN = 1.380649e-23;

/** Reference noise temperature, K; ITU-R V.573-5. */
export const REFERENCE_TEMPERATURE_K = 290;

const factorFromDb = (figureDb: number): number => 10 ** (figureDb / 10);
const dbFromFactor = (factor: number): number => 10 * Math.log10(factor);

/** Noise power density k·T, dBm/Hz. Units: `temperatureK` ≥ 0; −∞ at 0 K. Source: Nyquist's theorem, ITU-R P.372 section 2. */
export function noiseDensityDbmPerHz(temperatureK: number): number {
  return temperatureK >= 0 ? dbFromFactor(BOLTZMANN * temperatureK) + 30 : NaN;
}

/** Noise power k·T·B, dBm. Units: K and Hz, both ≥ 0. Source: as noiseDensityDbmPerHz. */
export function thermalNoiseDbm(temperatureK: number, bandwidthHz: number): number {
  return temperatureK >= 0 && bandwidthHz >= 0 ? dbFromFactor(BOLTZMANN * temperatureK * bandwidthHz) + 30 : NaN;
}

/** Equivalent input noise temperature T₀(F − 1), K. Source: ITU-R V.573-5, noise factor; T₀ = 290 K. */
export function noiseTemperatureK(noiseFigureDb: number): number {
  return REFERENCE_TEMPERATURE_K * (factorFromDb(noiseFigureDb) - 1);
}

/** Noise figure 10·log10(1 + Te/T₀), dB. Source: as noiseTemperatureK. */
export function noiseFigureDb(temperatureK: number): number {
  return temperatureK >= 0 ? dbFromFactor(1 + temperatureK / REFERENCE_TEMPERATURE_K) : NaN;
}

/**
 * Noise figure of a passive loss L at physical temperature T: F = 1 + (L − 1)·T/T₀, dB.
 * Holds: at 290 K it is the loss. Source: IEEE definition of noise factor applied to an attenuator in thermal equilibrium.
 */
export function passiveNoiseFigureDb(lossDb: number, temperatureK: number): number {
  return lossDb >= 0 && temperatureK >= 0
    ? dbFromFactor(1 + ((factorFromDb(lossDb) - 1) * temperatureK) / REFERENCE_TEMPERATURE_K)
    : NaN;
}

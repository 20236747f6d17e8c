/** Propagation. */

/** Speed of light in vacuum, m/s; SI Brochure, 9th edition 2019, exact. */
export const SPEED_OF_LIGHT = 299792458;

/**
 * Free-space basic transmission loss 20·log10(4πdf/c), dB. Units: `distanceM` and `frequencyHz` > 0.
 * Source: ITU-R P.525, free-space basic transmission loss between isotropic antennas.
 */
export function freeSpaceLossDb(distanceM: number, frequencyHz: number): number {
  const ratio = (4 * Math.PI * distanceM * frequencyHz) / SPEED_OF_LIGHT;
  return ratio > 0 ? 20 * Math.log10(ratio) : NaN;
}

/** True beyond the reactive near field, d ≥ λ/2π, where the free-space formula means something. */
export function isBeyondNearField(distanceM: number, frequencyHz: number): boolean {
  return distanceM >= SPEED_OF_LIGHT / frequencyHz / (2 * Math.PI);
}

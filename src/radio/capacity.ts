/** Channel capacity. */

/**
 * Capacity B·log2(1 + S/N), bit/s. Units: `bandwidthHz` ≥ 0, `signalToNoiseDb` any.
 * Source: Shannon 1949, theorem 2 (additive white Gaussian noise).
 */
export function capacityBitPerS(bandwidthHz: number, signalToNoiseDb: number): number {
  return bandwidthHz >= 0 ? (bandwidthHz * Math.log1p(10 ** (signalToNoiseDb / 10))) / Math.LN2 : NaN;
}

/**
 * Combining decibel figures on purpose. All figures are in one unit; the result is in the same unit.
 * Holds: commutative; between max and max + 10·log10 n; shifts with its terms; −∞ (no power) is neutral.
 * Source: definition of the decibel (ISO 80000-1, IEC 60027-3); the largest term is taken out so that nothing overflows.
 */

const LN10_OVER_10 = Math.LN10 / 10;

/** 10·log10 of the sum of the powers, dB; −∞ when there is none. */
export function powerSum(figures: readonly number[]): number {
  let largest = -Infinity;
  for (const figure of figures) {
    if (Number.isNaN(figure)) return NaN;
    if (figure > largest) largest = figure;
  }
  if (largest === -Infinity || largest === Infinity) return largest;
  let sum = 0;
  for (const figure of figures) sum += 10 ** ((figure - largest) / 10);
  return largest + 10 * Math.log10(sum);
}

/** 10·log10 of power a less power b, dB; −∞ when equal; NaN when b is the larger. */
export function powerDifference(a: number, b: number): number {
  if (b === -Infinity) return a;
  if (!(b <= a)) return NaN;
  if (a === b) return -Infinity;
  // log1p(−x) written by expm1 keeps digits when both are nearly equal.
  return a + 10 * Math.log10(-Math.expm1((b - a) * LN10_OVER_10));
}

/** 20·log10 of the sum of the fields in phase, dB: the worst case for coherent tones. */
export function fieldSum(figures: readonly number[]): number {
  return 2 * powerSum(figures.map((figure) => figure / 2));
}

/** 10·log10 of the mean power, dB. */
export function meanPower(figures: readonly number[]): number {
  return powerSum(figures) - 10 * Math.log10(figures.length);
}

/** Signal ratios combined by their reciprocals, dB: the ratio to the sum of all impairments. */
export function reciprocalSum(figures: readonly number[]): number {
  return -powerSum(figures.map((figure) => -figure));
}

/** The share of each figure in the sum of the powers; shares add to 1 and are the derivatives of the sum, dB per dB. */
export function powerShares(figures: readonly number[]): number[] {
  const total = powerSum(figures);
  return figures.map((figure) => (total === -Infinity ? 0 : 10 ** ((figure - total) / 10)));
}

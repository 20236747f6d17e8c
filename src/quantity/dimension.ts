/**
 * Dimensions: exponents of kilogram, metre, second, ampere and kelvin. Exponents may be fractions (the root of a power).
 * Plane angle, information and decibels have no dimension.
 */

/** Exponents of (kg, m, s, A, K). */
export type Dimension = readonly [kg: number, m: number, s: number, A: number, K: number];

/** The dimension of plain numbers and ratios. */
export const NO_DIMENSION: Dimension = [0, 0, 0, 0, 0];

export const LENGTH: Dimension = [0, 1, 0, 0, 0];
export const AREA: Dimension = [0, 2, 0, 0, 0];
export const TIME: Dimension = [0, 0, 1, 0, 0];
export const FREQUENCY: Dimension = [0, 0, -1, 0, 0];
export const TEMPERATURE: Dimension = [0, 0, 0, 0, 1];
export const POWER: Dimension = [1, 2, -3, 0, 0];
/** Power per bandwidth, W/Hz, which is energy. */
export const POWER_DENSITY: Dimension = [1, 2, -2, 0, 0];
/** Power per area, W/m². */
export const POWER_FLUX: Dimension = [1, 0, -3, 0, 0];
export const VOLTAGE: Dimension = [1, 2, -3, -1, 0];
export const CURRENT: Dimension = [0, 0, 0, 1, 0];
export const IMPEDANCE: Dimension = [1, 2, -3, -2, 0];
/** Field strength, V/m. */
export const FIELD: Dimension = [1, 1, -3, -1, 0];
/** Magnetic field strength, A/m. */
export const MAGNETIC_FIELD: Dimension = [0, -1, 0, 1, 0];
/** Energy per temperature, J/K: the Boltzmann constant's. */
export const ENTROPY: Dimension = [1, 2, -2, 0, -1];

const CLOSE = 1e-9;

/** True when both have the same exponents. */
export function sameDimension(a: Dimension, b: Dimension): boolean {
  if (a === b) return true;
  for (let i = 0; i < 5; i++) if (Math.abs((a[i] ?? 0) - (b[i] ?? 0)) > CLOSE) return false;
  return true;
}

/** True for the dimension of plain numbers. */
export function isDimensionless(a: Dimension): boolean {
  return a === NO_DIMENSION || sameDimension(a, NO_DIMENSION);
}

/** The dimension of a·bⁿ. */
export function combineDimensions(a: Dimension, b: Dimension, exponent = 1): Dimension {
  if (isDimensionless(b)) return a;
  if (a === NO_DIMENSION && exponent === 1) return b;
  return [
    a[0] + exponent * b[0],
    a[1] + exponent * b[1],
    a[2] + exponent * b[2],
    a[3] + exponent * b[3],
    a[4] + exponent * b[4],
  ];
}

/** The dimension of aⁿ. */
export function raiseDimension(a: Dimension, exponent: number): Dimension {
  return exponent === 1 ? a : combineDimensions(NO_DIMENSION, a, exponent);
}

const ROOT_POWER: readonly Dimension[] = [VOLTAGE, CURRENT, FIELD, MAGNETIC_FIELD];

/** True for the quantities whose square is proportional to power: voltage, current and fields (ISO 80000-1, root-power). */
export function isRootPower(dimension: Dimension): boolean {
  return ROOT_POWER.some((root) => sameDimension(root, dimension));
}

const SUPERSCRIPT: Readonly<Record<string, string>> = {
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
  '-': '⁻',
  '.': '·',
};

const superscript = (n: number): string =>
  n === 1 ? '' : String(Math.round(n * 1000) / 1000).replace(/./g, (sign) => SUPERSCRIPT[sign] ?? sign);

const NAMED: readonly (readonly [string, Dimension])[] = [
  ['W', POWER],
  ['V', VOLTAGE],
  ['A', CURRENT],
  ['Ω', IMPEDANCE],
  ['J', POWER_DENSITY],
];

/**
 * The dimension as a product of SI units, shortest first: `W²`, `W·s/K`, `V²/m²`, `1/K`; `1` for none.
 * A power of watt or volt is kept together where one is present.
 */
export function describeDimension(dimension: Dimension): string {
  if (isDimensionless(dimension)) return '1';
  if (sameDimension(dimension, FREQUENCY)) return 'Hz';
  let best: string | undefined;
  for (const [word, named] of NAMED) {
    for (const exponent of [1, 2, 3, -1, -2, 0.5]) {
      const text = asProduct(combineDimensions(dimension, named, -exponent), [[word, exponent]]);
      if (best === undefined || text.length < best.length) best = text;
    }
  }
  const plain = asProduct(dimension, []);
  return best === undefined || plain.length <= best.length ? plain : best;
}

function asProduct(rest: Dimension, head: [string, number][]): string {
  const words = ['kg', 'm', 's', 'A', 'K'];
  const factors = [...head];
  rest.forEach((exponent, index) => {
    if (Math.abs(exponent) > CLOSE) factors.push([words[index] ?? '', exponent]);
  });
  const above = factors.filter(([, n]) => n > 0).map(([word, n]) => word + superscript(n));
  const below = factors.filter(([, n]) => n < 0).map(([word, n]) => word + superscript(-n));
  return (above.length === 0 ? '1' : above.join('·')) + below.map((word) => `/${word}`).join('');
}

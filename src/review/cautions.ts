/** The cautions that stand in *About*, in print, and beside lines that tell how strongly something radiates. */
import { FIELD, MAGNETIC_FIELD, POWER_FLUX, TIME, combineDimensions, raiseDimension, sameDimension } from '../quantity';
import type { Dimension, Unit } from '../quantity';

/** What every account of results has to say, a sentence or two each. */
export const CAUTIONS: readonly string[] = [
  'Results are estimates from the figures entered; confirm them by measurement.',
  'Transmitting needs the licence and limits of the place.',
  'Exposure of people to radio-frequency fields is not assessed: follow local law and qualified practice.',
];

/** What stands beside a line for which `tellsRadiation` is true. */
export const RADIATION_CAUTION =
  'Transmitting needs the licence and limits of the place. Exposure of people is not assessed here.';

const RADIATED_DIMENSIONS: readonly Dimension[] = [
  POWER_FLUX,
  combineDimensions(POWER_FLUX, TIME),
  FIELD,
  MAGNETIC_FIELD,
  // Decibel units of fields stand over the square, which is power-like.
  raiseDimension(FIELD, 2),
  raiseDimension(MAGNETIC_FIELD, 2),
];

// A symbol's parts are divided by underscores and digits, a label's by anything but letters.
const RADIATED_WORDS = /(?<!\p{L})(?:e\.?i?\.?r\.?p|radiated power)(?!\p{L})/iu;

/** True for a line that gives radiated power (by its symbol or label), power per area or field strength (by its unit). */
export function tellsRadiation(line: { readonly symbol: string; readonly label: string }, unit?: Unit): boolean {
  if (RADIATED_WORDS.test(line.symbol) || RADIATED_WORDS.test(line.label)) return true;
  if (unit === undefined || unit.form === 'rate') return false;
  return RADIATED_DIMENSIONS.some((dimension) => sameDimension(dimension, unit.dimension));
}

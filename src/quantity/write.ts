/**
 * Writing figures for people: two decimals for decibels, four significant figures for linear quantities, SI prefixes where
 * the unit is free to take one. Exact values are for files and the command line; these texts are for reading.
 */
import { describeDimension, isDimensionless, isRootPower, raiseDimension, type Dimension } from './dimension';
import type { DecibelUnit, Unit } from './unit';
import { SI_PREFIXES } from './unit-table';
import { findUnit } from './units';

export interface WrittenFigure {
  readonly text: string;
  readonly unit: string;
}

export interface WritingOptions {
  /** Decimals of a decibel figure, or significant figures of a linear one. */
  readonly digits?: number;
  /** Significant figures that a person typed: a linear literal shows at least these. */
  readonly typedDigits?: number;
  /** True when nobody chose the unit: a base unit then takes an SI prefix. */
  readonly isFitted?: boolean;
  /** How a minus sign is written; the typographic one by default. */
  readonly minus?: '-' | '−';
}

/** What is shown in place of a decibel figure of no power at all. */
export const NO_POWER_TEXT = 'no power';

/** A figure in its unit as text, with the unit's word ('' for plain numbers). Not for NaN or +∞, which are never shown. */
export function writeFigure(value: number, unit: Unit, options: WritingOptions = {}): WrittenFigure {
  const word = unit.word === '1' ? '' : unit.word;
  if (value === -Infinity) return { text: NO_POWER_TEXT, unit: '' };
  if (unit.form !== 'linear') return { text: withMinus(value.toFixed(options.digits ?? 2), options), unit: word };
  if (options.isFitted === true && unit.factor === 1 && unit.shift === 0 && word !== '') {
    const prefixed = withPrefix(value, word, options.digits);
    return { text: withMinus(prefixed.text, options), unit: prefixed.unit };
  }
  const significant = Math.max(
    options.digits ?? 4,
    options.digits === undefined ? Math.min(options.typedDigits ?? 0, 15) : 0,
  );
  return { text: withMinus(writeSignificant(value, significant), options), unit: word };
}

/** A figure and its unit in one text, for sentences. */
export function writeQuantity(value: number, unit: Unit, options: WritingOptions = {}): string {
  // Findings quote inputs too, and one of them may be withheld.
  if (Number.isNaN(value) || value === Infinity) return 'a withheld figure';
  const { text, unit: word } = writeFigure(value, unit, options);
  return word === '' ? text : `${text} ${word}`;
}

function withMinus(text: string, { minus = '−' }: WritingOptions): string {
  const unsigned = /^-0(\.0*)?$/.test(text) ? text.slice(1) : text;
  return minus === '-' ? unsigned : unsigned.replace(/-/g, minus);
}

const SUPERSCRIPT_DIGITS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A number with so many significant figures, without needless zeros; very large and small ones in engineering notation. */
export function writeSignificant(value: number, significant = 4): string {
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(significant));
  const size = Math.abs(rounded);
  if (size >= 1e-3 && size < 10 ** Math.max(6, significant)) return plainDecimal(rounded, significant);
  const exponent = Math.floor(Math.log10(size) / 3) * 3;
  const mantissa = Number((rounded / 10 ** exponent).toPrecision(significant));
  const power = String(exponent)
    .replace(/\d/g, (digit) => SUPERSCRIPT_DIGITS[Number(digit)] ?? digit)
    .replace('-', '⁻');
  return `${plainDecimal(mantissa, significant)}×10${power}`;
}

function plainDecimal(value: number, significant: number): string {
  const decimals = Math.max(0, significant - 1 - Math.floor(Math.log10(Math.abs(value))));
  const text = value.toFixed(Math.min(decimals, 20));
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}

interface LinearBase {
  readonly word: string;
  readonly prefixes: boolean;
}

/** The SI words in which the linear value behind a decibel figure is given, by the decibel unit's dimension. */
const LINEAR_WORDS: readonly (readonly [decibelWord: string, base: LinearBase])[] = [
  ['dBW', { word: 'W', prefixes: true }],
  ['dBW/Hz', { word: 'W/Hz', prefixes: true }],
  ['dBV', { word: 'V', prefixes: true }],
  ['dBV/m', { word: 'V/m', prefixes: true }],
  ['dBA/m', { word: 'A/m', prefixes: true }],
  ['dBµA', { word: 'A', prefixes: true }],
  ['dBW/m²', { word: 'W/m²', prefixes: true }],
  ['dBW/m²/Hz', { word: 'W/m²/Hz', prefixes: false }],
  ['dBHz', { word: 'Hz', prefixes: true }],
  ['dBK', { word: 'K', prefixes: false }],
  ['dBΩ', { word: 'Ω', prefixes: true }],
  ['dB/K', { word: '1/K', prefixes: false }],
  ['dBm²', { word: 'm²', prefixes: false }],
  ['dBW/K/Hz', { word: 'J/K', prefixes: false }],
  ['dBc/Hz', { word: '1/Hz', prefixes: false }],
];

function linearBase(unit: DecibelUnit): LinearBase {
  if (unit.word === 'dB(bit/s)') return { word: 'bit/s', prefixes: true };
  if (unit.word === 'dB(Bd)') return { word: 'Bd', prefixes: true };
  const found = LINEAR_WORDS.find(([word]) => sameWordDimension(word, unit.dimension));
  return found?.[1] ?? { word: describeDimension(unit.dimension), prefixes: false };
}

function sameWordDimension(word: string, dimension: Dimension): boolean {
  const unit = findUnit(word);
  return unit?.form === 'decibel' && unit.dimension.every((n, index) => Math.abs(n - (dimension[index] ?? 0)) < 1e-9);
}

/** The SI value behind a decibel figure and its unit: watts, hertz, kelvin, volts (for levels of voltage), or `1` for ratios. */
export function linearValue(value: number, unit: Unit): { value: number; unit: string } | undefined {
  if (unit.form !== 'decibel') return undefined;
  const figure = value + unit.offsetDb;
  if (isDimensionless(unit.dimension)) return { value: 10 ** (figure / 10), unit: '1' };
  const root = isRootPower(raiseDimension(unit.dimension, 0.5));
  return { value: 10 ** (figure / (root ? 20 : 10)), unit: linearBase(unit).word };
}

/**
 * The linear value of a decibel figure as text: watts with a prefix, a ratio as `× 0.776`, kelvin, hertz.
 * Undefined for figures that are linear already.
 */
export function linearFigure(value: number, unit: Unit): WrittenFigure | undefined {
  if (unit.form !== 'decibel') return undefined;
  const linear = linearValue(value, unit);
  if (linear === undefined || !Number.isFinite(linear.value)) return undefined;
  if (linear.unit === '1') return { text: writeSignificant(linear.value), unit: '×' };
  return linearBase(unit).prefixes
    ? withPrefix(linear.value, linear.unit)
    : { text: writeSignificant(linear.value), unit: linear.unit };
}

/** A value in a base unit with the SI prefix that leaves one to three digits before the point. */
export function withPrefix(value: number, baseWord: string, significant = 4): WrittenFigure {
  if (value === 0 || !Number.isFinite(value)) return { text: writeSignificant(value, significant), unit: baseWord };
  const rounded = Number(value.toPrecision(significant));
  const exponent = Math.floor(Math.log10(Math.abs(rounded)) / 3) * 3;
  const prefix = SI_PREFIXES.find(([, power]) => power === exponent);
  const word = prefix === undefined ? undefined : prefix[0] + baseWord;
  if (prefix === undefined || word === undefined || findUnit(word) === undefined)
    return { text: writeSignificant(value, significant), unit: baseWord };
  return { text: writeSignificant(value / Number(`1e${String(prefix[1])}`), significant), unit: word };
}

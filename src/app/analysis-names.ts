/** What analyses call things, and how they write figures, steps and slopes for reading. */
import type { Evaluation } from '../engine';
import { writeFigure, writeQuantity, writeSignificant, type Unit } from '../quantity';

/** A line or a part of a chain, by its symbol or its label. */
export interface Named {
  readonly lineId: string;
  readonly symbol: string;
  readonly label: string;
}

export function named(evaluation: Evaluation, lineId: string): Named {
  const line = evaluation.line(lineId);
  return { lineId, symbol: line?.symbol ?? '', label: line?.label ?? '' };
}

export const nameOf = ({ symbol, label }: Named): string => symbol || (label === '' ? 'a line without name' : label);

/** A figure in its unit; words where there is none. */
export function figureWords(value: number, unit: Unit | undefined): string {
  return Number.isNaN(value) || value === Infinity || unit === undefined ? 'withheld' : writeQuantity(value, unit);
}

/** A difference of figures with its sign: of levels it is in dB. */
export function stepWords(value: number, unit: Unit | undefined): string {
  if (!Number.isFinite(value) || unit === undefined) return '—';
  const { text, word } = sizeOf(Math.abs(value), unit);
  const sign = /^0(\.0*)?$/.test(text) ? '' : value < 0 ? '−' : '+';
  return `${sign}${text}${word === '' ? '' : ` ${word}`}`;
}

/** The size of a difference, without sign. */
export function sizeWords(value: number, unit: Unit | undefined): string {
  if (!Number.isFinite(value) || unit === undefined) return '—';
  const { text, word } = sizeOf(Math.abs(value), unit);
  return word === '' ? text : `${text} ${word}`;
}

function sizeOf(size: number, unit: Unit): { readonly text: string; readonly word: string } {
  if (unit.form === 'decibel') return { text: size.toFixed(2), word: 'dB' };
  const { text, unit: word } = writeFigure(size, unit);
  return { text, word };
}

/** A bare number, such as a slope. */
export const numberWords = (value: number, significant = 4): string =>
  Number.isFinite(value) ? writeSignificant(value, significant).replace(/-/g, '−') : '—';

/** A figure as an entry would be typed: so many significant digits, and the unit's word. */
export function typedFigure(value: number, unit: Unit, significant = 12): string {
  const text = String(Number(value.toPrecision(significant)));
  return unit.word === '1' ? text : `${text} ${unit.word}`;
}

/** `a, b and c`. */
export function joinWords(words: readonly string[]): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`;
}

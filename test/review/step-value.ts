/**
 * Works a step out as a reader with a pocket calculator would: figures with their units in SI, × ÷ + − ^ √ and brackets.
 * × and ÷ bind alike and from the left, ^ more closely, + and − less.
 */
import { findUnit } from '../../src/quantity';
import type { Piece } from '../../src/review';

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A figure as written, `29.94×10¹⁵`, as a number. */
export function numberOf(written: string): number {
  const found = /^(−?[\d.]+)(?:×10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+))?$/.exec(written);
  if (found === null) throw new Error(`“${written}” is no number`);
  const exponent = (found[2] ?? '⁰').replace(/./g, (sign) => (sign === '⁻' ? '-' : String(SUPERSCRIPTS.indexOf(sign))));
  return Number(`${(found[1] ?? '').replace('−', '-')}e${exponent}`);
}

/** A figure with its unit, in the SI unit of its dimension. Units with no word of their own are SI products already. */
function siValue({ text, unit }: { readonly text: string; readonly unit: string }): number {
  const known = unit === '' ? undefined : findUnit(unit);
  if (known !== undefined && known.form !== 'linear') throw new Error(`${unit} is no linear unit`);
  return numberOf(text) * (known?.factor ?? 1) + (known?.shift ?? 0);
}

/** Signs and figures, in order. */
function tokensOf(pieces: readonly Piece[]): (string | number)[] {
  return pieces.flatMap((piece): (string | number)[] => {
    if (piece.type === 'symbol') throw new Error(`${piece.symbol} has no figure`);
    if (piece.type === 'figure') return [siValue(piece)];
    return (piece.text.match(/\^[\d.]+|\d+|[^\s\d]/g) ?? []).map((word) => (/^\d+$/.test(word) ? Number(word) : word));
  });
}

/** The step's value in SI. Throws for what cannot be read so. */
export function stepValue(pieces: readonly Piece[]): number {
  const tokens = tokensOf(pieces);
  let at = 0;
  const takes = (...signs: readonly string[]): string | undefined => {
    const token = tokens[at];
    if (typeof token !== 'string' || !signs.includes(token)) return undefined;
    at++;
    return token;
  };
  const operand = (): number => {
    const token = tokens[at++];
    if (typeof token === 'number') return token;
    if (token === '√') return Math.sqrt(operand());
    if (token !== '(') throw new Error(`an operand is expected, “${String(token)}” found`);
    const inside = sum();
    if (takes(')') === undefined) throw new Error('a bracket is not closed');
    return inside;
  };
  const power = (): number => {
    const base = operand();
    const token = tokens[at];
    if (typeof token !== 'string' || !token.startsWith('^')) return base;
    at++;
    return base ** Number(token.slice(1));
  };
  const product = (): number => {
    let value = power();
    for (let sign = takes('×', '÷'); sign !== undefined; sign = takes('×', '÷'))
      value = sign === '×' ? value * power() : value / power();
    return value;
  };
  const sum = (): number => {
    let value = product();
    for (let sign = takes('+', '−'); sign !== undefined; sign = takes('+', '−'))
      value = sign === '+' ? value + product() : value - product();
    return value;
  };
  const value = sum();
  if (at < tokens.length) throw new Error(`“${String(tokens[at])}” stands where nothing should`);
  return value;
}

/** How far off the value may be, as a part of it, when each figure is rounded to four significant digits. */
export function rounding(pieces: readonly Piece[]): number {
  return pieces.reduce((sum, piece) => {
    if (piece.type === 'figure') return sum + 5.1e-4;
    const exponent = /\^([\d.]+)/.exec(piece.type === 'text' ? piece.text : '')?.[1];
    return sum + (exponent === undefined ? 0 : 5.1e-4 * Number(exponent));
  }, 0);
}

/** The pieces as one text. */
export const textOf = (pieces: readonly Piece[]): string =>
  pieces
    .map((piece) =>
      piece.type === 'text'
        ? piece.text
        : piece.type === 'symbol'
          ? piece.symbol
          : piece.unit === ''
            ? piece.text
            : `${piece.text} ${piece.unit}`,
    )
    .join('');

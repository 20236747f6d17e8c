/**
 * The scanner: runs ahead of the grammar, which knows neither units, nor Greek letters, nor exponents, and which hangs on
 * deep nesting. It finds numbers with their units, symbols, function names and operators with their places, and writes the
 * *shape*: the same expression with placeholders (`v_0`, `F_2(`) that the grammar can read.
 * Holds: tokens and shape correspond one to one, so entries of one shape share one parse.
 */
import { fail, ok, type Result } from '../base';
import type { Place } from '../findings';
import { findUnit, matchUnit, UNIT_WORDS, type Unit } from '../quantity';
import { nearestName } from './nearest';

/** Longest entry that is read, in characters. */
export const ENTRY_LIMIT = 4096;
/** Deepest nesting of brackets that is read. */
export const DEPTH_LIMIT = 64;

export type Token =
  | {
      readonly type: 'literal';
      readonly start: number;
      readonly end: number;
      readonly figure: number;
      readonly unit: Unit | null;
    }
  | { readonly type: 'text'; readonly start: number; readonly end: number; readonly text: string }
  | { readonly type: 'symbol'; readonly start: number; readonly end: number; readonly name: string }
  /** A function's name with its opening bracket; `nameEnd` is where the name ends. */
  | {
      readonly type: 'function';
      readonly start: number;
      readonly end: number;
      readonly name: string;
      readonly nameEnd: number;
    }
  | { readonly type: 'sign'; readonly start: number; readonly end: number; readonly sign: string };

export interface Scan {
  readonly tokens: readonly Token[];
  readonly shape: string;
}

/** Why an entry cannot be read, and where. */
export interface EntryFault {
  readonly place: Place;
  readonly sentence: string;
}

const NUMBER = /(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?/y;
const NAME = /\p{L}[\p{L}\p{M}\p{N}_]*(?:\.\p{L}[\p{L}\p{M}\p{N}_]*)*/uy;
const TEXT = /"([^"]*)"/y;
const SPACE = /\s/;
const SIGNS = new Set(['+', '-', '*', '/', '^', '(', ')', ',', ';', '=', '<', '>']);
const SIGN_SPELLINGS: Readonly<Record<string, string>> = {
  '−': '-',
  '–': '-',
  '×': '*',
  '·': '*',
  '⋅': '*',
  '÷': '/',
  '≤': '<=',
  '≥': '>=',
  '≠': '<>',
};

const fault = (start: number, end: number, sentence: string): { ok: false; fault: EntryFault } =>
  fail({ place: { start, end }, sentence });

/** Splits an entry into tokens and its shape. Faults tell the place and what to do. */
export function scanEntry(text: string, limit = ENTRY_LIMIT): Result<Scan, EntryFault> {
  if (text.length > limit)
    return fault(
      0,
      text.length,
      `The entry has ${String(text.length)} characters; at most ${String(limit)} are read. Split it over several lines.`,
    );
  const tokens: Token[] = [];
  let shape = '';
  let depth = 0;
  let at = 0;
  while (at < text.length) {
    const character = text[at] ?? '';
    if (SPACE.test(character)) {
      at++;
      continue;
    }
    const code = character.charCodeAt(0);
    if ((code >= 48 && code <= 57) || character === '.') {
      const literal = scanLiteral(text, at, at, 1);
      if (!literal.ok) return literal;
      shape += `v_${String(tokens.length)}`;
      tokens.push(literal.value);
      at = literal.value.end;
      continue;
    }
    if (character === '"') {
      TEXT.lastIndex = at;
      const found = TEXT.exec(text);
      if (found === null) return fault(at, text.length, 'A quoted text is not closed: a second " is missing.');
      shape += `v_${String(tokens.length)}`;
      tokens.push({ type: 'text', start: at, end: TEXT.lastIndex, text: found[1] ?? '' });
      at = TEXT.lastIndex;
      continue;
    }
    NAME.lastIndex = at;
    const name = NAME.exec(text)?.[0];
    if (name !== undefined) {
      const end = at + name.length;
      let open = end;
      while (SPACE.test(text[open] ?? '')) open++;
      if (text[open] === '(') {
        if (++depth > DEPTH_LIMIT) return tooDeep(open);
        shape += `F_${String(tokens.length)}(`;
        tokens.push({ type: 'function', start: at, end: open + 1, name, nameEnd: end });
        at = open + 1;
      } else {
        shape += `v_${String(tokens.length)}`;
        tokens.push({ type: 'symbol', start: at, end, name });
        at = end;
      }
      continue;
    }
    let sign = SIGN_SPELLINGS[character] ?? character;
    if (!SIGNS.has(sign[0] ?? '')) return strangeCharacter(text, at);
    let end = at + 1;
    if (sign === '<' || sign === '>') {
      const next = text[end];
      if (next === '=' || (sign === '<' && next === '>')) {
        sign += next;
        end++;
      }
    }
    if (sign === '=' && tokens.length === 0)
      return fault(0, 1, 'An entry begins with a quantity or a symbol; leave the = sign out.');
    if (sign === '(' && ++depth > DEPTH_LIMIT) return tooDeep(at);
    if (sign === ')' && --depth < 0)
      return fault(at, end, 'This bracket closes nothing: an opening bracket is missing before it.');
    if (sign === '-' && isPrefixPosition(tokens)) {
      const literal = signedLiteral(text, at, end);
      if (literal !== undefined) {
        if (!literal.ok) return literal;
        shape += `v_${String(tokens.length)}`;
        tokens.push(literal.value);
        at = literal.value.end;
        continue;
      }
    }
    shape += sign;
    tokens.push({ type: 'sign', start: at, end, sign });
    at = end;
  }
  const loose = tokens.findIndex((token, index) => token.type !== 'sign' && endsOperand(tokens[index - 1]));
  if (loose >= 0)
    return fault(
      tokens[loose]?.start ?? 0,
      tokens[loose]?.end ?? 0,
      'An operator such as +, − or * is missing before this.',
    );
  if (depth > 0) return fault(text.length, text.length, 'A bracket is not closed.');
  if (tokens.length === 0)
    return fault(0, text.length, 'The entry is empty: write a quantity such as 43 dBm, or an expression.');
  return ok({ tokens, shape });
}

const tooDeep = (at: number): { ok: false; fault: EntryFault } =>
  fault(at, at + 1, `Brackets are nested more than ${String(DEPTH_LIMIT)} deep. Split the entry over several lines.`);

/** True when a token is an operand or closes one: what follows must be an operator. */
function endsOperand(token: Token | undefined): boolean {
  return token !== undefined && token.type !== 'function' && (token.type !== 'sign' || token.sign === ')');
}

function isPrefixPosition(tokens: readonly Token[]): boolean {
  return !endsOperand(tokens[tokens.length - 1]);
}

/** A minus sign directly before a figure with a unit belongs to the figure: −174 dBm/Hz is a level, not the inverse of one. */
function signedLiteral(text: string, start: number, after: number): Result<Token, EntryFault> | undefined {
  let at = after;
  while (SPACE.test(text[at] ?? '')) at++;
  if (!/[\d.]/.test(text[at] ?? '')) return undefined;
  const literal = scanLiteral(text, at, start, -1);
  if (!literal.ok) return literal;
  if (literal.value.type !== 'literal' || literal.value.unit === null) return undefined;
  let next = literal.value.end;
  while (SPACE.test(text[next] ?? '')) next++;
  return text[next] === '^' ? undefined : literal;
}

function scanLiteral(text: string, at: number, start: number, sign: 1 | -1): Result<Token, EntryFault> {
  NUMBER.lastIndex = at;
  const number = NUMBER.exec(text)?.[0];
  if (number === undefined) return fault(at, at + 1, 'A number is expected after the point.');
  let end = at + number.length;
  const figure = Number(number);
  if (!Number.isFinite(figure)) return fault(at, end, 'The number is too large.');
  const unitAt = text[end] === ' ' || text[end] === '\u00a0' || text[end] === '\u202f' ? end + 1 : end;
  const found = matchUnit(text, unitAt);
  if (found !== undefined) {
    if (found.unit.form === 'linear' && /^\s*\^/.test(text.slice(found.end, found.end + 8))) {
      const { word } = found.unit;
      return fault(
        at,
        found.end,
        `A power behind ${number} ${word} could be meant of the unit or of the whole. Write (${number} ${word})^2, or ${number} * (1 ${word})^2.`,
      );
    }
    return ok({ type: 'literal', start, end: found.end, figure: sign * figure, unit: found.unit });
  }
  NAME.lastIndex = unitAt;
  const word = NAME.exec(text)?.[0];
  if (word !== undefined) {
    end = unitAt + word.length;
    const nearest = nearestName(word, UNIT_WORDS);
    return fault(
      unitAt,
      end,
      `“${word}” is no unit known here${nearest === undefined ? '' : `; is it ${nearest}`}? To multiply by a symbol write ${number} * ${word}.`.replace(
        'here?',
        'here.',
      ),
    );
  }
  return ok({ type: 'literal', start, end, figure: sign * figure, unit: null });
}

function strangeCharacter(text: string, at: number): { ok: false; fault: EntryFault } {
  const character = String.fromCodePoint(text.codePointAt(at) ?? 0);
  const end = at + character.length;
  if (character === '%') return fault(at, end, '% stands only directly after a number: write 50 %.');
  if (character === '_') return fault(at, end, 'A symbol begins with a letter.');
  if (character === "'") return fault(at, end, 'Write texts in double quotes.');
  return fault(at, end, `“${character}” has no meaning in an entry.`);
}

const PLAIN_NUMBER = String.raw`[+-]?(?:\d{1,3}(?:[ '\u2019]\d{3})+|\d+)?(?:[.,]\d*)?(?:[eE][+-]?\d+)?`;
const PLAIN = new RegExp(`^(${PLAIN_NUMBER})(?: ?(\\S.*))?$`, 'u');

/**
 * Reads a plain quantity: one figure with or without a unit, as typed in an entry, a tolerance or a requirement.
 * A decimal comma, a typographic minus sign and digits grouped by spaces are taken; undefined when the text is anything else.
 */
export function readPlainQuantity(text: string): { figure: number; unit: Unit | null; digits: number } | undefined {
  const first = text.charCodeAt(0);
  if ((first >= 65 && first <= 90) || (first >= 97 && first <= 122)) return undefined;
  const clean = text
    .trim()
    .replace(/[\u00a0\u202f]/g, ' ')
    .replace(/^[\u2212\u2013]/, '-')
    .replace(/^([+-]) +/, '$1');
  const match = PLAIN.exec(clean);
  const number = (match?.[1] ?? '').replace(/[ '\u2019]/g, '').replace(',', '.');
  if (match === null || !/\d/.test(number)) return undefined;
  const figure = Number(number);
  if (!Number.isFinite(figure)) return undefined;
  const word = match[2];
  const digits = /^[+-]?0*\.?0*(\d*)\.?(\d*)/.exec(number);
  const significant = ((digits?.[1] ?? '') + (digits?.[2] ?? '')).length;
  if (word === undefined) return { figure, unit: null, digits: significant };
  // The word 1 stands for plain numbers in a line's unit; behind a number it would be a slip.
  const unit = word === '1' ? undefined : findUnit(word);
  return unit === undefined ? undefined : { figure, unit, digits: significant };
}

/**
 * A check of JSON text ahead of JSON.parse: it says where and why a text is no JSON, and refuses what JSON.parse would take and
 * this project will not: deep nesting, a key given twice, keys that reach into every object, numbers beyond all range.
 * Holds: of a text that passes, JSON.parse makes a value; the check takes time in proportion to the text and no stack.
 * Source: RFC 8259.
 */
import { fail, ok, type Result } from '../base';

/** Why a text is refused. `path` is the place in the document, as in `sections[1].lines[3].entry`. */
export interface JsonFault {
  readonly code: 'bad-json' | 'number-too-large' | 'nested-too-deeply' | 'key-given-twice' | 'refused-key';
  readonly path: string;
  readonly sentence: string;
}

/** Keys that are refused wherever they stand, because every object has them already. */
export const REFUSED_KEYS: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype']);

/** An open bracket: the keys met so far and the present one, or the present index of a list. */
type Open = { readonly keys: Set<string>; key: string } | { readonly keys: null; index: number };

const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
const BLANKS = /[ \t\n\r]*/y;
const ESCAPE = /\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4})/y;
const WORDS = ['true', 'false', 'null'];

/** Checks a text; `depthLimit` is the deepest nesting of brackets that is let through. */
export function checkJsonText(text: string, depthLimit: number): Result<undefined, JsonFault> {
  return new Checker(text, depthLimit).check();
}

/** Writes a path step by step: `sections`, `[1]`, `.lines`. */
export function pathText(steps: readonly (string | number)[]): string {
  return steps
    .map((step, i) => (typeof step === 'number' ? `[${String(step)}]` : i === 0 ? step : `.${step}`))
    .join('');
}

class Checker {
  readonly #text: string;
  readonly #depthLimit: number;
  readonly #open: Open[] = [];
  #at = 0;

  constructor(text: string, depthLimit: number) {
    this.#text = text;
    this.#depthLimit = depthLimit;
  }

  check(): Result<undefined, JsonFault> {
    for (;;) {
      const value = this.#readValueStart();
      if (value !== undefined) return fail(value);
      // A value has ended: close what ends with it, then go on to the next value or to the end of the text.
      const after = this.#readAfterValue();
      if (after === 'end') return ok(undefined);
      if (after !== 'value') return fail(after);
    }
  }

  /** Reads a scalar, an empty pair of brackets, or opening brackets down to the first scalar. */
  #readValueStart(): JsonFault | undefined {
    for (;;) {
      const character = this.#next();
      if (character !== '{' && character !== '[') return this.#readScalar(character);
      if (this.#open.length >= this.#depthLimit) return this.#tooDeep();
      this.#at++;
      const isObject = character === '{';
      if (this.#next() === (isObject ? '}' : ']')) {
        this.#at++;
        return undefined;
      }
      this.#open.push(isObject ? { keys: new Set(), key: '' } : { keys: null, index: 0 });
      const key = this.#readKey();
      if (key !== undefined) return key;
    }
  }

  #readAfterValue(): 'value' | 'end' | JsonFault {
    for (;;) {
      const open = this.#open[this.#open.length - 1];
      const character = this.#next();
      if (open === undefined) return character === '' ? 'end' : this.#bad('the end of the text');
      if (character === ',') {
        this.#at++;
        if (open.keys === null) open.index++;
        return this.#readKey() ?? 'value';
      }
      const closing = open.keys === null ? ']' : '}';
      if (character !== closing) return this.#bad(`a comma or ${closing}`);
      this.#at++;
      this.#open.pop();
    }
  }

  /** In an object, reads the next key and its colon. */
  #readKey(): JsonFault | undefined {
    const open = this.#open[this.#open.length - 1];
    if (open === undefined || open.keys === null) return undefined;
    if (this.#next() !== '"') return this.#bad('a key in double quotes');
    const start = this.#at;
    const string = this.#readString();
    if (string !== undefined) return string;
    const raw = this.#text.slice(start, this.#at);
    const key = raw.includes('\\') ? (JSON.parse(raw) as string) : raw.slice(1, -1);
    open.key = key;
    if (REFUSED_KEYS.has(key)) return this.#fault('refused-key', `The key ${key} is not allowed; take it out.`, start);
    if (open.keys.has(key))
      return this.#fault('key-given-twice', `The key “${key}” is given twice; take one of the two out.`, start);
    open.keys.add(key);
    if (this.#next() !== ':') return this.#bad('a colon');
    this.#at++;
    return undefined;
  }

  #readScalar(character: string): JsonFault | undefined {
    if (character === '"') return this.#readString();
    const word = WORDS.find((one) => this.#text.startsWith(one, this.#at));
    if (word !== undefined) {
      this.#at += word.length;
      return undefined;
    }
    NUMBER.lastIndex = this.#at;
    const number = NUMBER.exec(this.#text)?.[0];
    if (number === undefined) return this.#bad('a value');
    if (!Number.isFinite(Number(number)))
      return this.#fault('number-too-large', 'This number is too large to be kept; write it as text.', this.#at);
    this.#at += number.length;
    return undefined;
  }

  #readString(): JsonFault | undefined {
    for (let i = this.#at + 1; i < this.#text.length; i++) {
      const code = this.#text.charCodeAt(i);
      if (code === 0x22) {
        this.#at = i + 1;
        return undefined;
      }
      if (code < 0x20) {
        this.#at = i;
        return this.#bad('a double quote before the end of the line, or \\n for a line break');
      }
      if (code !== 0x5c) continue;
      ESCAPE.lastIndex = i;
      const escape = ESCAPE.exec(this.#text)?.[0];
      if (escape === undefined) {
        this.#at = i;
        return this.#bad('an escape such as \\n or \\u00b5');
      }
      i += escape.length - 1;
    }
    this.#at = this.#text.length;
    return this.#bad('a double quote');
  }

  /** Skips blanks; the character there, or an empty text at the end. */
  #next(): string {
    BLANKS.lastIndex = this.#at;
    BLANKS.exec(this.#text);
    this.#at = BLANKS.lastIndex;
    return this.#text.charAt(this.#at);
  }

  #bad(expected: string): JsonFault {
    const found =
      this.#at < this.#text.length
        ? `“${String.fromCodePoint(this.#text.codePointAt(this.#at) ?? 0)}”`
        : 'the end of the text';
    return this.#fault('bad-json', `${expected} is expected, ${found} found.`, this.#at);
  }

  #tooDeep(): JsonFault {
    const limit = String(this.#depthLimit);
    const steps = this.#open.slice(0, 3).map((open) => (open.keys === null ? open.index : open.key));
    const sentence = `Brackets are nested more than ${limit} deep; a worksheet is not.`;
    return { code: 'nested-too-deeply', path: `${pathText(steps)}…`, sentence: this.#withPlace(sentence, this.#at) };
  }

  #fault(code: JsonFault['code'], sentence: string, at: number): JsonFault {
    const steps = this.#open.map((open) => (open.keys === null ? open.index : open.key)).filter((step) => step !== '');
    return { code, path: pathText(steps), sentence: this.#withPlace(sentence, at) };
  }

  #withPlace(sentence: string, at: number): string {
    const before = this.#text.slice(0, at);
    const line = before.split('\n').length;
    const column = at - before.lastIndexOf('\n');
    return `Line ${String(line)}, column ${String(column)}: ${sentence}`;
  }
}

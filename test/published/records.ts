/**
 * The checks against the outside world: records of published, recomputed or remembered values, each with its source and how
 * it came here (`read`: seen in the document or a copy of it; `computed`: from the published formula, apart from this program;
 * `memory`: recalled). Inputs, figures, sources and tolerances stand as they were handed down.
 */
import { readdirSync, readFileSync } from 'node:fs';
import type { Evaluation } from '../../src/engine';
import type { Tolerance } from '../../src/worksheet';

export interface BudgetLine {
  readonly name: string;
  readonly value: number | null;
  readonly unit: string;
  readonly sign: number;
  readonly stage?: string;
  readonly printed_mean?: number;
}

type Inputs = Readonly<Record<string, unknown>>;

export interface PublishedRecord {
  readonly id: string;
  readonly topic: string;
  readonly inputs: Inputs;
  readonly expected: Readonly<Record<string, unknown>>;
  readonly tolerance: number | string | Readonly<Record<string, number>>;
  readonly source: string;
  readonly how: 'read' | 'computed' | 'memory';
  readonly lines?: readonly BudgetLine[];
}

const folder = new URL('./data/', import.meta.url);

/** All records of the folder `data`, file by file. */
export const RECORDS: readonly PublishedRecord[] = readdirSync(folder)
  .filter((name) => name.endsWith('.json'))
  .sort()
  .flatMap((name) => JSON.parse(readFileSync(new URL(name, folder), 'utf8')) as PublishedRecord[]);

/** How a record came here, in words for the test's name. */
export const HOW = { read: 'read', computed: 'computed', memory: 'from memory' } as const;

/** One figure to check: the key of the record (with an index for lists) and what stands there. */
export interface Figure {
  readonly key: string;
  readonly value: number;
}

/**
 * The figures of a record; a list under `key` gives `key_0`, `key_1` …, a quantity such as `1 mW` its number. What is no figure
 * is left to the recipe's `without`.
 */
export function figuresOf(record: PublishedRecord): readonly Figure[] {
  return Object.entries(record.expected).flatMap(([key, value]): Figure[] => {
    if (typeof value === 'number') return [{ key, value }];
    if (typeof value === 'string' && /^\d+ /.test(value)) return [{ key, value: Number.parseFloat(value) }];
    if (!Array.isArray(value)) return [];
    return value.flatMap((one: unknown, index): Figure[] =>
      typeof one === 'number' ? [{ key: `${key}_${index}`, value: one }] : [],
    );
  });
}

/**
 * How far a figure may be off. Tolerances are written as numbers in the figure's unit, as a number for each key, or in words:
 * `0.01 dB`, `1e-4 dB`, `0.01 %`, `exact`. A tolerance as large as a linear figure itself would let anything pass: linear
 * figures are held to one in a thousand at least, or to the relative error that the decibels of the tolerance stand for.
 */
export function allowedError({ tolerance }: PublishedRecord, { key, value }: Figure): number {
  const base = key.replace(/_\d+$/, '');
  const isDecibel = /dB/.test(base);
  const size = Math.abs(value);
  const exact = 1e-12 * Math.max(size, 1e-30);
  if (typeof tolerance === 'string') {
    if (tolerance === 'exact') return exact;
    const words = /^([\d.e+-]+) (dB|%|m)(?![\w])/.exec(tolerance);
    if (words === null) throw new Error(`the tolerance “${tolerance}” has no known form`);
    const figure = Number(words[1]);
    if (words[2] === '%') return (figure / 100) * size;
    return isDecibel ? figure : size * (10 ** (figure / 10) - 1);
  }
  const figure = typeof tolerance === 'number' ? tolerance : (tolerance[base] ?? tolerance['default'] ?? 0);
  if (figure === 0) return exact;
  return isDecibel || size === 0 || figure < 0.1 * size ? figure : 1e-3 * size;
}

/** How a record is put to the worksheet: lines in the notation of test/engine/notation.ts, the checked ones named by their key. */
export interface Recipe {
  /** Which records. */
  readonly ids: RegExp;
  readonly lines: (inputs: Inputs, record: PublishedRecord) => string;
  /** Tolerances of lines, by symbol. */
  readonly tolerances?: (inputs: Inputs) => Readonly<Record<string, Tolerance>>;
  /** Figures that are no line's own, by key: statistics of tolerances. */
  readonly figures?: (evaluation: Evaluation) => Readonly<Record<string, number>>;
  /** Keys of `expected` that the worksheet does not give, with the reason. */
  readonly without?: Readonly<Record<string, string>>;
}

/** An input that is a number. */
export function number(inputs: Inputs, key: string): number {
  const value = inputs[key];
  if (typeof value !== 'number') throw new Error(`the input ${key} is no number`);
  return value;
}

/** An input that is a list of numbers. */
export function numbers(inputs: Inputs, key: string): readonly number[] {
  const value = inputs[key];
  if (!Array.isArray(value) || value.some((one) => typeof one !== 'number'))
    throw new Error(`the input ${key} is no list of numbers`);
  return value as number[];
}

/** A figure with a unit as part of an expression: negative ones in brackets. */
export const quantity = (figure: number, unit: string): string =>
  figure < 0 ? `(${figure} ${unit})` : `${figure} ${unit}`;

/**
 * Hostile entries: whatever is typed, evaluating, explaining and describing never throw, never show what is not a figure,
 * and never put machine words into sentences. Random expressions over every function, unit form and kind, from a fixed seed.
 */
import { describe, expect, test } from 'vitest';
import { Evaluation } from '../../src/engine';
import { FUNCTIONS } from '../../src/formula';
import { QUANTITY_KINDS } from '../../src/quantity';
import { workingOf } from '../../src/review';
import type { Line, Worksheet } from '../../src/worksheet';

/** A linear congruential generator (the constants of ISO C's example): the same entries on every machine. */
function generator(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 1103515245 + 12345) % 2147483648) / 2147483648;
}

const ATOMS = [
  'P', 'N', 'B', 'L_x', 'T', 'U', 'G', 'NF', 'SNR', 'n', 'r', 'len', 'EVM', '3', '-2', '0', '1e300', '5 dB', '-174 dBm/Hz', '2 W',
  '3 mV', '20 MHz', '10 °C', '0.5 dB/m', '2 m', 'k_B', 'c_0', 'T_0', 'pi', '"x"',
]; // prettier-ignore
const OPERATORS = ['+', '-', '*', '/', '^', '<', '>=', '='];
const UNITS = ['', 'dBm', 'dB', 'W', 'dBHz', 'Hz', 'K', 'V', 'dBµV', '%', '1', 'dB/km', 'deg', 'dBFS', 'bogus'];
const BASE: readonly (readonly [string, string])[] = [
  ['P', '10 dBm'],
  ['N', '-100 dBm'],
  ['B', '1 MHz'],
  ['L_x', '3 dB'],
  ['T', '290 K'],
  ['U', '2 V'],
  ['G', '10 dBi'],
  ['NF', '3 dB'],
  ['SNR', '10 dB'],
  ['n', '3'],
  ['r', '0.1 dB/m'],
  ['len', '30 m'],
  ['EVM', '-30 dB'],
];

class Writer {
  private readonly random: () => number;

  constructor(seed: number) {
    this.random = generator(seed);
  }

  pick<T>(choices: readonly T[]): T {
    return choices[Math.floor(this.random() * choices.length)] as T;
  }

  expression(depth: number): string {
    const inner = (): string => this.expression(depth - 1);
    const draw = this.random();
    if (depth <= 0 || draw < 0.25) return this.pick(ATOMS);
    if (draw < 0.5) {
      const count = Math.floor(this.random() * 4);
      return `${this.pick(FUNCTIONS).name}(${Array.from({ length: count }, inner).join(', ')})`;
    }
    if (draw < 0.58) return `-(${inner()})`;
    if (draw < 0.66) return `10^((${inner()})/10)`;
    if (draw < 0.74) return `10*log10(${inner()})`;
    return `(${inner()}) ${this.pick(OPERATORS)} ${inner()}`;
  }

  line(index: number): Line {
    const unit = this.pick(UNITS);
    const quantity = this.random() < 0.5 ? this.pick(QUANTITY_KINDS) : undefined;
    return {
      id: `x${String(index)}`,
      symbol: `x${String(index)}`,
      label: '',
      entry: this.expression(4) + (index > 0 ? ` + x${String(index - 1)}` : ''),
      byCase: { other: this.expression(2) },
      requirement: { atLeast: this.pick(['3 dB', '1', 'x']) },
      ...(unit === '' ? {} : { unit }),
      ...(quantity === undefined ? {} : { quantity }),
    };
  }

  worksheet(): Worksheet {
    const lines = [
      ...BASE.map(([symbol, entry], index) => ({ id: `b${String(index)}`, symbol, label: '', entry })),
      ...[0, 1, 2].map((index) => this.line(index)),
    ];
    return {
      id: 'w',
      title: 'Hostile',
      cases: [
        { id: 'one', name: 'One' },
        { id: 'other', name: 'Other' },
      ],
      sections: [{ id: 's', kind: 'lines', title: '', lines }],
    };
  }
}

const MACHINE_WORDS = /undefined|NaN|\[object|Infinity|null/;

describe('hostile entries', () => {
  test.each([1, 2, 3, 4])('neither throw nor show what is no figure (seed %i, 400 worksheets)', (seed) => {
    const writer = new Writer(seed);
    const states = new Set<string>();
    for (let round = 0; round < 400; round++) {
      const worksheet = writer.worksheet();
      const evaluation = new Evaluation(worksheet);
      const typed = JSON.stringify(worksheet.sections);
      for (const { message, repairs } of evaluation.sheetFindings()) {
        expect(MACHINE_WORDS.test(message) ? `${message} of ${typed}` : '').toBe('');
        for (const repair of repairs) expect(repair.title).not.toBe('');
      }
      for (const id of ['x0', 'x1', 'x2']) {
        for (const { id: caseId } of worksheet.cases) {
          const { figure } = evaluation.reading(id, caseId);
          states.add(figure.state);
          if (figure.state === 'value') expect(figure.value === -Infinity || Number.isFinite(figure.value)).toBe(true);
          const working = workingOf(evaluation, id, caseId);
          expect(MACHINE_WORDS.test(JSON.stringify(working?.steps.map(({ pieces }) => pieces))) ? typed : '').toBe('');
        }
      }
      expect(evaluation.preview('x0', 'one', writer.expression(3)).reading.figure.state).toMatch(
        /value|withheld|waiting/,
      );
    }
    expect([...states].sort()).toEqual(['value', 'waiting', 'withheld']);
  });
});

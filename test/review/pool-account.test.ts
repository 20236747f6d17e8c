import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../src/engine';
import { poolAccount, type Permitted, type PoolAccount, type PoolLine } from '../../src/review';
import type { Line, PoolSection, Requirement, Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';

/** A pool of lines written in the notation of the engine's tests. */
function poolOf(text: string, more: Partial<PoolSection> = {}): PoolSection {
  const lines = sheetOf(text).sections.flatMap((section) => ('lines' in section ? (section.lines as Line[]) : []));
  return { id: 'pool', kind: 'pool', symbol: 'X_tot', title: 'Total', lines, ...more };
}

const CASES = [{ id: 'calm', name: 'Calm' }];

const evaluationOf = (pool: PoolSection, cases: Worksheet['cases'] = CASES): Evaluation =>
  new Evaluation({ id: 'w', title: 'W', cases, sections: [pool] });

function accountOf(pool: PoolSection, caseId = 'calm', cases = CASES): PoolAccount {
  const account = poolAccount(evaluationOf(pool, cases), pool.id, caseId);
  if (account === undefined) throw new Error('it is a pool');
  return account;
}

function totalOf(pool: PoolSection): number {
  const { figure } = accountOf(pool).total;
  if (figure.state !== 'value') throw new Error(`the total is ${figure.state}`);
  return figure.value;
}

const withoutFigure = ({ without }: PoolLine): number =>
  without?.state === 'value' ? without.value : without === undefined ? NaN : Infinity;

function valueOf(permitted: Permitted | undefined): Permitted & { readonly state: 'value' } {
  if (permitted?.state !== 'value') throw new Error(`permitted: ${permitted?.state ?? 'not told'}`);
  return permitted;
}

const near = (...values: readonly number[]): number[] => values.map((value) => expect.closeTo(value, 10) as number);

const switchedOff = (pool: PoolSection, index: number): PoolSection => ({
  ...pool,
  lines: pool.lines.map((line, i) => (i === index ? { ...line, off: true } : line)),
});

const withEntry = (pool: PoolSection, index: number, entry: string): PoolSection => ({
  ...pool,
  lines: pool.lines.map((line, i) => (i === index ? { ...line, entry } : line)),
});

/** The families, with figures that each may hold and a bound near their total. */
const FAMILIES: readonly {
  readonly name: string;
  readonly unit: string;
  readonly kind: string;
  readonly figures: readonly [least: number, most: number];
  readonly requirement: (figure: string) => Requirement;
  readonly step: number;
}[] = [
  ...['dBm', 'dBm/Hz', 'dBW/m²', 'dBµV', 'dBK'].map((unit) => ({
    ...{ name: `levels in ${unit}`, unit, kind: '', figures: [-160, 40] as const, step: 3 },
    requirement: (atMost: string) => ({ atMost }),
  })),
  {
    ...{ name: 'temperatures', unit: 'K', kind: '', figures: [0, 3000] as const, step: 40 },
    requirement: (atMost) => ({ atMost }),
  },
  {
    ...{ name: 'powers in watts', unit: 'W', kind: '', figures: [0, 500] as const, step: 20 },
    requirement: (atMost) => ({ atMost }),
  },
  {
    ...{ name: 'signal ratios', unit: 'dB', kind: 'signal ratio', figures: [-10, 60] as const, step: -3 },
    requirement: (atLeast) => ({ atLeast }),
  },
  {
    ...{ name: 'signal to noise densities', unit: 'dBHz', kind: 'signal ratio', figures: [20, 90] as const, step: -3 },
    requirement: (atLeast) => ({ atLeast }),
  },
  {
    ...{ name: 'impairment ratios', unit: 'dB', kind: 'impairment ratio', figures: [-60, 10] as const, step: 3 },
    requirement: (atMost) => ({ atMost }),
  },
];

describe.each(FAMILIES)('$name', ({ unit, kind, figures, requirement, step }) => {
  const written = fc.array(
    fc.integer({ min: figures[0] * 100, max: figures[1] * 100 }).map((hundredths) => hundredths / 100),
    { minLength: 1, maxLength: 7 },
  );
  const poolWith = (of: readonly number[], more: Partial<PoolSection> = {}): PoolSection =>
    poolOf(of.map((figure, i) => `a${String(i)} | ${unit} | ${kind} = ${String(figure)} ${unit}`).join('\n'), more);

  it('has shares that add to 1', () => {
    fc.assert(
      fc.property(written, (of) => {
        fc.pre(of.some((figure) => figure !== 0) || unit.startsWith('dB'));
        const { lines } = accountOf(poolWith(of));
        expect(lines.map(({ share }) => share !== undefined && share >= 0)).toEqual(of.map(() => true));
        expect(lines.reduce((sum, { share = NaN }) => sum + share, 0)).toBeCloseTo(1, 12);
      }),
      { numRuns: 20 },
    );
  });

  it('tells the total without a line as it is when the line is switched off', () => {
    fc.assert(
      fc.property(written, fc.nat(), (of, at) => {
        fc.pre(of.length > 1);
        const pool = poolWith(of);
        const index = at % of.length;
        const line = accountOf(pool).lines[index];
        if (line === undefined) throw new Error('the line is there');
        expect(withoutFigure(line)).toBeCloseTo(totalOf(switchedOff(pool, index)), 9);
      }),
      { numRuns: 20 },
    );
  });

  it('meets the bound exactly with a line at its permitted value', () => {
    fc.assert(
      fc.property(written, fc.nat(), (of, at) => {
        fc.pre(of.some((figure) => figure !== 0) || unit.startsWith('dB'));
        const bound = Number((totalOf(poolWith(of)) + step).toFixed(3));
        const pool = poolWith(of, { requirement: requirement(`${String(bound)} ${unit}`) });
        const index = at % of.length;
        const permitted = valueOf(accountOf(pool).lines[index]?.permitted);
        expect(permitted.room).toBeGreaterThan(0);
        expect(Math.abs(permitted.value - (of[index] ?? NaN))).toBeCloseTo(permitted.room, 9);
        expect(totalOf(withEntry(pool, index, `${String(permitted.value)} ${unit}`))).toBeCloseTo(bound, 9);
      }),
      { numRuns: 20 },
    );
  });
});

it('gives the shares, the totals without and the permitted values of levels and powers mixed', () => {
  const account = accountOf(
    poolOf('N = -90 dBm # Noise\nI = 3 pW # Interference', { requirement: { atMost: '-80 dBm' } }),
  );
  expect(account.adding).toBe('powers');
  expect(account.total.requirement).toMatchObject({ met: true, bound: 'at most', limit: -80 });
  const [noise, interference] = account.lines;
  expect([noise?.label, interference?.label]).toEqual(['Noise', 'Interference']);
  expect(noise?.share).toBeCloseTo(0.25, 12);
  expect(interference?.share).toBeCloseTo(0.75, 12);
  // 3 pW is −85.23 dBm; −80 dBm is 10 pW.
  expect(withoutFigure(noise as PoolLine)).toBeCloseTo(-85.2288, 4);
  expect(withoutFigure(interference as PoolLine)).toBeCloseTo(-90, 9);
  expect(valueOf(noise?.permitted)).toMatchObject({ value: expect.closeTo(-81.549, 3) as number, bound: 'at most' });
  expect(valueOf(noise?.permitted).room).toBeCloseTo(8.451, 3);
  const linear = valueOf(interference?.permitted);
  expect([linear.unit.word, linear.value, linear.room]).toEqual([
    'pW',
    expect.closeTo(9, 9) as number,
    expect.closeTo(6, 9) as number,
  ]);
});

it('takes temperatures as they are, in °C and in a total in dBK too', () => {
  const account = accountOf(
    poolOf('T_a | K = 100 K\nT_b | °C = 26.85 °C', { unit: 'dBK', requirement: { atMost: '27 dBK' } }),
  );
  expect(account.adding).toBe('linear');
  expect(account.lines.map(({ share }) => share)).toEqual(near(0.25, 0.75));
  expect(withoutFigure(account.lines[1] as PoolLine)).toBeCloseTo(20, 9);
  const permitted = valueOf(account.lines[1]?.permitted);
  expect(permitted.value).toBeCloseTo(10 ** 2.7 - 100 - 273.15, 9);
  expect(permitted.room).toBeCloseTo(10 ** 2.7 - 400, 9);
});

it('combines signal ratios by their reciprocals', () => {
  const account = accountOf(
    poolOf('R_a | dB | signal ratio = 20 dB\nR_b | dB | signal ratio = 20 dB', {
      requirement: { atLeast: '18 dB' },
    }),
  );
  expect(account.adding).toBe('reciprocal');
  expect(account.lines.map(({ share }) => share)).toEqual(near(0.5, 0.5));
  const permitted = valueOf(account.lines[0]?.permitted);
  expect(permitted.bound).toBe('at least');
  expect(permitted.value).toBeCloseTo(-10 * Math.log10(10 ** -1.8 - 10 ** -2), 9);
  // 20 dB and 20 dB give 16.99 dB: the line is short of what it would have to be.
  expect(permitted.room).toBeCloseTo(20 - permitted.value, 12);
  expect(permitted.room).toBeLessThan(0);
});

describe('where no value would do', () => {
  it('says that the others alone exceed the bound', () => {
    const { lines } = accountOf(poolOf('a = -90 dBm\nb = -80 dBm', { requirement: { atMost: '-85 dBm' } }));
    expect(lines.map(({ permitted }) => permitted?.state)).toEqual(['none', 'value']);
  });

  it('says so of signal ratios that are too low by themselves, or would need an infinite one', () => {
    const ratios = 'a | dB | signal ratio = 20 dB\nb | dB | signal ratio = 15 dB';
    const states = (atLeast: string) =>
      accountOf(poolOf(ratios, { requirement: { atLeast } })).lines.map(({ permitted }) => permitted?.state);
    expect(states('17 dB')).toEqual(['none', 'value']);
    expect(states('15 dB')).toEqual(['none', 'value']);
  });

  it('says that any value will do where the others alone meet a bound from below', () => {
    const { lines } = accountOf(poolOf('a = -90 dBm\nb = -80 dBm', { requirement: { atLeast: '-85 dBm' } }));
    expect(lines.map(({ permitted }) => permitted?.state)).toEqual(['any', 'value']);
    expect(valueOf(lines[1]?.permitted).room).toBeCloseTo(-80 - 10 * Math.log10(10 ** -8.5 - 10 ** -9), 9);
  });

  it('permits no power at all where the others just reach the bound', () => {
    const { lines } = accountOf(poolOf('a = -90 dBm\nb = -80 dBm', { requirement: { atMost: '-80 dBm' } }));
    expect(valueOf(lines[0]?.permitted).value).toBe(-Infinity);
  });
});

describe('what is not told', () => {
  it('gives lines that are switched off no share, and the others the whole', () => {
    const { lines } = accountOf(
      switchedOff(poolOf('a = -90 dBm\nb = -80 dBm', { requirement: { atMost: '-70 dBm' } }), 1),
    );
    expect(lines.map(({ isOn, share }) => [isOn, share])).toEqual([
      [true, 1],
      [false, undefined],
    ]);
    expect(lines[0]?.without).toEqual({ state: 'empty' });
    expect(lines[1]?.figure).toMatchObject({ state: 'value', value: -80 });
    expect(lines[1]?.permitted).toBeUndefined();
  });

  it('gives no permitted value without a requirement', () => {
    const { lines } = accountOf(poolOf('a = -90 dBm\nb = -80 dBm'));
    expect(lines.every(({ permitted, share }) => permitted === undefined && share !== undefined)).toBe(true);
  });

  it.each([
    ['sorts are mixed', 'a = -90 dBm\nb = -170 dBm/Hz'],
    ['a line is withheld', 'a = -90 dBm\nb | dBm = 1/0'],
    ['all is off', ''],
  ])('gives figures alone while %s', (_, text) => {
    const account = accountOf(poolOf(text));
    expect(account.total.figure.state).not.toBe('value');
    expect(account.adding).toBeUndefined();
    expect(account.lines.every(({ share, without }) => share === undefined && without === undefined)).toBe(true);
  });

  it('shares no power out among none', () => {
    const { lines } = accountOf(poolOf('a | dBm = 0 W\nb | dBm = 0 W'));
    expect(lines.map(({ share }) => share)).toEqual([undefined, undefined]);
  });

  it('gives nothing for a section that is no pool', () => {
    const worksheet = sheetOf('a = 3 dB');
    expect(poolAccount(new Evaluation(worksheet), worksheet.sections[0]?.id ?? '', 'calm')).toBeUndefined();
  });
});

it('follows the case, and tells lines without a symbol and with one twice apart', () => {
  const pool = poolOf('a = -90 dBm @ storm: -80 dBm\nb = -90 dBm\nc = -90 dBm');
  const named = { ...pool, lines: pool.lines.map((line, i) => ({ ...line, symbol: i === 0 ? 'a' : '' })) };
  const cases = [...CASES, { id: 'storm', name: 'Storm' }];
  const shares = (caseId: string) => accountOf(named, caseId, cases).lines.map(({ share }) => share);
  expect(shares('calm')).toEqual(near(1 / 3, 1 / 3, 1 / 3));
  expect(shares('storm')).toEqual(near(10 / 12, 1 / 12, 1 / 12));
});

it('counts voltages among their levels by their squares, and plain numbers among ratios as decibels', () => {
  const voltages = accountOf(poolOf('u = 60 dBµV\nv = 3 mV', { requirement: { atMost: '80 dBµV' } }));
  expect(voltages.lines.map(({ share }) => share)).toEqual(near(0.1, 0.9));
  expect(valueOf(voltages.lines[1]?.permitted).value).toBeCloseTo(Math.sqrt(99), 9);
  const numbers = accountOf(poolOf('a = 4 dB\nb = 4', { requirement: { atMost: '10 dB' } }));
  expect(numbers.lines.map(({ share }) => share)).toEqual(near(0.5, 0.5));
  expect(valueOf(numbers.lines[1]?.permitted).value).toBeCloseTo(10 * Math.log10(10 - 10 ** 0.4), 9);
});

it('accounts for a long pool, each line beside all others', () => {
  const account = accountOf(poolOf(Array.from({ length: 300 }, (_, i) => `a${String(i)} = -90 dBm`).join('\n')));
  expect(account.lines).toHaveLength(300);
  for (const line of account.lines) {
    expect(line.share).toBeCloseTo(1 / 300, 12);
    expect(withoutFigure(line)).toBeCloseTo(-90 + 10 * Math.log10(299), 9);
  }
});

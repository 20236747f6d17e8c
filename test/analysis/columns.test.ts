/** The column compiler against the engine: every trial is what an evaluation of the document with those figures gives. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compileColumns, loosened } from '../../src/analysis';
import { Evaluation } from '../../src/engine';
import { isLinesSection, type Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';
import { randomSheet, type RandomSheet } from './random-sheets';
import { idOf } from './support';

/** The document with other entries. */
export function withEntries(worksheet: Worksheet, entries: Readonly<Record<string, string>>): Worksheet {
  return {
    ...worksheet,
    sections: worksheet.sections.map((section) =>
      isLinesSection(section)
        ? { ...section, lines: section.lines.map((line) => ({ ...line, entry: entries[line.symbol] ?? line.entry })) }
        : section,
    ),
  };
}

/** The figure of a line, NaN where there is none. */
export function figureOf(evaluation: Evaluation, symbol: string): number {
  const figure = evaluation.figure(idOf(evaluation, symbol), 'nominal');
  return figure.state === 'value' ? figure.value : NaN;
}

/** Figures of all computed lines for rows of inputs, by columns. */
function byColumns(
  sheet: Pick<RandomSheet, 'text' | 'inputs' | 'computed'>,
  rows: readonly (readonly number[])[],
  blockSize?: number,
): Float64Array[] {
  const evaluation = new Evaluation(sheetOf(sheet.text));
  const varied = sheet.inputs.map(({ symbol }) => ({ lineId: idOf(evaluation, symbol) }));
  const targets = sheet.computed.map((symbol) => idOf(evaluation, symbol));
  const free = loosened(
    evaluation,
    varied.map(({ lineId }) => lineId),
    targets,
    'nominal',
  ).evaluation;
  const program = compileColumns(free, targets, 'nominal', varied, blockSize);
  const results = targets.map(() => new Float64Array(rows.length));
  program.run(
    0,
    rows.length,
    (index, column, start, count) => {
      for (let i = 0; i < count; i++) column[i] = rows[start + i]?.[index] ?? NaN;
    },
    results,
  );
  return results;
}

const near = (a: number, b: number): boolean =>
  Object.is(a, b) || a === b || Math.abs(a - b) <= 1e-9 * Math.max(1, Math.abs(a), Math.abs(b));

describe('columns', () => {
  it('give what the engine gives, trial by trial', () => {
    fc.assert(
      fc.property(randomSheet, (sheet) => {
        const rows = Array.from({ length: 5 }, (_, row) =>
          sheet.inputs.map(({ figure }, at) => Number((figure + ((row * 7 + at * 3) % 11) - 5).toFixed(3))),
        );
        const columns = byColumns(sheet, rows, 3);
        const worksheet = sheetOf(sheet.text);
        rows.forEach((row, trial) => {
          const entries = Object.fromEntries(
            sheet.inputs.map(({ symbol, unit }, at) => [symbol, `${String(row[at])} ${unit}`.trim()]),
          );
          const evaluation = new Evaluation(withEntries(worksheet, entries));
          sheet.computed.forEach((symbol, at) => {
            const [found, expected] = [columns[at]?.[trial] ?? NaN, figureOf(evaluation, symbol)];
            if (!near(found, expected))
              expect.fail(`${sheet.text}\n${symbol} at ${row.join(', ')}: ${String(found)}, not ${String(expected)}`);
          });
        });
      }),
      { numRuns: 150 },
    );
  });

  it('are the same for every size of block', () => {
    fc.assert(
      fc.property(randomSheet, fc.integer({ min: 1, max: 40 }), (sheet, blockSize) => {
        const rows = Array.from({ length: 30 }, (_, row) =>
          sheet.inputs.map(({ figure }, at) => figure + Math.sin(row + at)),
        );
        expect(byColumns(sheet, rows, blockSize)).toEqual(byColumns(sheet, rows, 2048));
      }),
      { numRuns: 60 },
    );
  });

  it('are the same for a line alone, whose inputs give their columns back when they have been read', () => {
    fc.assert(
      fc.property(randomSheet, (sheet) => {
        const rows = Array.from({ length: 9 }, (_, row) =>
          sheet.inputs.map(({ figure }, at) => figure + Math.cos(3 * row + at)),
        );
        const together = byColumns(sheet, rows);
        sheet.computed.forEach((symbol, at) => {
          expect(byColumns({ ...sheet, computed: [symbol] }, rows, 4)[0]).toEqual(together[at]);
        });
      }),
      { numRuns: 100 },
    );
  });

  it.each([
    ['powersum(x, y)', [-Infinity, -100], -100],
    ['powersum(powerdiff(x, y), powerdiff(y, x))', [-100, -100], -Infinity],
    ['powersum(powerdiff(x, y), y, powerdiff(y, x))', [-100, -100], -100],
    ['ratiosum(x - powerdiff(x, y) , 7 dB)', [-100, -100], NaN],
    ['powersum(x, y, -90 dBm, -95 dBm)', [-5000, 4000], 4000],
    ['powersum(x, y, x, y)', [-5000, -5000], -5000 + 10 * Math.log10(4)],
    ['powersum(x, -100 dBm)', [-Infinity, 0], -100],
    ['powersum(x, y, -400 dBm)', [-5000, -6000], -400],
    ['fieldsum(x, y)', [-100, -100], -100 + 20 * Math.log10(2)],
    ['meanpower(x, y)', [0, -30], 10 * Math.log10((1 + 1e-3) / 2)],
    ['powerdiff(x, y)', [-100, -99], NaN],
    ['powerdiff(x, y)', [-100, -100], -Infinity],
    ['x - y + x', [-Infinity, -Infinity], NaN],
    ['if(x > y, x, y)', [-3, -4], -3],
    ['if(1 > 2, x, -7 dBm)', [1, 1], -7],
    ['10*log10(10^(x/10))*1 + (y - y)', [12, 3], 12],
    ['max(x, y)', [-3, -4], -3],
  ])('%s of %j', (entry, values, expected) => {
    const sheet: RandomSheet = {
      text: `x = 1 dBm\ny = 2 dBm\nz | dBm = ${entry}`,
      inputs: [
        { symbol: 'x', unit: 'dBm', figure: 1 },
        { symbol: 'y', unit: 'dBm', figure: 2 },
      ],
      computed: ['z'],
    };
    const found = byColumns(sheet, [values])[0]?.[0] ?? NaN;
    if (Number.isFinite(expected)) expect(found).toBeCloseTo(expected, 9);
    else expect(found).toBe(expected);
  });

  it('leave what rests on nothing varied as it is, and follow a number that says how often a level counts', () => {
    const evaluation = new Evaluation(sheetOf('n = 2\nL_0 = 3 dB\nL = n * L_0\nfixed = L_0 + 1 dB'));
    const [n, l, fixed] = ['n', 'L', 'fixed'].map((symbol) => idOf(evaluation, symbol)) as [string, string, string];
    const free = loosened(evaluation, [n], [l], 'nominal');
    expect(free.stuck).toEqual([]);
    const program = compileColumns(free.evaluation, [l, fixed], 'nominal', [{ lineId: n }]);
    const results = [new Float64Array(3), new Float64Array(3)];
    program.run(0, 3, (_, column) => column.set([1, 2, 2.5]), results);
    expect(program.reached).toEqual([true, false]);
    expect(results.map((column) => [...column])).toEqual([
      [3, 6, 7.5],
      [4, 4, 4],
    ]);
  });

  it('say which number cannot vary, since it decides what is computed', () => {
    const evaluation = new Evaluation(sheetOf('n = 1\nP = 3 dBm\nQ | dBm = n * P'));
    const [n, q] = ['n', 'Q'].map((symbol) => idOf(evaluation, symbol)) as [string, string];
    expect(evaluation.figure(q, 'nominal')).toMatchObject({ state: 'value', value: 3 });
    expect(loosened(evaluation, [n], [q], 'nominal')).toEqual({ evaluation, stuck: [n] });
  });

  it('add a deviation to what an entry gives, where it is added', () => {
    const evaluation = new Evaluation(sheetOf('x = 1 dB\ny = x + 2 dB\nz = y + 10 dB'));
    const [x, y, z] = ['x', 'y', 'z'].map((symbol) => idOf(evaluation, symbol)) as [string, string, string];
    const program = compileColumns(evaluation, [z], 'nominal', [{ lineId: x }, { lineId: y, isAdded: true }]);
    const results = [new Float64Array(2)];
    program.run(0, 2, (index, column) => column.set(index === 0 ? [5, 6] : [0.5, -0.5]), results);
    expect([...(results[0] ?? [])]).toEqual([17.5, 17.5]);
  });

  it('follow curves and the parts of chains', () => {
    const sheet = sheetOf('angle = 5 deg\nG = G_scan(angle)\nP = -100 dBm\nB = 1 MHz\nS = rx.snr');
    const evaluation = new Evaluation({
      ...sheet,
      sections: [
        ...sheet.sections,
        {
          id: 'scan',
          kind: 'curve',
          symbol: 'G_scan',
          title: '',
          x: { label: 'angle', unit: 'deg' },
          y: { label: 'gain', unit: 'dBi', quantity: 'gain' },
          points: [
            [0, 32],
            [10, 31],
            [40, 22],
          ],
        },
        {
          id: 'rx',
          kind: 'chain',
          symbol: 'rx',
          title: '',
          signal: 'P',
          noise: '290 K',
          bandwidth: 'B',
          stages: [
            { id: 's1', symbol: 'lna', label: '', gain: '15 dB', noiseFigure: '1 dB' },
            { id: 's2', symbol: 'mix', label: '', gain: '-7 dB', noiseFigure: '8 dB' },
          ],
        },
      ],
    });
    const [angle, gain, nf, snr] = ['angle', 'G', 'rx.lna.nf', 'S'].map((symbol) => idOf(evaluation, symbol)) as [
      string,
      string,
      string,
      string,
    ];
    const program = compileColumns(evaluation, [gain, snr], 'nominal', [{ lineId: angle }, { lineId: nf }]);
    const results = [new Float64Array(3), new Float64Array(3)];
    program.run(0, 3, (index, column) => column.set(index === 0 ? [5, 20, 50] : [1, 2, 3]), results);
    expect(results[0]?.[0]).toBeCloseTo(31.5, 10);
    expect(results[0]?.[1]).toBeCloseTo(28, 10);
    expect(results[0]?.[2]).toBeNaN();
    // S/N = P − kT₀B − NF, with the mixer's part of the noise behind 15 dB.
    const noiseFactor = (figure: number): number => 10 ** (figure / 10) + (10 ** 0.8 - 1) / 10 ** 1.5;
    [1, 2, 3].forEach((figure, trial) => {
      const expected = -100 - (10 * Math.log10(1.380649e-23 * 290 * 1e6) + 30) - 10 * Math.log10(noiseFactor(figure));
      expect(results[1]?.[trial]).toBeCloseTo(expected, 9);
    });
  });
});

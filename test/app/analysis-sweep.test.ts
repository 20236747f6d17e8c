// Sweeping a line over what it rests on, solving for it, and putting an answer in its place.
import { describe, expect, it } from 'vitest';

import { solveView } from '../../src/app/analysis-solve';
import { readSteps, sweepCsv, sweepRows, sweepView } from '../../src/app/analysis-sweep';
import {
  firstRange,
  putFigure,
  rangeTexts,
  readRange,
  variedInputs,
  whyStuck,
  type VariedInput,
} from '../../src/app/analysis-varied';
import { Evaluation, stageItemId } from '../../src/engine';
import { applyAll, isChainSection, locateLine } from '../../src/worksheet';
import type { LineSpec } from './support';
import { chainSheet } from './chain-sheet';
import { evaluationOf, LINK, worksheetOf } from './analysis-sheet';

const evaluation = evaluationOf();
const { cases } = evaluation.worksheet;
const inputOf = (symbol: string, of = evaluation, lineId = 'S'): VariedInput => {
  const found = variedInputs(of, lineId, 'calm').find((one) => one.symbol === symbol);
  if (found === undefined) throw new Error(`${symbol} is no input`);
  return found;
};
const km = { from: 1, to: 10, isLogarithmic: true };

describe('what can be varied', () => {
  it('is each entry that the line rests on, typed ones first', () => {
    expect(variedInputs(evaluation, 'S', 'calm').map(({ symbol, isTyped }) => `${symbol} ${String(isTyped)}`)).toEqual([
      ...['P true', 'L true', 'd true', 'f true', 'N true', 'C false'],
    ]);
  });

  it('begins in a range around its figure', () => {
    expect(firstRange(inputOf('P'))).toEqual({ from: 10, to: 30, isLogarithmic: false });
    expect(firstRange(inputOf('d'))).toEqual({ from: 0.2, to: 20, isLogarithmic: true });
    expect(rangeTexts(km, inputOf('d').unit)).toEqual({ from: '1 km', to: '10 km' });
  });

  it.each([
    ['d', '500 m', '10', true, { from: 0.5, to: 10, isLogarithmic: true }],
    ['P', '1 W', '0', false, { from: 30, to: 0, isLogarithmic: false }],
  ] as const)('reads a range for %s from %s to %s', (symbol, from, to, isLogarithmic, range) => {
    expect(readRange({ from, to }, isLogarithmic, inputOf(symbol).unit)).toEqual({ ok: true, value: range });
  });

  it.each([
    ['d', 'far', '10', false, /“far” is no quantity in km/],
    ['d', '1', '1 km', false, /no width/],
    ['d', '0', '1 km', true, /above zero/],
    ['P', '0', '10', true, /logarithms already/],
  ] as const)('refuses for %s from %s to %s', (symbol, from, to, isLogarithmic, fault) => {
    const read = readRange({ from, to }, isLogarithmic, inputOf(symbol).unit);
    expect(read.ok ? '' : read.fault).toMatch(fault);
  });

  it('is not a number that says how often a level counts', () => {
    const lines: readonly LineSpec[] = [
      ['n', 'Count', '3'],
      ['G', 'Gain', '2 dB'],
      ['H', 'Gain of the whole', 'n*G'],
      ['P', 'Level', '3 dBm', { side: 'wanted' }],
      ['Q', 'Sum', 'n*P - 2*P'],
    ];
    const of = evaluationOf(lines);
    expect(whyStuck(of, inputOf('n', of, 'Q'), 'Q', 'calm')).toMatch(/^n cannot be varied: it says how often/);
    expect(whyStuck(of, inputOf('G', of, 'H'), 'H', 'calm')).toBeUndefined();
  });
});

describe('a sweep', () => {
  const view = sweepView(evaluation, 'S', inputOf('d'), cases, km, 2);

  it('has what the engine gives at each place, a curve a case', () => {
    expect(Array.from(view.places, (x) => x.toFixed(3))).toEqual(['1.000', '3.162', '10.000']);
    // 102 dB less free-space loss of 91.53 dB at 1 km and 10 dB more at each step.
    for (const { figures } of view.curves)
      expect(Array.from(figures, (one) => one.toFixed(2))).toEqual(['10.47', '0.47', '-9.53']);
  });

  it('tells where the bound is reached', () => {
    // 7.467 dB over 20 dB a decade: 10^0.373368 km.
    expect(view.words).toEqual(['3.00 dB is reached at 2.362 km (Calm).', '3.00 dB is reached at 2.362 km (Storm).']);
    expect(sweepView(evaluation, 'S', inputOf('d'), cases.slice(0, 1), { ...km, to: 2 }, 4).words).toEqual([
      '3.00 dB is not crossed between 1 km and 2 km.',
    ]);
  });

  it('has gaps, told in words where there is nothing else', () => {
    const beyond = sweepView(
      evaluation,
      'S',
      inputOf('d'),
      cases.slice(0, 1),
      { from: -2, to: -1, isLogarithmic: false },
      2,
    );
    expect(Array.from(beyond.curves[0]?.figures ?? [])).toEqual([NaN, NaN, NaN]);
    expect(beyond.words).toEqual(['S has no figure anywhere in this range.']);
  });

  it('is a table for people and one to save', () => {
    expect(sweepRows(view)[0]).toEqual(['1 km', '10.47 dB', '10.47 dB']);
    const rows = sweepCsv(view).split('\r\n');
    expect(rows[0]).toBe('d (km),"S, Calm (dB)","S, Storm (dB)"');
    expect(rows).toHaveLength(5);
    expect(Number(rows[1]?.split(',')[1])).toBe(view.curves[0]?.figures[0]);
  });

  it('keeps a name that begins like a formula a text', () => {
    const named = { ...view, target: { lineId: 'S', symbol: '', label: '=1+1, "x"' } };
    expect(sweepCsv({ ...named, curves: view.curves.slice(0, 1) })).toMatch(/^d \(km\),"'=1\+1, ""x"" \(dB\)"\r\n/);
  });

  it('shows no more rows than can be read', () => {
    const fine = sweepView(evaluation, 'S', inputOf('d'), cases, km, 1000);
    expect(sweepRows(fine)).toHaveLength(51);
    expect(sweepRows(fine).at(-1)?.[0]).toBe('10 km');
  });

  it.each([
    ['100', 100],
    ['1', 1],
    ['1000', 1000],
    ['0', undefined],
    ['1001', undefined],
    ['2.5', undefined],
  ] as const)('takes steps: %s', (text, steps) => {
    expect(readSteps(text)).toBe(steps);
  });
});

describe('solving', () => {
  const requirement = evaluation.reading('S', 'calm').requirement;
  if (requirement === undefined) throw new Error('S is required');

  it('rounds to the side on which the requirement is met', () => {
    const { solutions, words } = solveView(
      evaluation,
      'S',
      inputOf('d'),
      'calm',
      { kind: 'requirement', of: requirement },
      km,
    );
    expect(words).toBe('One value of d between 1 km and 10 km gives S = 3.00 dB:');
    expect(solutions).toMatchObject([{ text: '2.362 km', gives: '3.00 dB' }]);
    const entry = solutions[0]?.entry ?? '';
    expect(entry).toMatch(/^2\.36\d{3,4} km$/);
    const edit = putFigure(evaluation.worksheet, evaluation, 'd', entry, 'calm');
    const after = new Evaluation(applyAll(evaluation.worksheet, edit?.changes ?? []).worksheet);
    expect(after.reading('S', 'calm').requirement).toMatchObject({ met: true });
    expect(after.reading('S', 'calm').requirement?.margin).toBeLessThan(1e-4);
  });

  it('gives a figure wanted, and says when there is none', () => {
    const found = solveView(
      evaluation,
      'S',
      inputOf('P'),
      'calm',
      { kind: 'figure', figure: 0 },
      { from: 0, to: 40, isLogarithmic: false },
    );
    expect(found.solutions).toMatchObject([{ text: '15.55 dBm', gives: '0.00 dB' }]);
    expect(
      solveView(
        evaluation,
        'S',
        inputOf('P'),
        'calm',
        { kind: 'figure', figure: 90 },
        { from: 0, to: 40, isLogarithmic: false },
      ),
    ).toEqual({
      solutions: [],
      words: 'No value of P between 0.00 dBm and 40.00 dBm gives S = 90.00 dB.',
    });
  });

  it('lists every crossing', () => {
    const of = evaluationOf([
      ['x', 'Place', '1'],
      ['y', 'Parabola', 'x*x - 4'],
    ]);
    const found = solveView(
      of,
      'y',
      inputOf('x', of, 'y'),
      'calm',
      { kind: 'figure', figure: 0 },
      { from: -5, to: 5, isLogarithmic: false },
    );
    expect(found.solutions.map(({ entry }) => entry)).toEqual(['-2', '2']);
    expect(found.words).toMatch(/^2 values of x/);
  });
});

describe('a value put in its place', () => {
  it('goes to the case that has an entry of its own, else to the line', () => {
    const put = (caseId: string) => {
      const edit = putFigure(worksheetOf(), evaluation, 'd', '4.2 km', caseId);
      return locateLine(applyAll(worksheetOf(), edit?.changes ?? []).worksheet, 'd').line;
    };
    expect(put('storm')).toMatchObject({ entry: '2 km', byCase: { storm: '4.2 km' } });
    expect(put('calm')).toMatchObject({ entry: '4.2 km', byCase: { storm: '3 km' } });
    expect(LINK[2]?.[2]).toBe('2 km');
  });

  it('goes to the stage that says it', () => {
    const worksheet = chainSheet();
    const chain = worksheet.sections.find(isChainSection);
    const stage = chain?.stages[0];
    if (chain === undefined || stage === undefined) throw new Error('there is a stage');
    const of = new Evaluation(worksheet);
    const edit = putFigure(worksheet, of, stageItemId(chain.id, stage.id, 'gain'), '7 dB', 'calm');
    const after = applyAll(worksheet, edit?.changes ?? []).worksheet.sections.find(isChainSection);
    expect(after?.stages[0]?.gain).toBe('7 dB');
  });
});

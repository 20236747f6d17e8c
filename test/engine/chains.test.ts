/**
 * Eight invented chains against figures that a script derives apart from the program (test/golden/chains/derive.py): every output
 * of the chain and of its stages, each to one part in 10⁹, and none that the script does not know.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { readWorksheetFile } from '../../src/exchange';

const folder = new URL('../golden/chains/', import.meta.url);
const textOf = (name: string): string => readFileSync(new URL(name, folder), 'utf8');

const expected = JSON.parse(textOf('expected.json')) as Readonly<Record<string, Readonly<Record<string, number>>>>;

function evaluated(name: string): Evaluation {
  const read = readWorksheetFile(textOf(`${name}.budget.json`));
  if (!read.ok) throw new Error(read.fault.sentence);
  expect(read.value.messages).toEqual([]);
  return new Evaluation(read.value.worksheet);
}

/** All figures of the chain under their symbols without `rx.`; a state where there is no figure. */
function figuresOf(evaluation: Evaluation): Map<string, number | string> {
  return new Map(
    evaluation.lines().map(({ id, symbol }) => {
      const figure = evaluation.figure(id, 'one');
      return [symbol.replace(/^rx\./, ''), figure.state === 'value' ? figure.value : figure.state];
    }),
  );
}

it('has the figures of every worksheet beside them', () => {
  const worksheets = readdirSync(folder).flatMap((name) => /^(.+)\.budget\.json$/.exec(name)?.[1] ?? []);
  expect(worksheets.sort()).toEqual(Object.keys(expected).sort());
  expect(worksheets.length).toBe(8);
});

describe.each(Object.entries(expected))('%s', (name, derived) => {
  const evaluation = evaluated(name);
  const figures = figuresOf(evaluation);

  it('gives the outputs that the derivation gives, and no other', () => {
    expect([...figures.keys()].sort()).toEqual(Object.keys(derived).sort());
  });

  it('gives the derived figure of every output', () => {
    const apart = Object.entries(derived).flatMap(([symbol, figure]) => {
      const found = figures.get(symbol);
      // Decibels near nothing are differences of large ones: their error is that of the ratio they stand for.
      const allowed = 1e-9 * Math.max(1, Math.abs(figure));
      return typeof found === 'number' && Math.abs(found - figure) <= allowed ? [] : [{ symbol, figure, found }];
    });
    expect(apart).toEqual([]);
  });

  it('draws no warning and no error', () => {
    const alarms = evaluation.sheetFindings().filter(({ severity }) => severity !== 'note');
    expect(alarms.map(({ code, message }) => `${code}: ${message}`)).toEqual([]);
  });
});

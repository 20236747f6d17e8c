/**
 * Worksheets for tests, written as text, one line of the worksheet a line:
 *
 *     symbol | unit | kind | side = entry   # label   @ case: entry   >= bound   => figure unit   ! codes
 *
 * Everything but the entry may be left out. `=>` and `!` say what is expected: the figure to the digits written, and the codes
 * of all findings of the line (none when `!` is absent). A line without `=>` is expected to have some value, unless one of its
 * codes is an error. Text after `//` is a comment.
 */
import { expect } from 'vitest';
import { Evaluation, type Figure } from '../../src/engine';
import { CATALOGUE, type FindingCode } from '../../src/findings';
import { findUnit, QUANTITY_KINDS, SIDES } from '../../src/quantity';
import type { Case, Line, Requirement, Worksheet } from '../../src/worksheet';

export interface WrittenLine {
  readonly line: Line;
  readonly figure: { readonly digits: string; readonly unit: string } | undefined;
  readonly codes: readonly string[];
}

const oneOf = <T extends string>(words: readonly T[], word: string): T => {
  const found = words.find((known) => known === word);
  if (found === undefined) throw new Error(`“${word}” is none of ${words.join(', ')}`);
  return found;
};

/** Takes what follows a mark off the end of a text. */
function cut(text: string, mark: string): [before: string, after: string | undefined] {
  const at = text.indexOf(mark);
  return at < 0 ? [text, undefined] : [text.slice(0, at).trim(), text.slice(at + mark.length).trim()];
}

function requirementOf(text: string): { requirement?: Requirement } {
  const bound = /^(>=|<=) *(.+)$/.exec(text);
  if (bound === null) return {};
  return { requirement: bound[1] === '>=' ? { atLeast: bound[2] ?? '' } : { atMost: bound[2] ?? '' } };
}

function readLine(text: string, id: string): WrittenLine {
  const [withFigure, codes] = cut(text, ' ! ');
  const [withBound, figure] = cut(withFigure, ' => ');
  const [withCases, requirement] = cut(withBound, ' require ');
  const [withLabel, ...cases] = withCases.split(' @ ');
  const [definition, label = ''] = cut(withLabel ?? '', ' # ');
  const at = definition.indexOf('=');
  const [symbol = '', unit, quantity, side] = (at < 0 ? '' : definition.slice(0, at))
    .split('|')
    .map((part) => part.trim());
  const byCase = Object.fromEntries(
    cases.map((one) => {
      const [caseId, entry = ''] = cut(one, ':');
      return [caseId, entry];
    }),
  );
  const expected = figure === undefined ? undefined : /^(\S+)(?: (.*))?$/.exec(figure);
  return {
    line: {
      id,
      symbol,
      label,
      entry: definition.slice(at + 1).trim(),
      ...(unit ? { unit } : {}),
      ...(quantity ? { quantity: oneOf(QUANTITY_KINDS, quantity) } : {}),
      ...(side ? { side: oneOf(SIDES, side) } : {}),
      ...(cases.length > 0 ? { byCase } : {}),
      ...requirementOf(requirement ?? ''),
    },
    figure: expected ? { digits: expected[1] ?? '', unit: expected[2] ?? '1' } : undefined,
    codes: codes === undefined ? [] : codes.split(',').map((code) => code.trim()),
  };
}

/** The lines of a text, with what is expected of them; their ids are `l0`, `l1` … */
export function readLines(text: string): readonly WrittenLine[] {
  return text
    .split('\n')
    .map((row) => cut(`${row} `, '//')[0].trim())
    .filter((row) => row !== '')
    .map((row, index) => readLine(row, `l${String(index)}`));
}

export const ONE_CASE: readonly Case[] = [{ id: 'nominal', name: 'Nominal' }];

/** A worksheet of one section with these lines. */
export function sheetOfLines(lines: readonly Line[], cases: readonly Case[] = ONE_CASE): Worksheet {
  return { id: 'w', title: 'test', cases, sections: [{ id: 's', kind: 'lines', title: 'all', lines }] };
}

/** The worksheet that a text writes, with these cases (one, `nominal`, when none are given). */
export function sheetOf(text: string, ...caseIds: readonly string[]): Worksheet {
  const cases = caseIds.length === 0 ? ONE_CASE : caseIds.map((id) => ({ id, name: id }));
  return sheetOfLines(
    readLines(text).map(({ line }) => line),
    cases,
  );
}

/** The figure to the digits of the expected text; in the expected unit where nobody chose the unit of a linear figure. */
function asWritten(figure: Figure, expected: WrittenLine['figure']): string {
  if (figure.state !== 'value') return figure.state === 'withheld' ? `withheld ${figure.code}` : figure.state;
  if (expected === undefined) return 'a value';
  const decimals = (/\.(\d+)/.exec(expected.digits)?.[1] ?? '').length;
  const wanted = findUnit(expected.unit);
  const { unit } = figure;
  const isScaled =
    figure.isFitted &&
    unit.form === 'linear' &&
    wanted?.form === 'linear' &&
    unit.dimension.every((n, at) => n === wanted.dimension[at]);
  const [value, word] = isScaled
    ? [(figure.value * unit.factor) / wanted.factor, wanted.word]
    : [figure.value, unit.word];
  const text = value === -Infinity ? '-Infinity' : value.toFixed(decimals).replace(/^-(0(\.0*)?)$/, '$1');
  return `${text} ${word}`;
}

const isError = (code: string): boolean => code in CATALOGUE && CATALOGUE[code as FindingCode].severity === 'error';

/** What a line is expected to be, in one text to compare. */
function expectation({ line, figure, codes }: WrittenLine): string {
  const error = codes.find(isError);
  const state =
    figure !== undefined
      ? `${figure.digits} ${figure.unit}`
      : line.entry === ''
        ? 'empty'
        : error === 'waiting'
          ? 'waiting'
          : error !== undefined
            ? 'withheld'
            : 'a value';
  return `${line.symbol || line.label} = ${line.entry} → ${state} ! ${[...codes].sort().join(', ')}`;
}

/** Evaluates a text and compares every line's figure and findings with what the text says of them. */
export function expectLines(text: string): Evaluation {
  const written = readLines(text);
  const evaluation = new Evaluation(sheetOfLines(written.map(({ line }) => line)));
  const found = written.map((expected) => {
    const { line, figure } = expected;
    const state = asWritten(evaluation.figure(line.id, 'nominal'), figure);
    const codes = evaluation.findings(line.id).map(({ code }) => code);
    return `${line.symbol || line.label} = ${line.entry} → ${state.replace(/^withheld .*/, 'withheld')} ! ${[...codes].sort().join(', ')}`;
  });
  expect(found).toEqual(written.map(expectation));
  return evaluation;
}

/** The codes of all findings of a worksheet, with the symbols of their lines. */
export function codesOf(evaluation: Evaluation): readonly string[] {
  return evaluation.sheetFindings().map(({ code, lineId }) => `${evaluation.line(lineId)?.symbol ?? ''}: ${code}`);
}

/** The value of a line in a case, or its state when it has none. */
export function valueOf(evaluation: Evaluation, symbol: string, caseId = 'nominal'): number | string {
  const line = evaluation.lines().find((one) => one.symbol === symbol || one.label === symbol);
  const figure = evaluation.figure(line?.id ?? '', caseId);
  if (figure.state === 'value') return figure.value;
  return figure.state === 'withheld'
    ? `withheld: ${figure.code}`
    : figure.state === 'waiting'
      ? `waiting: ${figure.roots.join(', ')}`
      : figure.state;
}

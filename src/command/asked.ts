/** What the commands of analysis share: one line in one case, the words for what cannot be used, and how figures are written. */
import { loosened, STUCK, type Inputs, type Trouble } from '../analysis';
import { readBound, type Evaluation } from '../engine';
import { writeFigure, writeQuantity, writeSignificant, type Unit } from '../quantity';
import type { Case, Line } from '../worksheet';
import { Refusal, type ExitCode, type World } from './answer';
import { exitCodeOf } from './evaluate';
import { chooseCases, lineWithSymbol, nameOfLine, openFile, type Opened } from './open';
import { oneLine } from './plain-text';

/** A file, lines of it, and the case that is meant. */
export interface Asked {
  readonly opened: Opened;
  readonly evaluation: Evaluation;
  readonly lines: readonly Line[];
  readonly inCase: Case;
  /** Sentences for standard error. */
  readonly messages: string;
}

/** Opens a file for lines in one case: the one named, else the first, which is then told where there are others. */
export function ask(file: string, symbols: readonly string[], wanted: readonly string[], world: World): Asked {
  const opened = openFile(file, world);
  const { evaluation } = opened;
  const lines = symbols.map((symbol) => lineWithSymbol(opened, symbol));
  const chosen = chooseCases(opened, wanted);
  const [inCase, ...others] = chosen;
  if (inCase === undefined) throw new Refusal(oneLine(`${file}: there is no case.`));
  if (wanted.length > 0 && others.length > 0)
    throw new Refusal(oneLine(`${file}: one case at a time; ${chosen.map(({ id }) => id).join(', ')} are meant.`));
  const told =
    others.length === 0
      ? ''
      : `${oneLine(`${file}: the case is ${inCase.id}; --case takes ${others.map(({ id }) => id).join(', ')}.`)}\n`;
  return { opened, evaluation, lines, inCase, messages: `${opened.messages}${told}` };
}

/** As of `evaluate` for these lines in this case. */
export function exitCodeFor({ evaluation, inCase }: Asked, lines: readonly Line[]): ExitCode {
  const findings = lines
    .flatMap(({ id }) => evaluation.findings(id))
    .filter(({ caseIds }) => caseIds.includes(inCase.id));
  return exitCodeOf({ evaluation, cases: [inCase], lines, findings });
}

/** Tolerances that were left out, a sentence each. */
export function troubleText({ opened, evaluation }: Asked, troubles: readonly Trouble[]): string {
  return troubles
    .map(({ lineId, why }) => {
      const line = evaluation.line(lineId);
      const name = line === undefined ? lineId : nameOfLine(evaluation, line);
      return `${oneLine(`${opened.file}: ${name} is taken as exact: ${why}`)}\n`;
    })
    .join('');
}

/** Why there is nothing to see where no tolerance counts; empty where some do. */
export function noTolerance({ opened, evaluation, lines }: Asked, found: Inputs): string {
  const [line] = lines;
  if (line === undefined || found.inputs.length > 0) return '';
  return `${oneLine(`${opened.file}: nothing that ${nameOfLine(evaluation, line)} rests on has a tolerance.`)}\n`;
}

/** Where neither requirement nor kind says which way is good. */
export function assumedText({ opened, evaluation, lines }: Asked, isAssumed: boolean): string {
  const [line] = lines;
  if (line === undefined || !isAssumed) return '';
  const name = nameOfLine(evaluation, line);
  return `${oneLine(`${opened.file}: higher is taken for better in ${name}; a requirement, or a kind and side, would tell.`)}\n`;
}

/** A line that a command varies, with its unit, in an evaluation in which it can vary. Throws Refusal. */
export function varying(
  { opened, evaluation, inCase }: Asked,
  symbol: string,
  targets: readonly Line[],
): { readonly line: Line; readonly unit: Unit; readonly evaluation: Evaluation; readonly figure: number } {
  const refuse = (why: string): Refusal => new Refusal(oneLine(`${opened.file}: ${symbol} ${why}`));
  const line = lineWithSymbol(opened, symbol);
  const node = evaluation.node(line.id, inCase.id);
  if (node === undefined || node.isDerived || node.item.curve !== undefined)
    throw refuse('is computed, not entered: only what has an entry can be varied.');
  const targetIds = targets.map(({ id }) => id);
  const { evaluation: free, stuck } = loosened(evaluation, [line.id], targetIds, inCase.id);
  if (stuck.length > 0) throw refuse(`cannot be varied: ${STUCK}`);
  const unit = free.node(line.id, inCase.id)?.result.unit;
  if (unit === undefined) throw refuse('has no unit yet, neither declared nor typed.');
  const figure = free.figure(line.id, inCase.id);
  return { line, unit, evaluation: free, figure: figure.state === 'value' ? figure.value : NaN };
}

/** A quantity of an option in a line's unit; a bare number has that unit. Throws Refusal. */
export function quantityIn(text: string, unit: Unit, option: string): number {
  const figure = readBound(text, unit);
  if (figure === undefined || !Number.isFinite(figure))
    throw new Refusal(
      oneLine(`--${option} takes a quantity ${unit.word === '1' ? 'without unit' : `in ${unit.word}`}, not “${text}”.`),
    );
  return figure;
}

/** JSON has no infinities and no NaN: they are null, as what is not known is. */
export const finite = (number: number): number | null => (Number.isFinite(number) ? number : null);

/** A figure for people. */
export function figureIn(value: number, unit: Unit | undefined): string {
  if (Number.isNaN(value) || value === Infinity || unit === undefined) return 'withheld';
  return writeQuantity(value, unit, { minus: '-' });
}

/** A difference of figures for people: of levels it is in dB. */
export function stepIn(value: number, unit: Unit | undefined): string {
  if (!Number.isFinite(value) || unit === undefined) return '—';
  if (unit.form === 'decibel') return `${plainMinus(value.toFixed(2))} dB`;
  const { text, unit: word } = writeFigure(value, unit, { minus: '-' });
  return word === '' ? text : `${text} ${word}`;
}

/** A bare number for people. */
export const numberText = (value: number, digits = 4): string =>
  Number.isFinite(value) ? plainMinus(writeSignificant(value, digits)) : '—';

const plainMinus = (text: string): string => (/^-0(\.0*)?$/.test(text) ? text.slice(1) : text);

/** Rows as columns of a terminal: the first to the left, the others to the right. */
export function textTable(rows: readonly (readonly string[])[]): string {
  const width = (text: string): number => Array.from(text).length;
  const widths = (rows[0] ?? []).map((_, column) => Math.max(...rows.map((cells) => width(cells[column] ?? ''))));
  return rows
    .map((cells) => {
      const padded = cells.map((cell, column) => {
        const text = oneLine(cell);
        const blank = ' '.repeat(Math.max(0, (widths[column] ?? 0) - width(text)));
        return column === 0 ? text + blank : blank + text;
      });
      return `${padded.join('  ').trimEnd()}\n`;
    })
    .join('');
}

/** Rows as CSV (RFC 4180). Cells are written already. */
export const csvTable = (rows: readonly (readonly string[])[]): string =>
  rows.map((cells) => `${cells.join(',')}\r\n`).join('');

/** A number for CSV; nothing where there is none. */
export const csvNumber = (value: number | undefined): string =>
  value !== undefined && Number.isFinite(value) ? String(value) : '';

export const asJson = (value: unknown): string => `${JSON.stringify(value, null, 2)}\n`;

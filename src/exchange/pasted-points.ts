/**
 * The points of a curve, pasted as two columns from another program.
 * Holds: every row of the text is a point, part of the heading, empty, a remark behind `#`, `%` or `!`, or told among the
 * problems with its number; a figure is never guessed from a row that has none.
 */
import { convertFigure } from '../engine';
import { fail, ok, type Result } from '../base';
import { findUnit } from '../quantity';
import type { CurvePoint } from '../worksheet';
import { decimalSignIn, readPastedFigure, writtenFigure, type DecimalSign, type PastedFigure } from './pasted-figures';
import { readHeading, type PastedAxis } from './point-headings';
import { pointRows, type NumberedRow, type Separator } from './point-rows';

/** Something about the pasted text that the person should know. */
export interface PointProblem {
  readonly code:
    | 'not-a-point'
    | 'further-rows'
    | 'decimal-unclear'
    | 'column-left-out'
    | 'unknown-unit'
    | 'unit-differs'
    | 'heading-unclear'
    | 'too-many-rows';
  /** The row of the pasted text, counted from 1; absent when it concerns the table. */
  readonly row?: number;
  readonly sentence: string;
}

/** What the pasted text was taken for. */
export interface PastedPoints {
  readonly separator: Separator;
  readonly decimalSign: DecimalSign;
  /** What heading and cells say of the axes. */
  readonly x: PastedAxis;
  readonly y: PastedAxis;
  /** In the order of the rows. */
  readonly points: readonly CurvePoint[];
  readonly problems: readonly PointProblem[];
}

/** Points that are taken from one paste. */
export const POINTS_LIMIT = 20_000;
/** Rows that are told of one by one. */
const TOLD_LIMIT = 100;
/** Characters of a row or cell that are quoted. */
const QUOTED_LIMIT = 40;

const quoted = (text: string): string =>
  `“${text.length > QUOTED_LIMIT ? `${text.slice(0, QUOTED_LIMIT)}…` : text.replace(/\s+/g, ' ')}”`;

interface ReadRow extends NumberedRow {
  readonly x: PastedFigure;
  readonly y: PastedFigure;
}

/** Reads pasted text as points; `decimalSign` where the person decides it. */
export function readPastedPoints(
  text: string,
  choices: { readonly decimalSign?: 'point' | 'comma' } = {},
): PastedPoints {
  const { separator, rows, columns, hasMore, unclosedQuoteRow } = pointRows(text);
  const [xColumn, yColumn] = columns;
  const problems: PointProblem[] = [];
  const readRows: ReadRow[] = [];
  const above: NumberedRow[] = [];
  const strays: NumberedRow[] = [];
  let excess = 0;
  for (const row of rows) {
    const x = readPastedFigure(row.cells[xColumn] ?? '');
    const y = readPastedFigure(row.cells[yColumn] ?? '');
    if (x !== undefined && y !== undefined) {
      if (readRows.length < POINTS_LIMIT) readRows.push({ ...row, x, y });
      else excess++;
    } else if (!row.isRemark || readRows.length === 0) (readRows.length === 0 ? above : strays).push(row);
  }
  const heading = readRows.length === 0 ? undefined : readHeading(above, columns, separator);
  const used = new Set(heading?.rows ?? []);
  const unread = [...above.filter((row) => !used.has(row.row) && !row.isRemark), ...strays];
  if (heading?.isUnclear === true)
    problems.push({
      code: 'heading-unclear',
      row: heading.rows[0] ?? 1,
      sentence: `Row ${String(heading.rows[0] ?? 1)}: its words were not taken over, since they cannot be told apart by columns.`,
    });
  for (const word of heading?.unknownUnits ?? [])
    problems.push({
      code: 'unknown-unit',
      sentence: `The heading has ${quoted(word)} in brackets, which is no unit known here; it stays in the label.`,
    });
  const xUnit = unitOf(readRows, 'x', heading?.x.unit);
  const yUnit = unitOf(readRows, 'y', heading?.y.unit);
  const decimalSign = choices.decimalSign ?? decimalSignIn(readRows.flatMap(({ x, y }) => [x, y]));
  const unsure: { row: number; cell: string; text: string }[] = [];
  const points: CurvePoint[] = [];
  for (const one of readRows) {
    const [x, y] = [valueOf(one.x, decimalSign), valueOf(one.y, decimalSign)];
    const stray = strayUnit(one.x, xUnit) ?? strayUnit(one.y, yUnit);
    if (!Number.isFinite(x.value) || !Number.isFinite(y.value)) unread.push(one);
    else if (stray !== undefined)
      problems.push({
        code: 'unit-differs',
        row: one.row,
        sentence: `Row ${String(one.row)}: ${quoted(stray)} is not the unit of the column; the row was left out.`,
      });
    else {
      points.push([x.value, y.value]);
      if (!x.isSure) unsure.push({ row: one.row, cell: one.cells[xColumn] ?? '', text: x.text });
      if (!y.isSure) unsure.push({ row: one.row, cell: one.cells[yColumn] ?? '', text: y.text });
    }
  }
  problems.push(...unreadProblems(unread));
  const [first] = unsure;
  if (first !== undefined) {
    const others = unsure.length > 1 ? `, and ${String(unsure.length - 1)} further figures likewise` : '';
    problems.push({
      code: 'decimal-unclear',
      row: first.row,
      sentence: `Row ${String(first.row)}: ${first.cell} was read as ${first.text}${others}. Choose the other decimal sign if that is wrong.`,
    });
  }
  if (hasMore)
    problems.push({
      code: 'column-left-out',
      sentence: `There are more than two columns; columns ${String(xColumn + 1)} and ${String(yColumn + 1)} were taken.`,
    });
  if (unclosedQuoteRow !== undefined)
    problems.push({
      code: 'not-a-point',
      row: unclosedQuoteRow,
      sentence: `Row ${String(unclosedQuoteRow)}: a quotation mark is not closed.`,
    });
  if (excess > 0)
    problems.push({
      code: 'too-many-rows',
      sentence: `There are ${String(POINTS_LIMIT + excess)} points; the first ${String(POINTS_LIMIT)} were taken.`,
    });
  return {
    separator,
    decimalSign,
    x: axis(heading?.x.label, xUnit),
    y: axis(heading?.y.label, yUnit),
    points,
    problems: limited(problems),
  };
}

const axis = (label: string | undefined, unit: string | undefined): PastedAxis => ({
  ...(label === undefined ? {} : { label }),
  ...(unit === undefined ? {} : { unit }),
});

/** The unit of a column: the heading's, else the first that stands in a cell and is known. */
function unitOf(rows: readonly ReadRow[], column: 'x' | 'y', headed: string | undefined): string | undefined {
  if (headed !== undefined) return headed;
  for (const row of rows) {
    const unit = findUnit(row[column].unit);
    if (row[column].unit !== '' && unit !== undefined) return unit.word;
  }
  return undefined;
}

/** A unit in a cell that is not its column's. */
function strayUnit({ unit }: PastedFigure, column: string | undefined): string | undefined {
  if (unit === '') return undefined;
  return column !== undefined && findUnit(unit)?.word === findUnit(column)?.word ? undefined : unit;
}

function valueOf(figure: PastedFigure, sign: DecimalSign): { value: number; text: string; isSure: boolean } {
  const { text, isSure } = writtenFigure(figure, sign);
  return { value: Number(text), text, isSure };
}

const unreadProblems = (rows: readonly NumberedRow[]): PointProblem[] =>
  rows.map(({ row, cells }) => ({
    code: 'not-a-point',
    row,
    sentence: `Row ${String(row)}: ${quoted(cells.filter((cell) => cell !== '').join(' '))} is no pair of numbers.`,
  }));

/** By row, those of the table first; a long list is cut and its rest counted. */
function limited(problems: readonly PointProblem[]): PointProblem[] {
  const sorted = [...problems].sort((a, b) => (a.row ?? 0) - (b.row ?? 0));
  if (sorted.length <= TOLD_LIMIT) return sorted;
  const rest = sorted.length - TOLD_LIMIT;
  return [
    ...sorted.slice(0, TOLD_LIMIT),
    { code: 'further-rows', sentence: `${String(rest)} further rows could not be taken.` },
  ];
}

/**
 * The points in the units of a curve's axes, for appending: a column whose unit is another of the same dimension is converted.
 * Fails with a sentence where a unit does not fit.
 */
export function pointsInUnits(
  pasted: PastedPoints,
  units: { readonly x: string; readonly y: string },
): Result<readonly CurvePoint[], string> {
  const toX = conversion(pasted.x.unit, units.x);
  const toY = conversion(pasted.y.unit, units.y);
  if (toX === undefined) return fail(`The first column is in ${pasted.x.unit ?? ''}, the curve in ${units.x}.`);
  if (toY === undefined) return fail(`The second column is in ${pasted.y.unit ?? ''}, the curve in ${units.y}.`);
  const points = pasted.points.map(([x, y]): CurvePoint => [toX(x), toY(y)]);
  return points.every(([x, y]) => Number.isFinite(x) && Number.isFinite(y))
    ? ok(points)
    : fail('A figure has no place in the unit of the curve.');
}

function conversion(from: string | undefined, to: string): ((figure: number) => number) | undefined {
  const [unit, target] = [from === undefined ? undefined : findUnit(from), findUnit(to.trim())];
  // Figures without a unit are taken to be in that of the curve.
  if (unit === undefined || unit.word === target?.word) return (figure) => figure;
  if (target === undefined || unit.form !== target.form || convertFigure(1, unit, target) === undefined)
    return undefined;
  return (figure) => convertFigure(figure, unit, target) ?? NaN;
}

/**
 * A figure typed in the place of a point's: a number, with decimal comma or point, in the unit of its axis unless it names
 * another of the same dimension. Fails with a sentence.
 */
export function readPointFigure(text: string, unit: string): Result<number, string> {
  const figure = readPastedFigure(text);
  if (figure === undefined) return fail(`${quoted(text.trim())} is no number.`);
  const convert = conversion(figure.unit === '' ? undefined : figure.unit, unit);
  if (figure.unit !== '' && findUnit(figure.unit) === undefined)
    return fail(`${quoted(figure.unit)} is no unit known here.`);
  if (convert === undefined) return fail(`${figure.unit} cannot be brought into ${unit}.`);
  const value = convert(valueOf(figure, 'unclear').value);
  return Number.isFinite(value) ? ok(value) : fail(`${quoted(text.trim())} is beyond the range of numbers.`);
}

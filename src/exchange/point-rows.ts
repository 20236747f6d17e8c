/**
 * Pasted text cut into rows of cells, whichever sign sets its columns apart.
 * Rule: that sign is taken by which most rows have figures in two columns; of several, the one that makes fewer columns; of
 * these, the first of tab, semicolon, comma and blanks.
 */
import { findUnit } from '../quantity';
import { plainCell, readPastedFigure } from './pasted-figures';
import { readTabSeparated } from './tab-separated';

/** What stands between the columns. */
export type Separator = 'tab' | 'semicolon' | 'comma' | 'blanks';

/** A row of the pasted text, counted from 1, that is not empty. */
export interface NumberedRow {
  readonly row: number;
  /** Without blanks round them. */
  readonly cells: readonly string[];
  /** True behind `#`, `%` or `!`, which are taken off the first cell. */
  readonly isRemark: boolean;
}

export interface PointRows {
  readonly separator: Separator;
  readonly rows: readonly NumberedRow[];
  /** The columns that hold the points. */
  readonly columns: readonly [x: number, y: number];
  /** True when other columns hold something too. */
  readonly hasMore: boolean;
  readonly unclosedQuoteRow?: number;
}

const SEPARATORS: readonly Separator[] = ['tab', 'semicolon', 'comma', 'blanks'];
/** Rows by which the separator and the columns are found out. */
const SAMPLE = 200;

/** The rows of the text, and where its points stand. */
export function pointRows(text: string): PointRows {
  const lines = text.split(/\r\n|[\r\n]/);
  const filled = lines.filter((line) => plainCell(line) !== '');
  // From the middle as well: headings may be long.
  const sample = [...filled.slice(0, SAMPLE), ...filled.slice(SAMPLE).slice(-SAMPLE)];
  const tried = SEPARATORS.map((separator) => {
    const rows = sample.map((line) => cellsOf(line, separator));
    return { separator, pairs: bestPair(rows) };
  });
  const best = tried.reduce((most, one) => (isBetter(one.pairs, most.pairs) ? one : most));
  const { separator, pairs } = best;
  const { rows, unclosedQuoteRow } = rowsOf(text, lines, separator);
  const numbered = rows.flatMap((cells, i) => numberedRow(cells, i + 1));
  const isPoint = ({ cells }: NumberedRow): boolean => pairs.columns.every((at) => hasFigure(cells[at]));
  const hasMore = numbered.some(
    (row) => isPoint(row) && row.cells.some((cell, at) => cell !== '' && !pairs.columns.includes(at)),
  );
  return {
    ...{ separator, rows: numbered, columns: pairs.columns, hasMore },
    ...(unclosedQuoteRow === undefined ? {} : { unclosedQuoteRow }),
  };
}

const hasFigure = (cell: string | undefined): boolean => cell !== undefined && readPastedFigure(cell) !== undefined;

function rowsOf(
  text: string,
  lines: readonly string[],
  separator: Separator,
): { rows: readonly (readonly string[])[]; unclosedQuoteRow?: number | undefined } {
  // Cells with line breaks in them are known of tab-separated tables alone.
  if (separator !== 'tab') return { rows: lines.map((line) => cellsOf(line, separator)) };
  const { rows, unclosedQuoteRow } = readTabSeparated(text);
  return { rows: rows.map((cells) => cells.map(plainCell)), unclosedQuoteRow };
}

function numberedRow(cells: readonly string[], row: number): NumberedRow[] {
  if (cells.every((cell) => cell === '')) return [];
  const [first = '', ...others] = cells;
  const isRemark = /^[#%!]/.test(first);
  if (!isRemark) return [{ row, cells, isRemark }];
  const bare = first.replace(/^[#%!]+\s*/, '');
  return [{ row, cells: bare === '' ? others : [bare, ...others], isRemark }];
}

interface Pair {
  readonly columns: readonly [x: number, y: number];
  /** Rows with a figure in both. */
  readonly count: number;
  /** Cells of these rows. */
  readonly cells: number;
}

const isBetter = (one: Pair, other: Pair): boolean =>
  one.count > other.count || (one.count === other.count && one.count > 0 && one.cells < other.cells);

/** The first two columns of figures. */
function bestPair(rows: readonly (readonly string[])[]): Pair {
  const counts = Array.from({ length: Math.max(0, ...rows.map((cells) => cells.length)) }, () => 0);
  for (const cells of rows)
    for (const [at, cell] of cells.entries()) if (hasFigure(cell)) counts[at] = (counts[at] ?? 0) + 1;
  const most = Math.max(0, ...counts);
  // A column that is filled in most rows is one of figures; a stray number in another is not.
  const [x = 0, y = x + 1] = [...counts.keys()].filter((at) => (counts[at] ?? 0) * 2 >= most && most > 0);
  const points = rows.filter((cells) => hasFigure(cells[x]) && hasFigure(cells[y]));
  return { columns: [x, y], count: points.length, cells: points.reduce((sum, cells) => sum + cells.length, 0) };
}

const SIGNS = { tab: '\t', semicolon: ';', comma: ',' } as const;

function cellsOf(line: string, separator: Separator): readonly string[] {
  if (separator === 'blanks') return blankCells(plainCell(line));
  const cells: string[] = [];
  const sign = SIGNS[separator];
  let at = 0;
  for (;;) {
    const quote = /^\s*"((?:[^"]|"")*)"\s*/.exec(line.slice(at));
    const behind = quote === null ? -1 : at + quote[0].length;
    const isQuoted = behind >= 0 && (behind === line.length || line[behind] === sign);
    const found = isQuoted ? (behind === line.length ? -1 : behind) : line.indexOf(sign, at);
    const end = found < 0 ? line.length : found;
    cells.push(plainCell(isQuoted ? (quote?.[1] ?? '').replaceAll('""', '"') : line.slice(at, end)));
    if (found < 0) return cells;
    at = end + 1;
  }
}

/** Words; a unit behind a figure belongs to it. */
function blankCells(line: string): readonly string[] {
  const cells: string[] = [];
  for (const word of line.split(/\s+/)) {
    const before = cells[cells.length - 1];
    const isUnit = before !== undefined && readPastedFigure(before)?.unit === '' && findUnit(word) !== undefined;
    if (isUnit && !hasFigure(word)) cells[cells.length - 1] = `${before} ${word}`;
    else cells.push(word);
  }
  return cells;
}

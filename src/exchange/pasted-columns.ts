/**
 * What the columns of a pasted table are. The rules are few and stated here, so that the outcome can be foretold:
 * 1. The first row is a heading when it holds no figure and no formula, and a later row holds one.
 * 2. The *value* is the first column in which at least half of the filled cells are figures or formulas; a first column that
 *    only counts the rows is left out. Where no column has figures, the third of three or more, else the last, is the value.
 * 3. Before the value: with two or more columns, the first whose cells all have the form of a symbol is the *symbol*; with one,
 *    it is so only if some cell has an underscore. The first other column is the *label*.
 * 4. After the value: the *unit* when at least half of the figures have no unit of their own and the next column holds short
 *    words. All other columns go into the *note*.
 */
import { isSymbol } from '../worksheet';
import { plainCell, readPastedFigure } from './pasted-figures';
import type { Rows } from './tab-separated';

/** What a column is taken for. */
export type ColumnRole = 'symbol' | 'label' | 'value' | 'unit' | 'note' | 'left out';

/** The roles of all columns, and whether the first row is a heading. */
export interface Columns {
  readonly roles: readonly ColumnRole[];
  readonly hasHeading: boolean;
}

const LONGEST_UNIT = 16;

/** True for a cell that another program would have computed. */
export function isForeignFormula(cell: string): boolean {
  return /^[=+@＝＋＠]/.test(cell) && readPastedFigure(cell) === undefined;
}

const hasFigure = (cell: string): boolean => readPastedFigure(cell) !== undefined || isForeignFormula(cell);

/** The columns of a table, by the rules at the head of this file. */
export function columnsOf(rows: Rows): Columns {
  const [first = [], ...others] = rows;
  const hasHeading = !first.some(hasFigure) && others.some((row) => row.some(hasFigure));
  const body = hasHeading ? others : rows;
  const width = Math.max(0, ...rows.slice(0, 1000).map((row) => row.length));
  const columns = Array.from({ length: width }, (_, i) =>
    body.map((row) => plainCell(row[i] ?? '')).filter((cell) => cell !== ''),
  );
  return { roles: rolesOf(columns), hasHeading };
}

function rolesOf(columns: readonly (readonly string[])[]): ColumnRole[] {
  const roles = columns.map((): ColumnRole => 'note');
  const isCounting = columns.length > 2 && isRowCount(columns[0] ?? []) && columns.slice(1).some(isMostlyFigures);
  if (isCounting) roles[0] = 'left out';
  const start = isCounting ? 1 : 0;
  const figures = columns.findIndex((cells, i) => i >= start && isMostlyFigures(cells));
  const value = figures >= 0 ? figures : Math.min(columns.length - 1, start + 2);
  if (value < 0) return roles;
  roles[value] = 'value';
  const before = Array.from({ length: value - start }, (_, i) => start + i);
  const symbol = before.find((i) => isSymbolColumn(columns[i] ?? [], before.length === 1));
  if (symbol !== undefined) roles[symbol] = 'symbol';
  const label = before.find((i) => i !== symbol);
  if (label !== undefined) roles[label] = 'label';
  if (isUnitColumn(columns[value] ?? [], columns[value + 1] ?? [])) roles[value + 1] = 'unit';
  return roles;
}

const isAtLeastHalf = (cells: readonly string[], test: (cell: string) => boolean): boolean =>
  cells.length > 0 && cells.filter(test).length * 2 >= cells.length;

const isMostlyFigures = (cells: readonly string[]): boolean => isAtLeastHalf(cells, hasFigure);

const isRowCount = (cells: readonly string[]): boolean =>
  cells.length > 1 && cells.every((cell, i) => cell.replace(/[.)]$/, '') === String(i + 1));

function isSymbolColumn(cells: readonly string[], isAlone: boolean): boolean {
  return cells.length > 0 && cells.every(isSymbol) && (!isAlone || cells.some((cell) => cell.includes('_')));
}

function isUnitColumn(values: readonly string[], units: readonly string[]): boolean {
  const isBare = (cell: string): boolean => readPastedFigure(cell)?.unit === '';
  const isWord = (cell: string): boolean =>
    cell.length <= LONGEST_UNIT && !/\s/.test(cell) && readPastedFigure(cell) === undefined;
  return (
    isAtLeastHalf(
      values.filter((cell) => readPastedFigure(cell) !== undefined),
      isBare,
    ) &&
    units.length > 0 &&
    units.every(isWord)
  );
}

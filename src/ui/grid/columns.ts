/**
 * The columns of the account: which are shown in a given width, and which cells each kind of row has.
 * Holds: the cells of a row are in the order in which the arrow keys visit them.
 */
import type { OptionalColumn, ColumnChoice } from '../../app/settings.svelte';
import type { Worksheet } from '../../worksheet';
import type { Row } from './rows';

/** A column of lines; `case <id>` is the value column of a case. */
export type Column = 'margin' | 'symbol' | 'label' | 'entry' | OptionalColumn | `case ${string}`;

/** A cell of any row: a column, or one of the cells that only headings and findings have. */
export type CellName =
  Column | 'title' | 'finding' | 'accept' | `repair ${number}` | `new ${'chain' | 'pool' | 'curve'}`;

/** The value column of a case. */
export const caseColumn = (caseId: string): `case ${string}` => `case ${caseId}`;

/** The case whose value column this is, or undefined. */
export function caseOfColumn(column: string): string | undefined {
  return column.startsWith('case ') ? column.slice(5) : undefined;
}

/** Least widths in CSS px; text columns share what is left. */
const ROOMY = {
  margin: 66,
  symbol: 92,
  label: 146,
  entry: 176,
  value: 126,
  requirement: 136,
  tolerance: 136,
  source: 130,
  note: 130,
};

/** The same where there are so many cases that the account would have to be scrolled sideways. */
const TIGHT = { ...ROOMY, label: 114, entry: 140 };

type Widths = typeof ROOMY;

/** Below this width of the whole page, a line is set in two rows. */
export const NARROW_WIDTH = 700;

/** Columns that can be left out, from left to right. */
const OPTIONAL: readonly OptionalColumn[] = ['requirement', 'tolerance', 'source', 'note'];

/** What the columns depend on. */
export interface ColumnsInput {
  readonly worksheet: Worksheet;
  readonly choices: Readonly<Record<OptionalColumn, ColumnChoice>>;
  /** Width of the account in CSS px. */
  readonly width: number;
  readonly narrow: boolean;
  /** The case shown where there is room for one alone. */
  readonly caseId: string;
}

/** The columns shown, from left to right. */
export function columnsOf({ worksheet, choices, width, narrow, caseId }: ColumnsInput): readonly Column[] {
  if (narrow) return ['margin', 'symbol', 'label', caseColumn(caseId), 'entry', 'requirement'];
  const fixed: Column[] = ['margin', 'symbol', 'label', 'entry', ...worksheet.cases.map((one) => caseColumn(one.id))];
  let room = width - totalOf(fixed, ROOMY);
  // Room goes first to what most budgets have; the tolerance stands beside the requirement, if at all.
  const inNeed: OptionalColumn[] = ['requirement', 'source', 'note', 'tolerance'];
  const shown = inNeed.filter((column) => {
    if (choices[column] === 'hidden') return false;
    room -= ROOMY[column];
    return choices[column] === 'shown' || room >= 60;
  });
  return [...fixed, ...OPTIONAL.filter((column) => shown.includes(column))];
}

function widthOf(column: Column, widths: Widths): number {
  return caseOfColumn(column) === undefined ? widths[column as keyof Widths] : widths.value;
}

function totalOf(columns: readonly Column[], widths: Widths): number {
  return columns.reduce((sum, column) => sum + widthOf(column, widths), 0);
}

const widthsFor = (columns: readonly Column[], width: number): Widths =>
  totalOf(columns, ROOMY) <= width ? ROOMY : TIGHT;

/** The value of `grid-template-columns` for columns in a width in CSS px. */
export function gridTemplate(columns: readonly Column[], width: number): string {
  const widths = widthsFor(columns, width);
  const shares: Partial<Record<Column, string>> = { label: '1.3fr', entry: '1.4fr', source: '0.8fr', note: '0.8fr' };
  return columns
    .map((column) => {
      const least = `${String(widthOf(column, widths))}px`;
      const share = shares[column];
      return share === undefined ? least : `minmax(${least}, ${share})`;
    })
    .join(' ');
}

/** The least width of the whole account in a width, both in CSS px. */
export function leastTotal(columns: readonly Column[], width: number): number {
  return totalOf(columns, widthsFor(columns, width));
}

/** The cells of a row, in the order of the arrow keys. */
export function cellsOf(row: Row, columns: readonly Column[]): readonly CellName[] {
  switch (row.kind) {
    case 'line':
    case 'item':
      return columns;
    case 'section':
      return ['margin', 'title'];
    case 'other-section':
      return ['title'];
    case 'new-section':
      return ['title', 'new chain', 'new pool', 'new curve'];
    case 'add':
      return ['symbol', 'label', 'entry'];
    case 'finding': {
      const repairs = row.finding.repairs.map((_, i) => `repair ${i}` as const);
      return [
        'finding',
        ...repairs,
        ...(row.finding.severity === 'error' || row.answerable === false ? [] : (['accept'] as const)),
      ];
    }
  }
}

/** The cell of a row that comes nearest to the column wanted. */
export function cellNearest(row: Row, columns: readonly Column[], wanted: CellName): CellName {
  const cells = cellsOf(row, columns);
  if (cells.includes(wanted)) return wanted;
  if (row.kind === 'line' || row.kind === 'item') return 'symbol';
  if (row.kind === 'section') return 'title';
  if (row.kind === 'add') {
    const at = columns.findIndex((one) => one === wanted);
    return at >= 0 && at > columns.indexOf('entry') ? 'entry' : 'symbol';
  }
  return cells[0] ?? 'title';
}

/** The column heading in words. */
export function columnName(column: CellName, worksheet: Worksheet): string {
  const caseId = caseOfColumn(column);
  if (caseId !== undefined) return worksheet.cases.find((one) => one.id === caseId)?.name ?? caseId;
  return NAMES[column] ?? '';
}

const NAMES: Readonly<Partial<Record<CellName, string>>> = {
  margin: 'Line',
  symbol: 'Symbol',
  label: 'Label',
  entry: 'Entry',
  requirement: 'Requirement',
  tolerance: 'Tolerance',
  source: 'Source',
  note: 'Note',
  title: 'Section',
  finding: 'Finding',
};

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
export type CellName = Column | 'title' | 'finding' | 'accept' | `repair ${number}`;

/** The value column of a case. */
export const caseColumn = (caseId: string): `case ${string}` => `case ${caseId}`;

/** The case whose value column this is, or undefined. */
export function caseOfColumn(column: string): string | undefined {
  return column.startsWith('case ') ? column.slice(5) : undefined;
}

/** Least widths in CSS px; text columns share what is left. */
const WIDTHS = { margin: 66, symbol: 92, label: 140, entry: 180, value: 122, requirement: 136, source: 130, note: 130 };

/** Below this width of the whole page, a line is set in two rows. */
export const NARROW_WIDTH = 700;

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
  let room = width - fixed.reduce((sum, column) => sum + leastWidth(column), 0);
  const optional: OptionalColumn[] = ['requirement', 'source', 'note'];
  const shown = optional.filter((column) => {
    if (choices[column] === 'hidden') return false;
    room -= WIDTHS[column];
    return choices[column] === 'shown' || room >= 60;
  });
  return [...fixed, ...shown];
}

function leastWidth(column: Column): number {
  return caseOfColumn(column) === undefined ? WIDTHS[column as keyof typeof WIDTHS] : WIDTHS.value;
}

/** The value of `grid-template-columns`. */
export function gridTemplate(columns: readonly Column[]): string {
  return columns
    .map((column) => {
      const least = leastWidth(column);
      switch (column) {
        case 'label':
          return `minmax(${String(least)}px, 1.1fr)`;
        case 'entry':
          return `minmax(${String(least)}px, 1.5fr)`;
        case 'source':
        case 'note':
          return `minmax(${String(least)}px, 0.8fr)`;
        default:
          return `${String(least)}px`;
      }
    })
    .join(' ');
}

/** The least width of the whole account, in CSS px. */
export function leastTotal(columns: readonly Column[]): number {
  return columns.reduce((sum, column) => sum + leastWidth(column), 0);
}

/** The cells of a row, in the order of the arrow keys. */
export function cellsOf(row: Row, columns: readonly Column[]): readonly CellName[] {
  switch (row.kind) {
    case 'line':
      return columns;
    case 'section':
      return ['margin', 'title'];
    case 'other-section':
    case 'new-section':
      return ['title'];
    case 'add':
      return ['symbol', 'label', 'entry'];
    case 'finding': {
      const repairs = row.finding.repairs.map((_, i) => `repair ${i}` as const);
      return ['finding', ...repairs, ...(row.finding.severity === 'error' ? [] : (['accept'] as const))];
    }
  }
}

/** The cell of a row that comes nearest to the column wanted. */
export function cellNearest(row: Row, columns: readonly Column[], wanted: CellName): CellName {
  const cells = cellsOf(row, columns);
  if (cells.includes(wanted)) return wanted;
  if (row.kind === 'line') return 'symbol';
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
  source: 'Source',
  note: 'Note',
  title: 'Section',
  finding: 'Finding',
};

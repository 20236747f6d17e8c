/**
 * A table pasted from another program, read into lines: first a preview that the person looks at, then the lines.
 * Holds: every filled cell of the table is in a line, in the heading, or in a column that is said to be left out; a formula of
 * another program is kept as text in the note and never run; pasting is one edit.
 */
import { newLine, proposeSymbol, symbolFault, symbolsIn, type Line, type Worksheet } from '../worksheet';
import { columnsOf, isForeignFormula, type ColumnRole } from './pasted-columns';
import {
  decimalSignIn,
  plainCell,
  readPastedFigure,
  writtenFigure,
  type DecimalSign,
  type PastedFigure,
} from './pasted-figures';
import { readTabSeparated } from './tab-separated';

/** Something about the table that the person should know. */
export interface PasteProblem {
  readonly code:
    | 'formula-kept'
    | 'no-value'
    | 'decimal-unclear'
    | 'not-a-quantity'
    | 'column-left-out'
    | 'bad-symbol'
    | 'unclosed-quote'
    | 'too-many-rows';
  /** The row of the pasted text, counted from 1; absent when it concerns the table. */
  readonly row?: number;
  readonly sentence: string;
}

/** One line to be, with empty texts where the table has nothing. */
export interface PasteRow {
  /** The row of the pasted text, counted from 1. */
  readonly row: number;
  readonly symbol: string;
  readonly label: string;
  readonly entry: string;
  readonly note: string;
}

/** What the pasted table was taken for. */
export interface PastePreview {
  readonly columns: readonly ColumnRole[];
  readonly decimalSign: DecimalSign;
  /** The first row, when it was taken for a heading. */
  readonly heading?: readonly string[];
  readonly rows: readonly PasteRow[];
  readonly problems: readonly PasteProblem[];
}

/** What the person decides otherwise than the rules. */
export interface PasteChoices {
  readonly columns?: readonly ColumnRole[];
  readonly decimalSign?: 'point' | 'comma';
  readonly hasHeading?: boolean;
}

/** Rows that are taken from one paste. */
export const PASTE_ROWS_LIMIT = 10_000;

/** Reads pasted text as a table. Rows without any text are passed over. */
export function previewTable(text: string, choices: PasteChoices = {}): PastePreview {
  const { rows, unclosedQuoteRow } = readTabSeparated(text);
  const numbered = rows
    .map((cells, i) => ({ row: i + 1, cells }))
    .filter(({ cells }) => cells.some((cell) => plainCell(cell) !== ''));
  const taken = numbered.slice(0, PASTE_ROWS_LIMIT);
  const found = columnsOf(taken.map(({ cells }) => cells));
  const columns = choices.columns ?? found.roles;
  const hasHeading = choices.hasHeading ?? found.hasHeading;
  const heading = hasHeading ? taken[0]?.cells : undefined;
  const body = hasHeading ? taken.slice(1) : taken;
  const figures = body.flatMap(({ cells }) =>
    cellsOf(cells, columns, 'value').flatMap((cell) => readPastedFigure(cell) ?? []),
  );
  const decimalSign = choices.decimalSign ?? decimalSignIn(figures);
  const problems: PasteProblem[] = tableProblems(columns, numbered.length, unclosedQuoteRow);
  const lines = body.map(({ row, cells }) => readRow(row, cells, { columns, decimalSign, heading }, problems));
  return { columns, decimalSign, ...(heading && { heading }), rows: lines, problems };
}

interface Reading {
  readonly columns: readonly ColumnRole[];
  readonly decimalSign: DecimalSign;
  readonly heading: readonly string[] | undefined;
}

function readRow(row: number, cells: readonly string[], reading: Reading, problems: PasteProblem[]): PasteRow {
  const { columns } = reading;
  const notes: string[] = [];
  const [value = '', ...moreValues] = cellsOf(cells, columns, 'value');
  const [unit = '', ...moreUnits] = cellsOf(cells, columns, 'unit');
  const [symbol = '', ...moreSymbols] = cellsOf(cells, columns, 'symbol');
  const { entry, note } = readValue(row, value, bareUnit(unit), reading.decimalSign, problems);
  if (note !== '') notes.push(note);
  const fault = symbol === '' ? undefined : symbolFault(symbol);
  if (fault !== undefined) {
    notes.push(symbol);
    problems.push({
      code: 'bad-symbol',
      row,
      sentence: `Row ${String(row)}: “${symbol}” went into the note. ${fault}`,
    });
  }
  notes.push(...moreSymbols, ...moreValues, ...moreUnits, ...noteCells(cells, reading));
  return {
    row,
    symbol: fault === undefined ? symbol : '',
    label: cellsOf(cells, columns, 'label').join(', '),
    entry,
    note: notes.join('; '),
  };
}

/** The entry that a value cell with its unit makes, and what goes into the note instead. */
function readValue(
  row: number,
  value: string,
  unit: string,
  decimalSign: DecimalSign,
  problems: PasteProblem[],
): { entry: string; note: string } {
  const place = `Row ${String(row)}: `;
  if (isForeignFormula(value)) {
    const sentence = `${place}the formula ${value} of the other program was kept in the note. Write the entry in its place.`;
    problems.push({ code: 'formula-kept', row, sentence });
    return { entry: '', note: [`formula in the source: ${value}`, unit].filter((text) => text !== '').join(' in ') };
  }
  const figure = readPastedFigure(value);
  if (figure !== undefined)
    return { entry: readFigure(row, value, figure, unit, decimalSign, problems), note: figure.unit === '' ? '' : unit };
  if (!/[\p{L}\p{N}]/u.test(value)) {
    problems.push({ code: 'no-value', row, sentence: `${place}there is no value; write the entry.` });
    return { entry: '', note: [value, unit].filter((text) => text !== '').join(' ') };
  }
  const sentence = `${place}“${value}” is no plain quantity; it became the entry as it stands. Check it.`;
  problems.push({ code: 'not-a-quantity', row, sentence });
  return { entry: value, note: unit };
}

function readFigure(
  row: number,
  value: string,
  figure: PastedFigure,
  unit: string,
  decimalSign: DecimalSign,
  problems: PasteProblem[],
): string {
  const { text, isSure } = writtenFigure(figure, decimalSign);
  if (!isSure) {
    const sentence = `Row ${String(row)}: ${value} was read as ${text}. Choose the other decimal sign if that is wrong.`;
    problems.push({ code: 'decimal-unclear', row, sentence });
  }
  const word = figure.unit === '' ? unit : figure.unit;
  return word === '' ? text : `${text} ${word}`;
}

/** The filled cells of the columns with a role, without blanks round them. */
function cellsOf(cells: readonly string[], columns: readonly ColumnRole[], role: ColumnRole): string[] {
  return cells.map(plainCell).filter((cell, i) => cell !== '' && (columns[i] ?? 'note') === role);
}

/** Cells for the note, each with its column's heading where several columns go there. */
function noteCells(cells: readonly string[], { columns, heading }: Reading): string[] {
  const isNote = (i: number): boolean => (columns[i] ?? 'note') === 'note';
  const isOneOfSeveral = (heading ?? []).filter((name, i) => plainCell(name) !== '' && isNote(i)).length > 1;
  return cells.map(plainCell).flatMap((cell, i) => {
    if (cell === '' || !isNote(i)) return [];
    const name = plainCell(heading?.[i] ?? '');
    return isOneOfSeveral && name !== '' ? [`${name}: ${cell}`] : [cell];
  });
}

/** A unit without the brackets that stand round it in many tables. */
function bareUnit(unit: string): string {
  return /^\[(.*)\]$/.exec(unit)?.[1] ?? /^\(([^()]*)\)$/.exec(unit)?.[1] ?? unit;
}

function tableProblems(
  columns: readonly ColumnRole[],
  rowCount: number,
  unclosedQuoteRow: number | undefined,
): PasteProblem[] {
  const problems: PasteProblem[] = [];
  if (rowCount > PASTE_ROWS_LIMIT)
    problems.push({
      code: 'too-many-rows',
      sentence: `The table has ${String(rowCount)} rows; the first ${String(PASTE_ROWS_LIMIT)} were taken. Paste the rest separately.`,
    });
  columns.forEach((role, i) => {
    if (role === 'left out')
      problems.push({ code: 'column-left-out', sentence: `Column ${String(i + 1)} is left out.` });
  });
  if (unclosedQuoteRow !== undefined)
    problems.push({
      code: 'unclosed-quote',
      row: unclosedQuoteRow,
      sentence: `Row ${String(unclosedQuoteRow)}: a quotation mark is not closed; it was taken as part of the text.`,
    });
  return problems;
}

/**
 * The lines of a preview, with fresh ids, for `pasteLines`, which gives taken symbols free ones. Symbols that the table does not
 * give are proposed from the labels.
 */
export function linesFromPreview(worksheet: Worksheet, preview: PastePreview): Line[] {
  const taken = symbolsIn(worksheet);
  for (const row of preview.rows) taken.add(row.symbol);
  const counts = new Map<string, number>();
  return preview.rows.map((row) => {
    const symbol = row.symbol === '' ? proposedSymbol(row, taken, counts) : row.symbol;
    taken.add(symbol);
    return newLine({ symbol, label: row.label, entry: row.entry, ...(row.note !== '' && { note: row.note }) });
  });
}

/** A row that holds a label alone is a remark, not a quantity: it needs no symbol. */
function proposedSymbol(row: PasteRow, taken: ReadonlySet<string>, counts: Map<string, number>): string {
  return row.entry === '' && row.note === '' ? '' : proposeSymbol(row.label, taken, counts);
}

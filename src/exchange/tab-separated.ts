/**
 * Tab-separated text, as other programs put it on the clipboard: RFC 4180 quoting with TAB in place of the comma.
 * Holds: reading what was written gives the same cells, except that a cell which other programs would run as a formula goes
 * out behind an apostrophe, which reading takes away again.
 */

/** Rows of cells; every row holds at least one cell. */
export type Rows = readonly (readonly string[])[];

/** What reading gave. */
export interface ReadRows {
  readonly rows: Rows;
  /** Set when a quoted cell was not closed: the row, counted from 1, whose quotation mark was then taken as it stands. */
  readonly unclosedQuoteRow?: number;
}

/** Beginnings that make other programs run a cell; and the apostrophe itself, so that reading is unambiguous. */
const RISKY = /^[=+\-@\t\r\n＝＋－＠']/;
/** A figure with or without a unit is no formula, whatever its sign. */
const FIGURE = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?(?: [\p{L}°%µΩ][^\s"']*)?$/u;

/** Reads rows of cells. A line break at the very end adds no row. */
export function readTabSeparated(text: string): ReadRows {
  const rows: string[][] = [[]];
  let unclosedQuoteRow: number | undefined;
  let at = 0;
  while (at < text.length) {
    const quoted = text[at] === '"' ? quotedCell(text, at) : undefined;
    if (text[at] === '"' && quoted === undefined) unclosedQuoteRow ??= rows.length;
    const end = quoted?.end ?? endOfCell(text, at);
    rows[rows.length - 1]?.push(unguarded(quoted?.cell ?? text.slice(at, end)));
    if (text[end] === '\t') {
      at = end + 1;
      // A tab before the end of a row leaves an empty last cell.
      if (at === text.length || text[at] === '\n' || text[at] === '\r') rows[rows.length - 1]?.push('');
    } else at = end;
    const lineBreak = /^\r\n|^[\r\n]/.exec(text.slice(at, at + 2))?.[0];
    if (lineBreak === undefined) continue;
    at += lineBreak.length;
    if (rows[rows.length - 1]?.length === 0) rows[rows.length - 1]?.push('');
    if (at < text.length) rows.push([]);
  }
  if (rows[0]?.length === 0) rows[0].push('');
  return { rows, ...(unclosedQuoteRow !== undefined && { unclosedQuoteRow }) };
}

/** A quoted cell that is closed and followed by a tab, a line break or the end; undefined when it is not. */
function quotedCell(text: string, start: number): { cell: string; end: number } | undefined {
  let at = start + 1;
  for (;;) {
    const mark = text.indexOf('"', at);
    if (mark < 0) return undefined;
    if (text[mark + 1] === '"') {
      at = mark + 2;
      continue;
    }
    const after = text[mark + 1];
    if (after !== undefined && after !== '\t' && after !== '\n' && after !== '\r') return undefined;
    return { cell: text.slice(start + 1, mark).replaceAll('""', '"'), end: mark + 1 };
  }
}

function endOfCell(text: string, start: number): number {
  let end = start;
  while (end < text.length && text[end] !== '\t' && text[end] !== '\n' && text[end] !== '\r') end++;
  return end;
}

const unguarded = (cell: string): string => (cell.startsWith("'") && RISKY.test(cell.slice(1)) ? cell.slice(1) : cell);

/** Writes rows of cells, ended by CR LF as other programs expect; text that they would run as a formula is defused. */
export function writeTabSeparated(rows: Rows): string {
  return rows.map((row) => `${row.map(writtenCell).join('\t')}\r\n`).join('');
}

function writtenCell(cell: string): string {
  const safe = RISKY.test(cell) && !FIGURE.test(cell) ? `'${cell}` : cell;
  return /["\t\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/**
 * Tables as comma-separated values after RFC 4180.
 * Holds: no text cell begins as a formula of another program would, whatever stood in the worksheet.
 */

// Blanks and characters that are not seen may stand ahead of the sign.
const LOOKS_LIKE_FORMULA = /^[\s\p{C}]*[=+\-@\t\r\n＝＋－＠]/u;

/** A text as a cell. */
export function csvText(text: string): string {
  const safe = LOOKS_LIKE_FORMULA.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** A number as a cell; empty where there is none. */
export const csvNumber = (value: number | undefined): string =>
  value !== undefined && Number.isFinite(value) ? String(value) : '';

/** Rows of cells that are written already. */
export const csvTable = (rows: readonly (readonly string[])[]): string =>
  rows.map((cells) => `${cells.join(',')}\r\n`).join('');

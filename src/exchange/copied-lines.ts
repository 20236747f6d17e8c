/**
 * Lines on the clipboard: inside the program as a small worksheet file, for other programs as a table.
 * Holds: lines that are copied and pasted keep every field, unknown ones too; what comes from the clipboard is checked as a
 * file is.
 */
import { newUuid, ok, type Result } from '../base';
import { allLines, inWorksheetOrder, type CopiedLines, type Line, type Worksheet } from '../worksheet';
import { readWorksheetFile } from './file';
import type { FileFault } from './file-fault';
import type { Rows } from './tab-separated';
import { writeWorksheetFile } from './write';

/** The clipboard type of lines copied inside the program. */
export const LINES_MEDIA_TYPE = 'application/x-levelwright-lines+json';

/** The text that goes on the clipboard under `LINES_MEDIA_TYPE`. */
export function writeCopiedLines(worksheet: Worksheet, lineIds: readonly string[]): string {
  const lines = inWorksheetOrder(worksheet, lineIds);
  const used = new Set(lines.flatMap((line) => Object.keys(line.byCase ?? {})));
  const cases = worksheet.cases.filter((one) => used.has(one.id));
  return writeWorksheetFile({
    id: newUuid(),
    title: worksheet.title,
    cases: cases.length === 0 ? worksheet.cases.slice(0, 1) : cases,
    sections: [{ id: 'copied', kind: 'lines', title: '', lines }],
  });
}

/** Reads such a text; the lines are ready for `pasteLines`. */
export function readCopiedLines(text: string): Result<CopiedLines, FileFault> {
  const read = readWorksheetFile(text);
  if (!read.ok) return read;
  return ok({ cases: read.value.worksheet.cases, lines: allLines(read.value.worksheet) });
}

/**
 * The lines as rows for other programs: symbol, label, one cell for each case, note. `textIn` tells what stands in a case's
 * cell: `entryIn` for what was typed, or the value as shown.
 */
export function tableOfLines(
  worksheet: Worksheet,
  lineIds: readonly string[],
  textIn: (line: Line, caseId: string) => string,
): Rows {
  return inWorksheetOrder(worksheet, lineIds).map((line) => [
    line.symbol,
    line.label,
    ...worksheet.cases.map((one) => textIn(line, one.id)),
    line.note ?? '',
  ]);
}

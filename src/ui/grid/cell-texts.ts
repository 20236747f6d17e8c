/**
 * What the cells of lines hold as text, and the edits that typing there makes.
 * Holds: an entry is kept as typed, also when it cannot be read; only symbols, requirements and tolerances may be refused, with a sentence.
 */
import { fail, ok, type Result } from '../../base';
import { readRequirement, writeRequirement } from '../../app/requirement-text';
import { editedTolerance, writeTolerance } from '../../app/tolerance-text';
import {
  entryIn,
  insertLine,
  insertSection,
  locateLine,
  overrideIn,
  placeAtEnd,
  removeOverride,
  renameSection,
  setEntry,
  setLineField,
  setSymbol,
  symbolProblem,
  type Edit,
  type Line,
  type Worksheet,
} from '../../worksheet';
import { caseOfColumn, type CellName } from './columns';
import type { Row } from './rows';

/** True for cells that a person can type in. */
export function isEditable(row: Row, cell: CellName): boolean {
  switch (row.kind) {
    case 'line':
      return cell !== 'margin';
    case 'add':
      return true;
    case 'new-section':
      return cell === 'title';
    case 'section':
      return cell === 'title';
    case 'item':
    case 'other-section':
    case 'finding':
      return false;
  }
}

/**
 * The case that a value cell stands for when typed in: with one case alone there is nothing to differ from, and typing changes
 * the line's own entry.
 */
export function caseTyped(worksheet: Worksheet, cell: CellName): string | undefined {
  return worksheet.cases.length > 1 ? caseOfColumn(cell) : undefined;
}

/** True for cells that hold an entry. */
export function holdsEntry(cell: CellName): boolean {
  return cell === 'entry' || caseOfColumn(cell) !== undefined;
}

/** The text with which an editor opens. */
export function textIn(worksheet: Worksheet, row: Row, cell: CellName): string {
  if (row.kind === 'section') return row.section.title;
  if (row.kind !== 'line') return '';
  const { line } = row;
  if (holdsEntry(cell)) return entryIn(line, caseTyped(worksheet, cell));
  if (cell === 'requirement') return writeRequirement(line.requirement);
  if (cell === 'tolerance') return writeTolerance(line.tolerance);
  return plainText(line, cell);
}

function plainText(line: Line, cell: CellName): string {
  if (cell === 'symbol' || cell === 'label' || cell === 'source' || cell === 'note') return line[cell] ?? '';
  return '';
}

/** Why a text cannot be kept in a cell, as a sentence; undefined when it can. */
export function refusal(worksheet: Worksheet, row: Row, cell: CellName, text: string): string | undefined {
  const trimmed = text.trim();
  if (cell === 'symbol' && trimmed !== '') {
    const lineId = row.kind === 'line' ? row.line.id : undefined;
    if (row.kind === 'line' && trimmed === row.line.symbol) return undefined;
    return symbolProblem(worksheet, trimmed, lineId);
  }
  if (cell === 'requirement' && readRequirement(text) === null)
    return 'A requirement is a comparison and a bound, for example ≥ 3 dB or ≤ -100 dBm.';
  if (cell === 'tolerance' && row.kind === 'line') {
    const read = editedTolerance(row.line.tolerance, text);
    return read.ok ? undefined : read.fault;
  }
  return undefined;
}

/** The edit that a text typed in a cell makes; a fault is the sentence that says why it cannot be kept. */
export function editOf(worksheet: Worksheet, row: Row, cell: CellName, text: string): Result<Edit, string> {
  const refused = refusal(worksheet, row, cell, text);
  if (refused !== undefined) return fail(refused);
  switch (row.kind) {
    case 'line':
      return ok(lineEdit(worksheet, row.line, cell, text));
    case 'add':
      return ok(insertLine(worksheet, placeAtEnd(worksheet, row.section.id), { [cell]: text.trim() }));
    case 'section':
      return ok(renameSection(worksheet, row.section.id, text.trim()));
    case 'new-section':
      return ok(insertSection(worksheet, worksheet.sections.length, text.trim()));
    case 'item':
    case 'other-section':
    case 'finding':
      return ok({ label: 'Nothing', changes: [] });
  }
}

function lineEdit(worksheet: Worksheet, line: Line, cell: CellName, text: string): Edit {
  if (holdsEntry(cell)) return setEntry(worksheet, line.id, text, caseTyped(worksheet, cell));
  switch (cell) {
    case 'symbol':
      return setSymbol(worksheet, line.id, text);
    case 'label':
    case 'source':
    case 'note':
      return setLineField(worksheet, line.id, cell, text.trim());
    case 'requirement':
      return setLineField(worksheet, line.id, 'requirement', readRequirement(text) ?? undefined);
    case 'tolerance': {
      const read = editedTolerance(line.tolerance, text);
      return setLineField(worksheet, line.id, 'tolerance', read.ok ? read.value : line.tolerance);
    }
    default:
      return { label: 'Nothing', changes: [] };
  }
}

/** The edit that clears a cell; in a case's column, the override goes and the line's own entry counts again. */
export function clearingEdit(worksheet: Worksheet, lineId: string, cell: CellName): Edit {
  const { line } = locateLine(worksheet, lineId);
  const caseId = caseTyped(worksheet, cell);
  if (caseId === undefined) return lineEdit(worksheet, line, cell, '');
  if (overrideIn(line, caseId) === undefined) return { label: 'Nothing', changes: [] };
  return removeOverride(worksheet, lineId, caseId);
}

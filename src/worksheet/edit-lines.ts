/**
 * Edits of whole lines: insert, duplicate, paste, delete, move.
 * Holds: copies have ids and symbols of their own, and what copied lines said about each other their copies say about each
 * other; a copy carries no sign-off, which was given to the line that it was made from.
 */
import { newShortId } from '../base';
import type { Change } from './changes';
import { isLinesSection, type Case, type Line, type LinesSection, type Worksheet } from './document';
import { lineCount, type Edit, type Focus } from './edit';
import { withCurrentAcceptances } from './edit-fields';
import { inOrder, LINE_KEYS, withKey } from './keys';
import { allLines, linesSectionOf, locateLine } from './lookup';
import { withRenamedSymbols } from './renaming';
import { freeSymbol, symbolsIn } from './symbols';

/** A place between lines: before the line that now has this index in the section, or at its end. */
export interface Place {
  readonly sectionId: string;
  readonly index: number;
}

/** The place above a line. */
export function placeAbove(worksheet: Worksheet, lineId: string): Place {
  const { section, lineIndex } = locateLine(worksheet, lineId);
  return { sectionId: section.id, index: lineIndex };
}

/** The place below a line. */
export function placeBelow(worksheet: Worksheet, lineId: string): Place {
  const { section, lineIndex } = locateLine(worksheet, lineId);
  return { sectionId: section.id, index: lineIndex + 1 };
}

/** The place at the end of a section. */
export function placeAtEnd(worksheet: Worksheet, sectionId: string): Place {
  return { sectionId, index: linesSectionOf(worksheet, sectionId).lines.length };
}

/** A line with a fresh id; fields that are not given are empty or absent. */
export function newLine(fields: Partial<Omit<Line, 'id'>> = {}): Line {
  return inOrder({ symbol: '', label: '', entry: '', ...fields, id: newShortId() }, LINE_KEYS);
}

/** Inserts one new line. */
export function insertLine(worksheet: Worksheet, place: Place, fields: Partial<Omit<Line, 'id'>> = {}): Edit {
  return insertionEdit('Insert line', worksheet, place, [newLine(fields)]);
}

function insertionEdit(label: string, worksheet: Worksheet, place: Place, lines: readonly Line[]): Edit {
  return {
    label,
    changes: lines.map((line, i) => ({
      kind: 'insert-line',
      sectionId: place.sectionId,
      index: place.index + i,
      line,
    })),
    ...focusOn(lines.map((line) => line.id)),
    focusBefore: focusNear(linesSectionOf(worksheet, place.sectionId), place.index - 1),
  };
}

/** The lines' copies as new lines: see the head of this file. `taken` are the symbols that they may not have. */
function copiesOf(lines: readonly Line[], taken: ReadonlySet<string>): Line[] {
  const used = new Set(taken);
  const avoided = new Set([...taken, ...lines.map((line) => line.symbol)]);
  const renamed = new Map<string, string>();
  const counts = new Map<string, number>();
  const copies = lines.map((line) => {
    const symbol = used.has(line.symbol) ? freeSymbol(line.symbol, avoided, counts) : line.symbol;
    if (symbol !== '') used.add(symbol);
    avoided.add(symbol);
    if (symbol !== line.symbol && !renamed.has(line.symbol)) renamed.set(line.symbol, symbol);
    return { ...withKey(line, 'signOff', undefined, LINE_KEYS), id: newShortId(), symbol };
  });
  return renamed.size === 0 ? copies : copies.map((line) => withRenamedSymbols(line, renamed));
}

/** Duplicates lines: in each section, the copies stand below the last of the lines that were copied. */
export function duplicateLines(worksheet: Worksheet, lineIds: readonly string[]): Edit {
  const lines = inWorksheetOrder(worksheet, lineIds);
  const copies = copiesOf(lines, symbolsIn(worksheet));
  const copyOf = new Map(lines.map((line, i) => [line.id, copies[i]]));
  const changes: Change[] = [];
  for (const section of worksheet.sections) {
    if (!isLinesSection(section)) continue;
    const own = section.lines.flatMap((line) => copyOf.get(line.id) ?? []);
    const below = section.lines.findLastIndex((line) => copyOf.has(line.id)) + 1;
    own.forEach((line, i) => changes.push({ kind: 'insert-line', sectionId: section.id, index: below + i, line }));
  }
  return {
    label: `Duplicate ${lineCount(lines.length)}`,
    changes,
    ...focusOn(copies.map((line) => line.id)),
    ...focusBeforeOn(lines.map((line) => line.id)),
  };
}

/** Lines to paste: as copied, with the cases that their `byCase` refers to. */
export interface CopiedLines {
  readonly cases: readonly Case[];
  readonly lines: readonly Line[];
}

/**
 * Inserts copied lines. Entries of single cases go to the case with the same id, else with the same name.
 * The messages tell what could not be taken along.
 */
export function pasteLines(
  worksheet: Worksheet,
  place: Place,
  copied: CopiedLines,
): { edit: Edit; messages: readonly string[] } {
  const lostCases = new Set<string>();
  const lines = copied.lines.map((line) => withCasesOf(worksheet, copied.cases, line, lostCases));
  const copies = copiesOf(lines, symbolsIn(worksheet));
  const messages = [...lostCases].map(
    (name) => `The entries for the case “${name}” were left out: this worksheet has no such case.`,
  );
  if (copied.lines.some((line) => line.signOff !== undefined))
    messages.push('Sign-offs were left out: they were given to the lines that were copied.');
  return { edit: insertionEdit(`Paste ${lineCount(copies.length)}`, worksheet, place, copies), messages };
}

function withCasesOf(worksheet: Worksheet, from: readonly Case[], line: Line, lostCases: Set<string>): Line {
  if (line.byCase === undefined) return line;
  const entries = new Map<string, string>();
  for (const [caseId, entry] of Object.entries(line.byCase)) {
    const name = from.find((one) => one.id === caseId)?.name ?? caseId;
    const target = worksheet.cases.find((one) => one.id === caseId) ?? worksheet.cases.find((one) => one.name === name);
    if (target === undefined) lostCases.add(name);
    else entries.set(target.id, entry);
  }
  const byCase = entries.size === 0 ? undefined : Object.fromEntries(entries);
  return withCurrentAcceptances(withKey(line, 'byCase', byCase, LINE_KEYS));
}

/** Deletes lines; the focus goes to the line that then stands in the first one's place. */
export function deleteLines(worksheet: Worksheet, lineIds: readonly string[], verb = 'Delete'): Edit {
  const lines = inWorksheetOrder(worksheet, lineIds);
  const gone = new Set(lines.map((line) => line.id));
  const first = lines[0];
  const edit: Edit = {
    label: `${verb} ${lineCount(lines.length)}`,
    changes: lines.map((line) => ({ kind: 'remove-line', lineId: line.id })),
    ...focusBeforeOn(lines.map((line) => line.id)),
  };
  if (first === undefined) return edit;
  const { section, lineIndex } = locateLine(worksheet, first.id);
  const left = section.lines.filter((line) => !gone.has(line.id));
  const above = section.lines.slice(0, lineIndex).filter((line) => !gone.has(line.id)).length;
  return { ...edit, focus: focusNear({ ...section, lines: left }, Math.min(above, left.length - 1)) };
}

/** Moves lines, as one block in the order of the worksheet, to a place. */
export function moveLinesTo(worksheet: Worksheet, lineIds: readonly string[], place: Place): Edit {
  const lines = inWorksheetOrder(worksheet, lineIds);
  const moved = new Set(lines.map((line) => line.id));
  const target = linesSectionOf(worksheet, place.sectionId);
  const anchor = target.lines.slice(place.index).find((line) => !moved.has(line.id))?.id;
  const ids = target.lines.map((line) => line.id);
  const changes: Change[] = [];
  for (const { id } of lines) {
    const now = ids.indexOf(id);
    if (now >= 0) ids.splice(now, 1);
    const index = anchor === undefined ? ids.length : ids.indexOf(anchor);
    ids.splice(index, 0, id);
    if (now !== index) changes.push({ kind: 'move-line', lineId: id, sectionId: target.id, index });
  }
  const focus = focusOn(lines.map((line) => line.id));
  return {
    label: `Move ${lineCount(lines.length)}`,
    changes,
    ...focus,
    ...focusBeforeOn(lines.map((line) => line.id)),
  };
}

/**
 * Moves lines, as one block, one place up or down; from the edge of a section into the section of lines next to it.
 * An edit without changes at the edge of the worksheet.
 */
export function moveLines(worksheet: Worksheet, lineIds: readonly string[], direction: 'up' | 'down'): Edit {
  const lines = inWorksheetOrder(worksheet, lineIds);
  const edge = direction === 'up' ? lines[0] : lines[lines.length - 1];
  if (edge === undefined) return { label: 'Move line', changes: [] };
  const place = placeNextTo(worksheet, edge.id, new Set(lineIds), direction);
  return place === undefined
    ? { label: `Move ${lineCount(lines.length)}`, changes: [] }
    : moveLinesTo(worksheet, lineIds, place);
}

function placeNextTo(
  worksheet: Worksheet,
  lineId: string,
  moved: ReadonlySet<string>,
  direction: 'up' | 'down',
): Place | undefined {
  const { section, sectionIndex, lineIndex } = locateLine(worksheet, lineId);
  if (direction === 'up') {
    const above = section.lines.slice(0, lineIndex).findLastIndex((line) => !moved.has(line.id));
    if (above >= 0) return { sectionId: section.id, index: above };
    const before = worksheet.sections.slice(0, sectionIndex).findLast(isLinesSection);
    return before === undefined ? undefined : { sectionId: before.id, index: before.lines.length };
  }
  const below = section.lines.findIndex((line, i) => i > lineIndex && !moved.has(line.id));
  if (below >= 0) return { sectionId: section.id, index: below + 1 };
  const after = worksheet.sections.slice(sectionIndex + 1).find(isLinesSection);
  return after === undefined ? undefined : { sectionId: after.id, index: 0 };
}

/** The lines with these ids, in the order of the worksheet. */
export function inWorksheetOrder(worksheet: Worksheet, lineIds: readonly string[]): Line[] {
  const wanted = new Set(lineIds);
  if (wanted.size === 1) return lineIds.slice(0, 1).map((id) => locateLine(worksheet, id).line);
  return allLines(worksheet).filter((line) => wanted.has(line.id));
}

function focusOn(lineIds: readonly string[]): { focus?: Focus } {
  return lineIds.length === 0 ? {} : { focus: { kind: 'lines', lineIds } };
}

function focusBeforeOn(lineIds: readonly string[]): { focusBefore?: Focus } {
  return lineIds.length === 0 ? {} : { focusBefore: { kind: 'lines', lineIds } };
}

/** The line at an index of the section, else its first, else the section itself. */
function focusNear(section: LinesSection, index: number): Focus {
  const line = section.lines[index] ?? section.lines[0];
  return line === undefined ? { kind: 'section', sectionId: section.id } : { kind: 'lines', lineIds: [line.id] };
}

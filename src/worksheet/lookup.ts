/**
 * Finding things in a worksheet: lines, sections and cases by id, and the entry that counts in a case.
 * Functions named `…Of` and `locateLine` are for ids that must be there: they throw when they are not.
 */
import { assert, present } from '../base';
import { isLinesSection, type Case, type Line, type LinesSection, type Section, type Worksheet } from './document';
import { placeOfLine } from './line-index';

/** A line with its place. */
export interface FoundLine {
  readonly line: Line;
  readonly section: LinesSection;
  readonly sectionIndex: number;
  readonly lineIndex: number;
}

/** The line with this id and its place, or undefined. */
export function findLine(worksheet: Worksheet, lineId: string): FoundLine | undefined {
  const place = placeOfLine(worksheet, lineId);
  if (place === undefined) return undefined;
  const section = present(worksheet.sections[place.sectionIndex], 'an indexed section');
  assert(isLinesSection(section), 'an indexed section has lines');
  return { ...place, line: present(section.lines[place.lineIndex], 'an indexed line'), section };
}

/** As `findLine`, for an id that must be there. Throws when it is not. */
export function locateLine(worksheet: Worksheet, lineId: string): FoundLine {
  return present(findLine(worksheet, lineId), `the line ${lineId}`);
}

/** The section with this id. Throws when there is none. */
export function sectionOf(worksheet: Worksheet, sectionId: string): Section {
  return present(
    worksheet.sections.find((section) => section.id === sectionId),
    `the section ${sectionId}`,
  );
}

/** The section of lines with this id. Throws when there is none. */
export function linesSectionOf(worksheet: Worksheet, sectionId: string): LinesSection {
  const section = sectionOf(worksheet, sectionId);
  assert(isLinesSection(section), `the section ${sectionId} is of another kind`);
  return section;
}

/** The case with this id. Throws when there is none. */
export function caseOf(worksheet: Worksheet, caseId: string): Case {
  return present(
    worksheet.cases.find((one) => one.id === caseId),
    `the case ${caseId}`,
  );
}

/** Every evaluated line, in the order of the worksheet. */
export function allLines(worksheet: Worksheet): Line[] {
  return worksheet.sections.flatMap((section) => (isLinesSection(section) ? section.lines : []));
}

/** The entry that stands in place of the line's own in this case, or undefined. Safe for any case id. */
export function overrideIn(line: Line, caseId: string): string | undefined {
  return line.byCase !== undefined && Object.hasOwn(line.byCase, caseId) ? line.byCase[caseId] : undefined;
}

/** The entry that counts in this case; without a case, the line's own entry. */
export function entryIn(line: Line, caseId?: string): string {
  return (caseId === undefined ? undefined : overrideIn(line, caseId)) ?? line.entry;
}

/** Every entry of the line: its own and those of single cases. */
export function entriesOf(line: Line): string[] {
  return [line.entry, ...Object.values(line.byCase ?? {})];
}

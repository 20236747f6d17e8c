/**
 * What a worksheet may hold at most, and the check that an edit keeps within it.
 * Holds: a worksheet that was read from a file, changed by edits without a problem, and written, can be read again.
 */
import type { Change } from './changes';
import { isChainSection, isLinesSection, isOtherSection, type Section, type Worksheet } from './document';
import type { Edit } from './edit';

/** Characters of one text field. */
export const TEXT_LIMIT = 65_536;
/** Lines of all sections, stages of chains among them. */
export const LINES_LIMIT = 100_000;

/** Why the edit must not be performed, as a sentence for the user, or undefined. */
export function editProblem(worksheet: Worksheet, edit: Edit): string | undefined {
  const longest = edit.changes.reduce((length, change) => Math.max(length, longestText(change)), 0);
  if (longest > TEXT_LIMIT)
    return `A text of ${String(longest)} characters is too long; at most ${String(TEXT_LIMIT)} are kept. Shorten it.`;
  const added = edit.changes.reduce((sum, change) => sum + addedRows(change), 0);
  if (added === 0) return undefined;
  const rows = worksheet.sections.reduce((sum, section) => sum + rowsOf(section), added);
  return rows > LINES_LIMIT
    ? `The worksheet would have ${String(rows)} lines; at most ${String(LINES_LIMIT)} are kept. Split it into several worksheets.`
    : undefined;
}

function addedRows(change: Change): number {
  if (change.kind === 'insert-line') return 1;
  if (change.kind === 'set-section' && change.field === 'stages') return change.value?.length ?? 0;
  return change.kind === 'insert-section' ? rowsOf(change.section) : 0;
}

function rowsOf(section: Section): number {
  if (isLinesSection(section)) return section.lines.length;
  if (isChainSection(section)) return section.stages.length;
  if (!isOtherSection(section)) return 0;
  const count = (rows: unknown): number => (Array.isArray(rows) ? rows.length : 0);
  return count(section.content['lines']) + count(section.content['stages']);
}

function longestText(value: unknown): number {
  if (typeof value === 'string') return value.length;
  if (typeof value !== 'object' || value === null) return 0;
  return Object.values(value).reduce<number>((longest, item) => Math.max(longest, longestText(item)), 0);
}

/**
 * Edits: what a person does in one step, as changes under one label, with the places to look at afterwards.
 * The functions in `edit-*.ts` make edits; `history.ts` performs them. An edit without changes does nothing.
 */
import type { Change, LineField, SetLine } from './changes';
import type { Line } from './document';
import { LINE_KEYS } from './keys';

/** Where the page should put the focus. */
export type Focus =
  | {
      readonly kind: 'lines';
      /** At least one; the first has the focus, all are selected. */
      readonly lineIds: readonly string[];
      readonly field?: LineField;
      readonly caseId?: string;
    }
  | { readonly kind: 'section'; readonly sectionId: string }
  | { readonly kind: 'case'; readonly caseId: string }
  | { readonly kind: 'worksheet' };

/** One step of work. */
export interface Edit {
  /** What it does, for the undo command and for announcements: `Delete 3 lines`. */
  readonly label: string;
  readonly changes: readonly Change[];
  /** Where to look after the edit was done or redone; absent: stay. */
  readonly focus?: Focus;
  /** Where to look after the edit was undone; absent: stay. */
  readonly focusBefore?: Focus;
}

/** The changes that turn one state of a line into another with the same id, field by field. */
export function changesBetween(before: Line, after: Line): SetLine[] {
  const changes: SetLine[] = [];
  for (const field of LINE_KEYS) {
    if (field === 'id' || before[field] === after[field]) continue;
    changes.push({ kind: 'set-line', lineId: before.id, field, value: after[field] } as SetLine);
  }
  return changes;
}

/** How a line is called in labels and messages: by its symbol, else its label, else as `line`. */
export function lineName(line: Line): string {
  return line.symbol !== '' ? line.symbol : line.label !== '' ? `“${line.label}”` : 'line';
}

/** `line` or `3 lines`. */
export function lineCount(count: number): string {
  return count === 1 ? 'line' : `${String(count)} lines`;
}

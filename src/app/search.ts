/** Searching a worksheet: which lines hold a text, and in which field. */
import type { Evaluation } from '../engine';
import { entriesOf, isLinesSection, type Line } from '../worksheet';
import { itemRows } from './item-rows';
import { withoutCapitals } from './found-places';

/** Fields that are searched. */
export type SearchedField = 'symbol' | 'label' | 'entry' | 'source' | 'note';

/** A line that holds the text, and the first of its fields that does. */
export interface Match {
  readonly lineId: string;
  readonly field: SearchedField;
}

const FIELDS: readonly SearchedField[] = ['symbol', 'label', 'entry', 'source', 'note'];

/** The lines, stages and other rows that hold a text, in the order of the worksheet; capitals do not matter. None for an empty text. */
export function matchesOf(evaluation: Evaluation, text: string): readonly Match[] {
  const wanted = withoutCapitals(text.trim());
  if (wanted === '') return [];
  const inLine = (line: Line): Match[] => {
    const field = FIELDS.find((one) => withoutCapitals(textOf(line, one)).includes(wanted));
    return field === undefined ? [] : [{ lineId: line.id, field }];
  };
  return evaluation.worksheet.sections.flatMap((section) => [
    ...(isLinesSection(section) ? section.lines.flatMap(inLine) : []),
    ...itemRows(evaluation, section).flatMap(({ line, symbol, label, summary }) =>
      inLine({ ...line, symbol, label, entry: summary }),
    ),
  ]);
}

function textOf(line: Line, field: SearchedField): string {
  return field === 'entry' ? entriesOf(line).join('\n') : (line[field] ?? '');
}

/** The place of the match to go to next: after (or before) the one at `from`, round the end. −1 without matches. */
export function nextMatch(count: number, from: number, direction: 1 | -1): number {
  if (count === 0) return -1;
  if (from < 0) return direction === 1 ? 0 : count - 1;
  return (from + direction + count) % count;
}

/**
 * Where lines stand, by id: an index for each list of lines.
 * Holds: an index is made when first asked for, at most once for each state of a list, and handed on while no line of the list
 * moves, so that a change of one line costs nothing per line but the copy of its list.
 */
import { assert } from '../base';
import { isLinesSection, type Line, type Worksheet } from './document';

type LineIndex = ReadonlyMap<string, number>;

const indexes = new WeakMap<readonly Line[], LineIndex>();

function indexOf(lines: readonly Line[]): LineIndex {
  const known = indexes.get(lines);
  if (known !== undefined) return known;
  const index = new Map<string, number>();
  lines.forEach((line, at) => index.set(line.id, at));
  assert(index.size === lines.length, 'every line has an id of its own');
  indexes.set(lines, index);
  return index;
}

/** Tells that the lines of `to` have the ids and places of those of `from`. */
export function handOnIndex(from: readonly Line[], to: readonly Line[]): void {
  const known = indexes.get(from);
  if (known !== undefined) indexes.set(to, known);
}

/** Where the line stands, as indexes of its section and of the line in it, or undefined. */
export function placeOfLine(
  worksheet: Worksheet,
  lineId: string,
): { readonly sectionIndex: number; readonly lineIndex: number } | undefined {
  for (const [sectionIndex, section] of worksheet.sections.entries()) {
    const lineIndex = isLinesSection(section) ? indexOf(section.lines).get(lineId) : undefined;
    if (lineIndex !== undefined) return { sectionIndex, lineIndex };
  }
  return undefined;
}

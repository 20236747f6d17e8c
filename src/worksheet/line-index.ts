/**
 * The index of a worksheet's lines by id.
 * Holds: it is made at most once for each state of the document and handed on while no line moves, so that a change of one
 * line costs nothing per line of the worksheet but the copy of one list.
 */
import { assert } from '../base';
import { isLinesSection, type Worksheet } from './document';

/** Where each line stands, by line id. */
export type LineIndex = ReadonlyMap<string, { readonly sectionId: string; readonly at: number }>;

const indexes = new WeakMap<Worksheet, LineIndex>();

/** The index of the worksheet's lines, made when first asked for. */
export function lineIndexOf(worksheet: Worksheet): LineIndex {
  const known = indexes.get(worksheet);
  if (known !== undefined) return known;
  const index = new Map<string, { sectionId: string; at: number }>();
  for (const section of worksheet.sections) {
    if (!isLinesSection(section)) continue;
    section.lines.forEach((line, at) => {
      assert(!index.has(line.id), `two lines have the id ${line.id}`);
      index.set(line.id, { sectionId: section.id, at });
    });
  }
  indexes.set(worksheet, index);
  return index;
}

/** Tells that the lines of `to` have the ids and places of those of `from`, so that it needs no index of its own. */
export function handOnIndex(from: Worksheet, to: Worksheet): void {
  const known = indexes.get(from);
  if (known !== undefined) indexes.set(to, known);
}

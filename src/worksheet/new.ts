/** New worksheets: an empty one, and a copy under an id of its own. */
import { newShortId, newUuid } from '../base';
import type { LinesSection, Worksheet } from './document';
import { withKey, WORKSHEET_KEYS } from './keys';

/** An empty section of lines with a fresh id. */
export function newSection(title = ''): LinesSection {
  return { id: newShortId(), kind: 'lines', title, lines: [] };
}

/** An empty worksheet: one case, *Nominal*, and one section without lines. */
export function newWorksheet(title = 'New worksheet'): Worksheet {
  return { id: newUuid(), title, cases: [{ id: 'nominal', name: 'Nominal' }], sections: [newSection()] };
}

/** The same worksheet as a document of its own: a new id, and `Copy of …` as title unless another is given. */
export function duplicateWorksheet(worksheet: Worksheet, title = `Copy of ${worksheet.title}`): Worksheet {
  return withKey(withKey(worksheet, 'id', newUuid(), WORKSHEET_KEYS), 'title', title, WORKSHEET_KEYS);
}

/**
 * Keeping what was typed, and where the cursor goes then: down, to the next cell, back, or nowhere.
 * Holds: a text that is refused leaves its editor open with the reason; nothing typed is lost on the way.
 */
import { cellsOf, type CellName } from './columns';
import { editOf, isEditable } from './cell-texts';
import type { GridModel } from './grid-model.svelte';
import { lineKey, sectionKey, type Row } from './rows';

/** Where to go after keeping a text. */
export type Move = 'stay' | 'down' | 'up' | 'next' | 'previous';

/**
 * Keeps a text typed in the open editor's cell and moves on. The answer is the reason when it cannot be kept, and the
 * editor stays open.
 */
export function keepText(model: GridModel, text: string, move: Move): string | undefined {
  const { editing, session } = model;
  if (editing === null) return undefined;
  const row = model.rows[model.indexOf(editing.row)];
  if (row === undefined) {
    model.editing = null;
    return undefined;
  }
  const isNothing = (row.kind === 'add' || row.kind === 'new-section') && text.trim() === '';
  let key = row.key;
  if (!isNothing) {
    const edit = editOf(session.worksheet, row, editing.cell, text);
    if (!edit.ok) return edit.fault;
    if (!session.perform(edit.value)) return session.readOnlyReason ?? undefined;
    if (row.kind === 'line' && edit.value.changes.length > 0) session.lastEditedLineId = row.line.id;
    key = keyAfter(row, edit.value.focus) ?? key;
  }
  model.editing = null;
  go(model, key, editing.cell, move);
  return undefined;
}

/** The row in which the cell now is: a place for a new line has become that line. */
function keyAfter(row: Row, focus: { readonly kind: string } | undefined): string | undefined {
  if (focus === undefined || (row.kind !== 'add' && row.kind !== 'new-section')) return undefined;
  if (focus.kind === 'lines' && 'lineIds' in focus) {
    const [lineId] = focus.lineIds as readonly string[];
    return lineId === undefined ? undefined : lineKey(lineId);
  }
  return focus.kind === 'section' && 'sectionId' in focus ? sectionKey(focus.sectionId as string) : undefined;
}

function go(model: GridModel, key: string, cell: CellName, move: Move): void {
  switch (move) {
    case 'stay':
      model.put({ row: key, cell });
      break;
    case 'next':
    case 'previous':
      goAlong(model, key, cell, move === 'next' ? 1 : -1);
      return;
    case 'down':
    case 'up': {
      // A run of cells filled with Tab ends with Enter: the next one begins below its first cell.
      const start = model.runStart ?? cell;
      model.put({ row: key, cell: start });
      goToLine(model, move === 'down' ? 1 : -1);
      break;
    }
  }
  model.runStart = null;
}

/** To the next line (or place for one) below or above, over headings and findings. */
function goToLine(model: GridModel, direction: 1 | -1): void {
  const from = model.indexOf(model.cursor.row);
  const { cell } = model.cursor;
  if (model.rows[from]?.kind === 'section' && direction === 1) {
    model.moveRows(1);
    return;
  }
  for (let index = from + direction; ; index += direction) {
    const row = model.rows[index];
    if (row === undefined) return;
    if (row.kind === 'line' || row.kind === 'add') {
      const cells = cellsOf(row, model.columns);
      model.put({ row: row.key, cell: cells.includes(cell) ? cell : (cells[cells.length - 1] ?? cell) });
      return;
    }
  }
}

/** To the next or previous cell to type in, through the rows, and opens its editor. */
function goAlong(model: GridModel, key: string, cell: CellName, direction: 1 | -1): void {
  model.runStart ??= cell;
  let index = model.indexOf(key);
  let row = model.rows[index];
  let at = row === undefined ? -1 : cellsOf(row, model.columns).indexOf(cell) + direction;
  while (row !== undefined) {
    const cells = cellsOf(row, model.columns);
    const next = cells[at];
    if (next !== undefined && (row.kind === 'line' || row.kind === 'add') && isEditable(row, next)) {
      model.put({ row: row.key, cell: next });
      model.edit();
      return;
    }
    if (next !== undefined) {
      at += direction;
      continue;
    }
    index += direction;
    row = model.rows[index];
    model.runStart = null;
    if (row !== undefined) at = direction === 1 ? 0 : cellsOf(row, model.columns).length - 1;
  }
  model.put({ row: key, cell });
}

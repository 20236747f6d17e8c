/**
 * What the grid does with keys and the pointer, outside of an open editor.
 * Holds: a key that types something opens the editor before the browser delivers the character, so that it goes there, also
 * from input methods; what an open editor holds is kept before the pointer does anything else.
 */
import { flushSync } from 'svelte';
import { actionFor, typesText } from '../../app/keys';
import { isEditable } from './cell-texts';
import type { CellName } from './columns';
import { runAction } from './grid-commands';
import type { Cell, GridModel } from './grid-model.svelte';

/** The cell that an event came from. */
export function cellAt(target: EventTarget | null): Cell | undefined {
  if (!(target instanceof Element)) return undefined;
  const cell = target.closest<HTMLElement>('[data-cell]')?.dataset['cell'];
  const row = target.closest<HTMLElement>('[data-row]')?.dataset['row'];
  return cell === undefined || row === undefined ? undefined : { row, cell: cell as CellName };
}

/** A key in the grid: an action of the key table, or the first character of an entry. */
export function onGridKey(model: GridModel, event: KeyboardEvent): void {
  if (
    event.defaultPrevented ||
    event.isComposing ||
    model.editing !== null ||
    model.menuRow !== null ||
    model.unitMenu !== null
  )
    return;
  if (cellAt(event.target) === undefined) return;
  const pressesButton = event.target instanceof HTMLButtonElement && (event.key === 'Enter' || event.key === ' ');
  if (pressesButton && !event.altKey && !event.ctrlKey) return;
  const action = actionFor(event, 'grid');
  if (action === undefined) {
    const row = model.cursorRow;
    if (typesText(event) && row !== undefined && isEditable(row, model.cursor.cell)) flushSync(() => model.edit(true));
    return;
  }
  const before = model.cursor;
  if (!runAction(model, action)) return;
  event.preventDefault();
  event.stopPropagation();
  if (hasOpened(model)) return;
  // What a move takes out of the page and puts in again loses the focus, though the cursor is where it was.
  const mayLoseFocus = action === 'fold' || action === 'move-up' || action === 'move-down';
  if (model.cursor !== before || mayLoseFocus) void model.focusCursor();
}

/** True when an action has opened an editor or a menu, which takes the focus by itself. */
function hasOpened(model: GridModel): boolean {
  return model.editing !== null || model.menuRow !== null;
}

/** A press on a cell: the cursor goes there; pressing where it is already opens the editor. */
export function onGridPress(model: GridModel, event: MouseEvent): void {
  if (!(event.target instanceof Element) || event.target.closest('button, input, [role="menu"]') !== null) return;
  const at = cellAt(event.target);
  if (at === undefined) return;
  event.preventDefault();
  if (model.editing !== null && document.activeElement instanceof HTMLElement) {
    const { activeElement } = document;
    flushSync(() => activeElement.blur());
  }
  const row = model.rows[model.indexOf(at.row)];
  if (row === undefined) return;
  // The secondary button on a selection leaves it as it is, for the menu.
  if (event.button === 2 && row.kind === 'line' && model.selectedLineIds.includes(row.line.id)) return;
  const isAgain = model.hasFocus && model.cursor.row === at.row && model.cursor.cell === at.cell;
  const isOnUnit = event.target.closest('[data-unit]') !== null;
  const opens = event.button === 0 && !event.shiftKey && !isOnUnit && isEditable(row, at.cell);
  model.put(at, { extend: event.shiftKey });
  if (opens && (isAgain || row.kind === 'add' || row.kind === 'new-section')) model.edit();
  else void model.focusCursor();
}

/** A click on the unit of a figure: the menu of units. */
export function onGridClick(model: GridModel, event: MouseEvent): void {
  const unit = event.target instanceof Element ? event.target.closest<HTMLElement>('[data-unit]') : null;
  const at = cellAt(unit);
  const row = at === undefined ? undefined : model.rows[model.indexOf(at.row)];
  if (unit === null || row?.kind !== 'line' || event.shiftKey || model.editing !== null) return;
  model.unitMenu = { lineId: row.line.id, anchor: unit };
}

/** The menu of a row in place of the browser's own; not in fields. */
export function onGridMenu(model: GridModel, event: MouseEvent): void {
  if (event.target instanceof Element && event.target.closest('input') !== null) return;
  const at = cellAt(event.target);
  const row = at === undefined ? undefined : model.rows[model.indexOf(at.row)];
  if (row?.kind !== 'line' && row?.kind !== 'section') return;
  event.preventDefault();
  model.menuRow = row.key;
}

/**
 * What a line-up does with keys and the pointer, outside of an open editor.
 * Holds: a key that types something opens the editor before the browser delivers the character, so that it goes there; what an
 * open editor holds is kept before the pointer does anything else.
 */
import { flushSync } from 'svelte';
import { actionFor, typesText } from '../../app/keys';
import { runChainAction } from './chain-commands';
import type { ChainCell, ChainModel } from './chain-model.svelte';
import { ADD_ROW, isTypedIn, type ChainCellName } from './chain-texts';

/** The cell that an event came from. */
function cellAt(target: EventTarget | null): ChainCell | undefined {
  if (!(target instanceof Element)) return undefined;
  const cell = target.closest<HTMLElement>('[data-cell]')?.dataset['cell'];
  const row = target.closest<HTMLElement>('[data-stage]')?.dataset['stage'];
  return cell === undefined || row === undefined ? undefined : { row, cell: cell as ChainCellName };
}

/** A key in the line-up: an action of the key table, or the first character of an entry. */
export function onChainKey(model: ChainModel, event: KeyboardEvent): void {
  if (event.defaultPrevented || event.isComposing || model.isOpen()) return;
  if (cellAt(event.target) === undefined) return;
  const pressesMenu = event.target instanceof HTMLButtonElement && (event.key === 'Enter' || event.key === ' ');
  if (pressesMenu && !event.altKey && !event.ctrlKey) return;
  const action = actionFor(event, 'grid');
  if (action === undefined) {
    const { row, cell } = model.cursor;
    if (typesText(event) && isTypedIn(row, cell)) flushSync(() => model.edit(true));
    return;
  }
  if (!runChainAction(model, action)) return;
  event.preventDefault();
  event.stopPropagation();
  if (!model.isOpen()) void model.focusCursor();
}

/** A press on a cell: the cursor goes there; pressing where it is already opens the editor. */
export function onChainPress(model: ChainModel, event: MouseEvent): void {
  if (!(event.target instanceof Element) || event.target.closest('button, input, [role="menu"]') !== null) return;
  const at = cellAt(event.target);
  if (at === undefined) return;
  event.preventDefault();
  const { activeElement } = document;
  if (model.editing !== null && activeElement instanceof HTMLElement) flushSync(() => activeElement.blur());
  const { row, cell } = model.cursor;
  const isThere = row === at.row && cell === at.cell && (model.table?.contains(activeElement) ?? false);
  model.put(at);
  if (event.button === 0 && (isThere || at.row === ADD_ROW)) model.edit();
  if (model.editing === null) void model.focusCursor();
}

/** The menu of a stage in place of the browser's own; not in fields. */
export function onChainMenu(model: ChainModel, event: MouseEvent): void {
  const at = cellAt(event.target);
  if (at === undefined || at.row === ADD_ROW || event.target instanceof HTMLInputElement) return;
  event.preventDefault();
  model.put(at);
  model.menuRow = at.row;
}

/**
 * What the grid's keys and menus do: each action of the key table, on the cursor's row or the selected lines.
 * Holds: worksheets change through edits alone, and each action is one step to undo.
 */
import type { Action } from '../../app/keys';
import { isOpen } from '../../app/finding-counts';
import type { LineFinding } from '../../engine';
import {
  deleteLines,
  deleteSection,
  freeSymbol,
  duplicateLines,
  insertLine,
  insertSection,
  isLinesSection,
  moveLines,
  moveSection,
  newChain,
  newCurve,
  newPool,
  placeAbove,
  placeBelow,
  symbolsIn,
  type Edit,
} from '../../worksheet';
import { clearingEdit, isEditable } from './cell-texts';
import type { GridModel } from './grid-model.svelte';
import { addKey, type Row } from './rows';

/** Does an action; true when the grid knows it, so that the browser is not to do anything of its own. */
export function runAction(model: GridModel, action: Action): boolean {
  const { session } = model;
  switch (action) {
    case 'up':
    case 'down':
      model.moveRows(action === 'up' ? -1 : 1);
      return true;
    case 'left':
    case 'right':
      model.moveCells(action === 'left' ? -1 : 1);
      return true;
    case 'row-start':
    case 'row-end':
      model.moveCells(action === 'row-start' ? -Infinity : Infinity);
      return true;
    case 'sheet-start':
    case 'sheet-end':
      model.moveRows(action === 'sheet-start' ? -Infinity : Infinity);
      // The last row's cells beyond its title add sections of other kinds: nobody is to come there by going to the end.
      if (model.cursorRow?.kind !== 'new-section') model.moveCells(action === 'sheet-start' ? -Infinity : Infinity);
      return true;
    case 'page-up':
    case 'page-down':
      model.moveRows(action === 'page-up' ? -model.view.rowsPerView : model.view.rowsPerView);
      return true;
    case 'extend-up':
    case 'extend-down':
      model.extendRows(action === 'extend-up' ? -1 : 1);
      return true;
    case 'select-all':
      model.selectAll();
      return true;
    case 'collapse-selection':
      session.selection.anchorId = null;
      return true;
    case 'edit':
      activate(model);
      return true;
    case 'clear':
      clear(model);
      return true;
    case 'insert-below':
    case 'insert-above':
      insert(model, action === 'insert-above');
      return true;
    case 'new-section':
      addSection(model);
      return true;
    case 'duplicate':
      onLines(model, (ids) => duplicateLines(session.worksheet, ids));
      return true;
    case 'delete-lines':
      remove(model);
      return true;
    case 'move-up':
    case 'move-down':
      move(model, action === 'move-up' ? 'up' : 'down');
      return true;
    case 'fold':
      fold(model);
      return true;
    case 'menu':
      model.menuRow = model.cursor.row;
      return true;
    case 'repair':
      repair(model);
      return true;
    case 'accept':
      accept(model);
      return true;
    default:
      return false;
  }
}

/** Enter on a cell: opens its editor, or does what the cell is for. */
function activate(model: GridModel): void {
  const row = model.cursorRow;
  const { cell } = model.cursor;
  if (row === undefined) return;
  if (opensPanel(row, cell)) model.session.openPanel();
  else if (cell === 'new chain' || cell === 'new pool' || cell === 'new curve') addOfKind(model, cell);
  else if (isEditable(row, cell)) model.edit();
  else if (cell === 'margin' && row.kind === 'line') model.menuRow = row.key;
  else if (cell === 'margin') fold(model);
  else if (row.kind === 'finding') activateFinding(model, row.finding, cell);
}

/** Enter on what is shown and changed in the panel. */
const opensPanel = (row: Row, cell: string): boolean => row.kind === 'item' && cell !== 'margin';

/** Adds a chain, a pool or a curve at the end. */
export function addOfKind(model: GridModel, cell: 'new chain' | 'new pool' | 'new curve'): void {
  const { session } = model;
  const { worksheet } = session;
  const taken = symbolsIn(worksheet);
  const makers = {
    'new chain': () => newChain(freeSymbol('rx', taken), 'Receiver'),
    'new pool': () => newPool(freeSymbol('N_I', taken), 'Noise and interference'),
    'new curve': () => newCurve(freeSymbol('G_curve', taken), 'Curve'),
  };
  const edit = insertSection(worksheet, worksheet.sections.length, makers[cell]());
  if (!session.perform(edit) || edit.focus === undefined) return;
  // Lines of a pool are typed in the account; stages and points in the panel.
  const goesOn = cell === 'new pool';
  session.focusRequest = { focus: edit.focus, edit: false, ...(goesOn ? {} : { quiet: true }) };
  if (!goesOn) session.openPanel();
}

function activateFinding(model: GridModel, finding: LineFinding, cell: string): void {
  if (cell === 'accept') {
    if (finding.accepted === undefined) model.session.askToAccept(finding);
    else model.session.unaccept(finding);
    return;
  }
  const wanted = cell.startsWith('repair ') ? Number(cell.slice(7)) : 0;
  const chosen = finding.repairs[wanted];
  if (chosen !== undefined) model.session.repair(finding, chosen);
}

function clear(model: GridModel): void {
  const row = model.cursorRow;
  if (row?.kind !== 'line') return;
  const { session } = model;
  const ids = model.selectedLineIds;
  if (ids.length > 1) {
    onLines(model, (all) => deleteLines(session.worksheet, all));
    return;
  }
  session.perform(clearingEdit(session.worksheet, row.line.id, model.cursor.cell));
}

function insert(model: GridModel, above: boolean): void {
  const row = model.cursorRow;
  const { session } = model;
  if (row === undefined) return;
  const line = row.kind === 'line' || row.kind === 'finding' ? row.line : undefined;
  if (line !== undefined) {
    const place = above ? placeAbove(session.worksheet, line.id) : placeBelow(session.worksheet, line.id);
    session.perform(insertLine(session.worksheet, place), { follow: true });
    return;
  }
  if (row.kind === 'section') {
    model.setCollapsed(row.section.id, false);
    if (!isLinesSection(row.section)) {
      session.openPanel();
      return;
    }
    const first = row.section.lines[0];
    if (first === undefined) model.put({ row: addKey(row.section.id), cell: 'symbol' });
    else session.perform(insertLine(session.worksheet, placeAbove(session.worksheet, first.id)), { follow: true });
  } else if (row.kind === 'add') model.edit();
}

function sectionIdOf(model: GridModel, row: Row): string | undefined {
  if (row.kind === 'section' || row.kind === 'add' || row.kind === 'other-section') return row.section.id;
  if (row.kind === 'line' || row.kind === 'item') return row.sectionId;
  if (row.kind === 'new-section') return undefined;
  for (let index = model.indexOf(row.key); index >= 0; index--) {
    const above = model.rows[index];
    if (above?.kind === 'section') return above.section.id;
  }
  return undefined;
}

function addSection(model: GridModel): void {
  const row = model.cursorRow;
  const { session } = model;
  const id = row === undefined ? undefined : sectionIdOf(model, row);
  const at = session.worksheet.sections.findIndex((section) => section.id === id);
  const index = at < 0 ? session.worksheet.sections.length : at + 1;
  const edit = insertSection(session.worksheet, index);
  if (session.perform(edit) && edit.focus !== undefined) session.focusRequest = { focus: edit.focus, edit: true };
}

function remove(model: GridModel): void {
  const row = model.cursorRow;
  const { session } = model;
  if (row?.kind === 'section' || row?.kind === 'other-section') {
    if (session.perform(deleteSection(session.worksheet, row.section.id), { follow: true })) {
      session.announce('Section deleted. Undo brings it back.');
    }
    return;
  }
  onLines(model, (ids) => deleteLines(session.worksheet, ids));
}

function move(model: GridModel, direction: 'up' | 'down'): void {
  const row = model.cursorRow;
  const { session } = model;
  if (row?.kind === 'section' || row?.kind === 'other-section') {
    session.perform(moveSection(session.worksheet, row.section.id, direction), { follow: true });
    return;
  }
  const { anchorId } = session.selection;
  const { cursor } = model;
  const lineIds = model.selectedLineIds;
  if (lineIds.length === 0) return;
  session.perform(moveLines(session.worksheet, lineIds, direction));
  model.put(cursor);
  session.selection.anchorId = anchorId;
}

function fold(model: GridModel): void {
  const row = model.cursorRow;
  if (row?.kind === 'section') model.setCollapsed(row.section.id, !row.collapsed);
  else if ((row?.kind === 'line' || row?.kind === 'item') && row.findings.length > 0)
    model.setUnfolded(row.line.id, !row.unfolded);
  else if (row?.kind === 'finding') {
    const { line } = row;
    model.lookAt({ kind: 'lines', lineIds: [line.id] });
    model.setUnfolded(line.id, false);
  }
}

/** The open findings of the cursor's line; of the line edited last, when the cursor has gone on from it. */
function findingsAtHand(model: GridModel): readonly LineFinding[] {
  const row = model.cursorRow;
  if (row?.kind === 'finding') return [row.finding];
  const own = row?.kind === 'line' || row?.kind === 'item' ? row.findings.filter(isOpen) : [];
  const { session } = model;
  if (own.length > 0 || session.lastEditedLineId === null) return own;
  return session.findings(session.lastEditedLineId).filter(isOpen);
}

function repair(model: GridModel): void {
  const { session } = model;
  const finding = findingsAtHand(model).find((one) => one.repairs.length > 0);
  const first = finding?.repairs[0];
  if (finding === undefined || first === undefined) session.announce('There is nothing to repair here.');
  else session.repair(finding, first);
}

function accept(model: GridModel): void {
  const finding = findingsAtHand(model).find((one) => one.severity !== 'error');
  if (finding === undefined) model.session.announce('There is nothing to accept here; errors are put right instead.');
  else model.session.askToAccept(finding);
}

function onLines(model: GridModel, makeEdit: (lineIds: readonly string[]) => Edit): void {
  const ids = model.selectedLineIds;
  const row = model.cursorRow;
  if (ids.length === 0 || (row?.kind !== 'line' && row?.kind !== 'finding')) return;
  model.session.perform(makeEdit(ids), { follow: true });
}

/**
 * What keys, menus and the pointer do in a line-up beyond typing.
 * Holds: worksheets change through edits alone, each one step to undo; a move is said in the live region with its place.
 */
import { canAnswer } from '../../app/answers';
import { findingsOfChain, repairInChain, withChainRepairs } from '../../app/chain-findings';
import type { Action } from '../../app/keys';
import type { LineFinding } from '../../engine';
import {
  deleteStage,
  duplicateStage,
  insertStage,
  moveStageTo,
  newStage,
  setStageOff,
  setStageValue,
  stageOverrideIn,
  type Edit,
  type Stage,
} from '../../worksheet';
import { caseConcerned, fieldOf, isTypedIn, stageIn } from './chain-texts';
import type { ChainModel } from './chain-model.svelte';

/** Does an action; true when the line-up knows it, so that nobody else is to do anything. */
export function runChainAction(model: ChainModel, action: Action): boolean {
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
      return true;
    case 'edit':
      activate(model);
      return true;
    case 'menu':
      if (cursorStage(model) !== undefined) model.menuRow = model.cursor.row;
      return true;
    case 'clear':
      clear(model);
      return true;
    case 'insert-below':
    case 'insert-above':
      insert(model, action === 'insert-above');
      return true;
    case 'duplicate':
      duplicate(model);
      return true;
    case 'delete-lines':
      remove(model);
      return true;
    case 'move-up':
    case 'move-down':
      moveBy(model, action === 'move-up' ? -1 : 1);
      return true;
    case 'repair':
      repair(model);
      return true;
    case 'accept':
      accept(model);
      return true;
    case 'undo':
    case 'redo':
      travel(model, action);
      return true;
    default:
      return false;
  }
}

const cursorStage = (model: ChainModel): Stage | undefined =>
  model.chain === undefined ? undefined : stageIn(model.chain, model.cursor.row);

/** How a stage is called in what is said. */
export const calledStage = (stage: Stage): string => stage.symbol || stage.label || 'the stage';

/** Enter on a cell: opens its editor, or does what the cell is for. */
function activate(model: ChainModel): void {
  const { row, cell } = model.cursor;
  if (cell === 'place') model.menuRow = row;
  else if (cell === 'on') toggle(model);
  else if (isTypedIn(row, cell)) model.edit();
}

/** Bypasses the stage of the cursor, or puts it back. */
export function toggle(model: ChainModel): void {
  const { session, sectionId } = model;
  const stage = cursorStage(model);
  if (stage === undefined) return;
  const off = stage.off !== true;
  if (session.perform(setStageOff(session.worksheet, sectionId, stage.id, off)))
    session.announce(`${calledStage(stage)} is ${off ? 'bypassed' : 'put back'}.`);
}

/** Clears a value; in a case that has one of its own, the stage's own counts again. */
function clear(model: ChainModel): void {
  const { session, sectionId } = model;
  const stage = cursorStage(model);
  const field = fieldOf(model.cursor.cell);
  if (stage === undefined || field === undefined) return;
  const place = model.placeOf(model.cursor);
  const caseId = caseConcerned(session.worksheet, stage, place);
  if (caseId !== undefined && stageOverrideIn(stage, field, caseId) === undefined) {
    session.announce('This case has no entry of its own here.');
    return;
  }
  session.perform(setStageValue(session.worksheet, sectionId, stage.id, field, '', caseId));
}

function insert(model: ChainModel, above: boolean): void {
  const { session, sectionId } = model;
  const at = model.rows.indexOf(model.cursor.row);
  const stage = newStage();
  const isOnStage = cursorStage(model) !== undefined;
  if (!session.perform(insertStage(session.worksheet, sectionId, above || !isOnStage ? at : at + 1, stage))) return;
  model.put({ row: stage.id, cell: 'symbol' });
  model.edit();
}

function duplicate(model: ChainModel): void {
  const { session, sectionId } = model;
  const stage = cursorStage(model);
  if (stage === undefined) return;
  const at = model.rows.indexOf(stage.id);
  const { cell } = model.cursor;
  if (session.perform(duplicateStage(session.worksheet, sectionId, stage.id)))
    model.put({ row: model.rows[at + 1] ?? stage.id, cell });
}

function remove(model: ChainModel): void {
  const { session, sectionId } = model;
  const stage = cursorStage(model);
  if (stage === undefined) return;
  if (session.perform(deleteStage(session.worksheet, sectionId, stage.id)))
    session.announce(`${calledStage(stage)} deleted. Undo brings it back.`);
}

function moveBy(model: ChainModel, by: 1 | -1): void {
  const stage = cursorStage(model);
  if (stage !== undefined) moveStage(model, stage.id, model.rows.indexOf(stage.id) + by);
}

/** Moves a stage to a place, counted after it has been taken out, and says so. */
export function moveStage(model: ChainModel, stageId: string, index: number): void {
  const { session, sectionId, chain } = model;
  const stage = chain === undefined ? undefined : stageIn(chain, stageId);
  if (chain === undefined || stage === undefined) return;
  const edit: Edit = moveStageTo(session.worksheet, sectionId, stageId, index);
  const { cell } = model.cursor;
  if (!session.perform(edit)) return;
  model.put({ row: stageId, cell });
  const place = model.rows.indexOf(stageId) + 1;
  session.announce(`${calledStage(stage)} is stage ${String(place)} of ${String(chain.stages.length)}.`);
}

/** The open findings on the stage with the cursor. */
function findingsAtHand({ session, sectionId, cursor }: ChainModel): readonly LineFinding[] {
  const { evaluation } = session;
  return findingsOfChain(evaluation, session.sheetFindings(), sectionId).filter(
    ({ lineId, accepted }) => accepted === undefined && evaluation.originOf(lineId)?.stageId === cursor.row,
  );
}

/** Does the first repair there is for the stage. */
function repair(model: ChainModel): void {
  const { session } = model;
  for (const finding of findingsAtHand(model)) {
    const [first] = withChainRepairs(finding).repairs;
    const edit = first === undefined ? undefined : repairInChain(session.evaluation, finding, first);
    if (first === undefined || edit === undefined) continue;
    if (session.perform(edit)) session.announce(`Repaired: ${first.title}.`);
    return;
  }
  session.announce('There is nothing to repair here.');
}

/** Asks for the reason with which the first finding that can be answered is accepted. */
function accept(model: ChainModel): void {
  const { session } = model;
  const finding = findingsAtHand(model).find(
    ({ lineId, severity }) => severity !== 'error' && canAnswer(session.worksheet, session.evaluation, lineId),
  );
  if (finding === undefined) session.announce('There is nothing to accept here.');
  else session.askToAccept(finding);
}

/** Undoes or redoes; the focus stays here when what changed is this chain. */
function travel(model: ChainModel, action: 'undo' | 'redo'): void {
  const { session } = model;
  session[action]();
  const focus = session.focusRequest?.focus;
  if (focus?.kind === 'section' && focus.sectionId === model.sectionId) session.focusRequest = null;
}

/**
 * Where a dragged stage would go: `middles` are the heights of the middles of the stages' rows, in order, `y` that of the
 * pointer. The answer counts after the stage has been taken out.
 */
export function dropPlace(middles: readonly number[], from: number, y: number): number {
  return middles.filter((middle, i) => i !== from && middle < y).length;
}

/** How the row with this index is marked while a stage is dragged: the stage itself, or the row beside which it would come. */
export function dropMark(model: ChainModel, index: number): 'dragged' | 'drop-before' | 'drop-behind' | undefined {
  const { dragging } = model;
  if (dragging === null) return undefined;
  const from = model.rows.indexOf(dragging.stageId);
  if (index === from) return 'dragged';
  if (index !== dragging.to) return undefined;
  return dragging.to < from ? 'drop-before' : 'drop-behind';
}

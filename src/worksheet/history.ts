/**
 * History: a worksheet with the edits that led to it and those that were undone, as plain immutable data.
 * Holds: undoing every edit gives back the worksheet as it was; redoing what was undone gives back the worksheet before. The
 * last 5,000 edits can be undone; older ones stay done. Each committed edit is one step: none are merged.
 */
import { applyAll, type Change } from './changes';
import type { Worksheet } from './document';
import type { Edit, Focus } from './edit';

/** How many edits can be undone. */
export const HISTORY_LIMIT = 5000;

/** An edit that was done, with the changes that undo it. */
export interface Step {
  readonly edit: Edit;
  readonly inverse: readonly Change[];
}

/** A worksheet with what was done to it. */
export interface History {
  readonly worksheet: Worksheet;
  /** The last one is undone first. */
  readonly done: readonly Step[];
  /** The last one is redone first. */
  readonly undone: readonly Edit[];
}

/** What an undo or redo came to. */
export interface Travel {
  readonly history: History;
  /** The changes that were applied to the worksheet. */
  readonly changes: readonly Change[];
  /** The label of the edit that was undone or redone. */
  readonly label: string;
  /** Where to look now; absent: stay. */
  readonly focus?: Focus;
}

/** A history that begins with this worksheet. */
export function startHistory(worksheet: Worksheet): History {
  return { worksheet, done: [], undone: [] };
}

/** The history after one more edit; what was undone can no longer be redone. An edit without changes leaves it as it is. */
export function perform(history: History, edit: Edit): History {
  if (edit.changes.length === 0) return history;
  return { ...stepOn(history, edit), undone: [] };
}

function stepOn(history: History, edit: Edit): History {
  const { worksheet, inverse } = applyAll(history.worksheet, edit.changes);
  const kept = history.done.length < HISTORY_LIMIT ? history.done : history.done.slice(1 - HISTORY_LIMIT);
  return { worksheet, done: kept.concat({ edit, inverse }), undone: history.undone };
}

/** Takes the last edit back; undefined when there is none. */
export function undo(history: History): Travel | undefined {
  const step = history.done[history.done.length - 1];
  if (step === undefined) return undefined;
  const { edit, inverse } = step;
  const { worksheet } = applyAll(history.worksheet, inverse);
  return {
    history: { worksheet, done: history.done.slice(0, -1), undone: [...history.undone, edit] },
    changes: inverse,
    label: edit.label,
    ...(edit.focusBefore && { focus: edit.focusBefore }),
  };
}

/** Does the last undone edit again; undefined when there is none. */
export function redo(history: History): Travel | undefined {
  const edit = history.undone[history.undone.length - 1];
  if (edit === undefined) return undefined;
  return {
    history: stepOn({ ...history, undone: history.undone.slice(0, -1) }, edit),
    changes: edit.changes,
    label: edit.label,
    ...(edit.focus && { focus: edit.focus }),
  };
}

/** The label of the edit that `undo` would take back, or undefined when there is none. */
export function undoLabel(history: History): string | undefined {
  return history.done[history.done.length - 1]?.edit.label;
}

/** The label of the edit that `redo` would do again, or undefined when there is none. */
export function redoLabel(history: History): string | undefined {
  return history.undone[history.undone.length - 1]?.label;
}

/** True when there is an edit to undo. */
export function canUndo(history: History): boolean {
  return history.done.length > 0;
}

/** True when there is an edit to redo. */
export function canRedo(history: History): boolean {
  return history.undone.length > 0;
}

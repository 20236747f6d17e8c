/** What the table of points does with keys and with pasted text. */
import { readPastedPoints } from '../../exchange';
import type { PointMove, PointsModel } from './points-model.svelte';

const MOVES: Readonly<Record<string, PointMove>> = {
  ArrowUp: 'up',
  ArrowDown: 'down',
  ArrowLeft: 'left',
  ArrowRight: 'right',
  Home: 'left',
  End: 'right',
};

/** A key while the cursor stands in a cell; true when it had a meaning. */
export function onPointKey(model: PointsModel, event: KeyboardEvent, rowsOfPage: number): boolean {
  if (event.altKey || event.metaKey) return false;
  const { key } = event;
  if (event.ctrlKey) {
    if (key !== 'Home' && key !== 'End') return false;
    model.move(key === 'Home' ? 'first' : 'last');
    return true;
  }
  const move = Object.hasOwn(MOVES, key) ? MOVES[key] : undefined;
  if (move !== undefined) model.move(move);
  else if (key === 'PageDown' || key === 'PageUp') model.page(key === 'PageDown' ? rowsOfPage : -rowsOfPage);
  else if (key === 'Enter' || key === 'F2') model.edit(false);
  else if (key === 'Delete' || key === 'Backspace') model.remove();
  else return false;
  return true;
}

/** A key while a figure is being typed; true when it had a meaning. */
export function onPointEditorKey(model: PointsModel, { key, shiftKey }: KeyboardEvent): boolean {
  if (key === 'Enter') model.keep(shiftKey ? 'up' : 'down');
  else if (key === 'Tab') model.keep(shiftKey ? 'before' : 'next');
  else if (key === 'Escape') model.cancel();
  else return false;
  return true;
}

/** What is done with a pasted text: points of a table, a figure for the cell, or what the field being typed in does with it. */
export function wayOfPaste(model: PointsModel, text: string): 'points' | 'figure' | 'by the browser' {
  const trimmed = text.trim();
  const isTable = /[\t\r\n;]/.test(trimmed);
  if (model.isReadOnly || trimmed === '' || (model.typed !== null && !isTable)) return 'by the browser';
  if (isTable) return 'points';
  // One row: `1,5` is a figure with a decimal comma, `1, 5` and `1 5` are a point.
  return /\s/.test(trimmed) && readPastedPoints(trimmed).points.length > 0 ? 'points' : 'figure';
}

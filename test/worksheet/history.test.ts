import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import * as w from '../../src/worksheet';
import { editDraws, editOf, MANY, worksheets } from './arbitrary';

const performAll = (start: w.Worksheet, draws: readonly Parameters<typeof editOf>[1][]): w.History => {
  let history = w.startHistory(start);
  for (const draw of draws) {
    const edit = editOf(history.worksheet, draw);
    if (edit !== undefined) history = w.perform(history, edit);
  }
  return history;
};

describe('laws', () => {
  it('undoing everything gives back the worksheet, redoing everything the worksheet after', MANY, () => {
    fc.assert(
      fc.property(worksheets, fc.array(editDraws, { minLength: 1, maxLength: 12 }), (start, draws) => {
        const done = performAll(start, draws);
        let back = done;
        for (let travel = w.undo(back); travel !== undefined; travel = w.undo(back)) back = travel.history;
        expect(back.worksheet).toEqual(start);
        expect(JSON.stringify(back.worksheet)).toBe(JSON.stringify(start));
        let again = back;
        for (let travel = w.redo(again); travel !== undefined; travel = w.redo(again)) again = travel.history;
        expect(again.worksheet).toEqual(done.worksheet);
        expect(JSON.stringify(again.worksheet)).toBe(JSON.stringify(done.worksheet));
        expect(again.done.map((step) => step.edit.label)).toEqual(done.done.map((step) => step.edit.label));
      }),
      { numRuns: 300 },
    );
  });

  it('any walk of undo and redo lands on a worksheet that was there', MANY, () => {
    fc.assert(
      fc.property(
        worksheets,
        fc.array(editDraws, { minLength: 1, maxLength: 8 }),
        fc.array(fc.boolean()),
        (start, draws, walk) => {
          let history = w.startHistory(start);
          const states = [start];
          for (const draw of draws) {
            const edit = editOf(history.worksheet, draw);
            const next = edit === undefined ? history : w.perform(history, edit);
            if (next !== history) states.push(next.worksheet);
            history = next;
          }
          let at = states.length - 1;
          for (const isUndo of walk) {
            const travel = isUndo ? w.undo(history) : w.redo(history);
            if (travel === undefined) continue;
            history = travel.history;
            at += isUndo ? -1 : 1;
            expect(history.worksheet).toEqual(states[at]);
          }
        },
      ),
      { numRuns: 200 },
    );
  });
});

describe('history', () => {
  const start = w.newWorksheet('Buoy');
  const titled = (history: w.History, title: string): w.History =>
    w.perform(history, w.setTitle(history.worksheet, title));

  it('has nothing to undo or redo at the beginning', () => {
    const history = w.startHistory(start);
    expect([w.canUndo(history), w.canRedo(history), w.undo(history), w.redo(history)]).toEqual([
      false,
      false,
      undefined,
      undefined,
    ]);
    expect([w.undoLabel(history), w.redoLabel(history)]).toEqual([undefined, undefined]);
  });

  it('takes each edit as one step, names it, and tells where to look', () => {
    const section = start.sections[0]?.id ?? '';
    const edit = w.insertLine(start, { sectionId: section, index: 0 }, { entry: '14 dBm' });
    const history = w.perform(w.startHistory(start), edit);
    expect(w.undoLabel(history)).toBe('Insert line');
    const undone = w.undo(history);
    expect(undone?.focus).toEqual({ kind: 'section', sectionId: section });
    expect(undone?.changes).toHaveLength(1);
    expect(undone && w.redoLabel(undone.history)).toBe('Insert line');
    const redone = undone && w.redo(undone.history);
    expect(redone?.focus).toEqual(edit.focus);
    expect(redone?.history.worksheet).toEqual(history.worksheet);
  });

  it('leaves an edit without changes out', () => {
    const history = titled(w.startHistory(start), 'Mooring');
    expect(titled(history, 'Mooring')).toBe(history);
  });

  it('forgets what was undone when another edit is made', () => {
    const undone = w.undo(titled(titled(w.startHistory(start), 'A'), 'B'))?.history;
    expect(undone && w.canRedo(undone)).toBe(true);
    const other = undone && titled(undone, 'C');
    expect(other && [w.canRedo(other), other.worksheet.title, other.done.length]).toEqual([false, 'C', 2]);
  });

  it('keeps the last 5,000 edits', MANY, () => {
    let history = w.startHistory(start);
    for (let i = 1; i <= w.HISTORY_LIMIT + 3; i++) history = titled(history, `title ${String(i)}`);
    expect(history.done).toHaveLength(5000);
    for (let travel = w.undo(history); travel !== undefined; travel = w.undo(history)) history = travel.history;
    expect(history.worksheet.title).toBe('title 3');
    expect(history.undone).toHaveLength(5000);
  });
});

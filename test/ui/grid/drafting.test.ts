// Drafting with the keyboard, without a browser: the grid's state, its commands, and where the cursor goes.
import { describe, expect, it } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import type { Action } from '../../../src/app/keys';
import { fail } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import { keepText, type Move } from '../../../src/ui/grid/editing';
import { runAction } from '../../../src/ui/grid/grid-commands';
import { GridModel } from '../../../src/ui/grid/grid-model.svelte';
import { lineKey, sectionKey } from '../../../src/ui/grid/rows';
import { allLines, type Worksheet } from '../../../src/worksheet';
import { sheetOf } from '../../app/support';

const budget = sheetOf([
  {
    title: 'Buoy',
    lines: [
      ['P_tx', 'Transmit power', '14 dBm'],
      ['G', 'Gain', '2 dBi'],
    ],
  },
  {
    title: 'Noise',
    lines: [
      ['N', 'Noise', '-117 dBm'],
      ['I', 'Interference', '-110 dBm'],
      ['N_tot', 'Both', 'N + I'],
    ],
  },
]);

async function grid(worksheet?: Worksheet): Promise<GridModel> {
  const session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  if (worksheet !== undefined) await session.opening.importText(writeWorksheetFile(worksheet));
  const model = new GridModel(session);
  follow(model);
  return model;
}

/** What the grid component does with wishes for the cursor. */
function follow(model: GridModel): void {
  const { focusRequest } = model.session;
  model.session.focusRequest = null;
  if (focusRequest !== null) model.lookAt(focusRequest.focus);
  if (focusRequest?.edit === true) model.edit();
  model.rescueCursor();
}

function run(model: GridModel, ...actions: readonly Action[]): void {
  for (const action of actions) {
    runAction(model, action);
    follow(model);
  }
}

/** Types into the cursor's cell, or the open editor, and goes on. */
function type(model: GridModel, text: string, move: Move): void {
  if (model.editing === null) model.edit(true);
  expect(keepText(model, text, move)).toBeUndefined();
  follow(model);
}

const at = (model: GridModel): string => {
  const row = model.cursorRow;
  const name = row?.kind === 'line' ? row.line.symbol : row?.kind;
  return `${name ?? 'nowhere'} ${model.cursor.cell}`;
};
const symbols = (model: GridModel): string[] => allLines(model.session.worksheet).map((line) => line.symbol);
const put = (model: GridModel, lineId: string, cell: Parameters<GridModel['put']>[0]['cell']): void =>
  model.put({ row: lineKey(lineId), cell });

describe('typing a budget', () => {
  it('begins in the place for the first line', async () => {
    expect(at(await grid())).toBe('add symbol');
  });

  it('goes along with Tab and back below the first cell with Enter, line after line', async () => {
    const model = await grid();
    type(model, 'P_tx', 'next');
    expect(at(model)).toBe('P_tx label');
    expect(model.editing).not.toBeNull();
    type(model, 'Transmit power', 'next');
    type(model, '14 dBm', 'down');
    expect(at(model)).toBe('add symbol');
    expect(model.editing).toBeNull();
    type(model, 'G', 'next');
    type(model, 'Gain', 'next');
    type(model, '2 dBi', 'down');
    expect(allLines(model.session.worksheet).map((line) => [line.symbol, line.label, line.entry])).toEqual([
      ['P_tx', 'Transmit power', '14 dBm'],
      ['G', 'Gain', '2 dBi'],
    ]);
  });

  it('goes straight down from a cell that was opened alone', async () => {
    const model = await grid(budget);
    put(model, 'P_tx', 'entry');
    type(model, '13 dBm', 'down');
    expect(at(model)).toBe('G entry');
    type(model, '3 dBi', 'down');
    expect(at(model)).toBe('add entry');
  });

  it('goes over headings, findings and places from line to line', async () => {
    const model = await grid(budget);
    put(model, 'N_tot', 'entry');
    type(model, 'N + I + N', 'down');
    expect(at(model)).toBe('add entry');
    put(model, 'N', 'label');
    model.edit();
    type(model, 'Noise', 'up');
    expect(at(model)).toBe('add label');
  });

  it('goes back with Shift+Tab, over the margin', async () => {
    const model = await grid(budget);
    put(model, 'G', 'symbol');
    type(model, 'G', 'previous');
    expect(at(model)).toBe('P_tx requirement');
  });

  it('makes no line of nothing', async () => {
    const model = await grid();
    type(model, '  ', 'down');
    expect(symbols(model)).toEqual([]);
    expect(model.session.sheet.undoLabel).toBeUndefined();
  });

  it('keeps the editor open with the reason when a symbol is refused', async () => {
    const model = await grid(budget);
    put(model, 'G', 'symbol');
    model.edit(true);
    expect(keepText(model, 'P_tx', 'down')).toMatch(/Another line has the symbol/);
    expect(model.editing).not.toBeNull();
    expect(symbols(model)).toEqual(symbols(await grid(budget)));
  });
});

describe('moving', () => {
  it('keeps to its column over rows that lack it, and stops at the edges', async () => {
    const model = await grid(budget);
    put(model, 'G', 'case storm');
    run(model, 'down');
    expect(at(model)).toBe('add entry');
    run(model, 'down');
    expect(at(model)).toBe('section title');
    run(model, 'down');
    expect(at(model)).toBe('N case storm');
    run(model, 'row-end', 'right', 'right');
    expect(at(model)).toBe('N requirement');
    run(model, 'sheet-start', 'up', 'left');
    expect(at(model)).toBe('section margin');
    run(model, 'sheet-end', 'down');
    expect(at(model)).toBe('new-section title');
  });

  it('selects the case whose column it is in', async () => {
    const model = await grid(budget);
    put(model, 'G', 'case storm');
    expect(model.session.selectedCaseId).toBe('storm');
  });

  it('reaches a finding and its repairs with the arrows', async () => {
    const model = await grid(budget);
    put(model, 'N_tot', 'entry');
    run(model, 'down');
    expect(at(model)).toBe('finding finding');
    expect(model.session.selectedLineId).toBe('N_tot');
    run(model, 'right');
    expect(at(model)).toBe('finding repair 0');
  });
});

describe('lines', () => {
  it('are inserted below and above, with the cursor on the new one', async () => {
    const model = await grid(budget);
    put(model, 'P_tx', 'entry');
    run(model, 'insert-below');
    expect(symbols(model)).toEqual(['P_tx', '', 'G', 'N', 'I', 'N_tot']);
    expect(model.indexOf(model.cursor.row)).toBe(2);
    run(model, 'insert-above');
    expect(symbols(model).slice(0, 4)).toEqual(['P_tx', '', '', 'G']);
  });

  it('are selected, moved, duplicated and deleted together', async () => {
    const model = await grid(budget);
    put(model, 'P_tx', 'label');
    run(model, 'extend-down', 'extend-down');
    expect(model.selectedLineIds).toEqual(['P_tx', 'G', 'N']);
    run(model, 'collapse-selection', 'extend-down', 'move-up');
    expect(symbols(model)).toEqual(['P_tx', 'G', 'N', 'I', 'N_tot']);
    expect(model.selectedLineIds).toEqual(['N', 'I']);
    run(model, 'duplicate');
    expect(symbols(model)).toHaveLength(7);
    expect(model.selectedLineIds).toHaveLength(2);
    run(model, 'delete-lines');
    expect(symbols(model)).toEqual(['P_tx', 'G', 'N', 'I', 'N_tot']);
  });

  it('lose a cell’s content with Delete, and undo brings cursor and content back', async () => {
    const model = await grid(budget);
    put(model, 'G', 'entry');
    run(model, 'clear');
    expect(model.session.reading('G', 'calm').figure.state).toBe('empty');
    run(model, 'sheet-end');
    model.session.undo();
    follow(model);
    expect(at(model)).toBe('G entry');
  });
});

describe('sections', () => {
  it('fold their lines away, which selecting a line among them undoes', async () => {
    const model = await grid(budget);
    model.put({ row: sectionKey('s2'), cell: 'margin' });
    run(model, 'fold');
    expect(model.rows.filter((row) => row.kind === 'line')).toHaveLength(2);
    model.session.select('I');
    follow(model);
    expect(at(model)).toBe('I symbol');
    expect(model.isCollapsed('s2')).toBe(false);
  });

  it('are made, moved and deleted', async () => {
    const model = await grid(budget);
    put(model, 'P_tx', 'entry');
    run(model, 'new-section');
    expect(model.session.worksheet.sections.map((one) => one.title)).toEqual(['Buoy', '', 'Noise']);
    expect(model.editing?.cell).toBe('title');
    type(model, 'Path', 'stay');
    run(model, 'move-down');
    expect(model.session.worksheet.sections.map((one) => one.title)).toEqual(['Buoy', 'Noise', 'Path']);
    run(model, 'delete-lines');
    expect(model.session.worksheet.sections.map((one) => one.title)).toEqual(['Buoy', 'Noise']);
  });
});

describe('findings', () => {
  it('are repaired with one key, also after the cursor has gone on', async () => {
    const model = await grid(budget);
    put(model, 'N_tot', 'entry');
    type(model, 'I + N', 'down');
    expect(at(model)).toBe('add entry');
    run(model, 'repair');
    expect(allLines(model.session.worksheet)[4]?.entry).toBe('powersum(I, N)');
    expect(model.session.counts.errors).toBe(0);
  });

  it('that were put right leave the cursor on their line', async () => {
    const model = await grid(budget);
    put(model, 'N_tot', 'entry');
    run(model, 'down', 'right', 'edit');
    expect(allLines(model.session.worksheet)[4]?.entry).toBe('powersum(N, I)');
    expect(at(model)).toMatch(/^N_tot /);
  });

  it('fold and open', async () => {
    const model = await grid(budget);
    put(model, 'N_tot', 'entry');
    run(model, 'fold');
    expect(model.rows.some((row) => row.kind === 'finding')).toBe(false);
    run(model, 'fold');
    expect(model.rows.some((row) => row.kind === 'finding')).toBe(true);
  });

  it('that are errors cannot be accepted', async () => {
    const model = await grid(budget);
    put(model, 'N_tot', 'entry');
    run(model, 'accept');
    expect(model.session.dialog).toBeNull();
  });
});

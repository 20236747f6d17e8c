// The state of a chain's panel without a page: the cursor, typing for all cases and for one, and what keys do to stages.
import { beforeEach, describe, expect, it } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import { dropMark, dropPlace, moveStage, runChainAction, toggle } from '../../../src/ui/chain/chain-commands';
import { ChainModel } from '../../../src/ui/chain/chain-model.svelte';
import { ADD_ROW, type ChainCellName } from '../../../src/ui/chain/chain-texts';
import type { Stage } from '../../../src/worksheet';
import { chainSheet } from '../../app/chain-sheet';

let session: Session;
let model: ChainModel;

beforeEach(async () => {
  session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await session.opening.importText(writeWorksheetFile(chainSheet()));
  model = new ChainModel(session, 'rx');
});

const stages = (): readonly Stage[] => model.chain?.stages ?? [];
const symbols = (): string =>
  stages()
    .map(({ symbol }) => symbol)
    .join(' ');
const at = (row: string, cell: ChainCellName): void => model.put({ row, cell });

/** Types a text in the cursor's cell. */
function type(text: string, move: 'stay' | 'down' | 'next' = 'stay'): string | undefined {
  model.edit(true);
  return model.keep(text, move);
}

describe('the cursor', () => {
  it('begins on the first stage and stops at the edges', () => {
    expect(model.cursor).toEqual({ row: 's1', cell: 'symbol' });
    model.moveRows(-1);
    expect(model.cursor.row).toBe('s1');
    model.moveRows(Infinity);
    expect(model.cursor).toEqual({ row: ADD_ROW, cell: 'symbol' });
    model.moveRows(-Infinity);
    model.moveCells(-Infinity);
    expect(model.cursor).toEqual({ row: 's1', cell: 'place' });
    model.moveCells(Infinity);
    expect(model.cursor.cell).toBe('distortion_share');
  });

  it('keeps to its column across the row for a new stage', () => {
    at('s3', 'gain');
    model.moveRows(1);
    expect(model.cursor).toEqual({ row: ADD_ROW, cell: 'symbol' });
    model.moveRows(-1);
    expect(model.cursor).toEqual({ row: 's3', cell: 'gain' });
  });

  it('is on the nearest stage when its own goes', () => {
    at('s2', 'gain');
    runChainAction(model, 'delete-lines');
    expect(symbols()).toBe('fil mix');
    expect(model.cursor).toEqual({ row: 's3', cell: 'gain' });
    session.undo();
    expect(symbols()).toBe('fil lna mix');
  });

  it('goes to the symbol when its column goes', () => {
    at('s1', 'out.te');
    model.showColumn('out.te', false);
    expect(model.cursor).toEqual({ row: 's1', cell: 'symbol' });
  });
});

describe('columns', () => {
  it('stay as chosen while the session lasts', () => {
    model.showColumn('temperature', true);
    expect(model.isShown('temperature')).toBe(true);
    expect(new ChainModel(session, 'rx').isShown('temperature')).toBe(true);
    const other = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
    expect(new ChainModel(other, 'rx').isShown('temperature')).toBe(false);
  });
});

describe('typing', () => {
  it('changes the stage’s own value, in all cases', () => {
    at('s1', 'gain');
    expect(type('-3 dB', 'down')).toBeUndefined();
    expect(stages()[0]).toMatchObject({ gain: '-3 dB' });
    expect(stages()[0]?.byCase).toBeUndefined();
    expect(model.cursor).toEqual({ row: 's2', cell: 'gain' });
  });

  it('makes an override when entries are for the case alone', () => {
    session.selection.caseId = 'storm';
    model.onlyThisCase = true;
    at('s1', 'gain');
    type('-4 dB');
    expect(stages()[0]).toMatchObject({ gain: '-2 dB', byCase: { storm: { gain: '-4 dB' } } });
  });

  it('changes the override that counts, and Delete takes it away', () => {
    session.selection.caseId = 'storm';
    at('s2', 'gain');
    expect(model.textOf(model.cursor)).toBe('16 dB');
    type('15 dB');
    expect(stages()[1]).toMatchObject({ gain: '18 dB', byCase: { storm: { gain: '15 dB' } } });
    runChainAction(model, 'clear');
    expect(stages()[1]?.byCase).toBeUndefined();
    expect(stages()[1]?.gain).toBe('18 dB');
    runChainAction(model, 'clear');
    expect(stages()[1]?.gain).toBeUndefined();
  });

  it('for the case alone, Delete leaves the stage’s own value', () => {
    session.selection.caseId = 'storm';
    model.onlyThisCase = true;
    at('s1', 'gain');
    runChainAction(model, 'clear');
    expect(stages()[0]?.gain).toBe('-2 dB');
  });

  it('keeps an editor open with a symbol that cannot be', () => {
    at('s1', 'symbol');
    expect(type('lna')).toMatch(/Another stage of this chain has the symbol lna/);
    expect(model.editing).not.toBeNull();
    expect(model.problemOf(model.cursor, '1x')).toMatch(/begins with a letter/);
    model.cancel();
    expect(symbols()).toBe('fil lna mix');
  });

  it('renames a stage wherever it is used', () => {
    at('s2', 'symbol');
    type('amp');
    expect(symbols()).toBe('fil amp mix');
  });

  it('goes along with Tab over what cannot be typed in, and Enter ends below where it began', () => {
    at('s1', 'label');
    type('Front filter', 'next');
    expect(model.cursor).toEqual({ row: 's1', cell: 'gain' });
    expect(model.editing).toMatchObject({ row: 's1', cell: 'gain', typed: false });
    model.keep('-1 dB', 'next');
    expect(model.editing).toMatchObject({ cell: 'noiseFigure' });
    model.keep('', 'down');
    expect(model.editing).toBeNull();
    expect(model.cursor).toEqual({ row: 's2', cell: 'label' });
  });

  it('goes from the last value of a stage to the next stage', () => {
    at('s1', 'outputIntercept');
    type('', 'next');
    expect(model.editing).toMatchObject({ row: 's2', cell: 'symbol' });
  });

  it('opens nothing where nothing can be typed', () => {
    for (const cell of ['place', 'on', 'out.gain'] as const) {
      at('s1', cell);
      model.edit(true);
      expect(model.editing).toBeNull();
    }
  });
});

describe('a new stage', () => {
  it('begins in the last row with its symbol', () => {
    at(ADD_ROW, 'symbol');
    type('if_amp', 'next');
    expect(symbols()).toBe('fil lna mix if_amp');
    expect(model.editing).toMatchObject({ row: stages()[3]?.id, cell: 'label' });
  });

  it('is none for no symbol', () => {
    at(ADD_ROW, 'symbol');
    type(' ', 'down');
    expect(stages()).toHaveLength(3);
    expect(model.editing).toBeNull();
  });

  it('comes behind the stage with the cursor, or ahead, with its editor open', () => {
    at('s1', 'gain');
    runChainAction(model, 'insert-below');
    expect(stages()[1]).toMatchObject({ symbol: '', label: '' });
    expect(model.editing).toMatchObject({ row: stages()[1]?.id, cell: 'symbol' });
    model.keep('pad', 'stay');
    expect(symbols()).toBe('fil pad lna mix');
    at('s1', 'gain');
    runChainAction(model, 'insert-above');
    model.keep('lim', 'stay');
    expect(symbols()).toBe('lim fil pad lna mix');
  });
});

describe('stages', () => {
  it('are duplicated, with the cursor on the copy', () => {
    at('s2', 'gain');
    runChainAction(model, 'duplicate');
    expect(symbols()).toBe('fil lna lna_2 mix');
    expect(model.cursor).toEqual({ row: stages()[2]?.id, cell: 'gain' });
  });

  it('are moved with the cursor, and the place is said', () => {
    at('s1', 'gain');
    runChainAction(model, 'move-down');
    expect(symbols()).toBe('lna fil mix');
    expect(model.cursor).toEqual({ row: 's1', cell: 'gain' });
    runChainAction(model, 'move-up');
    runChainAction(model, 'move-up');
    expect(symbols()).toBe('fil lna mix');
    moveStage(model, 's1', 2);
    expect(symbols()).toBe('lna mix fil');
  });

  it('are bypassed and put back', () => {
    at('s2', 'on');
    toggle(model);
    expect(stages()[1]?.off).toBe(true);
    runChainAction(model, 'edit');
    expect(stages()[1]?.off).toBeUndefined();
  });

  it('are dropped between those whose middles the pointer is', () => {
    const middles = [10, 30, 50, 70];
    expect(dropPlace(middles, 0, 5)).toBe(0);
    expect(dropPlace(middles, 0, 35)).toBe(1);
    expect(dropPlace(middles, 0, 90)).toBe(3);
    expect(dropPlace(middles, 3, 20)).toBe(1);
    expect(dropPlace(middles, 2, 52)).toBe(2);
  });

  it('show where a dragged one would come', () => {
    model.dragging = { stageId: 's1', to: 2 };
    expect([0, 1, 2].map((index) => dropMark(model, index))).toEqual(['dragged', undefined, 'drop-behind']);
    model.dragging = { stageId: 's3', to: 0 };
    expect([0, 1, 2].map((index) => dropMark(model, index))).toEqual(['drop-before', undefined, 'dragged']);
    model.dragging = null;
    expect(dropMark(model, 0)).toBeUndefined();
  });

  it('come back with undo, and nobody is sent elsewhere', () => {
    session.focusRequest = null;
    at('s2', 'gain');
    type('20 dB');
    runChainAction(model, 'undo');
    expect(stages()[1]?.gain).toBe('18 dB');
    expect(session.focusRequest).toBeNull();
    runChainAction(model, 'redo');
    expect(stages()[1]?.gain).toBe('20 dB');
  });
});

describe('findings at hand', () => {
  it('are repaired in the stage with the cursor', () => {
    at('s2', 'outputIntercept');
    type('S + S');
    runChainAction(model, 'repair');
    expect(stages()[1]?.outputIntercept).toBe('powersum(S, S)');
  });

  it('are accepted by a reason that is asked for', () => {
    at('s1', 'noiseFigure');
    type('1 dB');
    runChainAction(model, 'accept');
    expect(session.findingToAccept?.code).toBe('figure-below-loss');
    expect(session.dialog).toBe('accept');
  });

  it('are none on a sound stage', () => {
    at('s3', 'gain');
    runChainAction(model, 'repair');
    runChainAction(model, 'accept');
    expect(stages()[2]?.gain).toBe('-6 dB');
    expect(session.findingToAccept).toBeNull();
  });
});

it('leaves to others what it does not know', () => {
  for (const action of ['search', 'new-section', 'select-all', 'linear'] as const)
    expect(runChainAction(model, action)).toBe(false);
});

// Going from finding to finding, and taking a pasted table.
import { describe, expect, it } from 'vitest';

import { goToFinding, takePastedTable } from '../../src/app/page-commands';
import { itemRows, rowOfItem } from '../../src/app/item-rows';
import { Session } from '../../src/app/session.svelte';
import { Settings } from '../../src/app/settings.svelte';
import { fail } from '../../src/base';
import { linesFromPreview, previewTable, writeWorksheetFile } from '../../src/exchange';
import { allLines } from '../../src/worksheet';
import { chainSheet } from './chain-sheet';
import { sheet } from './support';

async function session(...lines: Parameters<typeof sheet>[0]): Promise<Session> {
  const made = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await made.opening.importText(writeWorksheetFile(sheet(lines)));
  made.focusRequest = null;
  return made;
}

const wanted = (made: Session): unknown =>
  made.focusRequest?.focus.kind === 'lines' ? made.focusRequest.focus.lineIds[0] : undefined;

describe('going to findings', () => {
  const lines = [
    ['A', 'one', 'x + 1'],
    ['B', 'two', '3 dB'],
    ['C', 'three', 'y + 1'],
  ] as const;

  it.each([
    [null, 1, 'A'],
    ['A', 1, 'C'],
    ['C', 1, 'A'],
    ['B', -1, 'A'],
    ['A', -1, 'C'],
  ] as const)('from %s by %i to %s', async (from, direction, to) => {
    const made = await session(...lines);
    made.selection.put(from);
    goToFinding(made, direction);
    expect(wanted(made)).toBe(to);
  });

  it('goes through the findings of a chain, of its stages and of lines behind it, and round', async () => {
    const made = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
    const stage = { label: '', gain: '-3 dB', noiseFigure: '1 dB' };
    const stages = ['a', 'b', 'c'].map((symbol) => ({ ...stage, id: symbol, symbol }));
    await made.opening.importText(writeWorksheetFile(chainSheet({ stages, noise: '30 K', signal: 'nowhere' })));
    const told: string[] = [];
    for (let i = 0; i < 7; i++) {
      made.focusRequest = null;
      goToFinding(made, 1);
      const id = wanted(made) as string;
      const at = made.evaluation.originOf(id);
      told.push(at?.stageId ?? (at === undefined ? id : 'chain'));
      // What the grid does: the cursor goes to the row that tells of it.
      const section = made.worksheet.sections.find((one) => one.id === at?.sectionId);
      const row = section && rowOfItem(itemRows(made.evaluation, section), made.evaluation, id);
      made.selection.put(row?.line.id ?? id);
    }
    expect(told.slice(0, 4)).toEqual(['a', 'b', 'c', 'chain']);
    expect(told.slice(4)).toContain('a');
  });

  it('says so when there is none', async () => {
    const made = await session(['B', 'two', '3 dB']);
    goToFinding(made, 1);
    made.announcer.flush();
    expect(made.announcer.text).toContain('There are no open findings.');
    expect(wanted(made)).toBeUndefined();
  });
});

describe('a pasted table', () => {
  it('becomes lines in one step', async () => {
    const made = await session(['B', 'two', '3 dB']);
    made.paste = { text: 'Transmit power\t10\tdBm\r\nCable loss\t1,5\tdB\r\n', place: { sectionId: 's1', index: 1 } };
    made.dialog = 'paste';
    takePastedTable(made, linesFromPreview(made.worksheet, previewTable(made.paste.text)));
    expect(allLines(made.worksheet).map((line) => [line.symbol, line.entry])).toEqual([
      ['B', '3 dB'],
      ['P_tx', '10 dBm'],
      ['L_cable', '1.5 dB'],
    ]);
    expect(made.dialog).toBeNull();
    made.undo();
    expect(allLines(made.worksheet)).toHaveLength(1);
  });
});

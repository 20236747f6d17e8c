// Going from finding to finding, and taking a pasted table.
import { describe, expect, it } from 'vitest';

import { goToFinding, takePastedTable } from '../../src/app/page-commands';
import { Session } from '../../src/app/session.svelte';
import { Settings } from '../../src/app/settings.svelte';
import { fail } from '../../src/base';
import { linesFromPreview, previewTable, writeWorksheetFile } from '../../src/exchange';
import { allLines } from '../../src/worksheet';
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

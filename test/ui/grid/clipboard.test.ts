// Lines on the clipboard, out and in.
import { describe, expect, it } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail } from '../../../src/base';
import { LINES_MEDIA_TYPE, writeWorksheetFile } from '../../../src/exchange';
import { GridClipboard } from '../../../src/ui/grid/clipboard';
import type { CellName } from '../../../src/ui/grid/columns';
import { GridModel } from '../../../src/ui/grid/grid-model.svelte';
import { lineKey } from '../../../src/ui/grid/rows';
import { allLines } from '../../../src/worksheet';
import { sheet } from '../../app/support';

const budget = sheet([
  ['P_tx', 'Transmit power', '14 dBm', { byCase: { storm: '-13 dBm' }, note: 'invented' }],
  ['G', 'Gain', '2 dBi'],
  ['EIRP', 'Radiated power', 'P_tx + G'],
]);

async function grid(lineId: string, cell: CellName = 'entry'): Promise<{ model: GridModel; clipboard: GridClipboard }> {
  const session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await session.opening.importText(writeWorksheetFile(budget));
  const model = new GridModel(session);
  model.put({ row: lineKey(lineId), cell });
  return { model, clipboard: new GridClipboard(model) };
}

/** What a browser gives to copy and paste handlers. */
function clipboardEvent(content: Readonly<Record<string, string>> = {}) {
  const data = new Map(Object.entries(content));
  let prevented = false;
  const event = {
    clipboardData: {
      getData: (type: string) => data.get(type) ?? '',
      setData: (type: string, text: string) => void data.set(type, text),
    },
    preventDefault: () => {
      prevented = true;
    },
  } as unknown as ClipboardEvent;
  return { event, data, isPrevented: () => prevented };
}

const symbols = (model: GridModel): string[] => allLines(model.session.worksheet).map((line) => line.symbol);

describe('copying', () => {
  it('gives other programs the figures shown, with plain minus signs', async () => {
    const { model, clipboard } = await grid('P_tx');
    model.extendRows(1);
    const { event, data, isPrevented } = clipboardEvent();
    clipboard.oncopy(event);
    expect(isPrevented()).toBe(true);
    expect(data.get('text/plain')).toBe(
      'P_tx\tTransmit power\t14.00 dBm\t-13.00 dBm\tinvented\r\nG\tGain\t2.00 dBi\t2.00 dBi\t\r\n',
    );
  });

  it('leaves the clipboard alone when no line is selected', async () => {
    const { model, clipboard } = await grid('P_tx');
    model.put({ row: 'new-section', cell: 'title' });
    const { event, data, isPrevented } = clipboardEvent();
    clipboard.oncopy(event);
    expect([data.size, isPrevented()]).toEqual([0, false]);
  });

  it('and pasting keeps every field, and what lines say about each other', async () => {
    const { model, clipboard } = await grid('P_tx');
    model.extendRows(1);
    model.extendRows(1);
    const { event, data } = clipboardEvent();
    clipboard.oncopy(event);
    const { event: back } = clipboardEvent(Object.fromEntries(data));
    clipboard.onpaste(back);
    expect(symbols(model)).toEqual(['P_tx', 'G', 'EIRP', 'P_tx_2', 'G_2', 'EIRP_2']);
    const copy = allLines(model.session.worksheet)[5];
    expect(copy?.entry).toBe('P_tx_2 + G_2');
    expect(allLines(model.session.worksheet)[3]).toMatchObject({ byCase: { storm: '-13 dBm' }, note: 'invented' });
  });

  it('by cutting takes the lines away in one step', async () => {
    const { model, clipboard } = await grid('G');
    const { event, data } = clipboardEvent();
    clipboard.oncut(event);
    expect(symbols(model)).toEqual(['P_tx', 'EIRP']);
    expect(data.has(LINES_MEDIA_TYPE)).toBe(true);
    model.session.undo();
    expect(symbols(model)).toEqual(['P_tx', 'G', 'EIRP']);
  });
});

describe('pasting', () => {
  it('one cell goes into the cell', async () => {
    const { model, clipboard } = await grid('G', 'label');
    clipboard.onpaste(clipboardEvent({ 'text/plain': ' Antenna gain\n' }).event);
    expect(allLines(model.session.worksheet)[1]?.label).toBe('Antenna gain');
  });

  it('a text that the cell cannot take is told, and nothing changes', async () => {
    const { model, clipboard } = await grid('G', 'symbol');
    clipboard.onpaste(clipboardEvent({ 'text/plain': 'P_tx' }).event);
    expect(symbols(model)).toEqual(['P_tx', 'G', 'EIRP']);
    expect(model.session.notice?.text).toMatch(/“P_tx” was not pasted\. Another line/);
  });

  it('a table is shown before it is taken', async () => {
    const { model, clipboard } = await grid('G');
    clipboard.onpaste(clipboardEvent({ 'text/plain': 'Loss\t3\tdB\nGain\t2\tdB' }).event);
    expect(model.session.dialog).toBe('paste');
    expect(model.session.paste).toEqual({ text: 'Loss\t3\tdB\nGain\t2\tdB', place: { sectionId: 's1', index: 2 } });
    expect(symbols(model)).toEqual(['P_tx', 'G', 'EIRP']);
  });

  it('lines that are no lines fall back on the text', async () => {
    const { model, clipboard } = await grid('G', 'label');
    clipboard.onpaste(clipboardEvent({ [LINES_MEDIA_TYPE]: '{"format":"else"}', 'text/plain': 'Gain of both' }).event);
    expect(allLines(model.session.worksheet)[1]?.label).toBe('Gain of both');
  });

  it('does nothing with an empty clipboard', async () => {
    const { model, clipboard } = await grid('G');
    clipboard.onpaste(clipboardEvent({ 'text/plain': '  ' }).event);
    expect(model.session.sheet.undoLabel).toBeUndefined();
  });
});

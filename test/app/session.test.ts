// The session as the page uses it, on a real store over a fake database: edits, undo, keeping, opening, importing.
import { afterEach, describe, expect, it } from 'vitest';

import { saveWords } from '../../src/app/save-words';
import { Session } from '../../src/app/session.svelte';
import { Settings } from '../../src/app/settings.svelte';
import { fail, ok } from '../../src/base';
import { readWorksheetFile, writeWorksheetFile } from '../../src/exchange';
import type { Store } from '../../src/store';
import {
  allLines,
  insertLine,
  locateLine,
  placeAtEnd,
  removeCase,
  setEntry,
  setTitle,
  type Worksheet,
} from '../../src/worksheet';
import { newBrowser, openTab, textOf, valueOf } from '../store/support';
import { sheet } from './support';

const budget = sheet(
  [
    ['P_tx', 'Transmit power', '14 dBm', { byCase: { storm: '13 dBm' } }],
    ['N', 'Noise', '-117 dBm'],
    ['I', 'Interference', '-110 dBm'],
    ['N_tot', 'Both', 'N + I'],
  ],
  'Buoy',
);
const budgetText = writeWorksheetFile(budget);

const opened: Session[] = [];

/** A tab's session; without a browser, one whose storage is switched off. */
async function tab(browser = newBrowser()): Promise<{ session: Session; store: Store; lastId: string | null }> {
  const store = await openTab(browser);
  const settings = new Settings();
  await settings.readFrom(store);
  const lastId = settings.lastWorksheetId;
  const session = new Session(settings, ok(store));
  opened.push(session);
  await session.opening.newWorksheet();
  return { session, store, lastId };
}

function withoutStore(): Session {
  const fault = { code: 'unavailable', sentence: 'No storage.', detail: '' } as const;
  const session = new Session(new Settings(), fail(fault));
  opened.push(session);
  return session;
}

afterEach(async () => {
  for (const session of opened.splice(0)) await session.keeping.release();
});

const figureOf = (session: Session, lineId: string, caseId = 'calm'): unknown => {
  const { figure } = session.reading(lineId, caseId);
  return figure.state === 'value' ? figure.value : figure.state;
};

describe('edits', () => {
  it('change the worksheet, its figures and its findings, and undo takes all of it back', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    expect(figureOf(session, 'N_tot')).toBe('withheld');
    expect(session.counts).toEqual({ errors: 1, warnings: 0, notes: 0 });

    const [finding] = session.findings('N_tot');
    const repair = finding?.repairs[0];
    expect(repair?.title).toContain('powersum');
    if (finding === undefined || repair === undefined) return;
    session.repair(finding, repair);
    expect(figureOf(session, 'N_tot')).toBeCloseTo(-109.21, 2);
    expect(session.counts.errors).toBe(0);

    session.undo();
    expect(session.worksheet).toEqual(budget);
    expect(session.counts.errors).toBe(1);
    session.redo();
    expect(figureOf(session, 'N_tot')).toBeCloseTo(-109.21, 2);
  });

  it('ask for the cursor where undo has changed something', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    session.perform(setEntry(session.worksheet, 'P_tx', '12 dBm', 'storm'));
    session.focusRequest = null;
    session.undo();
    expect(session.focusRequest).toMatchObject({ focus: { kind: 'lines', lineIds: ['P_tx'], caseId: 'storm' } });
  });

  it('say what they changed', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    session.announcer.flush();
    session.perform(setEntry(session.worksheet, 'N_tot', 'powersum(N, I)'));
    session.announcer.flush();
    expect(session.announcer.text).toBe('1 line recalculated, 1 error less.');
    session.redo();
    session.announcer.flush();
    expect(session.announcer.text).toBe('There is nothing to redo.');
  });

  it('keep the selected case one of the worksheet’s', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    session.selection.caseId = 'storm';
    session.perform(removeCase(session.worksheet, 'storm'));
    expect(session.selectedCaseId).toBe('calm');
  });

  it('accept a finding with a reason, and take that back', async () => {
    const { session } = await tab();
    await session.opening.importText(writeWorksheetFile(sheet([['L', 'Loss', '-3 dB']])));
    const [finding] = session.findings('L');
    expect(finding?.code).toBe('negative-loss');
    if (finding === undefined) return;
    session.accept(finding, 'a gain in the other convention');
    expect(session.findings('L')[0]?.accepted).toBe('a gain in the other convention');
    expect(session.counts.notes).toBe(0);
    const [accepted] = session.findings('L');
    if (accepted !== undefined) session.unaccept(accepted);
    expect(session.findings('L')[0]?.accepted).toBeUndefined();
  });
});

describe('keeping', () => {
  it('stores nothing before the first edit, and then every edit', async () => {
    const { session, store } = await tab();
    expect(valueOf(await store.list())).toEqual([]);
    expect(saveWords(session.saveState)).toBe('nothing to save yet');

    const [section] = session.worksheet.sections;
    session.perform(
      insertLine(session.worksheet, placeAtEnd(session.worksheet, section?.id ?? ''), { symbol: 'P_tx' }),
    );
    session.perform(setTitle(session.worksheet, 'First'));
    await session.keeping.flush();
    expect(session.saveState.kind).toBe('saved');
    expect(await textOf(store, session.worksheet.id)).toBe(writeWorksheetFile(session.worksheet));
    expect(valueOf(await store.list()).map((entry) => entry.title)).toEqual(['First']);
  });

  it('finds the worksheet again in another session', async () => {
    const browser = newBrowser();
    const { session } = await tab(browser);
    await session.opening.importText(budgetText);
    session.perform(setEntry(session.worksheet, 'P_tx', '17 dBm'));
    await session.keeping.release();

    const again = await tab(browser);
    expect(again.lastId).toBe(budget.id);
    expect((await again.session.opening.openWorksheet(budget.id)).ok).toBe(true);
    expect(again.session.worksheet).toEqual(session.worksheet);
    expect(figureOf(again.session, 'P_tx')).toBe(17);
  });

  it('notices that another tab saved first, and lets the person choose', async () => {
    const browser = newBrowser();
    const { session, store } = await tab(browser);
    await session.opening.importText(budgetText);
    await session.keeping.flush();
    const stored = valueOf(await store.read(budget.id));
    const theirs = writeWorksheetFile({ ...budget, title: 'Theirs' });
    valueOf(await store.save({ id: budget.id, basedOn: stored.rev, title: 'Theirs', text: theirs, lineCount: 4 }));

    session.perform(setTitle(session.worksheet, 'Mine'));
    await session.keeping.flush();
    expect(session.saveState.kind).toBe('conflict');
    expect(session.keeping.hasUnsaved).toBe(true);
    expect(await textOf(store, budget.id)).toBe(theirs);

    await session.keeping.takeTheirs();
    expect(session.worksheet.title).toBe('Theirs');
    expect(session.keeping.hasUnsaved).toBe(false);
  });

  it('keeps one’s own version of a conflict as a worksheet of its own', async () => {
    const browser = newBrowser();
    const { session, store } = await tab(browser);
    await session.opening.importText(budgetText);
    await session.keeping.flush();
    const stored = valueOf(await store.read(budget.id));
    const theirs = writeWorksheetFile({ ...budget, title: 'Theirs' });
    valueOf(await store.save({ id: budget.id, basedOn: stored.rev, title: 'Theirs', text: theirs, lineCount: 4 }));
    session.perform(setTitle(session.worksheet, 'Mine'));
    await session.keeping.flush();

    await session.opening.keepAsCopy();
    await session.keeping.flush();
    expect(session.worksheet.id).not.toBe(budget.id);
    expect(session.worksheet.title).toBe('Copy of Mine');
    expect(await textOf(store, session.worksheet.id)).toContain('Copy of Mine');
    expect(await textOf(store, budget.id)).toBe(theirs);
  });

  it('says so when there is no storage, and lets everything else work', async () => {
    const session = withoutStore();
    await session.opening.importText(budgetText);
    session.perform(setEntry(session.worksheet, 'P_tx', '17 dBm'));
    expect(session.saveState.kind).toBe('nowhere');
    expect(session.keeping.hasUnsaved).toBe(true);
    expect(figureOf(session, 'P_tx')).toBe(17);
    expect(session.exportFile().text).toContain('17 dBm');
  });

  it('refuses edits while another tab has the worksheet', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    session.keeping.claimState = 'lost';
    expect(session.perform(setTitle(session.worksheet, 'Mine'))).toBe(false);
    expect(session.worksheet.title).toBe('Buoy');
    expect(session.notice?.text).toContain('another tab');
    session.undo();
    expect(session.worksheet.title).toBe('Buoy');
  });
});

describe('opening', () => {
  it('gives a starter an id of its own and keeps it at once', async () => {
    const { session, store } = await tab();
    expect((await session.opening.newWorksheet(budgetText)).ok).toBe(true);
    await session.keeping.flush();
    expect(session.worksheet.id).not.toBe(budget.id);
    expect(allLines(session.worksheet)).toEqual(allLines(budget));
    expect(valueOf(await store.list()).map((entry) => entry.id)).toEqual([session.worksheet.id]);
  });

  it('leaves the open worksheet alone when a file cannot be read', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    const answer = await session.opening.importBytes(new TextEncoder().encode('{"format":"something else"}'));
    expect(answer.ok).toBe(false);
    expect(session.worksheet).toEqual(budget);
  });

  it('sets a stored text aside that cannot be read', async () => {
    const { session, store } = await tab();
    valueOf(await store.create({ id: 'broken', title: 'Broken', text: '{', lineCount: 0 }));
    expect((await session.opening.openWorksheet('broken')).ok).toBe(false);
    const copies = valueOf(await store.recoverable('broken'));
    expect(copies.map((copy) => copy.quarantined === null)).toEqual([false]);
    expect(await textOf(store, 'broken')).toBe('{');
  });

  it('opens a file of a later version to look at only', async () => {
    const { session, store } = await tab();
    await session.opening.importText(budgetText.replace('"version": 1', '"version": 99'));
    expect(session.readOnlyReason).toContain('version 99');
    expect(session.perform(setTitle(session.worksheet, 'Mine'))).toBe(false);
    expect(valueOf(await store.list())).toEqual([]);
    await session.opening.newWorksheet();
    expect(session.readOnlyReason).toBeNull();
  });
});

describe('a file whose worksheet is here already', () => {
  const changed: Worksheet = { ...budget, title: 'Buoy, reviewed' };

  async function offered(): Promise<{ session: Session; store: Store }> {
    const both = await tab();
    await both.session.opening.importText(budgetText);
    await both.session.opening.importText(writeWorksheetFile(changed));
    return both;
  }

  it('is opened at once when it is the same', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    await session.opening.importText(budgetText);
    expect(session.opening.importChoice).toBeNull();
    expect(session.dialog).toBeNull();
  });

  it('is asked about when it differs, and nothing changes until the answer', async () => {
    const { session, store } = await offered();
    expect(session.dialog).toBe('import');
    expect(session.worksheet.title).toBe('Buoy');
    await session.opening.settleImport('cancel');
    expect(session.worksheet.title).toBe('Buoy');
    expect(await textOf(store, budget.id)).toBe(budgetText);
  });

  it('takes the place of what is here, which stays as a recovery copy', async () => {
    const { session, store } = await offered();
    await session.opening.settleImport('replace');
    await session.keeping.flush();
    expect(session.worksheet).toEqual(changed);
    expect(await textOf(store, budget.id)).toBe(writeWorksheetFile(changed));
    const [copy] = valueOf(await store.recoverable(budget.id));
    expect(valueOf(await store.readCopy(copy?.rev ?? -1)).text).toBe(budgetText);
  });

  it('is opened beside it', async () => {
    const { session, store } = await offered();
    await session.opening.settleImport('beside');
    await session.keeping.flush();
    expect(session.worksheet.id).not.toBe(budget.id);
    expect(session.worksheet.title).toBe('Buoy, reviewed');
    expect(await textOf(store, budget.id)).toBe(budgetText);
  });
});

describe('the file', () => {
  it('holds the worksheet, word for word', async () => {
    const { session } = await tab();
    await session.opening.importText(budgetText);
    const { name, text } = session.exportFile();
    expect(name).toBe('buoy.budget.json');
    expect(valueOf(readWorksheetFile(text)).worksheet).toEqual(budget);
    expect(locateLine(session.worksheet, 'P_tx').line.byCase).toEqual({ storm: '13 dBm' });
  });
});

import { Dexie } from 'dexie';
import { describe, expect, it } from 'vitest';

import type { StoreFault, WorksheetEntry } from '../../src/store';

import { createSheet, faultOf, newBrowser, openTab, sheet, tamper, TestClock, textOf, until, valueOf } from './support';

const dayMs = 24 * 3_600_000;
const start = Date.UTC(2031, 4, 6, 9, 30);

describe('keeping worksheets', () => {
  it('lists what was created and saved, without reading the texts, the last saved first', async () => {
    const clock = new TestClock(start);
    const store = await openTab(newBrowser(), { now: clock.now });
    const first = await createSheet(store, 'a', 'one');
    clock.time += 1000;
    await createSheet(store, 'b', 'two');
    clock.time += 1000;
    const saved = valueOf(
      await store.save({ id: 'a', title: 'Ridge hop', text: 'three', lineCount: 7, basedOn: first.rev }),
    );
    expect(valueOf(await store.list())).toEqual([
      {
        ...{ id: 'a', title: 'Ridge hop', createdAt: start, savedAt: start + 2000, deletedAt: null },
        ...{ rev: saved.rev, size: 5, lineCount: 7, standing: 'usable' },
      },
      expect.objectContaining({ id: 'b', title: 'Hillside relay', savedAt: start + 1000 }),
    ]);
    expect(saved.savedAt).toBe(start + 2000);
    expect(await textOf(store, 'a')).toBe('three');
    expect(await textOf(store, 'b')).toBe('two');
  });

  it('keeps worksheets when the browser is closed and opened again', async () => {
    const browser = newBrowser();
    const store = await openTab(browser);
    const { rev } = await createSheet(store, 'a', 'λ 𝄞 \u0000 "quoted"');
    await store.close();
    const again = await openTab(browser);
    expect(valueOf(await again.read('a'))).toMatchObject({ text: 'λ 𝄞 \u0000 "quoted"', rev });
  });

  it('answers `missing` for a worksheet that is not there', async () => {
    const store = await openTab(newBrowser());
    const missing = { code: 'missing', trashed: false };
    expect(faultOf(await store.read('a'))).toMatchObject(missing);
    expect(faultOf(await store.save({ id: 'a', ...sheet('x'), basedOn: 1 }))).toMatchObject(missing);
    expect(faultOf(await store.remove('a'))).toMatchObject(missing);
    expect(faultOf(await store.restore('a'))).toMatchObject(missing);
    expect(faultOf(await store.purge('a'))).toMatchObject(missing);
    expect(faultOf(await store.quarantine('a', 'why'))).toMatchObject(missing);
    expect(faultOf(await store.readCopy(1))).toMatchObject(missing);
    expect(valueOf(await store.recoverable('a'))).toEqual([]);
  });

  it('answers every operation with the reason once it is closed', async () => {
    const store = await openTab(newBrowser());
    await store.close();
    expect(faultOf(await store.list()).code).toBe('unavailable');
    expect(faultOf(await store.create({ id: 'a', ...sheet('x') })).code).toBe('unavailable');
    expect(faultOf(await store.getSetting('theme')).code).toBe('unavailable');
  });
});

describe('two tabs on one worksheet', () => {
  it('refuse a save over a text that its caller has not seen, and hand that text over', async () => {
    const browser = newBrowser();
    const [left, right] = [await openTab(browser), await openTab(browser)];
    const { rev } = await createSheet(left, 'a', 'start');
    const saved = valueOf(await left.save({ id: 'a', ...sheet('left', 'Left'), basedOn: rev }));
    const fault = faultOf(await right.save({ id: 'a', ...sheet('right'), basedOn: rev }));
    expect(fault).toMatchObject({ code: 'conflict', stored: { title: 'Left', text: 'left', rev: saved.rev } });
    expect(await textOf(right, 'a')).toBe('left');
    expect(valueOf(await right.save({ id: 'a', ...sheet('both'), basedOn: saved.rev })).rev).toBeGreaterThan(saved.rev);
  });

  it('refuse to create a worksheet that exists, in the trash too', async () => {
    const store = await openTab(newBrowser());
    await createSheet(store, 'a', 'first');
    const again = { id: 'a', ...sheet('second') };
    expect(faultOf(await store.create(again))).toMatchObject({ code: 'conflict', stored: { text: 'first' } });
    valueOf(await store.remove('a'));
    expect(faultOf(await store.create(again))).toMatchObject({ code: 'conflict', stored: { text: 'first' } });
  });

  it('never use a rev again, so that a save based on a purged worksheet cannot hit its successor', async () => {
    const store = await openTab(newBrowser());
    const { rev } = await createSheet(store, 'a', 'old');
    valueOf(await store.remove('a'));
    valueOf(await store.purge('a'));
    await createSheet(store, 'a', 'new');
    expect(faultOf(await store.save({ id: 'a', ...sheet('stale'), basedOn: rev })).code).toBe('conflict');
    expect(await textOf(store, 'a')).toBe('new');
  });

  it('see each other’s changes in the list', async () => {
    const browser = newBrowser();
    // Dexie's live queries run only where there is a database of the browser's own.
    Dexie.dependencies.indexedDB = browser.indexedDB;
    const [left, right] = [await openTab(browser), await openTab(browser)];
    let seen: readonly WorksheetEntry[] | undefined;
    let calls = 0;
    const stop = right.watch((entries) => {
      seen = valueOf(entries);
      calls += 1;
    });
    await until(() => seen?.length === 0);
    const { rev } = await createSheet(left, 'a', 'one');
    await until(() => seen?.[0]?.rev === rev);
    valueOf(await left.remove('a'));
    await until(() => seen?.[0]?.deletedAt !== null);
    stop();
    const callsBefore = calls;
    valueOf(await left.restore('a'));
    await textOf(left, 'a');
    expect(calls).toBe(callsBefore);
  });
});

describe('the trash', () => {
  it('holds a removed worksheet until it is restored, and takes no saves', async () => {
    const clock = new TestClock(start);
    const store = await openTab(newBrowser(), { now: clock.now });
    const { rev } = await createSheet(store, 'a', 'one');
    valueOf(await store.remove('a'));
    expect(valueOf(await store.read('a'))).toMatchObject({ text: 'one', deletedAt: start });
    const edit = { id: 'a', ...sheet('two'), basedOn: rev };
    expect(faultOf(await store.save(edit))).toMatchObject({ code: 'missing', trashed: true });
    valueOf(await store.restore('a'));
    expect(valueOf(await store.read('a'))).toMatchObject({ text: 'one', deletedAt: null, rev });
    valueOf(await store.save(edit));
  });

  it('is emptied at the next opening of what lay there for thirty days, with its copies', async () => {
    const clock = new TestClock(start);
    const browser = newBrowser();
    const store = await openTab(browser, { now: clock.now });
    const { rev } = await createSheet(store, 'old', 'one');
    valueOf(await store.save({ id: 'old', ...sheet('two'), basedOn: rev }));
    await createSheet(store, 'young', 'three');
    await createSheet(store, 'kept', 'four');
    valueOf(await store.remove('old'));
    clock.time += 1;
    valueOf(await store.remove('young'));

    clock.time = start + 30 * dayMs - 1;
    expect(valueOf(await (await openTab(browser, { now: clock.now })).list())).toHaveLength(3);
    clock.time = start + 30 * dayMs;
    const later = await openTab(browser, { now: clock.now });
    expect(valueOf(await later.list()).map(({ id }) => id)).toEqual(expect.arrayContaining(['young', 'kept']));
    expect(faultOf(await later.read('old')).code).toBe('missing');
    expect(valueOf(await later.recoverable('old'))).toEqual([]);
    expect(faultOf(await later.readCopy(rev)).code).toBe('missing');
  });

  it('alone can be purged', async () => {
    const store = await openTab(newBrowser());
    await createSheet(store, 'a', 'one');
    expect(faultOf(await store.purge('a')).code).toBe('unexpected');
    expect(await textOf(store, 'a')).toBe('one');
    valueOf(await store.remove('a'));
    valueOf(await store.purge('a'));
    expect(valueOf(await store.list())).toEqual([]);
  });
});

describe('recovery copies', () => {
  it('hold each replaced text, the newest first', async () => {
    const store = await openTab(newBrowser());
    let { rev } = await createSheet(store, 'a', 'text 0');
    const revs = [rev];
    for (const count of [1, 2, 3]) {
      ({ rev } = valueOf(await store.save({ id: 'a', ...sheet(`text ${count}`, `Title ${count}`), basedOn: rev })));
      revs.push(rev);
    }
    const copies = valueOf(await store.recoverable('a'));
    expect(copies.map((copy) => copy.rev)).toEqual([revs[2], revs[1], revs[0]]);
    expect(copies[0]).toMatchObject({ title: 'Title 2', size: 6, worksheetId: 'a', quarantined: null });
    expect(valueOf(await store.readCopy(revs[1] ?? 0))).toMatchObject({ text: 'text 1', title: 'Title 1' });
  });

  it('are thinned out as worksheets are saved, and the dropped texts go too', async () => {
    const clock = new TestClock(start);
    const store = await openTab(newBrowser(), { now: clock.now });
    const first = await createSheet(store, 'a', 'text');
    const other = await createSheet(store, 'b', 'other');
    valueOf(await store.save({ id: 'b', ...sheet('other still'), basedOn: other.rev }));
    let { rev } = first;
    for (let count = 0; count < 25; count += 1) {
      ({ rev } = valueOf(await store.save({ id: 'a', ...sheet(`text ${count}`), basedOn: rev })));
    }
    expect(valueOf(await store.recoverable('a'))).toHaveLength(20);
    expect(faultOf(await store.readCopy(first.rev)).code).toBe('missing');
    expect(valueOf(await store.readCopy(other.rev)).text).toBe('other');
  });

  it('keep a quarantined text for good, also one that is still current', async () => {
    const store = await openTab(newBrowser());
    const first = await createSheet(store, 'a', '{"broken');
    valueOf(await store.quarantine('a', 'the text ends too early'));
    let { rev } = first;
    for (let count = 0; count < 25; count += 1) {
      ({ rev } = valueOf(await store.save({ id: 'a', ...sheet(`text ${count}`), basedOn: rev })));
    }
    const copies = valueOf(await store.recoverable('a'));
    expect(copies).toHaveLength(21);
    expect(copies.at(-1)).toMatchObject({ rev: first.rev, quarantined: 'the text ends too early' });
    expect(valueOf(await store.readCopy(first.rev)).text).toBe('{"broken');
  });
});

describe('a worksheet written by a later version of the page', () => {
  it('is listed and read, and no operation of this version changes it', async () => {
    const browser = newBrowser();
    const later = await openTab(browser, { formatVersion: 2 });
    const { rev } = await createSheet(later, 'a', 'later text');
    const earlier = await openTab(browser, { formatVersion: 1 });
    expect(valueOf(await earlier.list())).toMatchObject([{ id: 'a', standing: 'newer' }]);
    expect(valueOf(await earlier.read('a'))).toMatchObject({ text: 'later text', standing: 'newer' });
    const refused: StoreFault[] = [
      faultOf(await earlier.save({ id: 'a', ...sheet('old text'), basedOn: rev })),
      faultOf(await earlier.remove('a')),
      faultOf(await earlier.restore('a')),
      faultOf(await earlier.purge('a')),
      faultOf(await earlier.quarantine('a', 'why')),
    ];
    expect(refused.map(({ code }) => code)).toEqual(Array(5).fill('newer-format'));
    expect(valueOf(await later.read('a'))).toMatchObject({ text: 'later text', rev, deletedAt: null });
    valueOf(await later.save({ id: 'a', ...sheet('later still'), basedOn: rev }));
  });

  it('is not purged from the trash by this version', async () => {
    const browser = newBrowser();
    const later = await openTab(browser, { formatVersion: 2, now: () => start });
    await createSheet(later, 'a', 'text');
    valueOf(await later.remove('a'));
    await openTab(browser, { formatVersion: 1, now: () => start + 40 * dayMs });
    expect(await textOf(later, 'a')).toBe('text');
  });
});

describe('a damaged record', () => {
  it('with its text gone reads as `unreadable`; its copies and a new save bring the worksheet back', async () => {
    const browser = newBrowser();
    const store = await openTab(browser);
    const first = await createSheet(store, 'a', 'one');
    const second = valueOf(await store.save({ id: 'a', ...sheet('two'), basedOn: first.rev }));
    await tamper(browser, 'texts', second.rev, () => undefined);
    expect(faultOf(await store.read('a'))).toMatchObject({ code: 'unreadable', text: null });
    const copy = valueOf(await store.readCopy(first.rev));
    valueOf(await store.save({ id: 'a', ...sheet(copy.text), basedOn: second.rev }));
    expect(await textOf(store, 'a')).toBe('one');
    expect(faultOf(await store.readCopy(second.rev))).toMatchObject({ code: 'unreadable' });
  });

  it('with a text of another length than was saved reads as `unreadable` and hands over what is there', async () => {
    const browser = newBrowser();
    const store = await openTab(browser);
    const { rev } = await createSheet(store, 'a', 'whole text');
    await tamper(browser, 'texts', rev, () => ({ text: 'whole' }));
    expect(faultOf(await store.read('a'))).toMatchObject({ code: 'unreadable', text: 'whole' });
    expect(faultOf(await store.create({ id: 'a', ...sheet('x') }))).toMatchObject({
      code: 'unreadable',
      text: 'whole',
    });
  });

  it('of the list is shown as unreadable, refuses saves, and can be thrown away by hand alone', async () => {
    const clock = new TestClock(start);
    const browser = newBrowser();
    const store = await openTab(browser, { now: clock.now });
    const { rev } = await createSheet(store, 'a', 'text');
    await createSheet(store, 'b', 'fine');
    await tamper(browser, 'worksheets', 'a', (record) => ({ ...record, title: 7, savedAt: 'yesterday' }));
    expect(valueOf(await store.list())).toMatchObject([
      { id: 'b', standing: 'usable' },
      { id: 'a', title: '', savedAt: 0, standing: 'unreadable' },
    ]);
    expect(faultOf(await store.read('a'))).toMatchObject({ code: 'unreadable', text: 'text' });
    expect(faultOf(await store.save({ id: 'a', ...sheet('x'), basedOn: rev })).code).toBe('unreadable');
    expect(faultOf(await store.quarantine('a', 'why')).code).toBe('unreadable');
    valueOf(await store.remove('a'));
    clock.time += 40 * dayMs;
    const later = await openTab(browser, { now: clock.now });
    expect(faultOf(await later.read('a'))).toMatchObject({ code: 'unreadable', text: 'text' });
    valueOf(await later.purge('a'));
    expect(valueOf(await later.list())).toHaveLength(1);
  });
});

describe('settings', () => {
  it('come back as they were kept, in another tab too, and undefined when never kept', async () => {
    const browser = newBrowser();
    const [left, right] = [await openTab(browser), await openTab(browser)];
    expect(valueOf(await left.getSetting('panel'))).toBeUndefined();
    valueOf(await left.setSetting('panel', { widthPx: 380, open: true, tabs: ['working', null] }));
    expect(valueOf(await right.getSetting('panel'))).toEqual({ widthPx: 380, open: true, tabs: ['working', null] });
    valueOf(await right.setSetting('panel', null));
    expect(valueOf(await left.getSetting('panel'))).toBeNull();
  });
});

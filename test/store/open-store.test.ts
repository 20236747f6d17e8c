import { forceCloseDatabase, IDBDatabase } from 'fake-indexeddb';
import { afterEach, describe, expect, it, vi } from 'vitest';

import { openStore } from '../../src/store';
import type { StoreTrouble } from '../../src/store';

import {
  createSheet,
  faultOf,
  newBrowser,
  openRaw,
  openTab,
  sheet,
  TestClock,
  textOf,
  until,
  valueOf,
} from './support';

const laterVersion = 20; // Dexie's version 2: the first tables are 1, and it counts in tenths.

/** Has the browser close the connection that was opened first. */
function closeByForce(opened: { mock: { results: readonly { value: unknown }[] } }): void {
  const connection = (opened.mock.results[0]?.value as IDBOpenDBRequest).result;
  forceCloseDatabase(connection as never); // Its declared type asks for the class, not for a connection.
}

afterEach(() => {
  vi.restoreAllMocks();
});

describe('opening', () => {
  it('answers `unavailable` where the browser has no database', async () => {
    expect(faultOf(await openStore({ formatVersion: 1 })).code).toBe('unavailable');
  });

  it('answers `unavailable` where the browser forbids it, with the browser’s own words as detail', async () => {
    const browser = newBrowser();
    vi.spyOn(browser.indexedDB, 'open').mockImplementation(() => {
      throw new DOMException('denied for this document', 'SecurityError');
    });
    const fault = faultOf(await openStore({ formatVersion: 1, ...browser }));
    expect(fault.code).toBe('unavailable');
    expect(fault.detail).toContain('denied for this document');
  });

  it('answers `unavailable` when the browser never answers', async () => {
    const browser = newBrowser();
    vi.spyOn(browser.indexedDB, 'open').mockReturnValue({} as IDBOpenDBRequest);
    expect(faultOf(await openStore({ formatVersion: 1, ...browser, patienceMs: 0 })).code).toBe('unavailable');
  });

  it('answers `blocked` while a tab that does not make way holds older tables, and opens when that is closed', async () => {
    const browser = newBrowser();
    const older = await openRaw(browser, 1);
    const troubles: StoreTrouble[] = [];
    const options = { formatVersion: 1, ...browser, onTrouble: (trouble: StoreTrouble) => troubles.push(trouble) };
    const waiting = openStore(options);
    await until(() => troubles.includes('blocked'));
    older.close();
    valueOf(await waiting);

    const second = newBrowser();
    const olderStill = await openRaw(second, 1);
    const fault = faultOf(await openStore({ ...options, ...second, patienceMs: 20 }));
    expect(fault.code).toBe('blocked');
    olderStill.close();
    await createSheet(await openTab(second), 'a', 'text');
  });
});

describe('a save', () => {
  it('asks the browser to have it on the disk before it is acknowledged', async () => {
    const begun = vi.spyOn(IDBDatabase.prototype, 'transaction');
    await createSheet(await openTab(newBrowser()), 'a', 'text');
    const lasting = begun.mock.calls.at(-1);
    expect(lasting).toEqual([['worksheets', 'texts', 'copies'], 'readwrite', { durability: 'strict' }]);
  });
});

describe('a later version of the page in another tab', () => {
  it('is made way for after the running writes and those that they lead to', async () => {
    const browser = newBrowser();
    const troubles: StoreTrouble[] = [];
    const store = await openTab(browser, { onTrouble: (trouble) => troubles.push(trouble) });
    const { rev } = await createSheet(store, 'a', 'one');
    const last = store
      .save({ id: 'a', ...sheet('two'), basedOn: rev })
      .then((saved) => store.save({ id: 'a', ...sheet('three'), basedOn: valueOf(saved).rev }));
    const later = await openRaw(browser, laterVersion);
    const saved = valueOf(await last);
    expect(troubles).toEqual(['superseded']);
    expect(faultOf(await store.save({ id: 'a', ...sheet('four'), basedOn: saved.rev })).code).toBe('newer-format');
    expect(faultOf(await store.read('a')).code).toBe('newer-format');
    later.close();
    expect(await textOf(await openTab(browser), 'a')).toBe('three');
  });

  it('leaves tables that this version reads and does not write', async () => {
    const browser = newBrowser();
    const before = await openTab(browser);
    const { rev } = await createSheet(before, 'a', 'text');
    valueOf(await before.setSetting('theme', 'dark'));
    (await openRaw(browser, laterVersion)).close();

    const troubles: StoreTrouble[] = [];
    const store = await openTab(browser, { onTrouble: (trouble) => troubles.push(trouble) });
    expect(troubles).toEqual(['superseded']);
    expect(await textOf(store, 'a')).toBe('text');
    expect(valueOf(await store.getSetting('theme'))).toBe('dark');
    const refused = [
      faultOf(await store.save({ id: 'a', ...sheet('x'), basedOn: rev })),
      faultOf(await store.create({ id: 'b', ...sheet('x') })),
      faultOf(await store.remove('a')),
      faultOf(await store.setSetting('theme', 'light')),
    ];
    expect(refused.map(({ code }) => code)).toEqual(Array(4).fill('newer-format'));
  });
});

describe('a connection that the browser closes', () => {
  it('is told, and opened again at the next use', async () => {
    const browser = newBrowser();
    const opened = vi.spyOn(browser.indexedDB, 'open');
    const troubles: StoreTrouble[] = [];
    const store = await openTab(browser, { onTrouble: (trouble) => troubles.push(trouble) });
    const { rev } = await createSheet(store, 'a', 'one');
    closeByForce(opened);
    await until(() => troubles.length > 0);
    expect(troubles).toEqual(['closed']);
    valueOf(await store.save({ id: 'a', ...sheet('two'), basedOn: rev }));
    expect(await textOf(store, 'a')).toBe('two');
  });

  it('and cannot open again is tried anew at each use', async () => {
    const browser = newBrowser();
    const opened = vi.spyOn(browser.indexedDB, 'open');
    const troubles: StoreTrouble[] = [];
    const store = await openTab(browser, { onTrouble: (trouble) => troubles.push(trouble) });
    const { rev } = await createSheet(store, 'a', 'one');
    closeByForce(opened);
    await until(() => troubles.length > 0);
    opened.mockImplementation(() => {
      throw new DOMException('full disk while opening', 'QuotaExceededError');
    });
    expect(faultOf(await store.save({ id: 'a', ...sheet('two'), basedOn: rev })).code).toBe('quota');
    expect(faultOf(await store.list()).code).toBe('quota');
    opened.mockRestore();
    valueOf(await store.save({ id: 'a', ...sheet('two'), basedOn: rev }));
    expect(await textOf(store, 'a')).toBe('two');
    expect(troubles).toEqual(['closed']);
  });

  it('because the storage is cleared does not stand in the way, and the loss is told by the next save', async () => {
    const browser = newBrowser();
    const troubles: StoreTrouble[] = [];
    const clock = new TestClock(Date.UTC(2031, 4, 6));
    const store = await openTab(browser, { onTrouble: (trouble) => troubles.push(trouble), now: clock.now });
    const { rev } = await createSheet(store, 'a', 'one');
    clock.time += 1000;
    await new Promise((resolve) => {
      browser.indexedDB.deleteDatabase('levelwright').onsuccess = resolve;
    });
    expect(troubles).toEqual(['closed']);
    expect(faultOf(await store.save({ id: 'a', ...sheet('two'), basedOn: rev })).code).toBe('missing');
    // Kept anew by one tab, it is safe from another that still goes by the lost database.
    await createSheet(store, 'a', 'two');
    expect(faultOf(await store.save({ id: 'a', ...sheet('three'), basedOn: rev })).code).toBe('conflict');
    expect(await textOf(store, 'a')).toBe('two');
  });

  it('by the store itself is no trouble', async () => {
    const troubles: StoreTrouble[] = [];
    const store = await openTab(newBrowser(), { onTrouble: (trouble) => troubles.push(trouble) });
    await store.close();
    expect(troubles).toEqual([]);
  });
});

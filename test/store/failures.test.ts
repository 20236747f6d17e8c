// Each write to the database fails once, in turn and in several ways: what was acknowledged before stays whole, the failed
// operation leaves nothing behind, and the next one succeeds without opening the store again.
import { IDBObjectStore, IDBRequest } from 'fake-indexeddb';
import { afterEach, describe, expect, it, vi } from 'vitest';

import type { Result } from '../../src/base';
import type { Store, StoreFault } from '../../src/store';

import { createSheet, newBrowser, openTab, sheet, TestClock, valueOf } from './support';

/** The fake's transaction; its `_abort` does what a browser does when a write fails on the way to the disk. */
interface AbortableTransaction {
  _abort(errorName: string): void;
}

type Write = 'put' | 'add' | 'delete';
const writes: readonly Write[] = ['put', 'add', 'delete'];

const abort = (rows: IDBObjectStore, errorName: string): void => {
  (rows.transaction as unknown as AbortableTransaction)._abort(errorName);
};

/** How a write can fail: what happens in place of the call `original`. */
const failures: Readonly<Record<string, (rows: IDBObjectStore, original: () => IDBRequest) => IDBRequest>> = {
  'is refused at once': () => {
    throw new DOMException('refused', 'UnknownError');
  },
  'is taken, and then the disk turns out to be full': (rows, original) => {
    const request = original();
    request.addEventListener('success', () => abort(rows, 'QuotaExceededError'));
    return request;
  },
  'never answers, because the disk is full': (rows) => {
    queueMicrotask(() => abort(rows, 'QuotaExceededError'));
    return new IDBRequest();
  },
};

/** Makes the write number `failing` (from 1) fail; answers how many writes there have been. */
function injectFailure(
  failing: number,
  fail: (rows: IDBObjectStore, original: () => IDBRequest) => IDBRequest,
): () => number {
  let count = 0;
  for (const kind of writes) {
    const prototype = IDBObjectStore.prototype as unknown as Record<Write, (...args: unknown[]) => IDBRequest>;
    const original = prototype[kind];
    vi.spyOn(prototype, kind).mockImplementation(function (this: IDBObjectStore, ...args) {
      count += 1;
      const run = (): IDBRequest => original.apply(this, args);
      return count === failing ? fail(this, run) : run();
    });
  }
  return () => count;
}

afterEach(() => {
  vi.restoreAllMocks();
});

/** Everything that the store shows, read afresh: entries, texts, copies and their texts, settings. */
async function everything(store: Store): Promise<unknown> {
  const entries = valueOf(await store.list());
  const worksheets: unknown[] = [];
  for (const { id } of entries) {
    const copies: unknown[] = [];
    for (const { rev } of valueOf(await store.recoverable(id))) copies.push(valueOf(await store.readCopy(rev)));
    worksheets.push({ ...valueOf(await store.read(id)), copies });
  }
  return { worksheets, theme: valueOf(await store.getSetting('theme')) };
}

/** Each kind of writing operation on worksheet `a`, which has twenty copies already so that a save thins them, and on `b`. */
function deeds(store: Store, round: number): (() => Promise<Result<unknown, StoreFault>>)[] {
  const save = async (text: string): Promise<Result<unknown, StoreFault>> => {
    const { rev } = valueOf(await store.read('a'));
    return store.save({ id: 'a', ...sheet(`${text} in round ${round}`), basedOn: rev });
  };
  return [
    () => save('first'),
    () => store.remove('a'),
    () => store.restore('a'),
    () => save('second'),
    () => store.create({ id: 'b', ...sheet('short-lived') }),
    () => store.quarantine('b', 'not whole'),
    () => store.remove('b'),
    () => store.purge('b'),
    () => store.setSetting('theme', `theme ${round}`),
  ];
}

// Seconds on an idle machine; the limit only ends a test that hangs.
const longMs = 60_000;

describe.each(Object.entries(failures))('a write that %s', (name, fail) => {
  it(
    'leaves the last committed state whole, whichever write it is',
    async () => {
      const clock = new TestClock(Date.UTC(2031, 4, 6, 9, 30));
      const store = await openTab(newBrowser(), { now: clock.now });
      let { rev } = await createSheet(store, 'a', 'text');
      for (let count = 0; count < 20; count += 1) {
        ({ rev } = valueOf(await store.save({ id: 'a', ...sheet(`text ${count}`), basedOn: rev })));
      }
      const codes = new Set<string>();
      let failing = 1;
      for (; ; failing += 1) {
        const writeCount = injectFailure(failing, fail);
        let met = 0;
        for (const deed of deeds(store, failing)) {
          const before = await everything(store);
          const result = await deed();
          if (result.ok) continue;
          codes.add(result.fault.code);
          met += 1;
          expect(await everything(store)).toEqual(before);
          valueOf(await deed());
        }
        const reached = writeCount() >= failing;
        vi.restoreAllMocks();
        if (!reached) break;
        expect(met).toBe(1);
      }
      // Two saves of four writes each (text, copy, entry, thinned copy and text) and seven deeds more.
      expect(failing).toBeGreaterThan(16);
      expect([...codes]).toEqual([name.includes('full') ? 'quota' : 'unexpected']);
    },
    longMs,
  );
});

import fc from 'fast-check';
import { beforeEach, describe, expect, it } from 'vitest';

import { fail, ok } from '../../src/base';
import type { Result } from '../../src/base';
import { Saver } from '../../src/store';
import type { Saved, SaveState, Store, StoreFault, WorksheetSave } from '../../src/store';
import { plainFault } from '../../src/store/store-fault';

import { createSheet, newBrowser, openTab, sheet, textOf, valueOf } from './support';

/** A store whose saves wait to be answered by the test. */
class HeldStore {
  readonly calls: WorksheetSave[] = [];
  #answer: ((result: Result<Saved, StoreFault>) => void) | undefined;
  readonly save = (edit: WorksheetSave): Promise<Result<Saved, StoreFault>> => {
    this.calls.push(edit);
    return new Promise((resolve) => {
      this.#answer = resolve;
    });
  };
  readonly create = (): Promise<never> => Promise.reject(new Error('not expected'));
  readonly restore = (): Promise<never> => Promise.reject(new Error('not expected'));

  /** Answers the save that waits, and lets the saver hear it. */
  async answer(result: Result<Saved, StoreFault>): Promise<void> {
    this.#answer?.(result);
    await new Promise((resolve) => setImmediate(resolve));
  }
}

// Seconds on an idle machine; the limit only ends a test that hangs.
const longMs = 60_000;

describe('a saver, write by write', () => {
  let store: HeldStore;
  let starts: (() => void)[];
  let saver: Saver;
  let states: SaveState[];
  const startWrite = (): void => starts.shift()?.();

  beforeEach(() => {
    store = new HeldStore();
    starts = [];
    saver = new Saver({ store, id: 'a', rev: 1, savedAt: 100, soon: (start) => starts.push(start), now: () => 500 });
    states = [];
    saver.subscribe((state) => states.push(state));
  });

  it('is saved from the start, saving from the commit on, and saved when the store has answered', async () => {
    saver.commit(() => sheet('one'));
    startWrite();
    expect(saver.state.kind).toBe('saving');
    await store.answer(ok({ rev: 2, savedAt: 600 }));
    expect(states).toEqual([
      { kind: 'saved', at: 100 },
      { kind: 'saving', since: 500 },
      { kind: 'saved', at: 600 },
    ]);
    expect(store.calls).toEqual([{ id: 'a', ...sheet('one'), basedOn: 1 }]);
    expect(saver.rev).toBe(2);
  });

  it('makes one text of all edits committed before a write starts and one of all committed while it runs', async () => {
    const made: string[] = [];
    const commit = (text: string): void =>
      saver.commit(() => {
        made.push(text);
        return sheet(text);
      });
    commit('1');
    commit('2');
    startWrite();
    expect(starts).toHaveLength(0);
    commit('3');
    commit('4');
    commit('5');
    await store.answer(ok({ rev: 2, savedAt: 600 }));
    expect(saver.state.kind).toBe('saving');
    await store.answer(ok({ rev: 3, savedAt: 700 }));
    expect(saver.state).toEqual({ kind: 'saved', at: 700 });
    expect(made).toEqual(['2', '5']);
    expect(store.calls.map(({ basedOn }) => basedOn)).toEqual([1, 2]);
  });

  it('says what failed, keeps the edit and tries it again when asked', async () => {
    saver.commit(() => sheet('one'));
    startWrite();
    await store.answer(fail(plainFault('quota')));
    expect(saver.state).toEqual({ kind: 'failed', fault: plainFault('quota') });
    expect(starts).toHaveLength(0);
    saver.retry();
    startWrite();
    await store.answer(ok({ rev: 2, savedAt: 600 }));
    expect(saver.state).toEqual({ kind: 'saved', at: 600 });
    expect(store.calls.map(({ text, basedOn }) => [text, basedOn])).toEqual([
      ['one', 1],
      ['one', 1],
    ]);
  });

  it('tries again at the next commit, with the newest edit', async () => {
    saver.commit(() => sheet('one'));
    startWrite();
    saver.commit(() => sheet('two'));
    await store.answer(fail(plainFault('unexpected')));
    expect(saver.state.kind).toBe('failed');
    saver.commit(() => sheet('three'));
    startWrite();
    await store.answer(ok({ rev: 2, savedAt: 600 }));
    expect(store.calls.map(({ text }) => text)).toEqual(['one', 'three']);
    expect(saver.state.kind).toBe('saved');
  });

  it('lets a listener retry from within the news of a failure', async () => {
    const stop = saver.subscribe((state) => {
      if (state.kind === 'failed') saver.retry();
    });
    saver.commit(() => sheet('one'));
    startWrite();
    await store.answer(fail(plainFault('unexpected')));
    stop();
    startWrite();
    await store.answer(ok({ rev: 2, savedAt: 600 }));
    expect(saver.state).toEqual({ kind: 'saved', at: 600 });
  });

  it('fails, instead of claiming to save for ever, when the text cannot be made', async () => {
    saver.commit(() => {
      throw new Error('no text');
    });
    const state = await saver.flush();
    expect(state).toMatchObject({ kind: 'failed', fault: { code: 'unexpected', detail: 'Error: no text' } });
    expect(store.calls).toHaveLength(0);
  });

  it('flushes at once, without the delay, and waits for the last write', async () => {
    saver.commit(() => sheet('one'));
    const flushed = saver.flush();
    expect(store.calls).toHaveLength(1);
    saver.commit(() => sheet('two'));
    await store.answer(ok({ rev: 2, savedAt: 600 }));
    await store.answer(ok({ rev: 3, savedAt: 700 }));
    expect(await flushed).toEqual({ kind: 'saved', at: 700 });
    startWrite();
    expect(store.calls).toHaveLength(2);
  });

  it('has nothing to flush or retry when all is saved', async () => {
    saver.retry();
    expect(await saver.flush()).toEqual({ kind: 'saved', at: 100 });
    expect(starts).toHaveLength(0);
    expect(store.calls).toHaveLength(0);
  });

  it('tells no listener that has left', () => {
    const seen: SaveState[] = [];
    saver.subscribe((state) => seen.push(state))();
    saver.commit(() => sheet('one'));
    expect(seen).toEqual([{ kind: 'saved', at: 100 }]);
  });
});

/** Worksheet `a` open in two tabs, each with its saver. */
async function twoTabs(): Promise<{ stores: [Store, Store]; left: Saver; right: Saver }> {
  const browser = newBrowser();
  const stores: [Store, Store] = [await openTab(browser), await openTab(browser)];
  const created = await createSheet(stores[0], 'a', 'start');
  const options = { id: 'a', ...created };
  return {
    stores,
    left: new Saver({ store: stores[0], ...options }),
    right: new Saver({ store: stores[1], ...options }),
  };
}

describe('a saver on a store', () => {
  it('writes soon after the commit, unasked', async () => {
    const { stores, left } = await twoTabs();
    const { rev } = left;
    const saved = new Promise<void>((resolve) => {
      left.subscribe((state) => {
        if (state.kind === 'saved' && left.rev > rev) resolve();
      });
    });
    left.commit(() => sheet('one'));
    await saved;
    expect(await textOf(stores[1], 'a')).toBe('one');
  });

  it('stops at a conflict and holds later edits until one side is chosen; here its own', async () => {
    const { stores, left, right } = await twoTabs();
    left.commit(() => sheet('left'));
    await left.flush();
    right.commit(() => sheet('right'));
    expect(await right.flush()).toMatchObject({ kind: 'conflict', fault: { stored: { text: 'left' } } });
    right.commit(() => sheet('right, more'));
    right.retry();
    expect(await right.flush()).toMatchObject({ kind: 'conflict' });
    expect(await textOf(stores[0], 'a')).toBe('left');

    expect(await right.keepMine()).toMatchObject({ kind: 'saved' });
    expect(await textOf(stores[0], 'a')).toBe('right, more');
    const [copy] = valueOf(await stores[0].recoverable('a'));
    expect(valueOf(await stores[0].readCopy(copy?.rev ?? 0)).text).toBe('left');
  });

  it('meets the next conflict when a third save came between the conflict and the decision', async () => {
    const { stores, left, right } = await twoTabs();
    left.commit(() => sheet('left'));
    await left.flush();
    right.commit(() => sheet('right'));
    await right.flush();
    left.commit(() => sheet('left again'));
    await left.flush();
    expect(await right.keepMine()).toMatchObject({ kind: 'conflict', fault: { stored: { text: 'left again' } } });
    expect(await textOf(stores[0], 'a')).toBe('left again');
  });

  it('goes on with the other side’s text after adopting it', async () => {
    const { stores, left, right } = await twoTabs();
    left.commit(() => sheet('left'));
    await left.flush();
    right.commit(() => sheet('right'));
    const state = await right.flush();
    if (state.kind !== 'conflict') throw new Error(`expected a conflict, got ${state.kind}`);
    await right.adopt(state.fault.stored);
    expect(right.state).toEqual({ kind: 'saved', at: state.fault.stored.savedAt });
    expect(await textOf(stores[0], 'a')).toBe('left');
    right.commit(() => sheet('left and right'));
    expect(await right.flush()).toMatchObject({ kind: 'saved' });
    expect(await textOf(stores[0], 'a')).toBe('left and right');
  });

  it('takes a worksheet out of the trash when its edits are to be kept', async () => {
    const { stores, left } = await twoTabs();
    valueOf(await stores[1].remove('a'));
    left.commit(() => sheet('edited'));
    expect(await left.flush()).toMatchObject({ kind: 'failed', fault: { code: 'missing', trashed: true } });
    expect(await left.keepMine()).toMatchObject({ kind: 'saved' });
    expect(valueOf(await stores[1].read('a'))).toMatchObject({ text: 'edited', deletedAt: null });
  });

  it('keeps a worksheet anew that is gone for good', async () => {
    const { stores, left } = await twoTabs();
    valueOf(await stores[1].remove('a'));
    valueOf(await stores[1].purge('a'));
    left.commit(() => sheet('edited'));
    expect(await left.flush()).toMatchObject({ kind: 'failed', fault: { code: 'missing', trashed: false } });
    expect(await left.keepMine()).toMatchObject({ kind: 'saved' });
    expect(await textOf(stores[1], 'a')).toBe('edited');
    left.commit(() => sheet('edited again'));
    expect(await left.flush()).toMatchObject({ kind: 'saved' });
  });

  it('fails with the reason when the trash cannot be reached', async () => {
    const { stores, left } = await twoTabs();
    valueOf(await stores[1].remove('a'));
    left.commit(() => sheet('edited'));
    await left.flush();
    await stores[0].close();
    expect(await left.keepMine()).toMatchObject({ kind: 'failed', fault: { code: 'unavailable' } });
  });

  it(
    'loses no edit and never says saved too early, whatever the order of commits, pauses and failures',
    async () => {
      const step = fc.oneof(
        { weight: 4, arbitrary: fc.constant('commit' as const) },
        { weight: 2, arbitrary: fc.constant('pause' as const) },
        { weight: 1, arbitrary: fc.constant('fail next' as const) },
        { weight: 1, arbitrary: fc.constant('flush' as const) },
      );
      const store = await openTab(newBrowser());
      let run = 0;
      await fc.assert(
        fc.asyncProperty(fc.array(step, { maxLength: 20 }), async (steps) => {
          const id = `sheet ${(run += 1)}`;
          const created = await createSheet(store, id, '0');
          let committed = 0;
          let failNext = false;
          let stored = 0;
          const flaky = {
            create: store.create.bind(store),
            restore: store.restore.bind(store),
            save: async (edit: WorksheetSave): Promise<Result<Saved, StoreFault>> => {
              if (failNext) {
                failNext = false;
                return fail(plainFault('unexpected'));
              }
              const saved = await store.save(edit);
              if (saved.ok) stored = Number(edit.text);
              return saved;
            },
          };
          const saver = new Saver({ store: flaky, id, ...created });
          saver.subscribe((state) => {
            if (state.kind === 'saved') expect(stored).toBe(committed);
          });
          for (const next of steps) {
            if (next === 'commit') {
              committed += 1;
              saver.commit(() => sheet(String(committed)));
              expect(saver.state.kind).toBe('saving');
            } else if (next === 'pause') await new Promise((resolve) => setImmediate(resolve));
            else if (next === 'flush') await saver.flush();
            else failNext = true;
          }
          failNext = false;
          while (saver.state.kind !== 'saved') await saver.flush();
          expect(await textOf(store, id)).toBe(String(committed));
        }),
        { seed: 20310508, numRuns: 150 },
      );
    },
    longMs,
  );
});

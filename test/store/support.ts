/** What the store's tests share: a browser of their own for each test, and tabs in it. */
import { IDBFactory, IDBKeyRange } from 'fake-indexeddb';
import { expect } from 'vitest';

import type { Result } from '../../src/base';
import { openStore } from '../../src/store';
import type { OpenOptions, Saved, Store } from '../../src/store';

/** An empty database world, shared by the tabs opened in it. */
export interface FakeBrowser {
  readonly indexedDB: IDBFactory;
  readonly IDBKeyRange: typeof IDBKeyRange;
}

export function newBrowser(): FakeBrowser {
  return { indexedDB: new IDBFactory(), IDBKeyRange };
}

/** The value of a result that has to be one. */
export function valueOf<T>(result: Result<T, unknown>): T {
  if (!result.ok) throw new Error(`expected a value, got ${JSON.stringify(result.fault)}`);
  return result.value;
}

/** The fault of a result that has to be one. */
export function faultOf<F>(result: Result<unknown, F>): F {
  if (result.ok) throw new Error(`expected a fault, got ${JSON.stringify(result.value)}`);
  return result.fault;
}

/** A tab's store in `browser`. */
export async function openTab(browser: FakeBrowser, options: Partial<OpenOptions> = {}): Promise<Store> {
  return valueOf(await openStore({ formatVersion: 1, ...browser, ...options }));
}

/** A worksheet as its owner would hand it over. */
export function sheet(text: string, title = 'Hillside relay'): { title: string; text: string; lineCount: number } {
  return { title, text, lineCount: 1 };
}

/** Keeps worksheet `id` and answers what `create` did. */
export async function createSheet(store: Store, id: string, text: string): Promise<Saved> {
  return valueOf(await store.create({ id, ...sheet(text) }));
}

/** The text stored as worksheet `id`. */
export async function textOf(store: Store, id: string): Promise<string> {
  return valueOf(await store.read(id)).text;
}

/** A clock that stands still until it is moved. */
export class TestClock {
  constructor(public time: number) {}
  readonly now = (): number => this.time;
}

/** Resolves after `count` tasks of the event loop. */
export async function tasks(count: number): Promise<void> {
  for (let turn = 0; turn < count; turn += 1) await new Promise((resolve) => setImmediate(resolve));
}

/** Resolves when `condition` holds; the condition is asked after each task of the event loop. */
export async function until(condition: () => boolean): Promise<void> {
  for (let turn = 0; turn < 10_000 && !condition(); turn += 1) await tasks(1);
  expect(condition()).toBe(true);
}

/** An open database of the browser, used behind the store's back. */
export function openRaw(browser: FakeBrowser, version?: number): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const request = browser.indexedDB.open('levelwright', version);
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(new Error(String(request.error)));
  });
}

/** Changes one record behind the store's back. */
export async function tamper(
  browser: FakeBrowser,
  table: string,
  key: IDBValidKey,
  change: (record: Record<string, unknown>) => unknown,
): Promise<void> {
  const database = await openRaw(browser);
  await new Promise<void>((resolve) => {
    const transaction = database.transaction(table, 'readwrite');
    const rows = transaction.objectStore(table);
    const request = rows.get(key) as IDBRequest<Record<string, unknown>>;
    request.onsuccess = () => {
      const changed = change(request.result);
      if (changed === undefined) rows.delete(key);
      else if (rows.keyPath === null) rows.put(changed, key);
      else rows.put(changed);
    };
    transaction.oncomplete = () => resolve();
  });
  database.close();
}

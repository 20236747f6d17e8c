/**
 * Opening the store, and what happens to it from outside while it is open. What must stay true: a page that a later
 * version has asked to leave finishes its writes, then writes no more.
 */
import { fail, ok } from '../base';
import type { Result } from '../base';

import { describeDatabase, openDatabase } from './database';
import type { DatabaseOptions, StoreTrouble } from './database';
import { Store } from './store';
import { plainFault } from './store-fault';
import type { PlainFault } from './store-fault';

/** How to open the store. The page gives the first two; the rest is for tests and for pages that share one origin. */
export interface OpenOptions extends Partial<DatabaseOptions> {
  /** The latest version of the worksheet file that this page reads and writes; worksheets above it are not written to. */
  readonly formatVersion: number;
  /** Told of trouble with the connection, from the start of the opening on. */
  readonly onTrouble?: (trouble: StoreTrouble) => void;
  /** Longest wait for the opening, in milliseconds. */
  readonly patienceMs?: number;
}

const defaultName = 'levelwright';
const defaultPatienceMs = 10_000;

/**
 * Opens the store and empties its trash of what has been there for thirty days. Faults: `blocked`, `unavailable`,
 * `quota`; the page then works without a store and offers files alone, and may call this again.
 */
export async function openStore(options: OpenOptions): Promise<Result<Store, PlainFault>> {
  const now = options.now ?? Date.now;
  const database = describeDatabase({ ...options, name: options.name ?? defaultName, now });
  const { dexie } = database;
  const store = new Store(database, options.formatVersion, now);
  const tell = options.onTrouble ?? ((): void => undefined);

  // Answering false keeps Dexie's own handlers from running: they write to the console and close at once.
  dexie.on('blocked', () => {
    tell('blocked');
    return false;
  });
  dexie.on('versionchange', (event) => {
    if (event.newVersion === null) {
      // The database is about to be deleted: not in the way, and open again at the next use.
      dexie.close({ disableAutoOpen: false });
    } else {
      tell('superseded');
      void store.close(plainFault('newer-format'));
    }
    return false;
  });

  const opened = await openDatabase(database, options.patienceMs ?? defaultPatienceMs);
  if (!opened.ok) return fail(opened.fault);
  dexie.on('close', () => {
    // Not when the store closes itself, and not when there was no connection to lose.
    if (!store.closed && dexie.isOpen()) tell('closed');
  });
  // Any other fault of this housekeeping is no reason to refuse the store: the next opening tries again.
  const purged = await store.purgeExpired();
  if (!purged.ok && purged.fault.code === 'newer-format') tell('superseded');
  return ok(store);
}

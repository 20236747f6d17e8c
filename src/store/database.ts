/**
 * The database behind the store: its tables, its versions, its opening and its connection's troubles. What must stay
 * true: a version once released is never edited, only followed by another; no error text reaches the console alone.
 */
import { Dexie } from 'dexie';
import type { DexieOptions, Table } from 'dexie';

import { fail, ok } from '../base';
import type { Result } from '../base';

import { faultFrom, plainFault } from './store-fault';
import type { PlainFault } from './store-fault';

/**
 * What can befall the connection from outside: `blocked`: an older tab keeps the database from being opened;
 * `superseded`: a later version of the page has asked for it, so this page may not write any more; `closed`: the
 * browser closed it (storage cleared or failed); it is opened again at the next use.
 */
export type StoreTrouble = 'blocked' | 'superseded' | 'closed';

/** Version of the tables. Not the worksheet file's version, which each worksheet's record carries. */
const tablesVersion = 1;

/** The tables; rows are `unknown` until they have been read with the functions of records.ts. */
export interface Database {
  readonly dexie: Dexie;
  /** WorksheetRecord by id. */
  readonly worksheets: Table<unknown, string>;
  /** TextRecord by rev; the key is the database's own counter, which is never set back. */
  readonly texts: Table<unknown, number>;
  /** CopyEntry by rev: the text itself stays in `texts`, so keeping a copy writes a few bytes only. */
  readonly copies: Table<unknown, number>;
  /** { key, value } by key. */
  readonly settings: Table<unknown, string>;
}

/** Where the database lives; the browser's own IndexedDB unless a test gives another. */
export interface DatabaseOptions {
  readonly name: string;
  readonly indexedDB?: IDBFactory;
  readonly IDBKeyRange?: typeof IDBKeyRange;
  /** The clock, in milliseconds since 1970. */
  readonly now: () => number;
}

/** The tables of a database that is not open yet. */
export function describeDatabase(options: DatabaseOptions): Database {
  const dexieOptions: DexieOptions = {
    // An acknowledged save has to survive a power cut; browsers default to less.
    chromeTransactionDurability: 'strict',
    // Dexie's cache shows writes before they are committed, and a list must not.
    cache: 'disabled',
  };
  if (options.indexedDB !== undefined) dexieOptions.indexedDB = options.indexedDB;
  if (options.IDBKeyRange !== undefined) dexieOptions.IDBKeyRange = options.IDBKeyRange;
  const dexie = new Dexie(options.name, dexieOptions);
  dexie.version(tablesVersion).stores({ worksheets: 'id', texts: '++', copies: 'rev, worksheetId', settings: 'key' });
  const texts: Database['texts'] = dexie.table('texts');
  // A browser may throw the whole database away, and the counter of the next one must not come by the same numbers while
  // a tab still knows them: it starts at the time of its making.
  dexie.on('populate', () => texts.add({ text: '' }, options.now()).then((key) => texts.delete(key)));
  return {
    dexie,
    worksheets: dexie.table('worksheets'),
    texts,
    copies: dexie.table('copies'),
    settings: dexie.table('settings'),
  };
}

/**
 * Opens the database, waiting at most `patienceMs`. Faults: `blocked` when another tab was in the way for all that time,
 * `unavailable` when the browser refuses or does not answer, `quota` when the disk is full.
 */
export async function openDatabase(database: Database, patienceMs: number): Promise<Result<void, PlainFault>> {
  const { dexie } = database;
  const seen = { blocked: false };
  const noteBlocked = (): void => {
    seen.blocked = true;
  };
  dexie.on('blocked', noteBlocked);
  let timer: ReturnType<typeof setTimeout> | undefined;
  const outOfPatience = new Promise<'late'>((resolve) => {
    timer = setTimeout(() => resolve('late'), patienceMs);
  });
  try {
    if ((await Promise.race([dexie.open(), outOfPatience])) !== 'late') return ok(undefined);
    dexie.close();
    return fail(plainFault(seen.blocked ? 'blocked' : 'unavailable', `not open after ${patienceMs} ms`));
  } catch (error) {
    const fault = faultFrom(error);
    // Whatever else the reason is called, without an open database there is no storage.
    const detail = 'detail' in fault ? fault.detail : '';
    return fail(plainFault(fault.code === 'quota' ? 'quota' : 'unavailable', detail));
  } finally {
    clearTimeout(timer);
    dexie.on('blocked').unsubscribe(noteBlocked);
  }
}

/**
 * Lets the next use open the database again after a reopening that failed, for instance on a full disk: Dexie by itself
 * would answer with that failure until the page is reloaded.
 */
export function reviveConnection({ dexie }: Database): void {
  if (dexie.hasFailed()) dexie.close({ disableAutoOpen: false });
}

// Dexie numbers the browser's database in tenths of its own versions.
const browserVersionsPerVersion = 10;

/** Whether a later version of the page has already changed the tables. To be asked inside a transaction. */
export function tablesAreNewer(database: Database): boolean {
  return database.dexie.backendDB().version >= (tablesVersion + 1) * browserVersionsPerVersion;
}

/**
 * Runs `work` in one transaction; resolves when it is committed. Rejects as soon as the transaction aborts, since a
 * single request inside it may then never answer at all, and with the transaction's own reason where it has one: the
 * requests that an abort takes with it only say that they were aborted.
 */
export function transact<T>(
  database: Database,
  mode: 'r' | 'rw',
  tables: readonly { readonly name: string }[],
  work: () => Promise<T>,
): Promise<T> {
  return new Promise((resolve, reject) => {
    let reason = (): Error | null => null;
    database.dexie
      .transaction(
        mode,
        tables.map((table) => table.name),
        async (transaction) => {
          reason = () => transaction.idbtrans.error;
          transaction.on('abort', () => {
            // Null when Dexie aborted after an error that then rejects the promise below.
            const error = reason();
            if (error !== null) reject(error);
          });
          return work();
        },
      )
      .then(resolve, (error: unknown) =>
        reject(reason() ?? (error instanceof Error ? error : new Error(String(error)))),
      );
  });
}

/**
 * The store: worksheets as opaque texts, saved by compare-and-set. What must stay true: a save replaces exactly the
 * text that its caller has seen, in one transaction with the list entry and the recovery copy of the text it replaces;
 * an operation that answers `ok` is committed; none of them throws.
 */
import { liveQuery } from 'dexie';
import type { Table } from 'dexie';

import { fail, ok } from '../base';
import type { Result } from '../base';

import { reviveConnection, tablesAreNewer, transact } from './database';
import type { Database } from './database';
import { copyOf, entryOf, settingOf, textOf } from './records';
import type {
  CopyEntry,
  JsonValue,
  RecoveryCopy,
  StoredWorksheet,
  TextRecord,
  WorksheetEntry,
  WorksheetRecord,
} from './records';
import { copiesToDrop } from './recovery-copies';
import { conflictFault, faultFrom, missingFault, plainFault, unreadableFault } from './store-fault';
import type { StoreFault } from './store-fault';

/** A worksheet as its owner hands it over; title and line count are for the list, the text alone is the truth. */
export interface WorksheetText {
  readonly title: string;
  readonly text: string;
  readonly lineCount: number;
}

/** A save: `basedOn` is the `rev` that the edits were made on. */
export interface WorksheetSave extends WorksheetText {
  readonly id: string;
  readonly basedOn: number;
}

/** A committed save. */
export interface Saved {
  readonly rev: number;
  /** Milliseconds since 1970. */
  readonly savedAt: number;
}

const trashKeptMs = 30 * 24 * 3_600_000;

type Answer<T> = Result<T, StoreFault>;

/** An open store; `openStore` makes one. Every operation answers with a value or a fault. */
export class Store {
  readonly #database: Database;
  readonly #worksheetTables: readonly Table[];
  readonly #newestFormat: number;
  readonly #now: () => number;
  readonly #running = new Set<Promise<unknown>>();
  #refusal: StoreFault | null = null;

  constructor(database: Database, newestFormat: number, now: () => number) {
    this.#database = database;
    this.#worksheetTables = [database.worksheets, database.texts, database.copies];
    this.#newestFormat = newestFormat;
    this.#now = now;
  }

  /** All worksheets, also trashed and damaged ones, the last saved first. */
  list(): Promise<Answer<WorksheetEntry[]>> {
    return this.#attempt(async () => ok(await this.#entries()));
  }

  /**
   * Calls `listener` with what `list` answers, soon and again after every change made by this or another tab.
   * Returns the function that ends it.
   */
  watch(listener: (entries: Answer<WorksheetEntry[]>) => void): () => void {
    const subscription = liveQuery(() => this.#entries()).subscribe({
      next: (entries) => listener(ok(entries)),
      error: (error) => listener(fail(faultFrom(error))),
    });
    return () => subscription.unsubscribe();
  }

  /** A worksheet with its text, also from the trash or written by a later version (see `standing`). */
  read(id: string): Promise<Answer<StoredWorksheet>> {
    return this.#read(async () => {
      const record = await this.#database.worksheets.get(id);
      return record === undefined
        ? fail(missingFault('worksheet'))
        : this.#withText(entryOf(record, this.#newestFormat));
    });
  }

  /** Keeps a new worksheet. Fault `conflict` when one with this id exists, in the trash too. */
  create(worksheet: WorksheetText & { readonly id: string }): Promise<Answer<Saved>> {
    return this.#write(this.#worksheetTables, async () => {
      const record = await this.#database.worksheets.get(worksheet.id);
      if (record !== undefined) return this.#conflictWith(entryOf(record, this.#newestFormat));
      return ok(await this.#put(worksheet, this.#now()));
    });
  }

  /** Replaces the text that the caller has seen. Fault `conflict`, with what is stored, when it is no longer that one. */
  save(edit: WorksheetSave): Promise<Answer<Saved>> {
    return this.#change(edit.id, async (stored) => {
      if (stored.standing === 'unreadable') return this.#conflictWith(stored);
      if (stored.deletedAt !== null) return fail(missingFault('trashed'));
      if (stored.rev !== edit.basedOn) return this.#conflictWith(stored);
      await this.#keepCopy(stored, null);
      const saved = await this.#put(edit, stored.createdAt);
      await this.#thinCopies(edit.id);
      return ok(saved);
    });
  }

  /** Moves a worksheet to the trash, from where it can be restored for thirty days. */
  remove(id: string): Promise<Answer<void>> {
    return this.#change(id, () => this.#markDeleted(id, this.#now()));
  }

  /** Takes a worksheet out of the trash. */
  restore(id: string): Promise<Answer<void>> {
    return this.#change(id, () => this.#markDeleted(id, null));
  }

  /** Deletes a worksheet and its recovery copies for good. Only what is in the trash can be purged. */
  purge(id: string): Promise<Answer<void>> {
    return this.#change(id, async (stored) => {
      if (stored.deletedAt === null) return fail(plainFault('unexpected', 'not in the trash'));
      await this.#deleteForGood(stored);
      return ok(undefined);
    });
  }

  /** Deletes for good what has been in the trash for thirty days, and answers how many worksheets that were. */
  purgeExpired(): Promise<Answer<number>> {
    return this.#write(this.#worksheetTables, async () => {
      const expired = (await this.#entries()).filter(
        ({ standing, deletedAt }) =>
          standing === 'usable' && deletedAt !== null && this.#now() - deletedAt >= trashKeptMs,
      );
      for (const entry of expired) await this.#deleteForGood(entry);
      return ok(expired.length);
    });
  }

  /** The recovery copies of a worksheet, the newest first; the text that is current is among them only if quarantined. */
  recoverable(id: string): Promise<Answer<CopyEntry[]>> {
    return this.#attempt(async () => ok((await this.#copiesOf(id)).sort((a, b) => b.rev - a.rev)));
  }

  /** A recovery copy with its text. To go back to it, save its text. */
  readCopy(rev: number): Promise<Answer<RecoveryCopy>> {
    return this.#read(async () => {
      const record = await this.#database.copies.get(rev);
      if (record === undefined) return fail(missingFault('copy'));
      const text = textOf(await this.#database.texts.get(rev));
      return text === null ? fail(unreadableFault(null)) : ok({ ...copyOf(record), text });
    });
  }

  /** Sets the current text aside for good as a recovery copy, for when its reader found it damaged; `reason` is shown. */
  quarantine(id: string, reason: string): Promise<Answer<void>> {
    return this.#change(id, async (stored) => {
      if (stored.standing === 'unreadable') return this.#conflictWith(stored);
      await this.#keepCopy(stored, reason);
      return ok(undefined);
    });
  }

  /** A setting as it was kept, undefined when it never was. The caller checks what it holds. */
  getSetting(key: string): Promise<Answer<unknown>> {
    return this.#attempt(async () => ok(settingOf(await this.#database.settings.get(key))));
  }

  /** Keeps a setting. */
  setSetting(key: string, value: JsonValue): Promise<Answer<void>> {
    return this.#write([this.#database.settings], async () => {
      await this.#database.settings.put({ key, value });
      return ok(undefined);
    });
  }

  /** Whether `close` has ended the connection. */
  get closed(): boolean {
    return this.#refusal !== null;
  }

  /**
   * Ends the connection once nothing runs any more; every later operation answers with `refusal`. What is called in the
   * same task as this, or when a running operation ends, still runs: so a saver's last edits get in.
   */
  async close(refusal: StoreFault = plainFault('unavailable', 'the store was closed')): Promise<void> {
    do {
      await Promise.allSettled(this.#running);
      await new Promise((resolve) => setTimeout(resolve, 0));
    } while (this.#running.size > 0);
    this.#refusal = refusal;
    this.#database.dexie.close();
  }

  async #entries(): Promise<WorksheetEntry[]> {
    const records = await this.#database.worksheets.toArray();
    return records.map((record) => entryOf(record, this.#newestFormat)).sort((a, b) => b.savedAt - a.savedAt);
  }

  async #copiesOf(id: string): Promise<CopyEntry[]> {
    return (await this.#database.copies.where('worksheetId').equals(id).toArray()).map(copyOf);
  }

  /** Every operation goes through here: it counts as running until it is settled, and its errors become faults. */
  #attempt<T>(work: () => Promise<Answer<T>>): Promise<Answer<T>> {
    if (this.#refusal !== null) return Promise.resolve(fail(this.#refusal));
    reviveConnection(this.#database);
    const running = work()
      .catch((error: unknown) => fail(faultFrom(error)))
      .finally(() => this.#running.delete(running));
    this.#running.add(running);
    return running;
  }

  #read<T>(work: () => Promise<Answer<T>>): Promise<Answer<T>> {
    return this.#attempt(() => transact(this.#database, 'r', this.#worksheetTables, work));
  }

  #write<T>(tables: readonly Table[], work: () => Promise<Answer<T>>): Promise<Answer<T>> {
    return this.#attempt(() =>
      transact(this.#database, 'rw', tables, async () =>
        tablesAreNewer(this.#database) ? fail(plainFault('newer-format')) : work(),
      ),
    );
  }

  /** A write to a worksheet that exists and was not written by a later version of the page; it may be damaged. */
  #change<T>(id: string, work: (stored: WorksheetEntry) => Promise<Answer<T>>): Promise<Answer<T>> {
    return this.#write(this.#worksheetTables, async () => {
      const record = await this.#database.worksheets.get(id);
      if (record === undefined) return fail(missingFault('worksheet'));
      const stored = entryOf(record, this.#newestFormat);
      return stored.standing === 'newer' ? fail(plainFault('newer-format')) : work(stored);
    });
  }

  async #withText(entry: WorksheetEntry): Promise<Answer<StoredWorksheet>> {
    const text = textOf(await this.#database.texts.get(entry.rev));
    const damaged = entry.standing === 'unreadable' || (entry.standing === 'usable' && text?.length !== entry.size);
    return damaged || text === null ? fail(unreadableFault(text)) : ok({ ...entry, text });
  }

  /** The fault for an entry that is in the way: `conflict`, or `unreadable` when it is damaged. */
  async #conflictWith(entry: WorksheetEntry): Promise<Answer<never>> {
    const stored = await this.#withText(entry);
    return fail(stored.ok ? conflictFault(stored.value) : stored.fault);
  }

  async #put(worksheet: WorksheetText & { readonly id: string }, createdAt: number): Promise<Saved> {
    const { id, title, text, lineCount } = worksheet;
    const textRecord: TextRecord = { text };
    const rev = await this.#database.texts.add(textRecord);
    const savedAt = this.#now();
    const record: WorksheetRecord = {
      ...{ id, title, createdAt, savedAt, deletedAt: null, rev, lineCount },
      size: text.length,
      formatVersion: this.#newestFormat,
    };
    await this.#database.worksheets.put(record);
    return { rev, savedAt };
  }

  /** Leaves every other field alone, also one that is damaged. */
  async #markDeleted(id: string, deletedAt: number | null): Promise<Answer<void>> {
    await this.#database.worksheets.update(id, { deletedAt });
    return ok(undefined);
  }

  /** The text stays where it is: a copy is an entry that points to it. One that is quarantined already stays so. */
  async #keepCopy(stored: WorksheetEntry, quarantined: string | null): Promise<void> {
    const { id, rev, title, savedAt, size, lineCount } = stored;
    if (quarantined === null && (await this.#database.copies.get(rev)) !== undefined) return;
    const copy: CopyEntry = { rev, worksheetId: id, title, savedAt, size, lineCount, quarantined };
    await this.#database.copies.put(copy);
  }

  async #thinCopies(id: string): Promise<void> {
    const dropped = copiesToDrop(await this.#copiesOf(id), this.#now());
    if (dropped.length === 0) return;
    await this.#database.copies.bulkDelete(dropped);
    await this.#database.texts.bulkDelete(dropped);
  }

  async #deleteForGood({ id, rev }: WorksheetEntry): Promise<void> {
    const revs = (await this.#copiesOf(id)).map((copy) => copy.rev);
    await this.#database.copies.bulkDelete(revs);
    await this.#database.texts.bulkDelete([...revs, rev]);
    await this.#database.worksheets.delete(id);
  }
}

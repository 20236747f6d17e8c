/**
 * The worksheets in the store: the list as it stands, and what can be done with worksheets that are not open.
 * Holds: the list follows the store, whichever tab changes it; deleting moves to the trash, from where it can be taken back.
 */
import { fail, type Result } from '../base';
import { readWorksheetFile, writeWorksheetFile } from '../exchange';
import type { CopyEntry, RecoveryCopy, Store, StoreFault, WorksheetEntry } from '../store';
import { allLines, duplicateWorksheet, type Worksheet } from '../worksheet';

/** What became of something done to a worksheet: nothing to tell, or a sentence. */
export type Outcome = Result<void, string>;

const NO_STORE = 'This browser gives the page no storage, so no worksheets are kept here.';

/** The list of worksheets. */
export class Library {
  /** All worksheets, the last saved first; trashed ones have `deletedAt`. */
  entries = $state.raw<readonly WorksheetEntry[]>([]);
  /** Why the list cannot be read, or null. */
  fault = $state.raw<StoreFault | null>(null);
  readonly #store: Store | null;

  constructor(store: Store | null) {
    this.#store = store;
    store?.watch((answer) => {
      if (answer.ok) this.entries = answer.value;
      this.fault = answer.ok ? null : answer.fault;
    });
  }

  /** Worksheets that are not in the trash. */
  get present(): readonly WorksheetEntry[] {
    return this.entries.filter((entry) => entry.deletedAt === null);
  }

  /** Worksheets in the trash. */
  get trashed(): readonly WorksheetEntry[] {
    return this.entries.filter((entry) => entry.deletedAt !== null);
  }

  /** Moves a worksheet to the trash. */
  remove(id: string): Promise<Outcome> {
    return this.#do((store) => store.remove(id));
  }

  /** Takes a worksheet out of the trash. */
  restore(id: string): Promise<Outcome> {
    return this.#do((store) => store.restore(id));
  }

  /** Deletes a worksheet in the trash for good. */
  purge(id: string): Promise<Outcome> {
    return this.#do((store) => store.purge(id));
  }

  /** Deletes everything in the trash for good; the first fault ends it. */
  async emptyTrash(): Promise<Outcome> {
    for (const { id } of this.trashed) {
      const done = await this.purge(id);
      if (!done.ok) return done;
    }
    return { ok: true, value: undefined };
  }

  /** Makes a copy with an id of its own, titled *Copy of …*. */
  duplicate(id: string): Promise<Outcome> {
    return this.#withWorksheet(id, (store, worksheet) => store.create(asText(duplicateWorksheet(worksheet))));
  }

  /** Gives a worksheet that is not open another title. */
  rename(id: string, title: string): Promise<Outcome> {
    return this.#withWorksheet(id, (store, worksheet, rev) =>
      store.save({ ...asText({ ...worksheet, title }), basedOn: rev }),
    );
  }

  /** The recovery copies of a worksheet, the newest first. */
  async copies(id: string): Promise<Result<readonly CopyEntry[], string>> {
    const answer = await this.#store?.recoverable(id);
    if (answer === undefined) return fail(NO_STORE);
    return answer.ok ? answer : fail(answer.fault.sentence);
  }

  /** A recovery copy with its text. */
  async readCopy(rev: number): Promise<Result<RecoveryCopy, string>> {
    const answer = await this.#store?.readCopy(rev);
    if (answer === undefined) return fail(NO_STORE);
    return answer.ok ? answer : fail(answer.fault.sentence);
  }

  async #do(work: (store: Store) => Promise<Result<unknown, StoreFault>>): Promise<Outcome> {
    if (this.#store === null) return fail(NO_STORE);
    const answer = await work(this.#store);
    return answer.ok ? { ok: true, value: undefined } : fail(answer.fault.sentence);
  }

  async #withWorksheet(
    id: string,
    work: (store: Store, worksheet: Worksheet, rev: number) => Promise<Result<unknown, StoreFault>>,
  ): Promise<Outcome> {
    const stored = await this.#store?.read(id);
    if (stored === undefined) return fail(NO_STORE);
    if (!stored.ok) return fail(stored.fault.sentence);
    const read = readWorksheetFile(stored.value.text);
    if (!read.ok) return fail(read.fault.sentence);
    return this.#do((store) => work(store, read.value.worksheet, stored.value.rev));
  }
}

function asText(worksheet: Worksheet): { id: string; title: string; text: string; lineCount: number } {
  const { id, title } = worksheet;
  return { id, title, text: writeWorksheetFile(worksheet), lineCount: allLines(worksheet).length };
}

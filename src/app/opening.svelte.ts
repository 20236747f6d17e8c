/**
 * Opening worksheets: from the store, new, from a starter, from a file.
 * Holds: the open worksheet is written before another takes its place; a text that cannot be read leaves it where it is; a
 * worksheet in the store is never replaced by a file without the person having said so.
 */
import { fail, ok, type Result } from '../base';
import { Evaluation } from '../engine';
import {
  readWorksheetBytes,
  readWorksheetFile,
  writeWorksheetFile,
  type FileFault,
  type ReadWorksheet,
} from '../exchange';
import { describeMoved, movedValues } from '../review';
import type { StoreFault, StoredWorksheet } from '../store';
import { duplicateWorksheet, newWorksheet, type Worksheet } from '../worksheet';
import type { Keeping, KeptWorksheet } from './keeping.svelte';
import type { Settings } from './settings.svelte';

/** A file whose worksheet is in the store already, with another text: the person decides. */
export interface ImportChoice {
  readonly read: ReadWorksheet;
  readonly stored: StoredWorksheet;
}

/** What opening needs of the session. */
export interface OpeningPlace {
  readonly keeping: Keeping;
  readonly settings: Settings;
  readonly current: () => Worksheet;
  readonly show: (read: ReadWorksheet) => void;
  /** Hands the worksheet shown over to be kept. */
  readonly commit: () => void;
  readonly askToImport: () => void;
  readonly tell: (text: string) => void;
}

/** Opens worksheets. */
export class Opening {
  /** The question that waits for an answer. */
  importChoice = $state.raw<ImportChoice | null>(null);
  readonly #place: OpeningPlace;

  constructor(place: OpeningPlace) {
    this.#place = place;
    place.keeping.onStale = (stored) => this.#replaceBy(stored);
  }

  /** Opens a worksheet from the store; one that cannot be read is set aside there. */
  async openWorksheet(id: string): Promise<Result<void, StoreFault | FileFault>> {
    const { store } = this.#place.keeping;
    if (store === null) return ok(undefined);
    await this.#place.keeping.flush();
    const stored = await store.read(id);
    if (!stored.ok) return stored;
    const read = readWorksheetFile(stored.value.text);
    if (!read.ok) {
      await store.quarantine(id, read.fault.sentence);
      return read;
    }
    await this.#open(read.value, { id, stored: stored.value });
    return ok(undefined);
  }

  /** Opens a new worksheet, empty or from a given text (a starter, an earlier state). It gets an id of its own. */
  async newWorksheet(text?: string): Promise<Result<void, FileFault>> {
    if (text === undefined) {
      const worksheet = newWorksheet();
      await this.#open({ worksheet, messages: [] }, { id: worksheet.id });
      return ok(undefined);
    }
    const read = readWorksheetFile(text);
    if (!read.ok) return read;
    const worksheet = duplicateWorksheet(read.value.worksheet, read.value.worksheet.title);
    await this.#openAndKeep({ ...read.value, worksheet });
    return ok(undefined);
  }

  /** Opens the worksheet of a file's text. When the store holds it with another text, the person is asked first. */
  importText(text: string): Promise<Result<void, FileFault>> {
    return this.#import(readWorksheetFile(text));
  }

  /** As `importText`, for the bytes of a file. */
  importBytes(bytes: Uint8Array): Promise<Result<void, FileFault>> {
    return this.#import(readWorksheetBytes(bytes));
  }

  /** Answers `importChoice`: the file's worksheet takes the place of the stored one, or is opened beside it. */
  async settleImport(answer: 'replace' | 'beside' | 'cancel'): Promise<void> {
    const choice = this.importChoice;
    this.importChoice = null;
    if (choice === null || answer === 'cancel') return;
    const { read, stored } = choice;
    if (answer === 'beside') {
      const { worksheet } = read;
      await this.#openAndKeep({ ...read, worksheet: duplicateWorksheet(worksheet, worksheet.title) });
      return;
    }
    if (stored.deletedAt !== null) await this.#place.keeping.store?.restore(stored.id);
    await this.#open(read, { id: stored.id, stored });
    this.#place.commit();
  }

  /** In a conflict: goes on with what is in this tab as a worksheet of its own; the stored one stays as it is. */
  async keepAsCopy(): Promise<void> {
    await this.#openAndKeep({ worksheet: duplicateWorksheet(this.#place.current()), messages: [] });
  }

  async #import(read: Result<ReadWorksheet, FileFault>): Promise<Result<void, FileFault>> {
    if (!read.ok) return fail(read.fault);
    const { store } = this.#place.keeping;
    const { id } = read.value.worksheet;
    await this.#place.keeping.flush();
    const stored = store === null ? undefined : await store.read(id);
    const told = withMovedValues(read.value);
    if (stored?.ok !== true) await this.#openAndKeep(told);
    else if (saysTheSame(stored.value.text, read.value.worksheet) && stored.value.deletedAt === null)
      await this.#open(told, { id, stored: stored.value });
    else {
      this.importChoice = { read: told, stored: stored.value };
      this.#place.askToImport();
    }
    return ok(undefined);
  }

  async #openAndKeep(read: ReadWorksheet): Promise<void> {
    await this.#open(read, { id: read.worksheet.id });
    if (read.readOnly === undefined) this.#place.commit();
  }

  async #open(read: ReadWorksheet, kept: KeptWorksheet): Promise<void> {
    const { keeping, settings, show } = this.#place;
    await keeping.open(kept);
    show(read);
    settings.lastWorksheetId = kept.stored === undefined ? null : kept.id;
  }

  #replaceBy(stored: StoredWorksheet): void {
    const read = readWorksheetFile(stored.text);
    if (!read.ok) {
      this.#place.tell(read.fault.sentence);
      return;
    }
    this.#place.show({
      ...read.value,
      messages: ['The worksheet was read again: another tab had changed it.', ...read.value.messages],
    });
  }
}

/** What was read from a file, with a sentence for each required line whose value is no longer the one recorded there. */
function withMovedValues(read: ReadWorksheet): ReadWorksheet {
  if (read.worksheet.recorded === undefined) return read;
  const { cases } = read.worksheet;
  const nameOf = (caseId: string): string => cases.find(({ id }) => id === caseId)?.name ?? caseId;
  const moved = movedValues(new Evaluation(read.worksheet)).map((value) => describeMoved(value, nameOf));
  return { ...read, messages: [...read.messages, ...moved] };
}

/** True when a stored text and a file's worksheet differ in the values recorded at saving at most. */
function saysTheSame(storedText: string, worksheet: Worksheet): boolean {
  const stored = readWorksheetFile(storedText);
  return stored.ok && textWithoutRecorded(stored.value.worksheet) === textWithoutRecorded(worksheet);
}

function textWithoutRecorded({ recorded: _recorded, ...worksheet }: Worksheet): string {
  return writeWorksheetFile(worksheet);
}

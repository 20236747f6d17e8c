/**
 * Keeping the open worksheet: its saver, this tab's claim to write it, and what went wrong.
 * Holds: the state says *saved* only when the last edit is in the database; without a store, edits are said to be kept nowhere.
 */
import { askPersistence, Saver, WorksheetClaim, type PersistenceAnswer } from '../store';
import type {
  ClaimState,
  ConflictFault,
  PlainFault,
  SaveState,
  Saved,
  Store,
  StoreFault,
  StoredWorksheet,
} from '../store';
import type { WorksheetSave, WorksheetText } from '../store';
import type { Result } from '../base';

/** Where the last edit is. `new`: nothing was typed yet; `nowhere`: there is no store, and edits live in this tab alone. */
export type KeepState =
  | { readonly kind: 'new' }
  | { readonly kind: 'saved'; readonly at: number }
  | { readonly kind: 'saving' }
  | { readonly kind: 'failed'; readonly fault: StoreFault }
  | { readonly kind: 'conflict'; readonly fault: ConflictFault }
  | { readonly kind: 'nowhere'; readonly fault: PlainFault };

/** The `rev` of a worksheet that is not in the store yet; the database counts from 1. */
const NOT_STORED = 0;

/** What keeping a worksheet needs to know of it. */
export interface KeptWorksheet {
  readonly id: string;
  /** Absent: not in the store yet; it is created with its first edit. */
  readonly stored?: { readonly rev: number; readonly savedAt: number };
}

/** Keeps one worksheet at a time. */
export class Keeping {
  state = $state.raw<KeepState>({ kind: 'new' });
  /** This tab's part; only a `writer` (or an `unguarded` tab) may edit. */
  claimState = $state.raw<ClaimState>('asking');
  /** Whether the browser has promised to keep the store; asked after the first save of an edit. */
  persistence = $state.raw<PersistenceAnswer>('unknown');
  /** Called when this tab may write again and the store holds a later text than the one shown. */
  onStale: (stored: StoredWorksheet) => void = () => undefined;

  #store: Store | null;
  #storeFault: PlainFault | null;
  #saver: Saver | null = null;
  #claim: WorksheetClaim | null = null;
  #id = '';
  #hasEdits = false;
  #hasAsked = false;
  #endSubscriptions: () => void = () => undefined;

  constructor(opened: Result<Store, PlainFault>) {
    this.#store = opened.ok ? opened.value : null;
    this.#storeFault = opened.ok ? null : opened.fault;
  }

  /** The open store, or null. */
  get store(): Store | null {
    return this.#store;
  }

  /** Why there is no store, or null. */
  get storeFault(): PlainFault | null {
    return this.#storeFault;
  }

  /** Whether this tab may edit the worksheet. */
  get mayEdit(): boolean {
    return this.claimState !== 'elsewhere' && this.claimState !== 'lost';
  }

  /** Whether there are edits that would be lost if the page were closed now. */
  get hasUnsaved(): boolean {
    return this.#hasEdits && this.state.kind !== 'saved' && this.state.kind !== 'new';
  }

  /** Begins to keep a worksheet; the one before is written first and given up. */
  async open(worksheet: KeptWorksheet): Promise<void> {
    await this.release();
    this.#id = worksheet.id;
    this.#hasEdits = false;
    const store = this.#store;
    if (store === null) {
      this.claimState = 'unguarded';
      this.state = { kind: 'new' };
      return;
    }
    const saver = new Saver({
      store: creatingFirst(store),
      id: worksheet.id,
      rev: worksheet.stored?.rev ?? NOT_STORED,
      savedAt: worksheet.stored?.savedAt ?? 0,
    });
    this.#saver = saver;
    const endSaver = saver.subscribe((state) => this.#follow(state));
    const claim = new WorksheetClaim({
      id: worksheet.id,
      handOver: async () => (await saver.flush()).kind === 'saved',
    });
    this.#claim = claim;
    let wasShut = false;
    const endClaim = claim.subscribe((state) => {
      this.claimState = state;
      if (state === 'elsewhere' || state === 'lost') wasShut = true;
      if (state === 'writer' && wasShut) void this.refresh();
    });
    this.#endSubscriptions = () => {
      endSaver();
      endClaim();
    };
  }

  /** Notes an edit; `produce` makes the worksheet's text when the write starts. */
  commit(produce: () => WorksheetText): void {
    this.#hasEdits = true;
    if (this.#saver !== null) this.#saver.commit(produce);
    else if (this.#storeFault !== null) this.state = { kind: 'nowhere', fault: this.#storeFault };
  }

  /** Reads the stored worksheet again if it is not the text shown, and hands it over. */
  async refresh(): Promise<void> {
    if (this.#store === null || this.#saver === null) return;
    const saver = this.#saver;
    const stored = await this.#store.read(this.#id);
    if (!stored.ok || saver !== this.#saver || stored.value.rev === saver.rev) return;
    await saver.adopt(stored.value);
    this.onStale(stored.value);
  }

  /** Makes this tab the one that writes. True when the other tab's edits are all stored. */
  async takeOver(): Promise<boolean> {
    return (await this.#claim?.takeOver()) ?? true;
  }

  /** Writes what is pending. */
  async flush(): Promise<void> {
    await this.#saver?.flush();
  }

  /** Tries to write again what failed. */
  retry(): void {
    this.#saver?.retry();
  }

  /** In a conflict: goes on with what is in this tab. */
  async keepMine(): Promise<void> {
    await this.#saver?.keepMine();
  }

  /** In a conflict: goes on with what the other tab stored. */
  async takeTheirs(): Promise<void> {
    if (this.state.kind !== 'conflict') return;
    const { stored } = this.state.fault;
    await this.#saver?.adopt(stored);
    this.onStale(stored);
  }

  /** Writes what is pending and gives the worksheet up. */
  async release(): Promise<void> {
    await this.#saver?.flush();
    this.#endSubscriptions();
    this.#endSubscriptions = () => undefined;
    this.#claim?.release();
    this.#saver = null;
    this.#claim = null;
  }

  #follow(state: SaveState): void {
    if (state.kind === 'saved') {
      this.state = state.at === 0 ? { kind: 'new' } : state;
      if (this.#hasEdits && !this.#hasAsked) void this.#askPersistence();
    } else if (state.kind === 'saving') this.state = { kind: 'saving' };
    else this.state = state;
  }

  async #askPersistence(): Promise<void> {
    this.#hasAsked = true;
    this.persistence = await askPersistence();
  }
}

/** The store as a saver sees it: a worksheet that is not stored yet is created by its first save. */
function creatingFirst(store: Store): Pick<Store, 'save' | 'create' | 'restore'> {
  return {
    save: ({ basedOn, ...worksheet }: WorksheetSave): Promise<Result<Saved, StoreFault>> =>
      basedOn === NOT_STORED ? store.create(worksheet) : store.save({ ...worksheet, basedOn }),
    create: (worksheet) => store.create(worksheet),
    restore: (id) => store.restore(id),
  };
}

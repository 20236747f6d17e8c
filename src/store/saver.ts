/**
 * Saves one worksheet after each committed edit. What must stay true: the state is `saved` only when the last committed
 * edit is in the database; an edit that could not be written stays pending; one write runs at a time, and all edits
 * committed meanwhile go into the next one.
 *
 * Why whole texts and not a journal of changes: a text of 10,000 lines is put in some 20 ms, nearly all of it outside the
 * page's thread, and is one thing that is either there or not. A journal would need the worksheet's changes to be
 * readable for ever, as a second file format. Making the text costs the page more than storing it, hence the laziness.
 */
import type { Store, WorksheetText } from './store';
import { plainFault } from './store-fault';
import type { ConflictFault, StoreFault } from './store-fault';

/** Where the last committed edit is. Times are milliseconds since 1970. */
export type SaveState =
  | { readonly kind: 'saved'; readonly at: number }
  | { readonly kind: 'saving'; readonly since: number }
  | { readonly kind: 'failed'; readonly fault: StoreFault }
  | { readonly kind: 'conflict'; readonly fault: ConflictFault };

/** What a saver works with. */
export interface SaverOptions {
  readonly store: Pick<Store, 'save' | 'create' | 'restore'>;
  readonly id: string;
  /** The `rev` and `savedAt` that the worksheet was read or created with. */
  readonly rev: number;
  readonly savedAt: number;
  /** Starts a write soon; a new task by default, so that the edit is on the screen before its text is made. */
  readonly soon?: (start: () => void) => void;
  readonly now?: () => number;
}

/** Makes the text of the worksheet as it is at the moment of the call. */
export type TextProducer = () => WorksheetText;

/** The saver of one open worksheet. */
export class Saver {
  readonly #store: SaverOptions['store'];
  readonly #id: string;
  readonly #soon: (start: () => void) => void;
  readonly #now: () => number;
  readonly #listeners = new Set<(state: SaveState) => void>();
  #rev: number;
  #state: SaveState;
  #pending: TextProducer | null = null;
  #running: Promise<void> | null = null;
  #startAsked = false;
  #recreate = false;

  constructor(options: SaverOptions) {
    this.#store = options.store;
    this.#id = options.id;
    this.#rev = options.rev;
    this.#state = { kind: 'saved', at: options.savedAt };
    this.#soon = options.soon ?? ((start) => void setTimeout(start, 0));
    this.#now = options.now ?? Date.now;
  }

  /** Where the last committed edit is. */
  get state(): SaveState {
    return this.#state;
  }

  /** The stored text that the next save replaces. */
  get rev(): number {
    return this.#rev;
  }

  /** Calls `listener` now and at each change of state. Returns the function that ends it. */
  subscribe(listener: (state: SaveState) => void): () => void {
    this.#listeners.add(listener);
    listener(this.#state);
    return () => this.#listeners.delete(listener);
  }

  /** Notes an edit and has it written; `produce` is called when the write starts. In a conflict it waits for a decision. */
  commit(produce: TextProducer): void {
    this.#pending = produce;
    this.#ask();
  }

  /** Tries again to write what failed. */
  retry(): void {
    this.#ask();
  }

  /** Writes what is pending without waiting for a new task; resolves with the state once no write runs any more. */
  async flush(): Promise<SaveState> {
    this.#start();
    await this.#settled();
    return this.#state;
  }

  /**
   * Goes on with the edits made here: after a conflict over the other tab's version (which becomes a recovery copy), after
   * `missing` by restoring the worksheet from the trash or keeping it anew.
   */
  async keepMine(): Promise<SaveState> {
    if (this.#state.kind === 'conflict') {
      this.#recreate = false;
      this.#rev = this.#state.fault.stored.rev;
      this.#become({ kind: 'saving', since: this.#now() });
    } else if (this.#state.kind === 'failed' && this.#state.fault.code === 'missing') {
      if (this.#state.fault.trashed) {
        const restored = await this.#store.restore(this.#id);
        if (!restored.ok) {
          this.#become({ kind: 'failed', fault: restored.fault });
          return this.#state;
        }
      } else {
        this.#recreate = true;
      }
    }
    return this.flush();
  }

  /** Goes on with what is stored, which the caller has read: edits of this tab that are not written yet are let go. */
  async adopt(stored: { readonly rev: number; readonly savedAt: number }): Promise<void> {
    await this.#settled();
    this.#pending = null;
    this.#recreate = false;
    this.#rev = stored.rev;
    this.#become({ kind: 'saved', at: stored.savedAt });
  }

  /** Resolves once no write runs. */
  async #settled(): Promise<void> {
    while (this.#running !== null) await this.#running;
  }

  #become(state: SaveState): void {
    this.#state = state;
    for (const listener of [...this.#listeners]) listener(state);
  }

  #ask(): void {
    if (this.#pending === null || this.#state.kind === 'conflict') return;
    if (this.#state.kind !== 'saving') this.#become({ kind: 'saving', since: this.#now() });
    if (this.#startAsked || this.#running !== null) return;
    this.#startAsked = true;
    this.#soon(() => this.#start());
  }

  #start(): void {
    this.#startAsked = false;
    if (this.#running !== null || this.#pending === null || this.#state.kind === 'conflict') return;
    if (this.#state.kind !== 'saving') this.#become({ kind: 'saving', since: this.#now() });
    this.#running = this.#writeAll();
  }

  /** Writes until nothing is pending or a write fails. */
  async #writeAll(): Promise<void> {
    let produce: TextProducer | null;
    while ((produce = this.#pending) !== null) {
      this.#pending = null;
      const failure = await this.#writeOnce(produce);
      if (failure !== null) {
        // An edit committed during the failed write is the newer one and holds this one too.
        this.#pending ??= produce;
        this.#running = null;
        this.#become(failure);
        return;
      }
    }
    this.#running = null;
  }

  /** The state that says why it failed, or null. */
  async #writeOnce(produce: TextProducer): Promise<SaveState | null> {
    let worksheet: WorksheetText;
    try {
      worksheet = produce();
    } catch (error) {
      return { kind: 'failed', fault: plainFault('unexpected', String(error)) };
    }
    const saved = this.#recreate
      ? await this.#store.create({ id: this.#id, ...worksheet })
      : await this.#store.save({ id: this.#id, basedOn: this.#rev, ...worksheet });
    if (!saved.ok) {
      const { fault } = saved;
      return fault.code === 'conflict' ? { kind: 'conflict', fault } : { kind: 'failed', fault };
    }
    this.#recreate = false;
    this.#rev = saved.value.rev;
    if (this.#pending === null) this.#become({ kind: 'saved', at: saved.value.savedAt });
    return null;
  }
}

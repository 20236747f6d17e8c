/**
 * One writer per worksheet among the tabs of this browser. What must stay true: a tab becomes `writer` only with the
 * worksheet's lock; one that is asked to hand over stops first and writes its last edits after. A tab that does not answer
 * learns a moment late that it was robbed, so nothing here is needed for safety: the store's compare-and-set refuses the
 * late save.
 */

/**
 * This tab's part in the worksheet. `asking`: not known yet; `writer`: it may edit, and has to read the stored worksheet
 * again first if its `rev` is not the one shown; `elsewhere`: another tab edits it; `lost`: another tab took it over from
 * this one; `unguarded`: the browser has no locks, so tabs find out at saving only; `released`: over.
 */
export type ClaimState = 'asking' | 'writer' | 'elsewhere' | 'lost' | 'unguarded' | 'released';

/** The part of the browser's LockManager that is used. */
export interface LockAccess {
  request(name: string, options: LockOptions, granted: (lock: Lock | null) => Promise<void>): Promise<void>;
}

/** The part of a BroadcastChannel that is used. */
export interface NoticeChannel {
  onmessage: ((event: MessageEvent<unknown>) => void) | null;
  postMessage(message: unknown): void;
  close(): void;
}

/** What a claim works with. */
export interface ClaimOptions {
  readonly id: string;
  /** Writes what is pending; answers whether everything is in the store. Called when another tab takes over. */
  readonly handOver: () => Promise<boolean>;
  /** The browser's own unless given; undefined where there are none. */
  readonly locks?: LockAccess | undefined;
  /** Opens a channel to the other tabs; a BroadcastChannel unless given. */
  readonly openChannel?: ((name: string) => NoticeChannel) | undefined;
  /** How long a take-over waits for the other tab to write its last edits, in milliseconds. */
  readonly patienceMs?: number;
}

/** What tabs say to each other about one worksheet. */
type Notice = { readonly kind: 'take-over' } | { readonly kind: 'handed-over'; readonly written: boolean };

const defaultPatienceMs = 3_000;

function readNotice(data: unknown): Notice | null {
  if (typeof data !== 'object' || data === null || !('kind' in data)) return null;
  if (data.kind === 'take-over') return { kind: 'take-over' };
  if (data.kind !== 'handed-over' || !('written' in data) || typeof data.written !== 'boolean') return null;
  return { kind: 'handed-over', written: data.written };
}

function browserLocks(): LockAccess | undefined {
  return typeof navigator === 'undefined' ? undefined : navigator.locks;
}

function openBrowserChannel(name: string): NoticeChannel {
  return new BroadcastChannel(name);
}

/** This tab's claim to write one worksheet; made when the worksheet is opened, released when it is closed. */
export class WorksheetClaim {
  readonly #name: string;
  readonly #handOver: () => Promise<boolean>;
  readonly #locks: LockAccess | undefined;
  readonly #channel: NoticeChannel;
  readonly #patienceMs: number;
  readonly #listeners = new Set<(state: ClaimState) => void>();
  #state: ClaimState = 'asking';
  #turn = 0;
  #turnThatHeld = 0;
  #letGo: () => void = () => undefined;
  #stopWaiting = new AbortController();
  #heard: (notice: Notice) => void = () => undefined;

  constructor(options: ClaimOptions) {
    this.#name = `levelwright worksheet ${options.id}`;
    this.#handOver = options.handOver;
    this.#locks = 'locks' in options ? options.locks : browserLocks();
    this.#patienceMs = options.patienceMs ?? defaultPatienceMs;
    this.#channel = (options.openChannel ?? openBrowserChannel)(this.#name);
    this.#channel.onmessage = (event) => {
      const notice = readNotice(event.data);
      if (notice?.kind === 'take-over') void this.#yield();
      else if (notice !== null) this.#heard(notice);
    };
    void this.#ask({ ifAvailable: true });
  }

  /** This tab's part now. */
  get state(): ClaimState {
    return this.#state;
  }

  /** Calls `listener` now and at each change. Returns the function that ends it. */
  subscribe(listener: (state: ClaimState) => void): () => void {
    this.#listeners.add(listener);
    listener(this.#state);
    return () => this.#listeners.delete(listener);
  }

  /**
   * Makes this tab the writer. Resolves with true when the other tab has said that all its edits are stored, with false
   * when it could not store them or did not answer: then they are still in that tab and its saves will be conflicts.
   */
  async takeOver(): Promise<boolean> {
    if (!this.#isShutOut()) return true;
    const written = await this.#askForHandOver();
    // The other tab may have been closed meanwhile, which made this one the writer.
    if (this.#isShutOut()) {
      this.#stopWaiting.abort();
      await new Promise<void>((resolve) => void this.#ask({ steal: true }, resolve));
    }
    return written;
  }

  /** Gives the worksheet up, to the next tab that waits for it. */
  release(): void {
    this.#become('released');
    this.#stopWaiting.abort();
    this.#letGo();
    this.#channel.close();
    this.#listeners.clear();
  }

  #isShutOut(): boolean {
    return this.#state === 'elsewhere' || this.#state === 'lost';
  }

  #become(state: ClaimState): void {
    if (this.#state === state || this.#state === 'released') return;
    this.#state = state;
    for (const listener of [...this.#listeners]) listener(state);
  }

  /** Requests the lock; settles when it is refused, given back or taken away. `answered` is called when that is known. */
  async #ask(options: LockOptions, answered: () => void = () => undefined): Promise<void> {
    if (this.#locks === undefined) {
      this.#become('unguarded');
      return;
    }
    const turn = ++this.#turn;
    try {
      await this.#locks.request(this.#name, options, async (lock) => {
        if (lock === null || this.#state === 'released') return;
        this.#turnThatHeld = turn;
        const givenBack = new Promise<void>((resolve) => {
          this.#letGo = resolve;
        });
        this.#become('writer');
        answered();
        await givenBack;
      });
      if (this.#turnThatHeld !== turn) this.#wait('elsewhere');
    } catch {
      // Given up by this tab itself, for a later request.
      if (turn !== this.#turn) return;
      if (this.#turnThatHeld !== turn) this.#become('unguarded');
      else {
        // Another tab took the lock, after asking or without.
        const unasked = this.#state === 'writer';
        this.#wait('lost');
        if (unasked) await this.#handOver();
      }
    } finally {
      answered();
    }
  }

  /** Takes the place in the queue, so that the worksheet comes to this tab when the writer is closed. */
  #wait(state: 'elsewhere' | 'lost'): void {
    if (this.#state === 'released') return;
    this.#become(state);
    this.#stopWaiting = new AbortController();
    void this.#ask({ signal: this.#stopWaiting.signal });
  }

  /** Another tab wants the worksheet: stop, write, tell. The lock stays here until that tab takes it. */
  async #yield(): Promise<void> {
    if (this.#state !== 'writer') return;
    this.#become('lost');
    const written = await this.#handOver();
    const notice: Notice = { kind: 'handed-over', written };
    if (this.state === 'lost') this.#channel.postMessage(notice);
  }

  #askForHandOver(): Promise<boolean> {
    return new Promise((resolve) => {
      const timer = setTimeout(() => resolve(false), this.#patienceMs);
      this.#heard = (notice) => {
        if (notice.kind !== 'handed-over') return;
        clearTimeout(timer);
        resolve(notice.written);
      };
      const notice: Notice = { kind: 'take-over' };
      this.#channel.postMessage(notice);
    });
  }
}

/** Web Locks and broadcast channels for tests: what tabs of one browser share, after the Web Locks specification. */
import type { LockAccess, NoticeChannel } from '../../src/store';

interface Waiting {
  readonly grant: () => void;
}

interface Held {
  readonly rob: () => void;
}

/** The locks of one browser. A lock is granted in a later task, as in a browser. */
export class FakeLocks implements LockAccess {
  readonly #held = new Map<string, Held>();
  readonly #queues = new Map<string, Waiting[]>();

  /** How many requests wait for the lock `name`. */
  waiting(name: string): number {
    return this.#queues.get(name)?.length ?? 0;
  }

  request(name: string, options: LockOptions, granted: (lock: Lock | null) => Promise<void>): Promise<void> {
    return new Promise((resolve, reject) => {
      const hold = (): void => {
        const held: Held = { rob: () => reject(new DOMException('stolen', 'AbortError')) };
        this.#held.set(name, held);
        void granted({ name, mode: 'exclusive' }).then(() => {
          if (this.#held.get(name) === held) {
            this.#held.delete(name);
            this.#queues.get(name)?.shift()?.grant();
          }
          resolve();
        }, reject);
      };
      setImmediate(() => {
        const queue = this.#queues.get(name) ?? [];
        this.#queues.set(name, queue);
        if (options.steal === true) {
          this.#held.get(name)?.rob();
          hold();
        } else if (!this.#held.has(name)) {
          hold();
        } else if (options.ifAvailable === true) {
          void granted(null).then(resolve, reject);
        } else {
          const waiting: Waiting = { grant: hold };
          queue.push(waiting);
          options.signal?.addEventListener('abort', () => {
            const place = queue.indexOf(waiting);
            if (place < 0) return;
            queue.splice(place, 1);
            reject(new DOMException('given up', 'AbortError'));
          });
        }
      });
    });
  }
}

/** The broadcast channels of one browser. Messages arrive in a later task, as structured clones. */
export class FakeChannels {
  readonly #open = new Map<string, Set<NoticeChannel>>();

  readonly openChannel = (name: string): NoticeChannel => {
    const peers = this.#open.get(name) ?? new Set();
    this.#open.set(name, peers);
    const channel: NoticeChannel = {
      onmessage: null,
      postMessage: (message) => {
        const data: unknown = structuredClone(message);
        for (const peer of peers) {
          if (peer !== channel)
            setImmediate(() => peers.has(peer) && peer.onmessage?.({ data } as MessageEvent<unknown>));
        }
      },
      close: () => peers.delete(channel),
    };
    peers.add(channel);
    return channel;
  };
}

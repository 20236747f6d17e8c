/**
 * Jobs on the page's own thread, where there are no workers and in tests: in slices, between which others get their turn. Every
 * message passes through the codec and is cloned, as if there were a worker.
 */
import { Desk } from './desk';
import { decodeOrder, decodeReply, encode, type Message, type Order, type Reply } from './messages';
import { Pool, type OpenPort, type PoolOptions, type Port } from './pool';
import type { Runner } from './runner';

/** How long a slice holds the thread, but for the block that it is in; and for compiling, which is one piece of work. */
const SLICE_MS = 12;

/** A message as it comes out at the other end. */
export const carried = (message: Message): unknown => {
  const { data, transfer } = encode(message);
  return structuredClone(data, { transfer });
};

/** A port to a desk on this thread. */
export const openInline: OpenPort = (onReply): Port => {
  const desk = new Desk();
  const orders: Order[] = [];
  let current: Generator<undefined, Reply | undefined> | undefined;
  let isEnded = false;
  let isWaiting = false;

  const slice = (): void => {
    isWaiting = false;
    const endMs = performance.now() + SLICE_MS;
    while (!isEnded && performance.now() < endMs) {
      if (current === undefined) {
        const order = orders.shift();
        if (order === undefined) return;
        current = desk.answer(order);
      }
      const step = current.next();
      if (step.done !== true) continue;
      current = undefined;
      if (step.value === undefined) continue;
      const reply = decodeReply(carried(step.value));
      if (!reply.ok) throw new Error(reply.fault);
      onReply(reply.value);
    }
    wake();
  };
  const wake = (): void => {
    if (isWaiting || isEnded) return;
    isWaiting = true;
    setTimeout(slice, 0);
  };
  return {
    post: (order) => {
      const read = decodeOrder(carried(order));
      if (!read.ok) throw new Error(read.fault);
      orders.push(read.value);
      wake();
    },
    end: () => {
      isEnded = true;
    },
  };
};

export const inlineRunner = (options: Partial<PoolOptions> = {}): Runner =>
  new Pool(openInline, { size: 1, ...options });

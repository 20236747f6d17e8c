/** Jobs in workers: as many as the machine has processors to spare, at least one and at most four. */
import { inlineRunner } from './inline-runner';
import { decodeReply, encode } from './messages';
import { Pool, type OpenPort, type Port } from './pool';
import type { Runner } from './runner';

const MOST_WORKERS = 4;

/** Workers for so many processors: one is left to the page. */
export const workersFor = (processors: number): number =>
  Math.max(1, Math.min(MOST_WORKERS, Math.floor(processors) - 1));

/** A port to a worker that `make` gives. What a worker says that is not understood counts as its death. */
export const openWorker =
  (make: () => Worker): OpenPort =>
  (onReply, onDeath): Port => {
    let worker: Worker | undefined;
    let isDead = false;
    const die = (): void => {
      if (isDead) return;
      isDead = true;
      worker?.terminate();
      // Later, since the port may not be in its place yet.
      setTimeout(onDeath, 0);
    };
    try {
      worker = make();
      worker.onerror = (event) => {
        event.preventDefault();
        die();
      };
      worker.onmessageerror = die;
      worker.onmessage = ({ data }: MessageEvent<unknown>) => {
        if (isDead) return;
        const reply = decodeReply(data);
        if (reply.ok) onReply(reply.value);
        else die();
      };
    } catch {
      die();
    }
    return {
      post: (order) => {
        if (isDead) return;
        const { data, transfer } = encode(order);
        try {
          worker?.postMessage(data, transfer);
        } catch {
          die();
        }
      },
      end: () => {
        isDead = true;
        worker?.terminate();
      },
    };
  };

export const workerRunner = (make: () => Worker, processors: number): Runner =>
  new Pool(openWorker(make), { size: workersFor(processors) });

/** A runner in workers, or on this thread where there are none. */
export const usualRunner = (make: () => Worker, processors: number): Runner =>
  typeof Worker === 'undefined' ? inlineRunner() : workerRunner(make, processors);

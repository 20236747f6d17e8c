/** Ports to workers: what they post, what they hear, and how they die. The worker here is a stand-in. */
import { describe, expect, it } from 'vitest';
import type { Reply } from '../../src/jobs/messages';
import { carried } from '../../src/jobs/inline-runner';
import { openWorker, workersFor } from '../../src/jobs/worker-runner';

class StandIn {
  onmessage: ((event: { data: unknown }) => void) | null = null;
  onerror: ((event: { preventDefault: () => void }) => void) | null = null;
  onmessageerror: (() => void) | null = null;
  readonly posted: unknown[] = [];
  isEnded = false;
  postMessage(data: unknown): void {
    this.posted.push(data);
  }
  terminate(): void {
    this.isEnded = true;
  }
}

const turn = (): Promise<void> => new Promise((resolve) => setTimeout(resolve, 1));

function opened(make?: () => Worker): {
  worker: StandIn;
  port: ReturnType<ReturnType<typeof openWorker>>;
  replies: Reply[];
  deaths: () => number;
} {
  const worker = new StandIn();
  const replies: Reply[] = [];
  let deaths = 0;
  const port = openWorker(make ?? (() => worker as unknown as Worker))(
    (reply) => replies.push(reply),
    () => deaths++,
  );
  return { worker, port, replies, deaths: () => deaths };
}

describe('a port to a worker', () => {
  it('posts through the codec and hears replies', () => {
    const { worker, port, replies } = opened();
    port.post({ kind: 'forget', job: 4 });
    expect(worker.posted).toEqual([{ version: 1, message: { kind: 'forget', job: 4 } }]);
    worker.onmessage?.({ data: carried({ kind: 'failed', job: 4, why: 'no' }) });
    expect(replies).toEqual([{ kind: 'failed', job: 4, why: 'no' }]);
  });

  it.each([
    ['an error', (worker: StandIn) => worker.onerror?.({ preventDefault: () => undefined })],
    ['a message that cannot be read', (worker: StandIn) => worker.onmessageerror?.()],
    ['a message that is not understood', (worker: StandIn) => worker.onmessage?.({ data: 'hm' })],
  ])('dies once of %s', async (_, happen) => {
    const { worker, port, deaths } = opened();
    happen(worker);
    happen(worker);
    await turn();
    expect(deaths()).toBe(1);
    expect(worker.isEnded).toBe(true);
    port.post({ kind: 'forget', job: 1 });
    expect(worker.posted).toEqual([]);
  });

  it('dies later, not while it is opened, where no worker can be made', async () => {
    const { deaths } = opened(() => {
      throw new Error('no workers here');
    });
    expect(deaths()).toBe(0);
    await turn();
    expect(deaths()).toBe(1);
  });
});

describe('the number of workers', () => {
  it('leaves a processor to the page, is at least one and at most four', () => {
    expect([1, 2, 3, 5, 64].map(workersFor)).toEqual([1, 1, 2, 4, 4]);
  });
});

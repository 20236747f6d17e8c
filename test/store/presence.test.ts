import { beforeEach, describe, expect, it } from 'vitest';

import { WorksheetClaim } from '../../src/store';
import type { ClaimOptions, ClaimState, LockAccess } from '../../src/store';

import { FakeChannels, FakeLocks } from './fake-tabs';
import { tasks, until } from './support';

describe('tabs that claim a worksheet', () => {
  let locks: FakeLocks;
  let channels: FakeChannels;
  beforeEach(() => {
    locks = new FakeLocks();
    channels = new FakeChannels();
  });

  /** A tab's claim, with the states it went through and how often it was asked to write its last edits. */
  function claim(options: Partial<ClaimOptions> = {}): { claim: WorksheetClaim; states: ClaimState[] } {
    const made = new WorksheetClaim({
      id: 'a',
      handOver: () => Promise.resolve(true),
      locks,
      openChannel: channels.openChannel,
      ...options,
    });
    const states: ClaimState[] = [];
    made.subscribe((state) => states.push(state));
    return { claim: made, states };
  }

  async function writerAndWaiting(
    options: Partial<ClaimOptions> = {},
  ): Promise<{ first: ReturnType<typeof claim>; second: ReturnType<typeof claim> }> {
    const first = claim(options);
    await until(() => first.claim.state === 'writer');
    const second = claim();
    await until(() => second.claim.state === 'elsewhere');
    return { first, second };
  }

  it('write it when they are the first, and are told when it is open elsewhere', async () => {
    const { first, second } = await writerAndWaiting();
    expect(first.states).toEqual(['asking', 'writer']);
    expect(second.states).toEqual(['asking', 'elsewhere']);
  });

  it('do not get in the way of other worksheets', async () => {
    const [first, second] = [claim(), claim({ id: 'b' })];
    await until(() => first.claim.state === 'writer' && second.claim.state === 'writer');
  });

  it('get it when the writer’s tab is closed', async () => {
    const { first, second } = await writerAndWaiting();
    first.claim.release();
    await until(() => second.claim.state === 'writer');
    expect(first.states).toEqual(['asking', 'writer', 'released']);
  });

  it('take it over once the writer has stopped and then written its last edits', async () => {
    const events: string[] = [];
    let written: (all: boolean) => void = () => undefined;
    const { first, second } = await writerAndWaiting({
      handOver: () => {
        events.push(`writes while ${first.claim.state}`);
        return new Promise((resolve) => {
          written = resolve;
        });
      },
    });
    const taken = second.claim.takeOver().then((all) => events.push(`taken over, all written: ${all}`));
    await until(() => events.length === 1);
    expect(second.claim.state).toBe('elsewhere');
    written(true);
    await taken;
    expect(events).toEqual(['writes while lost', 'taken over, all written: true']);
    expect(second.claim.state).toBe('writer');
    expect(first.states).toEqual(['asking', 'writer', 'lost']);
    // The first tab waits for it now, and the second no more.
    await until(() => locks.waiting('levelwright worksheet a') === 1);
    await tasks(5);
    expect(locks.waiting('levelwright worksheet a')).toBe(1);
  });

  it('are told when the writer could not write its last edits', async () => {
    const { first, second } = await writerAndWaiting({ handOver: () => Promise.resolve(false) });
    expect(await second.claim.takeOver()).toBe(false);
    expect(second.claim.state).toBe('writer');
    expect(first.claim.state).toBe('lost');
  });

  it('take it over from a writer that does not answer, which then still tries to write', async () => {
    const writes: string[] = [];
    const deaf = { onmessage: null, postMessage: () => undefined, close: () => undefined };
    const first = claim({
      openChannel: () => deaf,
      handOver: () => Promise.resolve(writes.push(first.claim.state) > 0),
    });
    await until(() => first.claim.state === 'writer');
    const second = claim({ patienceMs: 5 });
    await until(() => second.claim.state === 'elsewhere');
    expect(await second.claim.takeOver()).toBe(false);
    expect(second.claim.state).toBe('writer');
    await until(() => first.claim.state === 'lost');
    expect(writes).toEqual(['lost']);
  });

  it('can take it back, and get it back when the other tab is closed', async () => {
    const { first, second } = await writerAndWaiting();
    await second.claim.takeOver();
    await until(() => first.claim.state === 'lost');
    expect(await first.claim.takeOver()).toBe(true);
    expect(first.claim.state).toBe('writer');
    expect(second.claim.state).toBe('lost');
    first.claim.release();
    await until(() => second.claim.state === 'writer');
  });

  it('can take it back even when the tab that asked for it was closed before it took it', async () => {
    const { first, second } = await writerAndWaiting({ patienceMs: 5 });
    void second.claim.takeOver();
    await until(() => first.claim.state === 'lost');
    second.claim.release();
    await first.claim.takeOver();
    expect(first.claim.state).toBe('writer');
    const third = claim();
    await until(() => third.claim.state === 'elsewhere');
  });

  it('end up with one writer when two take over at once, and with another one when that is closed', async () => {
    const { first, second } = await writerAndWaiting();
    const third = claim();
    await until(() => third.claim.state === 'elsewhere');
    const all = [first.claim, second.claim, third.claim];
    await Promise.all([second.claim.takeOver(), third.claim.takeOver()]);
    await until(() => all.filter(({ state }) => state === 'lost').length === 2);
    const writer = all.find(({ state }) => state === 'writer');
    writer?.release();
    await until(() => all.some(({ state }) => state === 'writer'));
    expect(all.map(({ state }) => state).sort()).toEqual(['lost', 'released', 'writer']);
  });

  it('have nothing to take over when they write already', async () => {
    const { first } = await writerAndWaiting();
    expect(await first.claim.takeOver()).toBe(true);
    expect(first.states).toEqual(['asking', 'writer']);
  });

  it('are unguarded where the browser has no locks, or refuses them', async () => {
    const refusing: LockAccess = { request: () => Promise.reject(new DOMException('not here', 'SecurityError')) };
    const [without, refused] = [claim({ locks: undefined }), claim({ locks: refusing })];
    await until(() => without.claim.state === 'unguarded' && refused.claim.state === 'unguarded');
    expect(await without.claim.takeOver()).toBe(true);
    expect(without.claim.state).toBe('unguarded');
  });

  it('give it up even when they are closed before they know whether they have it', async () => {
    const first = claim();
    first.claim.release();
    const second = claim();
    await until(() => second.claim.state === 'writer');
    expect(first.claim.state).toBe('released');
  });

  it('pay no heed to messages of another shape', async () => {
    const { first, second } = await writerAndWaiting();
    const stranger = channels.openChannel('levelwright worksheet a');
    for (const message of [null, 7, 'take-over', {}, { kind: 'other' }, { kind: 'handed-over', written: 'yes' }]) {
      stranger.postMessage(message);
    }
    await tasks(5);
    expect([first.claim.state, second.claim.state]).toEqual(['writer', 'elsewhere']);
    stranger.postMessage({ kind: 'take-over' });
    await until(() => first.claim.state === 'lost');
  });
});

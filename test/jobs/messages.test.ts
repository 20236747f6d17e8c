/** The codec: what goes in comes out, columns are handed over, and what is no message is not taken. */
import { describe, expect, it } from 'vitest';
import { Desk } from '../../src/jobs/desk';
import { carried } from '../../src/jobs/inline-runner';
import { decodeOrder, decodeReply, encode, type Order, type Reply } from '../../src/jobs/messages';
import { runOf } from './support';

const ORDERS: readonly Order[] = [
  { kind: 'begin', job: 1, run: runOf(5000) },
  { kind: 'chunk', job: 1, from: 0, to: 5000, isKept: true },
  { kind: 'account', job: 1 },
  { kind: 'statistics', job: 1, figures: new Float64Array([-70, -68, -Infinity, NaN]) },
  { kind: 'forget', job: 1 },
  { kind: 'account', job: 1 },
];

function replyTo(desk: Desk, order: Order): Reply | undefined {
  const work = desk.answer(order);
  let step = work.next();
  while (step.done !== true) step = work.next();
  return step.value;
}

describe('the codec', () => {
  it('brings orders and the replies to them across as they were', () => {
    const desk = new Desk();
    const kinds: (string | undefined)[] = [];
    for (const order of ORDERS) {
      const before = structuredClone(order);
      const came = decodeOrder(carried(order));
      expect(came).toEqual({ ok: true, value: before });
      const reply = came.ok ? replyTo(desk, came.value) : undefined;
      kinds.push(reply?.kind);
      if (reply === undefined) continue;
      const told = structuredClone(reply);
      expect(decodeReply(carried(reply))).toEqual({ ok: true, value: told });
    }
    expect(kinds).toEqual([undefined, 'part', 'account', 'statistics', undefined, 'failed']);
  });

  it('hands columns over instead of copying them', () => {
    const figures = new Float64Array(100);
    carried({ kind: 'statistics', job: 1, figures });
    expect(figures.length).toBe(0);
    const desk = new Desk();
    replyTo(desk, { kind: 'begin', job: 2, run: runOf(9000) });
    const part = replyTo(desk, { kind: 'chunk', job: 2, from: 0, to: 9000, isKept: true });
    if (part?.kind !== 'part') throw new Error('a chunk gives a part');
    expect(encode(part).transfer).toEqual([part.part.bins.buffer, part.part.figures?.buffer]);
  });

  it.each([
    ['nothing', undefined],
    ['a text', 'chunk'],
    ['another version', { version: 0, message: { kind: 'account', job: 1 } }],
    ['no kind', { version: 1, message: { job: 1 } }],
    ['a kind that there is not', { version: 1, message: { kind: 'dance', job: 1 } }],
    ['no job', { version: 1, message: { kind: 'account' } }],
  ])('does not take %s', (_, data) => {
    expect(decodeOrder(data).ok).toBe(false);
    expect(decodeReply(data).ok).toBe(false);
  });

  it('takes no order for a reply', () => {
    expect(decodeReply(carried({ kind: 'forget', job: 1 })).ok).toBe(false);
    expect(decodeOrder(carried({ kind: 'failed', job: 1, why: '' })).ok).toBe(false);
  });
});

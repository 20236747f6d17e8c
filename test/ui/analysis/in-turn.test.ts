// Pieces of work in tasks of their own.
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';

import { inTurn } from '../../../src/ui/analysis/in-turn';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

describe('work in turn', () => {
  it('is done a piece a task, and told when all is there', () => {
    const did: number[] = [];
    const done = vi.fn();
    inTurn(
      [1, 2, 3].map((n) => () => did.push(n)),
      done,
    );
    expect(did).toEqual([]);
    vi.advanceTimersToNextTimer();
    expect(did).toEqual([1]);
    vi.runAllTimers();
    expect(did).toEqual([1, 2, 3]);
    expect(done).toHaveBeenCalledExactlyOnceWith([1, 2, 3]);
  });

  it('ends when it is not wanted any longer', () => {
    const done = vi.fn();
    const piece = vi.fn();
    const end = inTurn([piece, piece], done);
    vi.advanceTimersToNextTimer();
    end();
    vi.runAllTimers();
    expect(piece).toHaveBeenCalledTimes(1);
    expect(done).not.toHaveBeenCalled();
  });
});

// Threads: curves to lines in view, one stub each way for those out of view.
import { describe, expect, it } from 'vitest';

import { threadsOf } from '../../../src/ui/grid/threads';

const view = { from: 300, restsOn: [], usedBy: [], top: 100, bottom: 600 };

describe('threads', () => {
  it('begin and end at the middles of their lines', () => {
    const [thread] = threadsOf({ ...view, restsOn: [200] });
    expect(thread).toMatchObject({ kind: 'rests-on', end: 200 });
    expect(thread?.path).toMatch(/^M17 300 C.* 17 200$/);
  });

  it('leave the view in one stub each way, however many lines are there', () => {
    const threads = threadsOf({ ...view, restsOn: [10, 20, 30, 900], usedBy: [800, 400] });
    expect(threads.map(({ kind, end }) => [kind, end])).toEqual([
      ['rests-on', undefined],
      ['rests-on', undefined],
      ['used-by', 400],
      ['used-by', undefined],
    ]);
  });

  it('bow deeper the farther the lines are apart, and stay in the margin', () => {
    const depth = (to: number): number =>
      Number(/C(-?[\d.]+)/.exec(threadsOf({ ...view, restsOn: [to] })[0]?.path ?? '')?.[1]);
    expect(depth(280)).toBeGreaterThan(depth(120));
    expect(depth(120)).toBeGreaterThanOrEqual(0);
  });

  it('are not drawn from a line out of view', () => {
    expect(threadsOf({ ...view, from: 50, restsOn: [200] })).toEqual([]);
  });
});

// Two tabs that work on one worksheet at the same time, in many orders: no acknowledged edit may vanish without a conflict.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import type { Store } from '../../src/store';

import { createSheet, faultOf, newBrowser, openTab, sheet, tasks, textOf, valueOf } from './support';

/** One tab's next deed: how many tasks it lets pass first, and whether it reads again before it saves. */
interface Deed {
  readonly pauses: number;
  readonly reads: boolean;
}

const deeds = fc.array(fc.record({ pauses: fc.nat({ max: 4 }), reads: fc.boolean() }), { minLength: 1, maxLength: 4 });

/** Appends a mark to the text it knows and saves it, deed by deed; answers the marks acknowledged and the conflicts met. */
async function work(store: Store, id: string, name: string, plan: readonly Deed[]): Promise<[string[], number]> {
  let { rev, text } = valueOf(await store.read(id));
  const acknowledged: string[] = [];
  let conflicts = 0;
  for (const [index, { pauses, reads }] of plan.entries()) {
    await tasks(pauses);
    if (reads) ({ rev, text } = valueOf(await store.read(id)));
    const mark = `${name}${index}`;
    const saved = await store.save({ id, ...sheet(`${text} ${mark}`), basedOn: rev });
    if (saved.ok) {
      text = `${text} ${mark}`;
      rev = saved.value.rev;
      acknowledged.push(mark);
    } else {
      const fault = faultOf(saved);
      if (fault.code !== 'conflict') throw new Error(fault.sentence);
      conflicts += 1;
      ({ rev, text } = fault.stored);
    }
  }
  return [acknowledged, conflicts];
}

// Seconds on an idle machine; the limit only ends a test that hangs.
const longMs = 60_000;

describe('a thousand interleavings of two tabs on one worksheet', () => {
  it(
    'lose no acknowledged edit',
    async () => {
      const browser = newBrowser();
      const [left, right] = [await openTab(browser), await openTab(browser)];
      let run = 0;
      let conflicts = 0;
      let saves = 0;
      await fc.assert(
        fc.asyncProperty(deeds, deeds, async (leftPlan, rightPlan) => {
          const id = `sheet ${(run += 1)}`;
          await createSheet(left, id, 'start');
          const [ofLeft, ofRight] = await Promise.all([work(left, id, 'l', leftPlan), work(right, id, 'r', rightPlan)]);
          const marks = (await textOf(left, id)).split(' ').slice(1);
          expect([...marks].sort()).toEqual([...ofLeft[0], ...ofRight[0]].sort());
          expect(marks.filter((mark) => mark.startsWith('l'))).toEqual(ofLeft[0]);
          expect(marks.filter((mark) => mark.startsWith('r'))).toEqual(ofRight[0]);
          saves += marks.length;
          conflicts += ofLeft[1] + ofRight[1];
        }),
        { seed: 20310507, numRuns: 1000 },
      );
      expect(run).toBe(1000);
      // The tabs did get in each other's way, and both kinds of answer were met often.
      expect(conflicts).toBeGreaterThan(200);
      expect(saves).toBeGreaterThan(1000);
    },
    longMs,
  );
});

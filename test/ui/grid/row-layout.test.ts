// Prefix sums of row heights against plain addition.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { RowLayout } from '../../../src/ui/grid/row-layout';

const heights = fc.array(fc.integer({ min: 1, max: 90 }), { minLength: 1, maxLength: 200 });

describe('row layout', () => {
  it('puts each row below those above it, and finds it again at its top and its foot', () => {
    fc.assert(
      fc.property(heights, (list) => {
        const layout = new RowLayout(list.length, (index) => list[index] ?? 0);
        let top = 0;
        list.forEach((height, index) => {
          expect(layout.top(index)).toBe(top);
          expect(layout.at(top)).toBe(index);
          expect(layout.at(top + height - 0.5)).toBe(index);
          top += height;
        });
        expect(layout.total).toBe(top);
      }),
    );
  });

  it('is after any changes of heights what it would be had they been so from the start', () => {
    const changes = fc.array(fc.tuple(fc.nat(250), fc.integer({ min: 1, max: 90 })), { maxLength: 30 });
    fc.assert(
      fc.property(heights, changes, (list, set) => {
        const layout = new RowLayout(list.length, (index) => list[index] ?? 0);
        const now = [...list];
        for (const [index, height] of set) {
          layout.set(index, height);
          if (index < now.length) now[index] = height;
        }
        const fresh = new RowLayout(now.length, (index) => now[index] ?? 0);
        for (let index = 0; index <= now.length; index++) expect(layout.top(index)).toBe(fresh.top(index));
      }),
    );
  });

  it('answers outside with the nearest row', () => {
    const layout = new RowLayout(3, () => 30);
    expect([layout.at(-5), layout.at(1000), layout.top(99), layout.height(7)]).toEqual([0, 2, 90, 0]);
    expect(new RowLayout(0, () => 30).at(0)).toBe(-1);
  });
});

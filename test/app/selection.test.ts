// A selection told by its two ends.
import { describe, expect, it } from 'vitest';

import { Selection } from '../../src/app/selection.svelte';

const order = ['a', 'b', 'c', 'd'];

describe('selection', () => {
  it('is empty at first, then one line', () => {
    const selection = new Selection();
    expect(selection.within(order)).toEqual([]);
    selection.put('b', 'storm');
    expect(selection.within(order)).toEqual(['b']);
    expect(selection.caseId).toBe('storm');
  });

  it('extends both ways from the line where it began', () => {
    const selection = new Selection();
    selection.put('b');
    selection.extendTo('d');
    expect(selection.within(order)).toEqual(['b', 'c', 'd']);
    selection.extendTo('a');
    expect(selection.within(order)).toEqual(['a', 'b']);
  });

  it('is one line again when it comes back to where it began', () => {
    const selection = new Selection();
    selection.put('b');
    selection.extendTo('c');
    selection.extendTo('b');
    expect(selection.anchorId).toBeNull();
    expect(selection.within(order)).toEqual(['b']);
  });

  it('follows its ends when lines change places, and forgets an end that is gone', () => {
    const selection = new Selection();
    selection.put('a');
    selection.extendTo('b');
    expect(selection.within(['b', 'c', 'a'])).toEqual(['b', 'c', 'a']);
    expect(selection.within(['b', 'c'])).toEqual(['b']);
    expect(selection.within(['c'])).toEqual([]);
  });
});

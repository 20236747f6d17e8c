import { describe, expect, it } from 'vitest';

import { boxAround, boxesMeet, Room, shortened, spreadApart, textWidth } from '../../../src/ui/plots/boxes';

describe('room for labels', () => {
  it('is given once', () => {
    const room = new Room({ left: 0, top: 0, right: 100, bottom: 100 });
    const first = boxAround(20, 20, 10, 5);
    expect(room.place([first])).toBe(first);
    const second = boxAround(40, 20, 9, 5);
    expect(room.place([boxAround(25, 20, 10, 5), second])).toBe(second);
    expect(room.place([first])).toBeUndefined();
  });

  it('ends at the edge, and is taken by strokes', () => {
    const room = new Room({ left: 0, top: 0, right: 100, bottom: 100 });
    expect(room.isFree(boxAround(95, 50, 10, 5))).toBe(false);
    room.takeStroke(0, 0, 100, 100);
    expect(room.isFree(boxAround(50, 50, 10, 5))).toBe(false);
    expect(room.isFree(boxAround(80, 20, 10, 5))).toBe(true);
  });

  it('counts boxes that only touch as apart', () => {
    expect(boxesMeet(boxAround(0, 0, 5, 5), boxAround(10, 0, 5, 5))).toBe(false);
    expect(boxesMeet(boxAround(0, 0, 5, 5), boxAround(9, 0, 5, 5))).toBe(true);
  });
});

describe('things spread apart', () => {
  it('stay where they are while they do not meet', () => {
    expect(spreadApart([10, 50, 30], 10, 0, 100)).toEqual([10, 50, 30]);
  });

  it('keep their order and a distance, within the ends', () => {
    expect(spreadApart([98, 99, 97], 10, 0, 100)).toEqual([90, 100, 80]);
    expect(spreadApart([5, 5], 10, 0, 100)).toEqual([5, 15]);
  });
});

describe('texts', () => {
  it('are wider with more and with wider letters', () => {
    expect(textWidth('mmm', 12)).toBeGreaterThan(textWidth('iii', 12));
    expect(textWidth('abcd', 12)).toBeGreaterThan(textWidth('abc', 12));
  });

  it('are shortened by whole letters', () => {
    expect(shortened('préampli', 8)).toBe('préampli');
    expect(shortened('préampli long', 9)).toBe('préampli…');
  });
});

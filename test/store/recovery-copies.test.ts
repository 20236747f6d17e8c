import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import type { CopyEntry } from '../../src/store';
import { copiesToDrop, copyRoom, newestKept } from '../../src/store/recovery-copies';

const minuteMs = 60_000;
const hourMs = 60 * minuteMs;
const dayMs = 24 * hourMs;
const now = Date.UTC(2031, 4, 6, 12);

function copy(rev: number, savedAt: number, more: Partial<CopyEntry> = {}): CopyEntry {
  return { rev, savedAt, worksheetId: 'a', title: 'T', size: 100, lineCount: 1, quarantined: null, ...more };
}

/** What is left of copies that were made one by one, thinned after each as the store does. */
function keptAfter(times: readonly number[], size = 100): CopyEntry[] {
  let kept: CopyEntry[] = [];
  times.forEach((time, index) => {
    kept.push(copy(index + 1, time, { size }));
    const dropped = copiesToDrop(kept, time);
    kept = kept.filter(({ rev }) => !dropped.includes(rev));
  });
  return kept;
}

/** A save each ten minutes for eight hours on each of `days` days, the last one ending at `now`. */
function workingDays(days: number): number[] {
  const perDay = 48;
  return Array.from({ length: days * perDay }, (_, index) => {
    const day = days - 1 - Math.floor(index / perDay);
    return now - day * dayMs - (perDay - 1 - (index % perDay)) * 10 * minuteMs;
  });
}

describe('thinning of recovery copies', () => {
  it('drops nothing up to twenty copies, however old', () => {
    const copies = Array.from({ length: newestKept }, (_, index) => copy(index + 1, now - (400 - index) * dayMs));
    expect(copiesToDrop(copies, now)).toEqual([]);
  });

  it('keeps the last copy of each hour for a day and of each day for thirty days', () => {
    const kept = keptAfter(workingDays(60));
    const ages = kept.map(({ savedAt }) => now - savedAt);
    const hourly = ages.filter((age) => age < dayMs && age > newestKept * 10 * minuteMs);
    // Twenty copies reach back 3 h 10 min; the working day began 7 h 50 min ago, four whole hours before.
    expect(hourly).toHaveLength(4);
    expect(ages.filter((age) => age >= dayMs)).toHaveLength(30);
    expect(Math.max(...ages)).toBe(30 * dayMs);
    // Of each of those days the last save, which was at noon.
    expect(ages.filter((age) => age >= dayMs).every((age) => age % dayMs === 0)).toBe(true);
  });

  it('keeps every quarantined copy and does not count it among the twenty', () => {
    const copies = Array.from({ length: newestKept + 10 }, (_, index) =>
      copy(index + 1, now - 90 * dayMs, { quarantined: index < 10 ? 'damaged' : null }),
    );
    expect(copiesToDrop(copies, now)).toEqual([]);
  });

  it('goes by the order of the saves when the clock has been set back', () => {
    const copies = [copy(1, now + 50 * dayMs), ...Array.from({ length: 24 }, (_, index) => copy(index + 2, now))];
    const dropped = copiesToDrop(copies, now);
    expect(dropped).not.toContain(25);
    expect(dropped).toEqual([5, 4, 3, 2]);
  });

  it('keeps what fits in the room, and the newest in any case', () => {
    const times = Array.from({ length: 10 }, () => now);
    expect(keptAfter(times, copyRoom / 4).map(({ rev }) => rev)).toEqual([7, 8, 9, 10]);
    expect(keptAfter(times, copyRoom + 1).map(({ rev }) => rev)).toEqual([10]);
  });

  it('is bounded, spares the newest and the quarantined, and has nothing left to do when done twice', () => {
    const copies = fc.array(
      fc.record({ age: fc.integer({ min: -2 * dayMs, max: 60 * dayMs }), size: fc.integer({ min: 0, max: copyRoom }) }),
      { maxLength: 150 },
    );
    fc.assert(
      fc.property(copies, fc.nat({ max: 10 }), (made, everyNth) => {
        const all = made.map(({ age, size }, index) =>
          copy(index + 1, now - age, { size, quarantined: index % 10 === everyNth ? 'damaged' : null }),
        );
        const dropped = new Set(copiesToDrop(all, now));
        const kept = all.filter(({ rev }) => !dropped.has(rev));
        const newest = all.filter(({ quarantined }) => quarantined === null).at(-1);
        expect(kept.filter(({ quarantined }) => quarantined !== null)).toEqual(
          all.filter(({ quarantined }) => quarantined !== null),
        );
        if (newest !== undefined) expect(kept).toContain(newest);
        const ordinary = kept.filter((each) => each.quarantined === null);
        // Twenty, an hourly one for a day either way of the clock, a daily one for thirty days and two ahead.
        expect(ordinary.length).toBeLessThanOrEqual(newestKept + 75 + 34);
        expect(ordinary.reduce((sum, { size }) => sum + size, 0)).toBeLessThanOrEqual(2 * copyRoom);
        expect(copiesToDrop(kept, now)).toEqual([]);
      }),
      { seed: 20310506, numRuns: 200 },
    );
  });
});

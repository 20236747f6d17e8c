/**
 * Which recovery copies are kept: a rule over their dates and sizes, without a database. What must stay true: the
 * newest copy and every quarantined copy are always kept.
 */
import type { CopyEntry } from './records';

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;

/** Copies kept whatever their age. */
export const newestKept = 20;

/** Beyond those, the last copy of each period is kept for a while: by the hour for a day, by the day for thirty. */
const tiers = [
  { everyMs: hourMs, forMs: dayMs },
  { everyMs: dayMs, forMs: 30 * dayMs },
];

/** UTF-16 units that one worksheet's copies may take in all: about 60 copies of a worksheet of 10,000 lines. */
export const copyRoom = 100_000_000;

/** The `rev` of each copy of one worksheet that is to go, at `now`. The order of `copies` does not matter. */
export function copiesToDrop(copies: readonly CopyEntry[], now: number): number[] {
  // By rev, not by date: a clock that was set back must not make the latest copy look old.
  const ordinary = copies.filter((copy) => copy.quarantined === null).sort((a, b) => b.rev - a.rev);
  const periodsSeen = new Set<string>();
  const dropped: number[] = [];
  let room = copyRoom;
  ordinary.forEach((copy, index) => {
    let wanted = index < newestKept;
    for (const { everyMs, forMs } of tiers) {
      const period = `${everyMs}/${Math.floor(copy.savedAt / everyMs)}`;
      if (now - copy.savedAt <= forMs && !periodsSeen.has(period)) wanted = true;
      periodsSeen.add(period);
    }
    if (wanted && (index === 0 || copy.size <= room)) room -= copy.size;
    else dropped.push(copy.rev);
  });
  return dropped;
}

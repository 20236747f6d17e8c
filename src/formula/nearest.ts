/** The nearest known name to a mistyped one, for findings. */

/** The candidate within a few keystrokes of `name`, case apart; undefined when none is close. */
export function nearestName(name: string, candidates: Iterable<string>): string | undefined {
  const wanted = name.toLowerCase();
  // Of one letter only the same in another case is near; of two the first letter has to be right.
  const allowed = name.length === 1 ? 0 : Math.max(1, Math.floor(name.length / 3));
  let best: string | undefined;
  let bestDistance = allowed + 1;
  let bestExact = Infinity;
  for (const candidate of candidates) {
    if (Math.abs(candidate.length - name.length) > allowed) continue;
    if (name.length === 2 && candidate[0]?.toLowerCase() !== wanted[0]) continue;
    const distance = editDistance(wanted, candidate.toLowerCase(), bestDistance);
    if (distance > bestDistance || distance > allowed) continue;
    // Of equally near ones the nearest in case as well: Mhz is MHz and not mHz.
    const exact = editDistance(name, candidate, name.length + candidate.length);
    if (distance === bestDistance && exact >= bestExact) continue;
    best = candidate;
    bestDistance = distance;
    bestExact = exact;
  }
  return best;
}

/** Insertions, removals, replacements and swaps of neighbours that turn `a` into `b`, counted up to `limit`. */
function editDistance(a: string, b: string, limit: number): number {
  let before: number[] = [];
  let previous = Array.from({ length: b.length + 1 }, (_, index) => index);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const isSame = a[i - 1] === b[j - 1];
      const isSwap = !isSame && i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      const replaced = (previous[j - 1] ?? 0) + (isSame ? 0 : 1);
      const swapped = isSwap ? (before[j - 2] ?? 0) + 1 : Infinity;
      current.push(Math.min(replaced, swapped, (previous[j] ?? 0) + 1, (current[j - 1] ?? 0) + 1));
    }
    // A swap reaches two rows back: only when both are beyond the limit is there no way left within it.
    if (Math.min(...current) > limit && Math.min(...previous) > limit) return limit + 1;
    before = previous;
    previous = current;
  }
  return previous[b.length] ?? limit + 1;
}

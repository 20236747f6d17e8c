/** Going from one to the next of several things with the arrow keys, while the Tab key stops at one of them. */

/** Where a key leads to among `count` things; undefined for other keys. The ends are ends. */
export function movedTo(key: string, from: number, count: number): number | undefined {
  switch (key) {
    case 'ArrowRight':
    case 'ArrowDown':
      return Math.min(from + 1, count - 1);
    case 'ArrowLeft':
    case 'ArrowUp':
      return Math.max(from - 1, 0);
    case 'Home':
      return 0;
    case 'End':
      return count - 1;
    default:
      return undefined;
  }
}

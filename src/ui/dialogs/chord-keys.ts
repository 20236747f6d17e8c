/** The keys of one way to press something, in the order pressed: `Ctrl+Shift+Z` has three. A plus sign at the end is the key. */
export function keysOf(chord: string): string[] {
  if (!chord.endsWith('+')) return chord.split('+');
  return [...chord.slice(0, -1).split('+').filter(Boolean), '+'];
}

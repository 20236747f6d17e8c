/** How the dialogs write dates, sizes and counts. */

const TIME_OF_DAY = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });
const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });

/** A moment as a person says it at `now`: `today 14:02`, `yesterday 09:15`, `3 Nov 2026, 14:02`. Both in milliseconds since 1970. */
export function writeWhen(at: number, now: number): string {
  const time = TIME_OF_DAY.format(at);
  const day = DAY.format(at);
  const today = new Date(now);
  if (day === DAY.format(today)) return `today ${time}`;
  const yesterday = new Date(today.getFullYear(), today.getMonth(), today.getDate() - 1);
  return day === DAY.format(yesterday) ? `yesterday ${time}` : `${day}, ${time}`;
}

const SIZES = [
  { unit: 'B', bytes: 1 },
  { unit: 'kB', bytes: 1e3 },
  { unit: 'MB', bytes: 1e6 },
  { unit: 'GB', bytes: 1e9 },
] as const;

/** A size in decimal units with two figures at least: `840 B`, `3.4 kB`, `14 kB`, `10.7 GB`. */
export function writeSize(bytes: number): string {
  const size = SIZES.findLast((one) => bytes >= one.bytes) ?? SIZES[0];
  const figure = bytes / size.bytes;
  const digits = size.unit === 'B' || (figure >= 10 && size.unit !== 'GB') ? 0 : 1;
  return `${figure.toFixed(digits)} ${size.unit}`;
}

/** `1 line`, `25 lines`, `10 000 lines`. */
export function writeCount(count: number, one: string, many = `${one}s`): string {
  // From five digits on, in groups of three (ISO 80000-1).
  const figure = count < 10_000 ? String(count) : String(count).replace(/\B(?=(\d{3})+$)/g, '\u202f');
  return `${figure} ${count === 1 ? one : many}`;
}

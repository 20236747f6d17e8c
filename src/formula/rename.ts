/** Renaming a symbol inside an entry, leaving everything else as typed. */
import { scanEntry } from './scan';

/** The entry with every use of the symbol `from` written `to`; an entry that cannot be read is returned unchanged. */
export function renameSymbol(entry: string, from: string, to: string): string {
  const scan = scanEntry(entry);
  if (!scan.ok) return entry;
  let renamed = '';
  let at = 0;
  for (const token of scan.value.tokens) {
    if (token.type !== 'symbol') continue;
    const isPart = token.name.startsWith(`${from}.`);
    if (token.name !== from && !isPart) continue;
    renamed += entry.slice(at, token.start) + to + token.name.slice(from.length);
    at = token.end;
  }
  return renamed + entry.slice(at);
}

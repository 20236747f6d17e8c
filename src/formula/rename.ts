/** Renaming a symbol inside an entry (a curve's, also where it is called), leaving everything else as typed. */
import { findFunction } from './catalogue';
import { scanEntry } from './scan';

/** The entry with every use of the symbol `from` written `to`; an entry that cannot be read is returned unchanged. */
export function renameSymbol(entry: string, from: string, to: string): string {
  const scan = scanEntry(entry);
  if (!scan.ok) return entry;
  const mayBeCalled = findFunction(from) === undefined;
  let renamed = '';
  let at = 0;
  for (const token of scan.value.tokens) {
    if (token.type !== 'symbol' && !(token.type === 'function' && mayBeCalled)) continue;
    const isPart = token.name.startsWith(`${from}.`);
    if (token.name !== from && !isPart) continue;
    renamed += entry.slice(at, token.start) + to + token.name.slice(from.length);
    at = token.start + token.name.length;
  }
  return renamed + entry.slice(at);
}

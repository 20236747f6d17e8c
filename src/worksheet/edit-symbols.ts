/**
 * The edit that gives a line another symbol and rewrites every expression that uses the old one, so that each still means the
 * same line. Sections of other kinds are kept word for word, their expressions included.
 */
import type { Change } from './changes';
import type { Line, Worksheet } from './document';
import { changesBetween, lineName, type Edit, type Focus } from './edit';
import { LINE_KEYS, withKey } from './keys';
import { allLines, locateLine } from './lookup';
import { withRenamedSymbols } from './renaming';
import { isTakenByAnother, symbolFault } from './symbols';

/**
 * Gives a line another symbol. Every use of the old one is rewritten, unless there is no one meaning to keep: when another
 * line carries the old symbol too, or when the new one is empty, malformed, reserved or taken (`symbolProblem` tells so beforehand).
 */
export function setSymbol(worksheet: Worksheet, lineId: string, symbol: string): Edit {
  const { line } = locateLine(worksheet, lineId);
  const to = symbol.trim();
  const focus: Focus = { kind: 'lines', lineIds: [lineId], field: 'symbol' };
  const changes: Change[] = changesBetween(line, withKey(line, 'symbol', to, LINE_KEYS));
  if (changes.length > 0 && isRewritable(worksheet, line, to)) changes.push(...rewriting(worksheet, line.symbol, to));
  const verb = line.symbol === '' ? 'Name' : 'Rename';
  return { label: `${verb} ${lineName(line)} to ${to === '' ? 'nothing' : to}`, changes, focus, focusBefore: focus };
}

function isRewritable(worksheet: Worksheet, line: Line, to: string): boolean {
  const from = line.symbol;
  if (symbolFault(from) !== undefined || symbolFault(to) !== undefined) return false;
  return !isTakenByAnother(worksheet, from, line.id) && !isTakenByAnother(worksheet, to, line.id);
}

function rewriting(worksheet: Worksheet, from: string, to: string): Change[] {
  const renamed = new Map([[from, to]]);
  const changes: Change[] = allLines(worksheet).flatMap((line) =>
    changesBetween(line, withRenamedSymbols(line, renamed)),
  );
  const { recorded } = worksheet;
  if (recorded !== undefined && Object.hasOwn(recorded, from)) {
    const value = Object.fromEntries(
      Object.entries(recorded).map(([symbol, values]) => [symbol === from ? to : symbol, values]),
    );
    changes.push({ kind: 'set-worksheet', field: 'recorded', value });
  }
  return changes;
}

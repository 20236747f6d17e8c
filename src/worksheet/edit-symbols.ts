/**
 * The edits that give a line or a section another symbol and rewrite every expression that uses the old one, so that each
 * still means the same. Sections of kinds that are not known here are kept word for word, their expressions included.
 */
import { CHAIN_INPUTS, type ChainSection } from './chain';
import type { Change, SetSection } from './changes';
import { isChainSection, isLinesSection, type Line, type Worksheet } from './document';
import { changesBetween, lineName, type Edit, type Focus } from './edit';
import { LINE_KEYS, withKey } from './keys';
import { locateLine, sectionOf } from './lookup';
import { withRenamedInChain, withRenamedSymbols } from './renaming';
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

/** The changes that write `to` wherever `from` is used, as a symbol or before a point. */
export function rewriting(worksheet: Worksheet, from: string, to: string): Change[] {
  const renamed = new Map([[from, to]]);
  const changes: Change[] = worksheet.sections.flatMap((section): Change[] => {
    if (isLinesSection(section))
      return section.lines.flatMap((line) => changesBetween(line, withRenamedSymbols(line, renamed)));
    return isChainSection(section) ? chainChanges(section, withRenamedInChain(section, renamed)) : [];
  });
  const { recorded } = worksheet;
  const isRenamed = (symbol: string): boolean => symbol === from || symbol.startsWith(`${from}.`);
  if (recorded !== undefined && Object.keys(recorded).some(isRenamed)) {
    const value = Object.fromEntries(
      Object.entries(recorded).map(([symbol, values]) => [
        isRenamed(symbol) ? to + symbol.slice(from.length) : symbol,
        values,
      ]),
    );
    changes.push({ kind: 'set-worksheet', field: 'recorded', value });
  }
  return changes;
}

/** The changes that turn one state of a chain into another, in its expressions and stages. */
export function chainChanges(before: ChainSection, after: ChainSection): Change[] {
  return ([...CHAIN_INPUTS, 'stages'] as const).flatMap((field): Change[] =>
    before[field] === after[field]
      ? []
      : [{ kind: 'set-section', sectionId: before.id, field, value: after[field] } as SetSection],
  );
}

/** Gives a pool, a chain or a curve another symbol; its uses are rewritten as those of a line are. */
export function setSectionSymbol(worksheet: Worksheet, sectionId: string, symbol: string): Edit {
  const section = sectionOf(worksheet, sectionId);
  const from = 'symbol' in section ? section.symbol : '';
  const to = symbol.trim();
  const focus: Focus = { kind: 'section', sectionId };
  const changes: Change[] = from === to ? [] : [{ kind: 'set-section', sectionId, field: 'symbol', value: to }];
  const isPlain = symbolFault(from) === undefined && symbolFault(to) === undefined;
  const isAlone = !isTakenByAnother(worksheet, from, sectionId) && !isTakenByAnother(worksheet, to, sectionId);
  if (changes.length > 0 && isPlain && isAlone) changes.push(...rewriting(worksheet, from, to));
  return {
    label: `Rename ${from === '' ? 'section' : from} to ${to === '' ? 'nothing' : to}`,
    changes,
    focus,
    focusBefore: focus,
  };
}

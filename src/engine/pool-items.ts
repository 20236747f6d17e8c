/** The total of a pool: an item with a generated entry, so that it is checked, explained and shared out as any line is. */
import { isSymbol, RESERVED_SYMBOLS, type Line, type PoolSection } from '../worksheet';
import { itemId, type Item } from './item';

/** The id of a pool's total. */
export const poolTotalId = (sectionId: string): string => itemId(sectionId, 'total');

/** The lines that count: switched on, and not empty. */
const counts = (line: Line): boolean =>
  line.off !== true && (line.entry.trim() !== '' || Object.keys(line.byCase ?? {}).length > 0);

/**
 * The total. Lines without a symbol of their own are called by their alias, and all of them where a symbol turns out to be that of
 * a line elsewhere: a total of other lines' figures would look right.
 */
export function poolTotal(pool: PoolSection): Item {
  const idBySymbol = new Map<string, string>();
  const called = pool.lines.flatMap((line, i): { name: string; alias: string }[] => {
    const isFree = isSymbol(line.symbol) && !idBySymbol.has(line.symbol) && !RESERVED_SYMBOLS.has(line.symbol);
    if (isFree) idBySymbol.set(line.symbol, line.id);
    const alias = `${pool.symbol}.line${String(i + 1)}`;
    return counts(line) ? [{ name: isFree ? line.symbol : alias, alias }] : [];
  });
  const otherwise = totalOf(
    pool,
    called.map(({ alias }) => alias),
  );
  const total = totalOf(
    pool,
    called.map(({ name }) => name),
  );
  return { ...total, calls: { idBySymbol, otherwise } };
}

function totalOf({ id, symbol, title, unit, requirement }: PoolSection, names: readonly string[]): Item {
  return {
    line: {
      id: poolTotalId(id),
      symbol,
      label: title,
      entry: names.length === 0 ? '' : `pool(${names.join('; ')})`,
      ...(unit === undefined || unit.trim() === '' ? {} : { unit }),
      ...(requirement === undefined ? {} : { requirement }),
    },
    origin: { sectionId: id },
    isGenerated: true,
  };
}

/** The total of a pool: an item with a generated entry, so that it is checked, explained and shared out as any line is. */
import { RESERVED_SYMBOLS, type Line, type PoolSection } from '../worksheet';
import { itemId, type Item } from './item';

/** The id of a pool's total. */
export const poolTotalId = (sectionId: string): string => itemId(sectionId, 'total');

/** The lines that count: switched on, and not empty. */
const counts = (line: Line): boolean =>
  line.off !== true && (line.entry.trim() !== '' || Object.keys(line.byCase ?? {}).length > 0);

/** The total. Lines without a symbol of their own are called by their alias. */
export function poolTotal(pool: PoolSection): Item {
  const met = new Set<string>();
  const names = pool.lines.map((line, i) => {
    const isFree = line.symbol !== '' && !met.has(line.symbol) && !RESERVED_SYMBOLS.has(line.symbol);
    met.add(line.symbol);
    return isFree ? line.symbol : `${pool.symbol}.line${String(i + 1)}`;
  });
  const used = names.filter((_, i) => counts(pool.lines[i] as Line));
  const { symbol, title, unit, requirement } = pool;
  return {
    line: {
      id: poolTotalId(pool.id),
      symbol,
      label: title,
      entry: used.length === 0 ? '' : `pool(${used.join('; ')})`,
      ...(unit === undefined || unit.trim() === '' ? {} : { unit }),
      ...(requirement === undefined ? {} : { requirement }),
    },
    origin: { sectionId: pool.id },
    isGenerated: true,
  };
}

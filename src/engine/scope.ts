/** What the checker of an entry sees of the other lines: in one case, whoever holds a symbol there. */
import type { Scope, SymbolInfo } from '../formula';
import { nodeIn, type Graph } from './graph';
import type { Item } from './item';

/** The scope of a case; of null, that of entries which are the same in all cases. */
export function scopeOf(graph: Graph, caseId: string | null): Scope {
  const infoOf = ({ line }: Item): SymbolInfo | undefined => nodeIn(graph, line.id, caseId)?.info();
  return {
    find: (symbol) => {
      const item = graph.holders.get(symbol);
      return item === undefined ? undefined : (infoOf(item) ?? 'withheld');
    },
    *all() {
      for (const item of graph.holders.values()) {
        const info = item.origin === undefined ? infoOf(item) : undefined;
        if (info !== undefined) yield info;
      }
    },
    names: () => graph.holders.keys(),
  };
}

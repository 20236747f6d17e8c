/** What an edit makes stale: the worklist of nodes to be checked anew, inputs first, and what is told as touched beside them. */
import type { Node } from './node';

/** What decides whether derived figures above a node are missing or wait: it can change while no figure does. */
export const standing = ({ result, barred }: Node): string =>
  barred !== undefined || result.isInError ? 'at fault' : result.isEmpty ? 'empty' : 'there';

/** Adds the derived items that rest on a node, through derived items alone. */
export function touchDerived(node: Node, touched: Set<string>): void {
  const seen = new Set<Node>();
  const open = [node];
  for (let next = open.pop(); next !== undefined; next = open.pop())
    for (const user of next.users) {
      if (!user.isDerived || seen.has(user)) continue;
      seen.add(user);
      touched.add(user.lineId);
      open.push(user);
    }
}

/** True for the same symbols in the same order. */
export const sameSymbols = (a: readonly string[], b: readonly string[]): boolean =>
  a.length === b.length && a.every((symbol, index) => symbol === b[index]);

/** Keeps a worklist in rank order, from `from` on. */
export function insertByRank(open: Node[], node: Node, from: number): void {
  let low = from;
  let high = open.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((open[middle] as Node).rank <= node.rank) low = middle + 1;
    else high = middle;
  }
  open.splice(low, 0, node);
}

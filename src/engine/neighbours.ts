/** Who rests on whom, over all cases: what the page marks around a selected line. */
import type { Graph } from './graph';
import type { Node } from './node';

export type Direction = 'inputs' | 'users';

/** Lines one step from a line, by id. */
export function neighboursOf(graph: Graph, lineId: string, direction: Direction): string[] {
  const found = new Set<string>();
  for (const node of graph.nodes.get(lineId)?.values() ?? [])
    for (const other of node[direction]) found.add(other.lineId);
  return [...found];
}

/** All lines that can be reached from a line, itself left out. */
export function reachOf(graph: Graph, lineId: string, direction: Direction): Set<string> {
  const reached = new Set<string>();
  const open = [...(graph.nodes.get(lineId)?.values() ?? [])];
  const seen = new Set<Node>(open);
  for (let node = open.pop(); node !== undefined; node = open.pop()) {
    for (const other of node[direction]) {
      if (seen.has(other)) continue;
      seen.add(other);
      reached.add(other.lineId);
      open.push(other);
    }
  }
  reached.delete(lineId);
  return reached;
}

/** True when `node` rests on `other`, directly or not, or is it. */
export function restsUpon(node: Node, other: Node): boolean {
  // In an order without loops inputs come first.
  if (node.rank < other.rank && node.barred === undefined) return false;
  const seen = new Set<Node>([node]);
  const open = [node];
  for (let next = open.pop(); next !== undefined; next = open.pop()) {
    if (next === other) return true;
    for (const input of next.inputs) {
      if (seen.has(input)) continue;
      seen.add(input);
      open.push(input);
    }
  }
  return false;
}

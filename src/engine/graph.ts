/**
 * The graph: which nodes a worksheet has, what each rests on, and an order in which every node comes after its inputs.
 * Holds: a case has nodes of its own only for lines that differ in it; loops are found, named and barred, and only they.
 */
import { present } from '../base';
import { readEntry } from '../formula';
import { entryIn, type Line, type Worksheet } from '../worksheet';
import { itemsOf, type Item } from './item';
import { Node } from './node';

export interface Graph {
  readonly items: readonly Item[];
  /** Items by id, as of the last edit. */
  readonly byId: Map<string, Item>;
  /** The item that holds each symbol: the first one, where several claim it. */
  readonly holders: ReadonlyMap<string, Item>;
  /** Nodes by line id; the shared one under the empty case id. */
  readonly nodes: ReadonlyMap<string, ReadonlyMap<string, Node>>;
  /** Every node, inputs before users. */
  readonly order: readonly Node[];
  /** True when several lines claim one symbol. */
  readonly hasDuplicates: boolean;
}

const RESERVED = new Set(['pi', 'c_0', 'k_B', 'T_0']);

/** The node of a line in a case: its own, or the shared one. */
export function nodeIn(graph: Pick<Graph, 'nodes'>, lineId: string, caseId: string | null): Node | undefined {
  const nodes = graph.nodes.get(lineId);
  return (caseId === null ? undefined : nodes?.get(caseId)) ?? nodes?.get('');
}

/** Builds the graph, taking over nodes of the one before, so that what has not changed need not be checked again. */
export function buildGraph(worksheet: Worksheet, before: Graph | undefined, newSlot: () => number): Graph {
  const expanded = worksheet.sections.flatMap(itemsOf);
  const holders = new Map<string, Item>();
  for (const item of expanded)
    for (const symbol of [item.line.symbol, item.alias])
      if (symbol !== undefined && symbol !== '' && !RESERVED.has(symbol) && !holders.has(symbol))
        holders.set(symbol, item);
  const items = expanded.map((item) => (callsOthers(item, holders) ? (item.calls?.otherwise ?? item) : item));
  const differing = findDiffering(worksheet, items, holders);
  const nodes = new Map<string, ReadonlyMap<string, Node>>();
  const byId = new Map<string, Item>();
  for (const item of items) {
    const { line } = item;
    byId.set(line.id, item);
    const cases = differing.get(line.id);
    const known = before?.nodes.get(line.id);
    if (known !== undefined && cases === undefined && known.size === 1 && known.has('')) {
      nodes.set(line.id, known);
      continue;
    }
    const own = new Map<string, Node>();
    const make = (key: string, caseId: string | null, entry: string): void => {
      const old = known?.get(key);
      own.set(key, old ?? new Node(newSlot(), item, caseId, entry));
    };
    if (cases === undefined || cases.size < worksheet.cases.length) make('', null, line.entry);
    for (const caseId of cases ?? []) make(caseId, caseId, entryOf(line, caseId));
    nodes.set(line.id, own);
  }
  const order = connect({ items, holders, nodes });
  return {
    items,
    byId,
    holders,
    nodes,
    order,
    hasDuplicates: order.some(({ barred }) => barred?.code === 'duplicate-symbol'),
  };
}

/** True when a symbol in a generated entry is not that of the line which is meant. */
function callsOthers({ calls }: Item, holders: ReadonlyMap<string, Item>): boolean {
  if (calls === undefined) return false;
  for (const [symbol, id] of calls.idBySymbol) if (holders.get(symbol)?.line.id !== id) return true;
  return false;
}

/** The entry of a line in a case, or its own. */
export function entryOf(line: Line, caseId: string | null): string {
  return entryIn(line, caseId ?? undefined);
}

/** For each item the cases in which its figure may differ: those that override it, or anything it rests on. */
function findDiffering(
  worksheet: Worksheet,
  items: readonly Item[],
  holders: ReadonlyMap<string, Item>,
): Map<string, Set<string>> {
  const differing = new Map<string, Set<string>>();
  const overridden = items.filter(({ line: { byCase } }) => byCase !== undefined && Object.keys(byCase).length > 0);
  if (overridden.length === 0) return differing;
  for (const { id: caseId } of worksheet.cases) {
    const roots = overridden.filter(({ line: { byCase } }) => byCase !== undefined && Object.hasOwn(byCase, caseId));
    if (roots.length === 0) continue;
    const users = usersInCase(items, holders, caseId);
    const open = roots.map(({ line }) => line.id);
    const reached = new Set(open);
    for (let lineId = open.pop(); lineId !== undefined; lineId = open.pop()) {
      for (const user of users.get(lineId) ?? []) {
        if (reached.has(user)) continue;
        reached.add(user);
        open.push(user);
      }
    }
    for (const lineId of reached) {
      const cases = differing.get(lineId) ?? new Set<string>();
      cases.add(caseId);
      differing.set(lineId, cases);
    }
  }
  return differing;
}

/** Who uses each item in a case, by id. */
function usersInCase(
  items: readonly Item[],
  holders: ReadonlyMap<string, Item>,
  caseId: string,
): Map<string, string[]> {
  const users = new Map<string, string[]>();
  for (const item of items) {
    for (const used of usedBy(item, caseId, holders)) {
      const list = users.get(used);
      if (list === undefined) users.set(used, [item.line.id]);
      else list.push(item.line.id);
    }
  }
  return users;
}

/** The ids of what an item uses in a case. */
function usedBy(
  { line, derived, isGenerated }: Item,
  caseId: string,
  holders: ReadonlyMap<string, Item>,
): readonly string[] {
  if (derived !== undefined) return derived.inputs;
  const read = readEntry(entryOf(line, caseId), isGenerated === true ? Infinity : undefined);
  return read.form === 'expression' ? read.symbols.flatMap((symbol) => holders.get(symbol)?.line.id ?? []) : [];
}

/** The nodes that a node uses: of an entry each once, of a derived item one for each of its inputs. */
export function inputsOf(graph: Pick<Graph, 'holders' | 'nodes'>, node: Node): Node[] {
  const { derived } = node.item;
  if (derived !== undefined)
    return derived.inputs.map((lineId) => present(nodeIn(graph, lineId, node.caseId), 'an input of a derived item'));
  const inputs: Node[] = [];
  for (const symbol of node.symbols) {
    const holder = graph.holders.get(symbol);
    const input = holder === undefined ? undefined : nodeIn(graph, holder.line.id, node.caseId);
    if (input !== undefined && !inputs.includes(input)) inputs.push(input);
  }
  return inputs;
}

/** A barred node, and one no longer barred, looks different to those that use it. */
function markStale(node: Node): void {
  node.isStale = true;
  for (const user of node.users) user.isStale = true;
}

/** Sets inputs, users, ranks and bars; returns the order. */
function connect(graph: Pick<Graph, 'items' | 'holders' | 'nodes'>): Node[] {
  const all: Node[] = [];
  for (const item of graph.items) {
    const { line } = item;
    for (const node of present(graph.nodes.get(line.id), 'nodes of a line').values()) {
      node.take(item, entryOf(line, node.caseId));
      const holder = graph.holders.get(line.symbol)?.line;
      const isTaken = line.symbol !== '' && holder?.id !== line.id;
      const wasBarred = node.barred !== undefined;
      node.barred = isTaken
        ? {
            code: 'duplicate-symbol',
            holder:
              holder === undefined ? 'is a constant' : `is the symbol of “${holder.label || holder.symbol}” already`,
          }
        : undefined;
      if (wasBarred || isTaken) markStale(node);
      all.push(node);
    }
  }
  for (const node of all) node.users.length = 0;
  for (const node of all) {
    const inputs = inputsOf(graph, node);
    const isSame = inputs.length === node.inputs.length && inputs.every((input, index) => input === node.inputs[index]);
    if (!isSame) node.isStale = true;
    node.inputs = inputs;
    for (const input of node.inputs) input.users.push(node);
  }
  return sortNodes(all);
}

/** Kahn's algorithm; what is left over are loops and what rests on them. */
function sortNodes(all: readonly Node[]): Node[] {
  // The list of what is ready is the order itself: what is appended to it has its place.
  const order: Node[] = [];
  for (const node of all) {
    node.pending = node.inputs.length;
    if (node.pending === 0) order.push(node);
  }
  let next = 0;
  const run = (): void => {
    for (; next < order.length; next++) {
      const node = order[next] as Node;
      node.rank = next;
      for (const user of node.users) if (user.pending > 0 && --user.pending === 0) order.push(user);
    }
  };
  run();
  if (order.length < all.length) {
    for (const node of findLoops(all.filter(({ pending }) => pending > 0))) {
      node.barred = { code: 'loop' };
      markStale(node);
      node.pending = 0;
      order.push(node);
    }
    run();
  }
  return order;
}

/** Tarjan's algorithm, without recursion: the members of strongly connected parts that are loops. */
function findLoops(nodes: readonly Node[]): Node[] {
  const among = new Set(nodes);
  const index = new Map<Node, number>();
  const low = new Map<Node, number>();
  const stack: Node[] = [];
  const onStack = new Set<Node>();
  const loops: Node[] = [];
  for (const start of nodes) {
    if (index.has(start)) continue;
    const frames: { node: Node; next: number }[] = [{ node: start, next: 0 }];
    while (frames.length > 0) {
      const frame = frames[frames.length - 1] as { node: Node; next: number };
      const { node } = frame;
      if (frame.next === 0) {
        index.set(node, index.size);
        low.set(node, index.size - 1);
        stack.push(node);
        onStack.add(node);
      }
      const input = node.inputs[frame.next++];
      if (input !== undefined) {
        if (!among.has(input)) continue;
        if (!index.has(input)) frames.push({ node: input, next: 0 });
        else if (onStack.has(input)) low.set(node, Math.min(low.get(node) ?? 0, index.get(input) ?? 0));
        continue;
      }
      frames.pop();
      const parent = frames[frames.length - 1]?.node;
      if (parent !== undefined) low.set(parent, Math.min(low.get(parent) ?? 0, low.get(node) ?? 0));
      if (low.get(node) !== index.get(node)) continue;
      const part: Node[] = [];
      for (let member = stack.pop(); member !== undefined; member = stack.pop()) {
        onStack.delete(member);
        part.push(member);
        if (member === node) break;
      }
      if (part.length > 1 || node.inputs.includes(node)) loops.push(...part.reverse());
    }
  }
  return loops;
}

/** How far a loop is followed, and how many of its names are told. */
const LOOP_SEARCH_LIMIT = 1000;
const LOOP_NAMES_LIMIT = 8;

/**
 * A shortest way from a node of a loop back to itself, as symbols, first and last the same; of a very long loop its beginning.
 * Ties go by the order of uses in the entry, so that the same worksheet always tells the same path.
 */
export function loopPath(node: Node): string {
  const cameFrom = new Map<Node, Node>();
  const open: Node[] = [node];
  for (let at = 0; at < open.length && at < LOOP_SEARCH_LIMIT; at++) {
    const member = open[at] as Node;
    for (const input of member.inputs) {
      // An entry that is tried out stands outside the graph: it meets itself as the line's present node.
      if (input.lineId === node.lineId) return writePath(node, member, cameFrom);
      if (cameFrom.has(input)) continue;
      cameFrom.set(input, member);
      open.push(input);
    }
  }
  const begun = open.flatMap(nameOf).slice(0, LOOP_NAMES_LIMIT);
  return [...begun, '…', node.line.symbol].join(' → ');
}

/** How a member of a loop is told; what has no name of its own is passed over. */
const nameOf = ({ line }: Node): string[] => (line.symbol === '' ? [] : [line.symbol]);

function writePath(node: Node, last: Node, cameFrom: ReadonlyMap<Node, Node>): string {
  const names: string[] = [];
  for (let member: Node | undefined = last; member !== undefined && member !== node; member = cameFrom.get(member))
    names.unshift(...nameOf(member));
  const shown = names.length > LOOP_NAMES_LIMIT ? [...names.slice(0, LOOP_NAMES_LIMIT - 1), '…'] : names;
  return [node.line.symbol, ...shown, node.line.symbol].join(' → ');
}

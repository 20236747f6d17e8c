/**
 * The evaluation: a worksheet in, figures and findings out, kept up to date edit by edit.
 * Holds: after any edits everything told is what a new evaluation of the same worksheet would tell, figure for figure and
 * finding for finding. It is pure: no page, no clock, no storage.
 */
import { present } from '../base';
import type { Checked, Scope } from '../formula';
import type { Change, Line, Worksheet } from '../worksheet';
import { buildGraph, entryOf, nodeIn, type Graph } from './graph';
import { describeRemark, remarksOf } from './describe';
import { neighboursOf, reachOf } from './neighbours';
import { itemsOf, type Item, type ItemPlace } from './item';
import { Node } from './node';
import type { Pass } from './pass';
import { previewAt, tryEntry, type Preview } from './preview';
import { Figuring } from './recompute';
import { scopeOf } from './scope';
import { insertByRank, sameSymbols, standing, touchDerived } from './staleness';
import { gatherFindings } from './gather';
import type { Figure, LineFinding, Reading } from './reading';
import { readingOf, figureOfNode } from './state';
import type { Finding } from '../findings';

export class Evaluation {
  private current: Worksheet;
  private graph: Graph;
  private readonly figuring = new Figuring();
  private readonly listeners = new Set<(pass: Pass) => void>();
  private findingCache = new Map<string, readonly LineFinding[]>();
  private sheetCache: readonly LineFinding[] | undefined;
  private around = new Set<Node>();
  private edits = 0;

  constructor(worksheet: Worksheet) {
    this.current = worksheet;
    this.graph = buildGraph(worksheet, undefined, this.figuring.newSlot);
    this.figuring.setOrder(this.graph.order);
    this.settleStale(this.graph.order, new Set(), true);
    this.figuring.run([]);
  }

  /** The document evaluated. */
  get worksheet(): Worksheet {
    return this.current;
  }

  /** Grows by one with each edit. */
  get version(): number {
    return this.edits;
  }

  /** Calls `listener` after each edit; returns what ends that. */
  subscribe(listener: (pass: Pass) => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  /** Takes the document after `changes`; recomputes what is downstream of them, and tells subscribers. */
  edit(next: Worksheet, changes: readonly Change[]): Pass {
    this.current = next;
    this.edits++;
    const quick = changes.length === 1 && changes[0] !== undefined ? this.editQuickly(changes[0]) : undefined;
    const pass = quick ?? this.rebuild(next);
    for (const listener of this.listeners) listener(pass);
    return pass;
  }

  /** One field of one line, without a change of the graph: the common case while somebody types. Undefined when it is not that. */
  private editQuickly(change: Change): Pass | undefined {
    if (change.kind !== 'set-line' || change.field === 'symbol' || change.field === 'byCase') return undefined;
    // The finding on a second line with a symbol quotes the label of the first.
    if (change.field === 'label' && this.graph.hasDuplicates) return undefined;
    const before = this.graph.byId.get(change.lineId);
    const nodes = this.graph.nodes.get(change.lineId);
    if (before === undefined || nodes === undefined) return undefined;
    // Which lines a pool's total counts depends on them.
    if (before.alias !== undefined && (change.field === 'off' || change.field === 'entry')) return undefined;
    const line: Line = { ...before.line, [change.field]: change.value };
    const item: Item = { ...before, line };
    this.graph.byId.set(line.id, item);
    const stale: Node[] = [];
    for (const node of nodes.values()) {
      const symbols = node.symbols;
      node.take(item, entryOf(line, node.caseId));
      if (!node.isStale) continue;
      if (!sameSymbols(symbols, node.symbols)) return undefined;
      stale.push(node);
    }
    const touched = new Set<string>([line.id]);
    this.settleStale(stale, touched, stale.length > 0);
    return this.finish(touched, false);
  }

  private rebuild(next: Worksheet): Pass {
    const before = this.graph;
    this.graph = buildGraph(next, before, this.figuring.newSlot);
    const kept = new Set(this.graph.order);
    const dropped = before.order.filter((node) => !kept.has(node));
    for (const node of dropped) this.around.delete(node);
    this.figuring.release(dropped);
    this.figuring.setOrder(this.graph.order);
    const touched = new Set<string>();
    // Lines that lost a node of their own now read the shared one.
    for (const { lineId } of dropped) if (this.graph.byId.has(lineId)) touched.add(lineId);
    this.settleStale(
      this.graph.order.filter(({ isStale }) => isStale),
      touched,
      true,
    );
    return this.finish(touched, true);
  }

  private finish(touched: Set<string>, structure: boolean): Pass {
    const slots: number[] = [];
    const computed = this.figuring.run(slots);
    this.findingCache = new Map();
    this.sheetCache = undefined;
    const { graph } = this;
    let changed: Set<string> | undefined;
    return {
      structure,
      computed,
      get changed(): ReadonlySet<string> {
        if (changed === undefined) {
          const bySlot = new Map(graph.order.map((node) => [node.slot, node.lineId]));
          changed = new Set(touched);
          for (const slot of slots) changed.add(present(bySlot.get(slot), 'line of a slot'));
        }
        return changed;
      },
    };
  }

  /** Checks stale nodes, inputs first, and those whose inputs now look different; then those that looked around. */
  private settleStale(stale: readonly Node[], touched: Set<string>, mayLookDifferent: boolean): void {
    const open = [...stale].sort((a, b) => a.rank - b.rank);
    const queued = new Set(open);
    for (let at = 0; at < open.length; at++) {
      const node = open[at] as Node;
      queued.delete(node);
      touched.add(node.lineId);
      const stood = standing(node);
      const looksDifferent = this.checkNode(node);
      if (stood !== standing(node)) touchDerived(node, touched);
      if (!looksDifferent) continue;
      for (const user of node.users) {
        if (queued.has(user) || user.rank < node.rank) continue;
        queued.add(user);
        insertByRank(open, user, at + 1);
      }
    }
    if (!mayLookDifferent) return;
    for (const node of [...this.around]) {
      this.checkNode(node);
      touched.add(node.lineId);
    }
  }

  private checkNode(node: Node): boolean {
    const changed = node.check(this.scopeOf(node.caseId));
    if (node.result.looksAround) this.around.add(node);
    else this.around.delete(node);
    this.figuring.setRun(node);
    return changed;
  }

  private scopeOf(caseId: string | null): Scope {
    return scopeOf(this.graph, caseId);
  }

  /** Recomputes everything; for tests and measurements. Returns how many nodes were computed. */
  recomputeAll(): number {
    this.figuring.markAll();
    return this.figuring.run([]);
  }

  /** A line's figure, kind, side and requirement in a case. */
  reading(lineId: string, caseId: string): Reading {
    const node = nodeIn(this.graph, lineId, caseId);
    if (node === undefined) return { figure: { state: 'empty' } };
    return readingOf(node, present(this.graph.byId.get(lineId), 'line').line, this.figuring);
  }

  /** The figure alone. */
  figure(lineId: string, caseId: string): Figure {
    const node = nodeIn(this.graph, lineId, caseId);
    return node === undefined ? { state: 'empty' } : figureOfNode(node, this.figuring);
  }

  /** The node of a line in a case, for the working. */
  node(lineId: string, caseId: string): Node | undefined {
    return nodeIn(this.graph, lineId, caseId);
  }

  /** The checked expression of a line in a case, for the working; undefined when its entry cannot be read. */
  inspect(lineId: string, caseId: string): Checked | undefined {
    const node = nodeIn(this.graph, lineId, caseId);
    return node?.inspect(this.scopeOf(node.caseId));
  }

  /** The figures by slot, for the working. */
  get figures(): Figuring {
    return this.figuring;
  }

  /** The findings of a line in all cases, each once. */
  findings(lineId: string): readonly LineFinding[] {
    const known = this.findingCache.get(lineId);
    if (known !== undefined) return known;
    const line = this.graph.byId.get(lineId)?.line;
    const found =
      line === undefined
        ? []
        : gatherFindings(
            line,
            this.current.cases.map(({ id }) => id),
            (caseId) => this.findingsIn(lineId, caseId),
            (caseId) => nodeIn(this.graph, lineId, caseId),
          );
    this.findingCache.set(lineId, found);
    return found;
  }

  /** Every finding of the worksheet, in its order. */
  sheetFindings(): readonly LineFinding[] {
    this.sheetCache ??= this.graph.items
      .filter(({ line }) => this.mayHaveFindings(line.id))
      .flatMap(({ line }) => this.findings(line.id));
    return this.sheetCache;
  }

  /** A quick no for the bulk of the lines. */
  private mayHaveFindings(lineId: string): boolean {
    for (const node of this.graph.nodes.get(lineId)?.values() ?? []) {
      if (
        node.result.remarks.length > 0 ||
        node.barred !== undefined ||
        Number.isNaN(this.figuring.values[node.slot]) ||
        node.line.requirement !== undefined
      )
        return true;
    }
    return false;
  }

  private findingsIn(lineId: string, caseId: string): readonly Finding[] {
    const node = nodeIn(this.graph, lineId, caseId);
    if (node === undefined) return [];
    const tryOut = (entry: string, unit?: string): Reading =>
      tryEntry(this.graph, this.figuring, node, caseId, entry, unit).reading;
    return remarksOf(node, this.figuring).map((remark) =>
      describeRemark(remark, node, this.figuring, tryOut, this.scopeOf(node.caseId)),
    );
  }

  /** An entry in a line's place in a case, without committing it. */
  preview(lineId: string, caseId: string, entry: string): Preview {
    const node = nodeIn(this.graph, lineId, caseId);
    if (node === undefined) return { reading: { figure: { state: 'empty' } }, findings: [] };
    return previewAt(this.graph, this.figuring, node, caseId, entry);
  }

  /** An entry in a case as a line that is not there yet would give it: no line rests on it, so it closes no loop. */
  previewNew(caseId: string, entry: string): Preview {
    const node = new Node(-1, { line: { id: '', symbol: '', label: '', entry } }, null, entry);
    // After all others: nothing is searched for a way back to it.
    node.rank = Infinity;
    return previewAt(this.graph, this.figuring, node, caseId, entry);
  }

  /** Lines that a line uses directly, in any case. */
  restsOn(lineId: string): readonly string[] {
    return neighboursOf(this.graph, lineId, 'inputs');
  }

  /** Lines that use a line directly, in any case; parts of chains without a name are passed over. */
  usedBy(lineId: string): readonly string[] {
    return neighboursOf(this.graph, lineId, 'users').filter((id) => this.isNamed(id));
  }

  /** False for what stands between a chain's figures and has no name of its own. */
  private isNamed(lineId: string): boolean {
    const item = this.graph.byId.get(lineId);
    return item?.derived === undefined || item.line.symbol !== '';
  }

  /** All lines that a line rests on, itself left out. */
  upstream(lineId: string): ReadonlySet<string> {
    return reachOf(this.graph, lineId, 'inputs');
  }

  /** All lines that rest on a line, itself left out. */
  downstream(lineId: string): ReadonlySet<string> {
    return reachOf(this.graph, lineId, 'users');
  }

  /** The line that a symbol stands for. */
  lineOf(symbol: string): Line | undefined {
    const holder = this.graph.holders.get(symbol);
    return holder === undefined ? undefined : this.graph.byId.get(holder.line.id)?.line;
  }

  /** The line with this id, as of the last edit. */
  line(lineId: string): Line | undefined {
    return this.graph.byId.get(lineId)?.line;
  }

  /** The ids of all that is evaluated, in the order of the account. */
  order(): readonly string[] {
    return this.graph.items.map(({ line }) => line.id);
  }

  /** Where a line stands that is none of the worksheet's own: in which chain, pool or curve. */
  originOf(lineId: string): ItemPlace | undefined {
    return this.graph.byId.get(lineId)?.origin;
  }

  /** Every line that has a figure of its own in the account, in its order: what chains and pools give among them. */
  lines(): readonly Line[] {
    return this.current.sections
      .flatMap(itemsOf)
      .filter(({ line, origin, curve }) => origin === undefined || (line.symbol !== '' && curve === undefined))
      .map(({ line }) => line);
  }
}

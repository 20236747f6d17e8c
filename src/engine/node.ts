/**
 * Nodes: one for each line, and one more for each case in which the line's entry, or anything it rests on, differs.
 * Lines without overrides share one node among all cases.
 */
import {
  checkLine,
  compilePlan,
  inspectLine,
  readEntry,
  readPlainQuantity,
  type Figures,
  type LineResult,
  type LineSpec,
  type ReadEntry,
  type Scope,
  type SymbolInfo,
  type Checked,
} from '../formula';
import type { Line } from '../worksheet';
import { curveResult, derivedResult } from './derived';
import type { Item } from './item';

/** Why a line is withheld whatever its entry says. */
export type Barred = { readonly code: 'duplicate-symbol'; readonly holder: string } | { readonly code: 'loop' };

export class Node {
  readonly slot: number;
  readonly lineId: string;
  /** null: the node that cases without differences share. */
  readonly caseId: string | null;
  item: Item;
  entry: string;
  read: ReadEntry;
  result: LineResult;
  barred: Barred | undefined;
  /** Nodes whose figures this one uses, each once, in order of appearance in the entry. */
  inputs: Node[] = [];
  users: Node[] = [];
  /** Place in the topological order. */
  rank = 0;
  /** While nodes are being put in order: inputs that have no place yet. */
  pending = 0;
  /** True while the entry has to be checked again. */
  isStale = true;

  constructor(slot: number, item: Item, caseId: string | null, entry: string) {
    this.slot = slot;
    this.lineId = item.line.id;
    this.caseId = caseId;
    this.item = item;
    this.entry = entry;
    this.read = readItem(item, entry);
    this.result = UNCHECKED;
  }

  get line(): Line {
    return this.item.line;
  }

  /** True when its figure is computed from other items and not from an entry. */
  get isDerived(): boolean {
    return this.item.derived !== undefined;
  }

  get symbols(): readonly string[] {
    return this.read.form === 'expression' ? this.read.symbols : [];
  }

  /** Takes the line's present text; the node becomes stale when what the checker sees has changed. */
  take(item: Item, entry: string): void {
    if (item === this.item && entry === this.entry) return;
    const { line } = item;
    const before = this.line;
    const changed =
      item.derived !== this.item.derived ||
      item.curve !== this.item.curve ||
      entry !== this.entry ||
      (this.caseId !== null && line.entry !== before.entry) ||
      line.symbol !== before.symbol ||
      line.label !== before.label ||
      line.unit !== before.unit ||
      line.quantity !== before.quantity ||
      line.side !== before.side;
    if (entry !== this.entry) {
      this.entry = entry;
      this.read = readItem(item, entry);
    }
    this.item = item;
    if (changed) this.isStale = true;
  }

  /** Checks the entry anew; returns whether lines that use it see another type. */
  check(scope: Scope): boolean {
    const before = this.info();
    this.isStale = false;
    this.result = this.resultIn(scope);
    return !sameInfo(before, this.info());
  }

  private resultIn(scope: Scope): LineResult {
    const { derived, curve } = this.item;
    if (derived !== undefined) return derivedResult(derived, this.slot, this.inputs);
    if (curve !== undefined) return curveResult(curve);
    const result = checkLine(this.spec(), scope, this.read);
    // Nobody has chosen the units of a chain's values: a bandwidth in Hz may be shown in MHz.
    return this.item.origin?.isUnitChosen === false ? { ...result, isFitted: true } : result;
  }

  /** What the checker is told of the line. An override follows the unit typed in the line's own entry. */
  spec(): LineSpec {
    const { symbol, label, unit, quantity, side } = this.line;
    const typed =
      unit === undefined && this.caseId !== null && this.entry !== this.line.entry
        ? readPlainQuantity(this.line.entry)?.unit?.word
        : undefined;
    const isStrict = this.item.origin?.field !== undefined;
    return { symbol, label, entry: this.entry, unit: unit ?? typed, quantity, side, ...(isStrict ? { isStrict } : {}) };
  }

  /** A node with another entry in this one's place, outside the graph. */
  trial(line: Line, entry: string, caseId: string): Node {
    return new Node(this.slot, { line }, caseId, entry);
  }

  /** The checked expression, which is not kept, for the working. */
  inspect(scope: Scope): Checked | undefined {
    return inspectLine(this.spec(), scope, this.read);
  }

  /** The compiled entry. */
  compile(figures: Figures): () => number {
    return compilePlan(this.result.plan, figures);
  }

  /** How other lines meet this one; undefined while it has no type or is barred. */
  info(): SymbolInfo | undefined {
    const { unit, type, kind, side, constant, curve } = this.result;
    if (unit === undefined || type === undefined || this.barred !== undefined) return undefined;
    const isDeclared = kind?.origin === 'declared' || side?.origin === 'declared';
    return {
      symbol: this.line.symbol,
      label: this.line.label,
      slot: this.slot,
      unit,
      type,
      kind: kind?.kind,
      side: isDeclared ? side?.side : undefined,
      isDeclared,
      constant,
      ...(curve === undefined ? {} : { curve }),
    };
  }
}

/** Nobody types a pool's generated entry, which may be as long as the pool. */
const readItem = (item: Item, entry: string): ReadEntry =>
  item.derived !== undefined ? { form: 'empty' } : readEntry(entry, item.isGenerated === true ? Infinity : undefined);

const UNCHECKED: LineResult = {
  isFitted: false,
  plan: { op: 'constant', value: NaN },
  isEmpty: true,
  isInError: false,
  remarks: [],
  looksAround: false,
  waitsFor: [],
  symbols: [],
};

/** True when two lines look the same to the checker. Types are small plain data: they are compared by their text. */
function sameInfo(a: SymbolInfo | undefined, b: SymbolInfo | undefined): boolean {
  if (a === undefined || b === undefined) return a === b;
  return (
    a.unit.word === b.unit.word &&
    a.kind === b.kind &&
    a.side === b.side &&
    a.isDeclared === b.isDeclared &&
    a.constant === b.constant &&
    a.curve === b.curve &&
    sameType(a.type, b.type)
  );
}

function sameType(a: SymbolInfo['type'], b: SymbolInfo['type']): boolean {
  if (a.form === 'rate' || b.form === 'rate')
    return a.form === b.form && a.form === 'rate' && b.form === 'rate' && a.lengthM === b.lengthM;
  const sameMeaning =
    a.meaning === b.meaning ||
    (a.meaning !== undefined &&
      b.meaning !== undefined &&
      a.meaning.w === b.meaning.w &&
      a.meaning.u === b.meaning.u &&
      a.meaning.f === b.meaning.f &&
      a.meaning.l === b.meaning.l &&
      a.meaning.declared === b.meaning.declared);
  if (!sameMeaning || a.bandwidth?.key !== b.bandwidth?.key || a.noiseTemperature?.key !== b.noiseTemperature?.key)
    return false;
  if (a.bandwidth?.text !== b.bandwidth?.text || a.noiseTemperature?.text !== b.noiseTemperature?.text) return false;
  if (a.plane?.key !== b.plane?.key || a.plane?.text !== b.plane?.text || a.plane?.gain !== b.plane?.gain) return false;
  if (a.form === 'linear')
    return b.form === 'linear' && a.degree === b.degree && a.sort === b.sort && sameDimensionText(a, b);
  return b.form === 'decibel' && a.offsetDb === b.offsetDb && sameDimensionText(a, b);
}

const sameDimensionText = (a: { dimension: readonly number[] }, b: { dimension: readonly number[] }): boolean =>
  a.dimension.every((exponent, index) => exponent === b.dimension[index]);

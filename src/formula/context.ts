/** What the checker carries through one entry: the scope, the text, and the findings made so far. */
import type { FindingCode, Repair } from '../findings';
import { sameDimension, FREQUENCY, LENGTH, type Dimension } from '../quantity';
import type { Remark, Scope, SymbolInfo, Checked } from './types';
import { constantPlan } from './plan';
import type { Tree } from './tree';

export class Context {
  readonly remarks: Remark[] = [];
  /** True when findings looked at lines other than those used: they may change when any line does. */
  looksAround = false;
  /** Symbols of lines that have no type because of their own errors. */
  readonly waitsFor: string[] = [];

  constructor(
    readonly entry: string,
    readonly scope: Scope,
  ) {}

  /** The text of a tree as typed. */
  textOf(tree: Tree): string {
    return this.entry.slice(tree.place.start, tree.place.end);
  }

  /** The entry with the text of one tree replaced. */
  replace(tree: Tree, text: string): string {
    return this.entry.slice(0, tree.place.start) + text + this.entry.slice(tree.place.end);
  }

  /** A repair that replaces one tree's text. */
  rewrite(tree: Tree, text: string): Repair {
    const entry = this.replace(tree, text);
    return { kind: 'entry', title: text, entry };
  }

  /** Makes a finding. */
  say(code: FindingCode, tree: Tree | undefined, rest: Omit<Remark, 'code' | 'place'>): void {
    this.remarks.push({ code, ...(tree === undefined ? {} : { place: tree.place }), ...rest });
  }

  /** Makes a finding that leaves nothing to go on with. */
  stop(code: FindingCode, tree: Tree, rest: Omit<Remark, 'code' | 'place'>): Checked {
    this.say(code, tree, rest);
    return broken(tree);
  }

  /** The line that most likely states the bandwidth, for repairs. */
  bandwidthTerm(): string | undefined {
    const lines = this.linesOf(FREQUENCY).filter(
      ({ kind, unit }) => kind !== 'signal ratio' && !/bit|Bd/.test(unit.word),
    );
    const named = lines.find(({ symbol, label }) => /^(B|BW|B_.*|W_.*)$/.test(symbol) || /\bbandwidth\b/i.test(label));
    const only = lines.filter(({ symbol }) => !/^[fFR]/.test(symbol));
    const line = named ?? (only.length === 1 ? only[0] : undefined);
    return line === undefined ? undefined : line.unit.form === 'decibel' ? line.symbol : `db(${line.symbol})`;
  }

  /** The line that most likely states a length, for repairs. */
  lengthTerm(): string | undefined {
    const lines = this.linesOf(LENGTH).filter(({ unit }) => unit.form === 'linear');
    const named = lines.find(
      ({ symbol, label }) => /^(len|l|length)(_.*)?$/i.test(symbol) || /\blength\b/i.test(label),
    );
    const path = lines.find(({ symbol, label }) => /^d(_.*)?$/.test(symbol) || /\b(distance|path)\b/i.test(label));
    return (named ?? path ?? (lines.length === 1 ? lines[0] : undefined))?.symbol;
  }

  /** Every line that has a type. */
  allLines(): SymbolInfo[] {
    this.looksAround = true;
    return [...this.scope.all()];
  }

  /** Every symbol there is, for the nearest to a mistyped one. */
  allNames(): string[] {
    this.looksAround = true;
    return [...this.scope.names()];
  }

  private linesOf(dimension: Dimension): SymbolInfo[] {
    return this.allLines().filter(({ unit }) => unit.form !== 'rate' && sameDimension(unit.dimension, dimension));
  }
}

/** A checked tree with nothing to go on with; its finding has been made. */
export function broken(tree: Tree): Checked {
  return { tree, type: { form: 'broken' }, plan: constantPlan(NaN), parts: [] };
}

/** Text as a term in a product or behind a minus sign: in brackets when it is itself a sum. */
export function asFactor(tree: Tree, text: string): string {
  return tree.type === 'binary' && tree.operator !== '^' ? `(${text})` : text;
}

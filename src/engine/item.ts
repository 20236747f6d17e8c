/**
 * Items: what the engine evaluates. A line of the worksheet is one; a chain, a pool and a curve each expand to several, which
 * have symbols as lines have: `rx.lna.gain` with its entry, `rx.nf` computed from others.
 * Holds: items of a section that has not changed are the same objects, so that an edit elsewhere costs them nothing.
 */
import type { FindingCode, Facts } from '../findings';
import type { Plan, Plane } from '../formula';
import type { QuantityKind, Side } from '../quantity';
import {
  isChainSection,
  isCurveSection,
  isLinesSection,
  isPoolSection,
  type CurveSection,
  type Line,
  type Section,
  type StageField,
} from '../worksheet';
import { expandChain } from './chain-items';
import { poolTotal } from './pool-items';

/** A finding that holds while an item's own figure passes a test. */
export interface Criterion {
  readonly code: FindingCode;
  readonly facts: Facts;
  readonly test: (figure: number) => boolean;
  /** Facts made of figures: those of the inputs, in their order, and the item's own last. */
  readonly late?: (figures: readonly number[]) => Facts;
}

/** A figure computed from other items and not from an entry. */
export interface Derived {
  /** Ids of the items whose figures it uses, each in that item's unit. */
  readonly inputs: readonly string[];
  readonly unit: string;
  readonly quantity?: QuantityKind;
  readonly side?: Side;
  readonly plane?: Plane;
  /** How the figure comes about, in the trade's letters, for the working. */
  readonly formula?: string;
  /** The plan, from the inputs' plans in their order. */
  readonly plan: (inputs: readonly Plan[]) => Plan;
  readonly criterion?: Criterion;
  /** True for what only serves a finding, and is no figure of the account. */
  readonly isCheck?: boolean;
}

/** Where an item that is no line of the worksheet stands. */
export interface ItemPlace {
  readonly sectionId: string;
  readonly stageId?: string;
  readonly field?: StageField;
  /** False: the unit is the program's choice, and display may take a prefix. */
  readonly isUnitChosen?: false;
}

export interface Item {
  /** The line, or what stands for one. */
  readonly line: Line;
  readonly origin?: ItemPlace;
  readonly derived?: Derived;
  readonly curve?: CurveSection;
  /** True when the entry was made by the program. */
  readonly isGenerated?: boolean;
  /** A further symbol by which only generated entries call it. */
  readonly alias?: string;
  /** Whom a generated entry calls by symbols of their own, and what stands in its place when a symbol is another's. */
  readonly calls?: { readonly idBySymbol: ReadonlyMap<string, string>; readonly otherwise: Item };
}

const expansions = new WeakMap<Section, readonly Item[]>();

/** The items of a section, in the order of the account. */
export function itemsOf(section: Section): readonly Item[] {
  const known = expansions.get(section);
  if (known !== undefined) return known;
  const items = expand(section);
  expansions.set(section, items);
  return items;
}

function expand(section: Section): readonly Item[] {
  if (isPoolSection(section)) {
    const lines = section.lines.map((line, i): Item => ({ line, alias: `${section.symbol}.line${String(i + 1)}` }));
    return [...lines, poolTotal(section)];
  }
  if (isLinesSection(section)) return section.lines.map(itemOfLine);
  if (isChainSection(section)) return expandChain(section);
  if (isCurveSection(section)) {
    const line: Line = { id: section.id, symbol: section.symbol, label: section.title, entry: '' };
    return [{ line, origin: { sectionId: section.id }, curve: section }];
  }
  return [];
}

const ofLines = new WeakMap<Line, Item>();

function itemOfLine(line: Line): Item {
  const known = ofLines.get(line);
  if (known !== undefined) return known;
  const item = { line };
  ofLines.set(line, item);
  return item;
}

/** An id that no line of a file has: control characters do not come in files. */
export const itemId = (...parts: readonly string[]): string => parts.join('\u0001');

/**
 * The id of what a chain has of a stage: of an entry by its field, `noiseFigure`; of what is worked out by the part of its symbol
 * behind the stage's, `nf` or `out.snr`.
 */
export const stageItemId = (chainId: string, stageId: string, what: string): string =>
  itemId(chainId, itemId(stageId, what));

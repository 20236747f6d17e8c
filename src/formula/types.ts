/**
 * What the checker knows about an expression before any number is known: its form, dimension, meaning, and whence a power
 * took its bandwidth and temperature.
 */
import type { FindingSeed } from '../findings';
import type { Curve, Dimension, Meaning, QuantityKind, Side, Unit } from '../quantity';
import type { Plan } from './plan';
import type { Tree } from './tree';

/** Where an attribute's value comes from: `plan` gives it in SI; equal keys mean the same source. */
export interface Origin {
  readonly key: string;
  readonly text: string;
  readonly plan: Plan;
}

/** The place of a chain at which a level or a temperature holds. */
export interface Plane {
  /** The symbol of the chain. */
  readonly chain: string;
  /** Equal for the same place. */
  readonly key: string;
  /** `behind lna`. */
  readonly text: string;
  /** The symbol of the gain from the chain's input up to here; absent at the input itself. */
  readonly gain?: string;
}

interface Attributes {
  /** undefined: nothing is known and the layer of meaning is silent. */
  readonly meaning: Meaning | undefined;
  /** The bandwidth that a density was multiplied by, in Hz. */
  readonly bandwidth?: Origin | undefined;
  /** The temperature that a thermal noise was computed from, in K. */
  readonly noiseTemperature?: Origin | undefined;
  readonly plane?: Plane | undefined;
  /** The unit in which a result that declares none is shown. */
  readonly unitHint?: Unit | undefined;
}

/**
 * How a dimensionless linear value came about: `pure` from bare numbers, `figure` from a logarithm (its number is a decibel
 * figure if anything), `ratio` from a quotient of quantities.
 */
export type NumberSort = 'pure' | 'figure' | 'ratio';

export interface LinearType extends Attributes {
  readonly form: 'linear';
  readonly dimension: Dimension;
  /** For dimensionless ratios: 1 of root-power quantities (voltages, fields), 2 of powers, 0 otherwise. */
  readonly degree: number;
  readonly sort: NumberSort;
}

/** The plan gives a figure to which `offsetDb` is added to get 10·log10 of the quantity in SI. */
export interface DecibelType extends Attributes {
  readonly form: 'decibel';
  readonly dimension: Dimension;
  readonly offsetDb: number;
  /** The largest coefficient by which a term has been scaled. */
  readonly scale: number;
}

/** Decibels per `lengthM` metres. */
export interface RateType {
  readonly form: 'rate';
  readonly lengthM: number;
  readonly unitHint?: Unit | undefined;
}

export type Type =
  | LinearType
  | DecibelType
  | RateType
  | { readonly form: 'truth' }
  | { readonly form: 'text'; readonly text: string }
  /** Something in it is in error or waits; the finding has been made. */
  | { readonly form: 'broken' };

/** One term of a decibel sum. */
export interface SumTerm {
  readonly coefficient: number;
  readonly tree: Tree;
  readonly text: string;
  readonly type: DecibelType;
  readonly plan: Plan;
  readonly kind?: QuantityKind | undefined;
  readonly side?: Side | undefined;
  /** True when kind and side were declared on the line. */
  readonly isDeclared: boolean;
  /** True for a bare number that counts as decibels. */
  readonly isNumber: boolean;
  readonly symbol?: string | undefined;
  /** For logarithms over a written reference, 10*log10(x/1 mW): the type when read as decibels of x over that reference. */
  readonly overReference?: DecibelType | undefined;
}

/** A checked expression. */
export interface Checked {
  readonly tree: Tree;
  readonly type: Type;
  readonly plan: Plan;
  /** The value, where it is known from bare numbers alone. */
  readonly constant?: number | undefined;
  /** For decibel expressions that are sums or multiples: the terms, flattened. */
  readonly terms?: readonly SumTerm[] | undefined;
  readonly kind?: QuantityKind | undefined;
  readonly side?: Side | undefined;
  readonly isDeclared?: boolean | undefined;
  /** See SumTerm. */
  readonly overReference?: DecibelType | undefined;
  /** For 10^(X/10): the SI value of X's reference, 0.001 for dBm. */
  readonly reference?: number | undefined;
  /** Checked operands or arguments, for the working. */
  readonly parts: readonly Checked[];
}

/** A finding made by the checker; where `applies` is given it holds only while that plan's value passes the test. */
export interface Remark extends FindingSeed {
  readonly applies?: { readonly plan: Plan; readonly test: (value: number) => boolean };
  /** Facts whose figures depend on values: read when somebody reads the finding. */
  readonly lateFacts?: (evaluate: (plan: Plan) => number) => Readonly<Record<string, string>>;
  /** Facts that are the result of other entries in this line's place: what powersum, fieldsum and the like would give. */
  readonly figures?: Readonly<Record<string, string>>;
}

/** A line as other entries meet it. */
export interface SymbolInfo {
  readonly symbol: string;
  readonly label: string;
  readonly slot: number;
  readonly unit: Unit;
  readonly type: LinearType | DecibelType | RateType;
  readonly kind?: QuantityKind | undefined;
  readonly side?: Side | undefined;
  readonly isDeclared: boolean;
  /** For lines that hold a bare number: that number, usable as a coefficient. */
  readonly constant?: number | undefined;
  /** For curves: called by the symbol, and never a figure by itself. */
  readonly curve?: Curve;
}

/** What an entry can see. */
export interface Scope {
  /** The line with this symbol; 'withheld' when it has no type because of its own errors; undefined when there is none. */
  find(symbol: string): SymbolInfo | 'withheld' | undefined;
  /** All lines that have a type, for suggestions. Only asked for when something is wrong. */
  all(): Iterable<SymbolInfo>;
  /** All symbols, for the nearest name. */
  names(): Iterable<string>;
}

/** What a unit is: a word with a form, a dimension and a reference or factor. */
import type { Dimension } from './dimension';
import type { QuantityKind } from './kinds';

interface UnitBase {
  /** The standard way to write it. */
  readonly word: string;
  /** What a line in this unit is, unless it says otherwise; undefined where the unit suggests nothing. */
  readonly defaultKind?: QuantityKind;
  /** One phrase for completion and reference. */
  readonly description: string;
}

/** A decibel unit: a figure over a reference, of the power-like quantity q. */
export interface DecibelUnit extends UnitBase {
  readonly form: 'decibel';
  /** Dimension of the power-like quantity q whose 10·log10 is written. */
  readonly dimension: Dimension;
  /** What is added to the figure to get 10·log10 of q in coherent SI, in dB. */
  readonly offsetDb: number;
}

/** A linear unit: SI value = figure · factor + shift. */
export interface LinearUnit extends UnitBase {
  readonly form: 'linear';
  readonly dimension: Dimension;
  readonly factor: number;
  /** Added after scaling, K (for °C alone). */
  readonly shift: number;
}

/** Decibels per length. */
export interface RateUnit extends UnitBase {
  readonly form: 'rate';
  /** The length that the figure is per, in metres. */
  readonly lengthM: number;
}

export type Unit = DecibelUnit | LinearUnit | RateUnit;

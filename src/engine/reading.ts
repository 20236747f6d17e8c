/**
 * What the engine tells about a line in a case: its figure, its kind and side, its requirement, its findings.
 * Holds: a figure is present only when it has a meaning in the line's unit.
 */
import type { Finding, FindingCode } from '../findings';
import type { QuantityKind, Side, Unit } from '../quantity';

/** A line's figure in a case. */
export type Figure =
  /** `value` is in `unit`; −∞ in a decibel unit is *no power*. `digits` is how many significant digits were typed, for literals.
   *  `isFitted`: nobody chose the unit, so that display may take an SI prefix. */
  | {
      readonly state: 'value';
      readonly value: number;
      readonly unit: Unit;
      readonly isFitted: boolean;
      readonly digits?: number;
    }
  /** The line itself has an error finding of this code. */
  | { readonly state: 'withheld'; readonly code: FindingCode }
  /** A line above is withheld: `roots` are the symbols (or labels) of the lines at fault. */
  | { readonly state: 'waiting'; readonly roots: readonly string[] }
  /** Nothing has been entered. */
  | { readonly state: 'empty' };

/** How a kind or side came about. Those from `name`, `expression` and `unit` are assumptions and shown as such. */
export type Origin = 'declared' | 'name' | 'expression' | 'unit';

export interface KindReading {
  readonly kind: QuantityKind;
  readonly origin: Origin;
}

export interface SideReading {
  readonly side: Side;
  readonly origin: Origin;
}

/** How a line stands to its requirement; `margin` is positive when met, in `unit` (dB for decibel lines). */
export interface RequirementReading {
  readonly bound: 'at least' | 'at most';
  /** The bound in the line's unit. */
  readonly limit: number;
  readonly met: boolean;
  readonly margin: number;
  readonly unit: string;
}

export interface Reading {
  readonly figure: Figure;
  readonly kind?: KindReading;
  readonly side?: SideReading;
  /** Absent when there is no requirement, or while the figure is withheld. */
  readonly requirement?: RequirementReading;
}

/** A finding on a line, with whether a person has accepted it. */
export interface LineFinding extends Finding {
  readonly lineId: string;
  /** The cases that have it, in order. */
  readonly caseIds: readonly string[];
  /** The reason, when accepted and the entry is still the same; errors cannot be accepted. */
  readonly accepted?: string;
}

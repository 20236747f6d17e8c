/** What a working consists of. */
import type { Reading } from '../engine';

/** A stretch of a step: text, a symbol, or a figure; symbols and figures of lines name them. */
export type Piece =
  | { readonly type: 'text'; readonly text: string }
  | { readonly type: 'symbol'; readonly symbol: string; readonly lineId?: string }
  | { readonly type: 'figure'; readonly text: string; readonly unit: string; readonly lineId?: string };

/** `as entered` heads quantities and entries that cannot be read, in place of `in symbols`. */
export type StepTitle = 'as entered' | 'in symbols' | 'with values' | 'in linear terms' | 'result';

export interface WorkingStep {
  readonly title: StepTitle;
  readonly pieces: readonly Piece[];
}

/** Something the line rests on. `share` is its part of a sum of powers; what is taken off has a negative one. */
export interface WorkingTerm {
  readonly lineId?: string;
  readonly symbol: string;
  readonly label: string;
  readonly text: string;
  readonly unit: string;
  readonly share?: number;
}

export interface Working {
  readonly lineId: string;
  readonly caseId: string;
  readonly symbol: string;
  readonly label: string;
  readonly reading: Reading;
  readonly steps: readonly WorkingStep[];
  readonly terms: readonly WorkingTerm[];
  /** True when the terms are contributions to a sum of powers and their shares add to 1. */
  readonly shares: boolean;
  readonly remarks: readonly string[];
}

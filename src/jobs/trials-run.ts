/** A run of trials as it is asked for, and the sizes in which it is cut up. Plain data. */
import type { Worksheet } from '../worksheet';

export interface TrialsRun {
  /** What it is for: a new run for the same purpose stops the one before. */
  readonly purpose: string;
  readonly worksheet: Worksheet;
  readonly lineId: string;
  readonly caseId: string;
  readonly seed: number;
  readonly count: number;
}

/** Up to this many trials all figures are kept and the statistics are exact; above, memory does not grow with their number. */
export const EXACT_LIMIT = 2_000_000;

/** The most trials of a run. */
export const COUNT_LIMIT = 10_000_000;

/**
 * Trials whose sums are made together. Sums of pieces are joined in the order of the trials: what comes out does not depend on
 * who computed which. The first piece is the sample that the bins are laid over.
 */
export const PIECE = 8192;

/** Trials handed to a worker at a time: a whole number of pieces. */
export const CHUNK = 4 * PIECE;

/** What a run gives: statistics, a spectrum for drawing, what drives the failures; and what the tolerances can do at most. */
import type { Extremes, RootSumSquare, Trouble, TrialStatistics } from '../analysis';
import type { RequirementReading } from '../engine';

/** Figures counted in equal bins from the least to the greatest. */
export interface Spectrum {
  readonly from: number;
  /** The width of a bin. */
  readonly step: number;
  readonly counts: Float64Array<ArrayBuffer>;
  /** Finite figures that are in no bin. */
  readonly below: number;
  readonly above: number;
}

/** How far off an input is in the trials that fail. */
export interface Driver {
  readonly lineId: string;
  /** The mean of its deviation where the requirement is not met, less that in all trials, in its standard deviations. */
  readonly shift: number;
}

export interface TrialsOutcome {
  readonly statistics: TrialStatistics;
  /** True: percentiles come from bins, and are off by less than `quantileError`. */
  readonly isBinned: boolean;
  readonly quantileError: number;
  readonly least: number;
  readonly greatest: number;
  readonly spectrum: Spectrum;
  /** Absent without a requirement or without failures; the furthest first. */
  readonly drivers?: readonly Driver[];
  /** The figures in the order of the trials, where they are kept. */
  readonly figures?: Float64Array<ArrayBuffer>;
  /** Workers that died on the way. */
  readonly lostWorkers: number;
}

/** What is known without trials. */
export interface Account {
  /** NaN where withheld. */
  readonly nominal: number;
  readonly unitWord: string | undefined;
  readonly requirement?: RequirementReading;
  /** Lines with a tolerance that the line rests on. */
  readonly inputIds: readonly string[];
  readonly troubles: readonly Trouble[];
  readonly direction: 'higher' | 'lower';
  readonly isDirectionAssumed: boolean;
  readonly extremes: Extremes;
  readonly rootSumSquare: RootSumSquare;
}

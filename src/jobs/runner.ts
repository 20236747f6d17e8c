/** Who runs jobs: a pool of workers, or the page's own thread in slices. Both give the same, bit for bit. */
import type { Result } from '../base';
import type { Account, TrialsOutcome } from './outcome';
import type { TrialsRun } from './trials-run';

export interface Progress {
  readonly done: number;
  readonly count: number;
  /** What the trials so far give, with percentiles from bins. */
  readonly soFar: TrialsOutcome | undefined;
  /** Workers that died so far; their parts are done again. */
  readonly lostWorkers: number;
}

/** Why a run gave nothing. `worker-died`: the same part killed two workers. `failed`: the computation threw. */
export type Fault =
  { readonly kind: 'stopped' } | { readonly kind: 'worker-died' } | { readonly kind: 'failed'; readonly why: string };

export interface Listener {
  /** Told a few times a second while the run goes on, and of each worker that dies. */
  readonly onProgress?: (progress: Progress) => void;
  /** What is known without trials; comes once, in any place before the result. */
  readonly onAccount?: (account: Account) => void;
}

export interface Handle {
  readonly result: Promise<Result<TrialsOutcome, Fault>>;
  /** Ends the run; its result is the fault `stopped`. Does nothing once it is over. */
  stop(): void;
}

export interface Runner {
  /** Starts a run and stops the one before with the same purpose. */
  start(run: TrialsRun, listener?: Listener): Handle;
  /** Stops everything and lets the workers go. */
  close(): void;
}

/**
 * jobs: long computations off the page's thread: trials in pieces, what passes to and from workers, and who hands it out.
 * No page and no store in here; a worker, or whoever stands in for one, sees plain messages alone.
 */
export { EXACT_LIMIT, COUNT_LIMIT, type TrialsRun } from './trials-run';
export type { Account, Driver, Spectrum, TrialsOutcome } from './outcome';
export type { Fault, Handle, Listener, Progress, Runner } from './runner';
export { inlineRunner } from './inline-runner';
export { usualRunner, workerRunner } from './worker-runner';

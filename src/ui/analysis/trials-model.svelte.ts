/**
 * The trials that the panel shows: one run at a time, and what the last one gave.
 * Holds: outcome and account are of the same run; nothing of a run that was replaced is shown.
 */
import type { Account, Fault, Handle, Progress, Runner, TrialsOutcome } from '../../jobs';
import type { Worksheet } from '../../worksheet';
import { USUAL_COUNT } from './trials-words';

/** A run that takes longer shows how far it is. */
const LONG_MS = 1000;

export interface Shown {
  readonly outcome: TrialsOutcome;
  readonly account: Account;
  readonly seed: number;
  /** False while the run goes on. */
  readonly isWhole: boolean;
}

export class TrialsModel {
  /** What is chosen; a run may be of fewer. */
  count = $state(USUAL_COUNT);
  seed = $state(1);
  shown = $state.raw<Shown | undefined>();
  fault = $state.raw<Fault | undefined>();
  isRunning = $state(false);
  /** How far a long run is. */
  progress = $state.raw<{ readonly done: number; readonly count: number } | undefined>();
  #handle: Handle | undefined;

  constructor(
    private readonly runner: Runner,
    private readonly purpose: string,
  ) {}

  /** Starts a run; the one before is stopped. */
  run(worksheet: Worksheet, lineId: string, caseId: string, count: number): void {
    this.#handle?.stop();
    const { seed } = this;
    let account: Account | undefined;
    let isLong = false;
    let last: Progress | undefined;
    const isMine = (): boolean => this.#handle === handle;
    const show = (): void => {
      if (!isLong || !isMine() || last === undefined) return;
      this.progress = last;
      const { soFar } = last;
      if (soFar !== undefined && account !== undefined) this.shown = { outcome: soFar, account, seed, isWhole: false };
    };
    const handle = this.runner.start(
      { purpose: this.purpose, worksheet, lineId, caseId, seed, count },
      {
        onAccount: (told) => (account = told),
        onProgress: (told) => {
          last = told;
          show();
        },
      },
    );
    this.#handle = handle;
    this.isRunning = true;
    this.fault = undefined;
    this.progress = undefined;
    const timer = setTimeout(() => {
      isLong = true;
      show();
    }, LONG_MS);
    void handle.result.then((result) => {
      clearTimeout(timer);
      if (!isMine()) return;
      this.#handle = undefined;
      this.isRunning = false;
      this.progress = undefined;
      if (!result.ok) this.fault = result.fault;
      else if (account !== undefined) this.shown = { outcome: result.value, account, seed, isWhole: true };
    });
  }

  /** Stops at somebody's wish: what there is so far stays. */
  stop(): void {
    this.#handle?.stop();
  }

  /** Stops for good. */
  leave(): void {
    const handle = this.#handle;
    this.#handle = undefined;
    handle?.stop();
  }
}

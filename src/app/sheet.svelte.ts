/**
 * The open worksheet with its history, its evaluation and its findings.
 * Holds: the worksheet changes in `perform` and `travel` alone; the evaluation is told of each change once; what components
 * show of the evaluation they read through here, after `version`, so that one number tells them to look again.
 */
import { Evaluation, type LineFinding, type Pass, type Reading } from '../engine';
import {
  newWorksheet,
  perform,
  redoLabel,
  startHistory,
  undoLabel,
  type Change,
  type Edit,
  type History,
  type Travel,
  type Worksheet,
} from '../worksheet';
import { dependsOn } from './depends-on';
import { countFindings, passSentence, type FindingCounts } from './finding-counts';
import { joinFindings } from './joined-findings';

/** One worksheet at a time. */
export class Sheet {
  /** What the last edit changed; null before the first. */
  lastPass = $state.raw<Pass | null>(null);
  #history = $state.raw<History>(startHistory(newWorksheet()));
  #evaluation = $state.raw(new Evaluation(this.#history.worksheet));
  #version = $state(0);
  #findings = $state.raw<readonly LineFinding[]>([]);
  #counts = $state.raw<FindingCounts>({ errors: 0, warnings: 0, notes: 0 });

  get worksheet(): Worksheet {
    return this.#history.worksheet;
  }

  get evaluation(): Evaluation {
    return this.#evaluation;
  }

  /** Grows with each change of the worksheet. */
  get version(): number {
    return this.#version;
  }

  /** A line's figure in a case. */
  reading(lineId: string, caseId: string): Reading {
    dependsOn(this.#version);
    return this.#evaluation.reading(lineId, caseId);
  }

  /** A line's findings, joined over cases, accepted ones too. */
  findingsOf(lineId: string): readonly LineFinding[] {
    dependsOn(this.#version);
    return joinFindings(this.worksheet, this.#evaluation.findings(lineId));
  }

  /** All findings in the order of the worksheet, joined over cases. */
  get findings(): readonly LineFinding[] {
    return this.#findings;
  }

  /** How many findings are open. */
  get counts(): FindingCounts {
    return this.#counts;
  }

  /** The ids of all lines, and of what chains, pools and curves give, from top to bottom. */
  get lineOrder(): readonly string[] {
    dependsOn(this.#version);
    return this.#evaluation.order();
  }

  get undoLabel(): string | undefined {
    return undoLabel(this.#history);
  }

  get redoLabel(): string | undefined {
    return redoLabel(this.#history);
  }

  /** Shows another worksheet, with an empty history. */
  show(worksheet: Worksheet): void {
    this.#history = startHistory(worksheet);
    this.#evaluation = new Evaluation(worksheet);
    this.#version += 1;
    this.lastPass = null;
    this.#find();
  }

  /** Does an edit. The answer says what it changed, for the live region. */
  perform(edit: Edit): string {
    this.#history = perform(this.#history, edit);
    return this.#settle(edit.changes);
  }

  /** Undoes or redoes; undefined when there is nothing to. `said` says what it changed. */
  travel(
    step: (history: History) => Travel | undefined,
  ): { readonly travel: Travel; readonly said: string } | undefined {
    const travel = step(this.#history);
    if (travel === undefined) return undefined;
    this.#history = travel.history;
    return { travel, said: this.#settle(travel.changes) };
  }

  #settle(changes: readonly Change[]): string {
    const pass = this.#evaluation.edit(this.#history.worksheet, changes);
    const before = this.#counts;
    this.lastPass = pass;
    this.#version += 1;
    this.#find();
    return passSentence(pass.changed.size, before, this.#counts);
  }

  #find(): void {
    this.#findings = joinFindings(this.worksheet, this.#evaluation.sheetFindings());
    this.#counts = countFindings(this.#findings);
  }
}

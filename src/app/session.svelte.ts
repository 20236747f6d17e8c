/**
 * The session: the open worksheet, what is selected, how the page is set, where the worksheet is kept, and what is wanted of
 * the page (a panel, a dialog, the cursor somewhere).
 * Holds: the worksheet changes through edits alone, in `perform`, `undo` and `redo`, and never while it may only be read; each
 * change is handed over to be kept.
 */
import type { Evaluation, LineFinding, Reading } from '../engine';
import { fileNameFor, writeWorksheetFile, type ReadWorksheet } from '../exchange';
import type { Result } from '../base';
import type { Repair } from '../findings';
import { recordedValues } from '../review';
import type { PlainFault, Store, WorksheetText } from '../store';
import {
  allLines,
  applyRepair,
  findLine,
  newWorksheet,
  redo,
  undo,
  type Edit,
  type Focus,
  type History,
  type LineField,
  type Place,
  type Travel,
  type Worksheet,
} from '../worksheet';
import { answerEdit, canAnswer } from './answers';
import { repairInChain } from './chain-findings';
import { Announcer } from './announcer.svelte';
import type { FindingCounts } from './finding-counts';
import { Keeping, type KeepState } from './keeping.svelte';
import { Library } from './library.svelte';
import { Opening } from './opening.svelte';
import { Selection } from './selection.svelte';
import type { Settings } from './settings.svelte';
import { Sheet } from './sheet.svelte';

/** What the side panel shows. */
export type Panel = 'working' | 'findings' | 'analysis' | 'none';

/** The dialogs of the page; one at a time is open. */
export type DialogName = 'worksheets' | 'about' | 'functions' | 'keys' | 'paste' | 'accept' | 'import';

/** A wish to have the cursor somewhere; the grid fulfils it. */
export interface FocusRequest {
  readonly focus: Focus;
  /** Open the editor there. */
  readonly edit: boolean;
  /** Leave the browser's focus where it is. */
  readonly quiet?: boolean;
  /** With `edit`: a text put behind what stands in the cell, and where in it the caret goes. */
  readonly insert?: { readonly text: string; readonly caret: number };
}

/** Everything the page works with. One per page, made by `startSession`. */
export class Session {
  readonly sheet = new Sheet();
  readonly selection = new Selection();
  readonly announcer = new Announcer();
  readonly settings: Settings;
  readonly keeping: Keeping;
  readonly worksheets: Library;
  readonly opening: Opening;

  panel = $state<Panel>('working');
  /** True while the panel takes the whole width. */
  panelIsWide = $state(false);
  /** True until the panel has taken the focus that somebody wants there. */
  panelWantsFocus = $state(false);
  dialog = $state<DialogName | null>(null);
  /** Something to tell the person that is not tied to a line, until it is dismissed. */
  notice = $state.raw<{ readonly text: string; readonly undo?: () => void } | null>(null);
  /** The finding that the accept dialog is about. */
  findingToAccept = $state.raw<LineFinding | null>(null);
  /** A table that was pasted, for its preview, and where its lines are to go. */
  paste = $state.raw<{ readonly text: string; readonly place: Place } | null>(null);
  /** The line whose cell was changed last: its working and its repair are at hand although the cursor has gone on. */
  lastEditedLineId = $state<string | null>(null);
  focusRequest = $state.raw<FocusRequest | null>(null);
  /** What is searched for; rows mark where they hold it. */
  searched = $state('');
  /** Why the worksheet cannot be changed at all, or null. */
  #fileReadOnly = $state<string | null>(null);

  constructor(settings: Settings, opened: Result<Store, PlainFault>) {
    this.settings = settings;
    this.keeping = new Keeping(opened);
    this.worksheets = new Library(this.keeping.store);
    this.opening = new Opening({
      keeping: this.keeping,
      settings,
      current: () => this.worksheet,
      show: (read) => this.#opened(read),
      commit: () => this.#commit(),
      askToImport: () => (this.dialog = 'import'),
      tell: (text) => (this.notice = { text }),
    });
    this.#show(newWorksheet());
  }

  // What is there

  /** The worksheet as it stands. */
  get worksheet(): Worksheet {
    return this.sheet.worksheet;
  }

  /** The worksheet's figures. A component that reads from it also reads `version`. */
  get evaluation(): Evaluation {
    return this.sheet.evaluation;
  }

  /** Grows with each change of the worksheet. */
  get version(): number {
    return this.sheet.version;
  }

  /** A line's figure in a case, kept current in components. */
  reading(lineId: string, caseId: string): Reading {
    return this.sheet.reading(lineId, caseId);
  }

  /** A line's findings, joined over cases, accepted ones too; kept current in components. */
  findings(lineId: string): readonly LineFinding[] {
    return this.sheet.findingsOf(lineId);
  }

  /** All findings in the order of the worksheet, joined over cases; kept current in components. */
  sheetFindings(): readonly LineFinding[] {
    return this.sheet.findings;
  }

  /** How many findings are open. */
  get counts(): FindingCounts {
    return this.sheet.counts;
  }

  get selectedLineId(): string | null {
    return this.selection.lineId;
  }

  get selectedCaseId(): string {
    return this.selection.caseId;
  }

  get showLinear(): boolean {
    return this.settings.showLinear;
  }

  set showLinear(show: boolean) {
    this.settings.showLinear = show;
    this.announce(show ? 'Linear values are shown.' : 'Linear values are hidden.');
  }

  get saveState(): KeepState {
    return this.keeping.state;
  }

  /** Why nothing can be changed now, as a sentence, or null. */
  get readOnlyReason(): string | null {
    if (this.#fileReadOnly !== null) return this.#fileReadOnly;
    return this.keeping.mayEdit ? null : 'This worksheet is being edited in another tab. Take it over to edit it here.';
  }

  // Edits

  /** Does an edit. With `follow`, the cursor goes where the edit says. False when nothing can be changed now. */
  perform(edit: Edit, options: { readonly follow?: boolean } = {}): boolean {
    const reason = this.readOnlyReason;
    if (reason !== null) {
      this.announce(reason);
      this.notice = { text: reason };
      return false;
    }
    if (edit.changes.length === 0) return true;
    this.announce(this.sheet.perform(edit));
    this.#afterChange();
    if (options.follow === true && edit.focus !== undefined) this.focusRequest = { focus: edit.focus, edit: false };
    return true;
  }

  /** Takes the last edit back. */
  undo(): void {
    this.#travel(undo, 'Undone', 'There is nothing to undo.');
  }

  /** Does the last undone edit again. */
  redo(): void {
    this.#travel(redo, 'Done again', 'There is nothing to redo.');
  }

  /** Does what a repair of a finding says. */
  repair(finding: LineFinding, repair: Repair): void {
    const isLine = findLine(this.worksheet, finding.lineId) !== undefined;
    const edit = isLine
      ? applyRepair(this.worksheet, finding.lineId, repair, finding.caseIds[0])
      : repairInChain(this.evaluation, finding, repair);
    if (edit !== undefined && this.perform(edit)) this.announce(`Repaired: ${repair.title}.`);
  }

  /** Answers a finding with a reason. */
  accept(finding: LineFinding, reason: string): void {
    const { lineId, code } = finding;
    this.perform(answerEdit(this.worksheet, this.evaluation, lineId, { code, caseId: finding.caseIds[0], reason }));
  }

  /** Takes the answer to a finding back. */
  unaccept(finding: LineFinding): void {
    const { lineId, code } = finding;
    this.perform(answerEdit(this.worksheet, this.evaluation, lineId, { code, caseId: finding.caseIds[0] }));
  }

  /** Opens the dialog in which a finding is accepted with a reason. */
  askToAccept(finding: LineFinding): void {
    if (!canAnswer(this.worksheet, this.evaluation, finding.lineId)) {
      this.announce('This finding is on a figure that is worked out, and goes when the figure changes.');
      return;
    }
    this.findingToAccept = finding;
    this.dialog = 'accept';
  }

  // Where to look

  /** Opens the panel on what is selected and brings the focus there. */
  openPanel(): void {
    this.panel = 'working';
    this.panelWantsFocus = true;
  }

  /** Selects a line, and a case if given, and brings the cursor there. */
  select(lineId: string, caseId?: string): void {
    if (caseId !== undefined) this.selection.caseId = caseId;
    this.focusRequest = { focus: { kind: 'lines', lineIds: [lineId] }, edit: false };
  }

  /** Brings the cursor to a cell of a line; with `edit`, its editor opens. */
  focusCell(
    lineId: string,
    field: LineField,
    options: { readonly caseId?: string; readonly edit?: boolean } = {},
  ): void {
    const { caseId, edit = false } = options;
    const focus: Focus = { kind: 'lines', lineIds: [lineId], field, ...(caseId === undefined ? {} : { caseId }) };
    this.focusRequest = { focus, edit };
  }

  /** Brings the cursor to a cell of a line and leaves the browser's focus where it is. */
  lookAtQuietly(lineId: string, field: LineField): void {
    this.focusRequest = { focus: { kind: 'lines', lineIds: [lineId], field }, edit: false, quiet: true };
  }

  /** Says a sentence in the page's live region. */
  announce(text: string): void {
    this.announcer.say(text);
  }

  /** The worksheet's file: its name and its text, with the values of required lines recorded as they are now. */
  exportFile(): { readonly name: string; readonly text: string } {
    const recorded = recordedValues(this.evaluation);
    const { recorded: _before, ...rest } = this.worksheet;
    const worksheet: Worksheet = recorded === undefined ? rest : { ...rest, recorded };
    return { name: fileNameFor(this.worksheet.title), text: writeWorksheetFile(worksheet) };
  }

  // Inside

  #opened({ worksheet, readOnly, messages }: ReadWorksheet): void {
    this.#fileReadOnly = readOnly ?? null;
    this.#show(worksheet);
    const texts = [readOnly, ...messages].filter((message) => message !== undefined);
    this.notice = texts.length === 0 ? null : { text: texts.join(' ') };
  }

  #show(worksheet: Worksheet): void {
    this.sheet.show(worksheet);
    this.lastEditedLineId = null;
    this.selection.put(null, worksheet.cases[0]?.id ?? '');
    this.focusRequest = { focus: { kind: 'worksheet' }, edit: false };
  }

  #travel(step: (history: History) => Travel | undefined, done: string, nothing: string): void {
    const reason = this.readOnlyReason;
    const travelled = reason === null ? this.sheet.travel(step) : undefined;
    if (travelled === undefined) {
      this.announce(reason ?? nothing);
      return;
    }
    const { travel, said } = travelled;
    this.announce(`${done}: ${travel.label}.`);
    this.announce(said);
    this.#afterChange();
    if (travel.focus !== undefined) this.focusRequest = { focus: travel.focus, edit: false };
  }

  #afterChange(): void {
    const { cases } = this.worksheet;
    if (!cases.some((one) => one.id === this.selection.caseId)) this.selection.caseId = cases[0]?.id ?? '';
    this.#commit();
  }

  #commit(): void {
    this.keeping.commit(() => textOf(this.worksheet));
    this.settings.lastWorksheetId = this.worksheet.id;
  }
}

function textOf(worksheet: Worksheet): WorksheetText {
  return { title: worksheet.title, text: writeWorksheetFile(worksheet), lineCount: allLines(worksheet).length };
}

/**
 * The session: the open worksheet with its history and evaluation, what is selected, how the page is set, and where it is kept.
 * Holds: the worksheet changes through edits alone, in `perform`, `undo` and `redo`; the evaluation is told of each change once;
 * whatever components show of it they read after `version`, so that one number tells them to look again.
 */
import { Evaluation, type LineFinding, type Pass, type Reading } from '../engine';
import { fileNameFor, readWorksheetBytes, readWorksheetFile, writeWorksheetFile } from '../exchange';
import type { FileFault, ReadWorksheet } from '../exchange';
import { fail, ok, type Result } from '../base';
import type { Repair } from '../findings';
import type { PlainFault, Store, StoreFault, StoredWorksheet, WorksheetText } from '../store';
import {
  acceptFinding,
  allLines,
  applyRepair,
  duplicateWorksheet,
  entryIn,
  findLine,
  newWorksheet,
  perform,
  redo,
  redoLabel,
  startHistory,
  unacceptFinding,
  undo,
  undoLabel,
  type Change,
  type Edit,
  type Focus,
  type History,
  type LineField,
  type Place,
  type Travel,
  type Worksheet,
} from '../worksheet';
import { Announcer } from './announcer.svelte';
import { countFindings, passSentence, type FindingCounts } from './finding-counts';
import { joinFindings } from './joined-findings';
import { Keeping, type KeepState, type KeptWorksheet } from './keeping.svelte';
import { Library } from './library.svelte';
import { Selection } from './selection.svelte';
import type { Settings } from './settings.svelte';

/** What the side panel shows. */
export type Panel = 'working' | 'findings' | 'none';

/** The dialogs of the page; one at a time is open. */
export type DialogName = 'worksheets' | 'about' | 'functions' | 'keys' | 'cases' | 'paste' | 'accept' | 'import' | 'print';

/** A wish to have the cursor somewhere; the grid fulfils it. */
export interface FocusRequest {
  readonly focus: Focus;
  /** Open the editor there. */
  readonly edit: boolean;
  /** Leave the browser's focus where it is. */
  readonly quiet?: boolean;
}

/** A file whose worksheet is in the store already, with another text: the person decides. */
export interface ImportChoice {
  readonly read: ReadWorksheet;
  readonly stored: StoredWorksheet;
}

/** Everything the page works with. One per page, made by `startSession`. */
export class Session {
  readonly selection = new Selection();
  readonly announcer = new Announcer();
  readonly settings: Settings;
  readonly keeping: Keeping;
  readonly library: Library;

  panel = $state<Panel>('working');
  dialog = $state<DialogName | null>(null);
  /** Something to tell the person that is not tied to a line, until it is dismissed. */
  notice = $state.raw<{ readonly text: string; readonly undo?: () => void } | null>(null);
  /** The finding that the accept dialog is about. */
  findingToAccept = $state.raw<LineFinding | null>(null);
  importChoice = $state.raw<ImportChoice | null>(null);
  /** A table that was pasted, for its preview, and where its lines are to go. */
  paste = $state.raw<{ readonly text: string; readonly place: Place } | null>(null);
  /** The line whose cell was changed last: its working and its repair are at hand although the cursor has gone on. */
  lastEditedLineId = $state<string | null>(null);
  focusRequest = $state.raw<FocusRequest | null>(null);
  /** What the last edit changed, for figures that glow. */
  lastPass = $state.raw<Pass | null>(null);

  #history = $state.raw<History>(startHistory(newWorksheet()));
  #evaluation = $state.raw(new Evaluation(this.#history.worksheet));
  #version = $state(0);
  /** Why the worksheet cannot be changed at all, or null. */
  #fileReadOnly = $state<string | null>(null);
  #sheetFindings = $state.raw<readonly LineFinding[]>([]);
  #counts = $state.raw<FindingCounts>({ errors: 0, warnings: 0, notes: 0 });

  constructor(settings: Settings, opened: Result<Store, PlainFault>) {
    this.settings = settings;
    this.keeping = new Keeping(opened);
    this.keeping.onStale = (stored) => this.#replaceBy(stored);
    this.library = new Library(this.keeping.store);
    this.#show(this.#history.worksheet);
  }

  // What is there

  /** The worksheet as it stands. */
  get worksheet(): Worksheet {
    return this.#history.worksheet;
  }

  /** The worksheet's figures. A component that reads from it also reads `version`. */
  get evaluation(): Evaluation {
    return this.#evaluation;
  }

  /** Grows with each change of the worksheet. */
  get version(): number {
    return this.#version;
  }

  /** A line's figure in a case, kept current in components. */
  reading(lineId: string, caseId: string): Reading {
    void this.#version;
    return this.#evaluation.reading(lineId, caseId);
  }

  /** A line's findings, joined over cases, accepted ones too; kept current in components. */
  findings(lineId: string): readonly LineFinding[] {
    void this.#version;
    return joinFindings(this.worksheet, this.#evaluation.findings(lineId));
  }

  /** All findings in the order of the worksheet, joined over cases; kept current in components. */
  sheetFindings(): readonly LineFinding[] {
    return this.#sheetFindings;
  }

  /** How many findings are open. */
  get counts(): FindingCounts {
    return this.#counts;
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

  /** The ids of all lines from top to bottom. */
  get lineOrder(): readonly string[] {
    return allLines(this.worksheet).map((line) => line.id);
  }

  get undoLabel(): string | undefined {
    return undoLabel(this.#history);
  }

  get redoLabel(): string | undefined {
    return redoLabel(this.#history);
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
    this.#history = perform(this.#history, edit);
    this.#settle(edit.changes);
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
    const edit = applyRepair(this.worksheet, finding.lineId, repair, finding.caseIds[0]);
    if (this.perform(edit)) this.announce(`Repaired: ${repair.title}.`);
  }

  /** Answers a finding with a reason. */
  accept(finding: LineFinding, reason: string): void {
    const { lineId, code } = finding;
    const found = findLine(this.worksheet, lineId);
    if (found === undefined) return;
    const entry = entryIn(found.line, finding.caseIds[0]);
    this.perform(acceptFinding(this.worksheet, lineId, { code, entry, reason }));
  }

  /** Takes the answer to a finding back. */
  unaccept(finding: LineFinding): void {
    const found = findLine(this.worksheet, finding.lineId);
    if (found === undefined) return;
    const entry = entryIn(found.line, finding.caseIds[0]);
    this.perform(unacceptFinding(this.worksheet, finding.lineId, { code: finding.code, entry }));
  }

  /** Opens the dialog in which a finding is accepted with a reason. */
  askToAccept(finding: LineFinding): void {
    this.findingToAccept = finding;
    this.dialog = 'accept';
  }

  // Where to look

  /** Selects a line, and a case if given, and brings the cursor there. */
  select(lineId: string, caseId?: string): void {
    if (caseId !== undefined) this.selection.caseId = caseId;
    this.focusRequest = { focus: { kind: 'lines', lineIds: [lineId] }, edit: false };
  }

  /** Brings the cursor to a cell of a line; with `edit`, its editor opens. */
  focusCell(lineId: string, field: LineField, options: { readonly caseId?: string; readonly edit?: boolean } = {}): void {
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

  // Worksheets and files

  /** Opens a worksheet from the store. */
  async openWorksheet(id: string): Promise<Result<void, StoreFault | FileFault>> {
    const { store } = this.keeping;
    if (store === null) return ok(undefined);
    const stored = await store.read(id);
    if (!stored.ok) return stored;
    const read = readWorksheetFile(stored.value.text);
    if (!read.ok) {
      await store.quarantine(id, read.fault.sentence);
      return read;
    }
    await this.#open(read.value, { id, stored: stored.value });
    return ok(undefined);
  }

  /** Opens a new worksheet, empty or from a starter's text. It is kept from its first edit on; a starter at once. */
  async newWorksheet(starterText?: string): Promise<Result<void, FileFault>> {
    if (starterText === undefined) {
      const worksheet = newWorksheet();
      await this.#open({ worksheet, messages: [] }, { id: worksheet.id });
      return ok(undefined);
    }
    const read = readWorksheetFile(starterText);
    if (!read.ok) return read;
    const worksheet = duplicateWorksheet(read.value.worksheet, read.value.worksheet.title);
    await this.#open({ ...read.value, worksheet }, { id: worksheet.id });
    this.#commit();
    return ok(undefined);
  }

  /**
   * Opens the worksheet of a file's text. When the store holds this worksheet with another text, the person is asked
   * (`importChoice`) before anything is changed.
   */
  async importText(text: string): Promise<Result<void, FileFault>> {
    return this.#import(readWorksheetFile(text));
  }

  /** As `importText`, for the bytes of a file. */
  async importBytes(bytes: Uint8Array): Promise<Result<void, FileFault>> {
    return this.#import(readWorksheetBytes(bytes));
  }

  /** Answers `importChoice`: the file's worksheet takes the place of the stored one, or is opened beside it. */
  async settleImport(answer: 'replace' | 'beside' | 'cancel'): Promise<void> {
    const choice = this.importChoice;
    this.importChoice = null;
    this.dialog = null;
    if (choice === null || answer === 'cancel') return;
    const { read, stored } = choice;
    if (answer === 'beside') {
      const { worksheet } = read;
      await this.#openImported({ ...read, worksheet: duplicateWorksheet(worksheet, worksheet.title) });
      return;
    }
    if (stored.deletedAt !== null) await this.keeping.store?.restore(stored.id);
    await this.#open(read, { id: stored.id, stored });
    this.#commit();
  }

  /** In a conflict: goes on with what is in this tab as a worksheet of its own; the stored one stays as it is. */
  async keepAsCopy(): Promise<void> {
    const worksheet = duplicateWorksheet(this.worksheet);
    await this.#open({ worksheet, messages: [] }, { id: worksheet.id });
    this.#commit();
  }

  /** The worksheet's file: its name and its text. */
  exportFile(): { readonly name: string; readonly text: string } {
    return { name: fileNameFor(this.worksheet.title), text: writeWorksheetFile(this.worksheet) };
  }

  // Inside

  async #import(read: Result<ReadWorksheet, FileFault>): Promise<Result<void, FileFault>> {
    if (!read.ok) return fail(read.fault);
    const { store } = this.keeping;
    const { id } = read.value.worksheet;
    if (id === this.worksheet.id) await this.keeping.flush();
    const stored = store === null ? undefined : await store.read(id);
    if (stored?.ok !== true) {
      await this.#openImported(read.value);
      return ok(undefined);
    }
    if (stored.value.text === writeWorksheetFile(read.value.worksheet) && stored.value.deletedAt === null) {
      await this.#open(read.value, { id, stored: stored.value });
      return ok(undefined);
    }
    this.importChoice = { read: read.value, stored: stored.value };
    this.dialog = 'import';
    return ok(undefined);
  }

  async #openImported(read: ReadWorksheet): Promise<void> {
    await this.#open(read, { id: read.worksheet.id });
    this.#commit();
  }

  async #open(read: ReadWorksheet, kept: KeptWorksheet): Promise<void> {
    await this.keeping.open(kept);
    this.#fileReadOnly = read.readOnly ?? null;
    this.#history = startHistory(read.worksheet);
    this.#show(read.worksheet);
    this.settings.lastWorksheetId = kept.stored === undefined && read.readOnly === undefined ? null : kept.id;
    const messages = [read.readOnly, ...read.messages].filter((message) => message !== undefined);
    this.notice = messages.length === 0 ? null : { text: messages.join(' ') };
  }

  #replaceBy(stored: StoredWorksheet): void {
    const read = readWorksheetFile(stored.text);
    if (!read.ok) {
      this.notice = { text: read.fault.sentence };
      return;
    }
    this.#history = startHistory(read.value.worksheet);
    this.#show(read.value.worksheet);
    this.announce('The worksheet was read again: another tab had changed it.');
  }

  #show(worksheet: Worksheet): void {
    this.#evaluation = new Evaluation(worksheet);
    this.#version += 1;
    this.lastPass = null;
    this.lastEditedLineId = null;
    this.#findFindings();
    this.selection.put(null, worksheet.cases[0]?.id ?? '');
    this.focusRequest = { focus: { kind: 'worksheet' }, edit: false };
  }

  #travel(step: (history: History) => Travel | undefined, done: string, nothing: string): void {
    const reason = this.readOnlyReason;
    const travel = reason === null ? step(this.#history) : undefined;
    if (travel === undefined) {
      this.announce(reason ?? nothing);
      return;
    }
    this.#history = travel.history;
    this.announce(`${done}: ${travel.label}.`);
    this.#settle(travel.changes);
    if (travel.focus !== undefined) this.focusRequest = { focus: travel.focus, edit: false };
  }

  #settle(changes: readonly Change[]): void {
    const pass = this.#evaluation.edit(this.#history.worksheet, changes);
    this.lastPass = pass;
    this.#version += 1;
    const before = this.#counts;
    this.#findFindings();
    this.announce(passSentence(pass.changed.size, before, this.#counts));
    const { cases } = this.worksheet;
    if (!cases.some((one) => one.id === this.selection.caseId)) this.selection.caseId = cases[0]?.id ?? '';
    this.#commit();
  }

  #findFindings(): void {
    this.#sheetFindings = joinFindings(this.worksheet, this.#evaluation.sheetFindings());
    this.#counts = countFindings(this.#sheetFindings);
  }

  #commit(): void {
    this.keeping.commit(() => textOf(this.worksheet));
    this.settings.lastWorksheetId = this.worksheet.id;
  }
}

function textOf(worksheet: Worksheet): WorksheetText {
  return { title: worksheet.title, text: writeWorksheetFile(worksheet), lineCount: allLines(worksheet).length };
}

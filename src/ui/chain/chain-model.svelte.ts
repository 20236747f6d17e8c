/**
 * The state of a chain's panel: where the cursor is in the line-up, what is being edited, which columns are shown.
 * Holds: the cursor is always on a cell that is there: when its row or column goes, it is on the nearest.
 */
import { tick } from 'svelte';
import { columnsOfChain, type ChainColumn, type ChainColumnKey, type ColumnChoices } from '../../app/chain-columns';
import { findChain } from '../../app/chain-view';
import { dependsOn } from '../../app/depends-on';
import type { Session } from '../../app/session.svelte';
import type { ChainSection, StageField } from '../../worksheet';
import {
  ADD_ROW,
  editInStage,
  isTypedIn,
  refusalInStage,
  textInStage,
  type ChainCellName,
  type TypedPlace,
} from './chain-texts';
import { chooseColumn, columnChoices, NO_COLUMN_CHOICES } from './column-choices';

/** A cell of the line-up: a stage's id, or the row in which a new one begins. */
export interface ChainCell {
  readonly row: string;
  readonly cell: ChainCellName;
}

/** An open editor; `typed`: a character opened it, so that it begins empty. */
export interface ChainEditing extends ChainCell {
  readonly typed: boolean;
}

/** A stage to look at, and which of its values. */
export interface WantedStage {
  readonly stageId: string;
  readonly field?: StageField | undefined;
}

/** Where to go after keeping a text; `leave`: the focus has gone elsewhere. */
export type ChainMove = 'stay' | 'leave' | 'down' | 'up' | 'next' | 'previous';

export class ChainModel {
  readonly session: Session;
  readonly sectionId: string;

  /** Typing is for the case chosen alone. */
  onlyThisCase = $state(false);
  editing = $state.raw<ChainEditing | null>(null);
  /** The stage whose menu is open, or null. */
  menuRow = $state<string | null>(null);
  /** The stage that is being dragged, and the place that it would have, counted after it has been taken out. */
  dragging = $state.raw<{ readonly stageId: string; readonly to: number } | null>(null);
  /** The table, once it stands. */
  table: HTMLElement | undefined;

  #cursor = $state.raw<ChainCell>({ row: '', cell: 'symbol' });
  #lastIndex = 0;
  /** The cell where a run of Tab began: Enter goes back below it. */
  #runStart: ChainCellName | null = null;
  #choices: ColumnChoices = $state.raw(NO_COLUMN_CHOICES);

  constructor(session: Session, sectionId: string) {
    this.session = session;
    this.sectionId = sectionId;
    this.#choices = columnChoices(session, sectionId);
  }

  // What is there

  readonly chain: ChainSection | undefined = $derived.by(() => findChain(this.session.worksheet, this.sectionId));

  /** Ids of stages in signal order, and the row for a new one. */
  readonly rows: readonly string[] = $derived.by(() => [...(this.chain?.stages ?? []).map(({ id }) => id), ADD_ROW]);

  readonly columns: readonly ChainColumn[] = $derived.by(() => {
    dependsOn(this.session.version);
    return this.chain === undefined ? [] : columnsOfChain(this.session.evaluation, this.chain, this.#choices);
  });

  /** The cells of a row, from the left. */
  cellsOf(row: string): readonly ChainCellName[] {
    if (row === ADD_ROW) return ['symbol'];
    return ['place', 'on', 'symbol', 'label', ...this.columns.map(({ key }) => key)];
  }

  isShown(key: ChainColumnKey): boolean {
    return this.columns.some((column) => column.key === key);
  }

  /** Shows a column, or puts it away. */
  showColumn(key: ChainColumnKey, shown: boolean): void {
    this.#choices = chooseColumn(this.session, this.sectionId, key, shown);
  }

  /** An editor or a menu is open, which has the focus. */
  isOpen(): boolean {
    return this.editing !== null || this.menuRow !== null;
  }

  get readOnly(): boolean {
    return this.session.readOnlyReason !== null;
  }

  // The cursor

  readonly cursor: ChainCell = $derived.by(() => {
    const { row, cell } = this.#cursor;
    const there = this.rows.includes(row)
      ? row
      : (this.rows[Math.min(this.#lastIndex, this.rows.length - 1)] ?? ADD_ROW);
    const cells = this.cellsOf(there);
    return { row: there, cell: cells.includes(cell) ? cell : 'symbol' };
  });

  put(cell: ChainCell): void {
    this.#cursor = cell;
    this.#lastIndex = Math.max(this.rows.indexOf(cell.row), 0);
  }

  /** Moves by rows, keeping to the column, also over the row for a new stage; it stops at the edges. */
  moveRows(by: number): void {
    const at = Math.min(Math.max(this.rows.indexOf(this.cursor.row) + by, 0), this.rows.length - 1);
    this.put({ row: this.rows[at] ?? ADD_ROW, cell: this.#cursor.cell });
  }

  /** Moves by cells within the row; it stops at the edges. */
  moveCells(by: number): void {
    const { row, cell } = this.cursor;
    const cells = this.cellsOf(row);
    const at = Math.min(Math.max(cells.indexOf(cell) + by, 0), cells.length - 1);
    this.put({ row, cell: cells[at] ?? cell });
  }

  /** Brings the browser's focus to the cursor's cell once it is rendered. */
  async focusCursor(): Promise<void> {
    await tick();
    const cell = this.table?.querySelector<HTMLElement>('[data-cursor]');
    const target = cell?.querySelector<HTMLElement>('[data-focus]') ?? cell;
    target?.focus({ preventScroll: true });
    cell?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }

  /** Puts the cursor on a stage, at one of its values if given. */
  lookAt(stageId: string, cell: ChainCellName = 'symbol'): void {
    this.put({ row: stageId, cell });
    void this.focusCursor();
  }

  // Editing

  /** Opens the editor on the cursor's cell, where it can be typed in. */
  edit(typed = false): void {
    const { row, cell } = this.cursor;
    if (isTypedIn(row, cell) && !this.#refuses()) this.editing = { row, cell, typed };
  }

  /** Says why nothing can be changed now, if so. */
  #refuses(): boolean {
    const { readOnlyReason } = this.session;
    if (readOnlyReason !== null) this.session.announce(readOnlyReason);
    return readOnlyReason !== null;
  }

  placeOf({ row, cell }: ChainCell): TypedPlace {
    return { row, cell, caseId: this.session.selectedCaseId, onlyThisCase: this.onlyThisCase };
  }

  /** The text with which the open editor begins. */
  textOf(cell: ChainCell): string {
    return this.chain === undefined ? '' : textInStage(this.chain, this.placeOf(cell));
  }

  /** Why a text cannot be kept there, or undefined. */
  problemOf(cell: ChainCell, text: string): string | undefined {
    return this.chain === undefined ? undefined : refusalInStage(this.chain, this.placeOf(cell), text);
  }

  /** Keeps a text typed in the open editor and moves on. The answer is the reason when it cannot be kept. */
  keep(text: string, move: ChainMove): string | undefined {
    const { editing, chain, session } = this;
    if (editing === null || chain === undefined) return undefined;
    let { row } = editing;
    if (row !== ADD_ROW || text.trim() !== '') {
      const kept = editInStage(session.worksheet, chain, this.placeOf(editing), text);
      if (!kept.ok) return kept.fault;
      if (!session.perform(kept.value.edit)) return session.readOnlyReason ?? undefined;
      row = kept.value.stageId;
    }
    this.editing = null;
    this.#go({ row, cell: editing.cell }, move);
    return undefined;
  }

  /** Leaves the editor without keeping what was typed. */
  cancel(): void {
    this.editing = null;
    this.#runStart = null;
  }

  #go(from: ChainCell, move: ChainMove): void {
    this.put(from);
    if (move === 'next' || move === 'previous') {
      this.#goAlong(from, move === 'next' ? 1 : -1);
      return;
    }
    if (move === 'down' || move === 'up') {
      // A run of cells filled with Tab ends with Enter: the next one begins below its first cell.
      this.put({ row: from.row, cell: this.#runStart ?? from.cell });
      this.moveRows(move === 'down' ? 1 : -1);
    }
    this.#runStart = null;
  }

  /** To the next or previous cell to type in, through the rows, and opens its editor. */
  #goAlong(from: ChainCell, direction: 1 | -1): void {
    const all = this.rows.flatMap((row) =>
      this.cellsOf(row)
        .filter((cell) => isTypedIn(row, cell))
        .map((cell) => ({ row, cell })),
    );
    const at = all.findIndex(({ row, cell }) => row === from.row && cell === from.cell);
    const next = all[at + direction];
    if (next === undefined) return;
    this.#runStart = next.row === from.row ? (this.#runStart ?? from.cell) : null;
    this.put(next);
    this.edit();
  }
}

/**
 * The state of the grid: its rows and columns, where the cursor is, what is folded, and what is being edited.
 * Holds: the cursor is on a cell of a row that is there, as long as `rescueCursor` is called after rows have gone.
 */
import { tick } from 'svelte';
import type { Session } from '../../app/session.svelte';
import { itemRows, rowOfItem } from '../../app/item-rows';
import { findLine, type Focus } from '../../worksheet';
import {
  caseColumn,
  caseOfColumn,
  cellNearest,
  cellsOf,
  columnsOf,
  gridTemplate,
  leastTotal,
  NARROW_WIDTH,
  type CellName,
  type Column,
} from './columns';
import { NO_ENTRIES, NO_MEMBERS, placesByKey, withEntry, withMember } from './collections';
import { GridView } from './grid-view.svelte';
import { expectedHeight, lineKey, rowsOf, sectionKey, type Row } from './rows';

/** A cell of the grid. */
export interface Cell {
  readonly row: string;
  readonly cell: CellName;
}

/**
 * An open editor: where, and what it begins with. `typed`: a character opened it, so that it begins empty. `insert`: put
 * behind what stands there, with the caret at a place in it.
 */
export interface Editing extends Cell {
  readonly typed: boolean;
  readonly insert?: { readonly text: string; readonly caret: number } | undefined;
}

/** The grid's state. One per grid. */
export class GridModel {
  readonly session: Session;

  readonly view: GridView;

  cursor = $state.raw<Cell>({ row: '', cell: 'symbol' });
  editing = $state.raw<Editing | null>(null);
  /** The row whose menu is open, or null. */
  menuRow = $state<string | null>(null);
  /** The case whose menu is open, and the element beside which it is; with `named`, not the case's own heading. */
  caseMenu = $state.raw<{ readonly caseId: string; readonly anchor: HTMLElement; readonly named?: boolean } | null>(
    null,
  );
  /** The case whose name is being typed, or null. */
  renamingCase = $state<string | null>(null);
  /** The line whose unit is being chosen, and the element beside which that happens; or null. */
  unitMenu = $state.raw<{ readonly lineId: string; readonly anchor: HTMLElement } | null>(null);
  /** The cell where a run of Tab began, or null: Enter goes back below it. */
  runStart: CellName | null = null;

  #collapsed = $state.raw(NO_MEMBERS);
  #folding = $state.raw<ReadonlyMap<string, boolean>>(NO_ENTRIES);
  /** The column that up and down keep to. */
  #wanted: CellName = 'symbol';
  #lastIndex = 0;

  constructor(session: Session) {
    this.session = session;
    const rows = (): readonly Row[] => this.rows;
    const linear = (): boolean => session.showLinear;
    const narrow = (): boolean => this.narrow;
    this.view = new GridView({
      get rows() {
        return rows();
      },
      indexOf: (key) => this.indexOf(key),
      cursorKey: () => this.cursor.row,
      expectedHeight: (row) => expectedHeight(row, linear()),
      get setting() {
        return `${String(linear())} ${String(narrow())}`;
      },
    });
  }

  // Rows and columns

  readonly narrow = $derived.by(() => this.view.pageWidth <= NARROW_WIDTH);

  readonly columns: readonly Column[] = $derived.by(() =>
    columnsOf({
      worksheet: this.session.worksheet,
      choices: this.session.settings.columns,
      width: this.view.width,
      narrow: this.narrow,
      caseId: this.session.selectedCaseId,
    }),
  );

  readonly template = $derived.by(() => gridTemplate(this.columns, this.view.width));
  readonly leastWidth = $derived.by(() => (this.narrow ? 0 : leastTotal(this.columns, this.view.width)));

  readonly rows: readonly Row[] = $derived.by(() =>
    rowsOf({
      worksheet: this.session.worksheet,
      evaluation: this.session.evaluation,
      findings: this.session.sheetFindings(),
      collapsed: this.#collapsed,
      folding: this.#folding,
    }),
  );

  readonly #indexes: ReadonlyMap<string, number> = $derived.by(() => placesByKey(this.rows));

  /** The place of a row, or −1. */
  indexOf(key: string): number {
    return this.#indexes.get(key) ?? -1;
  }

  get cursorRow(): Row | undefined {
    return this.rows[this.indexOf(this.cursor.row)];
  }

  /** The lines that are selected, from top to bottom; those of folded sections are not among them. */
  get selectedLineIds(): readonly string[] {
    const { selection } = this.session;
    const { lineId } = selection;
    if (lineId !== null && findLine(this.session.worksheet, lineId) === undefined) return [];
    if (selection.anchorId === null) return lineId === null ? [] : [lineId];
    return selection.within(this.rows.flatMap((row) => (row.kind === 'line' ? [row.line.id] : [])));
  }

  // The cursor

  /** Puts the cursor on a cell and selects its line. With `extend`, the lines up to there are selected. */
  put(cell: Cell, options: { readonly extend?: boolean; readonly keepWanted?: boolean } = {}): void {
    this.cursor = cell;
    this.#lastIndex = Math.max(this.indexOf(cell.row), 0);
    if (options.keepWanted !== true) this.#wanted = cell.cell;
    const row = this.rows[this.indexOf(cell.row)];
    const lineId = row?.kind === 'line' || row?.kind === 'item' || row?.kind === 'finding' ? row.line.id : null;
    const caseId = caseOfColumn(cell.cell);
    const { selection } = this.session;
    selection.sectionId = row?.kind === 'section' ? row.section.id : null;
    if (options.extend === true && row?.kind === 'line') selection.extendTo(row.line.id);
    else selection.put(lineId);
    if (caseId !== undefined) selection.caseId = caseId;
  }

  /** Moves the cursor by rows, keeping to its column; it stops at the edges. */
  moveRows(by: number): void {
    const index = Math.min(Math.max(this.indexOf(this.cursor.row) + by, 0), this.rows.length - 1);
    const row = this.rows[index];
    if (row === undefined) return;
    this.put({ row: row.key, cell: cellNearest(row, this.columns, this.#wanted) }, { keepWanted: true });
  }

  /** Moves the cursor to the next line above or below, extending the selection. */
  extendRows(direction: 1 | -1): void {
    for (let index = this.indexOf(this.cursor.row) + direction; ; index += direction) {
      const row = this.rows[index];
      if (row === undefined) return;
      if (row.kind !== 'line') continue;
      this.put(
        { row: row.key, cell: cellNearest(row, this.columns, this.#wanted) },
        { extend: true, keepWanted: true },
      );
      return;
    }
  }

  /** Selects all lines. */
  selectAll(): void {
    const lines = this.rows.filter((row) => row.kind === 'line');
    const [first, last] = [lines[0], lines[lines.length - 1]];
    if (first === undefined || last === undefined) return;
    this.put({ row: first.key, cell: cellNearest(first, this.columns, this.#wanted) });
    this.put({ row: last.key, cell: cellNearest(last, this.columns, this.#wanted) }, { extend: true });
  }

  /** Moves the cursor by cells within its row; it stops at the edges. */
  moveCells(by: number): void {
    const row = this.cursorRow;
    if (row === undefined) return;
    const cells = cellsOf(row, this.columns);
    const at = Math.min(Math.max(cells.indexOf(this.cursor.cell) + by, 0), cells.length - 1);
    const cell = cells[at];
    if (cell !== undefined) this.put({ row: row.key, cell });
  }

  /**
   * Finds a place for a cursor whose row is gone: on the line of a finding that was put right, else near where it was.
   * Call it after the rows have changed.
   */
  rescueCursor(): void {
    if (this.cursorRow !== undefined) return;
    const { lineId } = this.session.selection;
    const line = lineId === null ? undefined : this.rows[this.indexOf(lineKey(lineId))];
    const near = line ?? this.rows[Math.min(this.#lastIndex, this.rows.length - 1)];
    if (near === undefined) return;
    this.put({ row: near.key, cell: cellNearest(near, this.columns, this.#wanted) }, { keepWanted: true });
  }

  /** Puts the cursor where an edit, an undo or another part of the page wants it. */
  lookAt(focus: Focus): void {
    if (focus.kind === 'section') {
      this.put({ row: sectionKey(focus.sectionId), cell: 'title' });
      return;
    }
    if (focus.kind === 'lines') {
      const [lineId] = focus.lineIds;
      const found = lineId === undefined ? undefined : findLine(this.session.worksheet, lineId);
      if (lineId !== undefined && found === undefined) this.#lookAtItem(lineId);
      if (lineId === undefined || found === undefined) return;
      this.setCollapsed(found.section.id, false);
      this.put({ row: lineKey(lineId), cell: this.#cellFor(focus.field, focus.caseId) });
      const last = focus.lineIds[focus.lineIds.length - 1];
      if (last !== undefined && last !== lineId) this.session.selection.anchorId = last;
      return;
    }
    if (focus.kind === 'case') {
      this.session.selection.caseId = focus.caseId;
      return;
    }
    this.toTop();
  }

  /** Puts the cursor on the row that tells of an item: a stage or an output of a chain, a total, a curve. */
  #lookAtItem(lineId: string): void {
    const { evaluation, worksheet } = this.session;
    const sectionId = evaluation.originOf(lineId)?.sectionId;
    const section = worksheet.sections.find(({ id }) => id === sectionId);
    if (section === undefined) return;
    this.setCollapsed(section.id, false);
    const item = rowOfItem(itemRows(evaluation, section), evaluation, lineId);
    this.put(
      item === undefined
        ? { row: sectionKey(section.id), cell: 'title' }
        : { row: lineKey(item.line.id), cell: 'symbol' },
    );
  }

  /** Puts the cursor on the first cell to type in. */
  toTop(): void {
    const first = this.rows.find((row) => row.kind === 'line' || row.kind === 'add') ?? this.rows[0];
    if (first !== undefined) this.put({ row: first.key, cell: cellNearest(first, this.columns, 'symbol') });
    this.view.toTop();
  }

  #cellFor(field: string | undefined, caseId: string | undefined): CellName {
    if (field === 'byCase' || (field === 'entry' && caseId !== undefined)) {
      const column = caseColumn(caseId ?? this.session.selectedCaseId);
      if (this.columns.includes(column)) return column;
    }
    const column = this.columns.find((one) => one === field);
    if (column !== undefined) return column;
    const row = this.cursorRow;
    return row?.kind === 'line' ? cellNearest(row, this.columns, this.#wanted) : 'symbol';
  }

  // Folding

  isCollapsed(sectionId: string): boolean {
    return this.#collapsed.has(sectionId);
  }

  /** Puts the lines of a section away, or shows them. */
  setCollapsed(sectionId: string, collapsed: boolean): void {
    this.#collapsed = withMember(this.#collapsed, sectionId, collapsed);
  }

  /** Folds the findings of a line, or opens them. */
  setUnfolded(lineId: string, unfolded: boolean): void {
    this.#folding = withEntry(this.#folding, lineId, unfolded);
  }

  // Editing

  /** Opens the editor on the cursor's cell. */
  edit(typed = false, insert?: Editing['insert']): void {
    this.editing = { ...this.cursor, typed, insert };
  }

  // The browser's focus

  /** Brings the browser's focus to the cursor's cell once it is rendered. */
  async focusCursor(): Promise<void> {
    this.view.reveal(this.cursor.row);
    await tick();
    const cell = this.view.scroller?.querySelector<HTMLElement>('[data-cursor]');
    const target = cell?.querySelector<HTMLElement>('[data-focus]') ?? cell;
    target?.focus({ preventScroll: true });
    cell?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }

  /** True when the browser's focus is in a row of the grid, and not, for instance, in its headings. */
  get hasFocus(): boolean {
    const row = document.activeElement?.closest('[data-row]') ?? null;
    return row !== null && (this.view.scroller?.contains(row) ?? false);
  }
}

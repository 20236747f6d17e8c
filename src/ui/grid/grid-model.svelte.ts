/**
 * The state of the grid: its rows and columns, what of it is in view, where the cursor is, and what is being edited.
 * Holds: the row with the cursor is always among the rendered ones; when rows above change, the view moves along so that
 * the row that a person looks at stays where it is.
 */
import { tick } from 'svelte';
import type { Session } from '../../app/session.svelte';
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
import { RowLayout } from './row-layout';
import { addKey, expectedHeight, lineKey, NEW_SECTION_KEY, rowsOf, sectionKey, type Row } from './rows';

/** A cell of the grid. */
export interface Cell {
  readonly row: string;
  readonly cell: CellName;
}

/** An open editor: where, and what it begins with. `typed`: a character opened it, so that it begins empty. */
export interface Editing extends Cell {
  readonly typed: boolean;
}

/** A row to be rendered, and where. */
export interface PlacedRow {
  readonly row: Row;
  readonly index: number;
  readonly top: number;
}

/** How far beyond the view rows are rendered, in CSS px. */
const OVERSCAN = 240;

/** The grid's state. One per grid. */
export class GridModel {
  readonly session: Session;

  // What the page's layout tells
  scrollTop = $state(0);
  viewHeight = $state(600);
  viewWidth = $state(1000);
  pageWidth = $state(1280);
  headerHeight = $state(34);

  cursor = $state.raw<Cell>({ row: '', cell: 'symbol' });
  editing = $state.raw<Editing | null>(null);
  /** The row whose menu is open, or null. */
  menuRow = $state<string | null>(null);
  /** The cell where a run of Tab began, or null: Enter goes back below it. */
  runStart: CellName | null = null;

  #collapsed = $state.raw<ReadonlySet<string>>(new Set());
  #folding = $state.raw<ReadonlyMap<string, boolean>>(new Map());
  #layoutVersion = $state(0);
  /** Heights that were measured, by row key; kept while rows come and go. */
  readonly #measured = new Map<string, number>();
  /** The column that up and down keep to. */
  #wanted: CellName = 'symbol';
  #lastIndex = 0;
  /** The row that is to stay where it is, and its distance from the top of the view. */
  #anchor = { row: '', offset: 0 };
  #scroller: HTMLElement | null = null;

  constructor(session: Session) {
    this.session = session;
  }

  // Rows and columns

  readonly narrow = $derived.by(() => this.pageWidth <= NARROW_WIDTH);

  readonly columns: readonly Column[] = $derived.by(() =>
    columnsOf({
      worksheet: this.session.worksheet,
      choices: this.session.settings.columns,
      width: this.viewWidth,
      narrow: this.narrow,
      caseId: this.session.selectedCaseId,
    }),
  );

  readonly template = $derived.by(() => gridTemplate(this.columns));
  readonly leastWidth = $derived.by(() => (this.narrow ? 0 : leastTotal(this.columns)));

  readonly rows: readonly Row[] = $derived.by(() =>
    rowsOf({
      worksheet: this.session.worksheet,
      findings: this.session.sheetFindings(),
      collapsed: this.#collapsed,
      folding: this.#folding,
    }),
  );

  readonly #indexes: ReadonlyMap<string, number> = $derived.by(
    () => new Map(this.rows.map((row, index) => [row.key, index])),
  );

  readonly #layout: RowLayout = $derived.by(() => {
    const linear = this.session.showLinear;
    const { rows } = this;
    return new RowLayout(rows.length, (index) => {
      const row = rows[index];
      return row === undefined ? 0 : (this.#measured.get(row.key) ?? expectedHeight(row, linear));
    });
  });

  /** The height of all rows, in CSS px. */
  readonly contentHeight = $derived.by(() => {
    void this.#layoutVersion;
    return this.#layout.total;
  });

  /** The rows to render, from top to bottom. */
  readonly placed: readonly PlacedRow[] = $derived.by(() => {
    void this.#layoutVersion;
    const layout = this.#layout;
    const first = layout.at(this.scrollTop - OVERSCAN);
    const last = layout.at(this.scrollTop + this.viewHeight + OVERSCAN);
    const indexes: number[] = [];
    const cursorIndex = this.indexOf(this.cursor.row);
    if (cursorIndex >= 0 && cursorIndex < first) indexes.push(cursorIndex);
    for (let index = Math.max(first, 0); index <= last; index++) indexes.push(index);
    if (cursorIndex > last) indexes.push(cursorIndex);
    return indexes.flatMap((index) => {
      const row = this.rows[index];
      return row === undefined ? [] : [{ row, index, top: layout.top(index) }];
    });
  });

  /** The place of a row, or −1. */
  indexOf(key: string): number {
    return this.#indexes.get(key) ?? -1;
  }

  /** The middle of a row from the top of all rows, in CSS px. */
  middleOf(index: number): number {
    void this.#layoutVersion;
    return this.#layout.top(index) + Math.min(this.#layout.height(index), 32) / 2;
  }

  get cursorRow(): Row | undefined {
    return this.rows[this.indexOf(this.cursor.row)];
  }

  /** The lines that are selected, from top to bottom; also those of folded sections between. */
  get selectedLineIds(): readonly string[] {
    const { selection } = this.session;
    if (selection.anchorId === null) return selection.lineId === null ? [] : [selection.lineId];
    return selection.within(this.rows.flatMap((row) => (row.kind === 'line' ? [row.line.id] : [])));
  }

  // The cursor

  /** Puts the cursor on a cell and selects its line. With `extend`, the lines up to there are selected. */
  put(cell: Cell, options: { readonly extend?: boolean; readonly keepWanted?: boolean } = {}): void {
    this.cursor = cell;
    this.#lastIndex = Math.max(this.indexOf(cell.row), 0);
    if (options.keepWanted !== true) this.#wanted = cell.cell;
    const row = this.rows[this.indexOf(cell.row)];
    const lineId = row?.kind === 'line' ? row.line.id : row?.kind === 'finding' ? row.line.id : null;
    const caseId = caseOfColumn(cell.cell);
    const { selection } = this.session;
    if (options.extend === true && lineId !== null) selection.extendTo(lineId);
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

  /** Rows that make up one view. */
  get rowsPerView(): number {
    const layout = this.#layout;
    const first = layout.at(this.scrollTop);
    return Math.max(layout.at(this.scrollTop + this.viewHeight - this.headerHeight) - first - 1, 1);
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

  /** Puts the cursor on the first cell to type in. */
  toTop(): void {
    const first = this.rows.find((row) => row.kind === 'line' || row.kind === 'add') ?? this.rows[0];
    if (first !== undefined) this.put({ row: first.key, cell: cellNearest(first, this.columns, 'symbol') });
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
    if (this.#collapsed.has(sectionId) === collapsed) return;
    const next = new Set(this.#collapsed);
    if (collapsed) next.add(sectionId);
    else next.delete(sectionId);
    this.#collapsed = next;
  }

  /** Folds the findings of a line, or opens them. */
  setUnfolded(lineId: string, unfolded: boolean): void {
    this.#folding = new Map(this.#folding).set(lineId, unfolded);
  }

  // Editing

  /** Opens the editor on the cursor's cell. */
  edit(typed = false): void {
    this.editing = { ...this.cursor, typed };
  }

  // The view

  /** Tells which element scrolls. Returns the function that ends it. */
  attach(scroller: HTMLElement): () => void {
    this.#scroller = scroller;
    return () => {
      this.#scroller = null;
    };
  }

  /** Takes the new scroll position from the element. */
  scrolled(): void {
    if (this.#scroller === null) return;
    this.scrollTop = this.#scroller.scrollTop;
    this.#dropAnchor();
  }

  /** Takes measured heights; rows above the anchor move the view along. */
  measured(heights: readonly (readonly [key: string, height: number])[]): void {
    let changed = false;
    for (const [key, height] of heights) {
      if (this.#measured.get(key) === height) continue;
      this.#measured.set(key, height);
      this.#layout.set(this.indexOf(key), height);
      changed = true;
    }
    if (!changed) return;
    this.#layoutVersion += 1;
    this.holdAnchor();
  }

  /** Forgets all measured heights: the setting of all rows has changed. */
  forgetHeights(): void {
    this.#measured.clear();
  }

  /** Scrolls so that the anchor's row is where it was, after rows or heights have changed. */
  holdAnchor(): void {
    const index = this.indexOf(this.#anchor.row);
    if (index < 0 || this.#scroller === null) return;
    const wanted = Math.max(this.#layout.top(index) - this.#anchor.offset, 0);
    if (Math.abs(wanted - this.#scroller.scrollTop) < 1) return;
    this.scrollTo(wanted);
  }

  /** Scrolls to a position. */
  scrollTo(top: number): void {
    if (this.#scroller === null) return;
    this.#scroller.scrollTop = top;
    this.scrollTop = this.#scroller.scrollTop;
  }

  /** Scrolls as little as needed for the cursor's row to be in view, and makes it the row that stays where it is. */
  reveal(): void {
    const index = this.indexOf(this.cursor.row);
    if (index < 0) return;
    const top = this.#layout.top(index);
    const bottom = top + this.#layout.height(index);
    const room = this.viewHeight - this.headerHeight;
    if (top < this.scrollTop) this.scrollTo(top);
    else if (bottom > this.scrollTop + room) this.scrollTo(bottom - room + 8);
    this.#anchor = { row: this.cursor.row, offset: top - this.scrollTop };
  }

  /** The cursor's row, if in view, else the first row in view, is to stay where it is. */
  #dropAnchor(): void {
    const cursorIndex = this.indexOf(this.cursor.row);
    const top = this.#layout.top(cursorIndex);
    const isSeen = cursorIndex >= 0 && top >= this.scrollTop && top < this.scrollTop + this.viewHeight;
    const index = isSeen ? cursorIndex : this.#layout.at(this.scrollTop);
    this.#anchor = { row: this.rows[index]?.key ?? '', offset: this.#layout.top(index) - this.scrollTop };
  }

  /** Brings the browser's focus to the cursor's cell once it is rendered. */
  async focusCursor(): Promise<void> {
    this.reveal();
    await tick();
    const cell = this.#scroller?.querySelector<HTMLElement>('[data-cursor]');
    const target = cell?.querySelector<HTMLElement>('[data-focus]') ?? cell;
    target?.focus({ preventScroll: true });
    cell?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }

  /** True when the browser's focus is in the grid. */
  get hasFocus(): boolean {
    return this.#scroller?.contains(document.activeElement) ?? false;
  }

  /** The key of the place for a new line below the section of a row. */
  addKeyFor(row: Row): string {
    if (row.kind === 'section' || row.kind === 'add') return addKey(row.section.id);
    if (row.kind === 'line') return addKey(row.sectionId);
    return NEW_SECTION_KEY;
  }
}

/**
 * The view of the grid: how high rows are, which of them are in view, and how far it is scrolled.
 * Holds: the row with the cursor is among the placed ones; when rows or heights above change, the view moves along, so that
 * the row that a person looks at stays where it is.
 */
import { dependsOn } from '../../app/depends-on';
import { RowLayout } from './row-layout';
import type { Row } from './rows';

/** A row to be rendered, and where. */
export interface PlacedRow {
  readonly row: Row;
  readonly index: number;
  readonly top: number;
}

/** What the view is a view of. */
export interface ViewedRows {
  readonly rows: readonly Row[];
  /** The place of a row, or −1. */
  readonly indexOf: (key: string) => number;
  /** The key of the row with the cursor. */
  readonly cursorKey: () => string;
  /** The height that a row is taken to have until it is measured, in CSS px. */
  readonly expectedHeight: (row: Row) => number;
  /** Changes when all rows are set otherwise, so that what was measured no longer holds. */
  readonly setting: string;
}

/** How far beyond the view rows are rendered, in CSS px. */
const OVERSCAN = 240;
/** The middle of a line is that of its first row of text. */
const FIRST_LINE = 32;

/** The view. One per grid; sizes are in CSS px. */
export class GridView {
  scrollTop = $state(0);
  height = $state(600);
  width = $state(1000);
  pageWidth = $state(1280);
  headerHeight = $state(34);

  readonly #viewed: ViewedRows;
  #layoutVersion = $state(0);
  /** Heights that were measured, by row key; kept while rows come and go. */
  #measured: Record<string, number> = {};
  #setting = '';
  #anchor = { row: '', offset: 0 };
  /** Where the view was last scrolled to; the page may not have been high enough for it. */
  #wantedTop = 0;
  #scroller: HTMLElement | null = null;

  constructor(viewed: ViewedRows) {
    this.#viewed = viewed;
  }

  readonly #layout: RowLayout = $derived.by(() => {
    const { rows, expectedHeight, setting } = this.#viewed;
    if (this.#setting !== setting) this.#measured = {};
    this.#setting = setting;
    return new RowLayout(rows.length, (index) => {
      const row = rows[index];
      return row === undefined ? 0 : (this.#measured[row.key] ?? expectedHeight(row));
    });
  });

  /** The height of all rows. */
  readonly contentHeight: number = $derived.by(() => {
    dependsOn(this.#layoutVersion);
    return this.#layout.total;
  });

  /** The rows to render, from top to bottom. */
  readonly placed: readonly PlacedRow[] = $derived.by(() => {
    dependsOn(this.#layoutVersion);
    const { rows, indexOf, cursorKey } = this.#viewed;
    const layout = this.#layout;
    const first = Math.max(layout.at(this.scrollTop - OVERSCAN), 0);
    const last = layout.at(this.scrollTop + this.height + OVERSCAN);
    const indexes = Array.from({ length: last - first + 1 }, (_, i) => first + i);
    const cursor = indexOf(cursorKey());
    if (cursor >= 0 && cursor < first) indexes.unshift(cursor);
    if (cursor > last) indexes.push(cursor);
    return indexes.flatMap((index) => {
      const row = rows[index];
      return row === undefined ? [] : [{ row, index, top: layout.top(index) }];
    });
  });

  /** The middle of a row's first line, from the top of all rows. */
  middleOf(index: number): number {
    dependsOn(this.#layoutVersion);
    return this.#layout.top(index) + Math.min(this.#layout.height(index), FIRST_LINE) / 2;
  }

  /** How many rows make up one view. */
  get rowsPerView(): number {
    const first = this.#layout.at(this.scrollTop);
    return Math.max(this.#layout.at(this.scrollTop + this.height - this.headerHeight) - first - 1, 1);
  }

  /** Tells which element scrolls. Returns the function that ends it. */
  attach(scroller: HTMLElement): () => void {
    this.#scroller = scroller;
    return () => {
      this.#scroller = null;
    };
  }

  /** The element that scrolls, while there is one. */
  get scroller(): HTMLElement | null {
    return this.#scroller;
  }

  /** Takes the new scroll position from the element. */
  scrolled(): void {
    if (this.#scroller === null) return;
    this.scrollTop = this.#scroller.scrollTop;
    this.#dropAnchor();
  }

  /** Changes when rows have to be measured anew although their own size may stay. */
  get setting(): string {
    return this.#viewed.setting;
  }

  /** Takes measured heights. */
  measured(heights: readonly (readonly [key: string, height: number])[]): void {
    let changed = false;
    for (const [key, height] of heights) {
      if (this.#measured[key] === height) continue;
      this.#measured[key] = height;
      this.#layout.set(this.#viewed.indexOf(key), height);
      changed = true;
    }
    if (!changed) return;
    this.#layoutVersion += 1;
    this.holdAnchor();
  }

  /**
   * Scrolls so that the anchor's row is where it was, after rows or heights have changed. Before the page shows the change it
   * may not be high enough yet to be scrolled that far: call it once before and once after.
   */
  holdAnchor(): void {
    const index = this.#viewed.indexOf(this.#anchor.row);
    if (index < 0 || this.#scroller === null) return;
    const wanted = Math.max(this.#layout.top(index) - this.#anchor.offset, 0);
    if (Math.abs(wanted - this.#scroller.scrollTop) >= 1) this.#scrollTo(wanted);
  }

  /**
   * Scrolls as little as needed for a row to be in view, and makes it the row that stays where it is. With `amid`, a row that
   * is out of view comes to a third of the view's height, so that it is seen among its neighbours.
   */
  reveal(key: string, amid = false): void {
    const index = this.#viewed.indexOf(key);
    if (index < 0) return;
    // What has changed above the last anchor must not count as a move of this row.
    this.holdAnchor();
    const top = this.#layout.top(index);
    const bottom = top + this.#layout.height(index);
    const room = this.height - this.headerHeight;
    const isAbove = top < this.#wantedTop;
    const isBelow = bottom > this.#wantedTop + room;
    if (amid && (isAbove || isBelow)) this.#scrollTo(top - room / 3);
    else if (isAbove) this.#scrollTo(top);
    else if (isBelow) this.#scrollTo(bottom - room + 8);
    this.#anchor = { row: key, offset: top - this.#wantedTop };
  }

  /** Scrolls to the top. */
  toTop(): void {
    this.#scrollTo(0);
    this.#dropAnchor();
  }

  #scrollTo(top: number): void {
    if (this.#scroller === null) return;
    this.#wantedTop = Math.max(top, 0);
    this.#scroller.scrollTop = top;
    this.scrollTop = this.#scroller.scrollTop;
  }

  /** The cursor's row, if in view, else the first row in view, is to stay where it is. */
  #dropAnchor(): void {
    const { rows, indexOf, cursorKey } = this.#viewed;
    const cursor = indexOf(cursorKey());
    const top = this.#layout.top(cursor);
    const isSeen = cursor >= 0 && top >= this.scrollTop && top < this.scrollTop + this.height;
    const index = isSeen ? cursor : this.#layout.at(this.scrollTop);
    this.#anchor = { row: rows[index]?.key ?? '', offset: this.#layout.top(index) - this.scrollTop };
  }
}

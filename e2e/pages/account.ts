// The account: the grid of lines in the middle of the page. Cells are found by the line's symbol and the heading of their
// column, keys go to whatever has the focus, as a person's do.
import { expect, type Locator, type Page } from '@playwright/test';

/** Places of the columns, as `aria-colindex` counts them; those of cases begin at `FIRST_CASE`. */
const COLUMNS = { margin: 1, symbol: 2, label: 3, entry: 4 } as const;
const FIRST_CASE = 5;

/** A column by its name, or the column of a case by the case's place, counted from 0. */
export type ColumnName = keyof typeof COLUMNS | number;

/** What is read of a line: its texts, and one figure for each case, with its unit. */
export interface ReadLine {
  readonly symbol: string;
  readonly label: string;
  readonly entry: string;
  readonly figures: readonly string[];
}

/** High enough for all rows of a worksheet of some sixty lines. */
const TALL = 4000;

/** A symbol as it stands in the account, where what follows the first underscore is a subscript. */
export function shownSymbol(symbol: string): string {
  return symbol.replace('_', '');
}

/** The grid. */
export class Account {
  readonly grid: Locator;
  readonly rows: Locator;
  /** The element that the Tab key stops at. */
  readonly tabStop: Locator;
  readonly editor: Locator;
  readonly suggestions: Locator;
  readonly chosenSuggestion: Locator;

  constructor(readonly page: Page) {
    this.grid = page.getByRole('grid', { name: /^The account/ });
    this.rows = this.grid.getByRole('row');
    this.tabStop = this.grid.getByRole('gridcell').and(page.locator('[tabindex="0"]'));
    this.editor = this.grid.getByRole('gridcell').locator('input');
    const listed = page.getByRole('listbox', { name: 'Suggestions' });
    this.suggestions = listed.getByRole('option');
    this.chosenSuggestion = listed.getByRole('option', { selected: true });
  }

  /** The row of the line with a symbol. */
  line(symbol: string): Locator {
    const cell = this.#inColumn('symbol', this.page.getByRole('gridcell', { name: shownSymbol(symbol), exact: true }));
    return this.rows.filter({ has: cell });
  }

  /** The row of the line with a number, as counted through the worksheet. */
  lineNumber(number: number): Locator {
    return this.rows.filter({ has: this.page.getByRole('gridcell', { name: `Line ${String(number)}`, exact: true }) });
  }

  /** A cell of the line with a symbol. */
  cell(symbol: string, column: ColumnName): Locator {
    return this.#inColumn(column, this.line(symbol).getByRole('gridcell'));
  }

  /** A cell of the line with a number. */
  cellOf(number: number, column: ColumnName): Locator {
    return this.#inColumn(column, this.lineNumber(number).getByRole('gridcell'));
  }

  /** The figure of a line in a case. */
  figure(symbol: string, caseAt = 0): Locator {
    return this.cell(symbol, caseAt);
  }

  /** The requirement of a line with its margin. */
  requirement(symbol: string): Locator {
    return this.line(symbol)
      .getByRole('gridcell')
      .filter({ hasText: /^\s*[≥≤]/ });
  }

  /** The rows of findings that say a text. */
  finding(text: string | RegExp): Locator {
    return this.rows
      .filter({ has: this.page.getByText(/^(Accepted )?(error|warning|note): /i) })
      .filter({ hasText: text });
  }

  /** The heading of a section. */
  section(title: string): Locator {
    return this.rows.filter({ has: this.page.getByRole('button', { name: `Menu of the section ${title}`.trim() }) });
  }

  /** The place for a new line in a section. */
  newLine(section = ''): Locator {
    const name = section === '' ? 'Symbol, new line' : `Symbol, new line in ${section}`;
    return this.grid.getByRole('gridcell', { name, exact: true });
  }

  /** The heading of a case's column. */
  caseHeading(name: string): Locator {
    return this.grid.getByRole('columnheader', { name, exact: true });
  }

  /** The headings of all cases, in order. */
  caseNames(): Promise<string[]> {
    return this.grid
      .getByRole('columnheader')
      .getByRole('button')
      .evaluateAll((buttons) => buttons.map((button) => button.textContent.replace('▾', '').trim()));
  }

  /** Presses keys, one after the other. */
  async press(...keys: readonly string[]): Promise<void> {
    for (const key of keys) await this.page.keyboard.press(key);
  }

  /** Types a text, as keys. */
  async type(text: string): Promise<void> {
    await this.page.keyboard.type(text);
  }

  /** Types a new line from the place for one: symbol, label, entry. The cursor is on the next place then. */
  async draft(symbol: string, label: string, entry: string): Promise<void> {
    await this.type(symbol);
    await this.press('Tab');
    await this.type(label);
    await this.press('Tab');
    await this.type(entry);
    // Suggestions stand open after the last word; the first Enter keeps the text all the same, for none is chosen.
    await this.press('Enter');
  }

  /** Types a text into a cell, in place of what is there. */
  async retype(symbol: string, column: ColumnName, text: string): Promise<void> {
    await this.cell(symbol, column).click();
    // Where the cursor was already, a press opens the editor on what is there.
    if ((await this.editor.count()) > 0) await this.press('Control+a');
    await this.type(text);
    await this.press('Enter');
    await expect(this.editor).toHaveCount(0);
  }

  /** Everything in the account, read at once. The window is made high enough for all rows for that moment. */
  async readAll(): Promise<readonly ReadLine[]> {
    return this.inTallWindow(() => this.readShown());
  }

  /** Makes the window high enough for all rows while something is done. */
  async inTallWindow<T>(deed: () => Promise<T>): Promise<T> {
    const size = this.page.viewportSize() ?? { width: 1280, height: 800 };
    await this.page.setViewportSize({ width: size.width, height: TALL });
    await this.expectAllRowsShown();
    const answer = await deed();
    await this.page.setViewportSize(size);
    return answer;
  }

  /** Expects that each row that the grid counts is in the page. */
  async expectAllRowsShown(): Promise<void> {
    await expect
      .poll(async () => (await this.rows.count()) - Number(await this.grid.getAttribute('aria-rowcount')))
      .toBe(0);
  }

  /** The lines whose rows are in the page. */
  async readShown(): Promise<readonly ReadLine[]> {
    return this.grid.evaluate(
      (grid, { columns, firstCase }) => {
        const caseCount = grid.querySelectorAll('[role="columnheader"] button').length;
        const textOf = (cell: Element | undefined): string => (cell?.textContent ?? '').replace(/\s+/g, ' ').trim();
        return [...grid.querySelectorAll('[role="row"][aria-selected]')].map((row) => {
          const cells = [...row.querySelectorAll('[role="gridcell"]')];
          const at = (place: number): string =>
            textOf(cells.find((cell) => cell.getAttribute('aria-colindex') === String(place)));
          return {
            symbol: at(columns.symbol),
            label: at(columns.label),
            entry: at(columns.entry),
            figures: Array.from({ length: caseCount }, (_, index) => at(firstCase + index)),
          };
        });
      },
      { columns: COLUMNS, firstCase: FIRST_CASE },
    );
  }

  /** Expects that the page's focus is in a cell that Tab stops at, and that it is the only one. */
  async expectOneTabStop(): Promise<void> {
    await expect(this.grid.locator('[role="gridcell"][tabindex="0"], [role="gridcell"] [tabindex="0"]')).toHaveCount(1);
  }

  #inColumn(column: ColumnName, cells: Locator): Locator {
    const place = typeof column === 'number' ? FIRST_CASE + column : COLUMNS[column];
    return cells.and(this.page.locator(`[aria-colindex="${String(place)}"]`));
  }
}

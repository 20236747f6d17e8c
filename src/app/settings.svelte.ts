/**
 * How the page is set on this computer: kept beside the worksheets, never in a worksheet file.
 * Holds: what is read from the store is checked field by field; whatever is missing or strange has its default.
 */
import type { JsonValue, Store } from '../store';

/** Light, dark, or as the system has it. */
export type Theme = 'system' | 'light' | 'dark';

/** Whether a column that is not always needed is shown: `auto` shows it where there is room. */
export type ColumnChoice = 'auto' | 'shown' | 'hidden';

/** Columns that can be shown and hidden. */
export type OptionalColumn = 'requirement' | 'tolerance' | 'source' | 'note';

const KEY = 'page';
const THEMES: readonly Theme[] = ['system', 'light', 'dark'];
const CHOICES: readonly ColumnChoice[] = ['auto', 'shown', 'hidden'];

/** The page's settings; each change is kept at once. */
export class Settings {
  #theme = $state<Theme>('system');
  #showLinear = $state(false);
  #columns = $state.raw<Readonly<Record<OptionalColumn, ColumnChoice>>>({
    requirement: 'shown',
    tolerance: 'auto',
    source: 'auto',
    note: 'auto',
  });
  #lastWorksheetId = $state<string | null>(null);
  #store: Pick<Store, 'getSetting' | 'setSetting'> | null = null;

  get theme(): Theme {
    return this.#theme;
  }

  set theme(theme: Theme) {
    this.#theme = theme;
    this.#keep();
  }

  get showLinear(): boolean {
    return this.#showLinear;
  }

  set showLinear(show: boolean) {
    this.#showLinear = show;
    this.#keep();
  }

  get columns(): Readonly<Record<OptionalColumn, ColumnChoice>> {
    return this.#columns;
  }

  /** Shows or hides a column. */
  setColumn(column: OptionalColumn, choice: ColumnChoice): void {
    this.#columns = { ...this.#columns, [column]: choice };
    this.#keep();
  }

  /** The worksheet that was open last. */
  get lastWorksheetId(): string | null {
    return this.#lastWorksheetId;
  }

  set lastWorksheetId(id: string | null) {
    if (this.#lastWorksheetId === id) return;
    this.#lastWorksheetId = id;
    this.#keep();
  }

  /** Reads the settings from a store and keeps them there from now on. A store that does not answer changes nothing. */
  async readFrom(store: Pick<Store, 'getSetting' | 'setSetting'>): Promise<void> {
    this.#store = store;
    const kept = await store.getSetting(KEY);
    if (kept.ok) this.#take(kept.value);
  }

  #take(kept: unknown): void {
    if (typeof kept !== 'object' || kept === null) return;
    const fields = kept as Readonly<Record<string, unknown>>;
    this.#theme = THEMES.find((theme) => theme === fields['theme']) ?? this.#theme;
    if (typeof fields['showLinear'] === 'boolean') this.#showLinear = fields['showLinear'];
    if (typeof fields['lastWorksheetId'] === 'string') this.#lastWorksheetId = fields['lastWorksheetId'];
    const columns = fields['columns'];
    if (typeof columns !== 'object' || columns === null) return;
    const choice = (column: OptionalColumn): ColumnChoice =>
      CHOICES.find((one) => one === (columns as Readonly<Record<string, unknown>>)[column]) ?? this.#columns[column];
    this.#columns = {
      requirement: choice('requirement'),
      tolerance: choice('tolerance'),
      source: choice('source'),
      note: choice('note'),
    };
  }

  #keep(): void {
    const value: JsonValue = {
      theme: this.#theme,
      showLinear: this.#showLinear,
      columns: { ...this.#columns },
      lastWorksheetId: this.#lastWorksheetId,
    };
    // A setting that could not be kept is no loss of work: it holds until the page is closed, and the save state in the
    // header tells of a store that fails.
    void this.#store?.setSetting(KEY, value);
  }
}

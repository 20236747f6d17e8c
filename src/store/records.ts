/**
 * What is kept, and how it is read back. What must stay true: a record from the database is checked field by field
 * before it is believed, and one that is damaged is shown as such instead of being repaired or hidden.
 */

/** Whether a worksheet can be worked with; `newer`: a later version of the page wrote it. */
export type Standing = 'usable' | 'newer' | 'unreadable';

/** A worksheet as the list shows it: everything but the text. Times are milliseconds since 1970 (UTC). */
export interface WorksheetEntry {
  readonly id: string;
  readonly title: string;
  readonly createdAt: number;
  readonly savedAt: number;
  /** When it was moved to the trash, or null. */
  readonly deletedAt: number | null;
  /** Names the stored text: never used twice in this browser, greater for a later save. */
  readonly rev: number;
  /** Length of the text in UTF-16 units. */
  readonly size: number;
  readonly lineCount: number;
  readonly standing: Standing;
}

/** A worksheet with its text. */
export interface StoredWorksheet extends WorksheetEntry {
  readonly text: string;
}

/** An earlier text of a worksheet, as a list of recovery copies shows it. */
export interface CopyEntry {
  readonly rev: number;
  readonly worksheetId: string;
  readonly title: string;
  readonly savedAt: number;
  readonly size: number;
  readonly lineCount: number;
  /** Why the copy was set aside and is never thinned out, or null for an ordinary one. */
  readonly quarantined: string | null;
}

/** A recovery copy with its text. */
export interface RecoveryCopy extends CopyEntry {
  readonly text: string;
}

/** A setting's value: what JSON can say. */
export type JsonValue = null | boolean | number | string | readonly JsonValue[] | { readonly [key: string]: JsonValue };

/** A row of the worksheets table. `formatVersion` is the worksheet file's version, as the page that saved it gave it. */
export interface WorksheetRecord extends Omit<WorksheetEntry, 'standing'> {
  readonly formatVersion: number;
}

/** A row of the texts table; its key is the worksheet's `rev`, given by the database. */
export interface TextRecord {
  readonly text: string;
}

function fieldOf(record: unknown, name: string): unknown {
  return typeof record === 'object' && record !== null ? (record as Record<string, unknown>)[name] : undefined;
}

function numberIn(record: unknown, name: string): number | undefined {
  const value = fieldOf(record, name);
  return typeof value === 'number' && Number.isFinite(value) ? value : undefined;
}

function textIn(record: unknown, name: string): string | undefined {
  const value = fieldOf(record, name);
  return typeof value === 'string' ? value : undefined;
}

/**
 * The list's view of a row. Fields that are missing from a damaged row are shown as '' or 0, with the standing
 * `unreadable`; a row of a version above `newestFormat` is `newer`, whatever else it holds.
 */
export function entryOf(record: unknown, newestFormat: number): WorksheetEntry {
  const id = textIn(record, 'id');
  const title = textIn(record, 'title');
  const createdAt = numberIn(record, 'createdAt');
  const savedAt = numberIn(record, 'savedAt');
  const deletedAt = fieldOf(record, 'deletedAt') === null ? null : numberIn(record, 'deletedAt');
  const rev = numberIn(record, 'rev');
  const size = numberIn(record, 'size');
  const lineCount = numberIn(record, 'lineCount');
  const formatVersion = numberIn(record, 'formatVersion');
  const needed = [id, title, createdAt, savedAt, deletedAt, rev, size, lineCount, formatVersion];
  let standing: Standing = needed.includes(undefined) ? 'unreadable' : 'usable';
  if (formatVersion !== undefined && formatVersion > newestFormat) standing = 'newer';
  return {
    id: id ?? String(fieldOf(record, 'id')),
    title: title ?? '',
    createdAt: createdAt ?? 0,
    savedAt: savedAt ?? 0,
    deletedAt: deletedAt ?? null,
    rev: rev ?? 0,
    size: size ?? 0,
    lineCount: lineCount ?? 0,
    standing,
  };
}

/** The list's view of a recovery copy; damaged fields are shown as '' or 0 and the text decides whether it can be read. */
export function copyOf(record: unknown): CopyEntry {
  return {
    rev: numberIn(record, 'rev') ?? 0,
    worksheetId: textIn(record, 'worksheetId') ?? '',
    title: textIn(record, 'title') ?? '',
    savedAt: numberIn(record, 'savedAt') ?? 0,
    size: numberIn(record, 'size') ?? 0,
    lineCount: numberIn(record, 'lineCount') ?? 0,
    quarantined: textIn(record, 'quarantined') ?? null,
  };
}

/** The text of a row of the texts table, or null when there is none. */
export function textOf(record: unknown): string | null {
  return textIn(record, 'text') ?? null;
}

/** The value of a row of the settings table; undefined when there is none. */
export function settingOf(record: unknown): unknown {
  return fieldOf(record, 'value');
}

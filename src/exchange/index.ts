/**
 * exchange: worksheets to and from the outside: the worksheet file (limits, schema, migrations, canonical writing), copied
 * lines, pasted tables. What comes from outside is checked here and nowhere further in; nothing here touches the page.
 */
export * from './file-fault';
export { FORMAT, readWorksheetBytes, readWorksheetFile, type ReadWorksheet } from './file';
export * from './limits';
export { WORKSHEET_VERSION } from './migrations';
export * from './write';
export * from './tab-separated';
export * from './copied-lines';
export type { ColumnRole } from './pasted-columns';
export type { DecimalSign } from './pasted-figures';
export * from './pasted-table';
export * from './pasted-points';
export type { PastedAxis } from './point-headings';
export type { Separator } from './point-rows';

/**
 * store: worksheets, their recovery copies and the page's settings in the browser's own database, and which tab may write.
 * A worksheet is an opaque text here: no worksheet model, no Svelte and no screen may be imported, and nothing here
 * deletes or overwrites a text that it could not read.
 */
export { openStore } from './open-store';
export type { OpenOptions } from './open-store';
export type { Saved, Store, WorksheetSave, WorksheetText } from './store';
export type { CopyEntry, JsonValue, RecoveryCopy, Standing, StoredWorksheet, WorksheetEntry } from './records';
export type { ConflictFault, MissingFault, PlainFault, StoreFault, UnreadableFault } from './store-fault';
export type { StoreTrouble } from './database';
export { Saver } from './saver';
export type { SaverOptions, SaveState, TextProducer } from './saver';
export { WorksheetClaim } from './presence';
export type { ClaimOptions, ClaimState, LockAccess, NoticeChannel } from './presence';
export { askPersistence, estimateStorage } from './persistence';
export type { PersistenceAnswer, StorageAccess, StorageEstimateBytes } from './persistence';

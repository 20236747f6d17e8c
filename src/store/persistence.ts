/** Whether the browser promises to keep the store, and how much room there is. Nothing in the store depends on either. */

/** What the browser answered; `unknown` when it cannot be asked. */
export type PersistenceAnswer = 'granted' | 'refused' | 'unknown';

/** The part of the browser's StorageManager that is used. */
export type StorageAccess = Pick<StorageManager, 'persist' | 'persisted' | 'estimate'>;

/** Bytes used by this origin and bytes that it may use, as the browser estimates them. */
export interface StorageEstimateBytes {
  readonly usedBytes: number;
  readonly quotaBytes: number;
}

/** The browser's own storage manager; undefined on pages that are not served securely. */
function browserStorage(): StorageAccess | undefined {
  return typeof navigator === 'undefined' ? undefined : navigator.storage;
}

/** Asks the browser not to evict this page's storage. Call it after the user's first save: browsers judge by use. */
export async function askPersistence(
  storage: StorageAccess | undefined = browserStorage(),
): Promise<PersistenceAnswer> {
  if (storage === undefined) return 'unknown';
  try {
    if (await storage.persisted()) return 'granted';
    return (await storage.persist()) ? 'granted' : 'refused';
  } catch {
    // Some browsers throw where storage is switched off: that is an answer, too.
    return 'unknown';
  }
}

/** Used and available room, or null when the browser does not say. */
export async function estimateStorage(
  storage: StorageAccess | undefined = browserStorage(),
): Promise<StorageEstimateBytes | null> {
  if (storage === undefined) return null;
  try {
    const { usage, quota } = await storage.estimate();
    return usage === undefined || quota === undefined ? null : { usedBytes: usage, quotaBytes: quota };
  } catch {
    // As above.
    return null;
  }
}

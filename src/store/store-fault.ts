/**
 * What can go wrong in the store, as values. What must stay true: every fault carries a sentence that says what
 * happened to the user's work and what to do next, and an error that nobody foresaw still becomes a fault.
 */
import type { StoredWorksheet } from './records';

/** A fault that concerns the whole store or one write; `detail` is the browser's own wording, for a report, or ''. */
export interface PlainFault {
  readonly code: 'unavailable' | 'quota' | 'blocked' | 'newer-format' | 'unexpected';
  readonly sentence: string;
  readonly detail: string;
}

/** Somebody else saved first: `stored` is what is in the database now. Nothing was written. */
export interface ConflictFault {
  readonly code: 'conflict';
  readonly sentence: string;
  readonly stored: StoredWorksheet;
}

/** No such worksheet or copy; `trashed` when it can be restored from the trash. */
export interface MissingFault {
  readonly code: 'missing';
  readonly sentence: string;
  readonly trashed: boolean;
}

/** The record is damaged and was left as it is; `text` is what could be read of it. */
export interface UnreadableFault {
  readonly code: 'unreadable';
  readonly sentence: string;
  readonly text: string | null;
}

/** Everything that an operation of the store can answer instead of a value. */
export type StoreFault = PlainFault | ConflictFault | MissingFault | UnreadableFault;

const sentences: Readonly<Record<PlainFault['code'], string>> = {
  unavailable:
    'This browser gives the page no storage (a private window or its settings may forbid it), so nothing is kept here. ' +
    'Save your worksheet as a file, and reload the page to try again.',
  quota:
    'There is no room left in the browser’s storage or on the disk. The last saved version is whole, but your latest ' +
    'edits are not in it. Save the worksheet as a file, free room (purge worksheets in the trash, delete files) and try again.',
  blocked:
    'Another tab keeps an older version of the page open and the storage cannot be opened beside it. ' +
    'Close the other tabs of this page and try again.',
  'newer-format':
    'This worksheet or its storage was written by a later version of the page, so this version does not write to it. ' +
    'Save your edits as a file and reload the page to get the later version.',
  unexpected:
    'The browser’s storage failed. The last saved version is kept. Save the worksheet as a file and try again.',
};

/** The fault with `code` and its sentence. */
export function plainFault(code: PlainFault['code'], detail = ''): PlainFault {
  return { code, sentence: sentences[code], detail };
}

/** Another tab has saved `stored` since the caller read the worksheet. */
export function conflictFault(stored: StoredWorksheet): ConflictFault {
  const sentence =
    'This worksheet has been saved from another tab or window since it was opened here; nothing was overwritten. ' +
    'Choose which version to go on with: the other one stays among the recovery copies or can be saved as a file.';
  return { code: 'conflict', sentence, stored };
}

const missingSentences = {
  worksheet:
    'This worksheet is not in the browser’s storage: it was deleted for good or the storage was cleared. ' +
    'If you still see it, save it as a file or keep it again.',
  trashed: 'This worksheet is in the trash, so edits to it are not kept. Restore it, or save it as a file.',
  copy: 'This recovery copy is no longer kept. Choose another one.',
};

/** What was asked for is not there (any more): the worksheet, or the copy; or the worksheet is in the trash. */
export function missingFault(what: keyof typeof missingSentences): MissingFault {
  return { code: 'missing', sentence: missingSentences[what], trashed: what === 'trashed' };
}

/** The worksheet's record is damaged; `text` is what was found of it. */
export function unreadableFault(text: string | null): UnreadableFault {
  const sentence =
    'What is stored of this worksheet is damaged. It was left as it is. ' +
    (text === null
      ? 'Open one of its recovery copies.'
      : 'Save what was found as a file, or open one of its recovery copies.');
  return { code: 'unreadable', sentence, text };
}

// Deep enough for a library's error around a browser's error; a chain that loops ends here too.
const deepestCause = 4;

/** The error and the errors it wraps: Dexie keeps the browser's own error in `inner`, others in `cause`. */
function causes(error: unknown): { readonly name: string; readonly message: string }[] {
  const found: { name: string; message: string }[] = [];
  let next: unknown = error;
  while (typeof next === 'object' && next !== null && found.length < deepestCause) {
    const { name, message, inner, cause } = next as Record<string, unknown>;
    found.push({
      name: typeof name === 'string' ? name : '',
      message: typeof message === 'string' ? message : '',
    });
    next = inner ?? cause;
  }
  return found;
}

/**
 * What Chromium says when the disk, and not only the page's share of it, is full (seen with version 156): a large text
 * fails with a DataError, a small one with an UnknownError that also closes the connection.
 */
const fullDisk = /Failed to write blobs|FILE_ERROR_NO_SPACE/;

/** The fault that an error thrown by the database stands for. The outermost error often hides the reason, so all are asked. */
export function faultFrom(error: unknown): StoreFault {
  const chain = causes(error);
  const detail =
    chain.length === 0 ? String(error) : chain.map(({ name, message }) => `${name}: ${message}`).join(' < ');
  const named = (...names: string[]): boolean => chain.some(({ name }) => names.includes(name));
  if (named('QuotaExceededError') || fullDisk.test(detail)) return plainFault('quota', detail);
  if (named('NotReadableError', 'DataError')) return unreadableFault(null);
  if (named('MissingAPIError', 'SecurityError', 'OpenFailedError', 'DatabaseClosedError')) {
    return plainFault('unavailable', detail);
  }
  return plainFault('unexpected', detail);
}

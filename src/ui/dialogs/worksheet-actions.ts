/** What the dialog of worksheets lets a person do; the page gives the deeds, the dialog tells when one failed. */
import type { Result } from '../../base';
import type { CopyEntry } from '../../store';

/** Whether it was done, or a sentence that says why not and what to do. */
export type Done = Promise<Result<unknown, string>>;

/** The deeds. Those that show another worksheet are expected to close the dialog when they succeed. */
export interface WorksheetActions {
  readonly open: (id: string) => Done;
  readonly begin: () => Done;
  readonly openFile: () => Done;
  readonly beginFrom: (starterId: string) => Done;
  readonly rename: (id: string, title: string) => Done;
  readonly duplicate: (id: string) => Done;
  /** Moves to the trash, also the worksheet that is shown. */
  readonly remove: (id: string) => Done;
  readonly restore: (id: string) => Done;
  /** Deletes for good what is in the trash. */
  readonly emptyTrash: () => Done;
  /** The earlier states of a worksheet, the newest first. */
  readonly copies: (id: string) => Promise<Result<readonly CopyEntry[], string>>;
  /** Opens an earlier state as a worksheet of its own. */
  readonly openCopy: (copy: CopyEntry) => Done;
}

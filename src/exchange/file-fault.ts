/** What can be wrong with a worksheet file, as values. */
import type { JsonFault } from './json-text';

/** The kinds of fault. */
export type FileFaultCode =
  | JsonFault['code']
  | 'too-large'
  | 'not-text'
  | 'not-a-worksheet'
  | 'later-version'
  | 'wrong-shape'
  | 'too-many-lines'
  | 'id-given-twice';

/** Why a file is refused. */
export interface FileFault {
  readonly code: FileFaultCode;
  /** The place in the document, as in `sections[1].lines[3].entry`; empty for the document as a whole. */
  readonly path: string;
  /** What is wrong and what to do, as a sentence for the user; it names the path where there is one. */
  readonly sentence: string;
}

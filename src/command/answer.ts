/** What a command gives: results for standard output, messages for standard error, and the exit code of the contract. */

/** 0: computed, no error finding, every requirement met. 1: computed, but not so. 2: bad usage or a bad file. */
export type ExitCode = 0 | 1 | 2;

export interface Answer {
  readonly results: string;
  readonly messages: string;
  readonly exitCode: ExitCode;
}

/** What commands may ask of the world. */
export interface World {
  /** The bytes of a file. Throws as Node does when it cannot be read. */
  readonly readFile: (path: string) => Uint8Array;
  /** Hears how far a long command has come, at standard error's side; asked for only after a second. */
  readonly tellProgress?: (sentence: string) => void;
}

/** Bad usage or a bad file: nothing goes to standard output. */
export class Refusal extends Error {}

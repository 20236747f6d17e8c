/**
 * Findings: what the checker says about a line. A finding is plain data; its words come from the catalogue alone, and its
 * repairs are data that `worksheet` turns into one undoable edit.
 */
import type { FindingCode } from './catalogue';

/** Errors withhold the value; warnings and notes do not. */
export type Severity = 'error' | 'warning' | 'note';

/** A stretch of an entry's text, in UTF-16 units: `start` inclusive, `end` exclusive. */
export interface Place {
  readonly start: number;
  readonly end: number;
}

/** A way to put a line right, as data. `title` says what it does, in a few words. */
export type Repair =
  | { readonly kind: 'entry'; readonly title: string; readonly entry: string }
  | { readonly kind: 'unit'; readonly title: string; readonly unit: string }
  | {
      readonly kind: 'quantity';
      readonly title: string;
      readonly quantity?: string;
      readonly side?: 'wanted' | 'unwanted';
    };

/** The particulars that a finding's text is filled with: names, expressions and figures, already in words. */
export type Facts = Readonly<Record<string, string>>;

/** What the checker leaves behind: everything but the figures, which are filled in when somebody reads it. */
export interface FindingSeed {
  readonly code: FindingCode;
  readonly place?: Place;
  readonly facts: Facts;
  /** The first repair also tells what was probably meant: its figure is quoted in the message. */
  readonly repairs: readonly Repair[];
}

/** A finding as shown: with its sentence and both figures. */
export interface Finding {
  readonly code: FindingCode;
  readonly severity: Severity;
  readonly title: string;
  readonly message: string;
  readonly place?: Place;
  readonly repairs: readonly Repair[];
}

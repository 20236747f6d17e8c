/**
 * The document: what a worksheet file holds, as plain immutable data.
 * Holds: fields are what a person typed; nothing computed is stored here (but `recorded`, which is history).
 * Objects may carry further keys that a later version wrote; copies made by spreading keep them.
 */
import type { QuantityKind, Side } from '../quantity';
import type { ChainSection } from './chain';
import type { CurveSection } from './curve';

/** A column of values: each case may override any entry. */
export interface Case {
  readonly id: string;
  readonly name: string;
}

/** The shapes that a tolerance's distribution can have. */
export type ToleranceShape = 'uniform' | 'triangular' | 'normal' | 'arcsine';

/** How far a line's figure may be off; deviations are magnitudes, as typed text with a unit. */
export interface Tolerance {
  readonly favourable?: string;
  readonly adverse?: string;
  readonly below?: string;
  readonly above?: string;
  readonly shape?: ToleranceShape;
  readonly group?: string;
}

/** A bound on a line, as typed text with a unit. */
export type Requirement =
  { readonly atLeast: string; readonly atMost?: never } | { readonly atMost: string; readonly atLeast?: never };

/** A finding that a person has answered with a reason; it holds while the entry stays what it was. */
export interface AcceptedFinding {
  readonly code: string;
  readonly entry: string;
  readonly reason: string;
}

/** A reviewer's mark. */
export interface SignOff {
  readonly by: string;
  readonly on: string;
  readonly basis: string;
}

/** One line of the account. Optional text fields are absent rather than empty. */
export interface Line {
  readonly id: string;
  readonly symbol: string;
  readonly label: string;
  readonly entry: string;
  readonly unit?: string;
  readonly quantity?: QuantityKind;
  readonly side?: Side;
  /** Entries that stand in place of `entry` in the named cases, by case id. */
  readonly byCase?: Readonly<Record<string, string>>;
  /** True: a contribution that its pool leaves out for now. */
  readonly off?: boolean;
  /** Digits shown after the point (decibel figures) or significant figures (linear); absent: 2 and 4. */
  readonly digits?: number;
  readonly tolerance?: Tolerance;
  readonly requirement?: Requirement;
  readonly source?: string;
  readonly note?: string;
  readonly accepted?: readonly AcceptedFinding[];
  readonly signOff?: readonly SignOff[];
}

/** A titled group of lines. */
export interface PlainSection {
  readonly id: string;
  readonly kind: 'lines';
  readonly title: string;
  readonly lines: readonly Line[];
}

/** A group of lines that add as powers (ratios: by their reciprocals); its symbol stands for their total. */
export interface PoolSection {
  readonly id: string;
  readonly kind: 'pool';
  readonly symbol: string;
  readonly title: string;
  /** The unit of the total; absent: that of the lines. */
  readonly unit?: string;
  /** A bound on the total. */
  readonly requirement?: Requirement;
  readonly lines: readonly Line[];
}

/** A section that holds lines. */
export type LinesSection = PlainSection | PoolSection;

/** A section of a kind that this version does not know: kept word for word, shown as such. */
export interface OtherSection {
  readonly id: string;
  readonly kind: string & {};
  readonly title: string;
  /** The section as read, all keys. */
  readonly content: Readonly<Record<string, unknown>>;
}

export type Section = LinesSection | ChainSection | CurveSection | OtherSection;

const isKnown = (section: Section, kind: string): boolean => section.kind === kind && !('content' in section);

/** True for sections that hold lines: plain ones and pools. */
export function isLinesSection(section: Section): section is LinesSection {
  return isKnown(section, 'lines') || isKnown(section, 'pool');
}

export function isPoolSection(section: Section): section is PoolSection {
  return isKnown(section, 'pool');
}

export function isChainSection(section: Section): section is ChainSection {
  return isKnown(section, 'chain');
}

export function isCurveSection(section: Section): section is CurveSection {
  return isKnown(section, 'curve');
}

/** True for sections of kinds that this version does not know. */
export function isOtherSection(section: Section): section is OtherSection {
  return 'content' in section;
}

/** One budget: sections of lines, and its cases (at least one). */
export interface Worksheet {
  readonly id: string;
  readonly title: string;
  readonly summary?: string;
  readonly cases: readonly Case[];
  readonly sections: readonly Section[];
  /** Required lines' values when last saved, by symbol and case id. */
  readonly recorded?: Readonly<Record<string, Readonly<Record<string, string>>>>;
}

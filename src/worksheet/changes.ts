/**
 * Changes: the closed list of ways in which a document changes, as plain data that can be stored and sent.
 * Holds: applying a change and then its inverse gives back an equal document with its keys in the same order; whatever a
 * change does not concern keeps its identity. A change that does not fit its document is a broken program.
 */
import type { ChainSection } from './chain';
import type { CurveSection } from './curve';
import type { Case, Line, PoolSection, Section, Worksheet } from './document';
import { Draft } from './draft';

/** A field of a line that a change may set. */
export type LineField = Exclude<keyof Line, 'id'>;

type SetLineField = {
  [Field in LineField]-?: {
    readonly kind: 'set-line';
    readonly lineId: string;
    readonly field: Field;
    /** Absent or undefined: the field is taken away. */
    readonly value?: Line[Field] | undefined;
  };
};

/** Sets one field of a line. */
export type SetLine = SetLineField[LineField];

/** The fields of sections that a change may set; lists of stages and points are set as a whole. */
type SectionFields = { readonly title: string; readonly symbol: string } & Pick<PoolSection, 'unit' | 'requirement'> &
  Omit<ChainSection, 'id' | 'kind' | 'title' | 'symbol'> &
  Omit<CurveSection, 'id' | 'kind' | 'title' | 'symbol'>;

export type SectionField = keyof SectionFields;

/** Sets one field of a section, which must be of a kind that has it. */
export type SetSection = {
  [Field in SectionField]-?: {
    readonly kind: 'set-section';
    readonly sectionId: string;
    readonly field: Field;
    /** Absent or undefined: the field is taken away. */
    readonly value?: SectionFields[Field] | undefined;
  };
}[SectionField];

/** Sets one field of the worksheet itself. */
export type SetWorksheet =
  | { readonly kind: 'set-worksheet'; readonly field: 'title'; readonly value: string }
  | { readonly kind: 'set-worksheet'; readonly field: 'summary'; readonly value?: string | undefined }
  | { readonly kind: 'set-worksheet'; readonly field: 'recorded'; readonly value?: Worksheet['recorded'] };

/** One change. An `index` of a move counts places after the moved thing has been taken out. */
export type Change =
  | { readonly kind: 'insert-line'; readonly sectionId: string; readonly index: number; readonly line: Line }
  | { readonly kind: 'remove-line'; readonly lineId: string }
  | { readonly kind: 'move-line'; readonly lineId: string; readonly sectionId: string; readonly index: number }
  | SetLine
  | { readonly kind: 'insert-section'; readonly index: number; readonly section: Section }
  | { readonly kind: 'remove-section'; readonly sectionId: string }
  | { readonly kind: 'move-section'; readonly sectionId: string; readonly index: number }
  | SetSection
  | { readonly kind: 'insert-case'; readonly index: number; readonly case: Case }
  | { readonly kind: 'remove-case'; readonly caseId: string }
  | { readonly kind: 'move-case'; readonly caseId: string; readonly index: number }
  | { readonly kind: 'rename-case'; readonly caseId: string; readonly name: string }
  | SetWorksheet;

/** The worksheet after a change, and the change that undoes it. Throws when the change does not fit the worksheet. */
export function applyChange(worksheet: Worksheet, change: Change): { worksheet: Worksheet; inverse: Change } {
  const draft = new Draft(worksheet);
  const inverse = draft.apply(change);
  return { worksheet: draft.finish(), inverse };
}

/**
 * The worksheet after all changes, one after the other, and the changes that undo them, in the order to apply them.
 * Costs one copy of each list that changes, not one for each change.
 */
export function applyAll(
  worksheet: Worksheet,
  changes: readonly Change[],
): { worksheet: Worksheet; inverse: readonly Change[] } {
  const draft = new Draft(worksheet);
  const inverse = changes.map((change) => draft.apply(change)).reverse();
  return { worksheet: draft.finish(), inverse };
}

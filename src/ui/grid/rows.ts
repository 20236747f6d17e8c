/**
 * The rows of the account, from top to bottom: section headings, lines, the findings under their line, the places for new
 * lines.
 * Holds: a row's key names the same thing from one list to the next, so that what was measured and where the cursor stood last.
 */
import type { Evaluation, LineFinding } from '../../engine';
import { canAnswer } from '../../app/answers';
import { itemRows, rowOfItem, type ItemRow } from '../../app/item-rows';
import {
  isLinesSection,
  isOtherSection,
  isPoolSection,
  type Line,
  type LinesSection,
  type OtherSection,
  type Section,
  type Worksheet,
} from '../../worksheet';
import { isOpen } from '../../app/finding-counts';

/** One row of the grid. */
export type Row =
  | {
      readonly kind: 'section';
      readonly key: string;
      readonly section: Exclude<Section, OtherSection>;
      readonly collapsed: boolean;
    }
  | { readonly kind: 'other-section'; readonly key: string; readonly section: OtherSection }
  | {
      readonly kind: 'line';
      readonly key: string;
      readonly line: Line;
      readonly sectionId: string;
      /** Counted through the whole worksheet from 1. */
      readonly number: number;
      readonly findings: readonly LineFinding[];
      /** Whether the findings stand open below. */
      readonly unfolded: boolean;
    }
  /** A stage or an output of a chain, a pool's total, a curve. */
  | {
      readonly kind: 'item';
      readonly key: string;
      readonly line: Line;
      readonly item: ItemRow;
      readonly sectionId: string;
      readonly findings: readonly LineFinding[];
      readonly unfolded: boolean;
    }
  | {
      readonly kind: 'finding';
      readonly key: string;
      readonly line: Line;
      readonly finding: LineFinding;
      /** False: on nothing that could keep an answer, such as a figure that a chain works out. */
      readonly answerable?: false;
    }
  | { readonly kind: 'add'; readonly key: string; readonly section: LinesSection }
  | { readonly kind: 'new-section'; readonly key: string };

export type RowKind = Row['kind'];

/** What the list of rows is made from. */
export interface RowsInput {
  readonly worksheet: Worksheet;
  readonly evaluation: Evaluation;
  /** All findings, in the order of the worksheet. */
  readonly findings: readonly LineFinding[];
  /** Sections whose lines are put away. */
  readonly collapsed: ReadonlySet<string>;
  /** Lines whose findings a person has folded (false) or opened (true). */
  readonly folding: ReadonlyMap<string, boolean>;
}

export const lineKey = (lineId: string): string => `line ${lineId}`;
export const sectionKey = (sectionId: string): string => `section ${sectionId}`;
export const addKey = (sectionId: string): string => `add ${sectionId}`;
/** Also the id of the element that holds the finding's words: without blanks. */
export const findingKey = (lineId: string, index: number): string =>
  `finding-${lineId.replace(/\s/g, '_')}-${String(index)}`;
export const NEW_SECTION_KEY = 'new-section';

/** Whether a line's findings stand open unless somebody says otherwise: errors and warnings do, notes and accepted ones not. */
export function isUnfoldedAtFirst(findings: readonly LineFinding[]): boolean {
  return findings.some((finding) => isOpen(finding) && finding.severity !== 'note');
}

/** All rows. */
export function rowsOf({ worksheet, evaluation, findings, collapsed, folding }: RowsInput): Row[] {
  const byLine = new Map<string, LineFinding[]>();
  for (const finding of findings) {
    // A line that waits says so in place of its figure.
    if (finding.code === 'waiting') continue;
    const known = byLine.get(finding.lineId);
    if (known === undefined) byLine.set(finding.lineId, [finding]);
    else known.push(finding);
  }
  const rows: Row[] = [];
  const pushFindings = (line: Line, own: readonly LineFinding[], unfolded: boolean): void => {
    if (!unfolded) return;
    own.forEach((finding, i) => {
      const answers = canAnswer(evaluation.worksheet, evaluation, finding.lineId)
        ? {}
        : ({ answerable: false } as const);
      rows.push({ kind: 'finding', key: findingKey(line.id, i), line, finding, ...answers });
    });
  };
  const isUnfolded = (lineId: string, own: readonly LineFinding[]): boolean =>
    own.length > 0 && (folding.get(lineId) ?? isUnfoldedAtFirst(own));
  const pushItems = (section: Section): void => {
    const items = itemRows(evaluation, section);
    const ofRow = new Map<ItemRow, LineFinding[]>();
    for (const [lineId, own] of byLine) {
      if (evaluation.originOf(lineId)?.sectionId !== section.id) continue;
      const row = rowOfItem(items, evaluation, lineId);
      if (row !== undefined) ofRow.set(row, [...(ofRow.get(row) ?? []), ...own]);
    }
    for (const item of items) {
      const { line } = item;
      const own = ofRow.get(item) ?? NONE;
      const unfolded = isUnfolded(line.id, own);
      rows.push({ kind: 'item', key: lineKey(line.id), line, item, sectionId: section.id, findings: own, unfolded });
      pushFindings(line, own, unfolded);
    }
  };
  let number = 0;
  for (const section of worksheet.sections) {
    if (isOtherSection(section)) {
      rows.push({ kind: 'other-section', key: sectionKey(section.id), section });
      continue;
    }
    const isCollapsed = collapsed.has(section.id);
    rows.push({ kind: 'section', key: sectionKey(section.id), section, collapsed: isCollapsed });
    if (isCollapsed) {
      if (isLinesSection(section)) number += section.lines.length;
      continue;
    }
    if (!isLinesSection(section)) {
      pushItems(section);
      continue;
    }
    for (const line of section.lines) {
      number += 1;
      const own = byLine.get(line.id) ?? NONE;
      const unfolded = isUnfolded(line.id, own);
      rows.push({ kind: 'line', key: lineKey(line.id), line, sectionId: section.id, number, findings: own, unfolded });
      pushFindings(line, own, unfolded);
    }
    rows.push({ kind: 'add', key: addKey(section.id), section });
    if (isPoolSection(section)) pushItems(section);
  }
  rows.push({ kind: 'new-section', key: NEW_SECTION_KEY });
  return rows;
}

const NONE: readonly LineFinding[] = [];

/** The height that a row is taken to have until it is measured, in CSS px. */
export function expectedHeight(row: Row, showLinear: boolean): number {
  switch (row.kind) {
    case 'section':
    case 'other-section':
      return 48;
    case 'line':
    case 'item':
      return showLinear ? 46 : 32;
    case 'finding':
      return 50;
    case 'add':
      return 32;
    case 'new-section':
      return 44;
  }
}

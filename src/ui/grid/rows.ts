/**
 * The rows of the account, from top to bottom: section headings, lines, the findings under their line, the places for new
 * lines.
 * Holds: a row's key names the same thing from one list to the next, so that what was measured and where the cursor stood last.
 */
import type { LineFinding } from '../../engine';
import { isLinesSection, type Line, type LinesSection, type Section, type Worksheet } from '../../worksheet';
import { isOpen } from '../../app/finding-counts';

/** One row of the grid. */
export type Row =
  | { readonly kind: 'section'; readonly key: string; readonly section: LinesSection; readonly collapsed: boolean }
  | { readonly kind: 'other-section'; readonly key: string; readonly section: Exclude<Section, LinesSection> }
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
  | { readonly kind: 'finding'; readonly key: string; readonly line: Line; readonly finding: LineFinding }
  | { readonly kind: 'add'; readonly key: string; readonly section: LinesSection }
  | { readonly kind: 'new-section'; readonly key: string };

export type RowKind = Row['kind'];

/** What the list of rows is made from. */
export interface RowsInput {
  readonly worksheet: Worksheet;
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
export function rowsOf({ worksheet, findings, collapsed, folding }: RowsInput): Row[] {
  const byLine = new Map<string, LineFinding[]>();
  for (const finding of findings) {
    // A line that waits says so in place of its figure.
    if (finding.code === 'waiting') continue;
    const known = byLine.get(finding.lineId);
    if (known === undefined) byLine.set(finding.lineId, [finding]);
    else known.push(finding);
  }
  const rows: Row[] = [];
  let number = 0;
  for (const section of worksheet.sections) {
    if (!isLinesSection(section)) {
      rows.push({ kind: 'other-section', key: sectionKey(section.id), section });
      continue;
    }
    const isCollapsed = collapsed.has(section.id);
    rows.push({ kind: 'section', key: sectionKey(section.id), section, collapsed: isCollapsed });
    if (isCollapsed) {
      number += section.lines.length;
      continue;
    }
    for (const line of section.lines) {
      number += 1;
      const own = byLine.get(line.id) ?? NONE;
      const unfolded = own.length > 0 && (folding.get(line.id) ?? isUnfoldedAtFirst(own));
      rows.push({ kind: 'line', key: lineKey(line.id), line, sectionId: section.id, number, findings: own, unfolded });
      if (!unfolded) continue;
      own.forEach((finding, i) => {
        rows.push({ kind: 'finding', key: findingKey(line.id, i), line, finding });
      });
    }
    rows.push({ kind: 'add', key: addKey(section.id), section });
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
      return showLinear ? 46 : 32;
    case 'finding':
      return 50;
    case 'add':
      return 32;
    case 'new-section':
      return 44;
  }
}

/**
 * The findings of a sheet in the order in which somebody works through them.
 * Holds: every finding is in exactly one group; an accepted one is with the accepted, whatever its severity; a line that only
 * waits for another is apart, since it is put right with that other one.
 */
import type { LineFinding } from '../../engine';
import { findLine, type Line, type Worksheet } from '../../worksheet';

/** The groups, in the order in which they are shown. */
export const FINDING_GROUPS = ['error', 'warning', 'note', 'accepted', 'waiting'] as const;

export type FindingGroup = (typeof FINDING_GROUPS)[number];

/** A finding with what the list shows of its line. */
export interface FindingItem {
  /** Stays the same as long as the line has this finding. */
  readonly key: string;
  readonly finding: LineFinding;
  readonly symbol: string;
  readonly label: string;
  /** The cases that have it; none named when all have it. */
  readonly caseNames: readonly string[];
}

function groupOf(finding: LineFinding): FindingGroup {
  if (finding.accepted !== undefined) return 'accepted';
  return finding.code === 'waiting' ? 'waiting' : finding.severity;
}

/** The findings by group, each group in the order given. `lineOf` knows also what is no line of the worksheet. */
export function groupFindings(
  worksheet: Worksheet,
  findings: readonly LineFinding[],
  lineOf: (lineId: string) => Line | undefined = (lineId) => findLine(worksheet, lineId)?.line,
): Readonly<Record<FindingGroup, readonly FindingItem[]>> {
  const groups: Record<FindingGroup, FindingItem[]> = { error: [], warning: [], note: [], accepted: [], waiting: [] };
  const seen = new Map<string, number>();
  for (const finding of findings) {
    const line = lineOf(finding.lineId);
    const base = `${finding.lineId} ${finding.code}`;
    const before = seen.get(base) ?? 0;
    seen.set(base, before + 1);
    const isEverywhere = finding.caseIds.length >= worksheet.cases.length;
    groups[groupOf(finding)].push({
      key: `${base} ${String(before)}`,
      finding,
      symbol: line?.symbol ?? '',
      label: line?.label ?? '',
      caseNames: isEverywhere
        ? []
        : worksheet.cases.filter((one) => finding.caseIds.includes(one.id)).map((one) => one.name),
    });
  }
  return groups;
}

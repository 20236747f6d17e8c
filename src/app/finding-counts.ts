/** Counting findings, and saying what an edit changed. */
import type { LineFinding } from '../engine';

/** How many open findings there are: accepted ones and lines that only wait for others are not counted. */
export interface FindingCounts {
  readonly errors: number;
  readonly warnings: number;
  readonly notes: number;
}

/** True for a finding that a person has still to look at: not accepted, and not merely waiting for another line. */
export function isOpen(finding: LineFinding): boolean {
  return finding.accepted === undefined && finding.code !== 'waiting';
}

/** The open findings, counted by severity. */
export function countFindings(findings: readonly LineFinding[]): FindingCounts {
  const count = { error: 0, warning: 0, note: 0 };
  for (const finding of findings) if (isOpen(finding)) count[finding.severity] += 1;
  return { errors: count.error, warnings: count.warning, notes: count.note };
}

/** `1 line`, `5 lines`. */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${String(count)} ${count === 1 ? one : many}`;
}

/** What to say after an edit: `5 lines recalculated, 1 new warning.` Empty when nothing of it changed. */
export function passSentence(changedLines: number, before: FindingCounts, after: FindingCounts): string {
  const parts: string[] = [];
  if (changedLines > 0) parts.push(`${counted(changedLines, 'line')} recalculated`);
  const differences = [
    [after.errors - before.errors, 'error'],
    [after.warnings - before.warnings, 'warning'],
    [after.notes - before.notes, 'note'],
  ] as const;
  for (const [more, word] of differences) {
    if (more > 0) parts.push(`${String(more)} new ${more === 1 ? word : `${word}s`}`);
    if (more < 0) parts.push(`${counted(-more, word)} less`);
  }
  return parts.length === 0 ? '' : `${parts.join(', ')}.`;
}

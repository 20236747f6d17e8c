/** What the cells of a line show beside its texts: verdicts on requirements, assumed kinds, marks of findings. */
import type { LineFinding, Reading, RequirementReading } from '../../engine';
import { isOpen } from '../../app/finding-counts';
import { findUnit, writeFigure, type QuantityKind } from '../../quantity';
import type { Case, Line } from '../../worksheet';
import type { EntryMark } from './entry-segments';

/** How a line stands to its requirement over all cases, in words. */
export interface Verdict {
  readonly met: boolean;
  readonly text: string;
}

/** The verdict for the worst case, which is named when cases differ. Undefined while no case has a figure. */
export function verdictOf(readings: readonly Reading[], cases: readonly Case[]): Verdict | undefined {
  const judged = readings.flatMap(({ requirement }, at) => (requirement === undefined ? [] : [{ requirement, at }]));
  const [first, ...others] = judged;
  if (first === undefined) return undefined;
  const worst = others.reduce((a, b) => (b.requirement.margin < a.requirement.margin ? b : a), first);
  const differ = others.some(({ requirement }) => requirement.margin !== first.requirement.margin);
  const { requirement: reading, at } = worst;
  const name = differ ? `, ${cases[at]?.name ?? ''}` : '';
  const margin = marginText(reading);
  return { met: reading.met, text: `${reading.met ? 'met by' : 'missed by'} ${margin}${name}` };
}

/** The size of a margin with its unit. */
export function marginText({ margin, unit }: RequirementReading): string {
  const known = findUnit(unit);
  if (known === undefined) return `${String(Number(Math.abs(margin).toPrecision(4)))} ${unit}`.trim();
  const written = writeFigure(Math.abs(margin), known);
  return `${written.text} ${written.unit}`.trim();
}

const WITH_ARTICLE: Readonly<Record<QuantityKind, string>> = {
  level: 'a level',
  gain: 'a gain',
  loss: 'a loss',
  'noise figure': 'a noise figure',
  'signal ratio': 'a signal ratio',
  'impairment ratio': 'an impairment ratio',
  'figure of merit': 'a figure of merit',
  temperature: 'a temperature',
  bandwidth: 'a bandwidth',
  plain: 'plain',
};

/**
 * `assumed: a loss`, for a kind that was read from the line's name alone; undefined where the unit or the label says as much
 * in so many words.
 */
export function assumption(reading: Reading, label: string): string | undefined {
  const { kind, figure } = reading;
  if (kind?.origin !== 'name') return undefined;
  const isPlain = figure.state === 'value' && figure.unit.defaultKind === kind.kind;
  return isPlain || label.toLowerCase().includes(kind.kind) ? undefined : `assumed: ${WITH_ARTICLE[kind.kind]}`;
}

/** The worst severity among the open findings, or null. */
export function worstSeverity(findings: readonly LineFinding[]): 'error' | 'warning' | 'note' | null {
  let worst: 'error' | 'warning' | 'note' | null = null;
  for (const finding of findings) {
    if (!isOpen(finding)) continue;
    if (finding.severity === 'error') return 'error';
    if (worst === null || finding.severity === 'warning') worst = finding.severity;
  }
  return worst;
}

/** What the finding mark in the margin says. */
export function markLabel(findings: readonly LineFinding[], unfolded: boolean): string {
  const open = findings.filter(isOpen).length;
  const accepted = findings.length - open;
  const worst = worstSeverity(findings);
  const words = [
    ...(open > 0 ? [open === 1 ? `1 ${worst ?? 'finding'}` : `${String(open)} findings`] : []),
    ...(accepted > 0 ? [`${String(accepted)} accepted`] : []),
  ];
  return `${words.join(', ')}: ${unfolded ? 'fold' : 'show'}`;
}

/** The place in the line's own entry that its first error or warning is about. */
export function entryMark(line: Line, findings: readonly LineFinding[]): EntryMark | undefined {
  for (const finding of findings) {
    if (!isOpen(finding) || finding.severity === 'note' || finding.place === undefined) continue;
    const isOverridden = finding.caseIds.every((id) => line.byCase !== undefined && Object.hasOwn(line.byCase, id));
    if (!isOverridden) return { place: finding.place, severity: finding.severity };
  }
  return undefined;
}

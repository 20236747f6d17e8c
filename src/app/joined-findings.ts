/**
 * Findings joined over cases: one entry that is wrong in the same way in several cases is one thing to put right, though each
 * case has figures of its own.
 * Holds: every finding is in one of the joined ones, with its cases; the figures shown are those of the first case, which is named.
 */
import type { LineFinding } from '../engine';
import { entryIn, findLine, type Worksheet } from '../worksheet';

/** The findings, in the order given, with those joined that are of one code at one place of one entry. */
export function joinFindings(worksheet: Worksheet, findings: readonly LineFinding[]): readonly LineFinding[] {
  const joined = new Map<string, { first: LineFinding; caseIds: string[]; differ: boolean }>();
  for (const finding of findings) {
    const line = findLine(worksheet, finding.lineId)?.line;
    const entry = line === undefined ? '' : entryIn(line, finding.caseIds[0]);
    const key = JSON.stringify([finding.lineId, finding.code, finding.place, entry, finding.accepted]);
    const known = joined.get(key);
    if (known === undefined) joined.set(key, { first: finding, caseIds: [...finding.caseIds], differ: false });
    else {
      known.caseIds.push(...finding.caseIds);
      known.differ ||= finding.message !== known.first.message;
    }
  }
  if (joined.size === findings.length) return findings;
  const order = new Map(worksheet.cases.map(({ id }, at) => [id, at]));
  return [...joined.values()].map(({ first, caseIds, differ }) => {
    if (caseIds.length === first.caseIds.length) return first;
    const sorted = [...new Set(caseIds)].sort((a, b) => (order.get(a) ?? 0) - (order.get(b) ?? 0));
    if (!differ) return { ...first, caseIds: sorted };
    const names = first.caseIds.map((id) => worksheet.cases.find((one) => one.id === id)?.name ?? id);
    return { ...first, caseIds: sorted, message: `${first.message} (The figures are those of ${names.join(', ')}.)` };
  });
}

/** Findings of a line over all cases: the same finding in several cases is told once, with the cases that have it. */
import type { Finding } from '../findings';
import type { Line } from '../worksheet';
import { entryOf } from './graph';
import type { Node } from './node';
import type { LineFinding } from './reading';

/** The findings of a line. Cases that share a node share its findings; others are joined when their words are the same. */
export function gatherFindings(
  line: Line,
  caseIds: readonly string[],
  findingsIn: (caseId: string) => readonly Finding[],
  nodeOf: (caseId: string) => Node | undefined,
): readonly LineFinding[] {
  const byNode = new Map<Node | undefined, readonly Finding[]>();
  const gathered = new Map<string, { finding: Finding; caseIds: string[]; accepted: string | undefined }>();
  for (const caseId of caseIds) {
    const node = nodeOf(caseId);
    const findings = byNode.get(node) ?? findingsIn(caseId);
    byNode.set(node, findings);
    const entry = entryOf(line, caseId);
    for (const finding of findings) {
      const accepted = acceptedReason(line, finding, entry);
      const key = JSON.stringify([finding.code, finding.message, finding.place, accepted]);
      const known = gathered.get(key);
      if (known === undefined) gathered.set(key, { finding, caseIds: [caseId], accepted });
      else known.caseIds.push(caseId);
    }
  }
  return [...gathered.values()].map(({ finding, caseIds: cases, accepted }) => ({
    ...finding,
    lineId: line.id,
    caseIds: cases,
    ...(accepted === undefined ? {} : { accepted }),
  }));
}

/** The reason with which a person has accepted a finding, while the entry is what it was; errors are not accepted. */
function acceptedReason(line: Line, finding: Finding, entry: string): string | undefined {
  if (finding.severity === 'error') return undefined;
  return line.accepted?.find(({ code, entry: then }) => code === finding.code && then === entry)?.reason;
}

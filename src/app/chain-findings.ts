/**
 * The findings of a chain: those on its inputs, on what its stages say, and on what comes of it; and what repairs them.
 * Holds: a repaired entry replaces the one that counted; units and kinds are given in a chain and are not repaired.
 */
import type { Evaluation, LineFinding } from '../engine';
import type { Repair } from '../findings';
import { CHAIN_INPUTS, overrideIn, setChainInput, setStageValue, type Edit } from '../worksheet';
import { inputId } from './chain-view';

/** The findings among those of the sheet that are about a chain. Those that only wait stand with the cells that wait. */
export function findingsOfChain(
  evaluation: Evaluation,
  findings: readonly LineFinding[],
  sectionId: string,
): readonly LineFinding[] {
  return findings.filter(
    ({ lineId, code }) => code !== 'waiting' && evaluation.originOf(lineId)?.sectionId === sectionId,
  );
}

/** A finding without the repairs that cannot be made in a chain. */
export function withChainRepairs(finding: LineFinding): LineFinding {
  const repairs = finding.repairs.filter(({ kind }) => kind === 'entry');
  return repairs.length === finding.repairs.length ? finding : { ...finding, repairs };
}

/** The edit that a repair makes in a chain; undefined when it cannot be made there. */
export function repairInChain(evaluation: Evaluation, finding: LineFinding, repair: Repair): Edit | undefined {
  const origin = evaluation.originOf(finding.lineId);
  if (origin === undefined || repair.kind !== 'entry') return undefined;
  const { sectionId, stageId, field } = origin;
  const { worksheet } = evaluation;
  if (stageId !== undefined && field !== undefined) {
    const [caseId] = finding.caseIds;
    const line = evaluation.line(finding.lineId);
    const isOverridden = line !== undefined && caseId !== undefined && overrideIn(line, caseId) !== undefined;
    const inCase = isOverridden ? caseId : undefined;
    return { ...setStageValue(worksheet, sectionId, stageId, field, repair.entry, inCase), label: repair.title };
  }
  const input = CHAIN_INPUTS.find((one) => inputId(sectionId, one) === finding.lineId);
  if (input === undefined) return undefined;
  return { ...setChainInput(worksheet, sectionId, input, repair.entry), label: repair.title };
}

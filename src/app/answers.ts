/** The edit that answers a finding, or takes the answer back, wherever the finding is: on a line or on a value of a stage. */
import type { Evaluation } from '../engine';
import {
  acceptFinding,
  answerStageFinding,
  entryIn,
  findLine,
  unacceptFinding,
  type Edit,
  type Worksheet,
} from '../worksheet';

export interface Answer {
  readonly code: string;
  readonly caseId: string | undefined;
  /** Absent: the answer is taken back. */
  readonly reason?: string;
}

/** The edit; one without changes where the finding is on nothing that could keep an answer. */
export function answerEdit(worksheet: Worksheet, evaluation: Evaluation, lineId: string, answer: Answer): Edit {
  const { code, caseId, reason } = answer;
  const found = findLine(worksheet, lineId);
  if (found !== undefined) {
    const entry = entryIn(found.line, caseId);
    return reason === undefined
      ? unacceptFinding(worksheet, lineId, { code, entry })
      : acceptFinding(worksheet, lineId, { code, entry, reason });
  }
  const { sectionId, stageId, field } = evaluation.originOf(lineId) ?? {};
  const line = evaluation.line(lineId);
  if (sectionId === undefined || stageId === undefined || field === undefined || line === undefined)
    return { label: 'Nothing', changes: [] };
  const entry = entryIn(line, caseId);
  return answerStageFinding(
    worksheet,
    sectionId,
    stageId,
    field,
    reason === undefined ? { code, entry } : { code, entry, reason },
  );
}

/** True when an answer to the finding can be kept. */
export function canAnswer(worksheet: Worksheet, evaluation: Evaluation, lineId: string): boolean {
  return findLine(worksheet, lineId) !== undefined || evaluation.originOf(lineId)?.field !== undefined;
}

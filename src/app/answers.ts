/** The edit that answers a finding, or takes the answer back, wherever the finding is: on a line or on a value of a stage. */
import type { Evaluation } from '../engine';
import {
  acceptFinding,
  answerChainFinding,
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
  if (sectionId === undefined || line === undefined || !canAnswer(worksheet, evaluation, lineId))
    return { label: 'Nothing', changes: [] };
  const entry = entryIn(line, caseId);
  const kept = reason === undefined ? { code, entry } : { code, entry, reason };
  return stageId === undefined || field === undefined
    ? answerChainFinding(worksheet, sectionId, kept)
    : answerStageFinding(worksheet, sectionId, stageId, field, kept);
}

/** True when an answer to the finding can be kept: on a line, on a value of a stage, on what a chain's figures say. */
export function canAnswer(worksheet: Worksheet, evaluation: Evaluation, lineId: string): boolean {
  if (findLine(worksheet, lineId) !== undefined) return true;
  const node = evaluation.node(lineId, worksheet.cases[0]?.id ?? '');
  return node?.item.origin?.field !== undefined || node?.item.derived?.isCheck === true;
}

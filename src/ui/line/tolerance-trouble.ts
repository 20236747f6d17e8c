/** Why a tolerance that reads well cannot be used on the line that has it, as a sentence; loaded when there is one to judge. */
import { readTolerance } from '../../analysis';
import type { Evaluation } from '../../engine';

export function toleranceTrouble(evaluation: Evaluation, lineId: string, caseId: string): string | undefined {
  const node = evaluation.node(lineId, caseId);
  const figure = evaluation.figure(lineId, caseId);
  const tolerance = evaluation.line(lineId)?.tolerance;
  // Without a figure there is nothing that could be off; the entry says what is wrong.
  if (node === undefined || tolerance === undefined || figure.state !== 'value') return undefined;
  if (!Number.isFinite(figure.value)) return 'Not counted: no power has no tolerance.';
  const read = readTolerance(tolerance, node, figure.value, figure.unit);
  return read.ok ? undefined : `Not counted: ${read.fault}`;
}

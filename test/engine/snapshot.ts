/** All that an evaluation tells of a worksheet, as plain data to compare; units by their words. */
import type { Evaluation } from '../../src/engine';

export function snapshotOf(evaluation: Evaluation): unknown {
  const cases = evaluation.worksheet.cases.map(({ id }) => id);
  return {
    lines: evaluation.lines().map(({ id, symbol }) => ({
      id,
      readings: cases.map((caseId) => {
        const { figure, ...rest } = evaluation.reading(id, caseId);
        const alone = evaluation.figure(id, caseId);
        return {
          ...rest,
          figure: figure.state === 'value' ? { ...figure, unit: figure.unit.word } : figure,
          alone: alone.state === 'value' ? alone.value : alone.state,
        };
      }),
      findings: evaluation.findings(id),
      restsOn: [...evaluation.restsOn(id)].sort(),
      usedBy: [...evaluation.usedBy(id)].sort(),
      upstream: [...evaluation.upstream(id)].sort(),
      downstream: [...evaluation.downstream(id)].sort(),
      holder: evaluation.lineOf(symbol)?.id,
    })),
    sheet: evaluation.sheetFindings(),
  };
}

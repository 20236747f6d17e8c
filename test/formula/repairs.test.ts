/**
 * Repairs keep their word: each one offered for a wrong entry can be applied in one edit, and the finding that offered it is then
 * gone. The wrong entries are those of the wrong budgets.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { applyAll, applyRepair, type Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';

const folder = new URL('./wrong-budgets/', import.meta.url);

interface Offer {
  readonly title: string;
  readonly worksheet: Worksheet;
  readonly before: Evaluation;
  readonly lineId: string;
  readonly code: string;
  readonly at: number;
}

const offers: readonly Offer[] = readdirSync(folder)
  .sort()
  .flatMap((file) => {
    const worksheet = sheetOf(readFileSync(new URL(file, folder), 'utf8'));
    const evaluation = new Evaluation(worksheet);
    return evaluation.sheetFindings().flatMap(({ code, lineId, repairs }) =>
      repairs.map((repair, at) => {
        const line = evaluation.line(lineId);
        return {
          title: `${code} in ${line?.symbol ?? ''} = ${line?.entry ?? ''}: ${repair.title}`,
          worksheet,
          before: evaluation,
          lineId,
          code,
          at,
        };
      }),
    );
  });

describe('repairs', () => {
  it('are offered in plenty', () => {
    expect(offers.length).toBeGreaterThan(100);
  });

  it.each(offers)('$title', ({ worksheet, before, lineId, code, at }) => {
    const finding = before.findings(lineId).find((one) => one.code === code && one.repairs.length > at);
    const repair = finding?.repairs[at];
    if (finding === undefined || repair === undefined) throw new Error('the repair has gone');
    const { worksheet: repaired } = applyAll(worksheet, applyRepair(worksheet, lineId, repair).changes);
    const after = new Evaluation(repaired);
    const same = after.findings(lineId).filter((one) => one.code === code && one.message === finding.message);
    expect(same).toEqual([]);
    // A name put right may be that of a line that is itself in error.
    const worse = after
      .findings(lineId)
      .filter(
        ({ severity, code: found }) =>
          severity === 'error' && found !== 'waiting' && !before.findings(lineId).some((one) => one.code === found),
      );
    expect(worse.map(({ code: found, message }) => `${found}: ${message}`)).toEqual([]);
  });
});

import { describe, expect, it } from 'vitest';

import type { LineFinding } from '../../../src/engine';
import { FINDING_GROUPS, groupFindings } from '../../../src/ui/panels/finding-groups';
import { evaluate, SHEET } from './sheet';

const finding = (more: Partial<LineFinding>): LineFinding => ({
  ...{ code: 'loss-added', severity: 'note', title: 'A loss is added', message: 'It is.', repairs: [] },
  ...{ lineId: 'p', caseIds: ['calm', 'storm'] },
  ...more,
});

describe('the findings of a sheet by group', () => {
  it('puts each in one group: by severity, accepted apart, waiting apart', () => {
    const groups = groupFindings(SHEET, [
      finding({ code: 'levels-summed', severity: 'error' }),
      finding({ code: 'waiting', severity: 'error' }),
      finding({ code: 'ratios-summed', severity: 'warning' }),
      finding({ code: 'noise-figures-summed', severity: 'warning', accepted: 'It is meant so.' }),
      finding({}),
    ]);
    expect(FINDING_GROUPS.map((group) => groups[group].map((item) => item.finding.code))).toEqual([
      ['levels-summed'],
      ['ratios-summed'],
      ['loss-added'],
      ['noise-figures-summed'],
      ['waiting'],
    ]);
  });

  it('names the line, and the cases where not all have it', () => {
    const { note } = groupFindings(SHEET, [finding({}), finding({ caseIds: ['storm'] })]);
    expect(note.map(({ symbol, label, caseNames }) => [symbol, label, caseNames])).toEqual([
      ['P_tx', 'Transmit power', []],
      ['P_tx', 'Transmit power', ['Storm']],
    ]);
  });

  it('gives every finding a key of its own', () => {
    const { note } = groupFindings(SHEET, [finding({}), finding({ caseIds: ['storm'] }), finding({ lineId: 'l' })]);
    expect(new Set(note.map(({ key }) => key)).size).toBe(3);
  });

  it('holds what the engine finds', () => {
    const groups = groupFindings(SHEET, evaluate().sheetFindings());
    expect(groups.error.map(({ finding: { code }, symbol }) => [code, symbol])).toEqual([['levels-summed', 'N_bad']]);
    expect(groups.waiting.map(({ symbol }) => symbol)).toEqual(['SINR']);
    expect(groups.warning.map(({ finding: { code }, symbol }) => [code, symbol])).toEqual([['ratios-summed', 'SUM']]);
  });
});

/**
 * Every published, recomputed or remembered check that this version's functions reach, put through entries of a worksheet.
 * The test's name tells which it is: a computed figure is nobody's published one.
 */
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { sheetOf, valueOf } from '../engine/notation';
import { allowedError, figuresOf, HOW, RECORDS } from './records';
import { recipeOf } from './recipes';

describe('checks against the outside world', () => {
  it.each(RECORDS.map((record) => ({ record, title: `${record.id} (${HOW[record.how]}: ${record.source})` })))(
    '$title',
    ({ record }) => {
      const { lines, without = {} } = recipeOf(record.id);
      const evaluation = new Evaluation(sheetOf(lines(record.inputs, record)));
      const figures = figuresOf(record).filter(({ key }) => !(key in without));
      const offBy = (key: string, value: number): number => {
        const found = valueOf(evaluation, key);
        return typeof found === 'number' ? Math.abs(found - value) : NaN;
      };
      const missed = figures.filter((figure) => !(offBy(figure.key, figure.value) <= allowedError(record, figure)));
      expect(
        missed.map((figure) => ({
          ...figure,
          found: valueOf(evaluation, figure.key),
          allowed: allowedError(record, figure),
        })),
      ).toEqual([]);
      const alarms = evaluation.sheetFindings().filter(({ severity }) => severity !== 'note');
      expect(alarms.map(({ code, message }) => `${code}: ${message}`)).toEqual([]);
    },
  );
});

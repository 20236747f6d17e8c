/**
 * Every published, recomputed or remembered check that this version's functions reach, put through entries of a worksheet.
 * The test's name tells which it is: a computed figure is nobody's published one.
 */
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { sheetOf, valueOf } from '../engine/notation';
import { withTolerances } from '../analysis/support';
import { allowedError, figuresOf, HOW, RECORDS } from './records';
import { recipeOf } from './recipes';

describe('checks against the outside world', () => {
  it.each(RECORDS.map((record) => ({ record, title: `${record.id} (${HOW[record.how]}: ${record.source})` })))(
    '$title',
    ({ record }) => {
      const { lines, tolerances, figures: statistics, without = {} } = recipeOf(record.id);
      const sheet = sheetOf(lines(record.inputs, record));
      const evaluation = new Evaluation(withTolerances(sheet, tolerances?.(record.inputs) ?? {}));
      const told = statistics?.(evaluation) ?? {};
      const figureOf = (key: string): number | string => told[key] ?? valueOf(evaluation, key);
      const figures = figuresOf(record).filter(({ key }) => !(key in without));
      const offBy = (key: string, value: number): number => {
        const found = figureOf(key);
        return typeof found === 'number' ? Math.abs(found - value) : NaN;
      };
      const missed = figures.filter((figure) => !(offBy(figure.key, figure.value) <= allowedError(record, figure)));
      expect(
        missed.map((figure) => ({
          ...figure,
          found: figureOf(figure.key),
          allowed: allowedError(record, figure),
        })),
      ).toEqual([]);
      const alarms = evaluation.sheetFindings().filter(({ severity }) => severity !== 'note');
      expect(alarms.map(({ code, message }) => `${code}: ${message}`)).toEqual([]);
    },
  );
});

/** Statistics of tolerances as a design control table has them: mean and variance of each shape, and of sums of lines. */
import { extremesOf, inputsOf, sensitivityOf } from '../../src/analysis';
import type { Evaluation } from '../../src/engine';
import type { Tolerance, ToleranceShape } from '../../src/worksheet';
import { number, quantity, type Recipe } from './records';

/** Shapes by the words of the records. */
const SHAPES: Readonly<Record<string, ToleranceShape>> = {
  uniform: 'uniform',
  triangular: 'triangular',
  gaussian: 'normal',
  gaussian3s: 'normal',
};

interface Row {
  readonly value: number;
  readonly unit: string;
  readonly sign: number;
  readonly favourable?: number;
  readonly adverse?: number;
  readonly shape: string;
}

const rowsOf = (inputs: Readonly<Record<string, unknown>>): readonly Row[] => inputs['rows'] as readonly Row[];

/** Increments with their signs, of which the one goes up and the other down. */
const spread = (favourable: number, adverse: number, shape: string): Tolerance => ({
  below: `${Math.max(0, -Math.min(favourable, adverse))} dB`,
  above: `${Math.max(0, favourable, adverse)} dB`,
  ...(SHAPES[shape] === undefined ? {} : { shape: SHAPES[shape] }),
});

const idOf = (evaluation: Evaluation, symbol: string): string => evaluation.lineOf(symbol)?.id ?? '';

const WORDS = ['uniform', 'triangular', 'gaussian3s'];

const RSS = 'a root of squared limits about the design value: neither a statistic nor a bound, and not told here';

export const TOLERANCE_RECIPES: readonly Recipe[] = [
  {
    ids: /^tol-stat-/,
    lines: (i) => WORDS.map((word) => `${word} = ${number(i, 'design')} dB`).join('\n'),
    tolerances: (i) =>
      Object.fromEntries(WORDS.map((word) => [word, spread(number(i, 'favourable'), number(i, 'adverse'), word)])),
    figures: (evaluation) =>
      Object.fromEntries(
        WORDS.flatMap((word) => {
          const { rootSumSquare } = sensitivityOf(evaluation, idOf(evaluation, word), 'nominal');
          return [
            [`${word}_mean`, rootSumSquare.mean],
            [`${word}_var`, rootSumSquare.standardDeviation ** 2],
          ];
        }),
      ),
  },
  {
    ids: /^stat-voyager-(Pt|PtN0)$/,
    lines: (i) => {
      const rows = rowsOf(i).map(
        ({ value, unit }, at) => `b${at} = ${quantity(value, unit).replace(/^\((.*)\)$/, '$1')}`,
      );
      const sum = rowsOf(i)
        .map(({ sign }, at) => `${sign > 0 ? '+' : '-'} b${at}`)
        .join(' ')
        .replace(/^\+ /, '');
      return `${rows.join('\n')}\ndesign_sum = ${sum}`;
    },
    tolerances: (i) =>
      Object.fromEntries(
        rowsOf(i).flatMap(({ favourable, adverse, shape }, at) =>
          shape === 'deterministic' || favourable === undefined || adverse === undefined
            ? []
            : [[`b${at}`, spread(favourable, adverse, shape)]],
        ),
      ),
    figures: (evaluation) => {
      const id = idOf(evaluation, 'design_sum');
      const { rootSumSquare } = sensitivityOf(evaluation, id, 'nominal');
      const { mean, standardDeviation, lower } = rootSumSquare;
      const { evaluation: free, inputs } = inputsOf(evaluation, id, 'nominal');
      const { adverse, favourable } = extremesOf(free, id, 'nominal', inputs, 'higher');
      return {
        mean,
        variance: standardDeviation ** 2,
        sigma: standardDeviation,
        mean_minus_2sigma: mean - 2 * standardDeviation,
        mean_minus_3sigma: lower,
        worst_case_sum: adverse,
        best_case_sum: favourable,
      };
    },
    without: { worst_case_RSS: RSS, best_case_RSS: RSS },
  },
];

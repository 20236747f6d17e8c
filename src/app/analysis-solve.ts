/**
 * What solving is shown as: each figure of an entry at which a line has the figure wanted, with the text that would be typed for
 * it. Holds: a figure that is to meet a requirement is rounded to the side on which it does.
 */
import { figuresAt, solve, type Range } from '../analysis';
import type { Evaluation, RequirementReading } from '../engine';
import { figureWords, named, nameOf, typedFigure } from './analysis-names';
import type { VariedInput } from './analysis-varied';

/** What is wanted of the line: a figure in its unit, or that it just meets its requirement. */
export type Wanted =
  | { readonly kind: 'figure'; readonly figure: number }
  | { readonly kind: 'requirement'; readonly of: RequirementReading };

export interface Solution {
  /** As it would be typed. */
  readonly entry: string;
  /** As it is read. */
  readonly text: string;
  /** What the line then has. */
  readonly gives: string;
}

export interface SolveView {
  readonly solutions: readonly Solution[];
  /** What was looked for and what was found, as a sentence. */
  readonly words: string;
}

export function solveView(
  evaluation: Evaluation,
  lineId: string,
  input: VariedInput,
  caseId: string,
  wanted: Wanted,
  range: Range,
): SolveView {
  const unit = evaluation.node(lineId, caseId)?.result.unit;
  const figure = wanted.kind === 'figure' ? wanted.figure : wanted.of.limit;
  const found = solve(evaluation, input.lineId, lineId, caseId, figure, range);
  const figureWith = (x: number): number =>
    figuresAt(evaluation, input.lineId, caseId, [lineId], Float64Array.of(x))[0]?.[0] ?? NaN;
  const solutions = found.map((x): Solution => {
    const typed = wanted.kind === 'figure' ? Number(x.toPrecision(12)) : roundedToMeet(x, wanted.of, figureWith);
    return {
      entry: typedFigure(typed, input.unit),
      text: figureWords(x, input.unit),
      gives: figureWords(figureWith(typed), unit),
    };
  });
  const goal = `${nameOf(named(evaluation, lineId))} = ${figureWords(figure, unit)}`;
  const ends = `between ${figureWords(range.from, input.unit)} and ${figureWords(range.to, input.unit)}`;
  const name = nameOf(input);
  return {
    solutions,
    words:
      solutions.length === 0
        ? `No value of ${name} ${ends} gives ${goal}.`
        : solutions.length === 1
          ? `One value of ${name} ${ends} gives ${goal}:`
          : `${String(solutions.length)} values of ${name} ${ends} give ${goal}:`,
  };
}

/** The nearest figure of few digits with which the requirement is met; with more digits where few do not do. */
function roundedToMeet(x: number, { bound, limit }: RequirementReading, figureWith: (x: number) => number): number {
  const meets = (value: number): boolean =>
    bound === 'at least' ? figureWith(value) >= limit : figureWith(value) <= limit;
  for (const digits of [6, 9, 12]) {
    const nearest = Number(x.toPrecision(digits));
    const step = 10 ** (Math.floor(Math.log10(Math.abs(x) || 1)) + 1 - digits);
    const met = [nearest, nearest - step, nearest + step].map((value) => Number(value.toPrecision(digits))).find(meets);
    if (met !== undefined) return met;
  }
  return x;
}

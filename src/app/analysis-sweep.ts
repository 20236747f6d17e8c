/**
 * What a sweep is shown as: a curve a case, where each crosses the requirement, in words and as a table to save.
 * Holds: each point is what the engine gives with the figure typed there; places without a figure are gaps.
 */
import { figuresAt, placesIn, solve, type Range } from '../analysis';
import type { Evaluation } from '../engine';
import type { Unit } from '../quantity';
import type { Case } from '../worksheet';
import { figureWords, joinWords, named, nameOf, typedFigure, type Named } from './analysis-names';
import type { VariedInput } from './analysis-varied';
import { csvNumber, csvTable, csvText } from './csv';

export const STEPS_LIMIT = 1000;
export const USUAL_STEPS = 100;

export interface SweptCurve {
  readonly caseId: string;
  readonly name: string;
  readonly figures: Float64Array;
  /** The bound in this case, in the line's unit. */
  readonly limit?: number;
  /** Where the curve meets the bound, ascending. */
  readonly crossings: readonly number[];
}

export interface SweepView {
  readonly target: Named;
  readonly input: VariedInput;
  readonly unit: Unit | undefined;
  readonly range: Range;
  readonly places: Float64Array;
  readonly bound?: 'at least' | 'at most';
  readonly curves: readonly SweptCurve[];
  /** Sentences: where the bound is reached in each case, and what was left out. */
  readonly words: readonly string[];
}

/** Steps as typed; undefined for anything but a whole number within the limits. */
export function readSteps(text: string): number | undefined {
  const steps = /^\d{1,4}$/.test(text.trim()) ? Number(text.trim()) : NaN;
  return steps >= 1 && steps <= STEPS_LIMIT ? steps : undefined;
}

export function sweepView(
  evaluation: Evaluation,
  lineId: string,
  input: VariedInput,
  cases: readonly Case[],
  range: Range,
  steps: number,
): SweepView {
  const places = placesIn(range, steps);
  const target = named(evaluation, lineId);
  const unit = cases.map(({ id }) => evaluation.node(lineId, id)?.result.unit).find((one) => one !== undefined);
  const isFitting = ({ id }: Case): boolean =>
    evaluation.node(input.lineId, id)?.result.unit?.word === input.unit.word &&
    evaluation.node(lineId, id)?.result.unit?.word === unit?.word;
  const requirement = evaluation.line(lineId)?.requirement;
  const bound = requirement === undefined ? undefined : requirement.atLeast === undefined ? 'at most' : 'at least';
  const curves = cases.filter(isFitting).map((one): SweptCurve => {
    const [figures = new Float64Array()] = figuresAt(evaluation, input.lineId, one.id, [lineId], places);
    const limit = evaluation.reading(lineId, one.id).requirement?.limit;
    return {
      ...{ caseId: one.id, name: one.name, figures },
      ...(limit !== undefined && { limit }),
      crossings: limit === undefined ? [] : solve(evaluation, input.lineId, lineId, one.id, limit, range),
    };
  });
  const left = cases.filter((one) => !isFitting(one));
  const base = { target, input, unit, range, places, curves, ...(bound !== undefined && ({ bound } as const)) };
  return {
    ...base,
    words: [
      ...crossingWords(base),
      ...(left.length === 0
        ? []
        : [`Left out, because units differ or there is no figure: ${joinWords(left.map(({ name }) => name))}.`]),
    ],
  };
}

/** Where each curve reaches the bound. */
function crossingWords({ curves, unit, input, range, target }: Omit<SweepView, 'words'>): readonly string[] {
  const at = (x: number): string => figureWords(x, input.unit);
  return curves.flatMap(({ name, limit, crossings, figures }) => {
    const where = curves.length > 1 ? ` (${name})` : '';
    if (!figures.some(Number.isFinite)) return [`${nameOf(target)} has no figure anywhere in this range${where}.`];
    if (limit === undefined) return [];
    const said = figureWords(limit, unit);
    if (crossings.length === 0)
      return [`${said} is not crossed between ${at(range.from)} and ${at(range.to)}${where}.`];
    return [`${said} is reached at ${joinWords(crossings.map(at))}${where}.`];
  });
}

const headOf = (name: string, unit: Unit | undefined): string =>
  unit === undefined || unit.word === '1' ? name : `${name} (${unit.word})`;

/** The headings of the table: the varied figure, then a column a case. */
export function sweepHeads({ target, input, unit, curves }: SweepView): readonly string[] {
  const name = nameOf(target);
  return [
    headOf(nameOf(input), input.unit),
    ...curves.map((curve) => headOf(curves.length > 1 ? `${name}, ${curve.name}` : name, unit)),
  ];
}

/** The whole sweep as CSV, figures in full. */
export function sweepCsv(view: SweepView): string {
  return csvTable([
    sweepHeads(view).map(csvText),
    ...Array.from(view.places, (x, at) => [csvNumber(x), ...view.curves.map(({ figures }) => csvNumber(figures[at]))]),
  ]);
}

/** Rows of the table on the page; of a fine sweep, at most so many in equal steps, the ends among them. */
export function sweepRows(view: SweepView, most = 51): readonly (readonly string[])[] {
  const { places, curves, unit, input } = view;
  const last = places.length - 1;
  const count = Math.min(places.length, most);
  return Array.from({ length: count }, (_, i) => {
    const at = count === 1 ? 0 : Math.round((i * last) / (count - 1));
    return [
      typedFigure(places[at] ?? NaN, input.unit, 5).replace(/-/g, '−'),
      ...curves.map(({ figures }) => figureWords(figures[at] ?? NaN, unit)),
    ];
  });
}

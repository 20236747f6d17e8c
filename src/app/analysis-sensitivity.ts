/**
 * What the sensitivity of a line is shown as: its totals with their margins, each input with its swing, and the cases side by
 * side. Holds: figures come from `analysis` and `engine`; here they get their names, their words and their order.
 */
import {
  extremesOf,
  inputsOf,
  sensitivityOf,
  type Direction,
  type Extremes,
  type InputSensitivity,
  type Inputs,
  type Sensitivity,
} from '../analysis';
import type { Evaluation, RequirementReading } from '../engine';
import type { Unit } from '../quantity';
import type { Case } from '../worksheet';
import { figureWords, joinWords, named, nameOf, numberWords, sizeWords, stepWords, type Named } from './analysis-names';
import { writeTolerance } from './tolerance-text';

/** A figure of the line with what it leaves to the requirement. */
export interface TotalView {
  readonly key: 'nominal' | 'adverse' | 'favourable' | 'mean' | 'bound';
  readonly name: string;
  readonly figure: string;
  /** Absent without a requirement. */
  readonly margin?: { readonly words: string; readonly met: boolean };
}

export interface InputView extends Named {
  /** As it is typed; empty without one. */
  readonly tolerance: string;
  readonly slope: string;
  /** Words where the slope came by differences, and none of it is exact. */
  readonly remark: string;
  /** Change of the line in its unit at the adverse and the favourable limit; absent without tolerance. */
  readonly adverse?: number;
  readonly favourable?: number;
  readonly adverseText: string;
  readonly favourableText: string;
  readonly share: number;
}

export interface CaseView {
  readonly caseId: string;
  readonly name: string;
  readonly nominal: string;
  readonly adverse: string;
  readonly bound: string;
  readonly margin: string;
  readonly isWorst: boolean;
}

export interface SensitivityView extends Named {
  /** Why there is nothing to show, as a sentence. */
  readonly none?: string;
  readonly direction: Direction;
  /** Sentences about what was assumed and what was left out. */
  readonly remarks: readonly string[];
  readonly totals: readonly TotalView[];
  readonly deviation: string;
  readonly inputs: readonly InputView[];
  /** Typed figures without tolerance, of which the slope alone is known. */
  readonly exact: readonly InputView[];
}

/** What is computed for one case; undefined where the line has no figure there. */
export interface Found {
  readonly inputs: Inputs;
  readonly sensitivity: Sensitivity;
  readonly extremes: Extremes;
  readonly nominal: number;
  readonly requirement: RequirementReading | undefined;
}

/** The line in one case, of which the rest has been found. */
export function sensitivityView(evaluation: Evaluation, lineId: string, found: Found | undefined): SensitivityView {
  const base = { ...named(evaluation, lineId), direction: 'higher' as Direction, remarks: [], totals: [], inputs: [] };
  if (found === undefined)
    return {
      ...base,
      ...{ deviation: '', exact: [] },
      none: `${nameOf(base)} has no figure in this case, so there is nothing that could be off.`,
    };
  const { sensitivity, inputs } = found;
  const views = sensitivity.inputs.map((input) => inputView(evaluation, input, sensitivity.unit));
  return {
    ...base,
    direction: sensitivity.direction,
    remarks: remarksOf(evaluation, found, base),
    totals: totalsOf(found),
    deviation: sizeWords(sensitivity.rootSumSquare.standardDeviation, sensitivity.unit),
    inputs: views.filter(({ adverse }) => adverse !== undefined),
    exact: views.filter(({ adverse, lineId: id }) => adverse === undefined && inputs.exact.includes(id)),
  };
}

/** Finds extremes and slopes in one case: some milliseconds, so that several cases are better found in turn. */
export function findSensitivity(evaluation: Evaluation, lineId: string, caseId: string): Found | undefined {
  const { figure, requirement } = evaluation.reading(lineId, caseId);
  if (figure.state !== 'value' || !Number.isFinite(figure.value)) return undefined;
  const inputs = inputsOf(evaluation, lineId, caseId);
  const sensitivity = sensitivityOf(evaluation, lineId, caseId);
  const extremes = extremesOf(inputs.evaluation, lineId, caseId, inputs.inputs, sensitivity.direction);
  return { inputs, sensitivity, extremes, nominal: figure.value, requirement };
}

/** What is left to the requirement at a figure; below zero, what is missing. */
const marginAt = (value: number, { bound, limit }: RequirementReading): number =>
  bound === 'at least' ? value - limit : limit - value;

/** Three deviations from the mean, to the side that is adverse. */
const boundOf = ({ sensitivity: { direction, rootSumSquare } }: Found): number =>
  direction === 'higher' ? rootSumSquare.lower : rootSumSquare.upper;

const boundName = (direction: Direction): string => (direction === 'higher' ? 'mean − 3σ' : 'mean + 3σ');

function totalsOf(found: Found): readonly TotalView[] {
  const { nominal, extremes, sensitivity, requirement } = found;
  const { unit, rootSumSquare, direction } = sensitivity;
  const total = (key: TotalView['key'], name: string, value: number): TotalView => ({
    ...{ key, name, figure: figureWords(value, unit) },
    ...(requirement !== undefined && { margin: marginWords(value, requirement, unit) }),
  });
  return [
    total('nominal', 'nominal', nominal),
    total('adverse', 'all adverse', extremes.adverse),
    total('favourable', 'all favourable', extremes.favourable),
    total('mean', 'mean', rootSumSquare.mean),
    total('bound', boundName(direction), boundOf(found)),
  ];
}

function marginWords(
  value: number,
  requirement: RequirementReading,
  unit: Unit | undefined,
): { readonly words: string; readonly met: boolean } {
  const margin = marginAt(value, requirement);
  if (!Number.isFinite(margin)) return { words: 'not known', met: false };
  const met = margin >= 0;
  return { words: `${sizeWords(margin, unit)} ${met ? 'to spare' : 'short'}`, met };
}

function inputView(evaluation: Evaluation, input: InputSensitivity, unit: Unit | undefined): InputView {
  const { lineId, adverse, favourable } = input;
  return {
    ...named(evaluation, lineId),
    tolerance: writeTolerance(evaluation.line(lineId)?.tolerance),
    slope: `${numberWords(input.slope)} ${slopeWords(input.slopeUnit)}`.trim(),
    remark: input.exact ? '' : 'slope by differences: a function on the way has no exact derivative',
    ...(adverse !== undefined && { adverse }),
    ...(favourable !== undefined && { favourable }),
    adverseText: adverse === undefined ? '' : stepWords(adverse, unit),
    favourableText: favourable === undefined ? '' : stepWords(favourable, unit),
    share: input.share,
  };
}

/** `dB per MHz`. */
const slopeWords = (word: string): string => (word === '1' ? '' : word.replace(/^([^/()]+)\/([^/()]+)$/, '$1 per $2'));

function remarksOf(evaluation: Evaluation, { sensitivity, inputs }: Found, target: Named): readonly string[] {
  const remarks = inputs.troubles.map(
    ({ lineId, why }) => `${nameOf(named(evaluation, lineId))} is taken as exact: ${why}`,
  );
  if (sensitivity.isDirectionAssumed)
    remarks.push(
      `Higher is taken for better in ${nameOf(target)}; a requirement, or its kind and side, would tell which way is good.`,
    );
  if (inputs.inputs.length === 0)
    remarks.push(
      `Nothing that ${nameOf(target)} rests on has a tolerance that counts. Type one beside an entry, for example ±0.5 dB.`,
    );
  return remarks;
}

/** The cases side by side. */
export function casesView(
  all: readonly { readonly one: Case; readonly found: Found | undefined }[],
): readonly CaseView[] {
  const worst = worstOf(all.map(({ found }) => found));
  return all.map(({ one, found }, at) => {
    const unit = found?.sensitivity.unit;
    const requirement = found?.requirement;
    return {
      ...{ caseId: one.id, name: one.name },
      nominal: found === undefined ? 'withheld' : figureWords(found.nominal, unit),
      adverse: found === undefined ? 'withheld' : figureWords(found.extremes.adverse, unit),
      bound: found === undefined ? 'withheld' : figureWords(boundOf(found), unit),
      margin:
        found === undefined || requirement === undefined
          ? ''
          : marginWords(found.extremes.adverse, requirement, unit).words,
      isWorst: at === worst,
    };
  });
}

/** The case with the worst adverse figure, by its margin where there is one; none where all are alike. */
function worstOf(all: readonly (Found | undefined)[]): number | undefined {
  const scores = all.map((found) => {
    if (found === undefined) return NaN;
    const { extremes, requirement, sensitivity } = found;
    if (requirement !== undefined) return marginAt(extremes.adverse, requirement);
    return sensitivity.direction === 'higher' ? extremes.adverse : -extremes.adverse;
  });
  const known = scores.filter((score) => !Number.isNaN(score));
  const least = Math.min(...known);
  return known.length < 2 || known.every((score) => score === least) ? undefined : scores.indexOf(least);
}

/** The whole in a sentence, for those who do not see the bars. */
export function sensitivityWords({ inputs }: SensitivityView): string {
  if (inputs.length === 0) return 'No input has a tolerance that counts.';
  const most = inputs
    .slice(0, 3)
    .map((input) => `${nameOf(input)} (${input.adverseText} adverse, ${input.favourableText} favourable)`);
  return `Largest swings: ${joinWords(most)}.`;
}

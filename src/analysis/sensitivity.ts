/**
 * Sensitivity: how a line follows each figure that it rests on: its slope, what the tolerance does to it, and its share of the
 * variance. And the statistics of a design control table, from the same slopes.
 */
import type { Evaluation } from '../engine';
import type { Unit } from '../quantity';
import { compileColumns } from './columns';
import { targetDirection, type Direction } from './directions';
import { slopesOf } from './differentiate';
import { variablesOf } from './extremes';
import { baseOf, inputsOf, variedOf, type Input, type Trouble } from './inputs';
import { meanDeviation, varianceOf } from './shapes';

/** A figure that the line rests on. */
export interface InputSensitivity {
  readonly lineId: string;
  /** Change of the line for a change of the figure by one, at the figures as they stand, both in their units. */
  readonly slope: number;
  readonly slopeUnit: string;
  /** False: the slope came by differences somewhere on the way. */
  readonly exact: boolean;
  /** Change of the line with the figure at the limit that worsens it, the others at their values; absent without tolerance. */
  readonly adverse?: number;
  readonly favourable?: number;
  /** Share of the line's variance, in which those of a group count together; they sum to 1. */
  readonly share: number;
}

/** Mean and spread by the slopes: means and variances add, those of a group as deviations. */
export interface RootSumSquare {
  readonly mean: number;
  readonly standardDeviation: number;
  /** Three standard deviations below and above the mean. */
  readonly lower: number;
  readonly upper: number;
}

export interface Sensitivity {
  readonly unit: Unit | undefined;
  /** Largest effect first; figures without tolerance last, in the order of the worksheet. */
  readonly inputs: readonly InputSensitivity[];
  readonly direction: Direction;
  readonly isDirectionAssumed: boolean;
  readonly rootSumSquare: RootSumSquare;
  readonly troubles: readonly Trouble[];
}

export function sensitivityOf(evaluation: Evaluation, lineId: string, caseId: string): Sensitivity {
  const { evaluation: free, inputs, exact, troubles } = inputsOf(evaluation, lineId, caseId);
  const { direction, isAssumed } = targetDirection(evaluation, lineId, caseId);
  const varied = [...inputs.map(variedOf), ...exact.map((id) => ({ lineId: id }))];
  const { slopes, isInexact } = slopesOf(free, lineId, caseId, varied);
  const unit = free.node(lineId, caseId)?.result.unit;
  const unitOf = (id: string): string => slopeUnit(unit, free.node(id, caseId)?.result.unit);
  const effects = effectsOf(free, lineId, caseId, inputs, direction);
  const parts = variancesOf(inputs, slopes);
  const variance = parts.reduce((sum, part) => sum + part, 0);
  const told = varied.map(({ lineId: id }, index): InputSensitivity => ({
    lineId: id,
    slope: slopes[index] as number,
    slopeUnit: unitOf(id),
    exact: isInexact[index] !== true,
    ...effects[index],
    share: variance > 0 ? (parts[index] ?? 0) / variance : 0,
  }));
  const effect = ({ adverse = 0, favourable = 0 }: InputSensitivity): number =>
    Math.max(Math.abs(adverse) || 0, Math.abs(favourable) || 0);
  return {
    unit,
    inputs: told.sort((a, b) => effect(b) - effect(a)),
    direction,
    isDirectionAssumed: isAssumed,
    rootSumSquare: rootSumSquareOf(free, lineId, caseId, inputs, slopes, variance),
    troubles,
  };
}

/** Each input's part of the variance. What deviates together adds as deviations: its part is its covariance with its group. */
function variancesOf(inputs: readonly Input[], slopes: Float64Array): number[] {
  const deviations = inputs.map(({ spread, group, direction }, index) => {
    const size = (slopes[index] as number) * Math.sqrt(varianceOf(spread));
    return group !== undefined && direction === 'lower' ? -size : size;
  });
  const parts = new Array<number>(inputs.length).fill(0);
  for (const members of variablesOf(inputs)) {
    const total = members.reduce((sum, index) => sum + (deviations[index] as number), 0);
    for (const index of members) parts[index] = (deviations[index] as number) * total;
  }
  return parts;
}

function rootSumSquareOf(
  evaluation: Evaluation,
  lineId: string,
  caseId: string,
  inputs: readonly Input[],
  slopes: Float64Array,
  variance: number,
): RootSumSquare {
  const figure = evaluation.figure(lineId, caseId);
  const value = figure.state === 'value' ? figure.value : NaN;
  const mean = inputs.reduce(
    (sum, { spread }, index) => sum + (slopes[index] as number) * meanDeviation(spread),
    value,
  );
  const standardDeviation = Math.sqrt(variance);
  return { mean, standardDeviation, lower: mean - 3 * standardDeviation, upper: mean + 3 * standardDeviation };
}

/** What each input does to the line by itself, at its two limits. */
function effectsOf(
  evaluation: Evaluation,
  lineId: string,
  caseId: string,
  inputs: readonly Input[],
  direction: Direction,
): { readonly adverse: number; readonly favourable: number }[] {
  const program = compileColumns(evaluation, [lineId], caseId, inputs.map(variedOf));
  const count = 2 * inputs.length + 1;
  const results = new Float64Array(count);
  program.run(
    0,
    count,
    (index, column, start, length) => {
      const input = inputs[index] as Input;
      const { below, above } = input.spread;
      for (let i = 0; i < length; i++) {
        const trial = start + i;
        column[i] = baseOf(input) + (trial === 2 * index + 1 ? -below : trial === 2 * index + 2 ? above : 0);
      }
    },
    [results],
  );
  const value = results[0] as number;
  return inputs.map((_, index) => {
    const low = (results[2 * index + 1] as number) - value;
    const high = (results[2 * index + 2] as number) - value;
    const isHighBetter = direction === 'higher' ? high >= low : high <= low;
    return isHighBetter ? { adverse: low, favourable: high } : { adverse: high, favourable: low };
  });
}

/** `dB/MHz`; of a plain number the other unit alone. */
export function slopeUnit(of: Unit | undefined, by: Unit | undefined): string {
  const above = shortWord(of);
  const below = shortWord(by);
  return below === '1'
    ? above
    : `${above.includes('/') ? `(${above})` : above}/${below.includes('/') ? `(${below})` : below}`;
}

/** A step of a level is one in dB. */
const shortWord = (unit: Unit | undefined): string =>
  unit === undefined ? '1' : unit.form === 'decibel' ? 'dB' : unit.word;

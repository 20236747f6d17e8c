/**
 * Trials: every input deviates by chance within its tolerance, many times, and the line that is asked for is computed each time.
 * Holds: the figure of a trial depends on seed, trial and the ids of the inputs alone; parts of a run may be computed anywhere,
 * in any order and in blocks of any size. A job is plain data, so that a worker can do one; what comes back is a column.
 */
import { Evaluation, type RequirementReading } from '../engine';
import type { Worksheet } from '../worksheet';
import { compileColumns, type Program } from './columns';
import { baseOf, inputsOf, variedOf, type Input } from './inputs';
import { streamKey } from './random';
import { fillSample, type Sampler } from './sampling';
import { momentsOf, PERCENTS, percentilesOf, shareOf } from './statistics';

/** A part of a run: trials `from` to `to`, the latter left out. */
export interface TrialsJob {
  readonly worksheet: Worksheet;
  readonly lineId: string;
  readonly caseId: string;
  readonly seed: number;
  readonly from: number;
  readonly to: number;
}

/** Hears how many trials are done; stops the run by returning true. */
export type OnBlock = (done: number) => boolean | undefined;

/** Does a job from scratch, as a worker has to. The figures are NaN where withheld. */
export function runJob({ worksheet, lineId, caseId, seed, from, to }: TrialsJob, onBlock?: OnBlock): Float64Array {
  const { evaluation, inputs } = inputsOf(new Evaluation(worksheet), lineId, caseId);
  return runTrials(compileTrials(evaluation, lineId, caseId, inputs), inputs, seed, from, to, onBlock);
}

/** The program of a line over its inputs. `evaluation` and `inputs` are those that `inputsOf` gave. */
export function compileTrials(
  evaluation: Evaluation,
  lineId: string,
  caseId: string,
  inputs: readonly Input[],
  blockSize?: number,
): Program {
  return compileColumns(evaluation, [lineId], caseId, inputs.map(variedOf), blockSize);
}

/** Runs trials of a program that was compiled for these inputs. */
export function runTrials(
  program: Program,
  inputs: readonly Input[],
  seed: number,
  from: number,
  to: number,
  onBlock?: OnBlock,
): Float64Array {
  const samplers = inputs.map((input) => samplerOf(input, seed));
  const results = new Float64Array(to - from);
  program.run(
    from,
    to,
    (index, column, start, count) => {
      const sampler = samplers[index];
      if (sampler !== undefined) fillSample(sampler, column, start, count);
    },
    [results],
    onBlock,
  );
  return results;
}

/** How an input is sampled: its stream is that of its line, or of its group. */
export function samplerOf(input: Input, seed: number): Sampler {
  const { lineId, group, spread, direction } = input;
  return {
    spread,
    key: streamKey(seed, group === undefined ? `line ${lineId}` : `group ${group}`),
    isReversed: group !== undefined && direction === 'lower',
    base: baseOf(input),
  };
}

/** What the figures of a run tell. Figures that there are none of are NaN. */
export interface TrialStatistics {
  readonly count: number;
  /** Trials in which the line has no figure. */
  readonly withheld: number;
  readonly mean: number;
  readonly standardDeviation: number;
  readonly median: number;
  /** By per cent, as in `PERCENTS`. */
  readonly percentiles: readonly number[];
  /** The share of trials that meet the requirement, a withheld one not; absent without a requirement. */
  readonly met?: { readonly share: number; readonly low: number; readonly high: number };
}

/** Statistics of all figures of a run, in the order of its trials. */
export function statisticsOf(figures: Float64Array, requirement: RequirementReading | undefined): TrialStatistics {
  const given = figures.filter((figure) => !Number.isNaN(figure));
  const moments = momentsOf(given);
  const met = requirement === undefined ? 0 : countMet(given, requirement);
  const percentiles = percentilesOf(given, PERCENTS);
  return {
    count: figures.length,
    withheld: figures.length - given.length,
    ...moments,
    median: percentiles[PERCENTS.indexOf(50)] ?? NaN,
    percentiles,
    ...(requirement === undefined ? {} : { met: shareOf(met, figures.length) }),
  };
}

function countMet(figures: Float64Array, { bound, limit }: RequirementReading): number {
  let met = 0;
  for (const figure of figures) if (bound === 'at least' ? figure >= limit : figure <= limit) met++;
  return met;
}

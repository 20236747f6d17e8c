/**
 * A run of trials at the worker's side: compiled once, then computed by chunks.
 * Holds: what a chunk gives depends on the run and on its first and last trial alone; sums are made by pieces.
 */
import {
  baseOf,
  compileTrials,
  extremesOf,
  fillSample,
  inputsOf,
  meanDeviation,
  samplerOf,
  sensitivityOf,
  targetDirection,
  varianceOf,
  type Fill,
  type Inputs,
  type Program,
} from '../analysis';
import { Evaluation, type RequirementReading } from '../engine';
import { BINS, countInto, gridOver, type Grid } from './bins';
import type { Account } from './outcome';
import { PIECE, type TrialsRun } from './trials-run';

/** Sums of one piece, of figures with power. */
export interface Piece {
  readonly count: number;
  readonly mean: number;
  /** Of the distances from the mean. */
  readonly squares: number;
  /** Sums of each input's deviation over the trials that fail. */
  readonly failing: readonly number[];
}

/** What the trials from `from` to `to` (left out) gave. */
export interface Part {
  readonly from: number;
  readonly to: number;
  readonly grid: Grid;
  readonly withheld: number;
  readonly unpowered: number;
  /** Trials that meet the requirement; undefined without one. */
  readonly met: number | undefined;
  readonly least: number;
  readonly greatest: number;
  readonly below: number;
  readonly above: number;
  readonly bins: Uint32Array<ArrayBuffer>;
  readonly pieces: readonly Piece[];
  /** The figures themselves, where they are wanted. */
  readonly figures?: Float64Array<ArrayBuffer>;
}

/** An input as the drivers of failures need it. */
export interface InputMoments {
  readonly lineId: string;
  readonly mean: number;
  readonly deviation: number;
}

export class TrialsWork {
  readonly requirement: RequirementReading | undefined;
  readonly inputs: readonly InputMoments[];
  private readonly found: Inputs;
  private readonly program: Program;
  private readonly evaluation: Evaluation;
  private readonly fill: Fill;
  /** The columns of the inputs in the block at hand, one behind the other; made only where failures are looked into. */
  private readonly sampled: Float64Array;
  private grid: Grid | undefined;

  constructor(private readonly run: TrialsRun) {
    const { lineId, caseId, seed } = run;
    this.evaluation = new Evaluation(run.worksheet);
    this.requirement = this.evaluation.reading(lineId, caseId).requirement;
    this.found = inputsOf(this.evaluation, lineId, caseId);
    const { inputs } = this.found;
    this.program = compileTrials(this.found.evaluation, lineId, caseId, inputs);
    this.inputs = inputs.map((input) => ({
      lineId: input.lineId,
      mean: meanDeviation(input.spread),
      deviation: Math.sqrt(varianceOf(input.spread)),
    }));
    const { blockSize } = this.program;
    const samplers = inputs.map((input) => samplerOf(input, seed));
    const isWatched = this.requirement !== undefined;
    this.sampled = new Float64Array(isWatched ? inputs.length * blockSize : 0);
    this.fill = (index, column, start, count) => {
      const sampler = samplers[index];
      if (sampler === undefined) return;
      fillSample(sampler, column, start, count);
      if (isWatched) this.sampled.set(count === column.length ? column : column.subarray(0, count), index * blockSize);
    };
  }

  /** Computes a chunk. It stops for breath after each block, so that whoever has no thread of its own can let others in. */
  *chunk(from: number, to: number, isKept: boolean): Generator<undefined, Part> {
    if (this.grid === undefined) {
      const sample = new Float64Array(Math.min(PIECE, this.run.count));
      yield* this.compute(0, sample, undefined);
      this.grid = gridOver(sample);
    }
    const bins = new Uint32Array(BINS);
    const tally = { withheld: 0, unpowered: 0, met: 0, least: Infinity, greatest: -Infinity, below: 0, above: 0 };
    const pieces: Piece[] = [];
    const figures = new Float64Array(isKept ? to - from : PIECE);
    for (let start = from; start < to; start += PIECE) {
      const length = Math.min(PIECE, to - start);
      const at = isKept ? start - from : 0;
      const column = figures.subarray(at, at + length);
      const failing = new Array<number>(this.requirement === undefined ? 0 : this.inputs.length).fill(0);
      tally.met += yield* this.compute(start, column, failing);
      const off = countInto(bins, this.grid, column);
      tally.below += off.below;
      tally.above += off.above;
      pieces.push({ ...sumsOf(column, tally), failing });
    }
    const met = this.requirement === undefined ? undefined : tally.met;
    return { from, to, grid: this.grid, ...tally, met, bins, pieces, ...(isKept ? { figures } : {}) };
  }

  /** Fills a column with trials `start` and following; returns how many meet the requirement, and adds up those that do not. */
  private *compute(start: number, column: Float64Array, failing: number[] | undefined): Generator<undefined, number> {
    const { blockSize } = this.program;
    let met = 0;
    for (let done = 0; done < column.length; done += blockSize) {
      const block = column.subarray(done, Math.min(done + blockSize, column.length));
      this.program.run(start + done, start + done + block.length, this.fill, [block]);
      if (failing !== undefined && this.requirement !== undefined) met += this.judge(block, this.requirement, failing);
      yield;
    }
    return met;
  }

  private judge(block: Float64Array, { bound, limit }: RequirementReading, failing: number[]): number {
    const { blockSize } = this.program;
    const isLeast = bound === 'at least';
    const failed: number[] = [];
    for (let i = 0; i < block.length; i++) {
      const figure = block[i] as number;
      // What is withheld meets nothing.
      if (!(isLeast ? figure >= limit : figure <= limit)) failed.push(i);
    }
    if (failed.length > 0)
      this.found.inputs.forEach((input, index) => {
        const base = baseOf(input);
        const first = index * blockSize;
        let sum = 0;
        for (let i = 0; i < failed.length; i++) sum += (this.sampled[first + (failed[i] as number)] as number) - base;
        failing[index] = (failing[index] as number) + sum;
      });
    return block.length - failed.length;
  }

  /** What tolerances can do at most, and by their slopes. */
  account(): Account {
    const { lineId, caseId } = this.run;
    const { figure, requirement } = this.evaluation.reading(lineId, caseId);
    const { direction, isAssumed } = targetDirection(this.evaluation, lineId, caseId);
    const { evaluation, inputs, troubles } = this.found;
    return {
      nominal: figure.state === 'value' ? figure.value : NaN,
      unitWord: figure.state === 'value' ? figure.unit.word : undefined,
      ...(requirement === undefined ? {} : { requirement }),
      inputIds: inputs.map((input) => input.lineId),
      troubles,
      direction,
      isDirectionAssumed: isAssumed,
      extremes: extremesOf(evaluation, lineId, caseId, inputs, direction),
      rootSumSquare: sensitivityOf(this.evaluation, lineId, caseId).rootSumSquare,
    };
  }
}

/** Mean and squares of a piece in two passes; counts what has no power or no figure. */
function sumsOf(
  column: Float64Array,
  tally: { withheld: number; unpowered: number; least: number; greatest: number },
): { readonly count: number; readonly mean: number; readonly squares: number } {
  let count = 0;
  let sum = 0;
  let { least, greatest } = tally;
  for (let i = 0; i < column.length; i++) {
    const figure = column[i] as number;
    if (figure !== figure) tally.withheld++;
    else if (figure === -Infinity) tally.unpowered++;
    else {
      count++;
      sum += figure;
      if (figure < least) least = figure;
      if (figure > greatest) greatest = figure;
    }
  }
  tally.least = least;
  tally.greatest = greatest;
  const mean = count === 0 ? 0 : sum / count;
  let squares = 0;
  for (let i = 0; i < column.length; i++) {
    const off = (column[i] as number) - mean;
    if (off > -Infinity) squares += off * off;
  }
  return { count, mean, squares };
}

/**
 * The parts of a run put together as they come in, in any order.
 * Holds: whole numbers are added as they come; other sums wait for their turn, so that the outcome is bit for bit the same
 * whatever the order, the chunks and the workers. Memory does not grow with the trials, but for the figures where they are kept.
 */
import { PERCENTS, shareOf, type TrialStatistics } from '../analysis';
import { BINS, quantilesOf, type Grid } from './bins';
import type { Driver, TrialsOutcome } from './outcome';
import { coarsened } from './spectrum';
import type { InputMoments, Part } from './trials-work';

interface Sums {
  count: number;
  mean: number;
  squares: number;
}

export class Gathering {
  done = 0;
  lostWorkers = 0;
  /** The figures by trial, where they are kept. */
  readonly figures: Float64Array<ArrayBuffer> | undefined;
  private readonly bins = new Uint32Array(BINS);
  private grid: Grid | undefined;
  private inputs: readonly InputMoments[] = [];
  private hasRequirement = false;
  private readonly tally = { withheld: 0, unpowered: 0, met: 0, below: 0, above: 0 };
  private least = Infinity;
  private greatest = -Infinity;
  private readonly sums: Sums = { count: 0, mean: 0, squares: 0 };
  private failing: number[] = [];
  /** Parts that came before their turn, by their first trial. */
  private readonly early = new Map<number, Part>();
  private next = 0;

  constructor(
    isKept: boolean,
    readonly count: number,
  ) {
    this.figures = isKept ? new Float64Array(count) : undefined;
  }

  add(part: Part, inputs: readonly InputMoments[]): void {
    this.done += part.to - part.from;
    this.grid = part.grid;
    this.inputs = inputs;
    for (let bin = 0; bin < BINS; bin++) this.bins[bin] = (this.bins[bin] as number) + (part.bins[bin] as number);
    this.tally.withheld += part.withheld;
    this.tally.unpowered += part.unpowered;
    this.hasRequirement = part.met !== undefined;
    this.tally.met += part.met ?? 0;
    this.tally.below += part.below;
    this.tally.above += part.above;
    this.least = Math.min(this.least, part.least);
    this.greatest = Math.max(this.greatest, part.greatest);
    if (part.figures !== undefined) this.figures?.set(part.figures, part.from);
    const { bins: _bins, figures: _figures, ...rest } = part;
    this.early.set(part.from, rest as Part);
    for (let turn = this.early.get(this.next); turn !== undefined; turn = this.early.get(this.next)) {
      this.early.delete(this.next);
      this.next = turn.to;
      this.join(turn);
    }
  }

  private join(part: Part): void {
    for (const { failing, ...piece } of part.pieces) {
      joinSums(this.sums, piece);
      failing.forEach((sum, index) => (this.failing[index] = (this.failing[index] ?? 0) + sum));
    }
  }

  /** The sums of all parts that are there, in the order of the trials. */
  private sumsSoFar(): { readonly sums: Sums; readonly failing: readonly number[] } {
    const sums = { ...this.sums };
    const failing = [...this.failing];
    for (const [, part] of [...this.early].sort(([a], [b]) => a - b))
      for (const piece of part.pieces) {
        joinSums(sums, piece);
        piece.failing.forEach((sum, index) => (failing[index] = (failing[index] ?? 0) + sum));
      }
    return { sums, failing };
  }

  /** What is known by now, with percentiles from the bins. Undefined before the first part. */
  outcome(): TrialsOutcome | undefined {
    const { grid, tally, least, greatest, done, hasRequirement } = this;
    if (grid === undefined) return undefined;
    const { sums, failing } = this.sumsSoFar();
    const counts = { bins: this.bins, below: tally.below, above: tally.above };
    // Figures without power are the lowest of all.
    const percentiles = quantilesOf(
      counts,
      grid,
      { least: tally.unpowered > 0 ? -Infinity : least, greatest },
      PERCENTS,
    );
    const statistics: TrialStatistics = {
      count: done,
      withheld: tally.withheld,
      ...momentsFrom(sums, tally.unpowered),
      median: percentiles[PERCENTS.indexOf(50)] ?? NaN,
      percentiles,
      ...(hasRequirement ? { met: shareOf(tally.met, done) } : {}),
    };
    const drivers = hasRequirement ? driversOf(this.inputs, failing, done - tally.met) : undefined;
    return {
      statistics,
      isBinned: true,
      quantileError: grid.step,
      least,
      greatest,
      spectrum: coarsened(counts, grid, tally.unpowered),
      ...(drivers === undefined ? {} : { drivers }),
      lostWorkers: this.lostWorkers,
    };
  }
}

/** Joins the sums of further figures. Source: T. F. Chan, G. H. Golub, R. J. LeVeque, Am. Stat. 37 (1983) 242. */
function joinSums(sums: Sums, { count, mean, squares }: Readonly<Sums>): void {
  if (count === 0) return;
  const total = sums.count + count;
  const apart = mean - sums.mean;
  sums.mean += (apart * count) / total;
  sums.squares += squares + (apart * apart * sums.count * count) / total;
  sums.count = total;
}

/** As `momentsOf` has them: one figure without power takes the mean with it. */
function momentsFrom(
  { count, mean, squares }: Sums,
  unpowered: number,
): { readonly mean: number; readonly standardDeviation: number } {
  if (unpowered > 0) return { mean: -Infinity, standardDeviation: NaN };
  if (count === 0) return { mean: NaN, standardDeviation: NaN };
  return { mean, standardDeviation: count === 1 ? 0 : Math.sqrt(squares / (count - 1)) };
}

function driversOf(
  inputs: readonly InputMoments[],
  failing: readonly number[],
  failed: number,
): readonly Driver[] | undefined {
  if (failed === 0) return undefined;
  return inputs
    .map(({ lineId, mean, deviation }, index) => ({
      lineId,
      shift: deviation > 0 ? ((failing[index] ?? 0) / failed - mean) / deviation : 0,
    }))
    .sort((a, b) => Math.abs(b.shift) - Math.abs(a.shift));
}

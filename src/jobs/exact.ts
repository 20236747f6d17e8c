/**
 * Statistics of all figures of a run, as `statisticsOf` gives them bit for bit, in fewer passes: the bins tell where a rank lies,
 * and only the figures of those bins are sorted.
 */
import { momentsOf, PERCENTS, shareOf, type TrialStatistics } from '../analysis';
import type { RequirementReading } from '../engine';
import { BINS, countInto, gridOver, placeIn } from './bins';

/** Moves the figures about where some are withheld. */
export function exactStatistics(figures: Float64Array, requirement: RequirementReading | undefined): TrialStatistics {
  const given = withoutWithheld(figures);
  const percentiles = exactPercentiles(given, PERCENTS);
  return {
    count: figures.length,
    withheld: figures.length - given.length,
    ...momentsOf(given),
    median: percentiles[PERCENTS.indexOf(50)] ?? NaN,
    percentiles,
    ...(requirement === undefined ? {} : { met: shareOf(countMet(given, requirement), figures.length) }),
  };
}

function withoutWithheld(figures: Float64Array): Float64Array {
  let kept = 0;
  for (let i = 0; i < figures.length; i++) {
    const figure = figures[i] as number;
    if (figure === figure) figures[kept++] = figure;
  }
  return figures.subarray(0, kept);
}

function countMet(figures: Float64Array, { bound, limit }: RequirementReading): number {
  const isLeast = bound === 'at least';
  let met = 0;
  for (let i = 0; i < figures.length; i++) {
    const figure = figures[i] as number;
    if (isLeast ? figure >= limit : figure <= limit) met++;
  }
  return met;
}

/** Percentiles exactly as those of sorted figures, none of which is NaN. */
export function exactPercentiles(figures: Float64Array, percents: readonly number[]): number[] {
  const last = figures.length - 1;
  if (last < 0) return percents.map(() => NaN);
  const grid = gridOver(figures);
  const bins = new Uint32Array(BINS);
  const { below } = countInto(bins, grid, figures);
  const ranks = percents.flatMap((percent) => {
    const low = Math.floor((percent * last) / 100);
    return [low, Math.min(low + 1, last)];
  });
  // How many figures are before each bin that holds a rank.
  const wanted = new Map<number, { readonly before: number; readonly found: number[] }>();
  const isWanted = new Uint8Array(BINS);
  const binOf = new Map<number, number>();
  let before = below;
  for (let bin = 0; bin < BINS; bin++) {
    const after = before + (bins[bin] as number);
    for (const rank of ranks)
      if (rank >= before && rank < after) {
        if (!wanted.has(bin)) wanted.set(bin, { before, found: [] });
        isWanted[bin] = 1;
        binOf.set(rank, bin);
      }
    before = after;
  }
  for (let i = 0; i < figures.length; i++) {
    const figure = figures[i] as number;
    const bin = placeIn(grid, figure);
    if (isWanted[bin] === 1) wanted.get(bin)?.found.push(figure);
  }
  for (const { found } of wanted.values()) found.sort((a, b) => a - b);
  /** Of all that is on no grid of its own figures, there is only what has no power. */
  const figureAt = (rank: number): number => {
    const held = wanted.get(binOf.get(rank) ?? -1);
    return held === undefined ? -Infinity : (held.found[rank - held.before] as number);
  };
  return percents.map((percent) => {
    const rank = (percent * last) / 100;
    const low = Math.floor(rank);
    const lower = figureAt(low);
    if (rank === low || low === last) return lower;
    const upper = figureAt(low + 1);
    return upper === lower ? lower : lower + (rank - low) * (upper - lower);
  });
}

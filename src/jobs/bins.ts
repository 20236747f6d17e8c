/**
 * Figures counted in bins of equal width, for quantiles in memory that does not grow with their number.
 * Holds: a quantile differs from that of the sorted figures by less than a bin, as long as it lies on the grid: the grid is
 * three times as wide as the range of a sample, so a bin is 1/10,922 of that range. Counts are whole numbers, so that the order of
 * counting changes nothing.
 */

export const BINS = 32768;

/** The widths of a sample's range that the grid is wide. */
const REACH = 3;

export interface Grid {
  readonly from: number;
  /** The width of a bin. */
  readonly step: number;
}

export interface Counts {
  readonly bins: Uint32Array<ArrayBuffer>;
  /** Figures off the grid; those without power are among the ones below. */
  readonly below: number;
  readonly above: number;
}

/** A grid around the finite figures of a sample. */
export function gridOver(sample: Float64Array): Grid {
  let least = Infinity;
  let greatest = -Infinity;
  for (const figure of sample) {
    if (!Number.isFinite(figure)) continue;
    if (figure < least) least = figure;
    if (figure > greatest) greatest = figure;
  }
  if (least > greatest) return { from: -1.5, step: 3 / BINS };
  const span = Math.max(greatest - least, 1e-9 * Math.abs(least), 1e-12);
  return { from: (least + greatest) / 2 - (REACH / 2) * span, step: (REACH * span) / BINS };
}

/** The bin of a figure; −1 off the grid. */
export function placeIn({ from, step }: Grid, figure: number): number {
  const place = (figure - from) * (1 / step);
  return place >= 0 && place < BINS ? place | 0 : -1;
}

/** Counts figures into bins; returns how many are below and above the grid. What is NaN is left out. */
export function countInto(
  bins: Uint32Array,
  { from, step }: Grid,
  figures: Float64Array,
): { readonly below: number; readonly above: number } {
  let below = 0;
  let above = 0;
  const scale = 1 / step;
  for (let i = 0; i < figures.length; i++) {
    const place = ((figures[i] as number) - from) * scale;
    if (place >= 0 && place < BINS) bins[place | 0] = (bins[place | 0] as number) + 1;
    else if (place < 0) below++;
    else if (place >= BINS) above++;
  }
  return { below, above };
}

/** Quantiles, at the rank p·(n − 1) as those of sorted figures. `least` and `greatest` stand for what is off the grid. */
export function quantilesOf(
  { bins, below, above }: Counts,
  { from, step }: Grid,
  { least, greatest }: { readonly least: number; readonly greatest: number },
  percents: readonly number[],
): number[] {
  const total = bins.reduce((sum, count) => sum + count, below + above);
  let before = below;
  let bin = 0;
  /** The figure of a rank; ranks ascend from call to call, but for one step back. */
  const figureAt = (rank: number): number => {
    if (rank < below) return least;
    if (rank >= total - above) return greatest;
    while (bin > 0 && before > rank) before -= bins[--bin] as number;
    while (before + (bins[bin] as number) <= rank) before += bins[bin++] as number;
    const within = (rank - before + 0.5) / (bins[bin] as number);
    return Math.min(greatest, Math.max(least, from + (bin + within) * step));
  };
  return percents.map((percent) => {
    if (total === 0) return NaN;
    const rank = (percent * (total - 1)) / 100;
    const low = Math.floor(rank);
    const lower = figureAt(low);
    if (low === rank) return lower;
    const upper = figureAt(low + 1);
    return upper === lower ? lower : lower + (rank - low) * (upper - lower);
  });
}

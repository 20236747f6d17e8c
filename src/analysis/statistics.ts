/** Statistics of a column of figures: moments, percentiles by selection, and the share that meets a requirement. */

export interface Moments {
  readonly mean: number;
  /** Of the sample, with n − 1. */
  readonly standardDeviation: number;
}

/** Mean and standard deviation in two passes, in the order of the column; NaN of none. */
export function momentsOf(values: Float64Array): Moments {
  const { length } = values;
  let sum = 0;
  for (let i = 0; i < length; i++) sum += values[i] as number;
  const mean = sum / length;
  let squares = 0;
  for (let i = 0; i < length; i++) {
    const off = (values[i] as number) - mean;
    squares += off * off;
  }
  return { mean, standardDeviation: length > 1 ? Math.sqrt(squares / (length - 1)) : length === 1 ? 0 : NaN };
}

/** The percentiles that are told. */
export const PERCENTS = [0.1, 1, 5, 50, 95, 99, 99.9] as const;

/**
 * Percentiles by linear interpolation between the two figures nearest in rank (rank p·(n − 1) from 0), exactly as sorting would
 * give them. `percents` ascend. Moves the figures about; none of them is NaN.
 */
export function percentilesOf(values: Float64Array, percents: readonly number[]): number[] {
  const last = values.length - 1;
  let from = 0;
  return percents.map((percent) => {
    if (last < 0) return NaN;
    const rank = (percent * last) / 100;
    const low = Math.floor(rank);
    const lower = select(values, low, from, last);
    from = low;
    if (rank === low || low === last) return lower;
    // All to the right are no smaller: the next in rank is the least of them.
    let upper = Infinity;
    for (let i = low + 1; i <= last; i++) if ((values[i] as number) < upper) upper = values[i] as number;
    return upper === lower ? lower : lower + (rank - low) * (upper - lower);
  });
}

/** Brings the figure of this rank to its place, smaller ones to the left of it, and returns it. Hoare's selection. */
export function select(values: Float64Array, rank: number, from: number, to: number): number {
  let low = from;
  let high = to;
  while (low < high) {
    const pivot = medianOfThree(values[low] as number, values[(low + high) >> 1] as number, values[high] as number);
    let left = low;
    let right = high;
    while (left <= right) {
      while ((values[left] as number) < pivot) left++;
      while ((values[right] as number) > pivot) right--;
      if (left > right) break;
      const moved = values[left] as number;
      values[left++] = values[right] as number;
      values[right--] = moved;
    }
    if (rank <= right) high = right;
    else if (rank >= left) low = left;
    else break;
  }
  return values[rank] as number;
}

const medianOfThree = (a: number, b: number, c: number): number =>
  Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));

/** The 97.5 % point of the normal distribution, to 16 figures. */
const TWO_SIDED_95 = 1.959963984540054;

/** Share of `met` in `count` with its 95 % interval. Source: E. B. Wilson, J. Am. Stat. Assoc. 22 (1927) 209. */
export function shareOf(
  met: number,
  count: number,
): { readonly share: number; readonly low: number; readonly high: number } {
  const share = met / count;
  const square = TWO_SIDED_95 ** 2;
  const middle = (share + square / (2 * count)) / (1 + square / count);
  const half =
    (TWO_SIDED_95 / (1 + square / count)) * Math.sqrt((share * (1 - share)) / count + square / (4 * count ** 2));
  return { share, low: met === 0 ? 0 : middle - half, high: met === count ? 1 : middle + half };
}

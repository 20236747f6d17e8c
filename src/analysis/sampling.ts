/** Samples of an input: a column of evenly spread numbers put through the quantile function of its shape, in place. */
import { fillEven, type StreamKey } from './random';
import { normalQuantile, type Spread } from './shapes';

/** All that is needed to sample an input: plain data. */
export interface Sampler {
  readonly spread: Spread;
  readonly key: StreamKey;
  /** True: large numbers of the stream give low figures, as where a group deviates together and low is favourable. */
  readonly isReversed: boolean;
  /** What the deviation is added to. */
  readonly base: number;
}

/** Fills a column with the input's figures in trials `start` and following. */
export function fillSample(
  { spread, key, isReversed, base }: Sampler,
  column: Float64Array,
  start: number,
  count: number,
): void {
  const { below, above, shape } = spread;
  const width = above + below;
  fillEven(column, key, start, count);
  if (isReversed) for (let i = 0; i < count; i++) column[i] = 1 - (column[i] as number);
  const low = base - below;
  const high = base + above;
  const middle = (low + high) / 2;
  switch (shape) {
    case 'uniform':
      for (let i = 0; i < count; i++) column[i] = low + width * (column[i] as number);
      return;
    case 'triangular': {
      const mode = below / width;
      const rising = width * below;
      const falling = width * above;
      for (let i = 0; i < count; i++) {
        const p = column[i] as number;
        column[i] = p < mode ? low + Math.sqrt(p * rising) : high - Math.sqrt((1 - p) * falling);
      }
      return;
    }
    case 'normal': {
      const deviation = width / 6;
      for (let i = 0; i < count; i++) column[i] = middle + deviation * normalQuantile(column[i] as number);
      return;
    }
    case 'arcsine': {
      const half = width / 2;
      for (let i = 0; i < count; i++) column[i] = middle - half * Math.cos(Math.PI * (column[i] as number));
      return;
    }
  }
}

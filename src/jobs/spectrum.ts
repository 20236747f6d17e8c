/** A spectrum for drawing, from the figures themselves or from the finer bins of a run that keeps none. */
import { BINS, type Counts, type Grid } from './bins';
import type { Spectrum } from './outcome';

/** Bins of a spectrum, at most. */
export const SPECTRUM_BINS = 512;

/** The spectrum of figures, from the least to the greatest; of none, or of equal ones, it has one bin. */
export function spectrumOf(figures: Float64Array): Spectrum {
  let least = Infinity;
  let greatest = -Infinity;
  for (let i = 0; i < figures.length; i++) {
    const figure = figures[i] as number;
    if (figure > -Infinity && figure < least) least = figure;
    if (figure > greatest) greatest = figure;
  }
  if (!(greatest > least)) {
    const counts = new Float64Array(1);
    if (least === greatest) for (const figure of figures) if (figure === least) counts[0] = (counts[0] as number) + 1;
    return { from: least === greatest ? least : 0, step: 0, counts, below: 0, above: 0 };
  }
  const counts = new Float64Array(SPECTRUM_BINS);
  const step = (greatest - least) / SPECTRUM_BINS;
  for (let i = 0; i < figures.length; i++) {
    const place = ((figures[i] as number) - least) / step;
    if (!(place >= 0)) continue;
    const bin = Math.min(SPECTRUM_BINS - 1, Math.floor(place));
    counts[bin] = (counts[bin] as number) + 1;
  }
  return { from: least, step, counts, below: 0, above: 0 };
}

/** Joins fine bins into the bins of a spectrum. `unpowered` figures are below the grid and in no spectrum. */
export function coarsened({ bins, below, above }: Counts, { from, step }: Grid, unpowered: number): Spectrum {
  let first = 0;
  while (first < BINS - 1 && bins[first] === 0) first++;
  let last = BINS - 1;
  while (last > first && bins[last] === 0) last--;
  const size = Math.ceil((last - first + 1) / SPECTRUM_BINS);
  const counts = new Float64Array(Math.ceil((last - first + 1) / size));
  for (let bin = first; bin <= last; bin++) {
    const at = Math.floor((bin - first) / size);
    counts[at] = (counts[at] as number) + (bins[bin] as number);
  }
  return { from: from + first * step, step: size * step, counts, below: below - unpowered, above };
}

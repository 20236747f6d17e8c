/** Sweeps: the figures of several lines while one figure runs through a range. Each point is what the engine would give. */
import type { Evaluation } from '../engine';
import { compileColumns } from './columns';
import { loosened } from './inputs';

export interface Range {
  readonly from: number;
  readonly to: number;
  /** Steps by equal factors instead of equal amounts. */
  readonly isLogarithmic: boolean;
}

/** `steps` + 1 places from one end to the other, both exact. */
export function placesIn({ from, to, isLogarithmic }: Range, steps: number): Float64Array {
  const places = Float64Array.from({ length: steps + 1 }, (_, i) => {
    const part = i / steps;
    return isLogarithmic ? from * (to / from) ** part : from + (to - from) * part;
  });
  places[0] = from;
  places[steps] = to;
  return places;
}

/** The lines' figures at each place of the varied line, in its unit; NaN where withheld. A column a line. */
export function figuresAt(
  evaluation: Evaluation,
  variedId: string,
  caseId: string,
  lineIds: readonly string[],
  places: Float64Array,
): Float64Array[] {
  const free = loosened(evaluation, [variedId], lineIds, caseId).evaluation;
  const program = compileColumns(free, lineIds, caseId, [{ lineId: variedId }]);
  const results = lineIds.map(() => new Float64Array(places.length));
  program.run(
    0,
    places.length,
    (_, column, start, count) => {
      column.set(places.subarray(start, start + count));
    },
    results,
  );
  return results;
}

/**
 * Curves: a table y(x) read between its points, in the form shown, so that decibels stay decibels.
 * Holds: at a point the curve gives the point's figure; beyond the first and the last it gives none; a monotone curve rises and
 * falls only where its points do.
 */
import { fail, ok, type Result } from '../base';
import type { QuantityKind } from './kinds';
import type { Unit } from './unit';
import { findUnit } from './units';

export interface CurveTable {
  readonly x: { readonly label: string; readonly unit: string };
  readonly y: { readonly label: string; readonly unit: string; readonly quantity?: QuantityKind };
  /** A smooth monotone cubic instead of straight lines. */
  readonly isMonotone: boolean;
  /** x counts by its logarithm. */
  readonly isLogarithmic: boolean;
  readonly points: readonly (readonly [number, number])[];
}

export interface Curve {
  readonly xLabel: string;
  readonly xUnit: Unit;
  readonly yUnit: Unit;
  readonly quantity: QuantityKind | undefined;
  /** The first and the last x, in `xUnit`. */
  readonly from: number;
  readonly to: number;
  /** The figure at x, both in the axes' units; NaN outside. */
  readonly at: (x: number) => number;
}

/** The curve of a table, or what is wrong with the table, as a sentence. */
export function makeCurve(table: CurveTable): Result<Curve, string> {
  const xUnit = findUnit(table.x.unit.trim());
  const yUnit = findUnit(table.y.unit.trim());
  if (xUnit === undefined) return fail(`The unit “${table.x.unit}” of the first column is not known here.`);
  if (yUnit === undefined) return fail(`The unit “${table.y.unit}” of the second column is not known here.`);
  const points = [...table.points].sort(([a], [b]) => a - b);
  const [first] = points;
  const last = points[points.length - 1];
  if (first === undefined || last === undefined || points.length < 2) return fail('A curve needs two points at least.');
  const repeated = points.find(([x], i) => x === points[i + 1]?.[0]);
  if (repeated !== undefined)
    return fail(
      `Two points stand at ${String(repeated[0])}${xUnit.word === '1' ? '' : ` ${table.x.unit}`}; a curve has one value at each place.`,
    );
  if (table.isLogarithmic && first[0] <= 0)
    return fail('By its logarithm an axis has places above 0 only; the first point is not one.');
  // An angle comes in radians and back: what rounding puts beyond an end is still the end.
  const slack = 1e-12 * Math.max(Math.abs(first[0]), Math.abs(last[0]));
  const place = table.isLogarithmic ? Math.log : (x: number): number => x;
  const xs = Float64Array.from(points, ([x]) => place(x));
  const ys = Float64Array.from(points, ([, y]) => y);
  const slopes = table.isMonotone ? monotoneSlopes(xs, ys) : undefined;
  return ok({
    xLabel: table.x.label,
    xUnit,
    yUnit,
    quantity: table.y.quantity,
    from: first[0],
    to: last[0],
    at: (x) => (x >= first[0] - slack && x <= last[0] + slack ? read(xs, ys, slopes, place(x)) : NaN),
  });
}

function read(xs: Float64Array, ys: Float64Array, slopes: Float64Array | undefined, x: number): number {
  let low = 0;
  let high = xs.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((xs[middle] as number) <= x) low = middle;
    else high = middle;
  }
  const [x0 = NaN, x1 = NaN] = [xs[low], xs[high]];
  const [y0 = NaN, y1 = NaN] = [ys[low], ys[high]];
  // The ends are given back as they are, whatever the arithmetic between them would make of it.
  if (!(x > x0)) return y0;
  if (x >= x1) return y1;
  const width = x1 - x0;
  const t = (x - x0) / width;
  if (slopes === undefined) return y0 + (y1 - y0) * t;
  const [m0 = NaN, m1 = NaN] = [slopes[low], slopes[high]];
  const u = 1 - t;
  // Cubic Hermite form.
  return y0 * u * u * (1 + 2 * t) + y1 * t * t * (3 - 2 * t) + width * t * u * (m0 * u - m1 * t);
}

/** Slopes at the points that keep the curve monotone between them. Source: Fritsch and Carlson 1980, SIAM J. Numer. Anal. 17, 238. */
function monotoneSlopes(xs: Float64Array, ys: Float64Array): Float64Array {
  const count = xs.length;
  const chords = new Float64Array(count - 1);
  for (let i = 0; i < count - 1; i++)
    chords[i] = ((ys[i + 1] as number) - (ys[i] as number)) / ((xs[i + 1] as number) - (xs[i] as number));
  const slopes = new Float64Array(count);
  slopes[0] = chords[0] as number;
  slopes[count - 1] = chords[count - 2] as number;
  for (let i = 1; i < count - 1; i++) {
    const [before = 0, after = 0] = [chords[i - 1], chords[i]];
    slopes[i] = before * after <= 0 ? 0 : (before + after) / 2;
  }
  for (let i = 0; i < count - 1; i++) {
    const chord = chords[i] as number;
    if (chord === 0) {
      slopes[i] = 0;
      slopes[i + 1] = 0;
      continue;
    }
    const a = (slopes[i] as number) / chord;
    const b = (slopes[i + 1] as number) / chord;
    const size = Math.hypot(a, b);
    if (size <= 3) continue;
    slopes[i] = (3 * a * chord) / size;
    slopes[i + 1] = (3 * b * chord) / size;
  }
  return slopes;
}

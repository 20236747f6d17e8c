/**
 * Solving: which figures of one line give another the figure wanted. The range is scanned, every change of side is closed in on by
 * Brent's method, and where the line comes near the figure and turns, the turn is closed in on as well, so that two crossings
 * between two places of the scan are found. Gaps in which the line is withheld are passed over; a jump over the figure is none.
 * Source of the method: R. P. Brent, Algorithms for Minimization without Derivatives (1973), chapter 4.
 */
import type { Evaluation } from '../engine';
import type { Unit } from '../quantity';
import { compileColumns } from './columns';
import { loosened } from './inputs';
import { placesIn, type Range } from './sweep';

const SCAN_STEPS = 1024;

/** Every figure of the varied line in the range at which the other has the figure wanted, ascending. */
export function solve(
  evaluation: Evaluation,
  variedId: string,
  lineId: string,
  caseId: string,
  wanted: number,
  range: Range,
): number[] {
  const ordered = range.from <= range.to ? range : { ...range, from: range.to, to: range.from };
  const free = loosened(evaluation, [variedId], [lineId], caseId).evaluation;
  const program = compileColumns(free, [lineId], caseId, [{ lineId: variedId }]);
  const excess = (places: Float64Array): Float64Array => {
    const results = new Float64Array(places.length);
    program.run(0, places.length, (_, column, start, count) => column.set(places.subarray(start, start + count)), [
      results,
    ]);
    return results.map((figure) => figure - wanted);
  };
  // A line that does not rest on the varied one has the figure everywhere or nowhere; neither is an answer.
  if (program.reached[0] !== true) return [];
  const at = (x: number): number => excess(Float64Array.of(x))[0] as number;
  return crossings(placesIn(ordered, SCAN_STEPS), excess, at);
}

function crossings(
  places: Float64Array,
  excess: (places: Float64Array) => Float64Array,
  at: (x: number) => number,
): number[] {
  const offs = excess(places);
  const scale = offs.reduce((most, off) => (Number.isFinite(off) ? Math.max(most, Math.abs(off)) : most), 0);
  const near = 1e-9 * Math.max(scale, 1e-300);
  const found: number[] = [];
  const add = (x: number): void => {
    if (found.every((known) => Math.abs(known - x) > 1e-9 * Math.max(Math.abs(known), Math.abs(x)))) found.push(x);
  };
  const between = (low: number, high: number, fLow: number, fHigh: number): void => {
    const x = brent(at, low, high, fLow, fHigh);
    // What is left beside a jump is a good part of what was there at its sides.
    if (Math.abs(at(x)) <= Math.max(near, 1e-6 * Math.min(Math.abs(fLow), Math.abs(fHigh)))) add(x);
  };
  for (let i = 0; i < places.length; i++) {
    const [x = NaN, f = NaN] = [places[i], offs[i]];
    const [before = NaN, fBefore = NaN] = [places[i - 1], offs[i - 1]];
    // Of a stretch on which the line keeps the value, the two ends.
    if (f === 0 && !(fBefore === 0 && offs[i + 1] === 0)) add(x);
    if (i === 0) continue;
    if (fBefore * f < 0) between(before, x, fBefore, f);
    const [after = NaN, fAfter = NaN] = [places[i + 1], offs[i + 1]];
    const turns =
      Math.abs(f) <= Math.abs(fBefore) && Math.abs(f) <= Math.abs(fAfter) && fBefore * f > 0 && f * fAfter > 0;
    if (!turns) continue;
    const turn = nearest(at, before, after);
    const fTurn = at(turn);
    // What rounding alone has put on the other side is a touch.
    if (fTurn * f < 0 && Math.abs(fTurn) > 1e-13 * scale) {
      between(before, turn, fBefore, fTurn);
      between(turn, after, fTurn, fAfter);
    } else if (Math.abs(fTurn) <= near) add(turn);
  }
  return found.sort((a, b) => a - b);
}

/** The place between two others at which a function of one sign comes nearest to zero, or has crossed it. Golden section. */
function nearest(at: (x: number) => number, from: number, to: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  const sign = Math.sign(at(from));
  let [low, high] = [from, to];
  let [a, b] = [high - ratio * (high - low), low + ratio * (high - low)];
  let [fa, fb] = [sign * at(a), sign * at(b)];
  for (let i = 0; i < 60; i++) {
    if (fa < 0) return a;
    if (fb < 0) return b;
    if (fa <= fb) {
      [high, b, fb] = [b, a, fa];
      a = high - ratio * (high - low);
      fa = sign * at(a);
    } else {
      [low, a, fa] = [a, b, fb];
      b = low + ratio * (high - low);
      fb = sign * at(b);
    }
  }
  return fa <= fb ? a : b;
}

/** A zero between two places at which the function has opposite signs. */
export function brent(at: (x: number) => number, from: number, to: number, fFrom: number, fTo: number): number {
  let [a, b, fa, fb] = [from, to, fFrom, fTo];
  let [c, fc] = [a, fa];
  let step = b - a;
  let last = step;
  for (let i = 0; i < 200; i++) {
    if (fb > 0 === fc > 0) {
      [c, fc] = [a, fa];
      step = b - a;
      last = step;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const tolerance = 2 * Number.EPSILON * Math.abs(b) + Number.MIN_VALUE;
    const half = (c - b) / 2;
    if (Math.abs(half) <= tolerance || fb === 0) return b;
    if (Math.abs(last) < tolerance || Math.abs(fa) <= Math.abs(fb)) {
      step = half;
      last = half;
    } else {
      const s = fb / fa;
      let p: number;
      let q: number;
      if (a === c) {
        p = 2 * half * s;
        q = 1 - s;
      } else {
        const r = fb / fc;
        q = fa / fc;
        p = s * (2 * half * q * (q - r) - (b - a) * (r - 1));
        q = (q - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * half * q - Math.abs(tolerance * q), Math.abs(last * q))) {
        last = step;
        step = p / q;
      } else {
        step = half;
        last = half;
      }
    }
    [a, fa] = [b, fb];
    b += Math.abs(step) > tolerance ? step : half > 0 ? tolerance : -tolerance;
    fb = at(b);
    // A place without a figure among places that have one: leave it on the side of the half that is left.
    if (Number.isNaN(fb)) return b;
  }
  return b;
}

/** How far a search goes where nobody says: 60 dB either way; a thousandth to a thousandfold; ten times the figure either way. */
export function usualRange(figure: number, unit: Unit): Range | undefined {
  if (!Number.isFinite(figure)) return undefined;
  if (unit.form === 'decibel') return { from: figure - 60, to: figure + 60, isLogarithmic: false };
  const hasZero = unit.form === 'linear' && unit.shift !== 0;
  if (figure > 0 && !hasZero) return { from: figure / 1000, to: figure * 1000, isLogarithmic: true };
  const reach = figure === 0 ? 100 : 10 * Math.abs(figure);
  return { from: figure - reach, to: figure + reach, isLogarithmic: false };
}

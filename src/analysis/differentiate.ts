/**
 * Slopes by forward differentiation of plans: the figure of every line together with its derivatives by all inputs, in the order of
 * the graph. Exact wherever the table of derivatives reaches; a function that is not in it is differentiated by differences,
 * and the inputs that come through it are marked.
 */
import type { Evaluation, Node } from '../engine';
import { evaluatePlan, type Figures, type Plan } from '../formula';
import type { Varied } from './columns';
import { DB, partialsOf } from './derivatives';

/** Slopes of a figure by each input, and which of them came through differences. */
export interface Slopes {
  readonly slopes: Float64Array;
  readonly isInexact: readonly boolean[];
}

interface Dual {
  readonly value: number;
  /** By input; undefined: none of them counts. */
  readonly slopes: Float64Array | undefined;
  readonly inexact: ReadonlySet<number>;
}

const NONE: ReadonlySet<number> = new Set();
const constant = (value: number): Dual => ({ value, slopes: undefined, inexact: NONE });

/** The slopes of a line by the varied lines, at their figures as they stand. */
export function slopesOf(evaluation: Evaluation, lineId: string, caseId: string, varied: readonly Varied[]): Slopes {
  const { figures } = evaluation;
  const target = evaluation.node(lineId, caseId);
  const count = varied.length;
  const indexOf = new Map<Node, number>();
  varied.forEach(({ lineId: id }, index) => {
    const node = evaluation.node(id, caseId);
    if (node !== undefined) indexOf.set(node, index);
  });
  const duals = new Map<number, Dual>();
  const dualOf = (slot: number): Dual => duals.get(slot) ?? constant(figures.values[slot] as number);
  for (const node of upstream(target)) {
    const index = indexOf.get(node);
    const isReplaced = index !== undefined && varied[index]?.isAdded !== true;
    const own = isReplaced || node.barred !== undefined ? undefined : dual(node.result.plan, dualOf, figures, count);
    if (own?.slopes === undefined && index === undefined) continue;
    const slopes = Float64Array.from(own?.slopes ?? new Float64Array(count));
    if (index !== undefined) slopes[index] = (slopes[index] as number) + 1;
    duals.set(node.slot, { value: figures.values[node.slot] as number, slopes, inexact: own?.inexact ?? NONE });
  }
  const result = target === undefined ? constant(NaN) : dualOf(target.slot);
  return {
    slopes: result.slopes ?? new Float64Array(count),
    isInexact: varied.map((_, index) => result.inexact.has(index)),
  };
}

function upstream(target: Node | undefined): Node[] {
  const seen = new Set<Node>();
  const open = target === undefined ? [] : [target];
  for (let node = open.pop(); node !== undefined; node = open.pop()) {
    if (seen.has(node)) continue;
    seen.add(node);
    open.push(...node.inputs);
  }
  return [...seen].sort((a, b) => a.rank - b.rank);
}

/** The figure and slopes of a plan, from those of the slots that it reads. */
export function dual(plan: Plan, dualOf: (slot: number) => Dual, figures: Figures, count: number): Dual {
  const of = (part: Plan): Dual => dual(part, dualOf, figures, count);
  /** The chain rule: the parts, each with the slope of the whole by it. */
  const chain = (value: number, parts: readonly (readonly [Dual, number])[], isByDifference = false): Dual => {
    let slopes: Float64Array | undefined;
    const inexact = new Set<number>();
    for (const [part, by] of parts) {
      if (part.slopes === undefined) continue;
      slopes ??= new Float64Array(count);
      for (let i = 0; i < count; i++) {
        const slope = part.slopes[i] as number;
        if (slope === 0) continue;
        slopes[i] = (slopes[i] as number) + by * slope;
        if (isByDifference) inexact.add(i);
      }
      for (const index of part.inexact) inexact.add(index);
    }
    return { value, slopes, inexact: inexact.size === 0 ? NONE : inexact };
  };
  switch (plan.op) {
    case 'constant':
      return constant(plan.value);
    case 'slot':
      return dualOf(plan.slot);
    case 'sum': {
      const terms = plan.terms.map(({ coefficient, plan: term }) => [of(term), coefficient] as const);
      return chain(terms.reduce((sum, [{ value }, by]) => sum + by * value, 0) + plan.constant, terms);
    }
    case 'product': {
      const [left, right] = [of(plan.left), of(plan.right)];
      return chain(left.value * right.value, [
        [left, right.value],
        [right, left.value],
      ]);
    }
    case 'quotient': {
      const [left, right] = [of(plan.left), of(plan.right)];
      return chain(left.value / right.value, [
        [left, 1 / right.value],
        [right, -left.value / right.value ** 2],
      ]);
    }
    case 'power': {
      const [base, exponent] = [of(plan.left), of(plan.right)];
      const value = base.value ** exponent.value;
      return chain(value, [
        [base, exponent.value * base.value ** (exponent.value - 1)],
        [exponent, value === 0 ? 0 : value * Math.log(base.value)],
      ]);
    }
    case 'decibels': {
      const part = of(plan.of);
      return chain(evaluatePlan({ ...plan, of: { op: 'constant', value: part.value } }, figures), [
        [part, DB / part.value],
      ]);
    }
    case 'linear': {
      const part = of(plan.of);
      const value = 10 ** (part.value / 10);
      return chain(value, [[part, value / DB]]);
    }
    case 'compare': {
      const fixed = (part: Plan): Plan => ({ op: 'constant', value: of(part).value });
      return constant(evaluatePlan({ ...plan, left: fixed(plan.left), right: fixed(plan.right) }, figures));
    }
    case 'choose': {
      const { value } = of(plan.condition);
      return Number.isNaN(value) ? constant(NaN) : of(value !== 0 ? plan.then : plan.otherwise);
    }
    case 'apply': {
      const parts = plan.parameters.map(of);
      const values = parts.map(({ value }) => value);
      const result = plan.compute(...values);
      const partials = partialsOf(plan);
      if (partials !== undefined) {
        const by = partials(values, result);
        return chain(
          result,
          parts.map((part, at) => [part, by[at] ?? 0] as const),
        );
      }
      return chain(
        result,
        parts.map((part, at) => [part, part.slopes === undefined ? 0 : difference(plan.compute, values, at)] as const),
        true,
      );
    }
  }
}

/** Steps by the size of the argument: wide for five points, narrow for two. */
const WIDE = 1e-4;
const NARROW = 6e-6;

/** The slope by one argument: a difference of five points, or of fewer where some have no figure (at the end of a curve). */
function difference(compute: (...values: number[]) => number, values: readonly number[], at: number): number {
  const x = values[at] as number;
  const there = (value: number): number => compute(...values.map((other, index) => (index === at ? value : other)));
  const size = x === 0 ? 1 : Math.abs(x);
  const wide = WIDE * size;
  const five = (8 * (there(x + wide) - there(x - wide)) - (there(x + 2 * wide) - there(x - 2 * wide))) / (12 * wide);
  if (Number.isFinite(five)) return five;
  const [low, high] = [x - NARROW * size, x + NARROW * size];
  const [below, here, above] = [there(low), there(x), there(high)];
  if (Number.isFinite(below) && Number.isFinite(above)) return (above - below) / (high - low);
  return Number.isFinite(above)
    ? (above - here) / (high - x)
    : Number.isFinite(below)
      ? (here - below) / (x - low)
      : NaN;
}

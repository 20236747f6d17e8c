/**
 * Plans: what is left of a checked entry when units have been dealt with — plain arithmetic over doubles. Every conversion
 * between units stands in the plan as a constant; compilers (one value, columns) need to know nothing of units.
 * Holds: a plan evaluates to NaN exactly when there is no figure; −∞ stands for *no power* in decibel figures.
 */
import type { FindingCode } from '../findings';

export type Comparison = '=' | '<>' | '<' | '>' | '<=' | '>=';

export interface PlanTerm {
  readonly coefficient: number;
  readonly plan: Plan;
}

export type Plan =
  | { readonly op: 'constant'; readonly value: number }
  /** The figure of the node in this slot, in that line's unit. */
  | { readonly op: 'slot'; readonly slot: number }
  /** Σ coefficient·plan + constant, added in the order written. */
  | { readonly op: 'sum'; readonly terms: readonly PlanTerm[]; readonly constant: number }
  | { readonly op: 'product'; readonly left: Plan; readonly right: Plan }
  | { readonly op: 'quotient'; readonly left: Plan; readonly right: Plan }
  | { readonly op: 'power'; readonly left: Plan; readonly right: Plan }
  /** 10·log10; no figure at or below zero, or −∞ at zero when `zeroIsNoPower`. */
  | { readonly op: 'decibels'; readonly of: Plan; readonly zeroIsNoPower: boolean }
  /** 10^(x/10). */
  | { readonly op: 'linear'; readonly of: Plan }
  | { readonly op: 'compare'; readonly comparison: Comparison; readonly left: Plan; readonly right: Plan }
  | { readonly op: 'choose'; readonly condition: Plan; readonly then: Plan; readonly otherwise: Plan }
  /** A function of numbers. */
  | {
      readonly op: 'apply';
      readonly name: string;
      readonly compute: (...values: number[]) => number;
      readonly parameters: readonly Plan[];
      /** The finding that says why there is no figure, where it is not the usual one. */
      readonly fault?: FindingCode;
    };

export const constantPlan = (value: number): Plan => ({ op: 'constant', value });

/** The plan plus a constant; constants are folded. */
export function shiftPlan(plan: Plan, by: number): Plan {
  if (by === 0) return plan;
  if (plan.op === 'constant') return constantPlan(plan.value + by);
  if (plan.op === 'sum') return { ...plan, constant: plan.constant + by };
  return { op: 'sum', terms: [{ coefficient: 1, plan }], constant: by };
}

/** The plan times a constant. */
export function scalePlan(plan: Plan, by: number): Plan {
  if (by === 1) return plan;
  if (plan.op === 'constant') return constantPlan(plan.value * by);
  if (plan.op === 'sum')
    return {
      op: 'sum',
      terms: plan.terms.map(({ coefficient, plan: term }) => ({ coefficient: coefficient * by, plan: term })),
      constant: plan.constant * by,
    };
  return { op: 'sum', terms: [{ coefficient: by, plan }], constant: 0 };
}

/** Where figures lie; the array may be replaced when it grows. */
export interface Figures {
  values: Float64Array;
}

/** Ten times the common logarithm of a power; NaN where there is none. */
const decibelsOf = (value: number): number => (value > 0 ? 10 * Math.log10(value) : NaN);
const decibelsOrNoPower = (value: number): number => (value === 0 ? -Infinity : decibelsOf(value));

/** Evaluates a plan once, without compiling it. */
export function evaluatePlan(plan: Plan, figures: Figures): number {
  return compilePlan(plan, figures)();
}

/**
 * Compiles a plan to a closure that reads `figures` and returns the figure.
 * Sums of a few slots, the bulk of a budget, get closures of their own; everything else is nested closures.
 */
export function compilePlan(plan: Plan, figures: Figures): () => number {
  switch (plan.op) {
    case 'constant': {
      const { value } = plan;
      return () => value;
    }
    case 'slot': {
      const { slot } = plan;
      return () => figures.values[slot] as number;
    }
    case 'sum':
      return compileSum(plan.terms, plan.constant, figures);
    case 'product': {
      const left = compilePlan(plan.left, figures);
      const right = compilePlan(plan.right, figures);
      return () => left() * right();
    }
    case 'quotient': {
      const left = compilePlan(plan.left, figures);
      const right = compilePlan(plan.right, figures);
      return () => left() / right();
    }
    case 'power': {
      const left = compilePlan(plan.left, figures);
      const right = compilePlan(plan.right, figures);
      return () => left() ** right();
    }
    case 'decibels': {
      const of = compilePlan(plan.of, figures);
      return plan.zeroIsNoPower ? () => decibelsOrNoPower(of()) : () => decibelsOf(of());
    }
    case 'linear': {
      const of = compilePlan(plan.of, figures);
      return () => 10 ** (of() / 10);
    }
    case 'compare':
      return compileComparison(plan.comparison, compilePlan(plan.left, figures), compilePlan(plan.right, figures));
    case 'choose': {
      const condition = compilePlan(plan.condition, figures);
      const then = compilePlan(plan.then, figures);
      const otherwise = compilePlan(plan.otherwise, figures);
      return () => {
        const met = condition();
        return Number.isNaN(met) ? NaN : met !== 0 ? then() : otherwise();
      };
    }
    case 'apply': {
      const { compute } = plan;
      const [a, b] = plan.parameters.map((parameter) => compilePlan(parameter, figures));
      if (a !== undefined && plan.parameters.length === 1) return () => compute(a());
      if (a !== undefined && b !== undefined && plan.parameters.length === 2) return () => compute(a(), b());
      const parameters = plan.parameters.map((parameter) => compilePlan(parameter, figures));
      return () => compute(...parameters.map((parameter) => parameter()));
    }
  }
}

function compileSum(terms: readonly PlanTerm[], constant: number, figures: Figures): () => number {
  const slots = terms.map(({ plan }) => (plan.op === 'slot' ? plan.slot : -1));
  const isUnit = terms.every(({ coefficient }) => coefficient === 1 || coefficient === -1);
  const [a = -1, b = -1, c = -1] = slots;
  const [ka = 1, kb = 1, kc = 1] = terms.map(({ coefficient }) => coefficient);
  if (isUnit && slots.every((slot) => slot >= 0)) {
    if (slots.length === 1 && ka === 1) return () => (figures.values[a] as number) + constant;
    if (slots.length === 2 && constant === 0 && ka === 1 && kb === 1)
      return () => (figures.values[a] as number) + (figures.values[b] as number);
    if (slots.length === 2 && constant === 0 && ka === 1 && kb === -1)
      return () => (figures.values[a] as number) - (figures.values[b] as number);
    if (slots.length === 2)
      return () => ka * (figures.values[a] as number) + kb * (figures.values[b] as number) + constant;
    if (slots.length === 3)
      return () =>
        ka * (figures.values[a] as number) +
        kb * (figures.values[b] as number) +
        kc * (figures.values[c] as number) +
        constant;
  }
  const coefficients = terms.map(({ coefficient }) => coefficient);
  const compiled = terms.map(({ plan }) => compilePlan(plan, figures));
  return () => {
    let sum = 0;
    for (let i = 0; i < compiled.length; i++) sum += (coefficients[i] as number) * (compiled[i] as () => number)();
    return sum + constant;
  };
}

function compileComparison(comparison: Comparison, left: () => number, right: () => number): () => number {
  const compare = (test: (a: number, b: number) => boolean) => (): number => {
    const a = left();
    const b = right();
    return Number.isNaN(a) || Number.isNaN(b) ? NaN : test(a, b) ? 1 : 0;
  };
  switch (comparison) {
    case '=':
      return compare((a, b) => a === b);
    case '<>':
      return compare((a, b) => a !== b);
    case '<':
      return compare((a, b) => a < b);
    case '>':
      return compare((a, b) => a > b);
    case '<=':
      return compare((a, b) => a <= b);
    case '>=':
      return compare((a, b) => a >= b);
  }
}

/** Calls `visit` for every slot that the plan reads. */
export function slotsOf(plan: Plan, visit: (slot: number) => void): void {
  switch (plan.op) {
    case 'constant':
      return;
    case 'slot':
      visit(plan.slot);
      return;
    case 'sum':
      for (const term of plan.terms) slotsOf(term.plan, visit);
      return;
    case 'decibels':
    case 'linear':
      slotsOf(plan.of, visit);
      return;
    case 'choose':
      slotsOf(plan.condition, visit);
      slotsOf(plan.then, visit);
      slotsOf(plan.otherwise, visit);
      return;
    case 'apply':
      for (const parameter of plan.parameters) slotsOf(parameter, visit);
      return;
    default:
      slotsOf(plan.left, visit);
      slotsOf(plan.right, visit);
  }
}

/** Plans: the compiled closures against plain interpretation, the slots that a plan reads, and the constants folded into it. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  compilePlan,
  constantPlan,
  evaluatePlan,
  scalePlan,
  shiftPlan,
  slotsOf,
  type Comparison,
  type Plan,
} from '../../src/formula';

const figures = { values: Float64Array.from([1.5, -2, 0, 40, NaN, -Infinity, 0.25, 1000]) };

const leaf: fc.Arbitrary<Plan> = fc.oneof(
  fc.integer({ min: 0, max: figures.values.length - 1 }).map((slot): Plan => ({ op: 'slot', slot })),
  fc.double({ min: -50, max: 50, noNaN: true }).map(constantPlan),
);

const coefficients = fc.constantFrom(1, 1, 1, -1, -1, 2, -3, 0.5, 0);

const plans: fc.Arbitrary<Plan> = fc.letrec<{ plan: Plan }>((tie) => {
  const two = fc.tuple(tie('plan'), tie('plan'));
  return {
    plan: fc.oneof(
      { depthSize: 'small', withCrossShrink: true },
      leaf,
      fc
        .tuple(
          fc.array(fc.record({ coefficient: coefficients, plan: tie('plan') }), { minLength: 1, maxLength: 4 }),
          fc.constantFrom(0, 0, 3, -1.5),
        )
        .map(([terms, constant]): Plan => ({ op: 'sum', terms, constant })),
      two.map(([left, right]): Plan => ({ op: 'product', left, right })),
      two.map(([left, right]): Plan => ({ op: 'quotient', left, right })),
      two.map(([left, right]): Plan => ({ op: 'power', left, right })),
      fc.tuple(tie('plan'), fc.boolean()).map(([of, zeroIsNoPower]): Plan => ({ op: 'decibels', of, zeroIsNoPower })),
      tie('plan').map((of): Plan => ({ op: 'linear', of })),
      fc
        .tuple(fc.constantFrom<Comparison>('=', '<>', '<', '>', '<=', '>='), two)
        .map(([comparison, [left, right]]): Plan => ({ op: 'compare', comparison, left, right })),
      fc
        .tuple(tie('plan'), two)
        .map(([condition, [then, otherwise]]): Plan => ({ op: 'choose', condition, then, otherwise })),
      fc.array(tie('plan'), { minLength: 1, maxLength: 4 }).map((parameters): Plan => ({
        op: 'apply',
        name: 'least',
        compute: (...values) => Math.min(...values),
        parameters,
      })),
    ),
  };
}).plan;

/** The meaning of a plan, in the plainest way. */
function interpret(plan: Plan): number {
  switch (plan.op) {
    case 'constant':
      return plan.value;
    case 'slot':
      return figures.values[plan.slot] ?? NaN;
    case 'sum':
      return (
        plan.terms.reduce((sum, { coefficient, plan: term }) => sum + coefficient * interpret(term), 0) + plan.constant
      );
    case 'product':
      return interpret(plan.left) * interpret(plan.right);
    case 'quotient':
      return interpret(plan.left) / interpret(plan.right);
    case 'power':
      return interpret(plan.left) ** interpret(plan.right);
    case 'decibels': {
      const value = interpret(plan.of);
      return value > 0 ? 10 * Math.log10(value) : value === 0 && plan.zeroIsNoPower ? -Infinity : NaN;
    }
    case 'linear':
      return 10 ** (interpret(plan.of) / 10);
    case 'compare': {
      const [left, right] = [interpret(plan.left), interpret(plan.right)];
      if (Number.isNaN(left) || Number.isNaN(right)) return NaN;
      const holds = {
        '=': left === right,
        '<>': left !== right,
        '<': left < right,
        '>': left > right,
        '<=': left <= right,
        '>=': left >= right,
      };
      return holds[plan.comparison] ? 1 : 0;
    }
    case 'choose': {
      const condition = interpret(plan.condition);
      return Number.isNaN(condition) ? NaN : interpret(condition === 0 ? plan.otherwise : plan.then);
    }
    case 'apply':
      return plan.compute(...plan.parameters.map(interpret));
  }
}

/** Equal, both withheld, or equal but for the sign of zero. */
const agrees = (a: number, b: number): boolean => a === b || (Number.isNaN(a) && Number.isNaN(b));

describe('plans', () => {
  it('compiled give what plain interpretation gives', () => {
    fc.assert(
      fc.property(plans, (plan) => {
        const compiled = compilePlan(plan, figures)();
        expect([compiled, agrees(compiled, interpret(plan))]).toEqual([compiled, true]);
        expect(Object.is(evaluatePlan(plan, figures), compiled)).toBe(true);
      }),
      { numRuns: 1000 },
    );
  });

  it('compiled read the figures of the moment', () => {
    const own = { values: Float64Array.from([1, 2]) };
    const run = compilePlan(
      {
        op: 'sum',
        terms: [
          { coefficient: 1, plan: { op: 'slot', slot: 0 } },
          { coefficient: -1, plan: { op: 'slot', slot: 1 } },
        ],
        constant: 0,
      },
      own,
    );
    expect(run()).toBe(-1);
    own.values = Float64Array.from([7, 2]);
    expect(run()).toBe(5);
  });

  it('name every slot that they read, and no other', () => {
    fc.assert(
      fc.property(plans, (plan) => {
        const slots = new Set<number>();
        slotsOf(plan, (slot) => slots.add(slot));
        const moved = { values: figures.values.map((value, slot) => (slots.has(slot) ? value : value + 17)) };
        expect(agrees(evaluatePlan(plan, moved), evaluatePlan(plan, figures))).toBe(true);
      }),
      { numRuns: 300 },
    );
  });

  it('shifted and scaled by constants are the same sum', () => {
    fc.assert(
      fc.property(plans, fc.constantFrom(0, 1, -30, 2.5), fc.constantFrom(1, 2, -1, 0.5), (plan, by, factor) => {
        const value = interpret(plan);
        fc.pre(Number.isFinite(value) && Math.abs(value) < 1e9);
        expect(evaluatePlan(shiftPlan(plan, by), figures)).toBeCloseTo(value + by, 5);
        expect(evaluatePlan(scalePlan(plan, factor), figures)).toBeCloseTo(value * factor, 5);
      }),
      { numRuns: 300 },
    );
  });

  it('shifted by nothing and scaled by one are themselves', () => {
    const plan: Plan = { op: 'slot', slot: 3 };
    expect([shiftPlan(plan, 0), scalePlan(plan, 1)]).toEqual([plan, plan]);
    expect([shiftPlan(constantPlan(2), 3), scalePlan(constantPlan(2), 3)]).toEqual([constantPlan(5), constantPlan(6)]);
  });
});

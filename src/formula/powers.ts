/** Powers: xⁿ of linear quantities, and the idiom 10^(x/10), which is the linear value of decibels. */
import {
  combineMeanings,
  isDimensionless,
  NEUTRAL,
  NO_DIMENSION,
  raiseDimension,
  UNSAID,
  type Dimension,
} from '../quantity';
import type { Check } from './check';
import { broken, type Context } from './context';
import { describeType, termsOf } from './forms';
import { sayHandConversion } from './hand-conversion';
import { consume } from './judge';
import { scalePlan, shiftPlan } from './plan';
import { decibelSum, scaleTerms } from './sums';
import type { BinaryTree } from './tree';
import type { Checked, DecibelType, LinearType } from './types';

/** Checks `a ^ b`. */
export function checkPower(tree: BinaryTree, context: Context, check: Check): Checked {
  const base = check(tree.left, context);
  const exponent = check(tree.right, context);
  if (base.type.form === 'broken' || exponent.type.form === 'broken') return broken(tree);
  if (exponent.type.form === 'decibel') return powerOfTen(tree, base, { ...exponent, type: exponent.type }, context);
  if (base.type.form === 'decibel' || base.type.form === 'rate')
    return context.stop('decibels-multiplied', tree, {
      facts: {
        what: `${context.textOf(base.tree)} is in decibels and is raised to a power; decibels are multiplied where powers are raised`,
      },
      repairs:
        base.type.form === 'decibel'
          ? [context.rewrite(tree, `lin(${context.textOf(base.tree)}) ^ ${context.textOf(exponent.tree)}`)]
          : [],
    });
  if (base.constant === 10 && tree.right.type === 'literal' && tree.right.unit !== null)
    return context.stop('unit-mismatch', exponent.tree, {
      facts: {
        what: `The exponent ${context.textOf(exponent.tree)}`,
        found: describeType(exponent.type),
        declared: 'a plain number',
      },
      repairs: [context.rewrite(tree, `1e${context.textOf(exponent.tree)}`)],
    });
  if (base.type.form !== 'linear' || exponent.type.form !== 'linear' || !isDimensionless(exponent.type.dimension))
    return context.stop(
      exponent.type.form === 'linear' && base.type.form === 'linear' ? 'unit-mismatch' : 'wrong-arguments',
      exponent.tree,
      {
        facts: {
          what: `The exponent ${context.textOf(exponent.tree)}`,
          found: describeType(exponent.type),
          declared: 'a plain number',
        },
        repairs: [],
      },
    );
  return raise(tree, { ...base, type: base.type }, exponent, context);
}

function raise(tree: BinaryTree, base: Checked & { type: LinearType }, exponent: Checked, context: Context): Checked {
  const plan = { op: 'power', left: base.plan, right: exponent.plan } as const;
  const parts = [base, exponent];
  const n = exponent.constant;
  if (n === undefined) {
    if (!isDimensionless(base.type.dimension))
      return context.stop('unit-mismatch', tree, {
        facts: {
          what: `${context.textOf(base.tree)}, raised to a power that is not a bare number,`,
          found: describeType(base.type),
          declared: 'a plain number',
        },
        repairs: [],
      });
    const type: LinearType = {
      form: 'linear',
      dimension: NO_DIMENSION,
      degree: 0,
      sort: 'pure',
      meaning: base.constant === undefined ? undefined : UNSAID,
    };
    return { tree, type, plan, parts };
  }
  const type: LinearType = {
    form: 'linear',
    dimension: raiseDimension(base.type.dimension, n),
    degree: base.type.degree * n,
    sort: base.type.sort === 'figure' ? 'pure' : base.type.sort,
    meaning: base.type.meaning === undefined ? undefined : combineMeanings(NEUTRAL, base.type.meaning, n),
  };
  const constant = base.constant === undefined ? undefined : base.constant ** n;
  return { tree, type, plan, constant, parts };
}

/**
 * 10^(X/10) is lin(X), and 10^(X/20) its root: with E = X/10 the power 10^E is q_E^10, whatever sum X is.
 * Only decibels divided by 10 or 20 (or times 0.1 or 0.05) are taken; anything else is a mistake.
 */
function powerOfTen(
  tree: BinaryTree,
  base: Checked,
  exponent: Checked & { type: DecibelType },
  context: Context,
): Checked {
  const { type } = exponent;
  const text = context.textOf(exponent.tree);
  const dimension = raiseDimension(type.dimension, 10);
  const wholes = type.scale * 20;
  const isTenth = Math.abs(wholes - Math.round(wholes)) < 1e-9 && wholes < 19.5;
  const isPath = isDimensionless(dimension) && type.scale <= 0.1 + 1e-9;
  if (base.constant !== 10 || !(isTenth || isPath)) {
    return context.stop('decibels-multiplied', tree, {
      facts: { what: `${text} is in decibels and stands in an exponent` },
      repairs: [
        context.rewrite(tree, base.constant === 10 ? `lin(${text})` : `${context.textOf(base.tree)} ^ lin(${text})`),
      ],
    });
  }
  // The sum counts once, whether it was divided by 10 or by 20.
  const terms = scaleTerms(termsOf(exponent, text), 1 / type.scale);
  const whole = consume({ ...decibelSum(exponent.tree, terms, []), tree: exponent.tree }, context);
  if (whole.type.form === 'broken') return broken(tree);
  const divisor = Math.round(1 / type.scale);
  sayHandConversion(exponent.tree, terms, 0, context, (quantity) => `(${quantity}/${String(divisor)})`);
  const meaning = type.meaning === undefined ? undefined : combineMeanings(NEUTRAL, type.meaning, 10);
  const result: LinearType = {
    form: 'linear',
    dimension: snapped(dimension),
    degree: isDimensionless(dimension) ? Math.round(wholes) : 0,
    sort: 'ratio',
    meaning,
    bandwidth: type.bandwidth,
    noiseTemperature: type.noiseTemperature,
    unitHint: termsOf(exponent, text).find(({ type: { unitHint } }) => unitHint !== undefined)?.type.unitHint,
  };
  return {
    tree,
    type: result,
    plan: { op: 'linear', of: scalePlan(shiftPlan(exponent.plan, type.offsetDb), 10) },
    reference: 10 ** type.offsetDb,
    parts: [exponent],
  };
}

/** Exponents that rounding has moved off whole and half numbers, put back. */
function snapped(dimension: Dimension): Dimension {
  const half = (n: number): number => (Math.abs(n * 2 - Math.round(n * 2)) < 1e-9 ? Math.round(n * 2) / 2 : n);
  return [half(dimension[0]), half(dimension[1]), half(dimension[2]), half(dimension[3]), half(dimension[4])];
}

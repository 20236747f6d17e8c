/**
 * Products and quotients: of linear quantities, multiples of decibels, rates times lengths, and the idioms 10·log10(x) and
 * 20·log10(x), which are decibels of x and of x².
 */
import {
  AREA,
  combineDimensions,
  combineMeanings,
  ENTROPY,
  FREQUENCY,
  isDimensionless,
  isRootPower,
  LENGTH,
  NEUTRAL,
  NO_DIMENSION,
  POWER_DENSITY,
  sameDimension,
  sameMeaning,
  TEMPERATURE,
  UNSAID,
  type Dimension,
} from '../quantity';
import type { Check } from './check';
import { asFactor, broken, type Context } from './context';
import { describeType, termsOf } from './forms';
import { shiftPlan, type Plan } from './plan';
import { sayReferenceTwice } from './hand-conversion';
import { checkLogarithmIdiom } from './logarithms';
import { decibelSum, scaleTerms } from './sums';
import type { BinaryTree, Tree } from './tree';
import type { Checked, DecibelType, LinearType, NumberSort, Origin } from './types';

/** Checks `a * b`. */
export function checkProduct(tree: BinaryTree, context: Context, check: Check): Checked {
  const idiom = checkLogarithmIdiom(tree, context, check);
  if (idiom !== undefined) return idiom;
  const left = check(tree.left, context);
  const right = check(tree.right, context);
  if (left.type.form === 'broken' || right.type.form === 'broken') return broken(tree);
  if (left.type.form === 'linear' && right.type.form === 'linear')
    return multiplyLinear(tree, { ...left, type: left.type }, { ...right, type: right.type }, 1, context);
  const [factor, other] = left.type.form === 'linear' ? [left, right] : [right, left];
  if (factor.type.form === 'linear' && other.type.form === 'decibel')
    return multiplyDecibel(tree, { ...factor, type: factor.type }, { ...other, type: other.type }, false, context);
  if (factor.type.form === 'linear' && other.type.form === 'rate')
    return multiplyRate(tree, { ...factor, type: factor.type }, other, context);
  return refuse(tree, left, right, context);
}

/** Checks `a / b`. */
export function checkQuotient(tree: BinaryTree, context: Context, check: Check): Checked {
  const left = check(tree.left, context);
  const right = check(tree.right, context);
  if (left.type.form === 'broken' || right.type.form === 'broken') return broken(tree);
  if (left.type.form === 'linear' && right.type.form === 'linear')
    return multiplyLinear(tree, { ...left, type: left.type }, { ...right, type: right.type }, -1, context);
  if (left.type.form === 'decibel' && right.type.form === 'linear')
    return multiplyDecibel(tree, { ...right, type: right.type }, { ...left, type: left.type }, true, context);
  if (left.type.form === 'decibel' && right.type.form === 'decibel' && bothPlainDecibels(left.type, right.type))
    return {
      tree,
      type: { form: 'linear', dimension: NO_DIMENSION, degree: 0, sort: 'pure', meaning: UNSAID },
      plan: { op: 'quotient', left: left.plan, right: right.plan },
      parts: [left, right],
    };
  if (left.type.form === 'rate' && right.type.form === 'linear' && isDimensionless(right.type.dimension))
    return {
      tree,
      type: left.type,
      plan: { op: 'quotient', left: left.plan, right: right.plan },
      parts: [left, right],
    };
  return refuse(tree, left, right, context);
}

const bothPlainDecibels = (a: DecibelType, b: DecibelType): boolean =>
  isDimensionless(a.dimension) && isDimensionless(b.dimension);

type Linear = Checked & { readonly type: LinearType };
type Decibel = Checked & { readonly type: DecibelType };

function multiplyLinear(tree: BinaryTree, left: Linear, right: Linear, exponent: 1 | -1, context: Context): Checked {
  const written = exponent === 1 ? (timesItsReference(left, right) ?? timesItsReference(right, left)) : undefined;
  if (written !== undefined) return { ...written, tree, parts: [left, right] };
  if (right.constant !== undefined) sayReferenceTwice(tree, left, right.constant ** exponent, context);
  if (left.constant !== undefined && exponent === 1) sayReferenceTwice(tree, right, left.constant, context);
  const dimension = combineDimensions(left.type.dimension, right.type.dimension, exponent);
  const type: LinearType = {
    form: 'linear',
    dimension,
    degree: degreeOf(left.type, right.type, exponent, dimension),
    sort: sortOf(left.type, right.type, exponent),
    meaning:
      left.type.meaning === undefined || right.type.meaning === undefined
        ? undefined
        : combineMeanings(left.type.meaning, right.type.meaning, exponent),
    unitHint: [left.type, right.type].find(
      (part) => sameDimension(part.dimension, dimension) && part.unitHint !== undefined,
    )?.unitHint,
    bandwidth: exponent === 1 ? bandwidthOfProduct(left, right, context) : undefined,
    noiseTemperature: exponent === 1 ? temperatureOfProduct(left, right, context) : undefined,
  };
  const constant =
    left.constant === undefined || right.constant === undefined
      ? undefined
      : left.constant * right.constant ** exponent;
  const plan: Plan = { op: exponent === 1 ? 'product' : 'quotient', left: left.plan, right: right.plan };
  return { tree, type, plan, constant, parts: [left, right] };
}

/** `1 mW * 10^(P/10)`, with P in dBm, as textbooks write it: the power itself, for P carries its reference already. */
function timesItsReference(literal: Linear, power: Linear): Checked | undefined {
  if (literal.tree.type !== 'literal' || power.reference === undefined || literal.plan.op !== 'constant')
    return undefined;
  const isSame = sameDimension(literal.type.dimension, power.type.dimension) && !isDimensionless(power.type.dimension);
  return isSame && Math.abs(literal.plan.value / power.reference - 1) < 1e-9 ? power : undefined;
}

/** Whether a dimensionless result is a ratio of fields (1), of powers (2) or neither. */
function degreeOf(left: LinearType, right: LinearType, exponent: 1 | -1, dimension: Dimension): number {
  if (!isDimensionless(dimension)) return 0;
  if (isDimensionless(left.dimension)) return left.degree + exponent * right.degree;
  if (isRootPower(left.dimension)) return 1;
  return [FREQUENCY, LENGTH, AREA].some((neutral) => sameDimension(left.dimension, neutral)) ? 0 : 2;
}

function sortOf(left: LinearType, right: LinearType, exponent: 1 | -1): NumberSort {
  const isPlain = isDimensionless(left.dimension) && isDimensionless(right.dimension);
  if (!isPlain || left.sort === 'ratio' || right.sort === 'ratio') return 'ratio';
  // A multiple of a logarithm is a decibel figure if anything; a product of logarithms, or a quotient by one, is a number.
  if (right.sort === 'figure') return exponent === 1 && left.sort === 'pure' ? 'figure' : 'pure';
  return left.sort;
}

const DENSITIES = [POWER_DENSITY, ENTROPY];

/** The bandwidth that a linear density has been multiplied by. */
function bandwidthOfProduct(left: Linear, right: Linear, context: Context): Origin | undefined {
  for (const [width, density] of [
    [left, right],
    [right, left],
  ] as const) {
    if (
      sameDimension(width.type.dimension, FREQUENCY) &&
      DENSITIES.some((known) => sameDimension(known, density.type.dimension))
    )
      return originOf(width, context);
  }
  return left.type.bandwidth ?? right.type.bandwidth;
}

function temperatureOfProduct(left: Linear, right: Linear, context: Context): Origin | undefined {
  for (const [temperature, boltzmann] of [
    [left, right],
    [right, left],
  ] as const) {
    const isBoltzmann = boltzmann.tree.type === 'symbol' && boltzmann.tree.name === 'k_B';
    if (isBoltzmann && sameDimension(temperature.type.dimension, TEMPERATURE)) return originOf(temperature, context);
  }
  return left.type.noiseTemperature ?? right.type.noiseTemperature;
}

/** An attribute taken from a linear part. */
export function originOf(part: { readonly tree: Tree; readonly plan: Plan }, context: Context): Origin {
  return { key: JSON.stringify(part.plan), text: context.textOf(part.tree), plan: part.plan };
}

/** number × decibel: a power of the quantity; figures and exponents scale. */
function multiplyDecibel(
  tree: BinaryTree,
  factor: Linear,
  decibel: Decibel,
  divide: boolean,
  context: Context,
): Checked {
  if (!isDimensionless(factor.type.dimension)) {
    if (divide && sameDimension(factor.type.dimension, LENGTH) && isDimensionless(decibel.type.dimension))
      return {
        tree,
        type: { form: 'rate', lengthM: 1 },
        plan: { op: 'quotient', left: decibel.plan, right: factor.plan },
        parts: [decibel, factor],
      };
    return divide ? refuse(tree, decibel, factor, context) : refuse(tree, factor, decibel, context);
  }
  if (factor.constant !== undefined) {
    const by = divide ? 1 / factor.constant : factor.constant;
    if (!Number.isFinite(by))
      return context.stop('not-finite', tree, {
        facts: { what: context.textOf(tree), because: 'a division by zero' },
        repairs: [],
      });
    return {
      ...decibelSum(tree, scaleTerms(termsOf(decibel, context.textOf(decibel.tree)), by), [factor, decibel]),
      ...(by > 0 ? kept(decibel) : {}),
    };
  }
  const neutral = decibel.type.meaning !== undefined && sameMeaning(decibel.type.meaning, NEUTRAL);
  if (!isDimensionless(decibel.type.dimension))
    return context.stop('decibels-multiplied', tree, {
      facts: {
        what: `${context.textOf(decibel.tree)} is a level of ${describeType(decibel.type)} and can be multiplied only by a bare number, since its dimension is raised to it`,
      },
      repairs: [
        context.rewrite(
          tree,
          `${asFactor(factor.tree, context.textOf(factor.tree))} ${divide ? '/' : '*'} lin(${context.textOf(decibel.tree)})`,
        ),
      ],
    });
  const full = shiftPlan(decibel.plan, decibel.type.offsetDb);
  const plan: Plan = divide
    ? { op: 'quotient', left: full, right: factor.plan }
    : { op: 'product', left: factor.plan, right: full };
  const type: DecibelType = {
    ...decibel.type,
    meaning: neutral ? decibel.type.meaning : undefined,
    offsetDb: 0,
    unitHint: undefined,
    bandwidth: undefined,
    noiseTemperature: undefined,
  };
  return { tree, type, plan, ...kept(decibel), parts: [factor, decibel] };
}

/** A multiple of a loss is a loss. */
const kept = (decibel: Decibel): Pick<Checked, 'kind' | 'isDeclared'> => ({
  kind: decibel.kind,
  isDeclared: decibel.isDeclared,
});

function multiplyRate(tree: BinaryTree, factor: Linear, rate: Checked, context: Context): Checked {
  if (rate.type.form !== 'rate') return broken(tree);
  if (isDimensionless(factor.type.dimension))
    return {
      tree,
      type: rate.type,
      plan: { op: 'product', left: factor.plan, right: rate.plan },
      parts: [factor, rate],
    };
  if (!sameDimension(factor.type.dimension, LENGTH)) return refuse(tree, rate, factor, context);
  const lengths: Plan =
    rate.type.lengthM === 1
      ? factor.plan
      : { op: 'quotient', left: factor.plan, right: { op: 'constant', value: rate.type.lengthM } };
  return {
    tree,
    type: { form: 'decibel', dimension: NO_DIMENSION, offsetDb: 0, scale: 1, meaning: NEUTRAL },
    plan: { op: 'product', left: rate.plan, right: lengths },
    kind: 'loss',
    isDeclared: true,
    parts: [rate, factor],
  };
}

/** Says why two things cannot be multiplied or divided, and what was probably meant. */
function refuse(tree: BinaryTree, left: Checked, right: Checked, context: Context): Checked {
  const rate = [left, right].find(({ type }) => type.form === 'rate');
  if (rate !== undefined) {
    const length = context.lengthTerm();
    return context.stop('rate-without-length', tree, {
      facts: {
        rate: context.textOf(rate.tree),
        where: `in a ${tree.operator === '*' ? 'product' : 'quotient'} with ${describeType(rate === left ? right.type : left.type)}`,
      },
      repairs: length === undefined ? [] : [context.rewrite(tree, `${context.textOf(rate.tree)} * ${length}`)],
    });
  }
  const odd = [left, right].find(({ type }) => type.form === 'truth' || type.form === 'text');
  if (odd !== undefined)
    return context.stop('wrong-arguments', odd.tree, {
      facts: {
        what: `${context.textOf(odd.tree)} is ${describeType(odd.type)} and cannot be ${tree.operator === '*' ? 'multiplied' : 'divided'}`,
      },
      repairs: [],
    });
  const both = left.type.form === 'decibel' && right.type.form === 'decibel';
  const verb = tree.operator === '*' ? 'multiplied' : 'divided';
  const asLinear = (part: Checked): string =>
    part.type.form === 'decibel' ? `lin(${context.textOf(part.tree)})` : asFactor(part.tree, context.textOf(part.tree));
  const added = `${context.textOf(left.tree)} ${tree.operator === '*' ? '+' : '-'} ${asFactor(right.tree, context.textOf(right.tree))}`;
  const linear = `${asLinear(left)} ${tree.operator} ${asLinear(right)}`;
  return context.stop('decibels-multiplied', tree, {
    facts: {
      what: both
        ? `${context.textOf(left.tree)} and ${context.textOf(right.tree)} are decibels and are ${verb}; decibels are added where powers are multiplied`
        : `${context.textOf(left.tree)} (${describeType(left.type)}) and ${context.textOf(right.tree)} (${describeType(right.type)}) are ${verb}, decibels with a linear quantity`,
    },
    repairs: both
      ? [context.rewrite(tree, tree === wholeOf(context, tree) ? added : `(${added})`), context.rewrite(tree, linear)]
      : [context.rewrite(tree, linear)],
  });
}

/** The tree itself when it is the whole entry, so that a repair needs no brackets. */
const wholeOf = (context: Context, tree: Tree): Tree | undefined =>
  context.textOf(tree).length === context.entry.trim().length ? tree : undefined;

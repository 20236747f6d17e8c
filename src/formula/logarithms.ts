/**
 * The idioms 10*log10(x) and 20*log10(x): decibels of x and of x², whatever the dimension of x; and logarithms over a written
 * reference, 10*log10(x/1 mW), which are levels where the line's unit asks for one.
 */
import { isDimensionless, NO_DIMENSION, raiseDimension } from '../quantity';
import type { Check } from './check';
import { asFactor, broken, type Context } from './context';
import { decibelsOf, describeType, isFieldLike, squared, termsOf } from './forms';
import { scalePlan, type Plan } from './plan';
import { decibelSum, scaleTerms } from './sums';
import type { BinaryTree, Tree } from './tree';
import type { Checked, DecibelType } from './types';

/** x/(1 u) inside a logarithm, u with a unit: the type of decibels of x over u, as ISO 80000-1 writes levels. */
export function overWrittenReference(argument: Checked, size: number): DecibelType | undefined {
  const { tree, type, parts } = argument;
  const [above, below] = parts;
  if (
    tree.type !== 'binary' ||
    tree.operator !== '/' ||
    above?.type.form !== 'linear' ||
    below?.tree.type !== 'literal'
  )
    return undefined;
  if (
    type.form !== 'linear' ||
    !isDimensionless(type.dimension) ||
    !(below.tree.figure > 0) ||
    below.plan.op !== 'constant'
  )
    return undefined;
  const field = isFieldLike(above.type);
  if (isDimensionless(above.type.dimension) || (size === 10 && field)) return undefined;
  // 20 log10 of a quantity that is no field stands for its square.
  const dimension = size === 20 ? raiseDimension(above.type.dimension, 2) : above.type.dimension;
  return {
    form: 'decibel',
    dimension,
    offsetDb: size * Math.log10(below.plan.value),
    scale: 1,
    meaning: size === 20 ? squared(above.type.meaning) : above.type.meaning,
    bandwidth: above.type.bandwidth,
    noiseTemperature: above.type.noiseTemperature,
  };
}

/** A literal number with its sign, or undefined. */
function literalFactor(tree: Tree): number | undefined {
  if (tree.type === 'literal' && tree.unit === null) return tree.figure;
  if (tree.type === 'negation') {
    const operand = literalFactor(tree.operand);
    return operand === undefined ? undefined : -operand;
  }
  if (tree.type === 'binary' && tree.operator === '*') {
    const left = literalFactor(tree.left);
    const right = literalFactor(tree.right);
    return left === undefined || right === undefined ? undefined : left * right;
  }
  return undefined;
}

const isLog10 = (tree: Tree): tree is Tree & { type: 'call' } =>
  tree.type === 'call' && tree.name === 'log10' && tree.parameters.length === 1;

/** 10*log10(x) and 20*log10(x), in either order and with either sign; undefined when the tree is no such thing. */
export function checkLogarithmIdiom(tree: BinaryTree, context: Context, check: Check): Checked | undefined {
  const [factorTree, log] = isLog10(tree.right) ? [tree.left, tree.right] : [tree.right, tree.left];
  if (!isLog10(log)) return undefined;
  const factor = literalFactor(factorTree);
  const argumentTree = log.parameters[0];
  if (factor === undefined || argumentTree === undefined) return undefined;
  const size = Math.abs(factor);
  if (size !== 10 && size !== 20) return undefined;
  const argument = check(argumentTree, context);
  const text = context.textOf(argumentTree);
  if (argument.type.form === 'decibel')
    return context.stop('decibels-multiplied', tree, {
      facts: { what: `${text} is in decibels already, and its logarithm is taken` },
      repairs: [context.rewrite(tree, asFactor(argumentTree, text))],
    });
  if (argument.type.form !== 'linear') return argument.type.form === 'broken' ? broken(tree) : undefined;
  const { type } = argument;
  if (size === 10 && isFieldLike(type)) {
    if (!isDimensionless(type.dimension))
      return context.stop('log-of-dimension', tree, {
        facts: {
          function: '10*log10, which is the decibel of a power,',
          argument: text,
          found: `${describeType(type)}, a voltage, current or field`,
        },
        repairs: [context.rewrite(tree, `db(${text})`)],
      });
    context.say('field-ratio-in-power-log', tree, {
      facts: { what: context.textOf(tree) },
      repairs: [context.rewrite(tree, `${factor < 0 ? '-' : ''}db(${text})`)],
    });
  }
  const decibels: Plan = { op: 'decibels', of: argument.plan, zeroIsNoPower: false };
  const isHalf = size === 10;
  const result =
    isHalf && !isFieldLike(type)
      ? decibelsOf({ type, plan: argument.plan }, false)
      : {
          type: {
            form: 'decibel' as const,
            dimension: isHalf ? NO_DIMENSION : raiseDimension(type.dimension, 2),
            offsetDb: 0,
            scale: 1,
            meaning: isHalf ? type.meaning : squared(type.meaning),
          },
          plan: isHalf ? decibels : scalePlan(decibels, 2),
        };
  const decibel: Checked = { tree, ...result, overReference: overWrittenReference(argument, size), parts: [argument] };
  return factor < 0 ? decibelSum(tree, scaleTerms(termsOf(decibel, context.textOf(tree)), -1), [argument]) : decibel;
}

/** Functions over several quantities: extremes, conditions, sums, means, interpolation. */
import { isDimensionless } from '../../quantity';
import { align } from '../alignment';
import { broken, type Context } from '../context';
import { describeType } from '../forms';
import { constantPlan, type Plan } from '../plan';
import { addParts } from '../sums';
import type { CallTree } from '../tree';
import type { Checked, Type } from '../types';
import { quantityParameter, type StructuralFunction } from './entry';
import { apply, commonKind, commonMeaning, SOURCE, type Compute } from './mathematics-shared';

export const extreme = (name: 'min' | 'max', text: string, compute: Compute, example: string): StructuralFunction => ({
  form: 'structural',
  name,
  group: 'Mathematics',
  parameters: [quantityParameter('x', 'quantities of one dimension and form')],
  repeats: 1,
  text,
  formula: `${name}(x₁, x₂, …)`,
  source: SOURCE,
  result: 'of the kind of the arguments',
  example,
  check: (tree, operands, context) => aligned(tree, operands, context, name, compute),
});

function aligned(
  tree: CallTree,
  operands: readonly Checked[],
  context: Context,
  name: string,
  compute: Compute,
): Checked {
  const alignment = align(tree, operands, context, false);
  if (alignment === undefined) return broken(tree);
  const type: Type = {
    ...alignment.type,
    meaning: commonMeaning(operands),
    bandwidth: undefined,
    noiseTemperature: undefined,
  };
  return { tree, type, plan: apply(name, compute, alignment.plans), kind: commonKind(operands), parts: operands };
}

const truthPlan = (name: string, compute: Compute, operands: readonly Checked[]): Plan =>
  apply(
    name,
    (...values) => (values.some(Number.isNaN) ? NaN : compute(...values)),
    operands.map(({ plan }) => plan),
  );

export const logical = (
  name: string,
  text: string,
  compute: Compute,
  repeats: number,
  example: string,
): StructuralFunction => ({
  form: 'structural',
  name,
  group: 'Mathematics',
  parameters: [{ name: 'condition', text: 'a comparison', takes: 'condition', unit: '' }],
  repeats,
  text,
  formula: `${name}(condition${repeats > 0 ? ', …' : ''})`,
  source: SOURCE,
  result: 'yes or no',
  example,
  check: (tree, operands, context) => {
    if (operands.some(({ type }) => type.form === 'broken')) return broken(tree);
    const odd = operands.find((operand) => !isCondition(operand));
    if (odd !== undefined) return needsCondition(tree, odd, context);
    return { tree, type: { form: 'truth' }, plan: truthPlan(name, compute, operands), parts: operands };
  },
});

const isCondition = ({ type }: Checked): boolean =>
  type.form === 'truth' || (type.form === 'linear' && isDimensionless(type.dimension));

function needsCondition(tree: CallTree, operand: Checked, context: Context): Checked {
  return context.stop('wrong-arguments', operand.tree, {
    facts: {
      what: `${tree.name} asks for a comparison such as a > b; ${context.textOf(operand.tree)} is ${describeType(operand.type)}`,
    },
    repairs: [],
  });
}

export const choice: StructuralFunction = {
  form: 'structural',
  name: 'if',
  group: 'Mathematics',
  parameters: [
    { name: 'condition', text: 'a comparison', takes: 'condition', unit: '' },
    quantityParameter('then', 'the value when it holds'),
    quantityParameter('otherwise', 'the value when it does not, of the same dimension and form'),
  ],
  repeats: 0,
  text: 'One of two values, by a condition.',
  formula: 'if(condition, then, otherwise)',
  source: SOURCE,
  result: 'of the kind of the values',
  example: 'if(3 dB > 2 dB, 1 dB, 0 dB)',
  check: (tree, [condition, then, otherwise], context) => {
    if (condition === undefined || then === undefined || otherwise === undefined || condition.type.form === 'broken')
      return broken(tree);
    if (!isCondition(condition)) return needsCondition(tree, condition, context);
    const branches = [then, otherwise];
    const alignment = align(tree, branches, context, false);
    const [thenPlan, otherwisePlan] = alignment?.plans ?? [];
    if (alignment === undefined || thenPlan === undefined || otherwisePlan === undefined) return broken(tree);
    return {
      tree,
      type: { ...alignment.type, meaning: commonMeaning(branches), bandwidth: undefined, noiseTemperature: undefined },
      plan: { op: 'choose', condition: condition.plan, then: thenPlan, otherwise: otherwisePlan },
      kind: commonKind(branches),
      parts: [condition, then, otherwise],
    };
  },
};

export const total: StructuralFunction = {
  form: 'structural',
  judgesItself: true,
  name: 'sum',
  group: 'Mathematics',
  parameters: [quantityParameter('x', 'quantities that may be added')],
  repeats: 1,
  text: 'The same as writing + between the arguments, with the same checks.',
  formula: 'x₁ + x₂ + …',
  source: SOURCE,
  result: 'as for +',
  example: 'sum(1 dB, 2 dB, 3 dB)',
  check: (tree, operands, context) =>
    addParts(
      tree,
      operands.map((checked) => ({ sign: 1 as const, checked })),
      context,
    ),
};

export const average: StructuralFunction = {
  form: 'structural',
  name: 'mean',
  group: 'Mathematics',
  parameters: [quantityParameter('x', 'linear quantities of one dimension')],
  repeats: 1,
  text: 'Arithmetic mean; of decibels it is the mean of the figures, which is rarely meant: see meanpower.',
  formula: '(x₁ + … + xₙ)/n',
  source: SOURCE,
  result: 'of the kind of the arguments',
  example: 'mean(1, 2, 6)',
  check: (tree, operands, context) => {
    const mean = aligned(
      tree,
      operands,
      context,
      'mean',
      (...values) => values.reduce((sum, value) => sum + value, 0) / values.length,
    );
    if (mean.type.form === 'decibel')
      context.say('decibels-averaged', tree, {
        facts: {},
        repairs: [
          context.rewrite(tree, `meanpower(${operands.map((operand) => context.textOf(operand.tree)).join(', ')})`),
        ],
      });
    return mean;
  },
};

/** Linear interpolation between points given as x₁, y₁, x₂, y₂ …; NaN outside. */
function interpolateAt(x: number, ...points: number[]): number {
  for (let i = 0; i + 3 < points.length; i += 2) {
    const [x1 = NaN, y1 = NaN, x2 = NaN, y2 = NaN] = points.slice(i, i + 4);
    if (x >= Math.min(x1, x2) && x <= Math.max(x1, x2)) return x1 === x2 ? y1 : y1 + ((y2 - y1) * (x - x1)) / (x2 - x1);
  }
  return NaN;
}

export const interpolation: StructuralFunction = {
  form: 'structural',
  name: 'interpolate',
  group: 'Mathematics',
  parameters: [
    quantityParameter('x', 'where to read'),
    quantityParameter('x1', 'a point’s x'),
    quantityParameter('y1', 'its y'),
    quantityParameter('x2', 'the next point’s x'),
    quantityParameter('y2', 'its y'),
  ],
  repeats: 2,
  text: 'Linear interpolation between points in ascending order, in the form shown (decibels stay decibels).',
  formula: 'y₁ + (y₂ − y₁)(x − x₁)/(x₂ − x₁)',
  source: 'definition',
  result: 'of the kind of y',
  example: 'interpolate(2, 1, 0 dB, 3, 4 dB)',
  check: (tree, operands, context) => {
    const [x, ...points] = operands;
    if (x === undefined || points.length % 2 !== 0)
      return context.stop('wrong-arguments', tree, {
        facts: { what: 'interpolate takes x and then pairs of x and y' },
        repairs: [],
      });
    const xs = align(tree, [x, ...points.filter((_, index) => index % 2 === 0)], context, false);
    const ys = align(
      tree,
      points.filter((_, index) => index % 2 === 1),
      context,
      false,
    );
    if (xs === undefined || ys === undefined) return broken(tree);
    const plans = points.map(
      (_, index) => (index % 2 === 0 ? xs.plans[index / 2 + 1] : ys.plans[(index - 1) / 2]) ?? constantPlan(NaN),
    );
    return {
      tree,
      type: { ...ys.type, bandwidth: undefined, noiseTemperature: undefined },
      plan: apply('interpolate', interpolateAt, [xs.plans[0] ?? constantPlan(NaN), ...plans]),
      parts: operands,
    };
  },
};

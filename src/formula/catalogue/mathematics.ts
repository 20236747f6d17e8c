/** Mathematics: with the meanings of OASIS OpenFormula 1.3 where it has the function; angles are quantities. */
import {
  combineMeanings, isDimensionless, NEUTRAL, NO_DIMENSION, raiseDimension, sameMeaning, type Unit, findUnit,
} from '../../quantity';
import { align } from '../alignment';
import { broken, type Context } from '../context';
import { describeType } from '../forms';
import { constantPlan, type Plan } from '../plan';
import { addParts } from '../sums';
import type { CallTree } from '../tree';
import type { Checked, LinearType, Type } from '../types';
import { numberParameter, quantityParameter, type FunctionEntry, type StructuralFunction } from './entry';

const SOURCE = 'OASIS OpenFormula 1.3, part 4';

type Compute = (...values: number[]) => number;

const apply = (name: string, compute: Compute, parameters: readonly Plan[]): Plan => ({ op: 'apply', name, compute, parameters });

/** Refuses an argument that is not a plain number. */
function needsNumber(tree: CallTree, operand: Checked, context: Context): Checked {
  const text = context.textOf(operand.tree);
  if (operand.type.form === 'decibel')
    return context.stop('decibels-multiplied', tree, {
      facts: { what: `${text} is in decibels and stands in ${tree.name}` },
      repairs: [context.rewrite(operand.tree, `lin(${text})`)],
    });
  if (operand.type.form === 'linear') {
    const unit = operand.type.unitHint?.word ?? describeType(operand.type);
    return context.stop('log-of-dimension', tree, {
      facts: { function: tree.name, argument: text, found: describeType(operand.type) },
      repairs: [context.rewrite(operand.tree, `${text} / (1 ${unit})`)],
    });
  }
  return context.stop('wrong-arguments', tree, {
    facts: { what: `${tree.name} takes a plain number; ${text} is ${describeType(operand.type)}` },
    repairs: [],
  });
}

interface NumberFunction {
  readonly name: string;
  readonly text: string;
  readonly formula: string;
  readonly compute: Compute;
  readonly sort?: LinearType['sort'];
  readonly unit?: string;
  readonly example: string;
  readonly parameter?: string;
}

const angle = (): Unit | undefined => findUnit('rad');

/** Functions of one plain number. */
const ofNumber = ({ name, text, formula, compute, sort = 'pure', unit, example, parameter = 'x' }: NumberFunction): StructuralFunction => ({
  form: 'structural',
  name,
  group: 'Mathematics',
  parameters: [numberParameter(parameter, 'a plain number')],
  repeats: 0,
  text,
  formula,
  source: SOURCE,
  result: unit === 'rad' ? 'an angle' : 'a plain number',
  example,
  check: (tree, [operand], context) => {
    if (operand === undefined || operand.type.form === 'broken') return broken(tree);
    if (operand.type.form !== 'linear' || !isDimensionless(operand.type.dimension)) return needsNumber(tree, operand, context);
    const type: LinearType = {
      form: 'linear', dimension: NO_DIMENSION, degree: 0, sort, meaning: operand.constant === undefined ? undefined : NEUTRAL,
      unitHint: unit === 'rad' ? angle() : undefined,
    };
    const constant = operand.constant === undefined ? undefined : compute(operand.constant);
    return { tree, type, plan: apply(name, compute, [operand.plan]), constant: Number.isFinite(constant) ? constant : undefined, parts: [operand] };
  },
});

/** Functions that keep the type of their one argument: decibel ratios and linear quantities. */
const keepsType = (name: string, text: string, formula: string, compute: Compute, example: string, more: FunctionEntry['parameters'] = []): StructuralFunction => ({
  form: 'structural',
  name,
  group: 'Mathematics',
  parameters: [quantityParameter('x', 'a number, a linear quantity or a ratio in dB'), ...more],
  repeats: 0,
  text,
  formula,
  source: SOURCE,
  result: 'of the kind of x',
  example,
  check: (tree, [operand, digits], context) => {
    if (operand === undefined || operand.type.form === 'broken' || digits?.type.form === 'broken') return broken(tree);
    const isFigure = operand.type.form === 'decibel' && isDimensionless(operand.type.dimension);
    const isNumber = operand.type.form === 'linear' && (name === 'abs' || isDimensionless(operand.type.dimension));
    if (!isFigure && !isNumber)
      return context.stop('wrong-arguments', tree, {
        facts: { what: `${name} of ${describeType(operand.type)} depends on its reference; divide by a unit first` },
        repairs: [],
      });
    const constant = operand.constant === undefined || digits !== undefined ? undefined : compute(operand.constant);
    const parameters = digits === undefined ? [operand.plan] : [operand.plan, digits.plan];
    return { tree, type: withoutAttributes(operand.type), plan: apply(name, compute, parameters), constant, kind: operand.kind, parts: [operand] };
  },
});

function withoutAttributes(type: Type): Type {
  return type.form === 'decibel' || type.form === 'linear' ? { ...type, bandwidth: undefined, noiseTemperature: undefined } : type;
}

const roundTo = (x: number, digits = 0): number => {
  const factor = 10 ** Math.trunc(digits);
  // Halves away from zero, as OpenFormula has it.
  return (Math.sign(x) * Math.round(Math.abs(x) * factor)) / factor;
};

/** The common meaning of operands; undefined when they differ. */
export function commonMeaning(operands: readonly Checked[]): LinearType['meaning'] {
  const meanings = operands.map(({ type }) => (type.form === 'linear' || type.form === 'decibel' ? type.meaning : undefined));
  const [first] = meanings;
  return first !== undefined && meanings.every((meaning) => meaning !== undefined && sameMeaning(meaning, first)) ? first : undefined;
}

const commonKind = (operands: readonly Checked[]): Checked['kind'] =>
  operands.every(({ kind }) => kind === operands[0]?.kind) ? operands[0]?.kind : undefined;

const extreme = (name: 'min' | 'max', text: string, compute: Compute, example: string): StructuralFunction => ({
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

function aligned(tree: CallTree, operands: readonly Checked[], context: Context, name: string, compute: Compute): Checked {
  const alignment = align(tree, operands, context, false);
  if (alignment === undefined) return broken(tree);
  const type: Type = { ...alignment.type, meaning: commonMeaning(operands), bandwidth: undefined, noiseTemperature: undefined };
  return { tree, type, plan: apply(name, compute, alignment.plans), kind: commonKind(operands), parts: operands };
}

const truthPlan = (name: string, compute: Compute, operands: readonly Checked[]): Plan =>
  apply(name, (...values) => (values.some(Number.isNaN) ? NaN : compute(...values)), operands.map(({ plan }) => plan));

const logical = (name: string, text: string, compute: Compute, repeats: number, example: string): StructuralFunction => ({
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
    facts: { what: `${tree.name} asks for a comparison such as a > b; ${context.textOf(operand.tree)} is ${describeType(operand.type)}` },
    repairs: [],
  });
}

const choice: StructuralFunction = {
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
    if (condition === undefined || then === undefined || otherwise === undefined || condition.type.form === 'broken') return broken(tree);
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

const root: StructuralFunction = {
  form: 'structural',
  name: 'sqrt',
  group: 'Mathematics',
  parameters: [quantityParameter('x', 'a linear quantity')],
  repeats: 0,
  text: 'Square root; the dimension is halved.',
  formula: '√x',
  source: SOURCE,
  result: 'a linear quantity',
  example: 'sqrt(16)',
  check: (tree, [operand], context) => {
    if (operand === undefined || operand.type.form === 'broken') return broken(tree);
    if (operand.type.form !== 'linear') return needsNumber(tree, operand, context);
    const { dimension, degree, sort, meaning } = operand.type;
    const type: LinearType = {
      form: 'linear',
      dimension: raiseDimension(dimension, 0.5),
      degree: degree / 2,
      sort: sort === 'ratio' ? 'ratio' : 'pure',
      meaning: meaning === undefined ? undefined : combineMeanings(NEUTRAL, meaning, 0.5),
    };
    const constant = operand.constant === undefined ? undefined : Math.sqrt(operand.constant);
    return { tree, type, plan: apply('sqrt', Math.sqrt, [operand.plan]), constant, parts: [operand] };
  },
};

const total: StructuralFunction = {
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
  check: (tree, operands, context) => addParts(tree, operands.map((checked) => ({ sign: 1 as const, checked })), context),
};

const average: StructuralFunction = {
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
    const mean = aligned(tree, operands, context, 'mean', (...values) => values.reduce((sum, value) => sum + value, 0) / values.length);
    if (mean.type.form === 'decibel')
      context.say('decibels-averaged', tree, {
        facts: {},
        repairs: [context.rewrite(tree, `meanpower(${operands.map((operand) => context.textOf(operand.tree)).join(', ')})`)],
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

const interpolation: StructuralFunction = {
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
      return context.stop('wrong-arguments', tree, { facts: { what: 'interpolate takes x and then pairs of x and y' }, repairs: [] });
    const xs = align(tree, [x, ...points.filter((_, index) => index % 2 === 0)], context, false);
    const ys = align(tree, points.filter((_, index) => index % 2 === 1), context, false);
    if (xs === undefined || ys === undefined) return broken(tree);
    const plans = points.map((_, index) => (index % 2 === 0 ? xs.plans[index / 2 + 1] : ys.plans[(index - 1) / 2]) ?? constantPlan(NaN));
    return {
      tree,
      type: { ...ys.type, bandwidth: undefined, noiseTemperature: undefined },
      plan: apply('interpolate', interpolateAt, [xs.plans[0] ?? constantPlan(NaN), ...plans]),
      parts: operands,
    };
  },
};

const quadrant: StructuralFunction = {
  form: 'structural',
  name: 'atan2',
  group: 'Mathematics',
  parameters: [quantityParameter('x', 'the abscissa'), quantityParameter('y', 'the ordinate, of the same dimension')],
  repeats: 0,
  text: 'Angle of the point (x, y).',
  formula: 'atan2(x, y), with the order of OpenFormula',
  source: SOURCE,
  result: 'an angle',
  example: 'atan2(1, 1)',
  check: (tree, operands, context) => {
    const alignment = align(tree, operands, context, false);
    if (alignment === undefined) return broken(tree);
    if (alignment.type.form === 'decibel')
      return context.stop('decibels-multiplied', tree, { facts: { what: 'The arguments of atan2 are in decibels' }, repairs: [] });
    return {
      tree,
      type: { form: 'linear', dimension: NO_DIMENSION, degree: 0, sort: 'pure', meaning: NEUTRAL, unitHint: angle() },
      plan: apply('atan2', (x, y) => Math.atan2(y as number, x as number), alignment.plans),
      parts: operands,
    };
  },
};

const one = (compute: (x: number) => number): Compute => (x = NaN) => compute(x);

export const MATHEMATICS: readonly FunctionEntry[] = [
  keepsType('abs', 'Size without the sign.', '|x|', one(Math.abs), 'abs(-3)'),
  extreme('min', 'The least of its arguments.', Math.min, 'min(3 dBm, 1 dBm)'),
  extreme('max', 'The greatest of its arguments.', Math.max, 'max(3 dBm, 1 dBm)'),
  root,
  ofNumber({ name: 'exp', text: 'Exponential function.', formula: 'eˣ', compute: one(Math.exp), example: 'exp(1)' }),
  ofNumber({ name: 'ln', text: 'Natural logarithm of a plain number.', formula: 'ln x', compute: one((x) => (x > 0 ? Math.log(x) : NaN)), sort: 'figure', example: 'ln(10)' }),
  ofNumber({
    name: 'log10',
    text: 'Common logarithm of a plain number; 10*log10(x) and 20*log10(x) are understood as decibels of x and of x².',
    formula: 'log₁₀ x', compute: one((x) => (x > 0 ? Math.log10(x) : NaN)), sort: 'figure', example: 'log10(1000)',
  }),
  keepsType('round', 'Rounded to so many decimals, halves away from zero.', 'round(x, digits)', roundTo, 'round(2.345, 2)', [
    { ...numberParameter('digits', 'decimals'), default: '0' },
  ]),
  keepsType('floor', 'Rounded down to a whole number.', '⌊x⌋', one(Math.floor), 'floor(2.7)'),
  keepsType('ceil', 'Rounded up to a whole number.', '⌈x⌉', one(Math.ceil), 'ceil(2.1)'),
  ofNumber({ name: 'sin', text: 'Sine of an angle; a bare number is radians.', formula: 'sin x', compute: one(Math.sin), example: 'sin(30 deg)', parameter: 'angle' }),
  ofNumber({ name: 'cos', text: 'Cosine of an angle; a bare number is radians.', formula: 'cos x', compute: one(Math.cos), example: 'cos(60 deg)', parameter: 'angle' }),
  ofNumber({ name: 'tan', text: 'Tangent of an angle; a bare number is radians.', formula: 'tan x', compute: one(Math.tan), example: 'tan(45 deg)', parameter: 'angle' }),
  ofNumber({ name: 'asin', text: 'Angle whose sine is x.', formula: 'arcsin x', compute: one(Math.asin), unit: 'rad', example: 'asin(0.5)' }),
  ofNumber({ name: 'acos', text: 'Angle whose cosine is x.', formula: 'arccos x', compute: one(Math.acos), unit: 'rad', example: 'acos(0.5)' }),
  ofNumber({ name: 'atan', text: 'Angle whose tangent is x.', formula: 'arctan x', compute: one(Math.atan), unit: 'rad', example: 'atan(1)' }),
  quadrant,
  choice,
  logical('and', 'Yes when all conditions hold.', (...values) => (values.every((value) => value !== 0) ? 1 : 0), 1, 'if(and(1 < 2, 2 < 3), 1, 0)'),
  logical('or', 'Yes when any condition holds.', (...values) => (values.some((value) => value !== 0) ? 1 : 0), 1, 'if(or(1 > 2, 2 < 3), 1, 0)'),
  logical('not', 'Yes when the condition does not hold.', (value) => (value === 0 ? 1 : 0), 0, 'if(not(1 > 2), 1, 0)'),
  total,
  average,
  interpolation,
];

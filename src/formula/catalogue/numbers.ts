/** Functions of one number or quantity: roots, logarithms, angles, rounding. */
import { combineMeanings, isDimensionless, NEUTRAL, NO_DIMENSION, raiseDimension } from '../../quantity';
import { align } from '../alignment';
import { broken } from '../context';
import { describeType } from '../forms';
import type { LinearType } from '../types';
import { numberParameter, quantityParameter, type FunctionEntry, type StructuralFunction } from './entry';
import { angle, apply, needsNumber, SOURCE, withoutAttributes, type Compute } from './mathematics-shared';

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

/** Functions of one plain number. */
export const ofNumber = ({
  name,
  text,
  formula,
  compute,
  sort = 'pure',
  unit,
  example,
  parameter = 'x',
}: NumberFunction): StructuralFunction => ({
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
    if (operand.type.form !== 'linear' || !isDimensionless(operand.type.dimension))
      return needsNumber(tree, operand, context);
    const type: LinearType = {
      form: 'linear',
      dimension: NO_DIMENSION,
      degree: 0,
      sort,
      meaning: operand.constant === undefined ? undefined : NEUTRAL,
      unitHint: unit === 'rad' ? angle() : undefined,
    };
    const constant = operand.constant === undefined ? undefined : compute(operand.constant);
    return {
      tree,
      type,
      plan: apply(name, compute, [operand.plan]),
      constant: Number.isFinite(constant) ? constant : undefined,
      parts: [operand],
    };
  },
});

/** Functions that keep the type of their one argument: decibel ratios and linear quantities. */
export const keepsType = (
  name: string,
  text: string,
  formula: string,
  compute: Compute,
  example: string,
  more: FunctionEntry['parameters'] = [],
): StructuralFunction => ({
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
    return {
      tree,
      type: withoutAttributes(operand.type),
      plan: apply(name, compute, parameters),
      constant,
      kind: operand.kind,
      parts: [operand],
    };
  },
});

export const roundTo = (x: number, digits = 0): number => {
  const factor = 10 ** Math.trunc(digits);
  // Halves away from zero, as OpenFormula has it.
  return (Math.sign(x) * Math.round(Math.abs(x) * factor)) / factor;
};

export const root: StructuralFunction = {
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

export const quadrant: StructuralFunction = {
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
      return context.stop('decibels-multiplied', tree, {
        facts: { what: 'The arguments of atan2 are in decibels' },
        repairs: [],
      });
    return {
      tree,
      type: { form: 'linear', dimension: NO_DIMENSION, degree: 0, sort: 'pure', meaning: NEUTRAL, unitHint: angle() },
      plan: apply('atan2', (x, y) => Math.atan2(y, x), alignment.plans),
      parts: operands,
    };
  },
};

/** Decibel functions: between the forms, and combining on purpose. */
import {
  fieldSum,
  isDimensionless,
  meanPower,
  POWER,
  POWER_DENSITY,
  TEMPERATURE,
  type Dimension,
  meaningOf,
  powerDifference,
  powerSum,
  reciprocalSum,
  FREQUENCY,
  sameDimension,
  type Meaning,
} from '../../quantity';
import { align } from '../alignment';
import { sayBandwidthsDiffer } from '../bandwidths';
import { sayPlanesDiffer } from '../planes';
import { broken, type Context } from '../context';
import { decibelsOf, describeType, isFieldLike, linearOf, powerDimension } from '../forms';
import { shiftPlan, type Plan } from '../plan';
import { overWrittenReference } from '../logarithms';
import { originOf } from '../products';
import type { CallTree } from '../tree';
import type { Checked, DecibelType } from '../types';
import { quantityParameter, type FunctionEntry, type StructuralFunction } from './entry';
import { total } from './choices';
import { commonMeaning } from './mathematics-shared';

const DEFINITION = 'definition of the decibel, ISO 80000-1 and IEC 60027-3';

const toDecibels: StructuralFunction = {
  form: 'structural',
  name: 'db',
  group: 'Decibels',
  parameters: [quantityParameter('x', 'a linear quantity')],
  repeats: 0,
  text: 'Decibels of a linear quantity: 10 log10, or 20 log10 of voltages, currents, fields and their ratios.',
  formula: '10 log₁₀ x, or 20 log₁₀ x of root-power quantities',
  source: DEFINITION,
  result: 'a decibel quantity over the SI unit',
  example: 'db(2 W)',
  check: (tree, [operand], context) => {
    if (operand === undefined || operand.type.form === 'broken') return broken(tree);
    const text = context.textOf(operand.tree);
    if (operand.type.form === 'decibel')
      return context.stop('decibels-multiplied', tree, {
        facts: { what: `${text} is in decibels already, and its logarithm is taken` },
        repairs: [context.rewrite(tree, text)],
      });
    if (operand.type.form !== 'linear') return refuse(tree, operand, 'a linear quantity', context);
    const overReference = overWrittenReference(operand, isFieldLike(operand.type) ? 20 : 10);
    return { tree, ...decibelsOf({ type: operand.type, plan: operand.plan }, false), overReference, parts: [operand] };
  },
};

const toLinear: StructuralFunction = {
  form: 'structural',
  name: 'lin',
  group: 'Decibels',
  parameters: [quantityParameter('x', 'a decibel quantity')],
  repeats: 0,
  text: 'The linear quantity behind decibels: watts, hertz, a ratio; volts of dBµV.',
  formula: '10^(x/10), or 10^(x/20) of root-power units',
  source: DEFINITION,
  result: 'a linear quantity',
  example: 'lin(3 dBm)',
  check: (tree, [operand], context) => {
    if (operand === undefined || operand.type.form === 'broken') return broken(tree);
    if (operand.type.form === 'decibel')
      return {
        tree,
        ...linearOf({ type: operand.type, plan: operand.plan }),
        reference: 10 ** (operand.type.offsetDb / 10),
        parts: [operand],
      };
    const text = context.textOf(operand.tree);
    if (operand.type.form === 'linear' && isDimensionless(operand.type.dimension) && operand.type.sort !== 'ratio') {
      context.say('number-as-decibels', operand.tree, {
        facts: { number: text, decibels: `${text} dB` },
        repairs: operand.tree.type === 'literal' ? [context.rewrite(operand.tree, `${text} dB`)] : [],
      });
      const ratio: DecibelType = {
        form: 'decibel',
        dimension: operand.type.dimension,
        offsetDb: 0,
        scale: 1,
        meaning: operand.type.meaning,
      };
      return { tree, ...linearOf({ type: ratio, plan: operand.plan }), parts: [operand] };
    }
    return refuse(tree, operand, 'decibels', context, operand.type.form === 'linear' ? text : undefined);
  },
};

function refuse(tree: CallTree, operand: Checked, wanted: string, context: Context, repair?: string): Checked {
  return context.stop('wrong-arguments', tree, {
    facts: { what: `${tree.name} takes ${wanted}; ${context.textOf(operand.tree)} is ${describeType(operand.type)}` },
    repairs: repair === undefined ? [] : [context.rewrite(tree, repair)],
  });
}

type Combine = (figures: readonly number[]) => number;

/** The meaning of powers put together: that of the terms where they agree, else a level whose side is not said. */
function combinedMeaning(operands: readonly Checked[], type: DecibelType): Meaning | undefined {
  const common = commonMeaning(operands);
  if (common !== undefined) return { ...common, f: 0 };
  const meanings = operands.map(({ type: part }) =>
    part.form === 'decibel' || part.form === 'linear' ? part.meaning : undefined,
  );
  const allLevels = meanings.every(
    (meaning) => meaning !== undefined && Math.abs(meaning.w + meaning.u + meaning.l - 1) < 1e-9,
  );
  if (allLevels) {
    const sides = new Set(meanings.map((meaning) => `${String(meaning?.w)},${String(meaning?.u)}`));
    const [first] = meanings;
    return sides.size === 1 && first !== undefined ? { ...first, f: 0 } : meaningOf('level', undefined, false);
  }
  return isDimensionless(type.dimension) ? undefined : meaningOf('level', undefined, false);
}

/** Functions over powers of one dimension: operands in decibels or linear; the result in decibels. */
const combining = (
  name: string,
  text: string,
  formula: string,
  source: string,
  combine: Combine,
  example: string,
): StructuralFunction => ({
  form: 'structural',
  name,
  group: 'Decibels',
  parameters: [quantityParameter('x', 'levels, densities, temperatures or ratios of one dimension')],
  repeats: 1,
  text,
  formula,
  source,
  result: 'decibels, of the unit of the first argument',
  example,
  check: (tree, operands, context) => combinePowers(tree, operands, context, name, combine),
});

function combinePowers(
  tree: CallTree,
  operands: readonly Checked[],
  context: Context,
  name: string,
  combine: Combine,
): Checked {
  const alignment = align(tree, operands, context, true);
  if (alignment?.type.form !== 'decibel') return broken(tree);
  const powers = operands.map(({ tree: part, type }) => ({ tree: part, text: context.textOf(part), type }));
  sayBandwidthsDiffer(powers, context);
  sayPlanesDiffer(powers, [], context);
  const plan: Plan = { op: 'apply', name, compute: (...figures) => combine(figures), parameters: alignment.plans };
  const bandwidths = operands.map(({ type }) =>
    type.form === 'decibel' || type.form === 'linear' ? type.bandwidth : undefined,
  );
  const [bandwidth] = bandwidths;
  const type: DecibelType = {
    ...alignment.type,
    scale: 1,
    meaning: combinedMeaning(operands, alignment.type),
    bandwidth:
      bandwidth !== undefined && bandwidths.every((other) => other?.key === bandwidth.key) ? bandwidth : undefined,
    noiseTemperature: undefined,
  };
  return { tree, type, plan, parts: operands };
}

const powerSumming = combining(
  'powersum',
  'The total of powers that do not interfere: incoherent addition.',
  '10 log₁₀ Σ 10^(xᵢ/10)',
  DEFINITION,
  powerSum,
  'powersum(-100 dBm, -97 dBm)',
);

const isMoreThan10DbBelow = (depthDb: number): boolean => depthDb > 10;

const difference: StructuralFunction = {
  form: 'structural',
  name: 'powerdiff',
  group: 'Decibels',
  parameters: [quantityParameter('a', 'the larger power'), quantityParameter('b', 'what is taken off it')],
  repeats: 0,
  text: 'The power left when one is taken off another.',
  formula: '10 log₁₀(10^(a/10) − 10^(b/10))',
  source: DEFINITION,
  result: 'decibels, of the unit of the first argument',
  example: 'powerdiff(-100 dBm, -103 dBm)',
  check: (tree, operands, context) => {
    const result = combinePowers(tree, operands, context, 'powerdiff', ([a = NaN, b = NaN]) => powerDifference(a, b));
    if (result.type.form !== 'decibel' || result.plan.op !== 'apply') return result;
    const depth: Plan = {
      op: 'apply',
      name: 'cancellation',
      compute: (a = NaN, b = NaN) => a - powerDifference(a, b),
      parameters: result.plan.parameters,
    };
    context.say('cancellation', tree, { facts: {}, repairs: [], applies: { plan: depth, test: isMoreThan10DbBelow } });
    return result;
  },
};

/** How ratios to one signal combine: signal ratios by reciprocals, impairment ratios directly. */
function ratioSort(operand: Checked): 'signal' | 'impairment' {
  const meaning = operand.type.form === 'decibel' || operand.type.form === 'linear' ? operand.type.meaning : undefined;
  return meaning !== undefined && meaning.w < 0 ? 'impairment' : 'signal';
}

const ratios: StructuralFunction = {
  form: 'structural',
  name: 'ratiosum',
  group: 'Decibels',
  parameters: [quantityParameter('x', 'signal ratios, or impairment ratios, to one signal')],
  repeats: 1,
  text: 'The ratio to all impairments together: signal ratios add by reciprocals, impairment ratios directly.',
  formula: '−10 log₁₀ Σ 10^(−xᵢ/10) of signal ratios; 10 log₁₀ Σ 10^(xᵢ/10) of impairment ratios',
  source: 'common practice for C/N and C/I in cascade, from the definition of the decibel',
  result: 'a ratio of the same kind',
  example: 'ratiosum(20 dB, 17 dB)',
  check: (tree, operands, context) => {
    const sorts = new Set(operands.map(ratioSort));
    if (operands.some(({ type }) => type.form === 'broken')) return broken(tree);
    if (sorts.size > 1) {
      const odd = operands.find((operand) => ratioSort(operand) === 'impairment');
      return context.stop('wrong-arguments', tree, {
        facts: {
          what: `ratiosum takes signal ratios or impairment ratios, not both; ${odd === undefined ? 'one' : context.textOf(odd.tree)} is an impairment ratio, the inverse of a signal ratio`,
        },
        repairs: odd === undefined ? [] : [context.rewrite(odd.tree, `-(${context.textOf(odd.tree)})`)],
      });
    }
    return combinePowers(tree, operands, context, 'ratiosum', sorts.has('impairment') ? powerSum : reciprocalSum);
  },
};

/** What sort of thing an operand of a pool is: things of one sort have a total. */
function sortInPool(operand: Checked): string {
  const { type, kind } = operand;
  if (type.form !== 'decibel' && type.form !== 'linear') return describeType(type);
  // By what the decibels stand for, whatever unit shows it: dBm beside pW, K beside °C, dBµV beside mV.
  const dimension = type.form === 'linear' ? powerDimension(type) : type.dimension;
  const isRatio = isDimensionless(dimension);
  const of = describeType({ ...type, form: 'linear', dimension, degree: 0, sort: 'ratio', unitHint: undefined });
  const { meaning } = type;
  const suffix = isRatio ? '' : ` in ${of}`;
  if (meaning !== undefined && meaning.w === 1 && meaning.u === -1) return `${SIGNAL_RATIO}${suffix}`;
  if (meaning !== undefined && meaning.w === -1 && meaning.u === 1) return `${IMPAIRMENT_RATIO}${suffix}`;
  if (isRatio && (kind === 'noise figure' || kind === 'loss')) return `a ${kind}`;
  return isRatio
    ? PLAIN_RATIO
    : (SORT_WORDS.find(([one]) => sameDimension(one, dimension))?.[1] ?? `of the dimension of ${of}`);
}

/** What systems people call what a pool may hold. */
const SORT_WORDS: readonly (readonly [Dimension, string])[] = [
  [POWER, 'a level of power'],
  [POWER_DENSITY, 'a power density'],
  [TEMPERATURE, 'a temperature'],
];

const SIGNAL_RATIO = 'a signal ratio';
const IMPAIRMENT_RATIO = 'an impairment ratio';
const PLAIN_RATIO = 'a ratio of which nothing is said';

/** The sorts of a pool's operands. A plain ratio beside ratios of a known sort is taken to be of that sort. */
function sortsInPool(operands: readonly Checked[]): readonly string[] {
  const sorts = operands.map(sortInPool);
  const known = sorts.find((sort) => sort === SIGNAL_RATIO || sort === IMPAIRMENT_RATIO);
  return known === undefined ? sorts : sorts.map((sort) => (sort === PLAIN_RATIO ? known : sort));
}

const pool: StructuralFunction = {
  form: 'structural',
  name: 'pool',
  group: 'Decibels',
  parameters: [quantityParameter('x', 'contributions of one sort: levels, temperatures, signal or impairment ratios')],
  repeats: 1,
  text: 'The total of contributions, each sort in its way: levels as powers, temperatures as they are, signal ratios by reciprocals.',
  formula: 'powersum of levels, sum of temperatures, ratiosum of ratios',
  source: DEFINITION,
  result: 'a quantity of the same sort',
  example: 'pool(-100 dBm, -97 dBm)',
  check: (tree, operands, context) => {
    const [first] = operands;
    if (first === undefined || operands.some(({ type }) => type.form === 'broken')) return broken(tree);
    const sorts = sortsInPool(operands);
    const [sort = ''] = sorts;
    // Figures and losses are no contributions: alone they are as wrong as beside others.
    const isNoPower = sort === 'a noise figure' || sort === 'a loss';
    const at = isNoPower && operands.length > 1 ? 1 : sorts.findIndex((other) => other !== sort);
    const odd = operands[at];
    if (odd !== undefined)
      return context.stop('pool-mixed', tree, {
        facts: {
          first: context.textOf(first.tree),
          firstSort: sort,
          second: context.textOf(odd.tree),
          secondSort: sorts[at] ?? '',
        },
        repairs: [],
      });
    const isRatio = sort.startsWith(SIGNAL_RATIO) || sort.startsWith(IMPAIRMENT_RATIO);
    const isLinear = operands.every(({ type }) => type.form === 'linear');
    const way = isRatio ? ratios : isLinear ? total : powerSumming;
    return way.check({ ...tree, name: way.name }, operands, context);
  },
};

const rebase: StructuralFunction = {
  form: 'structural',
  name: 'rebase',
  group: 'Decibels',
  parameters: [
    quantityParameter('level', 'a noise-like level'),
    { name: 'from', text: 'the bandwidth it is in', takes: 'bandwidth', unit: 'Hz' },
    { name: 'to', text: 'the bandwidth wanted', takes: 'bandwidth', unit: 'Hz' },
  ],
  repeats: 0,
  text: 'The level of the same power density in another bandwidth.',
  formula: 'level + 10 log₁₀(to/from)',
  source: DEFINITION,
  result: 'a level in the unit of the first argument',
  example: 'rebase(-100 dBm, 1 MHz, 180 kHz)',
  check: (tree, [level, from, to], context) => {
    if (level === undefined || from === undefined || to === undefined) return broken(tree);
    if (level.type.form !== 'decibel')
      return level.type.form === 'broken' ? broken(tree) : refuse(tree, level, 'a level in decibels first', context);
    const widths: { plan: Plan; tree: Checked['tree'] }[] = [];
    for (const width of [from, to]) {
      const { type } = width;
      if (type.form === 'broken') return broken(tree);
      if ((type.form !== 'linear' && type.form !== 'decibel') || !sameDimension(type.dimension, FREQUENCY))
        return refuse(tree, width, 'bandwidths in Hz', context);
      widths.push({
        plan: type.form === 'linear' ? width.plan : { op: 'linear', of: shiftPlan(width.plan, type.offsetDb) },
        tree: width.tree,
      });
    }
    const [narrow, wide] = widths;
    if (narrow === undefined || wide === undefined) return broken(tree);
    return {
      tree,
      type: { ...level.type, bandwidth: originOf(wide, context) },
      plan: {
        op: 'sum',
        terms: [
          { coefficient: 1, plan: level.plan },
          {
            coefficient: 1,
            plan: { op: 'decibels', of: { op: 'quotient', left: wide.plan, right: narrow.plan }, zeroIsNoPower: false },
          },
        ],
        constant: 0,
      },
      kind: level.kind,
      side: level.side,
      parts: [level, from, to],
    };
  },
};

export const DECIBEL_FUNCTIONS: readonly FunctionEntry[] = [
  toDecibels,
  toLinear,
  powerSumming,
  difference,
  combining(
    'fieldsum',
    'The total of fields in phase: the worst case for coherent contributions.',
    '20 log₁₀ Σ 10^(xᵢ/20)',
    DEFINITION,
    fieldSum,
    'fieldsum(-100 dBm, -100 dBm)',
  ),
  combining(
    'meanpower',
    'The mean of powers.',
    '10 log₁₀((Σ 10^(xᵢ/10))/n)',
    DEFINITION,
    meanPower,
    'meanpower(0 dBm, -30 dBm)',
  ),
  ratios,
  pool,
  rebase,
];

/**
 * Sums. An additive chain is flattened first and judged as a whole (see judge.ts): `3*P - 2*IIP3` is a level although its
 * parts alone are not. Here forms are settled, and dimensions, meanings and figures of decibel terms are added up.
 */
import { assert } from '../base';
import type { Repair } from '../findings';
import {
  combineDimensions,
  combineMeanings,
  describeDimension,
  isDimensionless,
  NEUTRAL,
  NO_DIMENSION,
  POWER,
  POWER_DENSITY,
  FREQUENCY,
  sameDimension,
  sameMeaning,
  UNSAID,
} from '../quantity';
import type { Check } from './check';
import { asFactor, broken, type Context } from './context';
import { describeType, termsOf } from './forms';
import { isOfUnwantedCarrier } from './net';
import { sayPlanesDiffer } from './planes';
import { scalePlan, type Plan } from './plan';
import type { BinaryTree, NegationTree, Tree } from './tree';
import type { Checked, DecibelType, LinearType, Origin, SumTerm } from './types';

interface SignedPart {
  readonly sign: 1 | -1;
  readonly checked: Checked;
}

/** Checks `a + b − c …`, however nested in brackets. */
export function checkSum(tree: BinaryTree, context: Context, check: Check): Checked {
  const parts: SignedPart[] = [];
  const collect = (part: Tree, sign: 1 | -1): void => {
    if (part.type === 'binary' && (part.operator === '+' || part.operator === '-')) {
      collect(part.left, sign);
      collect(part.right, part.operator === '+' ? sign : sign === 1 ? -1 : 1);
    } else if (part.type === 'negation' && !isLiteralNumber(part.operand)) {
      collect(part.operand, sign === 1 ? -1 : 1);
    } else parts.push({ sign, checked: check(part, context) });
  };
  collect(tree, 1);
  return addParts(tree, parts, context);
}

const isLiteralNumber = (tree: Tree): boolean => tree.type === 'literal' && tree.unit === null;

/** Adds up checked parts with their signs: what `+`, `−` and the function sum do. */
export function addParts(tree: Tree, parts: readonly SignedPart[], context: Context): Checked {
  const types = parts.map(({ checked }) => checked.type);
  if (types.some(({ form }) => form === 'broken')) return broken(tree);
  const odd = parts.find(({ checked }) => checked.type.form === 'truth' || checked.type.form === 'text');
  if (odd !== undefined)
    return context.stop('wrong-arguments', odd.checked.tree, {
      facts: { what: `${context.textOf(odd.checked.tree)} is ${describeType(odd.checked.type)} and cannot be added` },
      repairs: [],
    });
  if (types.some(({ form }) => form === 'rate')) return addRates(tree, parts, context);
  if (types.some(({ form }) => form === 'decibel')) return addDecibels(tree, parts, context);
  return addLinear(tree, parts, context);
}

function addRates(tree: Tree, parts: readonly SignedPart[], context: Context): Checked {
  const stray = parts.find(({ checked }) => checked.type.form !== 'rate');
  const first = parts.find(({ checked }) => checked.type.form === 'rate')?.checked;
  assert(first?.type.form === 'rate', 'a sum of rates holds a rate');
  if (stray !== undefined) {
    const length = context.lengthTerm();
    return context.stop('rate-without-length', first.tree, {
      facts: { rate: context.textOf(first.tree), where: 'in a sum of decibels' },
      repairs:
        length === undefined
          ? []
          : [context.rewrite(first.tree, `${asFactor(first.tree, context.textOf(first.tree))} * ${length}`)],
    });
  }
  const { lengthM, unitHint } = first.type;
  const terms = parts.map(({ sign, checked }) => ({
    coefficient: checked.type.form === 'rate' ? (sign * lengthM) / checked.type.lengthM : 0,
    plan: checked.plan,
  }));
  return {
    tree,
    type: { form: 'rate', lengthM, unitHint },
    plan: { op: 'sum', terms, constant: 0 },
    parts: parts.map(({ checked }) => checked),
  };
}

function addDecibels(tree: Tree, parts: readonly SignedPart[], context: Context): Checked {
  const linear = parts.filter(
    ({ checked }) => checked.type.form === 'linear' && !isDimensionless(checked.type.dimension),
  );
  if (linear.length > 0) return mixedForms(linear, parts, tree, context);
  const terms = parts.flatMap(({ sign, checked }) =>
    checked.type.form === 'decibel'
      ? scaleTerms(termsOf(checked, context.textOf(checked.tree)), sign)
      : [numberTerm(checked, sign, context)],
  );
  return decibelSum(
    tree,
    terms,
    parts.map(({ checked }) => checked),
  );
}

/** A plain number in a decibel sum counts as decibels. Logarithms with other factors than 10 and 20 do so without remark. */
function numberTerm({ tree, type, plan }: Checked, sign: number, context: Context): SumTerm {
  assert(type.form === 'linear', 'a number is linear');
  const decibels: DecibelType = { form: 'decibel', dimension: NO_DIMENSION, offsetDb: 0, scale: 1, meaning: UNSAID };
  return {
    coefficient: sign,
    tree,
    text: context.textOf(tree),
    type: decibels,
    plan,
    isDeclared: false,
    isNumber: type.sort !== 'figure',
  };
}

export function scaleTerms(terms: readonly SumTerm[], by: number): SumTerm[] {
  return terms.map((term) => ({ ...term, coefficient: term.coefficient * by }));
}

/** The sum of decibel terms: figures, dimensions, references and meanings add up, each times its coefficient. */
export function decibelSum(tree: Tree, terms: readonly SumTerm[], parts: readonly Checked[]): Checked {
  let dimension = NO_DIMENSION;
  let offsetDb = 0;
  let scale = 0;
  let meaning: DecibelType['meaning'] = NEUTRAL;
  for (const term of terms) {
    const { coefficient, type } = term;
    dimension = combineDimensions(dimension, type.dimension, coefficient);
    offsetDb += coefficient * type.offsetDb;
    scale = Math.max(scale, Math.abs(coefficient) * type.scale);
    if (isOfUnwantedCarrier(term, terms)) continue;
    meaning =
      meaning === undefined || type.meaning === undefined
        ? undefined
        : combineMeanings(meaning, type.meaning, coefficient);
  }
  const sameUnit = terms.find(({ coefficient, type }) => coefficient === 1 && sameDimension(type.dimension, dimension));
  const type: DecibelType = {
    form: 'decibel',
    dimension,
    offsetDb,
    scale,
    meaning,
    bandwidth: bandwidthOfSum(terms, dimension),
    noiseTemperature: onlyOrigin(terms, 'noiseTemperature'),
    unitHint: isDimensionless(dimension) && terms.length > 1 ? fullScaleHint(terms) : sameUnit?.type.unitHint,
  };
  const plan: Plan = foldSum(terms);
  return { tree, type, plan, terms, parts };
}

/** A level over full scale less ratios stays one. */
function fullScaleHint(terms: readonly SumTerm[]): DecibelType['unitHint'] {
  const levels = terms.filter(({ type }) => type.unitHint?.word === 'dBFS');
  return levels.length === 1 && levels[0]?.coefficient === 1 ? levels[0].type.unitHint : undefined;
}

/** The sum as a plan, constants folded in the order written. */
function foldSum(terms: readonly SumTerm[]): Plan {
  const open: { coefficient: number; plan: Plan }[] = [];
  let constant = 0;
  for (const { coefficient, plan } of terms) {
    if (plan.op === 'constant') constant += coefficient * plan.value;
    else if (plan.op === 'sum' && coefficient === 1) {
      open.push(...plan.terms);
      constant += plan.constant;
    } else open.push({ coefficient, plan });
  }
  return open.length === 0 ? { op: 'constant', value: constant } : { op: 'sum', terms: open, constant };
}

/** The origin that the positive terms agree on; undefined when there is none or several. */
function onlyOrigin(terms: readonly SumTerm[], attribute: 'bandwidth' | 'noiseTemperature'): Origin | undefined {
  const origins = terms.flatMap(({ coefficient, type }) => {
    const origin = type[attribute];
    return coefficient > 0 && origin !== undefined ? [origin] : [];
  });
  const [first] = origins;
  return first !== undefined && origins.every(({ key }) => key === first.key) ? first : undefined;
}

/** A density plus a bandwidth is a power in that bandwidth; otherwise the bandwidth is that of the one power in the sum. */
function bandwidthOfSum(terms: readonly SumTerm[], dimension: SumTerm['type']['dimension']): Origin | undefined {
  if (isDimensionless(dimension)) return bandwidthOfRatio(terms);
  if (!sameDimension(dimension, POWER)) return undefined;
  const density = terms.some(
    ({ coefficient, type }) => coefficient === 1 && sameDimension(type.dimension, POWER_DENSITY),
  );
  const widths = terms.filter(({ coefficient, type }) => coefficient === 1 && sameDimension(type.dimension, FREQUENCY));
  const [width] = widths;
  if (density && width !== undefined && widths.length === 1)
    return {
      key: JSON.stringify(width.plan) + String(width.type.offsetDb),
      text: width.text,
      plan: {
        op: 'linear',
        of: { op: 'sum', terms: [{ coefficient: 1, plan: width.plan }], constant: width.type.offsetDb },
      },
    };
  return onlyOrigin(terms, 'bandwidth');
}

/** A ratio of levels is in the bandwidth of the one whose bandwidth is known. */
function bandwidthOfRatio(terms: readonly SumTerm[]): Origin | undefined {
  const origins = terms.flatMap(({ type }) => (type.bandwidth === undefined ? [] : [type.bandwidth]));
  const [first] = origins;
  return first !== undefined && origins.every(({ key }) => key === first.key) ? first : undefined;
}

function mixedForms(linear: readonly SignedPart[], all: readonly SignedPart[], tree: Tree, context: Context): Checked {
  const [first] = linear;
  assert(first !== undefined && first.checked.type.form === 'linear', 'there is a linear part');
  let repaired = context.entry;
  for (const { checked } of [...linear].sort((a, b) => b.checked.tree.place.start - a.checked.tree.place.start)) {
    const { start, end } = checked.tree.place;
    repaired = `${repaired.slice(0, start)}db(${context.textOf(checked.tree)})${repaired.slice(end)}`;
  }
  context.say('mixed-forms', first.checked.tree, {
    facts: {
      linear: linear.map(({ checked }) => context.textOf(checked.tree)).join(' and '),
      linearUnit: describeType(first.checked.type),
      where: 'in a sum of decibels',
    },
    repairs: [
      { kind: 'entry', title: `db(${context.textOf(first.checked.tree)})`, entry: repaired },
      ...powerSumOfMixed(all, tree, context),
    ],
  });
  return broken(tree);
}

/** Watts beside a level in dBm: both are powers and belong in one power sum, which takes either form. */
function powerSumOfMixed(parts: readonly SignedPart[], tree: Tree, context: Context): Repair[] {
  const isPower = ({ checked: { type } }: SignedPart): boolean =>
    (type.form === 'linear' || type.form === 'decibel') && sameDimension(type.dimension, POWER);
  if (!parts.every(isPower)) return [];
  const isDifference = parts.length === 2 && parts[0]?.sign === 1 && parts[1]?.sign === -1;
  if (!isDifference && parts.some(({ sign }) => sign < 0)) return [];
  const call = `${isDifference ? 'powerdiff' : 'powersum'}(${parts.map(({ checked }) => context.textOf(checked.tree)).join(', ')})`;
  return [{ kind: 'entry', title: call, entry: context.replace(tree, call) }];
}

function addLinear(tree: Tree, parts: readonly SignedPart[], context: Context): Checked {
  const typed = parts.flatMap(({ sign, checked }) =>
    checked.type.form === 'linear' ? [{ sign, checked, type: checked.type }] : [],
  );
  const [first] = typed;
  assert(first !== undefined, 'a sum has parts');
  const stray = typed.find(({ type }) => !sameDimension(type.dimension, first.type.dimension));
  if (stray !== undefined)
    return context.stop('unit-mismatch', stray.checked.tree, {
      facts: {
        what: context.textOf(stray.checked.tree),
        found: describeDimension(stray.type.dimension) === '1' ? 'a plain number' : describeType(stray.type),
        declared: `${describeType(first.type)}, as ${context.textOf(first.checked.tree)} has`,
      },
      repairs: [],
    });
  const told = typed.filter(({ checked }) => checked.constant === undefined);
  const judged = told.length === 0 ? typed : told;
  const agree = judged.every(
    ({ type }) =>
      type.meaning !== undefined &&
      first.type.meaning !== undefined &&
      judged[0]?.type.meaning !== undefined &&
      sameMeaning(type.meaning, judged[0].type.meaning),
  );
  const all = told.length === typed.length;
  const sorts = new Set(typed.map(({ type }) => type.sort));
  const type: LinearType = {
    form: 'linear',
    dimension: first.type.dimension,
    degree: judged.every(({ type: { degree } }) => degree === judged[0]?.type.degree)
      ? (judged[0]?.type.degree ?? 0)
      : 0,
    sort: sorts.has('ratio') ? 'ratio' : sorts.has('figure') ? 'figure' : 'pure',
    meaning: agree && (all || told.length === 0) ? judged[0]?.type.meaning : isNeutral(typed) ? NEUTRAL : undefined,
    unitHint: typed.find(({ type: { unitHint } }) => unitHint !== undefined)?.type.unitHint,
  };
  sayPlanesDiffer(
    typed.map(({ checked, type: part }) => ({ tree: checked.tree, text: context.textOf(checked.tree), type: part })),
    [],
    context,
  );
  const constant = typed.every(({ checked }) => checked.constant !== undefined)
    ? typed.reduce((sum, { sign, checked }) => sum + sign * (checked.constant ?? 0), 0)
    : undefined;
  const plan: Plan =
    constant === undefined
      ? { op: 'sum', terms: typed.map(({ sign, checked }) => ({ coefficient: sign, plan: checked.plan })), constant: 0 }
      : { op: 'constant', value: constant };
  return { tree, type, plan, constant, parts: typed.map(({ checked }) => checked) };
}

const isNeutral = (typed: readonly { type: LinearType }[]): boolean =>
  typed.every(({ type }) => type.meaning !== undefined && sameMeaning(type.meaning, NEUTRAL));

/** Checks −x: the inverse of a decibel quantity, the opposite of a linear one. */
export function checkNegation(tree: NegationTree, context: Context, check: Check): Checked {
  const operand = check(tree.operand, context);
  switch (operand.type.form) {
    case 'broken':
      return broken(tree);
    case 'decibel':
      return decibelSum(tree, scaleTerms(termsOf(operand, context.textOf(operand.tree)), -1), [operand]);
    case 'linear':
    case 'rate':
      return {
        tree,
        type: operand.type,
        plan: scalePlan(operand.plan, -1),
        ...(operand.constant === undefined ? {} : { constant: -operand.constant }),
        parts: [operand],
      };
    default:
      return context.stop('wrong-arguments', tree, {
        facts: { what: `${context.textOf(operand.tree)} is ${describeType(operand.type)} and has no opposite` },
        repairs: [],
      });
  }
}

/** A result that does not have the declared unit: what is missing, and what to write. */
import {
  combineDimensions,
  ENTROPY,
  FREQUENCY,
  IMPEDANCE,
  isDimensionless,
  POWER,
  raiseDimension,
  sameDimension,
  TEMPERATURE,
  type Dimension,
  type Unit,
} from '../quantity';
import type { Repair } from '../findings';
import { impedanceOf } from './alignment';
import { asFactor, type Context } from './context';
import { describeType, fittingDecibelUnit, fittingLinearUnit, powerDimension } from './forms';
import { isLevel } from './net';
import { groupedAsPowers } from './repairs';
import type { Checked, DecibelType, LinearType } from './types';

/** Makes the finding unit-mismatch (or field-and-power, or rate-without-length) for a line's result. */
export function sayUnitMismatch(
  checked: Checked & { type: DecibelType | LinearType },
  declared: Unit,
  context: Context,
  hidden: readonly Repair[] = [],
): void {
  const { tree, type } = checked;
  const found = type.form === 'decibel' ? type.dimension : powerDimension(type);
  const wanted = declared.form === 'rate' ? undefined : declared.dimension;
  const extra = wanted === undefined ? undefined : combineDimensions(found, squareOfRoot(wanted, declared), -1);
  const isImpedance =
    extra !== undefined && (sameDimension(extra, IMPEDANCE) || sameDimension(extra, raiseDimension(IMPEDANCE, -1)));
  const repairs = [
    ...hidden,
    ...(extra !== undefined && sameDimension(extra, raiseDimension(FREQUENCY, -1)) && hidden.length === 0
      ? bandwidthLiteral(checked, context)
      : []),
    ...(isImpedance && type.form === 'linear' && tree.type === 'literal'
      ? [context.rewrite(tree, `(${context.textOf(tree)})^2 / (50 ohm)`)]
      : []),
    ...(extra === undefined || type.form !== 'decibel' || hidden.length > 0
      ? []
      : factorRepairs(checked, extra, context)),
    ...(type.form === 'decibel' ? powerSumRepairs(checked, context, wanted) : []),
    unitRepair(type),
  ].filter((repair): repair is Repair => repair !== undefined);
  context.say(isImpedance ? 'field-and-power' : 'unit-mismatch', tree, {
    facts: {
      what: `The result of ${context.textOf(tree)}`,
      found: describeType(type),
      declared: declared.word === '1' ? 'a plain number' : declared.word,
      ...(hidden.length > 0 ? {} : missing(extra, type.form)),
    },
    repairs,
  });
}

/** A bandwidth written in dB where dBHz is meant: the largest literal in dB of the sum. */
function bandwidthLiteral(checked: Checked, context: Context): Repair[] {
  const literals = (checked.terms ?? []).flatMap(({ tree, coefficient }) =>
    coefficient === 1 && tree.type === 'literal' && tree.unit?.word === 'dB' && tree.figure >= 20 ? [tree] : [],
  );
  const largest = literals.sort((a, b) => b.figure - a.figure)[0];
  return largest === undefined ? [] : [context.rewrite(largest, `${String(largest.figure)} dBHz`)];
}

const squareOfRoot = (dimension: Dimension, unit: Unit): Dimension =>
  unit.form === 'linear'
    ? powerDimension({ form: 'linear', dimension, degree: 0, sort: 'ratio', meaning: undefined })
    : dimension;

function missing(extra: Dimension | undefined, form: 'decibel' | 'linear'): { missing?: string } {
  if (extra === undefined || form !== 'decibel') return {};
  const name = FACTORS.find(
    ({ dimension }) => sameDimension(extra, dimension) || sameDimension(extra, raiseDimension(dimension, -1)),
  )?.name;
  return name === undefined ? {} : { missing: `${name} is missing or one too many.` };
}

const FACTORS = [
  { dimension: FREQUENCY, name: 'A bandwidth' },
  { dimension: TEMPERATURE, name: 'A temperature' },
  { dimension: ENTROPY, name: 'The Boltzmann constant' },
  { dimension: POWER, name: 'A level' },
] as const;

/** The factor that would make the dimension right, added at the end: − db(B), + db(B), − db(k_B), ∓ an impedance. */
function factorRepairs({ tree, type }: Checked, extra: Dimension, context: Context): (Repair | undefined)[] {
  const text = context.textOf(tree);
  const withTerm = (sign: '+' | '-', term: string | undefined): Repair | undefined =>
    term === undefined
      ? undefined
      : { kind: 'entry', title: `${sign} ${term}`, entry: context.replace(tree, `${text} ${sign} ${term}`) };
  const is = (dimension: Dimension, exponent: number): boolean =>
    sameDimension(extra, raiseDimension(dimension, exponent));
  if (is(FREQUENCY, 1)) return [withTerm('-', context.bandwidthTerm())];
  if (is(FREQUENCY, -1)) return [withTerm('+', context.bandwidthTerm())];
  if (is(ENTROPY, 1)) return [withTerm('-', 'db(k_B)')];
  if (is(ENTROPY, -1)) return [withTerm('+', 'db(k_B)')];
  if (is(IMPEDANCE, 1)) return [withTerm('-', impedanceOf(type))];
  if (is(IMPEDANCE, -1)) return [withTerm('+', impedanceOf(type))];
  return [];
}

/** S − N − I for a ratio: the levels taken off belong in one power sum. */
function powerSumRepairs(checked: Checked, context: Context, wanted: Dimension | undefined): (Repair | undefined)[] {
  const terms = checked.terms ?? [];
  const negative = terms.filter((term) => term.coefficient < 0 && isLevel(term));
  if (negative.length < 2 || wanted === undefined || !isDimensionless(wanted)) return [];
  const grouped = groupedAsPowers(terms, negative, 'powersum', context);
  return grouped === undefined
    ? []
    : [{ kind: 'entry', title: grouped.title, entry: context.replace(checked.tree, grouped.text) }];
}

/** The unit that the result has, if it has a word. */
function unitRepair(type: DecibelType | LinearType): Repair {
  const unit =
    type.form === 'decibel'
      ? fittingDecibelUnit(type.dimension, type.offsetDb, [type.unitHint])
      : fittingLinearUnit(type.dimension, [type.unitHint]);
  return { kind: 'unit', title: `unit ${unit.word}`, unit: unit.word };
}

/** Makes the finding for decibels per length where a loss is wanted. */
export function sayRateAlone(checked: Checked, context: Context): void {
  const text = context.textOf(checked.tree);
  const length = context.lengthTerm();
  context.say('rate-without-length', checked.tree, {
    facts: { rate: text, where: 'as the line’s result, which is to be decibels' },
    repairs: length === undefined ? [] : [context.rewrite(checked.tree, `${asFactor(checked.tree, text)} * ${length}`)],
  });
}

/** Bringing a line's result into its unit: between forms, references and scales; or saying that it has another dimension. */
import {
  findUnit,
  isDimensionless,
  isRootPower,
  raiseDimension,
  sameDimension,
  writeQuantity,
  type DecibelUnit,
  type LinearUnit,
  type Unit,
} from '../quantity';
import { present } from '../base';
import type { Repair } from '../findings';
import { asFactor, type Context } from './context';
import {
  decibelsOf,
  describeType,
  fittingDecibelUnit,
  fittingLinearUnit,
  linearOf,
  powerDimension,
  termsOf,
} from './forms';
import { sayRateAlone, sayUnitMismatch } from './mismatch';
import { constantPlan, scalePlan, shiftPlan, type Plan } from './plan';
import { decibelSum } from './sums';
import type { Tree } from './tree';
import type { Checked, DecibelType, LinearType } from './types';

export interface Converted {
  readonly unit: Unit;
  /** The figure in `unit`. */
  readonly plan: Plan;
  /** True when the unit was chosen here. */
  readonly isFitted: boolean;
}

/**
 * The result in the declared unit, or in one that fits; undefined when it has none (the finding is made).
 * `hidden`: the repairs of a bare number that hides a unit, which then come first.
 */
export function convertResult(
  checked: Checked,
  declared: Unit | undefined,
  context: Context,
  hidden: readonly Repair[] | undefined,
): Converted | undefined {
  const { type, tree } = checked;
  // A quantity typed in the line's own unit is taken as typed, without a way there and back.
  if (tree.type === 'literal' && tree.unit !== null && (declared ?? tree.unit).word === tree.unit.word)
    return { unit: tree.unit, plan: constantPlan(tree.figure), isFitted: false };
  switch (type.form) {
    case 'broken':
      return undefined;
    case 'truth':
    case 'text':
      context.say('bad-entry', checked.tree, {
        facts: { what: `The entry gives ${describeType(type)}, not a quantity; put it into if(…, …, …).` },
        repairs: [],
      });
      return undefined;
    case 'rate':
      return convertRate(checked, type.lengthM, declared, context);
    case 'decibel':
      if (declared === undefined) return ownDecibel(type, checked);
      return toDeclared(
        declared.form === 'decibel' ? readOverReference({ ...checked, type }, declared) : { ...checked, type },
        declared,
        context,
        hidden,
      );
    case 'linear':
      return declared === undefined
        ? ownLinear(type, checked)
        : toDeclared({ ...checked, type }, declared, context, hidden);
  }
}

function ownDecibel(type: DecibelType, { plan }: Checked): Converted {
  const unit = fittingDecibelUnit(type.dimension, type.offsetDb, [type.unitHint]);
  const offsetDb = unit.form === 'decibel' ? unit.offsetDb : 0;
  return { unit, plan: shiftPlan(plan, type.offsetDb - offsetDb), isFitted: true };
}

function ownLinear(type: LinearType, { plan }: Checked): Converted {
  const unit = fittingLinearUnit(type.dimension, [type.unitHint]);
  return {
    unit,
    plan: unit.form === 'linear' ? inLinearUnit(plan, unit) : plan,
    isFitted: type.unitHint?.form !== 'linear',
  };
}

/** An SI value as a figure in the unit; literals come back as typed. */
function inLinearUnit(plan: Plan, unit: LinearUnit): Plan {
  const shifted = shiftPlan(plan, -unit.shift);
  if (unit.factor === 1) return shifted;
  // Division by a written factor and multiplication by its inverse differ in the last digit: use the exact one.
  return unit.factor < 1
    ? scalePlan(shifted, Number((1 / unit.factor).toPrecision(15)))
    : { op: 'quotient', left: shifted, right: { op: 'constant', value: unit.factor } };
}

function convertRate(
  checked: Checked,
  lengthM: number,
  declared: Unit | undefined,
  context: Context,
): Converted | undefined {
  if (declared === undefined) {
    const unit = checked.type.form === 'rate' ? checked.type.unitHint : undefined;
    const shown = unit?.form === 'rate' ? unit : present(findUnit('dB/m'), 'dB/m');
    return {
      unit: shown,
      plan: scalePlan(checked.plan, shown.form === 'rate' ? shown.lengthM / lengthM : 1),
      isFitted: unit === undefined,
    };
  }
  if (declared.form === 'rate')
    return { unit: declared, plan: scalePlan(checked.plan, declared.lengthM / lengthM), isFitted: false };
  sayRateAlone(checked, context);
  return undefined;
}

type Result = Checked & { readonly type: DecibelType | LinearType };

/**
 * Logarithms over a written reference, 10*log10(x/1 mW), are ratios by their dimension; where the line's unit asks for it
 * they are read as decibels of x over that reference: all of them, or the one that makes the sum close.
 */
export function readOverReference(checked: Result, declared: DecibelUnit): Result {
  const terms = termsOf(checked, '');
  const written = terms.filter(({ overReference }) => overReference !== undefined);
  if (
    written.length === 0 ||
    (checked.type.form === 'decibel' && sameDimension(checked.type.dimension, declared.dimension))
  )
    return checked;
  for (const chosen of [written, ...written.map((one) => [one])]) {
    const read = terms.map((term) =>
      term.overReference !== undefined && chosen.includes(term) ? { ...term, type: term.overReference } : term,
    );
    const sum = decibelSum(checked.tree, read, checked.parts);
    if (sum.type.form === 'decibel' && sameDimension(sum.type.dimension, declared.dimension))
      return { ...sum, type: sum.type };
  }
  return checked;
}

function toDeclared(
  checked: Result,
  declared: Unit,
  context: Context,
  hidden: readonly Repair[] | undefined,
): Converted | undefined {
  const done = (plan: Plan): Converted => ({ unit: declared, plan, isFitted: false });
  const { type } = checked;
  if (type.form === 'linear' && isDimensionless(type.dimension) && type.sort !== 'ratio') {
    const bare = bareNumber(checked, type, declared, context);
    if (bare !== undefined) return done(bare);
  }
  if (declared.form === 'decibel') {
    const plan =
      type.form === 'decibel'
        ? decibelToDecibel(type, checked.plan, declared)
        : linearToDecibel(type, checked.plan, declared);
    if (plan !== undefined) return done(plan);
  }
  if (declared.form === 'linear') {
    const plan =
      type.form === 'decibel'
        ? decibelToLinear(type, checked.plan, declared)
        : linearToLinear(type, checked.plan, declared);
    if (plan !== undefined) return done(plan);
  }
  sayUnitMismatch(checked, declared, context, hidden);
  return undefined;
}

/** True when an expression is made of bare numbers alone: its number is in the line's unit. */
const isNumbersOnly = (tree: Tree): boolean =>
  (tree.type === 'literal' && tree.unit === null) ||
  (tree.type === 'negation' && isNumbersOnly(tree.operand)) ||
  (tree.type === 'binary' && isNumbersOnly(tree.left) && isNumbersOnly(tree.right));

/** A bare number, or a decibel figure from logarithms, in a line that declares its unit. */
function bareNumber(checked: Result, type: LinearType, declared: Unit, context: Context): Plan | undefined {
  if (isNumbersOnly(checked.tree)) return checked.plan;
  if (declared.form !== 'decibel' || !isDimensionless(declared.dimension)) return undefined;
  if (type.sort === 'pure') {
    const text = context.textOf(checked.tree);
    context.say('number-as-decibels', checked.tree, {
      facts: { number: text },
      lateFacts: (evaluate) => ({ decibels: writeQuantity(evaluate(checked.plan), present(findUnit('dB'), 'dB')) }),
      repairs: [
        context.rewrite(checked.tree, `${asFactor(checked.tree, text)} * 1 dB`),
        context.rewrite(checked.tree, `db(${text})`),
      ],
    });
  }
  return checked.plan;
}

function decibelToDecibel(type: DecibelType, plan: Plan, declared: DecibelUnit): Plan | undefined {
  return sameDimension(type.dimension, declared.dimension)
    ? shiftPlan(plan, type.offsetDb - declared.offsetDb)
    : undefined;
}

function linearToDecibel(type: LinearType, plan: Plan, declared: DecibelUnit): Plan | undefined {
  if (!sameDimension(powerDimension(type), declared.dimension)) return undefined;
  return shiftPlan(decibelsOf({ type, plan }, true).plan, -declared.offsetDb);
}

function decibelToLinear(type: DecibelType, plan: Plan, declared: LinearUnit): Plan | undefined {
  if (sameDimension(type.dimension, declared.dimension)) {
    return inLinearUnit({ op: 'linear', of: shiftPlan(plan, type.offsetDb) }, declared);
  }
  const isRoot =
    isRootPower(declared.dimension) && sameDimension(type.dimension, raiseDimension(declared.dimension, 2));
  return isRoot ? inLinearUnit(linearOf({ type, plan }).plan, declared) : undefined;
}

function linearToLinear(type: LinearType, plan: Plan, declared: LinearUnit): Plan | undefined {
  return sameDimension(type.dimension, declared.dimension) ? inLinearUnit(plan, declared) : undefined;
}

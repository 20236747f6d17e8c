/**
 * Bringing several operands to one form and dimension: for comparisons, the extremes, branches, and sums of powers.
 * Densities beside levels, and voltages beside powers, get findings of their own.
 */
import {
  combineDimensions,
  FIELD,
  FREQUENCY,
  IMPEDANCE,
  isDimensionless,
  POWER_FLUX,
  raiseDimension,
  sameDimension,
  type Dimension,
} from '../quantity';
import type { Context } from './context';
import { decibelsOf, describeType } from './forms';
import { shiftPlan, type Plan } from './plan';
import type { Tree } from './tree';
import type { Checked, DecibelType, LinearType, Type } from './types';

export interface Aligned {
  readonly type: DecibelType | LinearType;
  /** One plan an operand; decibel figures over one reference (that of `type`), linear values in SI. */
  readonly plans: readonly Plan[];
}

/** True when one dimension is the other's per hertz. */
export const differByBandwidth = (a: Dimension, b: Dimension): boolean =>
  sameDimension(combineDimensions(a, b, -1), FREQUENCY) || sameDimension(combineDimensions(b, a, -1), FREQUENCY);

/** The impedance that makes a power of a voltage, or a flux of a field: 50 Ω where nothing else is known, that of free space. */
export function impedanceOf(type: Type): string {
  const isField =
    (type.form === 'decibel' || type.form === 'linear') &&
    [FIELD, raiseDimension(FIELD, 2), POWER_FLUX].some((dimension) => sameDimension(type.dimension, dimension));
  return isField ? 'db(377 ohm)' : 'db(50 ohm)';
}

/** True when one is a squared voltage (or field) where the other is a power (or flux). */
export const differByImpedance = (a: Dimension, b: Dimension): boolean =>
  sameDimension(combineDimensions(a, b, -1), IMPEDANCE) || sameDimension(combineDimensions(b, a, -1), IMPEDANCE);

/**
 * Aligns operands of `tree`; undefined when they cannot be, after making the finding.
 * `asDecibels`: linear powers are taken in decibels, as the functions that add powers do; else mixed forms are refused.
 */
export function align(
  tree: Tree,
  operands: readonly Checked[],
  context: Context,
  asDecibels: boolean,
): Aligned | undefined {
  if (operands.some(({ type }) => type.form === 'broken')) return undefined;
  const odd = operands.find(({ type }) => type.form !== 'decibel' && type.form !== 'linear');
  if (odd !== undefined) {
    const isRate = odd.type.form === 'rate';
    context.say(isRate ? 'rate-without-length' : 'wrong-arguments', odd.tree, {
      facts: {
        what: `${context.textOf(odd.tree)} is ${describeType(odd.type)} and cannot stand here`,
        rate: context.textOf(odd.tree),
        where: 'where a quantity is expected',
      },
      repairs: [],
    });
    return undefined;
  }
  const hasDecibels = operands.some(({ type }) => type.form === 'decibel');
  const typed = operands.map((operand) => settleForm(operand, hasDecibels, asDecibels));
  const stray = typed.findIndex((part) => part === undefined);
  if (stray >= 0) {
    refuseForm(operands, stray, context);
    return undefined;
  }
  const parts = typed.flatMap((part) => (part === undefined ? [] : [part]));
  const [first] = parts;
  if (first === undefined) return undefined;
  const other = parts.findIndex(({ type }) => !sameDimension(type.dimension, first.type.dimension));
  if (other >= 0) {
    refuseDimension(
      tree,
      operands,
      parts.map(({ type }) => type),
      other,
      context,
    );
    return undefined;
  }
  if (first.type.form === 'linear') return { type: first.type, plans: parts.map(({ plan }) => plan) };
  const { offsetDb } = first.type;
  return {
    type: first.type,
    plans: parts.map(({ type, plan }) => shiftPlan(plan, type.form === 'decibel' ? type.offsetDb - offsetDb : 0)),
  };
}

type Settled = { readonly type: DecibelType | LinearType; readonly plan: Plan };

function settleForm(operand: Checked, hasDecibels: boolean, asDecibels: boolean): Settled | undefined {
  const { type, plan } = operand;
  if (type.form === 'decibel') return { type, plan };
  if (type.form !== 'linear') return undefined;
  if (asDecibels && !(isDimensionless(type.dimension) && type.sort !== 'ratio'))
    return decibelsOf({ type, plan }, true);
  if (!hasDecibels && !asDecibels) return { type, plan };
  // A bare number beside decibels, or among figures to be added as powers, counts as decibels.
  return isDimensionless(type.dimension)
    ? { type: { form: 'decibel', dimension: type.dimension, offsetDb: 0, scale: 1, meaning: type.meaning }, plan }
    : undefined;
}

function refuseForm(operands: readonly Checked[], stray: number, context: Context): void {
  const operand = operands[stray];
  if (operand === undefined) return;
  const text = context.textOf(operand.tree);
  context.say('mixed-forms', operand.tree, {
    facts: { linear: text, linearUnit: describeType(operand.type), where: 'beside decibels' },
    repairs: [context.rewrite(operand.tree, `db(${text})`)],
  });
}

function refuseDimension(
  tree: Tree,
  operands: readonly Checked[],
  types: readonly (DecibelType | LinearType)[],
  stray: number,
  context: Context,
): void {
  const [first] = operands;
  const operand = operands[stray];
  const [firstType] = types;
  const strayType = types[stray];
  if (first === undefined || operand === undefined || firstType === undefined || strayType === undefined) return;
  // Of powers, fluxes and fields, which hold the kilogram; C/N beside C/N₀ is a matter of dimension alone.
  if (firstType.dimension[0] !== 0 && differByBandwidth(firstType.dimension, strayType.dimension)) {
    const level = levelDimension(types, firstType.dimension);
    const perHertz = (index: number): boolean => !sameDimension(types[index]?.dimension ?? level, level);
    const densities = operands.filter((_, index) => perHertz(index));
    const levels = operands.filter((_, index) => !perHertz(index));
    const bandwidth = context.bandwidthTerm();
    let repaired = context.entry;
    for (const { tree: density } of [...densities].sort((a, b) => b.tree.place.start - a.tree.place.start))
      repaired = `${repaired.slice(0, density.place.start)}${context.textOf(density)} + ${bandwidth ?? ''}${repaired.slice(density.place.end)}`;
    context.say('density-and-level', tree, {
      facts: {
        densities: densities.map(({ tree: part }) => context.textOf(part)).join(', '),
        levels: levels.map(({ tree: part }) => context.textOf(part)).join(', '),
        where: tree.type === 'call' ? tree.name : 'a comparison',
      },
      repairs:
        bandwidth === undefined || firstType.form !== 'decibel'
          ? []
          : [{ kind: 'entry', title: `+ ${bandwidth}`, entry: repaired }],
    });
    return;
  }
  if (differByImpedance(firstType.dimension, strayType.dimension)) {
    const voltage = isVoltageSide(firstType.dimension, strayType.dimension) ? first : operand;
    context.say('field-and-power', voltage.tree, {
      facts: {
        what: context.textOf(voltage.tree),
        found: describeType(voltage.type),
        declared: describeType((voltage === first ? operand : first).type),
      },
      repairs: [context.rewrite(voltage.tree, `${context.textOf(voltage.tree)} - ${impedanceOf(voltage.type)}`)],
    });
    return;
  }
  context.say('unit-mismatch', operand.tree, {
    facts: {
      what: context.textOf(operand.tree),
      found: describeType(operand.type),
      declared: `${describeType(first.type)}, as ${context.textOf(first.tree)} has`,
    },
    repairs: [],
  });
}

/** True when `a` is the squared voltage of the two. */
const isVoltageSide = (a: Dimension, b: Dimension): boolean => sameDimension(combineDimensions(a, b, -1), IMPEDANCE);

/** Of dimensions that differ by hertz, that of the levels: densities are levels times seconds. */
function levelDimension(types: readonly (DecibelType | LinearType)[], first: Dimension): Dimension {
  return types.reduce((level, { dimension }) => (dimension[2] < level[2] ? dimension : level), first);
}

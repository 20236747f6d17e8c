/** Moving between the linear and the decibel form, and naming types in findings. */
import {
  combineMeanings,
  describeDimension,
  findUnit,
  isDimensionless,
  isRootPower,
  NEUTRAL,
  raiseDimension,
  sameDimension,
  UNIT_WORDS,
  type Dimension,
  type Meaning,
  type Unit,
} from '../quantity';
import { scalePlan, shiftPlan, type Plan } from './plan';
import type { Checked, DecibelType, LinearType, SumTerm, Type } from './types';

/** True when decibels of this linear quantity are 20·log10: voltages, fields, and ratios of two such. */
export function isFieldLike(type: LinearType): boolean {
  return isDimensionless(type.dimension) ? type.degree === 1 : isRootPower(type.dimension);
}

/** The dimension of the power-like quantity whose decibels stand for this linear one. */
export function powerDimension(type: LinearType): Dimension {
  return isRootPower(type.dimension) ? raiseDimension(type.dimension, 2) : type.dimension;
}

/** The decibel form of a linear quantity: 10·log10, or 20·log10 of voltages and fields (ISO 80000-1). */
export function decibelsOf(
  linear: { type: LinearType; plan: Plan },
  zeroIsNoPower: boolean,
): { type: DecibelType; plan: Plan } {
  const fieldLike = isFieldLike(linear.type);
  const decibels: Plan = { op: 'decibels', of: linear.plan, zeroIsNoPower };
  const { meaning, bandwidth, noiseTemperature, plane } = linear.type;
  return {
    type: {
      form: 'decibel',
      dimension: powerDimension(linear.type),
      offsetDb: 0,
      scale: 1,
      meaning: fieldLike ? squared(meaning) : meaning,
      bandwidth,
      noiseTemperature,
      plane,
      // A power that came out of dBm goes back into dBm.
      unitHint: linear.type.unitHint?.form === 'decibel' ? linear.type.unitHint : undefined,
    },
    plan: fieldLike ? scalePlan(decibels, 2) : decibels,
  };
}

export const squared = (meaning: Meaning | undefined): Meaning | undefined =>
  meaning === undefined ? undefined : combineMeanings(NEUTRAL, meaning, 2);

/** The linear form of a decibel quantity: watts, hertz, ratios; volts of dBV. */
export function linearOf(decibel: { type: DecibelType; plan: Plan }): { type: LinearType; plan: Plan } {
  const { type } = decibel;
  const root = !isDimensionless(type.dimension) && isRootPower(raiseDimension(type.dimension, 0.5));
  const full = shiftPlan(decibel.plan, type.offsetDb);
  const dimension = root ? raiseDimension(type.dimension, 0.5) : type.dimension;
  return {
    type: {
      form: 'linear',
      dimension,
      degree: isDimensionless(dimension) ? 2 : 0,
      sort: 'ratio',
      meaning: root && type.meaning !== undefined ? combineMeanings(NEUTRAL, type.meaning, 0.5) : type.meaning,
      bandwidth: type.bandwidth,
      plane: type.plane,
      noiseTemperature: type.noiseTemperature,
      unitHint: type.unitHint,
    },
    plan: { op: 'linear', of: root ? scalePlan(full, 0.5) : full },
  };
}

/** The terms of a decibel expression: its own when it is a sum, else itself. */
export function termsOf(checked: Checked, text: string): readonly SumTerm[] {
  if (checked.terms !== undefined) return checked.terms;
  if (checked.type.form !== 'decibel') return [];
  return [
    {
      coefficient: 1,
      tree: checked.tree,
      text,
      type: checked.type,
      plan: checked.plan,
      kind: checked.kind,
      side: checked.side,
      isDeclared: checked.isDeclared ?? false,
      isNumber: false,
      symbol: checked.tree.type === 'symbol' ? checked.tree.name : undefined,
      overReference: checked.overReference,
    },
  ];
}

/** Words that a person may type but that no result is put in unasked. */
const RARE_WORDS: ReadonlySet<string> = new Set(['dBkW', 'dBµW', 'dBpW', 'dBkHz', 'dBMHz']);

/**
 * The unit in which a decibel result of this dimension is shown when its line declares none: the first of `hints` that fits,
 * else the word whose reference is the same, else any word of the dimension, else the reference written out.
 */
export function fittingDecibelUnit(dimension: Dimension, offsetDb: number, hints: readonly (Unit | undefined)[]): Unit {
  const fits = (unit: Unit | undefined): unit is Unit =>
    unit?.form === 'decibel' && sameDimension(unit.dimension, dimension);
  const hinted = hints.find(fits);
  if (hinted !== undefined) return hinted;
  const candidates = UNIT_WORDS.map(findUnit).filter(fits);
  const same = candidates.find(
    (unit) => unit.form === 'decibel' && unit.offsetDb === offsetDb && !RARE_WORDS.has(unit.word),
  );
  const found = same ?? candidates[0];
  if (found !== undefined) return found;
  const word = `dB(${describeDimension(dimension)})`;
  return { form: 'decibel', word, dimension, offsetDb: 0, description: `decibel over ${word.slice(3, -1)}` };
}

/** The unit in which a linear result is shown when its line declares none. */
export function fittingLinearUnit(dimension: Dimension, hints: readonly (Unit | undefined)[]): Unit {
  const fits = (unit: Unit | undefined): unit is Unit =>
    unit?.form === 'linear' && sameDimension(unit.dimension, dimension);
  const hinted = hints.find(fits);
  if (hinted !== undefined) return hinted;
  const base = UNIT_WORDS.map(findUnit).find(
    (unit) => fits(unit) && unit.form === 'linear' && unit.factor === 1 && unit.shift === 0,
  );
  if (base !== undefined) return base;
  const word = describeDimension(dimension);
  return { form: 'linear', word, dimension, factor: 1, shift: 0, description: word };
}

/** A type in words for findings: `dBm`, `Hz`, `dB per km`, `a plain number`. */
export function describeType(type: Type): string {
  switch (type.form) {
    case 'decibel':
      return fittingDecibelUnit(type.dimension, type.offsetDb, [type.unitHint]).word;
    case 'linear':
      return isDimensionless(type.dimension)
        ? 'a plain number'
        : fittingLinearUnit(type.dimension, [type.unitHint]).word;
    case 'rate':
      return type.unitHint?.word ?? 'dB/m';
    case 'truth':
      return 'yes or no';
    case 'text':
      return 'a text';
    case 'broken':
      return 'nothing';
  }
}

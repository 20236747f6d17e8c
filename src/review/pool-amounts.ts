/**
 * The amounts that add up in a pool. Powers are kept in decibels over SI, so that nothing overflows and a small one beside a
 * large one is not lost; reciprocals of signal ratios likewise, with the sign turned; other quantities as they are, in SI.
 * Holds: the amount of a figure, brought back into the figure's unit, is the figure; −∞ is no power.
 */
import { isDimensionless, isRootPower, linearValue, powerDifference, powerSum, type Unit } from '../quantity';

/** As powers (levels, impairment ratios), as they are (temperatures), or by their reciprocals (signal ratios). */
export type Adding = 'powers' | 'linear' | 'reciprocal';

/** The amounts together. */
export function combineAmounts(amounts: readonly number[], adding: Adding): number {
  return adding === 'linear' ? amounts.reduce((sum, amount) => sum + amount, 0) : powerSum(amounts);
}

/** What is left of an amount when another is taken off; NaN when the other is the larger. */
export function restOf(whole: number, part: number, adding: Adding): number {
  if (adding !== 'linear') return powerDifference(whole, part);
  return part <= whole ? whole - part : NaN;
}

/** The part of the whole that an amount is, 0 to 1; undefined where there is nothing to share. */
export function shareOf(amount: number, whole: number, adding: Adding): number | undefined {
  if (adding === 'linear') return whole > 0 && Number.isFinite(whole) ? amount / whole : undefined;
  return Number.isFinite(whole) ? 10 ** ((amount - whole) / 10) : undefined;
}

/** For each amount, all others together: made of those before and those behind it, never by taking it off again. */
export function withoutEach(amounts: readonly number[], adding: Adding): readonly number[] {
  const nothing = combineAmounts([], adding);
  const behind: number[] = [nothing];
  for (const amount of amounts.slice(1).reverse())
    behind.push(combineAmounts([amount, behind[behind.length - 1] ?? nothing], adding));
  let before = nothing;
  return amounts.map((amount, index) => {
    const rest = combineAmounts([before, behind[amounts.length - 1 - index] ?? nothing], adding);
    before = combineAmounts([before, amount], adding);
    return rest;
  });
}

/** The amount of a figure in its unit. */
export function amountIn(unit: Unit, figure: number, adding: Adding): number {
  if (adding === 'linear') {
    if (unit.form === 'linear') return figure * unit.factor + unit.shift;
    return linearValue(figure, unit)?.value ?? NaN;
  }
  const decibels =
    unit.form === 'decibel'
      ? figure + unit.offsetDb
      : unit.form === 'linear'
        ? decibelsPerDecade(unit) * Math.log10(figure * unit.factor + unit.shift)
        : NaN;
  return adding === 'reciprocal' ? -decibels : decibels;
}

/** How a plain number counts: as decibels itself, or with so many decibels for each factor of ten. */
export type NumberScale = 'decibels' | 10 | 20;

/** The figure of an amount in a unit; `scale` where it is a plain number, or a voltage or field. */
export function figureIn(unit: Unit, amount: number, adding: Adding, scale?: NumberScale): number {
  if (adding === 'linear') {
    if (unit.form === 'linear') return (amount - unit.shift) / unit.factor;
    return unit.form === 'decibel' ? decibelsOfLinear(amount, unit) : NaN;
  }
  const decibels = adding === 'reciprocal' ? -amount : amount;
  if (scale === 'decibels') return decibels;
  if (unit.form === 'decibel') return decibels - unit.offsetDb;
  return unit.form === 'linear'
    ? (10 ** (decibels / (scale ?? decibelsPerDecade(unit))) - unit.shift) / unit.factor
    : NaN;
}

/** Voltages and fields count by their squares. */
const decibelsPerDecade = (unit: Unit & { readonly form: 'linear' }): number =>
  !isDimensionless(unit.dimension) && isRootPower(unit.dimension) ? 20 : 10;

/** The figure of an SI value in a decibel unit: the inverse of `linearValue`. */
function decibelsOfLinear(value: number, unit: Unit & { readonly form: 'decibel' }): number {
  const reference = linearValue(0, unit)?.value ?? NaN;
  const tenAbove = linearValue(10, unit)?.value ?? NaN;
  // Ten decibels are a factor of ten of powers, and the root of that of voltages and fields.
  return (10 * Math.log10(value / reference)) / Math.log10(tenAbove / reference);
}

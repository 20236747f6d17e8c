/**
 * Sums of powers as the combining functions make them: what each part contributes, and how the parts enter.
 * Holds: shares add to 1 and are how much the result moves, dB per dB, when a part does.
 */
import { decibelsOf, evaluatePlan, type Checked, type Figures } from '../formula';
import { isDimensionless, powerShares } from '../quantity';

/** A part of a sum of powers. */
export interface PowerPart {
  readonly checked: Checked;
  /** 10·log10 of the power-like quantity in SI; −∞ for no power. */
  readonly figureDb: number;
  /** −1 for a power that is taken off. */
  readonly sign: 1 | -1;
}

export interface PowerSum {
  readonly parts: readonly PowerPart[];
  /** True when the reciprocals add, as they do of signal ratios. */
  readonly isReciprocal: boolean;
  /** True when the sum is divided by the number of parts. */
  readonly isMean: boolean;
}

const COMBINING: ReadonlySet<string> = new Set(['powersum', 'powerdiff', 'meanpower', 'ratiosum']);

/** The sum of powers that a checked expression is; undefined when it is none. */
export function powerSumOf({ tree, parts }: Checked, figures: Figures): PowerSum | undefined {
  if (tree.type !== 'call' || !COMBINING.has(tree.name)) return undefined;
  return {
    parts: parts.map((checked, index) => ({
      checked,
      figureDb: powerDb(checked, figures),
      sign: tree.name === 'powerdiff' && index > 0 ? -1 : 1,
    })),
    isReciprocal: tree.name === 'ratiosum' && !parts.some(isImpairmentRatio),
    isMean: tree.name === 'meanpower',
  };
}

const isImpairmentRatio = ({ type }: Checked): boolean =>
  (type.form === 'decibel' || type.form === 'linear') && type.meaning !== undefined && type.meaning.w < 0;

/** True for a number without a unit, which counts as decibels where powers are combined. */
export const isBareDecibels = ({ type }: Checked): boolean =>
  type.form === 'linear' && isDimensionless(type.dimension) && type.sort !== 'ratio';

/** 10·log10 of a part's power-like quantity in SI (of the square of voltages and fields). */
function powerDb(part: Checked, figures: Figures): number {
  const { type, plan } = part;
  if (type.form === 'decibel') return evaluatePlan(plan, figures) + type.offsetDb;
  if (type.form !== 'linear') return NaN;
  return evaluatePlan(isBareDecibels(part) ? plan : decibelsOf({ type, plan }, true).plan, figures);
}

/** The share of each part; undefined while there is no power to share. */
export function sharesOf({ parts, isReciprocal }: PowerSum): readonly number[] | undefined {
  const figures = parts.map(({ figureDb }) => (isReciprocal ? -figureDb : figureDb));
  if (figures.some((figure) => Number.isNaN(figure) || figure === Infinity)) return undefined;
  const shares = powerShares(figures);
  const total = parts.reduce((sum, { sign }, index) => sum + sign * (shares[index] ?? 0), 0);
  return total > 0 ? parts.map(({ sign }, index) => (sign * (shares[index] ?? 0)) / total) : undefined;
}

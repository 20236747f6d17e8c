/**
 * Curves in the document: a table y(x) with units, which expressions call by the curve's symbol.
 * Holds: points are figures in the units of the axes; their order is as typed, and need not be sorted.
 */
import type { QuantityKind } from '../quantity';

export interface CurveAxis {
  readonly label: string;
  readonly unit: string;
}

export interface CurveValueAxis extends CurveAxis {
  readonly quantity?: QuantityKind;
}

/** Straight lines between the points, or a smooth curve that rises and falls only where they do. */
export const INTERPOLATIONS = ['linear', 'monotone'] as const;

export type Interpolation = (typeof INTERPOLATIONS)[number];

export type CurvePoint = readonly [number, number];

export interface CurveSection {
  readonly id: string;
  readonly kind: 'curve';
  readonly symbol: string;
  readonly title: string;
  readonly x: CurveAxis;
  readonly y: CurveValueAxis;
  /** Absent: linear. */
  readonly interpolation?: Interpolation;
  /** True: x is taken by its logarithm, between the points and in the plot. */
  readonly logarithmic?: boolean;
  readonly points: readonly CurvePoint[];
}

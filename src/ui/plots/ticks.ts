/**
 * Ticks of axes.
 * Holds: a linear axis reaches from its first tick to its last and less than a step beyond what it shows; there are never more
 * ticks than asked for, and at least two.
 */

export interface Ticks {
  /** The ends of the axis. */
  readonly from: number;
  readonly to: number;
  readonly values: readonly number[];
  /** Decimals with which all of them can be told apart. */
  readonly decimals: number;
}

const NICE = [1, 2, 5] as const;

/** Ticks in steps of 1, 2 or 5 times a power of ten that hold `low` to `high`: the finest of which there are at most `most`. */
export function niceTicks(low: number, high: number, most: number): Ticks {
  const centre = (low + high) / 2;
  // A difference that is but the rounding of equal figures is none.
  const isSpan = high - low > 1e-9 * Math.abs(centre);
  const span = isSpan ? high - low : Math.max(Math.abs(centre) * 0.1, 1);
  const [bottom, top] = isSpan ? [low, high] : [centre - span / 2, centre + span / 2];
  const allowed = Math.max(2, Math.floor(most));
  let exponent = Math.floor(Math.log10(span / allowed)) - 1;
  for (; ; exponent++) {
    for (const nice of NICE) {
      const step = nice * 10 ** exponent;
      const first = Math.floor(clean(bottom / step));
      const last = Math.ceil(clean(top / step));
      // Two ticks hold any range that does not cross a tick; one that does takes three at the coarsest.
      if (last - first + 1 > Math.max(allowed, first < 0 && last > 0 ? 3 : 2)) continue;
      const values = Array.from({ length: last - first + 1 }, (_, i) => scaled(first + i, nice, exponent));
      return {
        ...{ from: scaled(first, nice, exponent), to: scaled(last, nice, exponent) },
        ...{ values, decimals: Math.max(0, -exponent) },
      };
    }
  }
}

/** A quotient that is a whole number but for rounding. */
const clean = (quotient: number): number => {
  const whole = Math.round(quotient);
  return Math.abs(quotient - whole) < 1e-9 * Math.max(1, Math.abs(whole)) ? whole : quotient;
};

/** Without the dust of binary fractions: 3 · 0.1 is 0.3. */
const scaled = (count: number, nice: number, exponent: number): number =>
  exponent < 0 ? (count * nice) / 10 ** -exponent : count * nice * 10 ** exponent;

const LOGARITHMIC_SETS = [[1, 2, 3, 4, 5, 6, 7, 8, 9], [1, 2, 5], [1]] as const;

/** Ticks of an axis that counts by the logarithm, between its ends; the ends are kept as they are. Both are above 0. */
export function logarithmicTicks(low: number, high: number, most: number): Ticks {
  const [bottom, top] = [Math.floor(Math.log10(low)), Math.ceil(Math.log10(high))];
  const inside = (values: readonly number[]): readonly number[] =>
    values.filter((value) => value >= low * (1 - 1e-12) && value <= high * (1 + 1e-12));
  const decades = Array.from({ length: top - bottom + 1 }, (_, i) => bottom + i);
  const ticks = (set: readonly number[], each: number): readonly number[] =>
    inside(
      decades.filter((decade) => decade % each === 0).flatMap((decade) => set.map((nice) => scaled(1, nice, decade))),
    );
  const all = [
    ...LOGARITHMIC_SETS.map((set) => ticks(set, 1)),
    ...[2, 3, 5, 10, 20, 50, 100].map((each) => ticks([1], each)),
  ];
  const fitting = all.find((values) => values.length <= most && values.length >= 2);
  // Less than a decade, or next to nothing of it: steps as on a linear axis.
  const linear = niceTicks(low, high, most);
  const values = fitting ?? inside(linear.values);
  const decimals = Math.max(0, ...values.map((value) => -Math.floor(Math.log10(value))));
  return { from: low, to: high, values, decimals: fitting === undefined ? linear.decimals : decimals };
}

/** A tick's figure. */
export const writeTick = (value: number, decimals: number): string =>
  value
    .toFixed(Math.min(decimals, 20))
    .replace(/^-(0(?:\.0*)?)$/, '$1')
    .replace('-', '−');

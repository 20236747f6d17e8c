/**
 * Loops over columns: one operation over a block of trials. Columns are Float64Array; `out` may be none of the operands where
 * several passes are made. Decibels go through natural exponentials and logarithms, which cost less than powers of ten and
 * differ from them by a few units in the last place.
 */

export type Column = Float64Array;

const PER_DB = Math.LN10 / 10;
const DB = 10 / Math.LN10;

/** Σ weight·column + constant. */
export function weighedSum(
  out: Column,
  columns: readonly Column[],
  weights: readonly number[],
  constant: number,
  count: number,
): void {
  const [a = out, b = out, c = out, d = out] = columns;
  const [ka = 0, kb = 0, kc = 0, kd = 0] = weights;
  if (columns.length === 1) weigh1(out, a, ka, constant, count);
  else if (columns.length === 2) weigh2(out, a, ka, b, kb, constant, count);
  else if (columns.length === 3) weigh3(out, a, ka, b, kb, c, kc, constant, count);
  else weigh4(out, a, ka, b, kb, c, kc, d, kd, constant, count);
  for (let at = 4; at < columns.length; at++) addWeighed(out, columns[at] as Column, weights[at] as number, count);
}

function weigh1(out: Column, a: Column, ka: number, constant: number, count: number): void {
  for (let i = 0; i < count; i++) out[i] = ka * (a[i] as number) + constant;
}

function weigh2(out: Column, a: Column, ka: number, b: Column, kb: number, constant: number, count: number): void {
  for (let i = 0; i < count; i++) out[i] = ka * (a[i] as number) + kb * (b[i] as number) + constant;
}

function weigh3(
  out: Column,
  a: Column,
  ka: number,
  b: Column,
  kb: number,
  c: Column,
  kc: number,
  constant: number,
  count: number,
): void {
  for (let i = 0; i < count; i++)
    out[i] = ka * (a[i] as number) + kb * (b[i] as number) + kc * (c[i] as number) + constant;
}

function weigh4(
  out: Column,
  a: Column,
  ka: number,
  b: Column,
  kb: number,
  c: Column,
  kc: number,
  d: Column,
  kd: number,
  constant: number,
  count: number,
): void {
  for (let i = 0; i < count; i++)
    out[i] = ka * (a[i] as number) + kb * (b[i] as number) + kc * (c[i] as number) + kd * (d[i] as number) + constant;
}

function addWeighed(out: Column, a: Column, ka: number, count: number): void {
  for (let i = 0; i < count; i++) out[i] = (out[i] as number) + ka * (a[i] as number);
}

export function multiply(out: Column, a: Column, b: Column, count: number): void {
  for (let i = 0; i < count; i++) out[i] = (a[i] as number) * (b[i] as number);
}

export function divide(out: Column, a: Column, b: Column, count: number): void {
  for (let i = 0; i < count; i++) out[i] = (a[i] as number) / (b[i] as number);
}

export function divideConstant(out: Column, a: number, b: Column, count: number): void {
  for (let i = 0; i < count; i++) out[i] = a / (b[i] as number);
}

export function divideBy(out: Column, a: Column, b: number, count: number): void {
  for (let i = 0; i < count; i++) out[i] = (a[i] as number) / b;
}

export function raise(out: Column, a: Column, b: Column, count: number): void {
  for (let i = 0; i < count; i++) out[i] = (a[i] as number) ** (b[i] as number);
}

export function raiseTo(out: Column, a: Column, exponent: number, count: number): void {
  if (exponent === 2) multiply(out, a, a, count);
  else for (let i = 0; i < count; i++) out[i] = (a[i] as number) ** exponent;
}

export function raiseConstant(out: Column, base: number, b: Column, count: number): void {
  for (let i = 0; i < count; i++) out[i] = base ** (b[i] as number);
}

/** 10·log10; `atZero` of zero, NaN below. */
export function decibels(out: Column, a: Column, atZero: number, count: number): void {
  for (let i = 0; i < count; i++) {
    const value = a[i] as number;
    out[i] = value > 0 ? DB * Math.log(value) : value === 0 ? atZero : NaN;
  }
}

/** 10^(x/10). */
export function linear(out: Column, a: Column, count: number): void {
  for (let i = 0; i < count; i++) out[i] = Math.exp(PER_DB * (a[i] as number));
}

/** How a function combines powers: its result is PS(scale·xᵢ)/scale + offset, PS the sum of powers in decibels. */
export interface Combination {
  readonly scale: number;
  readonly offset: number;
}

/** Two columns, or a column and a constant. NaN where both are without power: see `mend`. */
export function combine2(
  out: Column,
  a: Column,
  b: Column | number,
  { scale, offset }: Combination,
  count: number,
): void {
  const per = PER_DB * Math.abs(scale);
  const times = DB / scale;
  const isColumn = typeof b !== 'number';
  const other = isColumn ? 0 : b;
  const second = isColumn ? b : a;
  const isFlipped = scale < 0;
  for (let i = 0; i < count; i++) {
    const x = a[i] as number;
    const y = isColumn ? (second[i] as number) : other;
    // The larger power of the two is the smaller figure where the scale is negative.
    const top = isFlipped ? (x < y ? x : y) : x > y ? x : y;
    out[i] = top + offset + times * Math.log(1 + Math.exp(-per * Math.abs(x - y)));
  }
}

export function combine3(
  out: Column,
  a: Column,
  b: Column,
  c: Column,
  { scale, offset }: Combination,
  count: number,
): void {
  const per = PER_DB * scale;
  const times = DB / scale;
  const isFlipped = scale < 0;
  for (let i = 0; i < count; i++) {
    const x = a[i] as number;
    const y = b[i] as number;
    const z = c[i] as number;
    const isFirst = isFlipped ? x < y : x > y;
    const first = isFirst ? x : y;
    const low = isFirst ? y : x;
    const isSecond = isFlipped ? first < z : first > z;
    const top = isSecond ? first : z;
    const middle = isSecond ? z : first;
    out[i] = top + offset + times * Math.log(1 + Math.exp(per * (low - top)) + Math.exp(per * (middle - top)));
  }
}

/**
 * Any number of columns and constants (put together as `constant`, a factor over the reference). All are taken over a reference
 * that is near the result, instead of the largest in each trial; what that overflows or loses is NaN and left to `mend`.
 */
export function combineMany(
  out: Column,
  columns: readonly Column[],
  constant: number,
  reference: number,
  { scale, offset }: Combination,
  count: number,
): void {
  const per = PER_DB * scale;
  const shift = per * reference;
  out.fill(constant, 0, count);
  for (const column of columns)
    for (let i = 0; i < count; i++) out[i] = (out[i] as number) + Math.exp(per * (column[i] as number) - shift);
  const times = DB / scale;
  for (let i = 0; i < count; i++) {
    const sum = out[i] as number;
    out[i] = sum > 1e-280 && sum < 1e280 ? reference + offset + times * Math.log(sum) : NaN;
  }
}

/** An operand of a function that is applied trial by trial. */
export type Argument = Column | number;

/** Computes anew, by the function itself, the trials that a faster loop left without a figure. */
export function mend(
  out: Column,
  compute: (...values: number[]) => number,
  values: readonly Argument[],
  count: number,
): void {
  const filled = new Array<number>(values.length).fill(0);
  for (let i = 0; i < count; i++) {
    if (!Number.isNaN(out[i])) continue;
    for (let at = 0; at < values.length; at++) {
      const value = values[at] as Argument;
      filled[at] = typeof value === 'number' ? value : (value[i] as number);
    }
    out[i] = compute(...filled);
  }
}

/** A function trial by trial. `filled` holds the arguments; constants stand in it already. */
export function applyEach(
  out: Column,
  compute: (...values: number[]) => number,
  values: readonly Argument[],
  filled: number[],
  count: number,
): void {
  const [a] = values;
  if (values.length === 1 && a !== undefined && typeof a !== 'number') {
    for (let i = 0; i < count; i++) out[i] = compute(a[i] as number);
    return;
  }
  for (let i = 0; i < count; i++) {
    for (let at = 0; at < values.length; at++) {
      const value = values[at] as Argument;
      if (typeof value !== 'number') filled[at] = value[i] as number;
    }
    out[i] = callWith(compute, filled);
  }
}

function callWith(compute: (...values: number[]) => number, filled: readonly number[]): number {
  const [a, b, c, d] = filled;
  switch (filled.length) {
    case 2:
      return compute(a as number, b as number);
    case 3:
      return compute(a as number, b as number, c as number);
    case 4:
      return compute(a as number, b as number, c as number, d as number);
    default:
      return compute(...filled);
  }
}

/** Takes the one or the other column as the condition says; NaN where the condition has no figure. */
export function choose(out: Column, condition: Column, then: Argument, otherwise: Argument, count: number): void {
  for (let i = 0; i < count; i++) {
    const met = condition[i] as number;
    const taken = met !== 0 ? then : otherwise;
    out[i] = Number.isNaN(met) ? NaN : typeof taken === 'number' ? taken : (taken[i] as number);
  }
}

/** Withholds what is not finite, but *no power* in decibels: what the engine does with every figure. */
export function settle(out: Column, allowsNoPower: boolean, count: number): void {
  for (let i = 0; i < count; i++) {
    const value = out[i] as number;
    if (value - value !== 0 && !(allowsNoPower && value === -Infinity)) out[i] = NaN;
  }
}

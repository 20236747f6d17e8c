/**
 * Where rows stand: heights with prefix sums in a binary indexed tree, so that a measured height, a row's top and the row at an
 * offset each cost some ten steps with 10,000 rows.
 * Holds: top(i + 1) = top(i) + height(i); total = top(count); at(top(i)) = i for rows that have a height.
 */

/** Heights of rows, in CSS px. */
export class RowLayout {
  readonly count: number;
  readonly #heights: Float64Array;
  /** sums[i] holds the heights of the rows i − lowbit(i) … i − 1. */
  readonly #sums: Float64Array;

  constructor(count: number, heightOf: (index: number) => number) {
    this.count = count;
    this.#heights = new Float64Array(count);
    this.#sums = new Float64Array(count + 1);
    for (let i = 1; i <= count; i++) {
      const height = heightOf(i - 1);
      this.#heights[i - 1] = height;
      this.#sums[i] = (this.#sums[i] ?? 0) + height;
      const above = i + (i & -i);
      if (above <= count) this.#sums[above] = (this.#sums[above] ?? 0) + (this.#sums[i] ?? 0);
    }
  }

  /** All heights together. */
  get total(): number {
    return this.top(this.count);
  }

  /** The height of a row; 0 outside. */
  height(index: number): number {
    return this.#heights[index] ?? 0;
  }

  /** The top edge of a row, from the top of the first; for `count`, the foot of the last. */
  top(index: number): number {
    let sum = 0;
    for (let i = Math.min(index, this.count); i > 0; i -= i & -i) sum += this.#sums[i] ?? 0;
    return sum;
  }

  /** Gives a row another height. */
  set(index: number, height: number): void {
    const difference = height - this.height(index);
    if (difference === 0 || index < 0 || index >= this.count) return;
    this.#heights[index] = height;
    for (let i = index + 1; i <= this.count; i += i & -i) this.#sums[i] = (this.#sums[i] ?? 0) + difference;
  }

  /** The row at an offset from the top; the first above all, the last below all. −1 without rows. */
  at(offset: number): number {
    if (this.count === 0) return -1;
    let index = 0;
    let rest = offset;
    for (let step = 2 ** Math.floor(Math.log2(this.count)); step >= 1; step /= 2) {
      const next = index + step;
      const sum = this.#sums[next] ?? Infinity;
      if (next <= this.count && sum <= rest) {
        index = next;
        rest -= sum;
      }
    }
    return Math.min(index, this.count - 1);
  }
}

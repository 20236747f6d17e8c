/**
 * The baseline: the same sheets written by hand as closures over a Float64Array, with dirty marking, and no units, checks,
 * findings or graph. It is what an evaluator without any of our work would cost.
 */

export interface Baseline {
  /** Computes everything. */
  full(): void;
  /** Sets the figure of a line that rests on nothing and computes what is downstream. */
  edit(index: number, figure: number): void;
  readonly values: Float64Array;
}

interface HandLine {
  readonly inputs: readonly number[];
  readonly run: (values: Float64Array) => number;
}

function baseline(lines: readonly HandLine[]): Baseline {
  const values = new Float64Array(lines.length);
  const dirty = new Uint8Array(lines.length);
  const runs = lines.map(({ run }) => run);
  const users: number[][] = lines.map(() => []);
  lines.forEach(({ inputs }, index) => inputs.forEach((input) => users[input]?.push(index)));
  const userSlots = users.map((list) => Int32Array.from(list));
  const pass = (from: number): void => {
    for (let index = from; index < runs.length; index++) {
      if (dirty[index] === 0) continue;
      dirty[index] = 0;
      const value = (runs[index] as HandLine['run'])(values);
      if (value === values[index]) continue;
      values[index] = value;
      const own = userSlots[index] as Int32Array;
      for (let i = 0; i < own.length; i++) dirty[own[i] as number] = 1;
    }
  };
  return {
    values,
    full: () => {
      dirty.fill(1);
      pass(0);
    },
    edit: (index, figure) => {
      runs[index] = () => figure;
      dirty[index] = 1;
      pass(index);
    },
  };
}

const figure = (value: number): HandLine => ({ inputs: [], run: () => value });
const less = (input: number, by: number): HandLine => ({
  inputs: [input],
  run: (values) => (values[input] as number) - by,
});

/** As sheets.chain. */
export function handChain(count: number): Baseline {
  return baseline(
    Array.from({ length: count }, (_, index) => (index === 0 ? figure(10) : less(index - 1, (index % 10) / 100))),
  );
}

/** As sheets.fanOut. */
export function handFanOut(count: number): Baseline {
  return baseline(
    Array.from({ length: count }, (_, index) => (index === 0 ? figure(10) : less(0, (index % 97) + 0.5))),
  );
}

/** As sheets.lattice, with the plain power sum. */
export function handLattice(rows: number, width: number): Baseline {
  return baseline(
    Array.from({ length: rows * width }, (_, index) => {
      const row = Math.floor(index / width);
      const column = index % width;
      if (row === 0) return figure(-100 - column);
      const a = (row - 1) * width + column;
      const b = (row - 1) * width + ((column + 1) % width);
      return {
        inputs: [a, b],
        run: (values: Float64Array) =>
          10 * Math.log10(10 ** ((values[a] as number) / 10) + 10 ** ((values[b] as number) / 10)) - 3,
      };
    }),
  );
}

/** As sheets.tens. */
export function handTens(count: number): Baseline {
  return baseline(
    Array.from({ length: count }, (_, index) => {
      const first = index - (index % 10);
      return index === first ? figure(index % 50) : less(first, index % 10);
    }),
  );
}

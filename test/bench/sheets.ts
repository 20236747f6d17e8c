/** The worksheets that are measured: a chain, a fan-out, a lattice of diamonds, and a budget of ordinary size. */
import type { Line, Worksheet } from '../../src/worksheet';
import { TRIAL_INPUTS, TRIAL_SHAPES } from './hand-trials';

const sheet = (lines: readonly Line[]): Worksheet => ({
  id: '00000000-0000-4000-8000-000000000000',
  title: 'Measured',
  cases: [{ id: 'nominal', name: 'Nominal' }],
  sections: [{ id: 'all', kind: 'lines', title: 'All', lines }],
});

const line = (index: number, symbol: string, entry: string, unit?: string): Line => ({
  id: `l${String(index)}`,
  symbol,
  label: `Line ${String(index)}`,
  entry,
  ...(unit === undefined ? {} : { unit }),
});

/** Each line is the one before with a figure of its own added. */
export function chain(count: number): Worksheet {
  return sheet(
    Array.from({ length: count }, (_, index) =>
      index === 0
        ? line(0, 'P_0', '10 dBm', 'dBm')
        : line(index, `P_${String(index)}`, `P_${String(index - 1)} - 0.0${String(index % 10)} dB`, 'dBm'),
    ),
  );
}

/** All lines rest on the first. */
export function fanOut(count: number): Worksheet {
  return sheet(
    Array.from({ length: count }, (_, index) =>
      index === 0
        ? line(0, 'P_0', '10 dBm', 'dBm')
        : line(index, `P_${String(index)}`, `P_0 - ${String(index % 97)}.5 dB`, 'dBm'),
    ),
  );
}

/** Rows of so many lines; each line is the power sum of two neighbours in the row above. */
export function lattice(rows: number, width: number): Worksheet {
  return sheet(
    Array.from({ length: rows * width }, (_, index) => {
      const row = Math.floor(index / width);
      const column = index % width;
      const above = (offset: number): string => `P_${String((row - 1) * width + ((column + offset) % width))}`;
      return row === 0
        ? line(index, `P_${String(index)}`, `-${String(100 + column)} dBm`, 'dBm')
        : line(index, `P_${String(index)}`, `powersum(${above(0)}, ${above(1)}) - 3 dB`, 'dBm');
    }),
  );
}

/** Blocks of ten lines, each resting on the block's first: an edit of that first line touches ten lines. */
export function tens(count: number): Worksheet {
  return sheet(
    Array.from({ length: count }, (_, index) => {
      const first = index - (index % 10);
      return index === first
        ? line(index, `P_${String(index)}`, `${String(index % 50)} dBm`, 'dBm')
        : line(index, `P_${String(index)}`, `P_${String(first)} - ${String(index % 10)} dB`, 'dBm');
    }),
  );
}

const BUDGET: readonly (readonly [symbol: string, entry: string, unit?: string])[] = [
  ['f', '868 MHz'],
  ['d', '12 km'],
  ['B', '125 kHz'],
  ['P_tx', '14 dBm', 'dBm'],
  ['L_feed', '1.1 dB'],
  ['G_tx', '2.15 dBi'],
  ['EIRP', 'P_tx - L_feed + G_tx', 'dBm'],
  ['L_fs', 'free_space_loss(d, f)', 'dB'],
  ['L_fade', '8 dB'],
  ['G_rx', '5 dBi'],
  ['P_rx', 'EIRP - L_fs - L_fade + G_rx', 'dBm'],
  ['NF', '6 dB'],
  ['N', 'thermal_noise(T_0, B) + NF', 'dBm'],
  ['I_1', '-118 dBm', 'dBm'],
  ['I_2', '-121 dBm', 'dBm'],
  ['N_tot', 'powersum(N, I_1, I_2)', 'dBm'],
  ['SINR', 'P_rx - N_tot', 'dB'],
  ['SINR_req', '3 dB'],
  ['M', 'SINR - SINR_req', 'dB'],
  ['CN0', 'P_rx - N + db(B)', 'dBHz'],
];

/** Three links of twenty lines: a budget of ordinary size. */
export function budget(): Worksheet {
  const links = ['a', 'b', 'c'];
  return sheet(
    links.flatMap((link, number) =>
      BUDGET.map(([symbol, entry, unit], index) =>
        line(
          number * BUDGET.length + index,
          `${symbol}_${link}`,
          entry.replace(
            /\b(f|d|B|P_tx|L_feed|G_tx|EIRP|L_fs|L_fade|G_rx|P_rx|NF|N|I_1|I_2|N_tot|SINR|SINR_req)\b(?!\()/g,
            `$1_${link}`,
          ),
          unit,
        ),
      ),
    ),
  );
}

/** A chain section of so many stages, amplifiers and losses by turns, with all that a stage may say of noise and linearity. */
export function lineUp(count: number): Worksheet {
  const stages = Array.from({ length: count }, (_, i) => ({
    id: `s${String(i)}`,
    symbol: `s${String(i)}`,
    label: `Stage ${String(i)}`,
    gain: i % 2 === 0 ? '6.1 dB' : '-6 dB',
    noiseFigure: i % 2 === 0 ? '2 dB' : '6 dB',
    outputIntercept: '20 dBm',
    inputCompression: '0 dBm',
  }));
  return {
    ...sheet([]),
    sections: [
      {
        id: 'rx',
        kind: 'chain',
        symbol: 'rx',
        title: 'Line-up',
        signal: '-90 dBm',
        noise: '290 K',
        bandwidth: '1 MHz',
        stages,
      },
    ],
  };
}

/** The budget of `handTrials` as a worksheet: thirty lines, of which 24 have tolerances and two are sums of powers. */
export function toleranced(): Worksheet {
  const inputs = TRIAL_INPUTS.map(([symbol, figure, below, above, unit], index): Line => ({
    ...line(index, symbol, `${String(figure)} ${unit}`),
    tolerance: {
      below: `${String(below)} dB`,
      above: `${String(above)} dB`,
      shape: TRIAL_SHAPES[index % 3] ?? 'uniform',
    },
  }));
  const computed: readonly (readonly [symbol: string, entry: string])[] = [
    ['C', 'P_tx - L_feed + G_tx - L_fs - L_gas - L_point - L_pol + G_rx - L_rx'],
    ['N', 'N_in + NF'],
    ['I', 'powersum(P_a + G_a - L_a - D_a + G_rx, P_b + G_b - L_b - D_b + G_rx, P_c - L_c - D_c + G_rx)'],
    ['N_tot', 'powersum(N, I)'],
    ['SINR', 'C - N_tot'],
    ['M', 'SINR - L_mod - SINR_req'],
  ];
  return sheet([...inputs, ...computed.map(([symbol, entry], at) => line(inputs.length + at, symbol, entry))]);
}

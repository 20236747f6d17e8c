/**
 * The baseline for trials: one million of a fixed budget, written by hand over blocks of Float64Array. The same random numbers and
 * shapes; but everything behind them is one loop in which every figure stays in a register, as one would write it for this
 * budget and no other. It knows no lines, no graph, no units and nothing of what may be withheld.
 */
import { fillEven, normalQuantile, streamKey, type StreamKey } from '../../src/analysis';

/** The inputs of the budget: symbol, figure, how far it may be below and above, and the shape by its place in the list of three. */
export const TRIAL_INPUTS: readonly (readonly [
  symbol: string,
  entry: number,
  below: number,
  above: number,
  unit: string,
])[] = [
  ['P_tx', 43, 1, 0.5, 'dBm'],
  ['L_feed', 1.2, 0.2, 0.4, 'dB'],
  ['G_tx', 38.5, 0.5, 0.5, 'dBi'],
  ['L_fs', 148.2, 0.1, 0.1, 'dB'],
  ['L_gas', 0.8, 0.2, 0.5, 'dB'],
  ['L_point', 0.3, 0.3, 0.5, 'dB'],
  ['L_pol', 0.1, 0.1, 0.3, 'dB'],
  ['G_rx', 41.1, 0.4, 0.4, 'dBi'],
  ['L_rx', 0.9, 0.2, 0.3, 'dB'],
  ['N_in', -98.9, 0.2, 0.2, 'dBm'],
  ['NF', 2.4, 0.3, 0.6, 'dB'],
  ['P_a', 30, 2, 2, 'dBm'],
  ['G_a', 3, 2, 2, 'dB'],
  ['L_a', 121, 4, 4, 'dB'],
  ['D_a', 18, 3, 3, 'dB'],
  ['P_b', 36, 2, 2, 'dBm'],
  ['G_b', 5, 2, 2, 'dB'],
  ['L_b', 131, 5, 5, 'dB'],
  ['D_b', 16, 3, 3, 'dB'],
  ['P_c', 40, 1, 1, 'dBm'],
  ['L_c', 118, 3, 6, 'dB'],
  ['D_c', 28, 4, 4, 'dB'],
  ['L_mod', 1.5, 0.5, 0.5, 'dB'],
  ['SINR_req', 12, 0.3, 0.3, 'dB'],
];

export const TRIAL_SHAPES = ['uniform', 'triangular', 'normal'] as const;

const BLOCK = 1024;
const PER_DB = Math.LN10 / 10;
const DB = 10 / Math.LN10;

/** The margin in each of so many trials. The streams are those of lines named l0, l1 … */
export function handTrials(seed: number, trials: number): Float64Array {
  const margins = new Float64Array(trials);
  drawAll(seed, trials, (columns, start, count) => {
    addUp(columns, margins, start, count);
  });
  return margins;
}

/** The deviations alone: what random numbers and shapes cost whoever computes with them. */
export function drawAll(
  seed: number,
  trials: number,
  onBlock: (columns: readonly Float64Array[], start: number, count: number) => void,
): void {
  const keys = TRIAL_INPUTS.map((_, index) => streamKey(seed, `line l${String(index)}`));
  const columns = TRIAL_INPUTS.map(() => new Float64Array(BLOCK));
  for (let start = 0; start < trials; start += BLOCK) {
    const count = Math.min(BLOCK, trials - start);
    for (let index = 0; index < columns.length; index++) {
      const [, figure, below, above] = TRIAL_INPUTS[index] as (typeof TRIAL_INPUTS)[number];
      draw(columns[index] as Float64Array, keys[index] as StreamKey, index % 3, figure, below, above, start, count);
    }
    onBlock(columns, start, count);
  }
}

function draw(
  column: Float64Array,
  key: StreamKey,
  shape: number,
  figure: number,
  below: number,
  above: number,
  start: number,
  count: number,
): void {
  fillEven(column, key, start, count);
  const width = below + above;
  const [low, high] = [figure - below, figure + above];
  if (shape === 0) {
    for (let i = 0; i < count; i++) column[i] = low + width * (column[i] as number);
  } else if (shape === 1) {
    const mode = below / width;
    const [rising, falling] = [width * below, width * above];
    for (let i = 0; i < count; i++) {
      const p = column[i] as number;
      column[i] = p < mode ? low + Math.sqrt(p * rising) : high - Math.sqrt((1 - p) * falling);
    }
  } else {
    const middle = (low + high) / 2;
    const deviation = width / 6;
    for (let i = 0; i < count; i++) column[i] = middle + deviation * normalQuantile(column[i] as number);
  }
}

/** The budget itself. The sums of powers are taken over their largest term, as the worksheet's are. */
function addUp(columns: readonly Float64Array[], margins: Float64Array, start: number, count: number): void {
  const [
    pTx,
    lFeed,
    gTx,
    lFs,
    lGas,
    lPoint,
    lPol,
    gRx,
    lRx,
    nIn,
    nf,
    pA,
    gA,
    lA,
    dA,
    pB,
    gB,
    lB,
    dB,
    pC,
    lC,
    dC,
    lMod,
    req,
  ] = columns as [
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
    Float64Array,
  ];
  const at = (column: Float64Array, i: number): number => column[i] as number;
  for (let i = 0; i < count; i++) {
    const wanted =
      at(pTx, i) -
      at(lFeed, i) +
      at(gTx, i) -
      at(lFs, i) -
      at(lGas, i) -
      at(lPoint, i) -
      at(lPol, i) +
      at(gRx, i) -
      at(lRx, i);
    const noise = at(nIn, i) + at(nf, i);
    const a = at(pA, i) + at(gA, i) - at(lA, i) - at(dA, i) + at(gRx, i);
    const b = at(pB, i) + at(gB, i) - at(lB, i) - at(dB, i) + at(gRx, i);
    const c = at(pC, i) - at(lC, i) - at(dC, i) + at(gRx, i);
    const top = Math.max(a, b, c);
    const interference =
      top + DB * Math.log(Math.exp(PER_DB * (a - top)) + Math.exp(PER_DB * (b - top)) + Math.exp(PER_DB * (c - top)));
    const total = Math.max(noise, interference) + DB * Math.log(1 + Math.exp(-PER_DB * Math.abs(noise - interference)));
    margins[start + i] = wanted - total - at(lMod, i) - at(req, i);
  }
}

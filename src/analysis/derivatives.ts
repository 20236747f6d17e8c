/**
 * The table of derivatives: for each function of the catalogue, and each of the radio models, the partial derivatives by its
 * arguments. Functions that are not here are differentiated by differences.
 */
import {
  capacityBitPerS,
  cascadedTemperatureK,
  cascadeNoiseFigureDb,
  figureOfTemperatureDb,
  freeSpaceLossDb,
  noiseBehindDbm,
  noiseDensityDbmPerHz,
  noiseFigureDb,
  noiseTemperatureK,
  passiveNoiseFigureDb,
  passiveTemperatureK,
  REFERENCE_TEMPERATURE_K,
  riseDb,
  spuriousFreeRangeDb,
  thermalNoiseDbm,
} from '../radio';
import type { Plan } from '../formula';
import { combinationOf } from './column-plan';

/** Partial derivatives at these arguments, where the function's figure is `result`. */
export type Partials = (values: readonly number[], result: number) => readonly number[];

type Apply = Plan & { readonly op: 'apply' };

/** dB for a relative change: d(10·log10 x) = DB·dx/x. */
export const DB = 10 / Math.LN10;

const factor = (decibels: number): number => 10 ** (decibels / 10);
const one =
  (slope: (x: number, result: number) => number): Partials =>
  ([x = NaN], result) => [slope(x, result)];
const flat: Partials = (values) => values.map(() => 0);
/** Slope 1 by the first argument that has the function's figure. */
const taken: Partials = (values, result) => {
  const at = values.indexOf(result);
  return values.map((_, index) => (index === at ? 1 : 0));
};

const BY_NAME: ReadonlyMap<string, Partials> = new Map<string, Partials>([
  ['abs', one((x) => Math.sign(x))],
  ['sqrt', one((_, root) => 0.5 / root)],
  ['exp', one((_, result) => result)],
  ['ln', one((x) => 1 / x)],
  ['log10', one((x) => Math.LOG10E / x)],
  ['sin', one((x) => Math.cos(x))],
  ['cos', one((x) => -Math.sin(x))],
  ['tan', one((_, result) => 1 + result ** 2)],
  ['asin', one((x) => 1 / Math.sqrt(1 - x ** 2))],
  ['acos', one((x) => -1 / Math.sqrt(1 - x ** 2))],
  ['atan', one((x) => 1 / (1 + x ** 2))],
  ['atan2', ([x = NaN, y = NaN]) => [-y / (x ** 2 + y ** 2), x / (x ** 2 + y ** 2)]],
  ['round', flat],
  ['floor', flat],
  ['ceil', flat],
  ['and', flat],
  ['or', flat],
  ['not', flat],
  ['min', taken],
  ['max', taken],
  ['mean', (values) => values.map(() => 1 / values.length)],
  ['interpolate', interpolatePartials],
  [
    'powerdiff',
    ([a = NaN, b = NaN]) => {
      const ratio = factor(b - a);
      return [1 / (1 - ratio), -ratio / (1 - ratio)];
    },
  ],
]);

const BY_MODEL: ReadonlyMap<unknown, Partials> = new Map<unknown, Partials>([
  [noiseDensityDbmPerHz, one((temperature) => DB / temperature)],
  [thermalNoiseDbm, ([temperature = NaN, bandwidth = NaN]) => [DB / temperature, DB / bandwidth]],
  [noiseTemperatureK, one((figure) => (REFERENCE_TEMPERATURE_K * factor(figure)) / DB)],
  [noiseFigureDb, one((temperature) => DB / (REFERENCE_TEMPERATURE_K + temperature))],
  [figureOfTemperatureDb, one((temperature) => DB / (REFERENCE_TEMPERATURE_K + temperature))],
  [
    passiveNoiseFigureDb,
    ([loss = NaN, temperature = NaN], figure) => {
      const whole = factor(figure) * REFERENCE_TEMPERATURE_K;
      return [(factor(loss) * temperature) / whole, (DB * (factor(loss) - 1)) / whole];
    },
  ],
  [cascadeNoiseFigureDb, cascadePartials],
  [freeSpaceLossDb, ([distance = NaN, frequency = NaN]) => [(2 * DB) / distance, (2 * DB) / frequency]],
  [
    capacityBitPerS,
    ([bandwidth = NaN, ratio = NaN], capacity) => {
      const x = factor(ratio);
      return [capacity / bandwidth, (bandwidth * x) / ((1 + x) * Math.LN2 * DB)];
    },
  ],
  [passiveTemperatureK, ([gain = NaN, temperature = NaN]) => [(-factor(-gain) * temperature) / DB, factor(-gain) - 1]],
  [cascadedTemperatureK, ([, gain = NaN, stage = NaN]) => [1, -stage / factor(gain) / DB, 1 / factor(gain)]],
  [noiseBehindDbm, ([temperature = NaN, bandwidth = NaN]) => [DB / temperature, DB / bandwidth, 1]],
  [spuriousFreeRangeDb, () => [2 / 3, -2 / 3]],
  [
    riseDb,
    ([added = NaN, noise = NaN]) => {
      const share = factor(added - noise) / (1 + factor(added - noise));
      return [share, -share];
    },
  ],
]);

/** How a function's derivatives are found; undefined: by differences. */
export function partialsOf(plan: Apply): Partials | undefined {
  const combination = combinationOf(plan);
  // Shares of the powers: 1 in all, and the derivatives.
  if (combination !== undefined)
    return (values, result) => {
      const { scale, offset } = combination;
      return values.map((value) => factor(scale * (value - (result - offset))));
    };
  // A curve may have the name of any function.
  const named = plan.fault === undefined ? BY_NAME.get(plan.name) : undefined;
  return BY_MODEL.get(plan.compute) ?? named ?? (plan.fault === undefined ? weightsOf(plan) : undefined);
}

const weighed = new WeakMap<Apply['compute'], Partials | null>();

/**
 * Weighed sums that chains compute without a name for them (a gain added to a level, a step taken off): known by being what their
 * figures at zero and at ones make of them at places far apart, and then the weights are exact.
 */
function weightsOf({ compute, parameters }: Apply): Partials | undefined {
  const known = weighed.get(compute);
  if (known !== undefined) return known ?? undefined;
  const places = parameters.map((_, at) => at);
  const at = (figure: (index: number) => number): number => compute(...places.map(figure));
  const start = at(() => 0);
  const weights = places.map((place) => at((index) => (index === place ? 1 : 0)) - start);
  const isSum = PROBES.every((probe) => {
    const expected = weights.reduce((sum, weight, index) => sum + weight * probe(index), start);
    return Math.abs(at(probe) - expected) <= 1e-9 * (1 + Math.abs(expected));
  });
  const partials = isSum ? (): readonly number[] => weights : undefined;
  weighed.set(compute, partials ?? null);
  return partials;
}

const PROBES: readonly ((index: number) => number)[] = [
  (index) => 17.3 + 31.1 * index,
  (index) => -41.7 - 5.9 * index,
  (index) => 293.1 * (index % 2 === 0 ? 1 : -0.37),
  (index) => 1e-3 * (index + 1) ** 2,
];

/** Between two points: by x, and by the points' own figures. */
function interpolatePartials([x = NaN, ...points]: readonly number[]): readonly number[] {
  const partials = new Array<number>(points.length + 1).fill(0);
  for (let i = 0; i + 3 < points.length; i += 2) {
    const [x1 = NaN, y1 = NaN, x2 = NaN, y2 = NaN] = points.slice(i, i + 4);
    if (!(x >= Math.min(x1, x2) && x <= Math.max(x1, x2)) || x1 === x2) continue;
    const slope = (y2 - y1) / (x2 - x1);
    const place = (x - x1) / (x2 - x1);
    partials[0] = slope;
    partials[i + 1] = slope * (place - 1);
    partials[i + 2] = 1 - place;
    partials[i + 3] = -slope * place;
    partials[i + 4] = place;
    return partials;
  }
  return partials;
}

/** By each noise figure, and by each gain, through all noise figures behind it. */
function cascadePartials(values: readonly number[], result: number): readonly number[] {
  const total = factor(result);
  const partials = new Array<number>(values.length).fill(0);
  let gainAhead = 0;
  const terms: number[] = [];
  for (let i = 0; i < values.length; i += 2) {
    const figure = values[i] as number;
    partials[i] = factor(figure - gainAhead) / total;
    terms.push(factor(-gainAhead) * (factor(figure) - 1));
    gainAhead += values[i + 1] ?? 0;
  }
  let behind = 0;
  for (let stage = terms.length - 1; stage >= 0; stage--) {
    if (2 * stage + 1 < values.length) partials[2 * stage + 1] = -behind / total;
    behind += terms[stage] as number;
  }
  return partials;
}

/** What trials gave, in words and rows. */
import { PERCENTS, type TrialStatistics } from '../../analysis';
import { figureWords, nameOf, named, sizeWords } from '../../app/analysis-names';
import type { Evaluation } from '../../engine';
import type { Account, Driver, Fault, TrialsOutcome } from '../../jobs';
import type { Unit } from '../../quantity';
import type { HistogramMark, HistogramOptions, Slice } from './histogram-layout';

/** A share in per cent; one near none or all is told by what is missing, not rounded away. */
export function percentWords(share: number): string {
  const percent = 100 * share;
  if (percent === 0 || percent === 100) return `${String(percent)} %`;
  const rest = Math.min(percent, 100 - percent);
  const decimals = Math.min(7, Math.max(1, 1 - Math.floor(Math.log10(rest))));
  return `${percent.toFixed(decimals)} %`;
}

/** A whole number with its thousands apart, as `1 000 000` with narrow blanks. */
export const countWords = (count: number): string => String(count).replace(/\B(?=(\d{3})+$)/g, '\u202f');

/** How probable it is that the requirement is met. */
export function metWords({ met }: TrialStatistics, requirement: string): string | undefined {
  if (met === undefined) return undefined;
  return `Required ${requirement}: met in ${percentWords(met.share)} of the trials.`;
}

/** The interval of the probability, in plain words. */
export function intervalWords({ met }: TrialStatistics): string | undefined {
  if (met === undefined) return undefined;
  return `Had all possible trials been made, the share would lie between ${percentWords(met.low)} and ${percentWords(met.high)} (with 95 % confidence).`;
}

export interface FigureRow {
  readonly name: string;
  readonly figure: string;
}

/** What is told of the distribution. */
export function distributionRows({ statistics }: TrialsOutcome, unit: Unit | undefined): readonly FigureRow[] {
  return [
    { name: 'mean', figure: figureWords(statistics.mean, unit) },
    { name: 'standard deviation', figure: sizeWords(statistics.standardDeviation, unit) },
    { name: 'median', figure: figureWords(statistics.median, unit) },
  ];
}

/** What is told without trials. */
export function limitRows(account: Account, unit: Unit | undefined): readonly FigureRow[] {
  const { rootSumSquare, extremes } = account;
  return [
    { name: 'nominal', figure: figureWords(account.nominal, unit) },
    { name: 'all adverse', figure: figureWords(extremes.adverse, unit) },
    { name: 'all favourable', figure: figureWords(extremes.favourable, unit) },
    { name: 'root-sum-square mean', figure: figureWords(rootSumSquare.mean, unit) },
    { name: 'root-sum-square deviation', figure: sizeWords(rootSumSquare.standardDeviation, unit) },
    { name: 'mean − 3σ', figure: figureWords(rootSumSquare.lower, unit) },
    { name: 'mean + 3σ', figure: figureWords(rootSumSquare.upper, unit) },
  ];
}

export function percentileRows({ percentiles }: TrialStatistics, unit: Unit | undefined): readonly FigureRow[] {
  return PERCENTS.map((percent, at) => ({
    name: `${String(percent)} %`,
    figure: figureWords(percentiles[at] ?? NaN, unit),
  }));
}

/** Marks on the plot's axis. */
export function marksOf(account: Account): readonly HistogramMark[] {
  const { requirement, nominal, extremes, rootSumSquare } = account;
  return [
    ...(requirement === undefined
      ? []
      : [{ name: `required ${requirement.bound}`, value: requirement.limit, style: 'requirement' as const }]),
    { name: 'nominal', value: nominal, style: 'nominal' },
    { name: 'all adverse', value: extremes.adverse, style: 'limit' },
    { name: 'all favourable', value: extremes.favourable, style: 'limit' },
    { name: 'mean − 3σ', value: rootSumSquare.lower, style: 'rss' },
    { name: 'mean + 3σ', value: rootSumSquare.upper, style: 'rss' },
  ];
}

export const markRows = (account: Account, unit: Unit | undefined): readonly FigureRow[] =>
  marksOf(account).map(({ name, value }) => ({ name, figure: figureWords(value, unit) }));

/** Trials that have a figure. */
export const givenIn = ({ statistics }: TrialsOutcome): number => statistics.count - statistics.withheld;

/** Which side of the requirement fails. */
export function failingSide({ requirement }: Account): HistogramOptions['failing'] {
  if (requirement === undefined) return undefined;
  return { side: requirement.bound === 'at least' ? 'below' : 'above', limit: requirement.limit };
}

/** Rows of the plot's table. */
export const TABLE_SLICES = 40;

/** The plot for those who do not see it. */
export function plotWords(outcome: TrialsOutcome, account: Account, unit: Unit | undefined): string {
  const { statistics, least, greatest } = outcome;
  const marks = marksOf(account).map(({ name, value }) => `${name} ${figureWords(value, unit)}`);
  return `The figures of ${countWords(statistics.count)} trials reach from ${figureWords(least, unit)} to ${figureWords(greatest, unit)}, half of them up to ${figureWords(statistics.median, unit)}. Marked are: ${marks.join('; ')}.`;
}

export interface SliceRow {
  readonly from: string;
  readonly to: string;
  readonly count: string;
  readonly percent: string;
  readonly atOrBelow: string;
}

export const sliceRows = (slices: readonly Slice[], unit: Unit | undefined): readonly SliceRow[] =>
  slices.map(({ from, to, count, percent, atOrBelow }) => ({
    from: figureWords(from, unit),
    to: figureWords(to, unit),
    count: countWords(count),
    percent: percentWords(percent / 100),
    atOrBelow: percentWords(atOrBelow / 100),
  }));

export interface DriverRow {
  readonly lineId: string;
  readonly symbol: string;
  readonly label: string;
  readonly words: string;
  /** Where the bar begins and how long it is, in parts of the whole width; the middle is no shift. */
  readonly start: number;
  readonly length: number;
}

/** The inputs by how far off they are where the requirement is missed. Bars share one scale. */
export function driverRows(drivers: readonly Driver[], evaluation: Evaluation): readonly DriverRow[] {
  const widest = Math.max(1e-9, ...drivers.map(({ shift }) => Math.abs(shift)));
  return drivers.map(({ lineId, shift }) => {
    const { symbol, label } = named(evaluation, lineId);
    const length = Math.abs(shift) / widest / 2;
    const size = Math.abs(shift).toFixed(2);
    return {
      ...{ lineId, symbol, label, length },
      start: shift < 0 ? 0.5 - length : 0.5,
      words: size === '0.00' ? 'as in all trials' : `${size} σ ${shift < 0 ? 'lower' : 'higher'}`,
    };
  });
}

/** Sentences about what was left out, assumed, or is not exact. */
export function remarksOf(
  outcome: TrialsOutcome,
  account: Account,
  evaluation: Evaluation,
  unit: Unit | undefined,
): readonly string[] {
  const { withheld } = outcome.statistics;
  return [
    ...account.troubles.map(({ lineId, why }) => `${nameOf(named(evaluation, lineId))}: ${why}`),
    ...(account.isDirectionAssumed
      ? ['Higher is taken for better here; a requirement, or a kind and side, would tell.']
      : []),
    ...(withheld === 0 ? [] : [`In ${countWords(withheld)} trials there is no figure; these meet no requirement.`]),
    ...(outcome.isBinned
      ? [`Percentiles are counted in bins, each ${binWords(outcome.quantileError, unit)} wide; all else is exact.`]
      : []),
    ...(outcome.lostWorkers === 0
      ? []
      : [
          `The browser ended ${outcome.lostWorkers === 1 ? 'a worker' : 'workers'} on the way; their part was done again.`,
        ]),
  ];
}

const binWords = (size: number, unit: Unit | undefined): string => {
  const word = unit === undefined || unit.word === '1' ? '' : unit.form === 'decibel' ? ' dB' : ` ${unit.word}`;
  return `${String(Number(size.toPrecision(2)))}${word}`;
};

export function faultWords(fault: Fault): string {
  switch (fault.kind) {
    case 'stopped':
      return 'Stopped.';
    case 'worker-died':
      return 'The browser ended the worker twice, so there is no result. Fewer trials may need less memory.';
    case 'failed':
      return `The trials could not be computed: ${fault.why}`;
  }
}

/** Why there are no trials to look at, or undefined. */
export function noToleranceWords(account: Account, evaluation: Evaluation, lineId: string): string | undefined {
  if (account.inputIds.length > 0) return undefined;
  return `Nothing that ${nameOf(named(evaluation, lineId))} rests on has a tolerance that counts, so every trial would give the same. Select a line with an entry and type how far it may be off into its field “Tolerance”: for example ±0.5 dB, or +0.3/-0.8 dB triangular.`;
}

export const progressWords = (done: number, count: number): string =>
  `${countWords(done)} of ${countWords(count)} trials`;

/** A seed as typed; undefined for what is none. */
export function readSeed(text: string): number | undefined {
  const trimmed = text.trim();
  const seed = Number(trimmed);
  return /^\d+$/.test(trimmed) && Number.isSafeInteger(seed) ? seed : undefined;
}

/** The numbers of trials to choose from. */
export const COUNTS = [10_000, 100_000, 1_000_000, 3_000_000, 10_000_000] as const;
/** What follows an edit: more would keep the machine busy while somebody types. */
export const USUAL_COUNT = 100_000;

/** How many trials follow an edit. */
export const followingCount = (chosen: number): number => Math.min(chosen, USUAL_COUNT);

export const ranWords = ({ statistics }: TrialsOutcome, seed: number, isWhole: boolean): string =>
  `${countWords(statistics.count)} trials with seed ${String(seed)}${isWhole ? '' : ' so far'}.`;

/** Why there are fewer trials than chosen. */
export const fewerWords = (chosen: number): string =>
  `An edit is followed by at most ${countWords(followingCount(chosen))}; press Run for ${countWords(chosen)}.`;

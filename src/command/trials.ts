/** `trials`: a line when everything that it rests on deviates by chance within its tolerance. */
import {
  compileTrials,
  extremesOf,
  inputsOf,
  PERCENTS,
  runTrials,
  sensitivityOf,
  statisticsOf,
  targetDirection,
  type Extremes,
  type RootSumSquare,
  type TrialStatistics,
} from '../analysis';
import type { Unit } from '../quantity';
import type { Line } from '../worksheet';
import type { Answer, World } from './answer';
import { formatOf, listOf, needed, onlyFile, parse, wholeNumber } from './arguments';
import {
  ask,
  asJson,
  assumedText,
  csvNumber,
  csvTable,
  exitCodeFor,
  figureIn,
  finite,
  noTolerance,
  numberText,
  stepIn,
  textTable,
  troubleText,
} from './asked';
import { nameOfLine } from './open';
import { oneLine } from './plain-text';
import { boundText } from './requirement-text';
import { csvText } from './tables';

const FORMATS = ['text', 'json', 'csv'] as const;

const USUAL_COUNT = 100_000;
const COUNT_LIMIT = 10_000_000;
const USUAL_SEED = 1;

interface Outcome {
  readonly line: Line;
  readonly name: string;
  readonly caseId: string;
  readonly caseName: string;
  readonly unit: Unit | undefined;
  readonly seed: number;
  readonly nominal: number;
  readonly statistics: TrialStatistics;
  readonly extremes: Extremes;
  readonly rootSumSquare: RootSumSquare;
}

export function runTrialsCommand(words: readonly string[], world: World): Answer {
  const parsed = parse(words, {
    line: { type: 'string' },
    case: { type: 'string', multiple: true },
    count: { type: 'string' },
    seed: { type: 'string' },
    format: { type: 'string' },
  });
  const { values } = parsed;
  const file = onlyFile(parsed, 'trials');
  const symbol = needed(parsed, 'trials', 'line');
  const format = formatOf(values['format'], FORMATS);
  const given = (option: string, usual: number): string => String(values[option] ?? usual);
  const count = wholeNumber(given('count', USUAL_COUNT), 'count', 1, COUNT_LIMIT);
  const seed = wholeNumber(given('seed', USUAL_SEED), 'seed', 0, Number.MAX_SAFE_INTEGER);
  const asked = ask(file, [symbol], listOf(values['case']), world);
  const { evaluation, inCase } = asked;
  const line = asked.lines[0] as Line;
  const found = inputsOf(evaluation, line.id, inCase.id);
  const { direction, isAssumed } = targetDirection(evaluation, line.id, inCase.id);
  const reading = evaluation.reading(line.id, inCase.id);
  const figures = runTrials(
    compileTrials(found.evaluation, line.id, inCase.id, found.inputs),
    found.inputs,
    seed,
    0,
    count,
    progressOf(count, world),
  );
  const outcome: Outcome = {
    line,
    name: nameOfLine(evaluation, line),
    caseId: inCase.id,
    caseName: inCase.name,
    unit: reading.figure.state === 'value' ? reading.figure.unit : undefined,
    seed,
    nominal: reading.figure.state === 'value' ? reading.figure.value : NaN,
    statistics: statisticsOf(figures, reading.requirement),
    extremes: extremesOf(found.evaluation, line.id, inCase.id, found.inputs, direction),
    rootSumSquare: sensitivityOf(evaluation, line.id, inCase.id).rootSumSquare,
  };
  return {
    results: format === 'json' ? asJson(jsonOf(outcome)) : format === 'csv' ? csvOf(outcome) : textOf(outcome),
    messages: `${asked.messages}${troubleText(asked, found.troubles)}${noTolerance(asked, found)}${assumedText(asked, isAssumed)}`,
    exitCode: found.troubles.length > 0 ? 1 : exitCodeFor(asked, [line]),
  };
}

/** Tells once a second, and nothing of what takes less. */
function progressOf(count: number, { tellProgress }: World): (done: number) => undefined {
  let told = performance.now();
  return (done) => {
    const now = performance.now();
    if (now - told < 1000) return;
    told = now;
    tellProgress?.(`trials: ${String(Math.floor((100 * done) / count))} %`);
  };
}

function jsonOf({ name, caseId, unit, seed, nominal, statistics, extremes, rootSumSquare }: Outcome): unknown {
  const { count, withheld, mean, standardDeviation, median, percentiles, met } = statistics;
  return {
    line: name,
    case: caseId,
    unit: unit?.word ?? null,
    count,
    seed,
    withheld,
    mean: finite(mean),
    standardDeviation: finite(standardDeviation),
    median: finite(median),
    // Keys that are no whole numbers keep their order; 1 and 5 would come first in any case.
    percentiles: Object.fromEntries(PERCENTS.map((percent, at) => [String(percent), finite(percentiles[at] ?? NaN)])),
    met: met?.share ?? null,
    metLow: met?.low ?? null,
    metHigh: met?.high ?? null,
    nominal: finite(nominal),
    adverse: finite(extremes.adverse),
    favourable: finite(extremes.favourable),
    rootSumSquare: {
      mean: finite(rootSumSquare.mean),
      standardDeviation: finite(rootSumSquare.standardDeviation),
      lower: finite(rootSumSquare.lower),
      upper: finite(rootSumSquare.upper),
    },
  };
}

function csvOf(outcome: Outcome): string {
  const { unit, nominal, statistics, extremes, rootSumSquare } = outcome;
  const { count, withheld, mean, standardDeviation, percentiles, met } = statistics;
  const word = csvText(unit?.word ?? '');
  const stepWord = unit?.form === 'decibel' ? 'dB' : word;
  return csvTable([
    ['figure', 'value', 'unit'],
    ['count', csvNumber(count), ''],
    ['seed', csvNumber(outcome.seed), ''],
    ['withheld', csvNumber(withheld), ''],
    ['nominal', csvNumber(nominal), word],
    ['mean', csvNumber(mean), word],
    ['standard deviation', csvNumber(standardDeviation), stepWord],
    ...PERCENTS.map((percent, at) => [`${String(percent)} %`, csvNumber(percentiles[at]), word]),
    ['met', csvNumber(met?.share), ''],
    ['met low', csvNumber(met?.low), ''],
    ['met high', csvNumber(met?.high), ''],
    ['adverse', csvNumber(extremes.adverse), word],
    ['favourable', csvNumber(extremes.favourable), word],
    ['root sum square mean', csvNumber(rootSumSquare.mean), word],
    ['root sum square standard deviation', csvNumber(rootSumSquare.standardDeviation), stepWord],
    ['root sum square lower', csvNumber(rootSumSquare.lower), word],
    ['root sum square upper', csvNumber(rootSumSquare.upper), word],
  ]);
}

function textOf(outcome: Outcome): string {
  const { line, name, caseName, unit, seed, nominal, statistics, extremes, rootSumSquare } = outcome;
  const { count, withheld, mean, standardDeviation, percentiles, met } = statistics;
  const label = line.label === '' ? '' : ` — ${line.label}`;
  const rows = [
    ['nominal', figureIn(nominal, unit)],
    ['adverse', figureIn(extremes.adverse, unit)],
    ['favourable', figureIn(extremes.favourable, unit)],
    ['mean', figureIn(mean, unit)],
    ['standard deviation', stepIn(standardDeviation, unit)],
    ...PERCENTS.map((percent, at) => [
      percent === 50 ? 'median' : `${String(percent)} % are below`,
      figureIn(percentiles[at] ?? NaN, unit),
    ]),
    ['root sum square: mean', figureIn(rootSumSquare.mean, unit)],
    ['  standard deviation', stepIn(rootSumSquare.standardDeviation, unit)],
    ['  mean - 3σ', figureIn(rootSumSquare.lower, unit)],
    ['  mean + 3σ', figureIn(rootSumSquare.upper, unit)],
  ];
  const notes = [
    ...(line.requirement === undefined || met === undefined
      ? []
      : [
          `requirement ${boundText(line.requirement)}: met in ${percentText(met.share)} of trials (95 % interval ${percentText(met.low)} to ${percentText(met.high)})`,
        ]),
    ...(withheld === 0 ? [] : [`withheld in ${String(withheld)} trials`]),
  ];
  return `${oneLine(`${name}${label}, ${caseName}: ${String(count)} trials, seed ${String(seed)}`)}\n${textTable(rows)}${notes.map((note) => `${oneLine(note)}\n`).join('')}`;
}

/** A share near all is told to the second figure of what is missing, not rounded away. */
function percentText(share: number): string {
  const percent = 100 * share;
  const rest = 100 - percent;
  if (percent <= 99 || rest === 0) return `${percent === 0 ? '0' : numberText(percent, 3)} %`;
  return `${String(Number(percent.toFixed(Math.min(12, 2 - Math.ceil(Math.log10(rest))))))} %`;
}

/** Findings on a chain's figures: what its stages say that cannot be, and what somebody should look at. */
import { passiveNoiseFigureDb, passiveTemperatureK, REFERENCE_TEMPERATURE_K } from '../radio';
import type { Stage, StageField } from '../worksheet';
import { decibels, nameOf, type ChainBuilder, type Ref } from './chain-builder';
import { STAGE_PARTS } from './chain-parts';
import type { StageRefs } from './chain-stages';

/** Less than this is rounding, dB. */
const ROUNDING_DB = 1e-6;

/** The findings on single stages. */
export function addStageChecks(
  builder: ChainBuilder,
  { stage, typed, outputCompression, outputIntercept }: StageRefs,
): void {
  builder.check(
    { stage, field: 'noiseFigure' },
    [typed.noiseFigure, typed.gain, typed.temperature ?? REFERENCE_TEMPERATURE_K],
    (noiseFigure = NaN, gain = NaN, kelvin = NaN) => (gain < 0 ? noiseFigure - passiveNoiseFigureDb(-gain, kelvin) : 0),
    {
      code: 'figure-below-loss',
      facts: { stage: nameOf(stage) },
      // Data sheets round to a tenth of a decibel.
      test: (excess) => excess < -0.051,
      late: (figures) => ({
        figure: decibels(figures[0]),
        loss: decibels(-(figures[1] ?? NaN)),
        least: decibels((figures[0] ?? NaN) - (figures[figures.length - 1] ?? NaN)),
        temperature: (typed.temperature === undefined ? REFERENCE_TEMPERATURE_K : (figures[2] ?? NaN)).toFixed(0),
      }),
    },
  );
  builder.check(
    { stage, field: typed.outputCompression === undefined ? 'inputCompression' : 'outputCompression' },
    [outputCompression, outputIntercept],
    (compression = NaN, intercept = NaN) => intercept - compression,
    {
      code: 'compression-above-intercept',
      facts: { stage: nameOf(stage) },
      test: (distance) => distance < -ROUNDING_DB,
      late: ([compression, intercept]) => ({ compression: decibels(compression), intercept: decibels(intercept) }),
    },
  );
}

/** What stages leave unsaid or say twice. */
export function addPlausibilityChecks(builder: ChainBuilder, stages: readonly StageRefs[]): void {
  const knowsNoise = stages.some(({ typed }) => typed.noiseFigure !== undefined || typed.temperature !== undefined);
  const met = new Set<string>();
  for (const { stage, typed, gain } of stages) {
    const facts = { stage: nameOf(stage) };
    if (knowsNoise && typed.noiseFigure === undefined && stage.off !== true)
      builder.check({ stage, field: 'noiseFigure' }, [typed.gain], (gainDb = NaN) => gainDb, {
        code: 'noise-not-known',
        facts: { ...facts, chain: builder.name },
        test: (gainDb) => gainDb > ROUNDING_DB,
      });
    if (stage.symbol !== '' && met.has(stage.symbol))
      builder.check({ stage, field: 'gain' }, [], () => 1, {
        code: 'stage-symbol-repeated',
        facts: { name: stage.symbol, chain: builder.name },
        test: (one) => one === 1,
      });
    met.add(stage.symbol);
    addDoubleCheck(builder, stage, 'inputIntercept', 'outputIntercept', typed, gain, 0);
    addDoubleCheck(builder, stage, 'inputIntercept2', 'outputIntercept2', typed, gain, 0);
    addDoubleCheck(builder, stage, 'inputCompression', 'outputCompression', typed, gain, 1);
  }
}

/** A level stated at both ends of a stage: the two should lie its gain apart. The one at the input counts. */
function addDoubleCheck(
  builder: ChainBuilder,
  stage: Stage,
  input: StageField,
  output: StageField,
  typed: StageRefs['typed'],
  gain: Ref,
  stepDb: number,
): void {
  builder.check(
    { stage, field: output },
    [typed[input], typed[output], gain],
    (atInput = NaN, atOutput = NaN, gainDb = NaN) => atOutput - (atInput + gainDb - stepDb),
    {
      code: 'ends-disagree',
      facts: { stage: nameOf(stage), what: STAGE_PARTS[output].label },
      // Data sheets round to a tenth of a decibel, at each end.
      test: (difference) => Math.abs(difference) > 0.15,
      late: (figures) => ({
        output: decibels(figures[1]),
        expected: decibels((figures[1] ?? NaN) - (figures[figures.length - 1] ?? NaN)),
      }),
    },
  );
}

/** An interferer so strong that a third-order model of the chain no longer holds: from half the intercept on. */
export function addBlockingCheck(builder: ChainBuilder, interferer: Ref | undefined, intercept: Ref | undefined): void {
  builder.check(undefined, [interferer, intercept], (level = NaN, limit = NaN) => limit - level, {
    code: 'interferer-too-strong',
    facts: { chain: builder.name },
    test: (distance) => distance < 10 * Math.log10(2) + ROUNDING_DB,
    late: (figures) => ({ level: decibels(figures[0]), limit: decibels(figures[1]) }),
  });
}

/** A stage as the noise account sees it. */
interface NoiseOfStage {
  readonly temperatureK: number;
  readonly gainDb: number;
  readonly gainAheadDb: number;
}

/** True of a loss that is no noisier than one at 290 K, and of what makes no noise: it is not their fault where noise is made. */
const isPlainLoss = ({ temperatureK, gainDb }: NoiseOfStage): boolean =>
  temperatureK <= 0 ||
  (gainDb <= 0 &&
    temperatureK <= passiveTemperatureK(gainDb, REFERENCE_TEMPERATURE_K) * (1 + ROUNDING_DB) + ROUNDING_DB);

/** The first stage that is more than a loss and has an amplifier behind it, with its share of the noise from it on. */
function firstStage(
  stages: readonly NoiseOfStage[],
  isPassive: readonly boolean[],
): { at: number; share: number } | undefined {
  const at = stages.findIndex((stage, i) => !isPassive[i] && !isPlainLoss(stage));
  const rest = stages.slice(at);
  if (at < 0 || !rest.slice(1).some(({ gainDb }) => gainDb > 0)) return undefined;
  const parts = rest.map(({ temperatureK, gainAheadDb }) => temperatureK / 10 ** (gainAheadDb / 10));
  const total = parts.reduce((sum, part) => sum + part, 0);
  return total > 0 ? { at, share: (parts[0] ?? 0) / total } : undefined;
}

/** The first stage that is more than a loss should set the chain's noise figure, where an amplifier follows. */
export function addFirstStageCheck(builder: ChainBuilder, stages: readonly StageRefs[]): void {
  const active = stages.filter(({ stage }) => stage.off !== true);
  // A stage without a noise figure of its own is a loss at some temperature, hot or cold.
  const isPassive = active.map(({ typed }) => typed.noiseFigure === undefined);
  const refs = active.flatMap(({ temperature, gain, ahead }) => [temperature, gain, ahead.gain]);
  const stagesOf = (values: readonly number[]): NoiseOfStage[] =>
    active.map((_, i) => ({
      temperatureK: values[3 * i] ?? NaN,
      gainDb: values[3 * i + 1] ?? NaN,
      gainAheadDb: values[3 * i + 2] ?? NaN,
    }));
  builder.check(undefined, refs, (...values) => firstStage(stagesOf(values), isPassive)?.share ?? 1, {
    code: 'first-stage-weak',
    facts: { chain: builder.name },
    test: (share) => share < 0.5,
    late: (figures) => {
      const share = figures[figures.length - 1] ?? NaN;
      return { share: (100 * share).toFixed(0) };
    },
  });
}

/**
 * Noise figures beside a source that is not near 290 K. Common practice: within a third of it the two ways of stating noise
 * differ by little.
 */
export function addSourceCheck(builder: ChainBuilder, stages: readonly StageRefs[], source: string | number): void {
  if (!stages.some(({ typed }) => typed.noiseFigure !== undefined)) return;
  builder.check(undefined, [source], (kelvin = NaN) => kelvin, {
    code: 'source-temperature',
    facts: { chain: builder.name },
    test: (kelvin) => Math.abs(kelvin - REFERENCE_TEMPERATURE_K) > REFERENCE_TEMPERATURE_K / 3,
    late: (figures) => ({ temperature: (figures[0] ?? NaN).toFixed(0) }),
  });
}

/** Findings on a chain's figures: what its stages say that cannot be, and what somebody should look at. */
import { passiveNoiseFigureDb, passiveTemperatureK, REFERENCE_TEMPERATURE_K } from '../radio';
import { decibels, nameOf, type ChainBuilder } from './chain-builder';
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
      test: (excess) => excess < -ROUNDING_DB,
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

/** A stage as the noise account sees it. */
interface NoiseOfStage {
  readonly temperatureK: number;
  readonly gainDb: number;
  readonly gainAheadDb: number;
}

/** True of an attenuator that is no noisier than one at 290 K: it is not its fault that the noise is made elsewhere. */
const isPlainLoss = ({ temperatureK, gainDb }: NoiseOfStage): boolean =>
  gainDb <= 0 && temperatureK <= passiveTemperatureK(gainDb, REFERENCE_TEMPERATURE_K) * (1 + ROUNDING_DB) + ROUNDING_DB;

/** The first stage that is more than a loss and has an amplifier behind it, with its share of the noise from it on. */
function firstStage(stages: readonly NoiseOfStage[]): { at: number; share: number } | undefined {
  const at = stages.findIndex((stage) => !isPlainLoss(stage));
  const rest = stages.slice(at);
  if (at < 0 || !rest.slice(1).some(({ gainDb }) => gainDb > 0)) return undefined;
  const parts = rest.map(({ temperatureK, gainAheadDb }) => temperatureK / 10 ** (gainAheadDb / 10));
  const total = parts.reduce((sum, part) => sum + part, 0);
  return total > 0 ? { at, share: (parts[0] ?? 0) / total } : undefined;
}

/** The first stage that is more than a loss should set the chain's noise figure, where an amplifier follows. */
export function addFirstStageCheck(builder: ChainBuilder, stages: readonly StageRefs[]): void {
  const active = stages.filter(({ stage }) => stage.off !== true);
  const refs = active.flatMap(({ temperature, gain, ahead }) => [temperature, gain, ahead.gain]);
  const stagesOf = (values: readonly number[]): NoiseOfStage[] =>
    active.map((_, i) => ({
      temperatureK: values[3 * i] ?? NaN,
      gainDb: values[3 * i + 1] ?? NaN,
      gainAheadDb: values[3 * i + 2] ?? NaN,
    }));
  builder.check(undefined, refs, (...values) => firstStage(stagesOf(values))?.share ?? 1, {
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

/** One stage of a chain: its values, and what has come about behind it. */
import {
  additionExponent,
  cascadedInterceptDbm,
  cascadedTemperatureK,
  figureOfTemperatureDb,
  interceptShare,
  noiseBehindDbm,
  noiseShare,
  noiseTemperatureK,
  passiveTemperatureK,
  REFERENCE_TEMPERATURE_K,
} from '../radio';
import { powerSum } from '../quantity';
import { saysAnything, STAGE_FIELDS, type ChainSection, type Stage, type StageField } from '../worksheet';
import { decibels, nameOf, type About, type ChainBuilder, type Ref } from './chain-builder';
import { STAGE_PARTS } from './chain-parts';

/** What has come about behind the stages so far, referred to the chain's input; undefined: not known. */
export interface Running {
  readonly gain: Ref;
  readonly temperature: Ref;
  readonly intercept: Ref | undefined;
  readonly intercept2: Ref | undefined;
  readonly compression: Ref | undefined;
  /** The third-order intercept towards interferers that selective stages take down, and towards a single strong one. */
  readonly selectiveIntercept: Ref | undefined;
  readonly selectiveIntercept2: Ref | undefined;
  readonly blockedIntercept: Ref | undefined;
  /** Selectivity so far, dB. */
  readonly selectivity: Ref;
  readonly bandwidth: Ref | undefined;
  readonly source: Ref;
  readonly signal: Ref | undefined;
  readonly interferer: Ref | undefined;
  readonly signalBehind: Ref | undefined;
  readonly interfererBehind: Ref | undefined;
  readonly noiseBehind: Ref | undefined;
  /** The last stage that is not bypassed. */
  readonly last: Stage | undefined;
}

/** Before the first stage. */
export const START: Omit<Running, 'source' | 'signal' | 'interferer' | 'bandwidth'> = {
  gain: 0,
  temperature: 0,
  intercept: undefined,
  intercept2: undefined,
  compression: undefined,
  selectiveIntercept: undefined,
  selectiveIntercept2: undefined,
  blockedIntercept: undefined,
  selectivity: 0,
  signalBehind: undefined,
  interfererBehind: undefined,
  noiseBehind: undefined,
  last: undefined,
};

/** A stage's own figures, referred to its input where there is a choice; undefined: nothing is said. */
export interface StageRefs {
  readonly stage: Stage;
  readonly typed: Partial<Record<StageField, Ref>>;
  readonly gain: Ref;
  readonly temperature: Ref | undefined;
  readonly intercept: Ref | undefined;
  readonly intercept2: Ref | undefined;
  readonly compression: Ref | undefined;
  readonly outputIntercept: Ref | undefined;
  readonly outputCompression: Ref | undefined;
  /** What stands ahead of the stage, and what has come about behind it. */
  readonly ahead: Running;
  readonly behind: Running;
}

type Compute = (...values: number[]) => number;
type Own = Omit<StageRefs, 'ahead' | 'behind'>;

const plus: Compute = (a = NaN, b = NaN) => a + b;
const minus: Compute = (a = NaN, b = NaN) => a - b;
const narrower: Compute = (a = NaN, b = NaN) => Math.min(a, b);
const percent =
  (share: Compute): Compute =>
  (...values) =>
    100 * share(...values);

/** Adds the items of a stage. */
export function addStage(builder: ChainBuilder, stage: Stage, ahead: Running): StageRefs {
  const own = addValues(builder, stage, ahead);
  const behind = stage.off === true ? ahead : { ...pass(builder, own, ahead), last: stage };
  const copy = (name: string, label: string, unit: string, of: Ref | undefined, about: About): Ref | undefined =>
    builder.copy(`out.${name}`, `${label} behind the stage`, unit, of, { ...about, stage });
  copy('gain', 'gain', 'dB', behind.gain, { quantity: 'gain' });
  copy('te', 'noise temperature', 'K', behind.temperature, {
    quantity: 'temperature',
    plane: builder.plane(0, undefined),
  });
  const plane = builder.plane(behind.gain, behind.last);
  builder.derive('out.nf', 'noise figure behind the stage', 'dB', [behind.temperature], figureOfTemperatureDb, {
    quantity: 'noise figure',
    stage,
  });
  const atInput = { ...LEVEL, plane: builder.plane(0, undefined) };
  copy('iip3', 'third-order input intercept', 'dBm', behind.intercept, atInput);
  copy('ip1db', 'input compression', 'dBm', behind.compression, atInput);
  const signal = builder.sum('out.signal', 'wanted level behind the stage', 'dBm', [ahead.signal, behind.gain], {
    ...WANTED,
    stage,
    plane,
  });
  const noise = builder.derive(
    'out.noise',
    'noise behind the stage',
    'dBm',
    [ahead.source, behind.temperature, behind.bandwidth, behind.gain],
    noiseLevel,
    { ...UNWANTED, stage, plane },
  );
  builder.difference('out.snr', 'S/N behind the stage', signal, noise, { quantity: 'signal ratio', stage });
  const interferer = builder.derive(
    'out.interferer',
    'interferer behind the stage',
    'dBm',
    [ahead.interferer, behind.gain, behind.selectivity],
    (level = NaN, gain = NaN, selectivity = NaN) => level + gain - selectivity,
    { ...UNWANTED, stage, plane },
  );
  if (stage.off !== true) addHeadroom(builder, own, ahead);
  return {
    ...own,
    ahead,
    behind: { ...behind, signalBehind: signal, noiseBehind: noise, interfererBehind: interferer },
  };
}

const LEVEL = { quantity: 'level' } as const;
const WANTED = { quantity: 'level', side: 'wanted' } as const;
const UNWANTED = { quantity: 'level', side: 'unwanted' } as const;

const noiseLevel: Compute = (source = NaN, chain = NaN, bandwidthHz = NaN, gainDb = NaN) =>
  noiseBehindDbm(source + chain, bandwidthHz, gainDb);

/** What is typed of the stage, and what follows from it alone. */
function addValues(builder: ChainBuilder, stage: Stage, ahead: Running): Own {
  const typed: Partial<Record<StageField, Ref>> = {};
  for (const field of STAGE_FIELDS) if (saysAnything(stage, field)) typed[field] = builder.cell(stage, field);
  const gain = typed.gain ?? 0;
  const about = { quantity: 'temperature', stage, plane: builder.plane(ahead.gain, ahead.last) } as const;
  const temperature =
    typed.noiseFigure === undefined
      ? builder.derive(
          'te',
          'noise temperature',
          'K',
          [gain, typed.temperature ?? REFERENCE_TEMPERATURE_K],
          passiveTemperatureK,
          about,
        )
      : builder.derive('te', 'noise temperature', 'K', [typed.noiseFigure], noiseTemperatureK, about);
  if (typed.noiseFigure === undefined)
    builder.derive('nf', 'noise figure', 'dB', [temperature], figureOfTemperatureDb, {
      quantity: 'noise figure',
      stage,
    });
  /** A level given at one end of the stage is worked out for the other; `stepDb` is what the gain has lost there. */
  const bothEnds = (
    input: StageField,
    output: StageField,
    stepDb: number,
  ): { input: Ref | undefined; output: Ref | undefined } => {
    const { [input]: atInput, [output]: atOutput } = typed;
    const towards = (field: StageField, from: Ref | undefined, sign: 1 | -1): Ref | undefined =>
      builder.derive(
        STAGE_PARTS[field].part,
        STAGE_PARTS[field].label,
        'dBm',
        [from, gain],
        (x = NaN, g = NaN) => x + sign * (g - stepDb),
        { ...LEVEL, stage },
      );
    return {
      input: atInput ?? towards(input, atOutput, -1),
      output: atOutput ?? towards(output, atInput, 1),
    };
  };
  const third = bothEnds('inputIntercept', 'outputIntercept', 0);
  const second = bothEnds('inputIntercept2', 'outputIntercept2', 0);
  const compression = bothEnds('inputCompression', 'outputCompression', 1);
  return {
    stage,
    typed,
    gain,
    temperature,
    intercept: third.input,
    outputIntercept: third.output,
    intercept2: second.input,
    compression: compression.input,
    outputCompression: compression.output,
  };
}

/** The running values with one more stage. They have no symbols of their own: the copies behind the stage have. */
function pass(builder: ChainBuilder, own: Own, ahead: Running): Running {
  const { stage, typed } = own;
  const { chain } = builder;
  const hidden = (
    label: string,
    unit: string,
    inputs: readonly (Ref | undefined)[],
    compute: Compute,
  ): Ref | undefined => builder.derive('', `running ${label}`, unit, inputs, compute, { stage });
  const cascade = (
    label: string,
    before: Ref | undefined,
    stageOwn: Ref | undefined,
    gainAhead: Ref,
    exponent: number,
  ): Ref | undefined => {
    if (stageOwn === undefined) return before;
    if (before === undefined) return hidden(label, 'dBm', [stageOwn, gainAhead], minus);
    return hidden(label, 'dBm', [before, gainAhead, stageOwn], (a = NaN, g = NaN, s = NaN) =>
      cascadedInterceptDbm(a, g, s, exponent),
    );
  };
  const third = exponentOf(chain, 3);
  /** The gain ahead towards an interferer, into which selectivity enters so many times. */
  const gainLess = (label: string, times: number): Ref =>
    ahead.selectivity === 0
      ? ahead.gain
      : (hidden(label, 'dB', [ahead.gain, ahead.selectivity], (g = NaN, s = NaN) => g - times * s) ?? ahead.gain);
  return {
    ...ahead,
    gain: hidden('gain', 'dB', [ahead.gain, own.gain], plus) ?? ahead.gain,
    temperature:
      hidden('noise temperature', 'K', [ahead.temperature, ahead.gain, own.temperature], cascadedTemperatureK) ??
      ahead.temperature,
    intercept: cascade('intercept', ahead.intercept, own.intercept, ahead.gain, third),
    intercept2: cascade('second-order intercept', ahead.intercept2, own.intercept2, ahead.gain, exponentOf(chain, 2)),
    compression: cascade('compression', ahead.compression, own.compression, ahead.gain, third),
    // Third-order products go with the third power of what selectivity leaves, and the intercept enters squared.
    selectiveIntercept: cascade(
      'selective intercept',
      ahead.selectiveIntercept,
      own.intercept,
      gainLess('gain towards interferers', 1.5),
      third,
    ),
    // Second-order products go with the square, and the intercept enters once.
    selectiveIntercept2: cascade(
      'selective second-order intercept',
      ahead.selectiveIntercept2,
      own.intercept2,
      gainLess('gain towards second-order interferers', 2),
      exponentOf(chain, 2),
    ),
    blockedIntercept: cascade(
      'blocked intercept',
      ahead.blockedIntercept,
      own.intercept,
      gainLess('gain towards one interferer', 1),
      1,
    ),
    selectivity:
      typed.selectivity === undefined
        ? ahead.selectivity
        : (hidden('selectivity', 'dB', [ahead.selectivity, typed.selectivity], plus) ?? ahead.selectivity),
    bandwidth:
      typed.noiseBandwidth === undefined || ahead.bandwidth === undefined
        ? (typed.noiseBandwidth ?? ahead.bandwidth)
        : hidden('bandwidth', 'Hz', [ahead.bandwidth, typed.noiseBandwidth], narrower),
  };
}

/** The exponent with which reciprocals of the chain's intercepts add. */
function exponentOf(chain: ChainSection, order: 2 | 3): number {
  return additionExponent({ isCoherent: chain.intercept !== 'power', order });
}

/** How far what enters a stage, wanted and not, is below its compression. */
function addHeadroom(builder: ChainBuilder, { stage, compression }: Own, ahead: Running): void {
  const signal = ahead.signalBehind ?? ahead.signal;
  const interferer = ahead.interfererBehind ?? ahead.interferer;
  const entering = [signal, interferer].filter((level) => level !== undefined);
  if (entering.length === 0) return;
  const headroom = builder.derive(
    'headroom',
    'headroom to compression',
    'dB',
    [compression, ...entering],
    (limit = NaN, ...levels) => limit - powerSum(levels),
    { stage },
  );
  builder.check({ stage }, [compression, ...entering, headroom], (...figures) => figures.at(-1) ?? NaN, {
    code: 'stage-compressed',
    facts: { stage: nameOf(stage) },
    test: (left) => left < 0,
    late: (figures) => ({
      limit: decibels(figures[0]),
      level: decibels(powerSum(figures.slice(1, -2))),
      excess: decibels(-(figures.at(-1) ?? NaN)),
    }),
  });
}

/** Each stage's share of the chain's noise and of its third-order distortion. */
export function addShares(builder: ChainBuilder, stages: readonly StageRefs[], end: Running): void {
  const exponent = exponentOf(builder.chain, 3);
  const system = builder.derive('', 'system noise temperature', 'K', [end.source, end.temperature], plus);
  for (const { stage, ahead, temperature, intercept } of stages) {
    if (stage.off === true) continue;
    builder.derive('noise_share', 'share of the noise', '%', [temperature, ahead.gain, system], percent(noiseShare), {
      stage,
    });
    builder.derive(
      'distortion_share',
      'share of the third-order distortion',
      '%',
      [end.intercept, ahead.gain, intercept],
      percent((total = NaN, gain = NaN, own = NaN) => interceptShare(total, gain, own, exponent)),
      { stage },
    );
  }
  builder.derive('source_share', 'share of the source in the noise', '%', [end.source, 0, system], percent(noiseShare));
}

/**
 * A chain as items: what is typed of each stage as lines with entries, and from them, stage by stage, what the signal, the noise
 * and the intercepts have come to behind each stage, and the chain's outputs.
 * Holds: everything is referred to the chain's input; a bypassed stage passes on what stands ahead of it; what the stages do not
 * give is not there, and never guessed.
 */
import {
  additionExponent,
  blockingDb,
  figureOfTemperatureDb,
  noiseBehindDbm,
  productLevelDbm,
  riseDb,
  spuriousFreeRangeDb,
  REFERENCE_TEMPERATURE_K,
} from '../radio';
import { CHAIN_INPUTS, saysAnything, STAGE_FIELDS, type ChainSection } from '../worksheet';
import { ChainBuilder, type Ref } from './chain-builder';
import {
  addBlockingCheck,
  addFirstStageCheck,
  addPlausibilityChecks,
  addSourceCheck,
  addStageChecks,
} from './chain-checks';
import { addShares, addStage, START, type Running } from './chain-stages';
import type { Derived, Item } from './item';

/** Derived parts of chains by their structure: which stages there are, what they say, and what they are called. */
const structures = new Map<string, readonly (Derived | undefined)[]>();
const STRUCTURES_LIMIT = 50;

/**
 * All items of a chain: its inputs, each stage's values and running values, its outputs. A chain that says the same things in
 * the same places has the same derived parts, so that typing another figure leaves all but that figure as it was.
 */
export function expandChain(chain: ChainSection): readonly Item[] {
  const items = buildChain(chain);
  const key = structureOf(chain);
  const known = structures.get(key);
  if (known !== undefined)
    return items.map((item, i) => (known[i] === undefined ? item : { ...item, derived: known[i] }));
  if (structures.size >= STRUCTURES_LIMIT) structures.clear();
  structures.set(
    key,
    items.map(({ derived }) => derived),
  );
  return items;
}

/** All that the derived parts depend on, as a text. */
function structureOf({ id, symbol, title, intercept, stages, ...inputs }: ChainSection): string {
  const said = CHAIN_INPUTS.filter((input) => (inputs[input] ?? '').trim() !== '');
  const parts = stages.map((stage) => [
    stage.id,
    stage.symbol,
    stage.label,
    stage.off === true,
    STAGE_FIELDS.filter((field) => saysAnything(stage, field)),
  ]);
  return JSON.stringify([id, symbol, title, intercept, said, parts]);
}

function buildChain(chain: ChainSection): readonly Item[] {
  const builder = new ChainBuilder(chain);
  const inputs = {
    signal: builder.input('signal', 'wanted level at the input', 'dBm', 'level', 'wanted'),
    noise: builder.input('noise', 'source noise temperature', 'K', 'temperature'),
    bandwidth: builder.input('bandwidth', 'bandwidth', 'Hz', 'bandwidth'),
    interferer: builder.input('interferer', 'interferer at the input', 'dBm', 'level', 'unwanted'),
  };
  const source: Ref = inputs.noise ?? REFERENCE_TEMPERATURE_K;
  if (chain.stages.length > 0) addInputPlane(builder, inputs, source);
  let running: Running = { ...START, ...inputs, source };
  const stages = chain.stages.map((stage) => {
    const refs = addStage(builder, stage, running);
    running = refs.behind;
    return refs;
  });
  if (stages.length === 0) return builder.items;
  addOutputs(builder, running);
  addShares(builder, stages, running);
  for (const refs of stages) addStageChecks(builder, refs);
  addPlausibilityChecks(builder, stages);
  addBlockingCheck(builder, inputs.interferer, running.blockedIntercept);
  addFirstStageCheck(builder, stages);
  addSourceCheck(builder, stages, source);
  return builder.items;
}

interface Inputs {
  readonly signal: Ref | undefined;
  readonly noise: Ref | undefined;
  readonly bandwidth: Ref | undefined;
}

function addInputPlane(builder: ChainBuilder, { signal, bandwidth }: Inputs, source: Ref): void {
  const plane = builder.plane(0, undefined);
  const noise = builder.derive('in.noise', 'noise at the input', 'dBm', [source, bandwidth], noiseAtInput, {
    quantity: 'level',
    side: 'unwanted',
    plane,
  });
  builder.derive('in.signal', 'wanted level at the input', 'dBm', [signal], (level = NaN) => level, {
    quantity: 'level',
    side: 'wanted',
    plane,
  });
  builder.difference('in.snr', 'S/N at the input', signal, noise, { quantity: 'signal ratio' });
}

const noiseAtInput = (kelvin = NaN, bandwidthHz = NaN): number => noiseBehindDbm(kelvin, bandwidthHz, 0);

function addOutputs(builder: ChainBuilder, running: Running): void {
  const { source, bandwidth, signal, interferer } = running;
  const input = builder.plane(0, undefined);
  const plane = builder.plane(running.gain, running.last);
  const gain = builder.copy('gain', 'gain', 'dB', running.gain, {
    quantity: 'gain',
    formula: 'G = G₁ + G₂ + …, in decibels',
  });
  builder.derive('nf', 'noise figure', 'dB', [running.temperature], figureOfTemperatureDb, {
    quantity: 'noise figure',
    formula: 'NF = 10 log₁₀(1 + Tₑ/290 K)',
  });
  const temperature = builder.copy('te', 'noise temperature', 'K', running.temperature, {
    quantity: 'temperature',
    plane: input,
    formula: 'Tₑ = T₁ + T₂/G₁ + T₃/(G₁G₂) + …',
  });
  const system = builder.derive('tsys', 'system noise temperature at the input', 'K', [source, temperature], plus, {
    quantity: 'temperature',
    plane: input,
    formula: 'T = T_source + Tₑ',
  });
  const level = { quantity: 'level', plane: input } as const;
  const outputLevel = { quantity: 'level', plane } as const;
  const intercept = builder.copy('iip3', 'third-order input intercept', 'dBm', running.intercept, {
    ...level,
    formula: cascadeFormula(builder, 'IIP3', 3),
  });
  builder.derive('oip3', 'third-order output intercept', 'dBm', [intercept, gain], plus, {
    ...level,
    formula: 'OIP3 = IIP3 + G',
  });
  const intercept2 = builder.copy('iip2', 'second-order input intercept', 'dBm', running.intercept2, {
    ...level,
    formula: cascadeFormula(builder, 'IIP2', 2),
  });
  builder.derive('oip2', 'second-order output intercept', 'dBm', [intercept2, gain], plus, {
    ...level,
    formula: 'OIP2 = IIP2 + G',
  });
  const compression = builder.copy('ip1db', 'input level for 1 dB compression', 'dBm', running.compression, {
    ...level,
    formula: cascadeFormula(builder, 'P', 3),
  });
  builder.derive('op1db', 'output level at 1 dB compression', 'dBm', [compression, gain], outputCompression, {
    ...outputLevel,
    formula: 'P_out = P_in + G − 1 dB',
  });
  const floor = builder.derive('mds', 'minimum detectable signal', 'dBm', [system, bandwidth], noiseAtInput, {
    ...level,
    formula: 'k·T·B at the input',
  });
  builder.derive('sfdr', 'spurious-free dynamic range', 'dB', [intercept, floor], spuriousFreeRangeDb, {
    formula: '⅔ (IIP3 − k·T·B)',
  });
  const output = builder.copy('signal', 'wanted level at the output', 'dBm', running.signalBehind, {
    ...level,
    side: 'wanted',
    plane,
    formula: 'S_in + G',
  });
  const noise = builder.copy('noise', 'noise at the output', 'dBm', running.noiseBehind, {
    ...level,
    side: 'unwanted',
    plane,
    formula: 'k·(T_source + Tₑ)·B·G',
  });
  builder.difference('snr', 'S/N at the output', output, noise, { quantity: 'signal ratio', formula: 'S − N' });
  const tone = interferer ?? signal;
  const selective = running.selectivity === 0 ? intercept : running.selectiveIntercept;
  const selective2 = running.selectivity === 0 ? intercept2 : running.selectiveIntercept2;
  const unwanted = { ...level, side: 'unwanted', plane } as const;
  const products = builder.derive('im3', 'third-order products at the output', 'dBm', [tone, selective, gain], third, {
    ...unwanted,
    formula: '3·P − 2·IIP3 + G',
  });
  builder.derive('im2', 'second-order products at the output', 'dBm', [tone, selective2, gain], second, {
    ...unwanted,
    formula: '2·P − IIP2 + G',
  });
  if (interferer === undefined) return;
  builder.derive('rise', 'rise of the noise by third-order products', 'dB', [products, noise], riseDb, {
    formula: '10 log₁₀(1 + P_IM/N)',
  });
  builder.derive(
    'blocking',
    'gain lost beside the interferer',
    'dB',
    [interferer, running.blockedIntercept],
    blockingDb,
    { quantity: 'loss', formula: '−20 log₁₀(1 − 2·P/IIP3)' },
  );
}

/** How the chain's intercepts add, as a formula. */
function cascadeFormula({ chain }: ChainBuilder, letter: string, order: 2 | 3): string {
  const exponent = additionExponent({ isCoherent: chain.intercept !== 'power', order });
  const raised = exponent === 1 ? '' : exponent === 2 ? '²' : '^½';
  return `1/${letter}${raised} = Σ (G ahead/${letter} of the stage)${raised}, ${chain.intercept === 'power' ? 'as powers' : 'in phase'}`;
}

type Compute = (...values: number[]) => number;

const plus: Compute = (a = NaN, b = NaN) => a + b;
/** At 1 dB compression the gain is 1 dB less. */
const outputCompression: Compute = (input = NaN, gain = NaN) => input + gain - 1;
const third: Compute = (tone = NaN, intercept = NaN, gain = NaN) => productLevelDbm(tone, intercept, gain, 3);
const second: Compute = (tone = NaN, intercept = NaN, gain = NaN) => productLevelDbm(tone, intercept, gain, 2);

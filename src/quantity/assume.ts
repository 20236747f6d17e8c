/**
 * Assumed kinds and sides: engineers do not fill in forms, so where a line says nothing its name is read, but only where
 * the name is unmistakable and fits the unit. An assumption is shown as such; assumed sides are shown and not judged by.
 */
import { POWER, POWER_DENSITY, isDimensionless, sameDimension } from './dimension';
import type { QuantityKind, Side } from './kinds';
import type { Unit } from './unit';

interface Assumption {
  readonly kind: QuantityKind;
  readonly side?: Side;
}

const SIGNAL_RATIO =
  /^(SNR|CNR|CIR|SIR|SINR|CINR|SNIR|SINAD|SNDR|CN|C_N|CN0|CN_0|C_N0|C_N_0|CI|C_I|EbN0|EbNo|Eb_N0|EbN_0|E_b_N_0|Eb_No|EsN0|EsNo|Es_N0|EsN_0|C_over_N|C_over_N0|C_over_I|S_N|S_over_N|Eb_over_N0|Es_over_N0)(_.*|\d*)$/i;
const NOISE_FIGURE = /^NF(_.*|\d*)$/;
const LOSS = /^(L|FSPL|FSL|ACLR|ACS|ACIR|A_rain|A_gas|A_atm)(_.*|\d*)$/;
const GAIN = /^G(_.*|\d*)$/;
const IMPAIRMENT = /^(EVM|SPUR|spur|IMR|IM3R)(_.*|\d*)$/;
const UNWANTED = /^(N|I)(_.*|\d*)$/;
const WANTED = /^(S|C)(_.*|\d*)$/;
const MARGIN = /margin|headroom|reserve|backoff|back-off|degradation|improvement|rise|delta|difference/i;
/** What a signal ratio's name goes on with when it is a difference of such ratios and no ratio itself. */
const DIFFERENCE =
  /_(loss|gap|penalty|offset|allowance|step|change|correction|corr|impl|implementation|gain|deg)(_.*)?$/i;
const INSIDE_ONE_SIDE = /^(I_N|I_over_N|INR|IoverN)(_.*|\d*)$/i;

const LABEL_LOSS = /\b(loss|losses|attenuation|aclr|acs|rejection|isolation)\b/i;
const LABEL_GAIN = /\bgain\b/i;
const LABEL_NOISE_FIGURE = /\bnoise figure\b/i;
const LABEL_SIGNAL_RATIO =
  /\b(snr|cnr|cir|sir|sinr|signal[- ]to[- ]|carrier[- ]to[- ]|c\/n0?|c\/i|s\/n|eb\/n0|es\/n0|eb\/no|c\/n₀|eb\/n₀|es\/n₀)/i;
const LABEL_IMPAIRMENT = /\b(evm|error vector magnitude|spur|spurious)\b/i;
const LABEL_UNWANTED = /\b(noise|interference|interferer|distortion)\b/i;
const LABEL_WANTED = /\b(wanted|signal|carrier)\b/i;

/** True when a decibel line in this unit can be a ratio of powers. */
const isRatio = (unit: Unit): boolean => unit.form === 'decibel' && isDimensionless(unit.dimension);

/** True for units of power and power density, decibel or linear. */
function isLevelUnit(unit: Unit): boolean {
  return unit.form !== 'rate' && (sameDimension(unit.dimension, POWER) || sameDimension(unit.dimension, POWER_DENSITY));
}

/** True for units a signal ratio can have: dB, and dBHz for C/N₀. */
function isSignalRatioUnit(unit: Unit): boolean {
  return isRatio(unit) || (unit.form === 'decibel' && unit.word === 'dBHz');
}

/** What the name of a line in this unit says it is; undefined where the name says nothing unmistakable. */
export function assumeFromName(symbol: string, label: string, unit: Unit): Assumption | undefined {
  if (isLevelUnit(unit)) return assumeSide(symbol, label);
  if (unit.form !== 'decibel' || unit.defaultKind !== undefined) {
    return isSignalRatioUnit(unit) && unit.word === 'dBHz' && says(symbol, label, SIGNAL_RATIO, LABEL_SIGNAL_RATIO)
      ? { kind: 'signal ratio' }
      : undefined;
  }
  if (!isRatio(unit)) return undefined;
  return assumeRatio(symbol, label);
}

function says(symbol: string, label: string, symbolPattern: RegExp, labelPattern: RegExp): boolean {
  return !MARGIN.test(symbol) && !MARGIN.test(label) && (symbolPattern.test(symbol) || labelPattern.test(label));
}

function assumeSide(symbol: string, label: string): Assumption | undefined {
  const unwanted = UNWANTED.test(symbol) || LABEL_UNWANTED.test(label);
  const wanted = WANTED.test(symbol) || LABEL_WANTED.test(label);
  if (unwanted === wanted) return undefined;
  return { kind: 'level', side: unwanted ? 'unwanted' : 'wanted' };
}

const BY_SYMBOL: readonly (readonly [RegExp, QuantityKind])[] = [
  [NOISE_FIGURE, 'noise figure'],
  [LOSS, 'loss'],
  [GAIN, 'gain'],
  [SIGNAL_RATIO, 'signal ratio'],
  [IMPAIRMENT, 'impairment ratio'],
];

const BY_LABEL: readonly (readonly [RegExp, QuantityKind])[] = [
  [LABEL_NOISE_FIGURE, 'noise figure'],
  [LABEL_LOSS, 'loss'],
  [LABEL_GAIN, 'gain'],
  [LABEL_SIGNAL_RATIO, 'signal ratio'],
  [LABEL_IMPAIRMENT, 'impairment ratio'],
];

function assumeRatio(symbol: string, label: string): Assumption | undefined {
  if (MARGIN.test(symbol) || MARGIN.test(label) || INSIDE_ONE_SIDE.test(symbol)) return undefined;
  if (SIGNAL_RATIO.test(symbol) && DIFFERENCE.test(symbol)) return undefined;
  for (const [pattern, kind] of BY_SYMBOL) if (pattern.test(symbol)) return { kind };
  const kinds = BY_LABEL.filter(([pattern]) => pattern.test(label)).map(([, kind]) => kind);
  // Two words of different kinds in one label say nothing for certain.
  return kinds.length === 1 && kinds[0] !== undefined ? { kind: kinds[0] } : undefined;
}

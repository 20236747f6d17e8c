/**
 * Parts of chains in expressions: what a chain has to be told before it gives one, for findings on parts that are not there.
 * Holds: a part that a chain does not give is never taken for a mistyped other part, which would be another quantity.
 */
import { nearestName } from './nearest';

const NOISE = 'the noise figure of every stage that amplifies';

/** What a part waits for, by its last word. */
const NEEDS: ReadonlyMap<string, string> = new Map([
  ['nf', NOISE],
  ['te', NOISE],
  ['tsys', NOISE],
  ['noise_share', NOISE],
  ['source_share', NOISE],
  ['noise', `a bandwidth and ${NOISE}`],
  ['mds', `a bandwidth and ${NOISE}`],
  ['signal', 'a wanted level'],
  ['snr', `a wanted level, a bandwidth and ${NOISE}`],
  ['interferer', 'the level of an interferer'],
  ['iip3', 'a third-order intercept of a stage'],
  ['oip3', 'a third-order intercept of a stage'],
  ['distortion_share', 'a third-order intercept of a stage'],
  ['iip2', 'a second-order intercept of a stage'],
  ['oip2', 'a second-order intercept of a stage'],
  ['ip1db', 'a compression point of a stage'],
  ['op1db', 'a compression point of a stage'],
  ['headroom', 'a wanted level and the compression point of the stage'],
  ['sfdr', `a bandwidth, a third-order intercept of a stage and ${NOISE}`],
  ['im3', 'a wanted level or an interferer, and a third-order intercept of a stage'],
  ['im2', 'a wanted level or an interferer, and a second-order intercept of a stage'],
  ['rise', `an interferer, a bandwidth, a third-order intercept of a stage and ${NOISE}`],
  ['blocking', 'an interferer and a third-order intercept of a stage'],
]);

/** What is known about a name that is not there. */
export interface Unknown {
  readonly nearest?: string;
  /** What the chain has to be told. */
  readonly needs?: string;
  /** The name is that of a chain by itself; a part of it, for an example. */
  readonly example?: string;
}

/** Looks a name that is not known up among those that are. */
export function lookAround(name: string, names: readonly string[]): Unknown {
  const words = name.split('.');
  const last = words[words.length - 1] ?? '';
  const within = `${words.slice(0, -1).join('.')}.`;
  const needs = words.length > 1 ? NEEDS.get(last) : undefined;
  if (needs !== undefined && names.some((other) => other.startsWith(within))) return { needs };
  const example = names.find((other) => other === `${name}.gain`);
  if (example !== undefined) return { example };
  const nearest = nearestName(
    name,
    names.filter(
      (other) => isNearByWord(words, other.split('.')) && (needs === undefined || other.endsWith(`.${last}`)),
    ),
  );
  return nearest === undefined ? {} : { nearest };
}

/** True when each word is near: of rx.lna.out.snr the stage has to be mistyped, not another one. */
const isNearByWord = (words: readonly string[], others: readonly string[]): boolean =>
  words.length === 1 ||
  words.length !== others.length ||
  words.every((word, i) => word === others[i] || nearestName(word, others.slice(i, i + 1)) !== undefined);

/** The net meaning of a decibel sum, and which of its terms are levels. */
import { combineMeanings, isDimensionless, meaningOf, NEUTRAL, POWER, sameDimension, type Meaning } from '../quantity';
import type { SumTerm } from './types';

/** The net meaning as judged: full-scale levels beside levels of power are ratios; what is not known weighs by dimension. */
export function judgedNet(terms: readonly SumTerm[]): Meaning {
  const hasPower = terms.some((term) => isLevel(term) && !isDimensionless(term.type.dimension));
  let net = NEUTRAL;
  for (const term of terms) {
    if (hasPower && isFullScale(term)) continue;
    if (isOfUnwantedCarrier(term, terms)) continue;
    net = combineMeanings(net, meaningOfTerm(term), term.coefficient);
  }
  return net;
}

/**
 * True of an impairment ratio added to an unwanted level: the carrier that it is relative to is the interferer, as in reciprocal
 * mixing or an interferer's own spectrum, and the sum is an unwanted level again.
 */
export function isOfUnwantedCarrier({ coefficient, type }: SumTerm, terms: readonly SumTerm[]): boolean {
  const { meaning } = type;
  if (coefficient !== 1 || meaning === undefined || meaning.w !== -1 || meaning.u !== 1) return false;
  return terms.some(
    ({ coefficient: times, type: { meaning: other } }) =>
      times === 1 && other !== undefined && other.w === 0 && other.u === 1 && other.l === 0,
  );
}

const isFullScale = (term: SumTerm): boolean => isLevel(term) && isDimensionless(term.type.dimension);

function meaningOfTerm({ type }: SumTerm): Meaning {
  if (type.meaning !== undefined) return type.meaning;
  return sameDimension(type.dimension, POWER) ? meaningOf('level', undefined, false) : { ...NEUTRAL, declared: false };
}

/** True for terms that are a level or a temperature: one power in the account. */
export function isLevel(term: SumTerm): boolean {
  const { w, u, l } = meaningOfTerm(term);
  return Math.abs(w + u + l - 1) < 1e-9;
}

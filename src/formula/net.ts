/** The net meaning of a decibel sum, and which of its terms are levels. */
import { combineMeanings, isDimensionless, meaningOf, NEUTRAL, POWER, sameDimension, type Meaning } from '../quantity';
import type { SumTerm } from './types';

/** The net meaning as judged: full-scale levels beside levels of power are ratios; what is not known weighs by dimension. */
export function judgedNet(terms: readonly SumTerm[]): Meaning {
  const hasPower = terms.some((term) => isLevel(term) && !isDimensionless(term.type.dimension));
  let net = NEUTRAL;
  for (const term of terms) {
    if (hasPower && isFullScale(term)) continue;
    net = combineMeanings(net, meaningOfTerm(term), term.coefficient);
  }
  return net;
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

/** A requirement as text: how a person types it, and how it is shown. */
import type { Requirement } from '../worksheet';

const FORMS: readonly (readonly [words: RegExp, bound: 'atLeast' | 'atMost'])[] = [
  [/^(?:≥|>=|=>|>|at\s+least\b|min(?:imum)?\b\.?)\s*/iu, 'atLeast'],
  [/^(?:≤|<=|=<|<|at\s+most\b|max(?:imum)?\b\.?)\s*/iu, 'atMost'],
];

/**
 * The requirement that a text states: `>= 3 dB`, `at most -100 dBm`; a bound alone is *at least*. Undefined for an empty text;
 * null when only the comparison was typed.
 */
export function readRequirement(text: string): Requirement | undefined | null {
  const trimmed = text.trim();
  if (trimmed === '') return undefined;
  for (const [words, bound] of FORMS) {
    const match = words.exec(trimmed);
    if (match === null) continue;
    const limit = trimmed.slice(match[0].length).trim();
    if (limit === '') return null;
    return bound === 'atLeast' ? { atLeast: limit } : { atMost: limit };
  }
  return { atLeast: trimmed };
}

/** The requirement as shown and as it is edited: `≥ 3 dB`, with the bound as typed. Empty without one. */
export function writeRequirement(requirement: Requirement | undefined): string {
  if (requirement === undefined) return '';
  return requirement.atLeast === undefined ? `≤ ${requirement.atMost}` : `≥ ${requirement.atLeast}`;
}

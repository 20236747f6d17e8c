/** A requirement in words, and how a line stands to it, alike in every command. */
import type { Reading } from '../engine';
import { findUnit, writeQuantity, writeSignificant } from '../quantity';
import type { Line, Requirement } from '../worksheet';

/** `at least 3 dB`, with the bound as typed. */
export function boundText({ atLeast, atMost }: Requirement): string {
  return atLeast === undefined ? `at most ${atMost}` : `at least ${atLeast}`;
}

/** `met, margin 2.96 dB`, `NOT MET, 0.40 dB short`, or why it is not known. */
export function standingText({ requirement, figure }: Reading): string {
  if (requirement === undefined) return `not known, ${WHY_UNKNOWN[figure.state]}`;
  const { met, margin, unit } = requirement;
  // No power at all is beyond any bound.
  if (!Number.isFinite(margin)) return `${met ? 'met' : 'NOT MET'}, no power`;
  const size = sizeText(Math.abs(margin), unit);
  return met ? `met, margin ${size}` : `NOT MET, ${size} short`;
}

const WHY_UNKNOWN: Readonly<Record<Reading['figure']['state'], string>> = {
  value: 'the bound cannot be read',
  withheld: 'the value is withheld',
  waiting: 'the value is withheld',
  empty: 'there is no entry',
};

/** A margin's size; one that rounds to nothing is said to be less than the last digit. */
function sizeText(size: number, word: string): string {
  const unit = findUnit(word);
  if (unit === undefined) return `${writeSignificant(size)} ${word}`;
  const written = writeQuantity(size, unit);
  return size > 0 && written.startsWith('0.00 ') ? `less than ${written.replace('0.00', '0.01')}` : written;
}

/** True for a line whose requirement is not met in a case, or not known to be. */
export function isUnmet({ requirement }: Line, reading: Reading): boolean {
  return requirement !== undefined && reading.requirement?.met !== true;
}

/** How the working writes shares, requirements and where a kind or side came from. */
import type { Origin, RequirementReading } from '../../engine';
import { findUnit, writeQuantity } from '../../quantity';
import type { Requirement } from '../../worksheet';

/** A share of a power sum (0 to 1) in per cent, with two figures: `63 %`, `4.2 %`, `under 0.1 %`. */
export function writeShare(share: number): string {
  const percent = share * 100;
  if (percent > 0 && percent < 0.1) return 'under 0.1 %';
  const isSmall = percent > 0 && percent < 9.95;
  return `${percent.toFixed(isSmall ? 1 : 0).replace('-', '−')} %`;
}

/** The part of a bar that a share fills, 0 to 1: a difference of powers has shares outside that. */
export function barLength(share: number): number {
  return Math.min(1, Math.max(0, share));
}

/** How a kind or side came about, in words. */
export const ORIGIN_WORDS: Readonly<Record<Origin, string>> = {
  declared: 'as declared',
  name: 'assumed from the name',
  expression: 'assumed from the expression',
  unit: 'assumed from the unit',
};

/** A margin's size in a unit named by its word; one that rounds to nothing is said to be less than the last digit. */
export function writeSize(size: number, word: string): string {
  const unit = findUnit(word);
  if (unit === undefined) return `${String(size)} ${word}`;
  const written = writeQuantity(size, unit);
  return size > 0 && /^0(\.0+)?(?!\.?\d)/.test(written) ? `less than ${written.replace(/0(?!.*\d)/, '1')}` : written;
}

/** `met, 2.96 dB to spare`, `not met, 0.40 dB short`. */
export function writeStanding(requirement: RequirementReading): string {
  const size = writeSize(Math.abs(requirement.margin), requirement.unit);
  return requirement.met ? `met, ${size} to spare` : `not met, ${size} short`;
}

/** A requirement as a sentence has it: `at least 3 dB`, with the bound as typed. */
export function writeRequirement(requirement: Requirement): string {
  return requirement.atLeast === undefined ? `at most ${requirement.atMost}` : `at least ${requirement.atLeast}`;
}

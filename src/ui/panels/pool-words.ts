/** How the account of a pool is put into words. */
import { writeQuantity } from '../../quantity';
import type { Permitted, PoolAccount } from '../../review';
import { writeSize } from './working-parts';

/** How the lines of a pool come together, as a sentence. */
export const ADDING_WORDS: Readonly<Record<NonNullable<PoolAccount['adding']>, string>> = {
  powers: 'The lines add as powers.',
  linear: 'The lines add as they are.',
  reciprocal: 'The lines are signal ratios and add by their reciprocals.',
};

/** A permitted value as a cell shows it: the bound on the line, and how far the line is from it. */
export interface PermittedWords {
  readonly bound: string;
  readonly distance: string;
  readonly isKept: boolean;
}

/** The words for a permitted value; `bound` is that of the requirement on the total. */
export function writePermitted(permitted: Permitted, bound: 'at least' | 'at most'): PermittedWords {
  switch (permitted.state) {
    case 'none':
      return {
        bound: 'none',
        distance: bound === 'at most' ? 'the others alone exceed it' : 'the others alone fall short of it',
        isKept: false,
      };
    case 'any':
      return { bound: 'any', distance: 'the others alone meet it', isKept: true };
    case 'value': {
      const { value, unit, room } = permitted;
      const sign = permitted.bound === 'at most' ? '≤' : '≥';
      const size = Number.isFinite(room) ? writeSize(Math.abs(room), unit.form === 'decibel' ? 'dB' : unit.word) : '';
      const way = room >= 0 ? 'to spare' : permitted.bound === 'at most' ? 'too much' : 'too little';
      return {
        // “At most no power” is “no power”.
        bound: value === -Infinity ? writeQuantity(value, unit) : `${sign} ${writeQuantity(value, unit)}`,
        distance: size === '' ? '' : `${size} ${way}`,
        isKept: room >= 0,
      };
    }
  }
}

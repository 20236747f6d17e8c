/** Averages of levels written out as (a + b)/2: the same mistake as mean() of decibels. */
import type { Context } from './context';
import { isLevel } from './net';
import type { Tree } from './tree';
import type { SumTerm } from './types';

/** Makes the finding decibels-averaged when a sum is n levels over n; true when it did. */
export function findAveraged(tree: Tree, terms: readonly SumTerm[], context: Context): boolean {
  const n = terms.length;
  const isMean = n >= 2 && terms.every((term) => Math.abs(term.coefficient - 1 / n) < 1e-9 && isLevel(term));
  if (!isMean) return false;
  context.say('decibels-averaged', tree, {
    facts: {},
    repairs: [context.rewrite(tree, `meanpower(${terms.map(({ text }) => text).join(', ')})`)],
  });
  return true;
}

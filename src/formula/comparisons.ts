/** Comparisons of two quantities of one form and dimension. */
import { align } from './alignment';
import type { Check } from './check';
import { broken, type Context } from './context';
import type { Comparison } from './plan';
import type { BinaryTree } from './tree';
import type { Checked } from './types';
import { consume } from './judge';

/** Checks `a < b` and its like. */
export function checkComparison(tree: BinaryTree, comparison: Comparison, context: Context, check: Check): Checked {
  const operands = [consume(check(tree.left, context), context), consume(check(tree.right, context), context)];
  const aligned = align(tree, operands, context, false);
  const [left, right] = aligned?.plans ?? [];
  if (left === undefined || right === undefined) return broken(tree);
  return { tree, type: { form: 'truth' }, plan: { op: 'compare', comparison, left, right }, parts: operands };
}

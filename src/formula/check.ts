/**
 * The checker: gives every part of an expression a type and a plan, or says why it has none. It looks at kinds, units and
 * literals, not at the values of other lines (bare numbers used as coefficients apart).
 */
import { unreachable } from '../base';
import { checkLiteral, checkSymbol } from './atoms';
import { checkComparison } from './comparisons';
import type { Context } from './context';
import { checkCall } from './calls';
import { checkPower } from './powers';
import { checkProduct, checkQuotient } from './products';
import { checkNegation, checkSum } from './sums';
import type { Tree } from './tree';
import type { Checked } from './types';
import { constantPlan } from './plan';

/** Checks a tree. Findings go to the context; a type `broken` means that there is no value. */
export function check(tree: Tree, context: Context): Checked {
  switch (tree.type) {
    case 'literal':
      return checkLiteral(tree);
    case 'symbol':
      return checkSymbol(tree, context);
    case 'text':
      return { tree, type: { form: 'text', text: tree.text }, plan: constantPlan(NaN), parts: [] };
    case 'negation':
      return checkNegation(tree, context, check);
    case 'call':
      return checkCall(tree, context, check);
    case 'binary':
      switch (tree.operator) {
        case '+':
        case '-':
          return checkSum(tree, context, check);
        case '*':
          return checkProduct(tree, context, check);
        case '/':
          return checkQuotient(tree, context, check);
        case '^':
          return checkPower(tree, context, check);
        case '=':
        case '<>':
        case '<':
        case '>':
        case '<=':
        case '>=':
          return checkComparison(tree, tree.operator, context, check);
        default:
          return unreachable(tree.operator);
      }
    default:
      return unreachable(tree);
  }
}

/** How parts of the checker call the whole of it. */
export type Check = typeof check;

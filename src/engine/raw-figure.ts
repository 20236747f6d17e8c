/**
 * What an entry would read if units were ignored and figures taken as they stand: told in findings as what the line does
 * now, never shown as a value.
 */
import { evaluatePlan, type Figures, type Scope, type Tree } from '../formula';

/** The bare figure of a tree; undefined where even that has none. */
export function rawFigure(tree: Tree, scope: Scope, figures: Figures): number | undefined {
  const value = raw(tree, scope, figures);
  return value !== undefined && Number.isFinite(value) ? value : undefined;
}

const LOGARITHMS: Readonly<Record<string, (x: number) => number>> = {
  log10: Math.log10,
  ln: Math.log,
  sqrt: Math.sqrt,
  exp: Math.exp,
  db: (x) => 10 * Math.log10(x),
  lin: (x) => 10 ** (x / 10),
};

function raw(tree: Tree, scope: Scope, figures: Figures): number | undefined {
  switch (tree.type) {
    case 'literal':
      return tree.figure;
    case 'symbol': {
      const info = scope.find(tree.name);
      return info === undefined || info === 'withheld'
        ? undefined
        : evaluatePlan({ op: 'slot', slot: info.slot }, figures);
    }
    case 'negation': {
      const operand = raw(tree.operand, scope, figures);
      return operand === undefined ? undefined : -operand;
    }
    case 'call': {
      const parameters = tree.parameters.map((parameter) => raw(parameter, scope, figures));
      const [first] = parameters;
      if (tree.name === 'sum')
        return parameters.reduce<number | undefined>(
          (sum, value) => (sum === undefined || value === undefined ? undefined : sum + value),
          0,
        );
      return first === undefined ? undefined : LOGARITHMS[tree.name]?.(first);
    }
    case 'binary': {
      const left = raw(tree.left, scope, figures);
      const right = raw(tree.right, scope, figures);
      return left === undefined || right === undefined ? undefined : operate(tree.operator, left, right);
    }
    case 'text':
      return undefined;
  }
}

function operate(operator: string, left: number, right: number): number | undefined {
  switch (operator) {
    case '+':
      return left + right;
    case '-':
      return left - right;
    case '*':
      return left * right;
    case '/':
      return left / right;
    case '^':
      return left ** right;
    default:
      return undefined;
  }
}

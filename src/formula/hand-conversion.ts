/**
 * Conversions done by hand on top of the automatic one: `P_w + 30` in a line in dBm where P_w is in dBW. The line's unit
 * converts already, so the figure is off by the difference of the references.
 */
import { isDimensionless, isRootPower, raiseDimension, type DecibelUnit } from '../quantity';
import type { Context } from './context';
import { isLevel } from './net';
import { withoutTerm } from './repairs';
import type { Tree } from './tree';
import type { DecibelType, SumTerm } from './types';

const near = (a: number, b: number): boolean => Math.abs(a - b) < 0.06;

/**
 * Makes the finding constant-hides-unit when a sum is one quantity and one bare figure, and the figure is just the step from
 * the quantity's reference to that of the result (`resultOffsetDb`). `write`: what takes the place of `tree`, of the quantity.
 */
export function sayHandConversion(
  tree: Tree,
  terms: readonly SumTerm[],
  resultOffsetDb: number,
  context: Context,
  write: (quantity: string) => string = (quantity) => quantity,
): boolean {
  if (terms.length !== 2) return sayBareStep(tree, terms, resultOffsetDb, context, write);
  const [quantity, ...rest] = [...terms].sort((a, b) => Number(isFigure(a)) - Number(isFigure(b)));
  const [figure] = rest;
  if (quantity === undefined || figure === undefined || rest.length !== 1 || !isFigure(figure) || isFigure(quantity))
    return false;
  if (!near(quantity.coefficient, 1) || figure.plan.op !== 'constant') return false;
  const step = quantity.type.offsetDb - resultOffsetDb;
  const added = figure.coefficient * figure.plan.value;
  if (near(step, 0) || !near(added, step)) return false;
  say(tree, String(Math.abs(added)), write(quantity.text), context);
  return true;
}

/** In longer sums only a number without any unit is taken for a step: 30 dB may be an amplifier's gain. */
function sayBareStep(
  tree: Tree,
  terms: readonly SumTerm[],
  resultOffsetDb: number,
  context: Context,
  write: (quantity: string) => string,
): boolean {
  const rest = terms.filter(({ isNumber }) => !isNumber);
  const offsetDb = rest.reduce((sum, { coefficient, type }) => sum + coefficient * type.offsetDb, 0);
  const step = offsetDb - resultOffsetDb;
  const number = terms.find(
    ({ isNumber, plan, coefficient }) => isNumber && plan.op === 'constant' && near(coefficient * plan.value, step),
  );
  if (number === undefined || near(step, 0)) return false;
  say(tree, number.text, write(withoutTerm(terms, number).text), context);
  return true;
}

/** A bare number, or a literal in dB. */
const isFigure = ({ tree, type, isNumber }: SumTerm): boolean =>
  tree.type === 'literal' && (isNumber || tree.unit?.word === 'dB') && isDimensionless(type.dimension);

function say(tree: Tree, number: string, repaired: string, context: Context): void {
  context.say('constant-hides-unit', tree, {
    facts: { number, standsFor: 'the step between two references, which the line’s unit takes already', closes: 'yes' },
    repairs: [context.rewrite(tree, repaired)],
  });
}

/** 10*log10(P*1000) in a line in dBm, with P in watts: the factor stands for the milliwatt, which the unit takes already. */
export function sayFactorInLogarithm(terms: readonly SumTerm[], declared: DecibelUnit, context: Context): boolean {
  for (const term of terms) {
    const argument = argumentOfLogarithm(term.tree);
    if (argument?.type !== 'binary' || (argument.operator !== '*' && argument.operator !== '/') || !isLevel(term))
      continue;
    const factor = [argument.left, argument.right].find((side) => side.type === 'literal' && side.unit === null);
    if (factor?.type !== 'literal' || (argument.operator === '/' && factor === argument.left)) continue;
    const step =
      (argument.operator === '*' ? 1 : -1) * logarithmFactor(term.tree, term.type) * Math.log10(factor.figure);
    if (near(step, 0) || !near(step, -declared.offsetDb)) continue;
    const quantity = factor === argument.left ? argument.right : argument.left;
    context.say('constant-hides-unit', argument, {
      facts: {
        number: context.textOf(factor),
        standsFor: 'the step between two references, which the line’s unit takes already',
        closes: 'yes',
      },
      repairs: [context.rewrite(argument, context.textOf(quantity))],
    });
    return true;
  }
  return false;
}

/** 10 or 20: what the logarithm of a term is multiplied by. */
function logarithmFactor(tree: Tree, type: DecibelType): number {
  if (tree.type === 'binary')
    for (const side of [tree.left, tree.right]) if (side.type === 'literal') return Math.abs(side.figure);
  return isRootPower(raiseDimension(type.dimension, 0.5)) ? 20 : 10;
}

/**
 * 10^(P/10)/1000 and lin(P)*0.001, with P in dBm: the milliwatt is taken off once more by hand. `reference` is that of P.
 */
export function sayReferenceTwice(
  tree: Tree,
  power: { readonly tree: Tree; readonly reference?: number | undefined },
  factor: number,
  context: Context,
): void {
  const { reference } = power;
  if (reference === undefined || Math.abs(Math.log10(reference)) < 0.01 || Math.abs(factor / reference - 1) > 1e-6)
    return;
  context.say('constant-hides-unit', tree, {
    facts: {
      number: String(Number(factor.toPrecision(6))),
      standsFor: 'the reference of the decibels, which their linear value has already',
      closes: 'yes',
    },
    repairs: [context.rewrite(tree, context.textOf(power.tree))],
  });
}

function argumentOfLogarithm(tree: Tree): Tree | undefined {
  if (tree.type === 'call' && tree.name === 'db') return tree.parameters[0];
  if (tree.type !== 'binary' || tree.operator !== '*') return undefined;
  const log = [tree.left, tree.right].find((side) => side.type === 'call' && side.name === 'log10');
  return log?.type === 'call' ? log.parameters[0] : undefined;
}

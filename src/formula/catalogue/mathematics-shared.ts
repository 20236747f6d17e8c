/** What the mathematical functions share: numeric plans, meanings of results, and the refusal of what is no number. */
import { sameMeaning, type Unit, findUnit } from '../../quantity';
import { type Context } from '../context';
import { describeType } from '../forms';
import { type Plan } from '../plan';
import type { CallTree } from '../tree';
import type { Checked, LinearType, Type } from '../types';

/** Where the functions' meanings come from. */
export const SOURCE = 'OASIS OpenFormula 1.3, part 4';

/** A numeric function. */
export type Compute = (...values: number[]) => number;

/** A plan that applies a numeric function. */
export const apply = (name: string, compute: Compute, parameters: readonly Plan[]): Plan => ({
  op: 'apply',
  name,
  compute,
  parameters,
});

/** Refuses an argument that is not a plain number. */
export function needsNumber(tree: CallTree, operand: Checked, context: Context): Checked {
  const text = context.textOf(operand.tree);
  if (operand.type.form === 'decibel')
    return context.stop('decibels-multiplied', tree, {
      facts: { what: `${text} is in decibels and stands in ${tree.name}` },
      repairs: [context.rewrite(operand.tree, `lin(${text})`)],
    });
  if (operand.type.form === 'linear') {
    const unit = operand.type.unitHint?.word ?? describeType(operand.type);
    return context.stop('log-of-dimension', tree, {
      facts: { function: tree.name, argument: text, found: describeType(operand.type) },
      repairs: [context.rewrite(operand.tree, `${text} / (1 ${unit})`)],
    });
  }
  return context.stop('wrong-arguments', tree, {
    facts: { what: `${tree.name} takes a plain number; ${text} is ${describeType(operand.type)}` },
    repairs: [],
  });
}

/** The unit in which angles come back. */
export const angle = (): Unit | undefined => findUnit('rad');

/** A type without the origins that a changed value no longer has. */
export function withoutAttributes(type: Type): Type {
  return type.form === 'decibel' || type.form === 'linear'
    ? { ...type, bandwidth: undefined, noiseTemperature: undefined }
    : type;
}

/** The common meaning of operands; undefined when they differ. */
export function commonMeaning(operands: readonly Checked[]): LinearType['meaning'] {
  const meanings = operands.map(({ type }) =>
    type.form === 'linear' || type.form === 'decibel' ? type.meaning : undefined,
  );
  const [first] = meanings;
  return first !== undefined && meanings.every((meaning) => meaning !== undefined && sameMeaning(meaning, first))
    ? first
    : undefined;
}

/** The common kind of operands; undefined when they differ. */
export const commonKind = (operands: readonly Checked[]): Checked['kind'] =>
  operands.every(({ kind }) => kind === operands[0]?.kind) ? operands[0]?.kind : undefined;

/** Powers known to be in different bandwidths that are added, compared or subtracted. */
import { withPrefix } from '../quantity';
import type { Context } from './context';
import type { Plan } from './plan';
import type { Tree } from './tree';
import type { Type } from './types';

interface PowerOperand {
  readonly tree: Tree;
  readonly text: string;
  readonly type: Type;
}

const relativeDifference = (a: number, b: number): number => Math.abs(a - b) / Math.max(Math.abs(a), Math.abs(b));

/** The bandwidths differ by more than rounding. */
const differs = (difference: number): boolean => difference > 1e-6;

/** Makes the finding for the first operand whose known bandwidth differs from that of the first. */
export function sayBandwidthsDiffer(operands: readonly PowerOperand[], context: Context): void {
  const known = operands.flatMap((operand) =>
    (operand.type.form === 'decibel' || operand.type.form === 'linear') && operand.type.bandwidth !== undefined
      ? [{ ...operand, bandwidth: operand.type.bandwidth }]
      : [],
  );
  const [first] = known;
  const other = known.find(({ bandwidth }) => bandwidth.key !== first?.bandwidth.key);
  if (first === undefined || other === undefined) return;
  const plan: Plan = {
    op: 'apply',
    name: 'relative difference',
    compute: relativeDifference,
    parameters: [first.bandwidth.plan, other.bandwidth.plan],
  };
  const asText = (hertz: number): string => {
    const { text, unit } = withPrefix(hertz, 'Hz');
    return `${text} ${unit}`;
  };
  context.say('bandwidths-differ', other.tree, {
    facts: { first: first.text, second: other.text },
    lateFacts: (evaluate) => ({
      firstBandwidth: asText(evaluate(first.bandwidth.plan)),
      secondBandwidth: asText(evaluate(other.bandwidth.plan)),
    }),
    repairs: [
      context.rewrite(
        other.tree,
        `rebase(${other.text}, ${hertzText(other.bandwidth.text)}, ${hertzText(first.bandwidth.text)})`,
      ),
    ],
    applies: { plan, test: differs },
  });
}

/** A bandwidth given as decibels of a line is that line again: db(B) is B. */
const hertzText = (text: string): string =>
  /^db\(([^()]+)\)$/.exec(text)?.[1] ?? /^10\*log10\(([^()]+)\)$/.exec(text)?.[1] ?? text;

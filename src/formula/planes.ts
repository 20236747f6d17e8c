/** Levels and temperatures of one chain, taken at different places, put together without the gain that lies between. */
import type { Context } from './context';
import type { Plane, SumTerm, Type } from './types';
import type { Tree } from './tree';

interface PlacedOperand {
  readonly tree: Tree;
  readonly text: string;
  readonly type: Type;
}

/**
 * Makes the finding for the first operand that holds at another place than the one before it. A sum that has a gain of the
 * chain among its terms is taken to refer one place to the other: nothing is said of it.
 */
export function sayPlanesDiffer(operands: readonly PlacedOperand[], sum: readonly SumTerm[], context: Context): void {
  const placed = operands.flatMap((operand) => {
    const plane = planeOf(operand.type);
    return plane === undefined ? [] : [{ ...operand, plane }];
  });
  const [first] = placed;
  if (first === undefined) return;
  const other = placed.find(({ plane }) => plane.chain === first.plane.chain && plane.key !== first.plane.key);
  if (other === undefined || sum.some((term) => isGainOf(term, first.plane.chain)) || isGainBetween(sum)) return;
  const between = gainBetween(other.plane, first.plane);
  const isLinear = other.type.form === 'linear';
  const moved = isLinear ? `${other.text} * lin(${between.replace(/^\+ /, '')})` : `${other.text} ${between}`;
  context.say('planes-differ', other.tree, {
    facts: {
      first: first.text,
      firstPlane: first.plane.text,
      second: other.text,
      secondPlane: other.plane.text,
    },
    repairs: [context.rewrite(other.tree, sum.length > 0 ? `(${moved})` : moved)],
  });
}

/** One level less another of the same side: the gain between two places is what is asked for. */
function isGainBetween(sum: readonly SumTerm[]): boolean {
  const [a, b, ...rest] = sum.filter(({ type }) => type.plane !== undefined);
  if (a === undefined || b === undefined || rest.length > 0) return false;
  return a.side !== undefined && a.side === b.side && a.coefficient === -b.coefficient;
}

const planeOf = (type: Type): Plane | undefined =>
  type.form === 'decibel' || type.form === 'linear' ? type.plane : undefined;

const isGainOf = ({ tree, kind }: SumTerm, chain: string): boolean =>
  kind === 'gain' && tree.type === 'symbol' && tree.name.startsWith(`${chain}.`);

/** What is added to a figure at one place to have it at another: `+ rx.gain - rx.lna.out.gain`. */
function gainBetween(from: Plane, to: Plane): string {
  const up = to.gain === undefined ? [] : [`+ ${to.gain}`];
  const down = from.gain === undefined ? [] : [`- ${from.gain}`];
  return [...up, ...down].join(' ');
}

/** Which way is good: by the kind of a line and the side of a level, and for a line that is asked for also by its requirement. */
import type { Evaluation, Node } from '../engine';

export type Direction = 'higher' | 'lower';

/** The favourable direction of a line's figure; undefined for kinds that have none, and for levels of no side. */
export function favourableDirection({ result, item }: Node): Direction | undefined {
  const { kind, side } = result;
  const field = item.origin?.field;
  // Intercepts and compression points are levels of no signal: the higher, the better. Selectivity is no loss of the wanted one.
  if (
    field !== undefined &&
    (field.endsWith('Intercept') || field.endsWith('Intercept2') || field.endsWith('Compression'))
  )
    return 'higher';
  if (field === 'selectivity') return undefined;
  switch (kind?.kind) {
    case 'gain':
    case 'signal ratio':
    case 'figure of merit':
      return 'higher';
    case 'loss':
    case 'noise figure':
    case 'impairment ratio':
    case 'temperature':
      return 'lower';
    case 'level':
      return side === undefined ? undefined : side.side === 'wanted' ? 'higher' : 'lower';
    default:
      return undefined;
  }
}

/**
 * The favourable direction of a line that is asked for: away from the bound it is required to keep, else by its kind.
 * `isAssumed`: nothing tells, and higher is taken for better.
 */
export function targetDirection(
  evaluation: Evaluation,
  lineId: string,
  caseId: string,
): { readonly direction: Direction; readonly isAssumed: boolean } {
  const requirement = evaluation.line(lineId)?.requirement;
  if (requirement !== undefined)
    return { direction: requirement.atLeast === undefined ? 'lower' : 'higher', isAssumed: false };
  const node = evaluation.node(lineId, caseId);
  const direction = node === undefined ? undefined : favourableDirection(node);
  return { direction: direction ?? 'higher', isAssumed: direction === undefined };
}

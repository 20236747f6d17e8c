/**
 * Entries tried out in a node's place without being committed: what is shown while somebody types, and what a repair would give.
 * Nothing that is evaluated changes by it.
 */
import type { Finding } from '../findings';
import { checkLine } from '../formula';
import type { Line } from '../worksheet';
import { describeRemark, remarksOf } from './describe';
import { inputsOf, type Graph } from './graph';
import { restsUpon } from './neighbours';
import type { Node } from './node';
import type { Reading } from './reading';
import { settled, type Figuring } from './recompute';
import { scopeOf } from './scope';
import { readingOf } from './state';

/** An entry tried out in a line's place without being committed. */
export interface Preview {
  readonly reading: Reading;
  readonly findings: readonly Finding[];
}

/** An entry in a node's place in a case, with its findings. */
export function previewAt(graph: Graph, figuring: Figuring, node: Node, caseId: string, entry: string): Preview {
  const tried = tryEntry(graph, figuring, node, caseId, entry);
  const tryOut = (other: string, unit?: string): Reading =>
    tryEntry(graph, figuring, node, caseId, other, unit).reading;
  return {
    reading: tried.reading,
    findings: remarksOf(tried.node, figuring, tried.value).map((remark) =>
      describeRemark(remark, tried.node, figuring, tryOut, scopeOf(graph, node.caseId), tried.value),
    ),
  };
}

/** Evaluates another entry (or unit) in a node's place. It cannot see itself, so a loop of one is found here too. */
export function tryEntry(
  graph: Graph,
  figuring: Figuring,
  node: Node,
  caseId: string,
  entry: string,
  unit?: string,
): { reading: Reading; node: Node; value: number } {
  const line: Line = {
    ...node.line,
    ...(node.caseId === null ? { entry } : {}),
    ...(unit === undefined ? {} : { unit }),
  };
  const trial = node.trial(line, entry, caseId);
  trial.inputs = inputsOf(graph, trial);
  const usesItself = trial.inputs.includes(node) || trial.inputs.some((input) => restsUpon(input, node));
  trial.barred = usesItself ? { code: 'loop' } : node.barred?.code === 'loop' ? undefined : node.barred;
  trial.result = checkLine(trial.spec(), scopeOf(graph, caseId), trial.read);
  const value =
    trial.barred === undefined ? settled(trial.compile(figuring)(), trial.result.unit?.form === 'decibel') : NaN;
  return { reading: readingOf(trial, line, figuring, value), node: trial, value };
}

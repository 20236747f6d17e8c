/**
 * The working of a line: its arithmetic explained, in symbols, with values and in linear terms, with what it rests on.
 * Holds: every figure shown is one the engine computed; nothing is computed here but the linear side of decibel figures.
 */
import type { Evaluation, Node } from '../engine';
import { findFunction, walkTree, type Checked } from '../formula';

import { chainWorking } from './chain-working';
import type { Working } from './working-types';
import { WorkingWriter } from './working-writer';

/** The working of a line in a case; undefined when there is no such line. */
export function workingOf(evaluation: Evaluation, lineId: string, caseId: string): Working | undefined {
  const line = evaluation.line(lineId);
  const node = evaluation.node(lineId, caseId);
  if (line === undefined || node === undefined) return undefined;
  const reading = evaluation.reading(lineId, caseId);
  const writer = new WorkingWriter(evaluation, caseId);
  const head = { lineId, caseId, symbol: line.symbol, label: line.label, reading };
  if (node.isDerived) {
    const { steps, terms, shares } = chainWorking(evaluation, node, caseId);
    return { ...head, steps: [...steps, ...writer.steps(node, undefined, reading)], terms, shares, remarks: [] };
  }
  const checked = evaluation.inspect(lineId, caseId);
  const contributions = writer.contributions(node, checked);
  return {
    ...head,
    steps: writer.steps(node, checked, reading),
    terms: contributions ?? writer.uses(node),
    shares: contributions !== undefined,
    remarks: remarks(node, checked),
  };
}

/** What a reviewer should know of the arithmetic: the formula and source of each model used, and which logarithm db took. */
function remarks({ read }: Node, checked: Checked | undefined): string[] {
  const found = new Set<string>();
  if (read.form !== 'expression') return [];
  walkTree(read.tree, (node) => {
    if (node.type !== 'call') return;
    const entry = findFunction(node.name);
    if (entry?.form === 'ordinary') found.add(`${entry.name}: ${entry.formula} (${entry.source})`);
  });
  const visit = (part: Checked): void => {
    const [operand] = part.parts;
    if (
      part.tree.type === 'call' &&
      part.tree.name === 'db' &&
      operand?.type.form === 'linear' &&
      part.type.form === 'decibel'
    ) {
      const isRoot = part.plan.op === 'sum';
      if (isRoot) found.add('db of a voltage, current or field, or of a ratio of two: 20 log₁₀');
    }
    part.parts.forEach(visit);
  };
  if (checked !== undefined) visit(checked);
  return [...found];
}

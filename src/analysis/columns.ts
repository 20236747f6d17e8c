/**
 * The column compiler: the lines between what is varied and what is asked for, as steps over blocks of trials, inputs first.
 * Holds: for every trial a target's figure is what the engine would give for those inputs (NaN: withheld; −∞ in decibels: no
 * power), within the rounding of reordered sums. Every step does a whole block before the next begins, and a block is small
 * enough for its columns to stay in the processor's cache.
 */
import { present } from '../base';
import type { Evaluation, Node } from '../engine';
import { ColumnCompiler, type ColumnOperand } from './column-plan';
import { settle, type Column } from './kernels';

/** A line whose figure comes in a column. */
export interface Varied {
  readonly lineId: string;
  /** True: the column is added to what the line's entry gives; else it stands in its place. */
  readonly isAdded?: boolean;
}

/** Fills the column of a varied line, by its place in the list, with the figures of trials `start` and following; all are finite. */
export type Fill = (index: number, column: Column, start: number, count: number) => void;

/** The steps, ready to run. One program runs one thing at a time: its columns are its own. */
export interface Program {
  readonly blockSize: number;
  /** For each target, whether anything varied reaches it. */
  readonly reached: readonly boolean[];
  /**
   * Runs trials `from` to `to` (left out). `results` has a column a target, in which trial `from` comes first. `onBlock` hears how
   * many are done; when it returns true the run stops there.
   */
  run(
    from: number,
    to: number,
    fill: Fill,
    results: readonly Column[],
    onBlock?: (done: number) => boolean | undefined,
  ): void;
}

/** Trials in a block, at most. */
export const BLOCK_LIMIT = 2048;
const USUAL_BLOCK = 1024;

/** Compiles the lines with these ids for a case. Lines that are not there have no figure. */
export function compileColumns(
  evaluation: Evaluation,
  targets: readonly string[],
  caseId: string,
  varied: readonly Varied[],
  blockSize = USUAL_BLOCK,
): Program {
  const { figures } = evaluation;
  const size = Math.max(1, Math.min(BLOCK_LIMIT, Math.floor(blockSize)));
  const nodeOf = (lineId: string): Node | undefined => evaluation.node(lineId, caseId);
  const indexOf = new Map<Node, number>();
  varied.forEach(({ lineId }, index) => {
    const node = nodeOf(lineId);
    if (node !== undefined) indexOf.set(node, index);
  });
  const targetNodes = targets.map(nodeOf);
  const inputsOf = (node: Node): readonly Node[] => {
    const index = indexOf.get(node);
    const isReplaced = index !== undefined && varied[index]?.isAdded !== true;
    return isReplaced || node.barred !== undefined ? [] : node.inputs;
  };
  const moving = movingNodes(targetNodes, inputsOf, indexOf);

  const operands = new Map<number, ColumnOperand>();
  const fills: { current: Fill } = { current: () => undefined };
  const compiler = new ColumnCompiler(size, figures, (slot) => operands.get(slot));
  const readers = countReaders(moving, inputsOf, targetNodes);
  for (const node of moving) {
    const index = indexOf.get(node);
    operands.set(
      node.slot,
      index === undefined ? ofPlan(node, compiler) : ofVaried(node, index, varied, compiler, fills),
    );
    for (const input of new Set(inputsOf(node))) {
      const left = (readers.get(input) ?? 0) - 1;
      readers.set(input, left);
      const operand = operands.get(input.slot);
      if (left === 0 && operand !== undefined) compiler.release(operand.column);
    }
  }

  const { steps } = compiler;
  const columns = targetNodes.map((node) => (node === undefined ? undefined : operands.get(node.slot)?.column));
  const constants = targetNodes.map((node) => (node === undefined ? NaN : (figures.values[node.slot] as number)));
  return {
    blockSize: size,
    reached: columns.map((column) => column !== undefined),
    run: (from, to, fill, results, onBlock) => {
      fills.current = fill;
      results.forEach((result, at) => {
        if (columns[at] === undefined) result.fill(constants[at] as number, 0, to - from);
      });
      for (let start = from; start < to; start += size) {
        const count = Math.min(size, to - start);
        for (let at = 0; at < steps.length; at++) present(steps[at], 'a step')(count, start);
        for (let at = 0; at < columns.length; at++) {
          const column = columns[at];
          if (column !== undefined) results[at]?.set(count === size ? column : column.subarray(0, count), start - from);
        }
        if (onBlock?.(start + count - from) === true) return;
      }
    },
  };
}

/** What lies between the varied lines and the targets, both included, inputs before users. */
function movingNodes(
  targets: readonly (Node | undefined)[],
  inputsOf: (node: Node) => readonly Node[],
  varied: ReadonlyMap<Node, number>,
): Node[] {
  const above = new Set<Node>();
  const open = targets.filter((node) => node !== undefined);
  for (let node = open.pop(); node !== undefined; node = open.pop()) {
    if (above.has(node)) continue;
    above.add(node);
    open.push(...inputsOf(node));
  }
  const moving = new Set<Node>();
  for (const node of [...above].sort((a, b) => a.rank - b.rank))
    if (varied.has(node) || inputsOf(node).some((input) => moving.has(input))) moving.add(node);
  return [...moving];
}

/** How many steps read each node's column; a target's is read once more, at the end, and never given back. */
function countReaders(
  moving: readonly Node[],
  inputsOf: (node: Node) => readonly Node[],
  targets: readonly (Node | undefined)[],
): Map<Node, number> {
  const readers = new Map<Node, number>();
  const add = (node: Node): void => {
    readers.set(node, (readers.get(node) ?? 0) + 1);
  };
  for (const node of moving) for (const input of new Set(inputsOf(node))) add(input);
  for (const node of targets) if (node !== undefined) add(node);
  return readers;
}

const allowsNoPower = (node: Node): boolean => node.result.unit?.form === 'decibel';

function ofPlan(node: Node, compiler: ColumnCompiler): ColumnOperand {
  const operand = compiler.compile(node.result.plan);
  return owned(operand, node, compiler);
}

/** A node's column is its own, and what is not finite is withheld as in the engine. */
function owned(operand: ReturnType<ColumnCompiler['compile']>, node: Node, compiler: ColumnCompiler): ColumnOperand {
  if (typeof operand === 'number') {
    const column = compiler.take();
    compiler.steps.push((count) => column.fill(operand, 0, count));
    return { column, isTame: Number.isFinite(operand), isTemporary: false };
  }
  let { column } = operand;
  if (!operand.isTemporary) {
    // The figure of another line as it stands: copied, since that line's column is given back in its own time.
    const source = column;
    column = compiler.take();
    const copy = column;
    compiler.steps.push((count) => copy.set(count === source.length ? source : source.subarray(0, count)));
  }
  if (!operand.isTame) {
    const mayBeWithoutPower = allowsNoPower(node);
    const settled = column;
    compiler.steps.push((count) => settle(settled, mayBeWithoutPower, count));
  }
  return { column, isTame: operand.isTame, isTemporary: false };
}

function ofVaried(
  node: Node,
  index: number,
  varied: readonly Varied[],
  compiler: ColumnCompiler,
  fills: { readonly current: Fill },
): ColumnOperand {
  const column = compiler.take();
  compiler.steps.push((count, start) => fills.current(index, column, start, count));
  const own = { column, isTame: true, isTemporary: false };
  if (varied[index]?.isAdded !== true || node.barred !== undefined) return own;
  const base = ofPlan(node, compiler);
  compiler.steps.push((count) => {
    for (let i = 0; i < count; i++) column[i] = (column[i] as number) + (base.column[i] as number);
  });
  compiler.release(base.column);
  return { ...own, isTame: base.isTame };
}

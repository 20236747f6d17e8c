/**
 * Plans compiled to steps over columns. A step does one operation for a whole block of trials; what rests on nothing varied is a
 * constant, computed once. Columns are taken and given back in the order of the steps, so that few of them are in use at a time.
 */
import { evaluatePlan, slotsOf, type Figures, type Plan } from '../formula';
import * as kernels from './kernels';
import type { Argument, Column, Combination } from './kernels';

/** Does one operation for the first `count` trials of the block that begins with trial `start`. */
export type Step = (count: number, start: number) => void;

/** What a plan comes to: a constant, or a column that its step has filled. */
export interface ColumnOperand {
  readonly column: Column;
  /** True: nothing in it is infinite or so large that a sum of such could become so. */
  readonly isTame: boolean;
  /** True: made for one reader, and free after that. */
  readonly isTemporary: boolean;
}

export type Operand = number | ColumnOperand;

const columnOf = (operand: Operand): Argument => (typeof operand === 'number' ? operand : operand.column);
const isTame = (operand: Operand): boolean =>
  typeof operand === 'number' ? Number.isFinite(operand) && Math.abs(operand) < 1e100 : operand.isTame;

export class ColumnCompiler {
  readonly steps: Step[] = [];
  private readonly free: Column[] = [];

  constructor(
    readonly blockSize: number,
    private readonly figures: Figures,
    /** The operand of a slot that varies; undefined for those that do not. */
    private readonly operandOf: (slot: number) => ColumnOperand | undefined,
  ) {}

  /** A column that nothing uses. */
  take(): Column {
    return this.free.pop() ?? new Float64Array(this.blockSize);
  }

  /** Gives a column back: steps made from now on may write to it. */
  release(column: Column): void {
    this.free.push(column);
  }

  /** Makes the steps of a plan. */
  compile(plan: Plan): Operand {
    if (!this.varies(plan)) return evaluatePlan(plan, this.figures);
    switch (plan.op) {
      case 'constant':
        return plan.value;
      case 'slot':
        return this.operandOf(plan.slot) ?? (this.figures.values[plan.slot] as number);
      case 'sum':
        return this.sum(plan);
      case 'product':
        return this.product(this.compile(plan.left), this.compile(plan.right));
      case 'quotient':
        return this.two(plan.left, plan.right, kernels.divide, kernels.divideConstant, kernels.divideBy);
      case 'power':
        return this.two(plan.left, plan.right, kernels.raise, kernels.raiseConstant, kernels.raiseTo);
      case 'decibels': {
        const of = this.compile(plan.of);
        const atZero = plan.zeroIsNoPower ? -Infinity : NaN;
        return this.one(of, (out, a, count) => kernels.decibels(out, a, atZero, count), !plan.zeroIsNoPower);
      }
      case 'linear':
        return this.one(this.compile(plan.of), kernels.linear, false);
      case 'compare':
        return this.apply(comparing(plan.comparison), [plan.left, plan.right], true);
      case 'choose': {
        const condition = this.compile(plan.condition);
        if (typeof condition === 'number')
          return Number.isNaN(condition) ? NaN : this.compile(condition !== 0 ? plan.then : plan.otherwise);
        const then = this.compile(plan.then);
        const otherwise = this.compile(plan.otherwise);
        return this.emit([condition, then, otherwise], isTame(then) && isTame(otherwise), (out) => {
          const [met, yes, no] = [condition.column, columnOf(then), columnOf(otherwise)];
          return (count) => kernels.choose(out, met, yes, no, count);
        });
      }
      case 'apply': {
        const combination = combinationOf(plan);
        return combination === undefined
          ? this.apply(plan.compute, plan.parameters, false)
          : this.combine(plan, combination);
      }
    }
  }

  private varies(plan: Plan): boolean {
    let varies = false;
    slotsOf(plan, (slot) => {
      varies ||= this.operandOf(slot) !== undefined;
    });
    return varies;
  }

  /** Adds the step that fills a new column, and gives back the operands' temporary columns. */
  private emit(operands: readonly Operand[], isResultTame: boolean, step: (out: Column) => Step): Operand {
    if (operands.every((operand) => typeof operand === 'number')) {
      // Choices on constants have left nothing that varies.
      const single = new Float64Array(1);
      step(single)(1, 0);
      return single[0] as number;
    }
    const out = this.take();
    this.steps.push(step(out));
    for (const operand of operands)
      if (typeof operand !== 'number' && operand.isTemporary) this.release(operand.column);
    return { column: out, isTame: isResultTame, isTemporary: true };
  }

  private one(of: Operand, loop: (out: Column, a: Column, count: number) => void, isResultTame: boolean): Operand {
    const column = typeof of === 'number' ? Float64Array.of(of) : of.column;
    return this.emit([of], isResultTame, (out) => (count) => loop(out, column, count));
  }

  private two(
    leftPlan: Plan,
    rightPlan: Plan,
    both: (out: Column, a: Column, b: Column, count: number) => void,
    constantFirst: (out: Column, a: number, b: Column, count: number) => void,
    constantLast: (out: Column, a: Column, b: number, count: number) => void,
  ): Operand {
    const left = this.compile(leftPlan);
    const right = this.compile(rightPlan);
    return this.emit([left, right], false, (out) => {
      const [a, b] = [columnOf(left), columnOf(right)];
      if (typeof a === 'number') {
        const column = typeof b === 'number' ? Float64Array.of(b) : b;
        return (count) => constantFirst(out, a, column, count);
      }
      return typeof b === 'number' ? (count) => constantLast(out, a, b, count) : (count) => both(out, a, b, count);
    });
  }

  private product(left: Operand, right: Operand): Operand {
    return this.emit([left, right], false, (out) => {
      const [a, b] = [columnOf(left), columnOf(right)];
      if (typeof a !== 'number' && typeof b !== 'number') return (count) => kernels.multiply(out, a, b, count);
      const [factor, other] = typeof a === 'number' ? [a, b] : [b as number, a];
      const column = typeof other === 'number' ? Float64Array.of(other) : other;
      return (count) => kernels.weighedSum(out, [column], [factor], 0, count);
    });
  }

  /** Sums within sums are taken apart, so that one loop does them all. */
  private sum(plan: Plan & { readonly op: 'sum' }): Operand {
    const operands: ColumnOperand[] = [];
    const weights: number[] = [];
    let constant = 0;
    const add = (part: Plan, by: number): void => {
      if (part.op === 'sum') {
        for (const term of part.terms) add(term.plan, by * term.coefficient);
        constant += by * part.constant;
        return;
      }
      const operand = this.compile(part);
      if (typeof operand === 'number') constant += by * operand;
      else {
        operands.push(operand);
        weights.push(by);
      }
    };
    add(plan, 1);
    if (operands.length === 0) return constant;
    return this.emit(operands, operands.every(isTame) && Number.isFinite(constant), (out) => {
      const columns = operands.map(({ column }) => column);
      return (count) => kernels.weighedSum(out, columns, weights, constant, count);
    });
  }

  private combine(plan: Apply, combination: Combination): Operand {
    const operands = plan.parameters.map((parameter) => this.compile(parameter));
    const columns = operands.flatMap((operand) => (typeof operand === 'number' ? [] : [operand.column]));
    const constants = operands.filter((operand) => typeof operand === 'number');
    const tame = operands.every(isTame);
    return this.emit(operands, tame, (out) => {
      const loop = this.combining(out, columns, constants, plan, combination);
      const values = operands.map(columnOf);
      return tame && columns.length + constants.length <= 3 && constants.length <= 1
        ? loop
        : (count, start) => {
            loop(count, start);
            kernels.mend(out, plan.compute, values, count);
          };
    });
  }

  private combining(
    out: Column,
    columns: readonly Column[],
    constants: readonly number[],
    plan: Apply,
    combination: Combination,
  ): Step {
    const [a, b, c] = columns;
    if (a !== undefined && columns.length + constants.length === 2) {
      const other = b ?? (constants[0] as number);
      return (count) => kernels.combine2(out, a, other, combination, count);
    }
    if (a !== undefined && b !== undefined && c !== undefined && columns.length === 3 && constants.length === 0)
      return (count) => kernels.combine3(out, a, b, c, combination, count);
    const nominal = evaluatePlan(plan, this.figures) - combination.offset;
    const reference = Number.isFinite(nominal) ? nominal : 0;
    const constant = constants.reduce((sum, x) => sum + 10 ** ((combination.scale * (x - reference)) / 10), 0);
    return (count) => kernels.combineMany(out, columns, constant, reference, combination, count);
  }

  private apply(compute: (...values: number[]) => number, parameters: readonly Plan[], isResultTame: boolean): Operand {
    const operands = parameters.map((parameter) => this.compile(parameter));
    return this.emit(operands, isResultTame, (out) => {
      const values = operands.map(columnOf);
      const filled = values.map((value) => (typeof value === 'number' ? value : NaN));
      return (count) => kernels.applyEach(out, compute, values, filled, count);
    });
  }
}

type Apply = Plan & { readonly op: 'apply' };

/** How a function of the catalogue combines powers; undefined for all others. */
export function combinationOf({ name, compute, parameters, fault }: Apply): Combination | undefined {
  // A curve may have any name.
  if (fault !== undefined) return undefined;
  switch (name) {
    case 'powersum':
      return { scale: 1, offset: 0 };
    case 'fieldsum':
      return { scale: 0.5, offset: 0 };
    case 'meanpower':
      return { scale: 1, offset: -10 * Math.log10(parameters.length) };
    case 'ratiosum':
      // Impairment ratios add as they are, signal ratios by their reciprocals: the figures of two equal ones tell which.
      return { scale: compute(0, 0) < 0 ? -1 : 1, offset: 0 };
    default:
      return undefined;
  }
}

function comparing(comparison: (Plan & { readonly op: 'compare' })['comparison']): (a: number, b: number) => number {
  const test = COMPARISONS[comparison];
  return (a, b) => (Number.isNaN(a) || Number.isNaN(b) ? NaN : test(a, b) ? 1 : 0);
}

const COMPARISONS: Readonly<Record<string, (a: number, b: number) => boolean>> & {
  readonly [Sign in (Plan & { readonly op: 'compare' })['comparison']]: (a: number, b: number) => boolean;
} = {
  '=': (a, b) => a === b,
  '<>': (a, b) => a !== b,
  '<': (a, b) => a < b,
  '>': (a, b) => a > b,
  '<=': (a, b) => a <= b,
  '>=': (a, b) => a >= b,
};

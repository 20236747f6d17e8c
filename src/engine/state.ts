/** What state a node's figure is in, and why: withheld for its own fault, waiting for others, or a value. */
import { CATALOGUE, type FindingCode } from '../findings';
import { evaluatePlan, readPlainQuantity, type Figures, type Plan } from '../formula';
import { linearValue, type Unit } from '../quantity';
import type { Line } from '../worksheet';
import type { Node } from './node';
import type { Figure, Reading, RequirementReading } from './reading';

/** The figure of a node; `value` is given for entries that are tried out. */
export function figureOfNode(node: Node, figures: Figures, value: number = figures.values[node.slot] ?? NaN): Figure {
  const { result, barred } = node;
  if (barred !== undefined) return { state: 'withheld', code: barred.code };
  const own = ownError(node);
  if (own !== undefined) return { state: 'withheld', code: own };
  if (result.isEmpty) return { state: 'empty' };
  if (!Number.isNaN(value) && result.unit !== undefined)
    return {
      state: 'value',
      value,
      unit: result.unit,
      isFitted: result.isFitted,
      ...(result.typedDigits === undefined ? {} : { digits: result.typedDigits }),
    };
  if (isMissing(node, figures)) return { state: 'empty' };
  const roots = rootsOf(node, figures);
  return roots.length > 0
    ? { state: 'waiting', roots }
    : { state: 'withheld', code: diagnose(result.plan, figures).code };
}

/** The first error that the checker found in the line itself. */
function ownError({ result }: Node): FindingCode | undefined {
  return result.remarks.find(({ code, applies }) => applies === undefined && CATALOGUE[code].severity === 'error')
    ?.code;
}

/** The symbols (or labels) of the lines at fault for a node that waits; empty when its inputs all have figures. */
export function rootsOf(node: Node, figures: Figures): readonly string[] {
  const roots = new Set<string>();
  const seen = new Set<Node>([node]);
  const open = withheldInputs(node, figures);
  for (let next = open.shift(); next !== undefined; next = open.shift()) {
    if (seen.has(next)) continue;
    seen.add(next);
    const further =
      next.barred === undefined && ownError(next) === undefined && !next.result.isEmpty
        ? withheldInputs(next, figures)
        : [];
    if (further.length === 0) roots.add(next.line.symbol || next.line.label);
    else open.push(...further);
  }
  return [...roots];
}

/** True for a derived figure that is not there because nobody has given what it needs, through no fault of any entry. */
function isMissing(node: Node, figures: Figures): boolean {
  if (!node.isDerived) return false;
  const seen = new Set<Node>();
  const open = [node];
  for (let next = open.pop(); next !== undefined; next = open.pop()) {
    if (seen.has(next)) continue;
    seen.add(next);
    if (next.isDerived) open.push(...withheldInputs(next, figures));
    else if (!next.result.isEmpty || next.barred !== undefined || ownError(next) !== undefined) return false;
  }
  return true;
}

const withheldInputs = (node: Node, figures: Figures): Node[] =>
  // A curve has no figure of its own; one that can be called is no reason to wait.
  node.inputs.filter(({ slot, result }) => result.curve === undefined && Number.isNaN(figures.values[slot]));

/** Why a plan whose inputs have figures has none itself. */
export function diagnose(plan: Plan, figures: Figures): { readonly code: FindingCode; readonly why: string } {
  const value = evaluatePlan(plan, figures);
  for (const part of partsOf(plan))
    if (!Number.isFinite(evaluatePlan(part, figures)) && part.op !== 'slot') return diagnose(part, figures);
  if (plan.op === 'apply' && plan.fault !== undefined)
    return { code: plan.fault, why: `${plan.name} has no value there` };
  if (plan.op === 'decibels') return { code: 'no-power', why: 'the decibel of zero or less than zero is asked for' };
  if (plan.op === 'apply' && plan.name === 'powerdiff')
    return { code: 'no-power', why: 'the power taken off is larger than the one it is taken from' };
  if (plan.op === 'apply' && (plan.name === 'log10' || plan.name === 'ln'))
    return { code: 'no-power', why: `${plan.name} of zero or less is asked for` };
  if (plan.op === 'quotient') return { code: 'not-finite', why: 'a division by zero' };
  if (plan.op === 'apply') return { code: 'not-finite', why: `${plan.name} has no value for these arguments` };
  return { code: 'not-finite', why: value === Infinity ? 'it is larger than any number' : 'it is not a number' };
}

function partsOf(plan: Plan): readonly Plan[] {
  switch (plan.op) {
    case 'constant':
    case 'slot':
      return [];
    case 'sum':
      return plan.terms.map((term) => term.plan);
    case 'decibels':
    case 'linear':
      return [plan.of];
    case 'choose':
      return [plan.condition, plan.then, plan.otherwise];
    case 'apply':
      return plan.parameters;
    default:
      return [plan.left, plan.right];
  }
}

/** All that is told of a node. */
export function readingOf(node: Node, line: Line, figures: Figures, value?: number): Reading {
  const figure = figureOfNode(node, figures, value);
  const { kind, side } = node.result;
  const requirement = figure.state === 'value' ? requirementOf(line, figure.value, figure.unit) : undefined;
  return {
    figure,
    ...(kind === undefined ? {} : { kind }),
    ...(side === undefined ? {} : { side }),
    ...(requirement === undefined ? {} : { requirement }),
  };
}

function requirementOf(line: Line, value: number, unit: Unit): RequirementReading | undefined {
  if (line.requirement === undefined) return undefined;
  const isFloor = line.requirement.atLeast !== undefined;
  const limit = readBound(line.requirement.atLeast ?? line.requirement.atMost, unit);
  if (limit === undefined) return undefined;
  const margin = isFloor ? value - limit : limit - value;
  return {
    bound: isFloor ? 'at least' : 'at most',
    limit,
    met: margin >= 0,
    margin,
    unit: unit.form === 'decibel' ? 'dB' : unit.word,
  };
}

/** A bound in the line's unit; a bare number has that unit. Undefined when it cannot be read or has another dimension. */
export function readBound(text: string, unit: Unit): number | undefined {
  const bound = readPlainQuantity(text);
  if (bound === undefined) return undefined;
  if (bound.unit === null || bound.unit.word === unit.word) return bound.figure;
  return convertFigure(bound.figure, bound.unit, unit);
}

/** A figure in another unit of the same dimension, across forms; undefined when the dimensions differ. */
export function convertFigure(figure: number, from: Unit, to: Unit): number | undefined {
  const same = (a: readonly number[], b: readonly number[], factor = 1): boolean =>
    a.every((n, index) => Math.abs(n * factor - (b[index] ?? 0)) < 1e-9);
  if (from.form === 'rate' || to.form === 'rate')
    return from.form === 'rate' && to.form === 'rate' ? (figure * to.lengthM) / from.lengthM : undefined;
  if (from.form === 'decibel' && to.form === 'decibel')
    return same(from.dimension, to.dimension) ? figure + from.offsetDb - to.offsetDb : undefined;
  if (from.form === 'linear' && to.form === 'linear')
    return same(from.dimension, to.dimension) ? (figure * from.factor + from.shift - to.shift) / to.factor : undefined;
  if (from.form === 'decibel' && to.form === 'linear') {
    const linear = linearValue(figure, from);
    const root = same(to.dimension, from.dimension, 2);
    return linear !== undefined && (root || same(from.dimension, to.dimension))
      ? (linear.value - to.shift) / to.factor
      : undefined;
  }
  if (from.form === 'linear' && to.form === 'decibel') {
    const value = figure * from.factor + from.shift;
    const isRoot = same(from.dimension, to.dimension, 2) && !same(from.dimension, to.dimension);
    if (!(value > 0) || (!isRoot && !same(from.dimension, to.dimension))) return undefined;
    return (isRoot ? 20 : 10) * Math.log10(value) - to.offsetDb;
  }
  return undefined;
}

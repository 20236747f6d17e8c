/** Calls of curves: the argument is brought into the unit of the curve's first column, the result has that of its second. */
import { isDimensionless, meaningOf, sameDimension, writeQuantity, type Curve, type Unit } from '../quantity';
import { typeOfUnit } from './atoms';
import type { Check } from './check';
import { broken, type Context } from './context';
import { describeType } from './forms';
import { consume } from './judge';
import { shiftPlan, type Plan } from './plan';
import type { CallTree } from './tree';
import type { Checked } from './types';

/** The call of a curve; undefined when the name is not that of a curve. */
export function checkCurveCall(tree: CallTree, context: Context, check: Check): Checked | undefined {
  const info = context.scope.find(tree.name);
  if (info === undefined || (info !== 'withheld' && info.curve === undefined)) return undefined;
  const operands = tree.parameters.map((parameter) => consume(check(parameter, context), context));
  if (info === 'withheld') {
    context.waitsFor.push(tree.name);
    return { ...broken(tree), parts: operands };
  }
  const curve = info.curve as Curve;
  const [operand] = operands;
  if (operand === undefined || operands.length > 1)
    return context.stop('wrong-arguments', tree, {
      facts: {
        what: `${tree.name} is a curve and takes one argument, ${axisName(curve)}`,
        signature: `${tree.name}(x)`,
      },
      repairs: [],
    });
  if (operand.type.form === 'broken') return { ...broken(tree), parts: operands };
  const plan = inUnit(operand, curve.xUnit);
  if (plan === undefined) return wrongArgument(tree, operand, curve, context);
  sayOutside(tree, plan, curve, context);
  const type = typeOfUnit(curve.yUnit, meaningOf(info.kind ?? 'plain', undefined, curve.quantity !== undefined));
  return {
    tree,
    type,
    plan: toInner(
      { op: 'apply', name: tree.name, compute: curve.at, parameters: [plan], fault: 'outside-curve' },
      curve.yUnit,
    ),
    kind: info.kind,
    isDeclared: curve.quantity !== undefined,
    parts: operands,
  };
}

const axisName = ({ xLabel, xUnit }: Curve): string => (xUnit.word === '1' ? xLabel : `${xLabel} in ${xUnit.word}`);

/** Figures of linear units stand in SI in plans; decibels as they are. */
function toInner(plan: Plan, unit: Unit): Plan {
  if (unit.form !== 'linear' || (unit.factor === 1 && unit.shift === 0)) return plan;
  return { op: 'sum', terms: [{ coefficient: unit.factor, plan }], constant: unit.shift };
}

/** The argument as a figure in the unit; undefined when it is no such quantity. */
function inUnit({ type, plan, tree }: Checked, unit: Unit): Plan | undefined {
  if (unit.form === 'rate' || (type.form !== 'linear' && type.form !== 'decibel')) return undefined;
  if (!sameDimension(type.dimension, unit.dimension)) return undefined;
  // A bare number is no angle in degrees, nor a per cent.
  const isBare = tree.type === 'literal' && tree.unit === null;
  if (isBare && unit.word !== '1') return undefined;
  if (unit.form === 'decibel') {
    if (type.form === 'decibel') return shiftPlan(plan, type.offsetDb - unit.offsetDb);
    return shiftPlan({ op: 'decibels', of: plan, zeroIsNoPower: false }, -unit.offsetDb);
  }
  if (type.form === 'decibel' && isDimensionless(type.dimension)) return undefined;
  const si: Plan = type.form === 'linear' ? plan : { op: 'linear', of: shiftPlan(plan, type.offsetDb) };
  if (unit.factor === 1 && unit.shift === 0) return si;
  // Divided, not multiplied by the reciprocal: 12 deg comes back as 12.
  const shifted = shiftPlan(si, -unit.shift);
  return unit.factor === 1 ? shifted : { op: 'quotient', left: shifted, right: { op: 'constant', value: unit.factor } };
}

function wrongArgument(tree: CallTree, operand: Checked, curve: Curve, context: Context): Checked {
  const text = context.textOf(operand.tree);
  const isBare = operand.tree.type === 'literal' && operand.tree.unit === null;
  return context.stop('wrong-arguments', operand.tree, {
    facts: {
      what: `${tree.name} takes ${axisName(curve)}; ${text} is ${describeType(operand.type)}`,
      signature: `${tree.name}(x)`,
    },
    repairs: isBare ? [context.rewrite(operand.tree, `${text} ${curve.xUnit.word}`)] : [],
  });
}

const isNaN = (value: number): boolean => Number.isNaN(value);

function sayOutside(tree: CallTree, plan: Plan, curve: Curve, context: Context): void {
  context.say('outside-curve', tree, {
    facts: {
      curve: tree.name,
      from: writeQuantity(curve.from, curve.xUnit),
      to: writeQuantity(curve.to, curve.xUnit),
    },
    lateFacts: (evaluate) => ({ value: writeQuantity(evaluate(plan), curve.xUnit) }),
    repairs: [],
    // While the argument itself is withheld the line waits for it, and nothing is said of the curve.
    applies: {
      plan: { op: 'apply', name: 'outside', compute: (x) => (x === x ? curve.at(x) : 0), parameters: [plan] },
      test: isNaN,
    },
  });
}

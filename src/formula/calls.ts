/** Checking of calls: finds the function, counts arguments, converts them to what ordinary functions take. */
import { present } from '../base';
import {
  findUnit,
  FREQUENCY,
  isDimensionless,
  LENGTH,
  meaningOf,
  NO_DIMENSION,
  sameDimension,
  TEMPERATURE,
  writeQuantity,
  type Dimension,
  type Unit,
} from '../quantity';
import type { Check } from './check';
import { typeOfUnit } from './atoms';
import { broken, type Context } from './context';
import {
  fewestArguments,
  findFunction,
  FUNCTIONS,
  signatureOf,
  type FunctionEntry,
  type OrdinaryFunction,
  type Parameter,
  type ParameterKind,
} from './catalogue';
import { checkCurveCall } from './curve-calls';
import { decibelsOf, describeType } from './forms';
import { parseEntry } from './grammar';
import { consume } from './judge';
import { nearestName } from './nearest';
import { shiftPlan, type Plan } from './plan';
import { originOf } from './products';
import type { CallTree } from './tree';
import type { Checked } from './types';

/** Checks a call. */
export function checkCall(tree: CallTree, context: Context, check: Check): Checked {
  const entry = findFunction(tree.name);
  if (entry === undefined) return checkCurveCall(tree, context, check) ?? unknownFunction(tree, context);
  const given = tree.parameters.length;
  const most = entry.repeats > 0 ? Infinity : entry.parameters.length;
  if (given < fewestOf(entry) || given > most || !isWholeGroup(entry, given))
    return context.stop('wrong-arguments', tree, {
      facts: {
        what: `${entry.name} takes ${argumentCount(entry)}; ${given === 0 ? 'none is' : `${String(given)} ${given === 1 ? 'is' : 'are'}`} given`,
        signature: signatureOf(entry),
      },
      repairs: [],
    });
  const operands = tree.parameters.map((parameter) => {
    const operand = check(parameter, context);
    return entry.form === 'structural' && entry.judgesItself === true ? operand : consume(operand, context);
  });
  if (operands.some(({ type }) => type.form === 'broken')) return { ...broken(tree), parts: operands };
  return entry.form === 'structural'
    ? entry.check(tree, operands, context)
    : callOrdinary(tree, entry, operands, context, check);
}

function fewestOf(entry: FunctionEntry): number {
  return entry.form === 'ordinary' && entry.mayEndEarly === true ? fewestArguments(entry) - 1 : fewestArguments(entry);
}

function isWholeGroup(entry: FunctionEntry, given: number): boolean {
  if (entry.repeats < 2 || (entry.form === 'ordinary' && entry.mayEndEarly === true)) return true;
  return (given - entry.parameters.length) % entry.repeats === 0;
}

function argumentCount(entry: FunctionEntry): string {
  const fewest = fewestOf(entry);
  const count = (n: number): string => `${String(n)} argument${n === 1 ? '' : 's'}`;
  if (entry.repeats > 0) return `at least ${count(fewest)}`;
  return fewest === entry.parameters.length ? count(fewest) : `${String(fewest)} to ${count(entry.parameters.length)}`;
}

function unknownFunction(tree: CallTree, context: Context): Checked {
  const nearest = nearestName(
    tree.name,
    FUNCTIONS.map(({ name }) => name),
  );
  return context.stop('unknown-symbol', tree, {
    facts: { what: 'The function', name: tree.name, ...(nearest === undefined ? {} : { nearest }) },
    repairs:
      nearest === undefined
        ? []
        : [
            {
              kind: 'entry',
              title: nearest,
              entry: context.entry.slice(0, tree.namePlace.start) + nearest + context.entry.slice(tree.namePlace.end),
            },
          ],
  });
}

/** The parameter that argument number `index` fills, counting through repeated groups. */
export function parameterAt(entry: FunctionEntry, index: number): Parameter | undefined {
  const { parameters, repeats } = entry;
  if (index < parameters.length) return parameters[index];
  if (repeats === 0) return undefined;
  return parameters[parameters.length - repeats + ((index - parameters.length) % repeats)];
}

function callOrdinary(
  tree: CallTree,
  entry: OrdinaryFunction,
  operands: readonly Checked[],
  context: Context,
  check: Check,
): Checked {
  const complete = [...operands];
  for (const parameter of entry.parameters.slice(operands.length)) {
    if (parameter.default === undefined) continue;
    const standard = parseEntry(parameter.default);
    if (standard.ok) complete.push(check(standard.value, context));
  }
  const plans: Plan[] = [];
  for (const [index, operand] of complete.entries()) {
    const parameter = present(parameterAt(entry, index), 'parameter');
    const plan = convert(operand, parameter, context);
    if (plan === undefined) return wrongArgument(tree, entry, operands, index, parameter, context);
    plans.push(plan);
  }
  const unit = present(findUnit(entry.resultUnit), entry.resultUnit);
  const meaning = meaningOf(entry.resultKind, entry.resultSide, true);
  const at = (name: string | undefined): number => entry.parameters.findIndex((parameter) => parameter.name === name);
  const origin = (name: string | undefined): ReturnType<typeof originOf> | undefined => {
    const operand = complete[at(name)];
    const plan = plans[at(name)];
    return operand === undefined || plan === undefined
      ? undefined
      : {
          ...originOf({ tree: operand.tree, plan }, context),
          text:
            operands[at(name)] === undefined
              ? (entry.parameters[at(name)]?.default ?? '')
              : context.textOf(operand.tree),
        };
  };
  const type = typeOfUnit(unit, meaning);
  sayValidity(tree, entry, plans, context);
  return {
    tree,
    type:
      type.form === 'rate'
        ? type
        : { ...type, bandwidth: origin(entry.bandwidthFrom), noiseTemperature: origin(entry.temperatureFrom) },
    plan: { op: 'apply', name: entry.name, compute: entry.compute, parameters: plans },
    kind: entry.resultKind,
    side: entry.resultSide,
    isDeclared: true,
    parts: operands,
  };
}

const isZero = (value: number): boolean => value === 0;

function sayValidity(tree: CallTree, entry: OrdinaryFunction, plans: readonly Plan[], context: Context): void {
  const { validity } = entry;
  if (validity === undefined) return;
  const index = entry.parameters.findIndex(({ name }) => name === validity.parameter);
  const parameter = entry.parameters[index];
  const plan = plans[index];
  if (parameter === undefined || plan === undefined) return;
  const { holds } = validity;
  context.say('outside-validity', tree, {
    facts: { function: entry.name, range: validity.range, name: parameter.name },
    lateFacts: (evaluate) => ({ value: inUnit(evaluate(plan), parameter.unit) }),
    repairs: [],
    applies: {
      plan: { op: 'apply', name: 'validity', compute: (...values) => (holds(...values) ? 1 : 0), parameters: plans },
      test: isZero,
    },
  });
}

function inUnit(value: number, word: string): string {
  const unit: Unit = present(findUnit(word), word);
  return writeQuantity(unit.form === 'linear' ? (value - unit.shift) / unit.factor : value, unit);
}

const LINEAR: Partial<Record<ParameterKind, Dimension>> = {
  temperature: TEMPERATURE,
  bandwidth: FREQUENCY,
  frequency: FREQUENCY,
  length: LENGTH,
  number: NO_DIMENSION,
};

/** An argument as the function takes it; undefined when it is no such thing. */
function convert(operand: Checked, parameter: Parameter, context: Context): Plan | undefined {
  const { type } = operand;
  const dimension = LINEAR[parameter.takes];
  if (dimension !== undefined) {
    if ((type.form !== 'linear' && type.form !== 'decibel') || !sameDimension(type.dimension, dimension))
      return undefined;
    if (type.form === 'linear') return operand.plan;
    return isDimensionless(dimension) ? undefined : { op: 'linear', of: shiftPlan(operand.plan, type.offsetDb) };
  }
  if (type.form !== 'linear' && type.form !== 'decibel') return undefined;
  if (!isDimensionless(type.dimension)) return undefined;
  if (type.form === 'decibel') {
    sayGainGivenLoss(operand, parameter, context);
    return shiftPlan(operand.plan, type.offsetDb);
  }
  if (type.sort === 'ratio') return decibelsOf({ type, plan: operand.plan }, false).plan;
  const text = context.textOf(operand.tree);
  context.say('number-as-decibels', operand.tree, {
    facts: { number: text },
    lateFacts: (evaluate) => ({ decibels: inUnit(evaluate(operand.plan), 'dB') }),
    repairs: [context.rewrite(operand.tree, operand.tree.type === 'literal' ? `${text} dB` : `(${text}) * 1 dB`)],
  });
  return operand.plan;
}

/** A loss given where a gain is asked for has the wrong sign. */
function sayGainGivenLoss(operand: Checked, parameter: Parameter, context: Context): void {
  if (parameter.takes !== 'gain' || operand.kind !== 'loss') return;
  const text = context.textOf(operand.tree);
  context.say('kind-mismatch', operand.tree, {
    facts: { asked: `${parameter.name} is to be a gain`, what: text, found: 'a loss' },
    repairs: [context.rewrite(operand.tree, `-${text}`)],
  });
}

function wrongArgument(
  tree: CallTree,
  entry: OrdinaryFunction,
  operands: readonly Checked[],
  index: number,
  parameter: Parameter,
  context: Context,
): Checked {
  const operand = operands[index] ?? present(operands[0], 'argument');
  const text = context.textOf(operand.tree);
  const isBareNumber =
    operand.type.form === 'linear' && isDimensionless(operand.type.dimension) && operand.tree.type === 'literal';
  const isSwapped = operands.length === 2 && entry.repeats === 0;
  const [first, second] = operands.map((part) => context.textOf(part.tree));
  const repairs = isBareNumber
    ? [context.rewrite(operand.tree, `${text} ${parameter.unit}`)]
    : isSwapped
      ? [context.rewrite(tree, `${entry.name}(${second ?? ''}, ${first ?? ''})`)]
      : [];
  return context.stop('wrong-arguments', operand.tree, {
    facts: {
      what: `${entry.name} takes ${parameter.name}, ${article(parameter.text)} in ${parameter.unit}; ${text} is ${describeType(operand.type)}`,
      signature: signatureOf(entry),
    },
    repairs,
  });
}

const article = (noun: string): string =>
  /^(its|the) /.test(noun) ? noun : `${/^[aeiou]/.test(noun) ? 'an' : 'a'} ${noun}`;

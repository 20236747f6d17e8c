/** Checking of what an expression is made of: literals, constants and symbols. */
import {
  ENTROPY,
  NEUTRAL,
  NO_DIMENSION,
  TEMPERATURE,
  UNSAID,
  combineDimensions,
  LENGTH,
  TIME,
  isRootPower,
  meaningOf,
  combineMeanings,
  findUnit,
  type Meaning,
  type Unit,
} from '../quantity';
import { broken, type Context } from './context';
import { lookAround } from './chain-names';
import { constantPlan } from './plan';
import type { LiteralTree, SymbolTree } from './tree';
import type { Checked, DecibelType, LinearType, RateType, SymbolInfo } from './types';

/** A constant that entries may use. */
export interface Constant {
  readonly name: string;
  readonly text: string;
  readonly value: number;
  readonly unit: string;
  readonly source: string;
}

/** The named constants. A line may not take these symbols. */
export const CONSTANTS: readonly Constant[] = [
  { name: 'pi', text: 'ratio of circumference to diameter', value: Math.PI, unit: '1', source: 'ISO 80000-2' },
  {
    name: 'c_0',
    text: 'speed of light in vacuum',
    value: 299792458,
    unit: 'm/s',
    source: 'SI Brochure, 9th edition 2019, exact',
  },
  {
    name: 'k_B',
    text: 'Boltzmann constant',
    value: 1.380649e-23,
    unit: 'J/K',
    source: 'SI Brochure, 9th edition 2019, exact',
  },
  {
    name: 'T_0',
    text: 'reference noise temperature',
    value: 290,
    unit: 'K',
    source: 'ITU-R V.573-5, reference temperature',
  },
];

/** Half the exponents for voltages and fields, whose square is the power. */
function linearMeaning(unit: Unit, meaning: Meaning): Meaning {
  return unit.form === 'linear' && isRootPower(unit.dimension) ? combineMeanings(NEUTRAL, meaning, 0.5) : meaning;
}

/** The meaning of a figure in a unit when nothing else is said. */
export function meaningOfUnit(unit: Unit): Meaning {
  if (unit.form === 'rate') return NEUTRAL;
  if (unit.defaultKind === undefined) return unit.word === 'dB' ? UNSAID : NEUTRAL;
  return linearMeaning(unit, meaningOf(unit.defaultKind, undefined, true));
}

/** The type of a figure in a unit, with a meaning (given for the power-like quantity). */
export function typeOfUnit(unit: Unit, meaning: Meaning, isBareNumber = false): LinearType | DecibelType | RateType {
  switch (unit.form) {
    case 'decibel':
      return { form: 'decibel', dimension: unit.dimension, offsetDb: unit.offsetDb, scale: 1, meaning, unitHint: unit };
    case 'rate':
      return { form: 'rate', lengthM: unit.lengthM, unitHint: unit };
    case 'linear':
      return {
        form: 'linear',
        dimension: unit.dimension,
        degree: 0,
        sort: isBareNumber ? 'pure' : 'ratio',
        meaning: linearMeaning(unit, meaning),
        unitHint: unit,
      };
  }
}

/** Checks a literal: a figure with or without a unit. */
export function checkLiteral(tree: LiteralTree): Checked {
  const { figure, unit } = tree;
  if (unit === null) {
    const type: LinearType = { form: 'linear', dimension: NO_DIMENSION, degree: 0, sort: 'pure', meaning: NEUTRAL };
    return { tree, type, plan: constantPlan(figure), constant: figure, parts: [] };
  }
  const value = unit.form === 'linear' ? figure * unit.factor + unit.shift : figure;
  const type = typeOfUnit(
    unit,
    unit.defaultKind === undefined ? meaningOfUnit(unit) : meaningOf(unit.defaultKind, undefined, true),
  );
  return { tree, type, plan: constantPlan(value), kind: unit.defaultKind, parts: [] };
}

function constantNamed(name: string): Checked['type'] & LinearType {
  const dimension =
    name === 'c_0'
      ? combineDimensions(LENGTH, TIME, -1)
      : name === 'k_B'
        ? ENTROPY
        : name === 'T_0'
          ? TEMPERATURE
          : NO_DIMENSION;
  const meaning = name === 'T_0' ? meaningOf('temperature', undefined, true) : NEUTRAL;
  return {
    form: 'linear',
    dimension,
    degree: 0,
    sort: name === 'pi' ? 'pure' : 'ratio',
    meaning,
    unitHint: findUnit(name === 'k_B' ? 'J/K' : name === 'T_0' ? 'K' : '1'),
  };
}

/** Checks a symbol: a constant, or a line as others meet it. */
export function checkSymbol(tree: SymbolTree, context: Context): Checked {
  const constant = CONSTANTS.find(({ name }) => name === tree.name);
  if (constant !== undefined) {
    const isBare = constant.name === 'pi';
    return {
      tree,
      type: constantNamed(constant.name),
      plan: constantPlan(constant.value),
      ...(isBare ? { constant: constant.value } : {}),
      parts: [],
    };
  }
  const info = context.scope.find(tree.name);
  if (info === undefined) {
    const around = lookAround(tree.name, [...context.allNames(), ...CONSTANTS.map(({ name }) => name)]);
    return context.stop('unknown-symbol', tree, {
      facts: { what: 'The symbol', name: tree.name, ...around },
      repairs: around.nearest === undefined ? [] : [context.rewrite(tree, around.nearest)],
    });
  }
  if (info === 'withheld') {
    context.waitsFor.push(tree.name);
    return broken(tree);
  }
  if (info.curve !== undefined)
    return context.stop('wrong-arguments', tree, {
      facts: {
        what: `${tree.name} is a curve and has no figure by itself: say where it is to be read`,
        signature: `${tree.name}(x)`,
      },
      repairs: [],
    });
  return {
    tree,
    type: info.type,
    plan: planOfSymbol(info),
    constant: info.constant,
    kind: info.kind,
    side: info.side,
    isDeclared: info.isDeclared,
    parts: [],
  };
}

/** A line's figure as a plan: decibel figures as they stand, linear ones in SI. */
function planOfSymbol({ slot, unit }: SymbolInfo): Checked['plan'] {
  const plan = { op: 'slot', slot } as const;
  if (unit.form !== 'linear' || (unit.factor === 1 && unit.shift === 0)) return plan;
  return { op: 'sum', terms: [{ coefficient: unit.factor, plan }], constant: unit.shift };
}

/** Mathematics: with the meanings of OASIS OpenFormula 1.3 where it has the function; angles are quantities. */
import { numberParameter, type FunctionEntry } from './entry';
import { average, choice, extreme, interpolation, logical, total } from './choices';
import type { Compute } from './mathematics-shared';
import { keepsType, ofNumber, quadrant, root, roundTo } from './numbers';

const one =
  (compute: (x: number) => number): Compute =>
  (x = NaN) =>
    compute(x);

export const MATHEMATICS: readonly FunctionEntry[] = [
  keepsType('abs', 'Size without the sign.', '|x|', one(Math.abs), 'abs(-3)'),
  extreme('min', 'The least of its arguments.', Math.min, 'min(3 dBm, 1 dBm)'),
  extreme('max', 'The greatest of its arguments.', Math.max, 'max(3 dBm, 1 dBm)'),
  root,
  ofNumber({ name: 'exp', text: 'Exponential function.', formula: 'eˣ', compute: one(Math.exp), example: 'exp(1)' }),
  ofNumber({
    name: 'ln',
    text: 'Natural logarithm of a plain number.',
    formula: 'ln x',
    compute: one((x) => (x > 0 ? Math.log(x) : NaN)),
    sort: 'figure',
    example: 'ln(10)',
  }),
  ofNumber({
    name: 'log10',
    text: 'Common logarithm of a plain number; 10*log10(x) and 20*log10(x) are understood as decibels of x and of x².',
    formula: 'log₁₀ x',
    compute: one((x) => (x > 0 ? Math.log10(x) : NaN)),
    sort: 'figure',
    example: 'log10(1000)',
  }),
  keepsType(
    'round',
    'Rounded to so many decimals, halves away from zero.',
    'round(x, digits)',
    roundTo,
    'round(2.345, 2)',
    [{ ...numberParameter('digits', 'decimals'), default: '0' }],
  ),
  keepsType('floor', 'Rounded down to a whole number.', '⌊x⌋', one(Math.floor), 'floor(2.7)'),
  keepsType('ceil', 'Rounded up to a whole number.', '⌈x⌉', one(Math.ceil), 'ceil(2.1)'),
  ofNumber({
    name: 'sin',
    text: 'Sine of an angle; a bare number is radians.',
    formula: 'sin x',
    compute: one(Math.sin),
    example: 'sin(30 deg)',
    parameter: 'angle',
  }),
  ofNumber({
    name: 'cos',
    text: 'Cosine of an angle; a bare number is radians.',
    formula: 'cos x',
    compute: one(Math.cos),
    example: 'cos(60 deg)',
    parameter: 'angle',
  }),
  ofNumber({
    name: 'tan',
    text: 'Tangent of an angle; a bare number is radians.',
    formula: 'tan x',
    compute: one(Math.tan),
    example: 'tan(45 deg)',
    parameter: 'angle',
  }),
  ofNumber({
    name: 'asin',
    text: 'Angle whose sine is x.',
    formula: 'arcsin x',
    compute: one(Math.asin),
    unit: 'rad',
    example: 'asin(0.5)',
  }),
  ofNumber({
    name: 'acos',
    text: 'Angle whose cosine is x.',
    formula: 'arccos x',
    compute: one(Math.acos),
    unit: 'rad',
    example: 'acos(0.5)',
  }),
  ofNumber({
    name: 'atan',
    text: 'Angle whose tangent is x.',
    formula: 'arctan x',
    compute: one(Math.atan),
    unit: 'rad',
    example: 'atan(1)',
  }),
  quadrant,
  choice,
  logical(
    'and',
    'Yes when all conditions hold.',
    (...values) => (values.every((value) => value !== 0) ? 1 : 0),
    1,
    'if(and(1 < 2, 2 < 3), 1, 0)',
  ),
  logical(
    'or',
    'Yes when any condition holds.',
    (...values) => (values.some((value) => value !== 0) ? 1 : 0),
    1,
    'if(or(1 > 2, 2 < 3), 1, 0)',
  ),
  logical('not', 'Yes when the condition does not hold.', (value) => (value === 0 ? 1 : 0), 0, 'if(not(1 > 2), 1, 0)'),
  total,
  average,
  interpolation,
];

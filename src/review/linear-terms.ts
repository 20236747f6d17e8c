/**
 * The step in linear terms: a sum of decibels as a product of linear values, a sum of powers as a sum of them.
 * Holds: worked out, the step gives the result's linear value; where that cannot be, there is no step. With a result that is
 * a voltage or a field, the factors are ratios of such, 10^(x/20); otherwise a voltage or field enters with its square.
 */
import {
  evaluatePlan,
  fittingDecibelUnit,
  fittingLinearUnit,
  type Checked,
  type Figures,
  type SumTerm,
} from '../formula';
import {
  combineDimensions,
  describeDimension,
  isDimensionless,
  isRootPower,
  linearFigure,
  NO_DIMENSION,
  raiseDimension,
  sameDimension,
  writeFigure,
  writeSignificant,
  type Dimension,
  type Unit,
} from '../quantity';

import { isBareDecibels, powerSumOf, type PowerPart, type PowerSum } from './power-sums';
import type { Piece } from './working-types';

/** What the step is written from. */
export interface LinearScope {
  readonly figures: Figures;
  readonly lineIdOf: (symbol: string) => string | undefined;
}

/** Pieces with how closely they hold together: brackets go around products and sums in a closer place. */
interface Written {
  readonly pieces: readonly Piece[];
  readonly binds: 'figure' | 'product' | 'sum';
}

/** Deepest nesting of combining functions that is written out; below it stand their results. */
const DEPTH_LIMIT = 3;

const text = (words: string): Piece => ({ type: 'text', text: words });

/** The step of an expression whose result is `value` in `unit`; undefined when it would say no more than the result. */
export function linearPieces(
  checked: Checked,
  result: { readonly value: number; readonly unit: Unit },
  scope: LinearScope,
): readonly Piece[] | undefined {
  const resultDb = powerDbOf(result.value, result.unit);
  if (checked.type.form !== 'decibel' || resultDb === undefined) return undefined;
  const terms =
    checked.terms === undefined || checked.terms.length === 0
      ? undefined
      : termsThatGive(checked.terms, resultDb, powerDimension(result.unit), scope.figures);
  const isRoot = isRootDimension(powerDimension(result.unit));
  const written =
    terms === undefined ? writeExpression(checked, 1, scope) : writeProduct(checked, terms, isRoot, scope);
  return written === undefined || written.binds === 'figure' ? undefined : written.pieces;
}

/** 10·log10 of the power-like quantity in SI. */
function powerDbOf(value: number, unit: Unit): number | undefined {
  if (unit.form === 'rate') return undefined;
  if (unit.form === 'decibel') return value + unit.offsetDb;
  return (isRootPower(unit.dimension) ? 20 : 10) * Math.log10(value * unit.factor + unit.shift);
}

const isRootDimension = (power: Dimension): boolean =>
  !isDimensionless(power) && isRootPower(raiseDimension(power, 0.5));

/** The dimension of the power-like quantity that a unit's decibels are of. */
function powerDimension(unit: Unit): Dimension {
  if (unit.form === 'rate') return NO_DIMENSION;
  return unit.form === 'linear' && isRootPower(unit.dimension) ? raiseDimension(unit.dimension, 2) : unit.dimension;
}

/** The terms, logarithms over a written reference read as levels where the line's unit has made them so. */
function termsThatGive(
  terms: readonly SumTerm[],
  resultDb: number,
  dimension: Dimension,
  figures: Figures,
): readonly SumTerm[] | undefined {
  const over = terms.filter(({ overReference }) => overReference !== undefined);
  const readings = [[], over, ...over.map((term) => [term])].map((levels) =>
    terms.map((term) =>
      term.overReference !== undefined && levels.includes(term) ? { ...term, type: term.overReference } : term,
    ),
  );
  return readings.find((reading) => {
    const total = reading.reduce((sum, term) => sum + term.coefficient * termDb(term, figures), 0);
    const isSame = total === resultDb || Math.abs(total - resultDb) < 1e-6;
    return isSame && sameDimension(totalDimension(reading), dimension);
  });
}

const totalDimension = (terms: readonly SumTerm[]): Dimension =>
  terms.reduce((sum, { type, coefficient }) => combineDimensions(sum, type.dimension, coefficient), NO_DIMENSION);

const termDb = ({ plan, type }: SumTerm, figures: Figures): number => evaluatePlan(plan, figures) + type.offsetDb;

function writeProduct(
  checked: Checked,
  terms: readonly SumTerm[],
  isRoot: boolean,
  scope: LinearScope,
): Written | undefined {
  const pieces: Piece[] = [];
  const ordered = [...terms].sort((a, b) => Number(b.coefficient > 0) - Number(a.coefficient > 0));
  for (const [index, term] of ordered.entries()) {
    const isAbove = term.coefficient > 0;
    const factor = writeTerm(checked, term, isRoot, scope);
    if (factor === undefined) return undefined;
    if (index > 0) pieces.push(text(isAbove ? ' × ' : ' ÷ '));
    else if (!isAbove) pieces.push(text('1 ÷ '));
    pieces.push(...(index === 0 && isAbove ? factor.pieces : asFactor(factor)));
  }
  const [only] = terms;
  return { pieces, binds: terms.length === 1 && only?.coefficient === 1 ? 'figure' : 'product' };
}

function writeTerm(checked: Checked, term: SumTerm, isRoot: boolean, scope: LinearScope): Written | undefined {
  const { dimension, unitHint } = term.type;
  const size = Math.abs(term.coefficient);
  const operand = partAt(checked, term.tree)?.parts[0];
  const exponent = operand === undefined ? undefined : exponentIn(dimension, operand);
  if (operand !== undefined && exponent !== undefined) {
    const written = writeLinear(operand, scope);
    return written === undefined ? undefined : raised(written, size * exponent * (isRoot ? 0.5 : 1));
  }
  const lineId = term.symbol === undefined ? undefined : scope.lineIdOf(term.symbol);
  return writeFactor({ figureDb: termDb(term, scope.figures), dimension, hint: unitHint, lineId }, size, isRoot);
}

/** The checked expression of a tree within another. */
function partAt(checked: Checked, tree: Checked['tree']): Checked | undefined {
  if (checked.tree === tree) return checked;
  for (const part of checked.parts) {
    const found = partAt(part, tree);
    if (found !== undefined) return found;
  }
  return undefined;
}

/** 1 or 2 when a logarithm of this dimension is that of the operand or its square; undefined when it is no such thing. */
function exponentIn(dimension: Dimension, { type }: Checked): 1 | 2 | undefined {
  if (type.form !== 'linear' || isDimensionless(type.dimension)) return undefined;
  if (sameDimension(dimension, type.dimension)) return 1;
  return sameDimension(dimension, raiseDimension(type.dimension, 2)) ? 2 : undefined;
}

interface Factor {
  readonly figureDb: number;
  readonly dimension: Dimension;
  readonly hint: Unit | undefined;
  readonly lineId: string | undefined;
}

/** The linear value of a decibel figure raised to a power; undefined when it is beyond the range of numbers. */
function writeFactor(
  { figureDb, dimension, hint, lineId }: Factor,
  exponent: number,
  isRoot: boolean,
): Written | undefined {
  const link = lineId === undefined ? {} : { lineId };
  const half = raiseDimension(dimension, 0.5);
  if (isRoot && !isRootDimension(dimension) && half.every(Number.isInteger)) {
    const unit = isDimensionless(half) ? '' : describeDimension(half);
    const root: Piece = { type: 'figure', text: writeSignificant(10 ** (figureDb / 20)), unit, ...link };
    return raised({ pieces: [root], binds: 'figure' }, exponent);
  }
  const unit = fittingDecibelUnit(dimension, 0, [hint]);
  const linear = unit.form === 'decibel' ? linearFigure(figureDb - unit.offsetDb, unit) : undefined;
  if (linear === undefined) return undefined;
  const word = linear.unit === '×' ? '' : linear.unit;
  const figure: Piece = { type: 'figure', text: linear.text, unit: word, ...link };
  const squares = (isRootDimension(dimension) ? 2 : 1) * (isRoot ? 0.5 : 1);
  return raised({ pieces: [figure], binds: 'figure' }, exponent * squares);
}

function raised(base: Written, exponent: number): Written {
  if (exponent === 1) return base;
  const [figure] = base.pieces;
  const isBare =
    base.binds === 'figure' && figure?.type === 'figure' && figure.unit === '' && !figure.text.includes('×');
  const power = text(`^${writeSignificant(exponent)}`);
  return { pieces: [...(isBare ? base.pieces : bracketed(base)), power], binds: 'figure' };
}

const bracketed = ({ pieces }: Written): Piece[] => [text('('), ...pieces, text(')')];

/** Behind × or ÷. A unit that is a quotient is kept with its figure. */
function asFactor(written: Written): readonly Piece[] {
  const [figure] = written.pieces;
  const isPlain =
    written.binds === 'figure' &&
    (written.pieces.length > 1 || figure?.type !== 'figure' || !figure.unit.includes('/'));
  return isPlain ? written.pieces : bracketed(written);
}

/** A sum of powers written out, a decibel sum as a product, anything else as its value. */
function writeExpression(checked: Checked, depth: number, scope: LinearScope): Written | undefined {
  const { type } = checked;
  if (type.form === 'linear') return writeLinear(checked, scope);
  if (type.form !== 'decibel') return undefined;
  const isRoot = isRootDimension(type.dimension);
  if (checked.terms !== undefined && checked.terms.length > 0)
    return writeProduct(checked, checked.terms, isRoot, scope);
  const sum = depth > DEPTH_LIMIT ? undefined : powerSumOf(checked, scope.figures);
  if (sum !== undefined) return writePowerSum(sum, isRoot, depth, scope);
  const figureDb = evaluatePlan(checked.plan, scope.figures) + type.offsetDb;
  return writeFactor(
    { figureDb, dimension: type.dimension, hint: type.unitHint, lineId: lineIdOf(checked, scope) },
    1,
    isRoot,
  );
}

const lineIdOf = ({ tree }: Checked, scope: LinearScope): string | undefined =>
  tree.type === 'symbol' ? scope.lineIdOf(tree.name) : undefined;

function writeLinear(part: Checked, scope: LinearScope): Written | undefined {
  const { type, plan } = part;
  if (type.form !== 'linear') return undefined;
  const lineId = lineIdOf(part, scope);
  const value = evaluatePlan(plan, scope.figures);
  if (isBareDecibels(part))
    return writeFactor({ figureDb: value, dimension: NO_DIMENSION, hint: undefined, lineId }, 1, false);
  // Of 15 °C nothing can be multiplied: a scale with another zero is left for kelvin.
  const hint = type.unitHint?.form === 'linear' && type.unitHint.shift === 0 ? type.unitHint : undefined;
  const unit = fittingLinearUnit(type.dimension, [hint]);
  if (unit.form !== 'linear') return undefined;
  const figure = writeFigure(value / unit.factor, unit, { isFitted: hint === undefined });
  const piece: Piece = { type: 'figure', ...figure, ...(lineId === undefined ? {} : { lineId }) };
  // A ratio of two voltages or fields: its square is the ratio of the powers.
  const isFieldRatio = isDimensionless(type.dimension) && type.degree === 1;
  return raised({ pieces: [piece], binds: 'figure' }, isFieldRatio ? 2 : 1);
}

function writePowerSum(sum: PowerSum, isRoot: boolean, depth: number, scope: LinearScope): Written | undefined {
  const { parts, isReciprocal, isMean } = sum;
  const pieces: Piece[] = [];
  for (const [index, part] of parts.entries()) {
    const written = writePart(part, isRoot, depth, scope);
    if (written === undefined) return undefined;
    if (index > 0) pieces.push(text(part.sign < 0 ? ' − ' : ' + '));
    if (isReciprocal) pieces.push(text('1 ÷ '));
    const isCloser = isReciprocal || part.sign < 0;
    pieces.push(...(isCloser && written.binds !== 'figure' ? bracketed(written) : written.pieces));
  }
  const whole: Written = { pieces, binds: parts.length > 1 ? 'sum' : 'product' };
  const divided: Written = isMean
    ? { pieces: [...bracketed(whole), text(` ÷ ${String(parts.length)}`)], binds: 'product' }
    : whole;
  if (isRoot) return { pieces: [text('√'), ...bracketed(divided)], binds: 'product' };
  return isReciprocal ? { pieces: [text('1 ÷ '), ...bracketed(divided)], binds: 'product' } : divided;
}

function writePart({ checked }: PowerPart, isRoot: boolean, depth: number, scope: LinearScope): Written | undefined {
  const written = writeExpression(checked, depth + 1, scope);
  return written === undefined || !isRoot ? written : raised(written, 2);
}

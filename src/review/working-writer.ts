/** Writing a working: steps and terms, from checked expressions and the engine's figures. */
import type { Evaluation, Node, Reading } from '../engine';
import {
  CONSTANTS,
  evaluatePlan,
  fittingDecibelUnit,
  fittingLinearUnit,
  scanEntry,
  type Checked,
  type Token,
} from '../formula';
import { linearFigure, writeFigure, writeSignificant, type Unit, type WrittenFigure } from '../quantity';
import { isCurveSection } from '../worksheet';

import { linearPieces } from './linear-terms';
import { powerSumOf, sharesOf } from './power-sums';
import type { Piece, WorkingStep, WorkingTerm } from './working-types';

const text = (words: string): Piece => ({ type: 'text', text: words });

const OPERATOR_TEXT: Readonly<Record<string, string>> = {
  '+': ' + ',
  '-': ' − ',
  '*': ' × ',
  '/': ' / ',
  '^': '^',
  ',': ', ',
  ';': ', ',
  '(': '(',
  ')': ')',
  '=': ' = ',
  '<': ' < ',
  '>': ' > ',
  '<=': ' ≤ ',
  '>=': ' ≥ ',
  '<>': ' ≠ ',
};

/** What stands in the place of a figure that is not there. */
const STATE_WORDS = { withheld: 'withheld', waiting: 'waits', empty: 'no entry' } as const;

/** True for a token behind which a minus sign is a sign, not an operator. */
const isPrefixPlace = (before: Token | undefined): boolean =>
  before === undefined || before.type === 'function' || (before.type === 'sign' && before.sign !== ')');

const isOperator = (before: Token | undefined): boolean => before?.type === 'sign' && /^[-+*/^]$/.test(before.sign);

/** A symbol, or its figure with brackets around it where its sign or unit would be read as part of the expression. */
function inPlace(piece: Piece, before: Token | undefined, after: Token | undefined): readonly Piece[] {
  if (piece.type !== 'figure') return [piece];
  const isRaised = after?.type === 'sign' && after.sign === '^';
  const isBelow = before?.type === 'sign' && before.sign === '/';
  const needsBrackets =
    (piece.text.startsWith('−') && (isOperator(before) || isRaised)) ||
    (isRaised && (piece.unit !== '' || piece.text.includes('×'))) ||
    (isBelow && piece.unit.includes('/'));
  return needsBrackets ? [text('('), piece, text(')')] : [piece];
}

/** Writes the parts of a working from what the engine has computed. */
export class WorkingWriter {
  constructor(
    private readonly evaluation: Evaluation,
    private readonly caseId: string,
  ) {}

  steps(node: Node, checked: Checked | undefined, reading: Reading): WorkingStep[] {
    const steps: WorkingStep[] = [];
    const isExpression = node.read.form === 'expression';
    if (isExpression) steps.push({ title: 'in symbols', pieces: this.entryPieces(node, false) });
    else if (node.read.form !== 'empty')
      steps.push({ title: 'as entered', pieces: [text(node.entry.trim().replace(/^[-–]/, '−'))] });
    if (isExpression && node.symbols.length > 0)
      steps.push({ title: 'with values', pieces: this.entryPieces(node, true) });
    const { figure } = reading;
    if (figure.state !== 'value') return steps;
    if (isExpression && checked !== undefined) {
      const linear = linearPieces(checked, figure, {
        figures: this.evaluation.figures,
        lineIdOf: (symbol) => this.evaluation.lineOf(symbol)?.id,
      });
      if (linear !== undefined) steps.push({ title: 'in linear terms', pieces: linear });
    }
    steps.push({
      title: 'result',
      pieces: resultPieces(figure.value, figure.unit, figure.isFitted, figure.digits, node.line.digits),
    });
    return steps;
  }

  /** The entry, with symbols or with their figures. */
  private entryPieces(node: Node, withValues: boolean): Piece[] {
    const scan = scanEntry(node.entry, Infinity);
    if (!scan.ok) return [text(node.entry)];
    const { tokens } = scan.value;
    return tokens.flatMap((token, index): readonly Piece[] => {
      const before = tokens[index - 1];
      switch (token.type) {
        case 'symbol':
          return [withValues ? this.valueOf(token.name) : this.symbolOf(token.name)].flatMap((piece) =>
            inPlace(piece, before, tokens[index + 1]),
          );
        case 'function':
          return [text(`${token.name}(`)];
        case 'sign':
          return [text(token.sign === '-' && isPrefixPlace(before) ? '−' : (OPERATOR_TEXT[token.sign] ?? token.sign))];
        case 'literal': {
          const typed = node.entry.slice(token.start, token.end).replace(/^[-−–]\s*/, '−');
          return [text(typed.startsWith('−') && isOperator(before) ? `(${typed})` : typed)];
        }
        case 'text':
          return [text(node.entry.slice(token.start, token.end))];
      }
    });
  }

  private symbolOf(symbol: string): Piece {
    const line = this.evaluation.lineOf(symbol);
    return { type: 'symbol', symbol, ...(line === undefined ? {} : { lineId: line.id }) };
  }

  private valueOf(symbol: string): Piece {
    const line = this.evaluation.lineOf(symbol);
    if (line === undefined) {
      const constant = CONSTANTS.find(({ name }) => name === symbol);
      return constant === undefined
        ? { type: 'symbol', symbol }
        : {
            type: 'figure',
            text: writeSignificant(constant.value, 7),
            unit: constant.unit === '1' ? '' : constant.unit,
          };
    }
    const { figure } = this.evaluation.reading(line.id, this.caseId);
    if (figure.state !== 'value') return { type: 'symbol', symbol, lineId: line.id };
    const written = writeFigure(figure.value, figure.unit, {
      isFitted: figure.isFitted,
      ...(line.digits === undefined ? {} : { digits: line.digits }),
      ...(figure.digits === undefined ? {} : { typedDigits: figure.digits }),
    });
    return { type: 'figure', ...written, lineId: line.id };
  }

  /** The contributions to a sum of powers with their shares; undefined when the line is none, or there is no power. */
  contributions(node: Node, checked: Checked | undefined): WorkingTerm[] | undefined {
    const sum = checked === undefined ? undefined : powerSumOf(checked, this.evaluation.figures);
    const shares = sum === undefined ? undefined : sharesOf(sum);
    if (sum === undefined || shares === undefined) return undefined;
    return sum.parts.map(({ checked: part }, index) => {
      const { tree } = part;
      const symbol = tree.type === 'symbol' ? tree.name : node.entry.slice(tree.place.start, tree.place.end);
      return { ...this.termOf(symbol, part), share: shares[index] ?? 0 };
    });
  }

  /** The lines that an entry uses, with their figures. */
  uses(node: Node): WorkingTerm[] {
    return node.symbols.map((symbol) => this.termOf(symbol, undefined));
  }

  private termOf(symbol: string, part: Checked | undefined): WorkingTerm {
    const line = this.evaluation.lineOf(symbol);
    if (line === undefined) {
      const constant = this.valueOf(symbol);
      if (constant.type === 'figure')
        return {
          symbol,
          label: CONSTANTS.find(({ name }) => name === symbol)?.text ?? '',
          text: constant.text,
          unit: constant.unit,
        };
      return { symbol, label: '', ...(part === undefined ? { text: '', unit: '' } : this.figureOf(part)) };
    }
    const value = this.valueOf(symbol);
    const { state } = this.evaluation.figure(line.id, this.caseId);
    return {
      lineId: line.id,
      symbol,
      label: line.label,
      ...(value.type === 'figure'
        ? { text: value.text, unit: value.unit }
        : { text: state === 'value' ? '' : this.isCurve(line.id) ? 'a curve' : STATE_WORDS[state], unit: '' }),
    };
  }

  /** True for a curve, which is called and has no figure by itself. */
  private isCurve(lineId: string): boolean {
    return this.evaluation.worksheet.sections.some((section) => section.id === lineId && isCurveSection(section));
  }

  /** The figure of an expression that is no line by itself. */
  private figureOf({ type, plan }: Checked): WrittenFigure {
    const value = evaluatePlan(plan, this.evaluation.figures);
    if (type.form === 'decibel') {
      const unit = fittingDecibelUnit(type.dimension, type.offsetDb, [type.unitHint]);
      return writeFigure(value + (unit.form === 'decibel' ? type.offsetDb - unit.offsetDb : 0), unit);
    }
    if (type.form !== 'linear') return { text: '', unit: '' };
    const unit = fittingLinearUnit(type.dimension, [type.unitHint]);
    const isFitted = type.unitHint?.form !== 'linear';
    return unit.form === 'linear'
      ? writeFigure((value - unit.shift) / unit.factor, unit, { isFitted })
      : { text: '', unit: '' };
  }
}

function resultPieces(
  value: number,
  unit: Unit,
  isFitted: boolean,
  typedDigits: number | undefined,
  digits: number | undefined,
): Piece[] {
  const options = {
    isFitted,
    ...(digits === undefined ? {} : { digits }),
    ...(typedDigits === undefined ? {} : { typedDigits }),
  };
  const pieces: Piece[] = [{ type: 'figure', ...writeFigure(value, unit, options) }];
  const linear = linearFigure(value, unit);
  if (linear !== undefined)
    pieces.push(text(' = '), {
      type: 'figure',
      text: linear.unit === '×' ? `× ${linear.text}` : linear.text,
      unit: linear.unit === '×' ? '' : linear.unit,
    });
  return pieces;
}

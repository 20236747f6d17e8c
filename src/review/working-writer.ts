/** Writing a working: steps and terms, from checked expressions and the engine's figures. */
import type { Evaluation, Node, Reading } from '../engine';
import { CONSTANTS, evaluatePlan, fittingDecibelUnit, scanEntry, type Checked, type SumTerm } from '../formula';
import { linearFigure, linearValue, powerShares, writeFigure, writeSignificant, type Unit } from '../quantity';

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

/** Functions whose arguments add as powers: the factor by which figures enter, and whether reciprocals add. */
const POWER_SUMS: Readonly<Record<string, { readonly sign: (argument: Checked) => 1 | -1 }>> = {
  powersum: { sign: () => 1 },
  meanpower: { sign: () => 1 },
  ratiosum: {
    sign: ({ type }) =>
      (type.form === 'decibel' || type.form === 'linear') && type.meaning !== undefined && type.meaning.w < 0 ? 1 : -1,
  },
};

/** Writes the parts of a working from what the engine has computed. */
export class WorkingWriter {
  constructor(
    private readonly evaluation: Evaluation,
    private readonly caseId: string,
  ) {}

  steps(node: Node, checked: Checked | undefined, reading: Reading): WorkingStep[] {
    const steps: WorkingStep[] = [];
    const isExpression = node.read.form === 'expression';
    if (node.read.form !== 'empty') steps.push({ title: 'in symbols', pieces: this.entryPieces(node, false) });
    if (isExpression && node.symbols.length > 0)
      steps.push({ title: 'with values', pieces: this.entryPieces(node, true) });
    const { figure } = reading;
    if (figure.state !== 'value') return steps;
    if (isExpression && checked !== undefined && figure.unit.form === 'decibel') {
      const linear = this.linearPieces(checked);
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
    const scan = scanEntry(node.entry);
    if (!scan.ok) return [text(node.entry)];
    const pieces: Piece[] = [];
    let previous: string | undefined;
    for (const token of scan.value.tokens) {
      const typed = node.entry.slice(token.start, token.end);
      if (token.type === 'symbol') pieces.push(withValues ? this.valueOf(token.name) : this.symbolOf(token.name));
      else if (token.type === 'sign') {
        const isPrefix = token.sign === '-' && (previous === undefined || /[(+\-*/^,;<>=]$/.test(previous));
        pieces.push(text(isPrefix ? '−' : (OPERATOR_TEXT[token.sign] ?? typed)));
      } else pieces.push(text(token.type === 'literal' ? typed.replace(/^[-–]/, '−') : typed));
      previous = typed;
    }
    return pieces;
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

  /** A decibel expression as products, quotients and sums of linear values; undefined where it is no such thing. */
  private linearPieces(checked: Checked): Piece[] | undefined {
    if (checked.terms !== undefined && checked.terms.length > 0) return this.productPieces(checked.terms);
    return this.factorPieces(checked, 1);
  }

  private productPieces(terms: readonly SumTerm[]): Piece[] | undefined {
    const pieces: Piece[] = [];
    const ordered = [...terms].sort((a, b) => Number(b.coefficient > 0) - Number(a.coefficient > 0));
    for (const [index, term] of ordered.entries()) {
      const isAbove = term.coefficient > 0;
      if (index > 0) pieces.push(text(isAbove ? ' × ' : ' ÷ '));
      else if (!isAbove) pieces.push(text('1 ÷ '));
      const factor = this.termPieces(term);
      if (factor === undefined) return undefined;
      pieces.push(...factor);
    }
    return pieces;
  }

  private termPieces(term: SumTerm): Piece[] | undefined {
    const figure = evaluatePlan(term.plan, this.evaluation.figures);
    const unit = fittingDecibelUnit(term.type.dimension, term.type.offsetDb, [term.type.unitHint]);
    const offset = unit.form === 'decibel' ? term.type.offsetDb - unit.offsetDb : 0;
    const size = Math.abs(term.coefficient);
    const linear = linearPiece(figure + offset, unit, this.lineIdOf(term.symbol));
    if (linear === undefined) return undefined;
    return size === 1 ? [linear] : [linear, text(`^${writeSignificant(size)}`)];
  }

  private lineIdOf(symbol: string | undefined): string | undefined {
    return symbol === undefined ? undefined : this.evaluation.lineOf(symbol)?.id;
  }

  private factorPieces(checked: Checked, depth: number): Piece[] | undefined {
    const { tree } = checked;
    const sum = tree.type === 'call' ? POWER_SUMS[tree.name] : undefined;
    if (sum === undefined || depth > 3) {
      const figure = evaluatePlan(checked.plan, this.evaluation.figures);
      if (checked.type.form !== 'decibel') return undefined;
      const unit = fittingDecibelUnit(checked.type.dimension, checked.type.offsetDb, [checked.type.unitHint]);
      const offset = unit.form === 'decibel' ? checked.type.offsetDb - unit.offsetDb : 0;
      const linear = linearPiece(figure + offset, unit, tree.type === 'symbol' ? this.lineIdOf(tree.name) : undefined);
      return linear === undefined ? undefined : [linear];
    }
    const pieces: Piece[] = [];
    const isReciprocal = checked.parts.some((part) => sum.sign(part) < 0);
    for (const [index, part] of checked.parts.entries()) {
      if (index > 0) pieces.push(text(' + '));
      const inner = part.type.form === 'linear' ? [this.linearLeaf(part)] : this.linearPieces(part);
      if (inner === undefined) return undefined;
      if (isReciprocal) pieces.push(text('1 ÷ '));
      pieces.push(...inner);
    }
    if (tree.type === 'call' && tree.name === 'meanpower')
      return [text('('), ...pieces, text(`) ÷ ${String(checked.parts.length)}`)];
    return isReciprocal ? [text('1 ÷ ('), ...pieces, text(')')] : pieces;
  }

  private linearLeaf(part: Checked): Piece {
    const value = evaluatePlan(part.plan, this.evaluation.figures);
    const hint = part.type.form === 'linear' ? part.type.unitHint : undefined;
    if (hint?.form === 'linear') return { type: 'figure', ...writeFigure((value - hint.shift) / hint.factor, hint) };
    return { type: 'figure', text: writeSignificant(value), unit: '' };
  }

  /** The contributions to a power sum with their shares; undefined when the line is none. */
  contributions(node: Node, checked: Checked | undefined): WorkingTerm[] | undefined {
    const sum = checked?.tree.type === 'call' ? POWER_SUMS[checked.tree.name] : undefined;
    if (checked === undefined || sum === undefined) return undefined;
    const figures = checked.parts.map((part) => {
      const value = evaluatePlan(part.plan, this.evaluation.figures);
      if (part.type.form === 'decibel') return sum.sign(part) * (value + part.type.offsetDb);
      return value > 0 ? 10 * Math.log10(value) : -Infinity;
    });
    if (figures.some(Number.isNaN)) return undefined;
    const shares = powerShares(figures);
    return checked.parts.map((part, index) => {
      const symbol =
        part.tree.type === 'symbol' ? part.tree.name : node.entry.slice(part.tree.place.start, part.tree.place.end);
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
      const written = part?.type.form === 'decibel' ? this.decibelText(part) : { text: '', unit: '' };
      return { symbol, label: '', ...written };
    }
    const value = this.valueOf(symbol);
    return {
      lineId: line.id,
      symbol,
      label: line.label,
      ...(value.type === 'figure' ? { text: value.text, unit: value.unit } : { text: '', unit: '' }),
    };
  }

  private decibelText(part: Checked): { text: string; unit: string } {
    if (part.type.form !== 'decibel') return { text: '', unit: '' };
    const unit = fittingDecibelUnit(part.type.dimension, part.type.offsetDb, [part.type.unitHint]);
    const offset = unit.form === 'decibel' ? part.type.offsetDb - unit.offsetDb : 0;
    return writeFigure(evaluatePlan(part.plan, this.evaluation.figures) + offset, unit);
  }
}

/** A linear value as a piece; ratios without the × that stands beside figures in the account. */
function linearPiece(figure: number, unit: Unit, lineId: string | undefined): Piece | undefined {
  const linear = linearFigure(figure, unit);
  if (linear === undefined) return undefined;
  return {
    type: 'figure',
    text: linear.text,
    unit: linear.unit === '×' ? '' : linear.unit,
    ...(lineId === undefined ? {} : { lineId }),
  };
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
  if (linear !== undefined && linearValue(value, unit) !== undefined)
    pieces.push(text(' = '), {
      type: 'figure',
      text: linear.unit === '×' ? `× ${linear.text}` : linear.text,
      unit: linear.unit === '×' ? '' : linear.unit,
    });
  return pieces;
}

/** A figure taken apart for setting: what stands before and after the decimal point, its unit, its linear value. */
import type { Figure } from '../../engine';
import { linearFigure, writeFigure } from '../../quantity';

/** What stands in a value cell: a figure in its parts, or words where there is no figure. */
export type FigureParts =
  | {
      readonly kind: 'figure';
      /** Sign and digits before the point. */
      readonly whole: string;
      /** The point and what follows; '' without one. */
      readonly fraction: string;
      readonly unit: string;
      /** The linear value with its unit, for a decibel figure. */
      readonly linear?: string;
    }
  | { readonly kind: 'words'; readonly text: string; readonly tone: 'withheld' | 'waiting' | 'empty' };

const NUMBER = /^([+\-−]?[\d\u202f\u2009 ]+)(.*)$/u;

/** The parts of a figure; `digits` as the line asks for. */
export function figureParts(figure: Figure, digits?: number): FigureParts {
  switch (figure.state) {
    case 'value': {
      const options = {
        minus: '−' as const,
        isFitted: figure.isFitted,
        ...(digits === undefined ? {} : { digits }),
        ...(figure.digits === undefined ? {} : { typedDigits: figure.digits }),
      };
      const { text, unit } = writeFigure(figure.value, figure.unit, options);
      const linear = linearFigure(figure.value, figure.unit);
      const match = NUMBER.exec(text);
      return {
        kind: 'figure',
        whole: match?.[1] ?? text,
        fraction: match?.[2] ?? '',
        unit,
        ...(linear === undefined ? {} : { linear: writeLinear(linear) }),
      };
    }
    case 'withheld':
      return { kind: 'words', text: 'withheld', tone: 'withheld' };
    case 'waiting':
      return { kind: 'words', text: waitingWords(figure.roots), tone: 'waiting' };
    case 'empty':
      return { kind: 'words', text: '', tone: 'empty' };
  }
}

/** The figure in one string, for reading aloud and for copying: `14.00 dBm`, `withheld`. */
export function figureText(figure: Figure, digits?: number): string {
  const parts = figureParts(figure, digits);
  if (parts.kind === 'words') return parts.text;
  return `${parts.whole}${parts.fraction}${parts.unit === '' ? '' : ` ${parts.unit}`}`;
}

/** The linear value of a decibel figure in one string, else undefined. */
export function linearText(figure: Figure): string | undefined {
  const linear = figure.state === 'value' ? linearFigure(figure.value, figure.unit) : undefined;
  return linear === undefined ? undefined : writeLinear(linear);
}

/** A linear value in words: a ratio has its sign first. */
export function writeLinear(linear: { readonly text: string; readonly unit: string }): string {
  if (linear.unit === '×') return `× ${linear.text}`;
  return linear.unit === '' ? linear.text : `${linear.text} ${linear.unit}`;
}

function waitingWords(roots: readonly string[]): string {
  return roots.length === 0 ? 'waits' : `waits for ${roots.join(', ')}`;
}

/** Workings of worksheets written in the notation of the engine's tests. */
import { Evaluation } from '../../src/engine';
import { workingOf, type Piece, type StepTitle, type Working } from '../../src/review';
import type { Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';
import { textOf } from './step-value';

/** The working of the line with this symbol; of the first case unless another is named. */
export function workingIn(worksheet: Worksheet, symbol: string, caseId = worksheet.cases[0]?.id ?? ''): Working {
  const evaluation = new Evaluation(worksheet);
  const line = evaluation.lines().find((one) => one.symbol === symbol);
  const working = workingOf(evaluation, line?.id ?? '', caseId);
  if (working === undefined) throw new Error(`there is no line ${symbol}`);
  return working;
}

/** The working of the last line of a text. */
export function workingOfLast(text: string, caseId?: string, ...caseIds: readonly string[]): Working {
  const worksheet = sheetOf(text, ...caseIds);
  const symbol = new Evaluation(worksheet).lines().at(-1)?.symbol ?? '';
  return workingIn(worksheet, symbol, caseId);
}

export const stepOf = ({ steps }: Working, title: StepTitle): readonly Piece[] | undefined =>
  steps.find((step) => step.title === title)?.pieces;

/** A step as text; undefined when there is none. */
export function stepText(working: Working, title: StepTitle): string | undefined {
  const pieces = stepOf(working, title);
  return pieces === undefined ? undefined : textOf(pieces);
}

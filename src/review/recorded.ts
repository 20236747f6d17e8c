/**
 * Recorded values: the figures of required lines when a worksheet was last saved as a file, so that whoever opens it later
 * is told when they now differ.
 */
import type { Evaluation } from '../engine';
import { writeQuantity } from '../quantity';
import type { Worksheet } from '../worksheet';

/** The values of required lines now, as the file records them; undefined when no line is required. */
export function recordedValues(evaluation: Evaluation): Worksheet['recorded'] {
  const recorded = evaluation
    .lines()
    .filter(({ id, symbol, requirement }) => requirement !== undefined && evaluation.lineOf(symbol)?.id === id)
    .map(({ id, symbol }) => [symbol, valuesOf(evaluation, id)] as const);
  return recorded.length === 0 ? undefined : Object.fromEntries(recorded);
}

function valuesOf(evaluation: Evaluation, lineId: string): Readonly<Record<string, string>> {
  return Object.fromEntries(
    evaluation.worksheet.cases.flatMap(({ id: caseId }) => {
      const text = valueText(evaluation, lineId, caseId);
      return text === undefined ? [] : [[caseId, text] as const];
    }),
  );
}

function valueText(evaluation: Evaluation, lineId: string, caseId: string): string | undefined {
  const { figure } = evaluation.reading(lineId, caseId);
  return figure.state === 'value' ? writeQuantity(figure.value, figure.unit, { minus: '-' }) : undefined;
}

/** A required line whose value is no longer what was recorded. */
export interface MovedValue {
  readonly symbol: string;
  readonly caseId: string;
  readonly recorded: string;
  /** Undefined while the value is withheld. */
  readonly now: string | undefined;
}

/** The recorded values that differ from what the worksheet gives now. */
export function movedValues(evaluation: Evaluation): readonly MovedValue[] {
  const moved: MovedValue[] = [];
  for (const [symbol, values] of Object.entries(evaluation.worksheet.recorded ?? {})) {
    const line = evaluation.lineOf(symbol);
    if (line === undefined) continue;
    for (const { id: caseId } of evaluation.worksheet.cases) {
      const recorded = Object.hasOwn(values, caseId) ? values[caseId] : undefined;
      if (recorded === undefined) continue;
      const now = valueText(evaluation, line.id, caseId);
      if (now !== recorded) moved.push({ symbol, caseId, recorded, now });
    }
  }
  return moved;
}

/** A moved value as a sentence for the user. */
export function describeMoved({ symbol, caseId, recorded, now }: MovedValue, caseName: (id: string) => string): string {
  return `${symbol} in ${caseName(caseId)} was ${recorded} when the file was saved and ${now === undefined ? 'is withheld now' : `is ${now} now`}.`;
}

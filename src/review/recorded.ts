/**
 * Recorded values: the figures of required lines when a worksheet was last saved as a file, so that whoever opens it later
 * is told when they now differ.
 */
import type { Evaluation } from '../engine';
import { writeQuantity } from '../quantity';
import type { Worksheet } from '../worksheet';

/** The values of required lines now, as the file records them; undefined when no line is required. */
export function recordedValues(evaluation: Evaluation): Worksheet['recorded'] {
  const recorded: Record<string, Record<string, string>> = {};
  for (const { id, symbol, requirement } of evaluation.lines()) {
    if (requirement === undefined || symbol === '' || evaluation.lineOf(symbol)?.id !== id) continue;
    const values: Record<string, string> = {};
    for (const { id: caseId } of evaluation.worksheet.cases) {
      const text = valueText(evaluation, id, caseId);
      if (text !== undefined) values[caseId] = text;
    }
    recorded[symbol] = values;
  }
  return Object.keys(recorded).length === 0 ? undefined : recorded;
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

/** Worksheets with tolerances, and what stands on a line in them, for the tests of analysis. */
import { compileTrials, inputsOf, runTrials, type Inputs } from '../../src/analysis';
import { Evaluation } from '../../src/engine';
import { isLinesSection, type Line, type Tolerance, type Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';

/** The worksheet with tolerances on the lines of its sections, by symbol. Throws for a symbol that is not there. */
export function withTolerances(worksheet: Worksheet, tolerances: Readonly<Record<string, Tolerance>>): Worksheet {
  const left = new Set(Object.keys(tolerances));
  const withOwn = (line: Line): Line => {
    const tolerance = tolerances[line.symbol];
    left.delete(line.symbol);
    return tolerance === undefined ? line : { ...line, tolerance };
  };
  const result = {
    ...worksheet,
    sections: worksheet.sections.map((section) =>
      isLinesSection(section) ? { ...section, lines: section.lines.map(withOwn) } : section,
    ),
  };
  if (left.size > 0) throw new Error(`there is no line ${[...left].join(', ')}`);
  return result;
}

/** The evaluation of a text in the notation of the engine's tests, with tolerances by symbol. */
export const toleranced = (text: string, tolerances: Readonly<Record<string, Tolerance>>): Evaluation =>
  new Evaluation(withTolerances(sheetOf(text), tolerances));

/** Below and above alike. */
export const both = (size: string, shape: Tolerance['shape'], more: Partial<Tolerance> = {}): Tolerance => ({
  below: size,
  above: size,
  ...(shape === undefined ? {} : { shape }),
  ...more,
});

/** The id of a line. Throws when there is none. */
export function idOf(evaluation: Evaluation, symbol: string): string {
  const id = evaluation.lineOf(symbol)?.id;
  if (id === undefined) throw new Error(`there is no line ${symbol}`);
  return id;
}

export const inputsOfLine = (evaluation: Evaluation, symbol: string, caseId = 'nominal'): Inputs =>
  inputsOf(evaluation, idOf(evaluation, symbol), caseId);

/** The figures of a line in trials. */
export function trialsOf(
  evaluation: Evaluation,
  symbol: string,
  {
    count = 1000,
    seed = 1,
    from = 0,
    blockSize,
  }: { count?: number; seed?: number; from?: number; blockSize?: number } = {},
  caseId = 'nominal',
): Float64Array {
  const { evaluation: free, inputs } = inputsOfLine(evaluation, symbol, caseId);
  const program = compileTrials(free, idOf(evaluation, symbol), caseId, inputs, blockSize);
  return runTrials(program, inputs, seed, from, from + count);
}

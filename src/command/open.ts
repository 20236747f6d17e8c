/** Opening a worksheet file for a command: reads, evaluates, and collects what the user should be told about it. */
import { Evaluation } from '../engine';
import { readWorksheetBytes } from '../exchange';
import { nearestName } from '../formula';
import { describeMoved, movedValues } from '../review';
import type { Case, Line } from '../worksheet';
import { Refusal, type World } from './answer';

export interface Opened {
  readonly file: string;
  readonly evaluation: Evaluation;
  /** Sentences for standard error, each ended by a line feed. */
  readonly messages: string;
}

/** Opens a file. Throws Refusal when it cannot be read or is no worksheet. */
export function openFile(file: string, world: World): Opened {
  let bytes: Uint8Array;
  try {
    bytes = world.readFile(file);
  } catch (error) {
    throw new Refusal(`${file}: cannot be read (${error instanceof Error ? error.message : String(error)}).`);
  }
  const read = readWorksheetBytes(bytes);
  if (!read.ok) throw new Refusal(`${file}: ${read.fault.sentence}`);
  const { worksheet, readOnly, messages } = read.value;
  const evaluation = new Evaluation(worksheet);
  const nameOf = (id: string): string => worksheet.cases.find((one) => one.id === id)?.name ?? id;
  const told = [
    ...(readOnly === undefined ? [] : [readOnly]),
    ...messages,
    ...movedValues(evaluation).map((moved) => describeMoved(moved, nameOf)),
  ];
  return { file, evaluation, messages: told.map((sentence) => `${file}: ${sentence}\n`).join('') };
}

/** The cases chosen by id or name, in the worksheet's order; all when none is named. Throws Refusal for unknown ones. */
export function chooseCases({ evaluation, file }: Opened, wanted: readonly string[]): readonly Case[] {
  const { cases } = evaluation.worksheet;
  const unknown = wanted.find((word) => !cases.some(({ id, name }) => id === word || name === word));
  if (unknown !== undefined)
    throw new Refusal(`${file}: there is no case “${unknown}”; there are ${cases.map(({ id }) => id).join(', ')}.`);
  return wanted.length === 0 ? cases : cases.filter(({ id, name }) => wanted.includes(id) || wanted.includes(name));
}

/** The line with a symbol. Throws Refusal with the nearest symbol when there is none. */
export function lineWithSymbol({ evaluation, file }: Opened, symbol: string): Line {
  const line = evaluation.lineOf(symbol);
  if (line !== undefined) return line;
  const nearest = nearestName(
    symbol,
    evaluation.lines().map((other) => other.symbol),
  );
  throw new Refusal(
    `${file}: there is no line “${symbol}”${nearest === undefined ? '' : `; is it “${nearest}”?`}`.replace(
      /([^?])$/,
      '$1.',
    ),
  );
}

/** The name under which a line stands in results: its symbol, or its id where it has none or another line has it. */
export function nameOfLine(evaluation: Evaluation, line: Line): string {
  return line.symbol !== '' && evaluation.lineOf(line.symbol)?.id === line.id ? line.symbol : line.id;
}

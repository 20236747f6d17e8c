/** Opening a worksheet file for a command: reads, evaluates, and collects what the user should be told about it. */
import { Evaluation } from '../engine';
import { readWorksheetBytes } from '../exchange';
import { nearestName } from '../formula';
import { describeMoved, movedValues } from '../review';
import type { Case, Line } from '../worksheet';
import { Refusal, type World } from './answer';
import { oneLine } from './plain-text';

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
    throw new Refusal(oneLine(`${file}: cannot be read (${error instanceof Error ? error.message : String(error)}).`));
  }
  const read = readWorksheetBytes(bytes);
  if (!read.ok) throw new Refusal(oneLine(`${file}: ${read.fault.sentence}`));
  const { worksheet, readOnly, messages } = read.value;
  const evaluation = new Evaluation(worksheet);
  const nameOf = (id: string): string => worksheet.cases.find((one) => one.id === id)?.name ?? id;
  const told = [
    ...(readOnly === undefined ? [] : [readOnly]),
    ...messages,
    ...movedValues(evaluation).map((moved) => describeMoved(moved, nameOf)),
  ];
  return { file, evaluation, messages: told.map((sentence) => `${oneLine(`${file}: ${sentence}`)}\n`).join('') };
}

/**
 * The cases chosen by id or, where no id is meant, by name, in the worksheet's order; all when none is named. Throws Refusal
 * for unknown ones.
 */
export function chooseCases({ evaluation, file }: Opened, wanted: readonly string[]): readonly Case[] {
  const { cases } = evaluation.worksheet;
  if (wanted.length === 0) return cases;
  const chosen = new Set<Case>();
  for (const word of wanted) {
    const byId = cases.filter(({ id }) => id === word);
    const found = byId.length > 0 ? byId : cases.filter(({ name }) => name === word);
    if (found.length === 0)
      throw new Refusal(
        oneLine(`${file}: there is no case “${word}”; there are ${cases.map(({ id }) => id).join(', ')}.`),
      );
    for (const one of found) chosen.add(one);
  }
  return cases.filter((one) => chosen.has(one));
}

/** The line with a symbol, or with the name under which it stands in results. Throws Refusal when there is none. */
export function lineWithSymbol({ evaluation, file }: Opened, symbol: string): Line {
  const line =
    evaluation.lineOf(symbol) ?? evaluation.lines().find((other) => nameOfLine(evaluation, other) === symbol);
  if (line !== undefined) return line;
  const part = evaluation.lines().find((other) => other.symbol.startsWith(`${symbol}.`))?.symbol;
  if (part !== undefined)
    throw new Refusal(
      oneLine(
        `${file}: “${symbol}” is a chain or a stage and has no figure by itself; ask for a part of it, such as ${part}.`,
      ),
    );
  const nearest = nearestName(
    symbol,
    evaluation.lines().map((other) => other.symbol),
  );
  throw new Refusal(
    oneLine(`${file}: there is no line “${symbol}”${nearest === undefined ? '.' : `; is it “${nearest}”?`}`),
  );
}

/**
 * The name under which a line stands in results: its symbol, or its id where it has none or another line has it. An id that is
 * the symbol of another line gets a # in front: names are one line's each.
 */
export function nameOfLine(evaluation: Evaluation, line: Line): string {
  if (line.symbol !== '' && evaluation.lineOf(line.symbol)?.id === line.id) return line.symbol;
  // A part of a chain that has no symbol is called by its label.
  if (evaluation.originOf(line.id) !== undefined) return line.label;
  let name = line.id;
  while (evaluation.lineOf(name) !== undefined || (name !== line.id && evaluation.line(name) !== undefined))
    name = `#${name}`;
  return name;
}

/** `solve`: every value of a figure at which a line has the value wanted. */
import { solve, usualRange, type Range } from '../analysis';
import type { Unit } from '../quantity';
import type { Line } from '../worksheet';
import { Refusal, type Answer, type World } from './answer';
import { formatOf, listOf, needed, onlyFile, parse, USAGE } from './arguments';
import { ask, asJson, figureIn, numberText, quantityIn, varying } from './asked';
import { nameOfLine } from './open';
import { oneLine } from './plain-text';

const FORMATS = ['text', 'json'] as const;

export function runSolve(words: readonly string[], world: World): Answer {
  const parsed = parse(withBothBounds(words), {
    vary: { type: 'string' },
    line: { type: 'string' },
    for: { type: 'string' },
    between: { type: 'string', multiple: true },
    case: { type: 'string', multiple: true },
    format: { type: 'string' },
  });
  const file = onlyFile(parsed, 'solve');
  const [vary = '', symbol = '', forText = ''] = ['vary', 'line', 'for'].map((name) => needed(parsed, 'solve', name));
  const format = formatOf(parsed.values['format'], FORMATS);
  const bounds = listOf(parsed.values['between']);
  if (bounds.length !== 0 && bounds.length !== 2) throw new Refusal(`--between takes two quantities.\n\n${USAGE}`);
  const asked = ask(file, [symbol], listOf(parsed.values['case']), world);
  const { inCase } = asked;
  const line = asked.lines[0] as Line;
  const { line: varied, unit, evaluation, figure } = varying(asked, vary, [line]);
  const targetUnit = evaluation.node(line.id, inCase.id)?.result.unit;
  const name = nameOfLine(asked.evaluation, line);
  if (targetUnit === undefined)
    throw new Refusal(oneLine(`${file}: ${name} has no unit, and so no value to look for.`));
  const wanted = quantityIn(forText, targetUnit, 'for');
  const range = rangeOf(bounds, figure, unit, file, vary);
  const values = solve(evaluation, varied.id, line.id, inCase.id, wanted, range);
  const variedName = nameOfLine(asked.evaluation, varied);
  const none = `${file}: no value of ${variedName} between ${plainText(range.from, unit)} and ${plainText(range.to, unit)} gives ${name} = ${figureIn(wanted, targetUnit)}.`;
  const json = {
    vary: variedName,
    unit: unit.word,
    line: name,
    case: inCase.id,
    for: wanted,
    between: [range.from, range.to],
    values,
  };
  return {
    results: format === 'json' ? asJson(json) : values.map((value) => `${plainText(value, unit)}\n`).join(''),
    messages: `${asked.messages}${values.length === 0 ? `${oneLine(none)}\n` : ''}`,
    exitCode: values.length === 0 ? 1 : 0,
  };
}

/** `--between A B` as an option given twice. */
function withBothBounds(words: readonly string[]): string[] {
  return words.flatMap((word, at) => {
    if (words[at - 1] === '--between') return [];
    if (word !== '--between')
      return words[at - 2] === '--between' && !word.startsWith('--') ? [`--between=${word}`] : [word];
    const first = words[at + 1];
    return first === undefined ? [word] : [`--between=${first}`];
  });
}

function rangeOf(bounds: readonly string[], figure: number, unit: Unit, file: string, symbol: string): Range {
  const [from, to] = bounds.map((text) => quantityIn(text, unit, 'between'));
  if (from !== undefined && to !== undefined) {
    if (from === to) throw new Refusal('--between takes two different quantities.');
    return { from: Math.min(from, to), to: Math.max(from, to), isLogarithmic: isWide(from, to, unit) };
  }
  const usual = usualRange(figure, unit);
  if (usual === undefined)
    throw new Refusal(oneLine(`${file}: ${symbol} has no figure to start from: say where to look, with --between.`));
  return usual;
}

/** A range of several decades is looked through by factors. */
const isWide = (from: number, to: number, unit: Unit): boolean =>
  unit.form === 'linear' && Math.min(from, to) > 0 && Math.max(from, to) / Math.min(from, to) > 100;

/** To twelve figures: rounding is not shown, and nothing else is lost. */
function plainText(value: number, unit: Unit): string {
  const text = numberText(value, 12);
  return unit.word === '1' ? text : `${text} ${unit.word}`;
}

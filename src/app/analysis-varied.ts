/**
 * What a line can be swept over and solved for: the entries that it rests on, with a range to begin with; and a figure put in the
 * place of such an entry, as one edit.
 */
import { loosened, STUCK } from '../analysis';
import { readBound, type Evaluation, type Node } from '../engine';
import { fail, ok, type Result } from '../base';
import type { Unit } from '../quantity';
import {
  CHAIN_INPUTS,
  findLine,
  overrideIn,
  setChainInput,
  setEntry,
  setStageValue,
  type Edit,
  type Worksheet,
} from '../worksheet';
import type { Range } from '../analysis';
import { nameOf, named, typedFigure, type Named } from './analysis-names';
import { inputId } from './chain-view';

/** An entry that a line rests on. */
export interface VariedInput extends Named {
  readonly unit: Unit;
  /** NaN where it has none now. */
  readonly figure: number;
  /** False: its entry is computed from other lines, and a sweep stands in its place. */
  readonly isTyped: boolean;
}

/** The entries that a line rests on in a case: typed figures first, each kind in the order of the worksheet. */
export function variedInputs(evaluation: Evaluation, lineId: string, caseId: string): readonly VariedInput[] {
  const seen = new Set<Node>();
  const open = [evaluation.node(lineId, caseId)];
  for (let node = open.pop(); node !== undefined || open.length > 0; node = open.pop()) {
    if (node === undefined || seen.has(node) || node.barred !== undefined) continue;
    seen.add(node);
    open.push(...node.inputs);
  }
  const place = new Map(evaluation.order().map((id, at) => [id, at]));
  return [...seen]
    .filter((node) => node.lineId !== lineId && canVary(node))
    .sort((a, b) => Number(a.inputs.length > 0) - Number(b.inputs.length > 0) || before(place, a, b))
    .flatMap((node) => {
      const { unit } = node.result;
      const figure = evaluation.figure(node.lineId, caseId);
      if (unit === undefined) return [];
      return [
        {
          ...named(evaluation, node.lineId),
          ...{ unit, figure: figure.state === 'value' ? figure.value : NaN, isTyped: node.inputs.length === 0 },
        },
      ];
    });
}

const canVary = ({ isDerived, item, result, line }: Node): boolean =>
  !isDerived &&
  item.curve === undefined &&
  item.isGenerated !== true &&
  !result.isEmpty &&
  (line.symbol !== '' || line.label !== '');

const before = (place: ReadonlyMap<string, number>, a: Node, b: Node): number =>
  (place.get(a.lineId) ?? 0) - (place.get(b.lineId) ?? 0);

/** Why an entry cannot vary for a line, as a sentence; undefined when it can. */
export function whyStuck(
  evaluation: Evaluation,
  input: VariedInput,
  lineId: string,
  caseId: string,
): string | undefined {
  const { stuck } = loosened(evaluation, [input.lineId], [lineId], caseId);
  return stuck.length === 0 ? undefined : `${nameOf(input)} cannot be varied: ${STUCK}`;
}

/** A range in which to look at first: 10 dB either way, a tenth to ten times, or as much again either way. */
export function firstRange({ figure, unit }: VariedInput): Range {
  const at = Number.isFinite(figure) ? figure : 0;
  if (unit.form === 'decibel') return { from: at - 10, to: at + 10, isLogarithmic: false };
  const hasZero = unit.form === 'linear' && unit.shift !== 0;
  if (at > 0 && !hasZero) return { from: at / 10, to: at * 10, isLogarithmic: unit.form === 'linear' };
  const reach = at === 0 || hasZero ? 50 : Math.abs(at);
  return { from: at - reach, to: at + reach, isLogarithmic: false };
}

/** A range as its two fields show it. */
export const rangeTexts = ({ from, to }: Range, unit: Unit): { readonly from: string; readonly to: string } => ({
  from: typedFigure(from, unit, 6),
  to: typedFigure(to, unit, 6),
});

/** A quantity typed for a line of this unit; a bare number has it. */
export function readFigure(text: string, unit: Unit): Result<number, string> {
  const figure = readBound(text.trim(), unit);
  return figure === undefined || !Number.isFinite(figure)
    ? fail(`“${text.trim()}” is no quantity ${unit.word === '1' ? 'without unit' : `in ${unit.word}`}.`)
    : ok(figure);
}

/** A range as typed. */
export function readRange(
  texts: { readonly from: string; readonly to: string },
  isLogarithmic: boolean,
  unit: Unit,
): Result<Range, string> {
  const [from, to] = [readFigure(texts.from, unit), readFigure(texts.to, unit)];
  if (!from.ok) return from;
  if (!to.ok) return to;
  if (from.value === to.value) return fail('The range has no width: its two ends are the same.');
  if (isLogarithmic && unit.form !== 'linear') return fail('Decibels are logarithms already: take equal steps.');
  if (isLogarithmic && !(from.value > 0 && to.value > 0))
    return fail('Steps by equal factors go from above zero to above zero.');
  return ok({ from: from.value, to: to.value, isLogarithmic });
}

/** The edit that puts a figure in an entry's place: in the case, where the case has an entry of its own there. */
export function putFigure(
  worksheet: Worksheet,
  evaluation: Evaluation,
  inputLineId: string,
  entry: string,
  caseId: string,
): Edit | undefined {
  const line = evaluation.line(inputLineId);
  if (line === undefined) return undefined;
  const inCase = overrideIn(line, caseId) === undefined ? undefined : caseId;
  if (findLine(worksheet, inputLineId) !== undefined) return setEntry(worksheet, inputLineId, entry, inCase);
  const origin = evaluation.originOf(inputLineId);
  if (origin === undefined) return undefined;
  const { sectionId, stageId, field } = origin;
  if (stageId !== undefined && field !== undefined)
    return setStageValue(worksheet, sectionId, stageId, field, entry, inCase);
  const input = CHAIN_INPUTS.find((one) => inputId(sectionId, one) === inputLineId);
  return input === undefined ? undefined : setChainInput(worksheet, sectionId, input, entry);
}

/**
 * What a line's figure may be off by: the lines that it rests on, itself included, that have an entry of their own with a
 * tolerance, read for one case. Those of a group make one variable; every other input is a variable by itself.
 */
import { Evaluation, type Node } from '../engine';
import type { Unit } from '../quantity';
import { isLinesSection, type Line } from '../worksheet';
import type { Varied } from './columns';
import { favourableDirection, type Direction } from './directions';
import type { Spread } from './shapes';
import { readTolerance } from './tolerances';

/** An input with a tolerance. */
export interface Input {
  readonly lineId: string;
  /** The figure without deviation, in `unit`. */
  readonly figure: number;
  readonly unit: Unit;
  readonly spread: Spread;
  readonly group: string | undefined;
  readonly direction: Direction | undefined;
  /** True: its entry rests on other inputs, so that the deviation is added to what it gives. */
  readonly isAdded: boolean;
}

/** A tolerance that cannot be used, and why, as the end of a sentence that begins with the line's name. */
export interface Trouble {
  readonly lineId: string;
  readonly why: string;
}

export interface Inputs {
  /** The evaluation in which the inputs vary freely: see `loosened`. */
  readonly evaluation: Evaluation;
  readonly inputs: readonly Input[];
  readonly troubles: readonly Trouble[];
  /** Lines without tolerance whose figures were typed. */
  readonly exact: readonly string[];
}

/** The lines above a line in a case, itself included, in the order of the worksheet. */
function above(evaluation: Evaluation, lineId: string, caseId: string): Node[] {
  const seen = new Set<Node>();
  const open = [evaluation.node(lineId, caseId)];
  while (open.length > 0) {
    const node = open.pop();
    if (node === undefined || seen.has(node)) continue;
    seen.add(node);
    if (node.barred === undefined) open.push(...node.inputs);
  }
  const place = new Map(evaluation.order().map((id, at) => [id, at]));
  return [...seen].sort((a, b) => (place.get(a.lineId) ?? 0) - (place.get(b.lineId) ?? 0));
}

const hasEntry = (node: Node): boolean => !node.isDerived && node.item.curve === undefined && !node.result.isEmpty;

/** The inputs of a line in a case. */
export function inputsOf(evaluation: Evaluation, lineId: string, caseId: string): Inputs {
  const varying = above(evaluation, lineId, caseId).filter(hasEntry);
  const typed = varying.filter(({ inputs, line }) => inputs.length === 0 || line.tolerance !== undefined);
  const { evaluation: free, stuck } = loosened(
    evaluation,
    typed.map((node) => node.lineId),
    [lineId],
    caseId,
  );
  const inputs: Input[] = [];
  const troubles: Trouble[] = [];
  const exact: string[] = [];
  for (const { lineId: id } of typed) {
    const node = free.node(id, caseId);
    const line = evaluation.line(id);
    const figure = free.figure(id, caseId);
    if (node === undefined || line === undefined || figure.state !== 'value') continue;
    if (line.tolerance === undefined) {
      if (!stuck.includes(id)) exact.push(id);
      continue;
    }
    if (stuck.includes(id)) {
      troubles.push({ lineId: id, why: STUCK });
      continue;
    }
    // No power at all deviates by nothing.
    if (!Number.isFinite(figure.value)) {
      exact.push(id);
      continue;
    }
    const read = readTolerance(line.tolerance, node, figure.value, figure.unit);
    if (!read.ok) troubles.push({ lineId: id, why: read.fault });
    else if (read.value.spread.below + read.value.spread.above === 0) exact.push(id);
    else
      inputs.push({
        lineId: id,
        figure: figure.value,
        unit: figure.unit,
        isAdded: node.inputs.length > 0,
        ...read.value,
        // Lines of a group that give below and above deviate upwards together.
        direction: read.value.direction ?? favourableDirection(node),
      });
  }
  return { evaluation: free, inputs, troubles, exact };
}

export const variedOf = ({ lineId, isAdded }: Input): Varied => ({ lineId, isAdded });

/** Where an input's deviation is added to a figure of its own, its column holds the deviation alone. */
export const baseOf = ({ isAdded, figure }: Input): number => (isAdded ? 0 : figure);

/** Why a number cannot vary. */
export const STUCK = 'it says how often other figures count, which decides what is computed: it cannot vary.';

/**
 * The evaluation in which these lines may vary. A bare number is part of the entries that use it (it may say how often a level
 * counts): there its entry is put in brackets, so that it is a figure like any other. Numbers for which a target would lose its
 * figure then (what is three times a level is no level) are `stuck`, and left as they were.
 */
export function loosened(
  evaluation: Evaluation,
  lineIds: readonly string[],
  targets: readonly string[],
  caseId: string,
): { readonly evaluation: Evaluation; readonly stuck: readonly string[] } {
  const bare = lineIds.filter((id) => evaluation.node(id, caseId)?.result.constant !== undefined);
  if (bare.length === 0) return { evaluation, stuck: [] };
  const hasFigure = (one: Evaluation, id: string): boolean => one.figure(id, caseId).state === 'value';
  const given = targets.filter((id) => hasFigure(evaluation, id));
  const keeps = (one: Evaluation): boolean => given.every((id) => hasFigure(one, id));
  const all = withBrackets(evaluation, new Set(bare));
  if (keeps(all)) return { evaluation: all, stuck: [] };
  const stuck = bare.filter((id) => !keeps(withBrackets(evaluation, new Set([id]))));
  const rest = new Set(bare.filter((id) => !stuck.includes(id)));
  return { evaluation: rest.size === 0 ? evaluation : withBrackets(evaluation, rest), stuck };
}

function withBrackets({ worksheet }: Evaluation, ids: ReadonlySet<string>): Evaluation {
  const inBrackets = (line: Line): Line => {
    if (!ids.has(line.id)) return line;
    const { byCase } = line;
    return {
      ...line,
      entry: bracketed(line.entry),
      ...(byCase === undefined
        ? {}
        : { byCase: Object.fromEntries(Object.entries(byCase).map(([id, entry]) => [id, bracketed(entry)])) }),
    };
  };
  return new Evaluation({
    ...worksheet,
    sections: worksheet.sections.map((section) =>
      isLinesSection(section) && section.lines.some(({ id }) => ids.has(id))
        ? { ...section, lines: section.lines.map(inBrackets) }
        : section,
    ),
  });
}

const bracketed = (entry: string): string => (entry.trim() === '' ? entry : `(${entry})`);

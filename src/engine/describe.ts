/** Findings in words: the checker's remarks with their figures filled in, and the findings that only values bring. */
import { CATALOGUE, type Facts, type Finding, type Repair } from '../findings';
import { evaluatePlan, type Figures, type Remark, type Scope } from '../formula';
import { writeQuantity, writeSignificant } from '../quantity';
import { loopPath } from './graph';
import type { Node } from './node';
import { rawFigure } from './raw-figure';
import type { Figure, Reading } from './reading';
import { diagnose, figureOfNode, readBound } from './state';

/** The remarks that hold for a node now. */
export function remarksOf(node: Node, figures: Figures, value?: number): readonly Remark[] {
  const { barred, result } = node;
  const own = result.remarks.filter(
    ({ applies }) => applies === undefined || applies.test(evaluatePlan(applies.plan, figures)),
  );
  if (barred?.code === 'loop') return [{ code: 'loop', facts: { path: loopPath(node) }, repairs: [] }];
  const late = [...own];
  if (barred?.code === 'duplicate-symbol')
    late.unshift({ code: 'duplicate-symbol', facts: { name: node.line.symbol, holder: barred.holder }, repairs: [] });
  // A derived figure that is not there says so in its place; the entry at fault has the finding.
  if (node.isDerived) return late;
  const figure = figureOfNode(node, figures, value);
  if (figure.state === 'waiting')
    late.push({ code: 'waiting', facts: { roots: figure.roots.join(', ') }, repairs: [] });
  if (figure.state === 'withheld' && !late.some(({ code }) => code === figure.code))
    late.push(runtimeError(node, figures));
  const requirement = unreadableRequirement(node, figure);
  if (requirement !== undefined) late.push(requirement);
  return late;
}

function runtimeError(node: Node, figures: Figures): Remark {
  const { code, why } = diagnose(node.result.plan, figures);
  const what = node.entry.trim();
  return code === 'no-power'
    ? { code, facts: { what: `In ${what} ${why}` }, repairs: [] }
    : { code, facts: { what, because: why }, repairs: [] };
}

/** A requirement that is no quantity of the line's dimension. */
function unreadableRequirement({ line }: Node, figure: Figure): Remark | undefined {
  const bound = line.requirement?.atLeast ?? line.requirement?.atMost;
  if (bound === undefined || figure.state !== 'value' || readBound(bound, figure.unit) !== undefined) return undefined;
  return {
    code: 'bad-entry',
    facts: {
      what: `The requirement “${bound}” is not a quantity in a unit of ${figure.unit.word === '1' ? 'a plain number' : figure.unit.word}: write for instance 3 ${figure.unit.form === 'decibel' ? figure.unit.word : figure.unit.word}.`,
    },
    repairs: [],
  };
}

/** A remark as a finding, with both figures. Repairs that would themselves be withheld are left out. */
export function describeRemark(
  remark: Remark,
  node: Node,
  figures: Figures,
  tryOut: (entry: string, unit?: string) => Reading,
  scope: Scope,
  value?: number,
): Finding {
  // The units of a chain's values are not for anybody to change, and generated entries not to be rewritten.
  const { origin } = node.item;
  const offered =
    origin === undefined
      ? remark.repairs
      : remark.repairs.filter(({ kind }) => kind === 'entry' && origin.field !== undefined);
  const tried = offered.map((repair) => ({ repair, reading: tryRepair(repair, node, tryOut) }));
  const usable = tried.filter(({ reading }) => reading === undefined || reading.figure.state !== 'withheld');
  const [best] = usable;
  const meant = best?.reading === undefined ? undefined : written(best.reading.figure);
  const now = nowFigure(node, figures, scope, value);
  const late = remark.lateFacts?.((plan) => evaluatePlan(plan, figures)) ?? {};
  const facts: Facts = {
    ...remark.facts,
    ...late,
    ...furtherFigures(remark, tryOut),
    ...(now === undefined ? {} : { now }),
    ...(meant === undefined ? {} : { meant }),
    ...(best === undefined ? {} : { repair: best.repair.title }),
  };
  const { severity, title, message } = CATALOGUE[remark.code];
  return {
    code: remark.code,
    severity,
    title,
    message: message(facts),
    ...(remark.place === undefined ? {} : { place: remark.place }),
    repairs: usable.map(({ repair }) => repair),
  };
}

function tryRepair(repair: Repair, node: Node, tryOut: (entry: string, unit?: string) => Reading): Reading | undefined {
  switch (repair.kind) {
    case 'entry':
      return tryOut(repair.entry);
    case 'unit':
      return tryOut(node.entry, repair.unit);
    case 'quantity':
      return undefined;
  }
}

function furtherFigures({ figures = {} }: Remark, tryOut: (entry: string) => Reading): Facts {
  const facts: Record<string, string> = {};
  for (const [name, entry] of Object.entries(figures)) {
    const text = written(tryOut(entry).figure);
    if (text !== undefined) facts[name] = text;
  }
  return facts;
}

const written = (figure: Figure): string | undefined =>
  figure.state === 'value' ? writeQuantity(figure.value, figure.unit, { isFitted: figure.isFitted }) : undefined;

/** What the line gives as it stands: its value, or the bare figure under the unit it declares. */
function nowFigure(node: Node, figures: Figures, scope: Scope, value: number | undefined): string | undefined {
  const shown = written(figureOfNode(node, figures, value));
  if (shown !== undefined) return shown;
  const { unit } = node.result;
  const bare =
    node.read.form === 'expression'
      ? rawFigure(node.read.tree, scope, figures)
      : node.read.form === 'quantity'
        ? node.read.figure
        : undefined;
  if (bare === undefined) return undefined;
  const text =
    unit?.form === 'decibel' || unit?.form === 'rate'
      ? bare.toFixed(2).replace('-', '−')
      : writeSignificant(bare).replace('-', '−');
  return unit === undefined || unit.word === '1' ? text : `${text} “${unit.word}”`;
}

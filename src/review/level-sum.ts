/**
 * The level diagram of a line that is a decibel sum: from its level, through gains and losses in the order written, to its
 * result. A level that is such a sum itself, or that has come through a chain, is followed back to where it begins.
 * Holds: the last point is the line's own figure; a diagram never has more points than somebody reads.
 */
import { itemId, type Evaluation } from '../engine';
import { evaluatePlan, fittingDecibelUnit, type Checked, type SumTerm } from '../formula';
import { findUnit, isDimensionless, sameDimension, type DecibelUnit } from '../quantity';
import { isChainSection } from '../worksheet';
import {
  behindStage,
  figureIn,
  levelOf,
  pointOfStage,
  type LevelDiagram,
  type LevelPoint,
  type PointLink,
} from './level-diagram';

/** Beyond it, sums within sums are left as one level. */
const MOST_POINTS = 60;

/** What changes the level on its way. */
type Step = Pick<LevelPoint, 'name' | 'isSymbol' | 'label' | 'link' | 'isBypassed'> & { readonly stepDb: number };

/** A level, and the steps that it takes, in order. */
interface Course {
  readonly level: SumTerm;
  readonly steps: readonly Step[];
}

/** The diagram of a line in a case; undefined for a line that is no sum of one level and of gains and losses. */
export function levelDiagramOfLine(evaluation: Evaluation, lineId: string, caseId: string): LevelDiagram | undefined {
  const line = evaluation.line(lineId);
  const figure = evaluation.figure(lineId, caseId);
  const own = courseOf(evaluation, lineId, caseId);
  if (line === undefined || own === undefined || figure.state !== 'value') return undefined;
  const unit = unitOf(own.level, figure.unit.form === 'decibel' ? figure.unit : undefined);
  if (unit === undefined) return undefined;
  const { level, steps } = followedBack(evaluation, own, caseId, lineId);
  if (steps.length === 0 || steps.length >= MOST_POINTS) return undefined;
  let value = evaluatePlan(level.plan, evaluation.figures) + typeOf(level).offsetDb - unit.offsetDb;
  const points: LevelPoint[] = [startPoint(evaluation, level, value, unit)];
  for (const [index, step] of steps.entries()) {
    value += step.stepDb;
    points.push({ ...step, key: `${String(index + 1)} ${step.name}`, wanted: levelOf(value, unit) });
  }
  const isSame = figure.unit.form !== 'decibel' || Math.abs(value - figure.value) < 1e-6;
  if (!isSame || !points.every(({ wanted }) => Number.isFinite(wanted?.value))) return undefined;
  return { of: 'sum', title: line.label || line.symbol, unit, points };
}

/** The line's unit, where it is one of such levels, else one that is. */
function unitOf(level: SumTerm, own: DecibelUnit | undefined): DecibelUnit | undefined {
  const { dimension } = typeOf(level);
  const unit = own ?? fittingDecibelUnit(dimension, 0, [level.type.unitHint]);
  return unit.form === 'decibel' && sameDimension(unit.dimension, dimension) ? unit : undefined;
}

/** Logarithms over a written reference are levels where nothing else is. */
const typeOf = ({ type, overReference }: SumTerm): SumTerm['type'] =>
  overReference !== undefined && isDimensionless(type.dimension) ? overReference : type;

/** The sum in a line's entry; undefined where it is none of one level. */
function courseOf(evaluation: Evaluation, lineId: string, caseId: string): Course | undefined {
  const checked = evaluation.inspect(lineId, caseId);
  if (checked?.type.form !== 'decibel') return undefined;
  const terms = checked.terms ?? symbolTerm(checked);
  const dimensional = terms.filter(({ type }) => !isDimensionless(type.dimension));
  const levels =
    dimensional.length > 0 ? dimensional : terms.filter(({ overReference }) => overReference !== undefined);
  const [level] = levels;
  if (level === undefined || levels.length > 1 || level.coefficient !== 1) return undefined;
  return { level, steps: terms.filter((term) => term !== level).map((term) => stepOf(evaluation, term)) };
}

/** An entry that is another line's symbol alone: a sum of one term. */
function symbolTerm({ tree, type, plan }: Checked): readonly SumTerm[] {
  if (tree.type !== 'symbol' || type.form !== 'decibel') return [];
  const { name } = tree;
  return [{ coefficient: 1, tree, text: name, type, plan, isDeclared: false, isNumber: false, symbol: name }];
}

function stepOf(evaluation: Evaluation, term: SumTerm): Step {
  const { coefficient, plan, type } = term;
  return {
    ...called(evaluation, term),
    isBypassed: false,
    stepDb: coefficient * (evaluatePlan(plan, evaluation.figures) + type.offsetDb),
  };
}

/** What a term is called and leads to. */
function called(
  evaluation: Evaluation,
  { symbol, text, coefficient }: SumTerm,
): Pick<LevelPoint, 'name' | 'isSymbol' | 'label' | 'link'> {
  const line = symbol === undefined ? undefined : evaluation.lineOf(symbol);
  const size = Math.abs(coefficient);
  const name = line?.symbol || text;
  return {
    name: size === 1 ? name : `${String(size)} × ${name}`,
    isSymbol: line !== undefined && size === 1,
    label: line?.label ?? '',
    ...(line === undefined ? {} : { link: linkTo(evaluation, line.id) }),
  };
}

function linkTo(evaluation: Evaluation, lineId: string): PointLink {
  const place = evaluation.originOf(lineId);
  if (place === undefined) return { to: 'line', lineId };
  const { sectionId, stageId } = place;
  return stageId === undefined ? { to: 'section', sectionId } : { to: 'stage', sectionId, stageId };
}

function startPoint(evaluation: Evaluation, level: SumTerm, value: number, unit: DecibelUnit): LevelPoint {
  const lineId = level.symbol === undefined ? undefined : evaluation.lineOf(level.symbol)?.id;
  const start = called(evaluation, level);
  return {
    ...start,
    key: `0 ${start.name}`,
    isBypassed: false,
    wanted: { ...levelOf(value, unit), ...(lineId === undefined ? {} : { lineId }) },
  };
}

/** The course with what its level is made of before it, and so on, as long as that is one level again. */
function followedBack(evaluation: Evaluation, course: Course, caseId: string, lineId: string): Course {
  const seen = new Set([lineId]);
  let { level, steps } = course;
  for (;;) {
    const inner = level.symbol === undefined ? undefined : evaluation.lineOf(level.symbol);
    if (inner === undefined || seen.has(inner.id)) return { level, steps };
    seen.add(inner.id);
    const before = courseOf(evaluation, inner.id, caseId) ?? throughChain(evaluation, level, inner.id, caseId);
    if (
      before === undefined ||
      before.steps.length + steps.length >= MOST_POINTS ||
      !sameDimension(typeOf(before.level).dimension, typeOf(level).dimension)
    )
      return { level, steps };
    level = before.level;
    steps = [...before.steps, ...steps];
  }
}

/** The way of a chain's wanted level from the chain's input to where it is asked for; undefined for any other item. */
function throughChain(evaluation: Evaluation, level: SumTerm, lineId: string, caseId: string): Course | undefined {
  const sectionId = evaluation.originOf(lineId)?.sectionId;
  const chain = evaluation.worksheet.sections.find(({ id }) => id === sectionId);
  const unit = findUnit('dBm');
  if (chain === undefined || !isChainSection(chain) || unit?.form !== 'decibel') return undefined;
  const idsBehind = chain.stages.map((stage) => itemId(chain.id, behindStage(stage, 'signal')));
  const isOutput = lineId === itemId(chain.id, 'signal');
  const count =
    lineId === itemId(chain.id, 'in.signal') ? 0 : isOutput ? idsBehind.length : idsBehind.indexOf(lineId) + 1;
  if (count === 0 && lineId !== itemId(chain.id, 'in.signal')) return undefined;
  const inputId = itemId(chain.id, 'input.signal');
  const input = evaluation.line(inputId);
  const node = evaluation.node(inputId, caseId);
  let before = figureIn(evaluation, inputId, caseId, unit);
  if (input === undefined || node === undefined || before === undefined) return undefined;
  const steps: Step[] = [];
  for (const [index, stage] of chain.stages.slice(0, count).entries()) {
    const behind = figureIn(evaluation, idsBehind[index] ?? '', caseId, unit);
    if (behind === undefined) return undefined;
    const { name, isSymbol, label, link, isBypassed } = pointOfStage(chain, stage);
    steps.push({ name, isSymbol, label, ...(link && { link }), isBypassed, stepDb: behind - before });
    before = behind;
  }
  // Items of a chain are all in dBm, so that the level's type is that of the input too.
  const { symbol } = input;
  return { level: { ...level, text: symbol, symbol, plan: { op: 'slot', slot: node.slot } }, steps };
}

/**
 * Level diagrams as data, and the one of a chain: the levels at its input and behind each stage, in one unit.
 * Holds: every level is one that the engine computed; what is not known is absent.
 */
import { itemId, STAGE_PARTS, type Evaluation } from '../engine';
import { findUnit, linearFigure, sameDimension, type DecibelUnit } from '../quantity';
import { isChainSection, type ChainSection, type Stage } from '../worksheet';

/** A level at a point. */
export interface PointLevel {
  /** In the diagram's unit. */
  readonly value: number;
  /** The linear value, `63.1 pW`. */
  readonly linear: string;
  /** The item or line whose figure it is; absent for partial sums. */
  readonly lineId?: string;
}

/** What a point leads to. */
export type PointLink =
  | { readonly to: 'section'; readonly sectionId: string }
  | { readonly to: 'stage'; readonly sectionId: string; readonly stageId: string }
  | { readonly to: 'line'; readonly lineId: string };

/** The levels that a point may have, as they are drawn and listed. */
export const POINT_LEVELS = ['wanted', 'noise', 'interferer', 'compression', 'intercept'] as const;

export type PointLevelName = (typeof POINT_LEVELS)[number];

type PointLevels = { readonly [Name in PointLevelName]?: PointLevel };

/**
 * A place between two stages or terms. `compression` is the level there at which the stage in front has lost 1 dB,
 * `intercept` the third-order intercept of that stage, at its output.
 */
export interface LevelPoint extends PointLevels {
  /** Unlike that of any other point of the diagram. */
  readonly key: string;
  /** Short: a symbol where there is one. */
  readonly name: string;
  readonly isSymbol: boolean;
  /** In words; may be empty. */
  readonly label: string;
  /** Absent where the point is no stage and no line: a figure typed in a sum. */
  readonly link?: PointLink;
  /** How much the wanted level has risen since the point before, dB; below zero for a loss. */
  readonly stepDb?: number;
  readonly isBypassed: boolean;
  readonly snrDb?: number;
}

export interface LevelDiagram {
  readonly of: 'chain' | 'sum';
  readonly title: string;
  readonly unit: DecibelUnit;
  /** In signal order. */
  readonly points: readonly LevelPoint[];
}

/** The diagram of a chain in a case; undefined where there is no chain, no stage or no level. */
export function levelDiagramOfChain(
  evaluation: Evaluation,
  sectionId: string,
  caseId: string,
): LevelDiagram | undefined {
  const chain = evaluation.worksheet.sections.find(({ id }) => id === sectionId);
  const unit = findUnit('dBm');
  if (chain === undefined || !isChainSection(chain) || unit?.form !== 'decibel') return undefined;
  const at = (names: readonly string[]): PointLevel | undefined => {
    for (const name of names) {
      const lineId = itemId(chain.id, name);
      const value = figureIn(evaluation, lineId, caseId, unit);
      if (value !== undefined) return { ...levelOf(value, unit), lineId };
    }
    return undefined;
  };
  const ratio = findUnit('dB');
  const ratioAt = (name: string): { snrDb?: number } => {
    const value = ratio?.form === 'decibel' ? figureIn(evaluation, itemId(chain.id, name), caseId, ratio) : undefined;
    return value === undefined ? {} : { snrDb: value };
  };
  const points = [
    { ...inputPoint(chain, at), ...ratioAt('in.snr') },
    ...chain.stages.map((stage) => ({
      ...stagePoint(chain, stage, at),
      ...ratioAt(behindStage(stage, 'snr')),
    })),
  ];
  const hasLevel = points.some(
    ({ wanted, noise, interferer }) => wanted !== undefined || noise !== undefined || interferer !== undefined,
  );
  if (chain.stages.length === 0 || !hasLevel) return undefined;
  return { of: 'chain', title: chain.title || chain.symbol, unit, points: withSteps(points) };
}

/** A level of the chain by the names of items, the first of which that has a figure counts. */
type LevelAt = (names: readonly string[]) => PointLevel | undefined;

const inputPoint = (chain: ChainSection, at: LevelAt): LevelPoint => ({
  // No stage has an empty id.
  key: '',
  name: 'input',
  isSymbol: false,
  label: 'input of the chain',
  link: { to: 'section', sectionId: chain.id },
  isBypassed: false,
  ...given({ wanted: at(['in.signal']), noise: at(['in.noise']), interferer: at(['input.interferer']) }),
});

function stagePoint(chain: ChainSection, stage: Stage, at: LevelAt): LevelPoint {
  const behind = (what: string): PointLevel | undefined => at([behindStage(stage, what)]);
  /** As typed, else worked out from what is given at the stage's input. */
  const limit = (field: 'outputCompression' | 'outputIntercept'): PointLevel | undefined =>
    stage.off === true ? undefined : at([itemId(stage.id, field), itemId(stage.id, STAGE_PARTS[field].part)]);
  return {
    ...pointOfStage(chain, stage),
    ...given({
      wanted: behind('signal'),
      noise: behind('noise'),
      interferer: behind('interferer'),
      compression: limit('outputCompression'),
      intercept: limit('outputIntercept'),
    }),
  };
}

/** The item that tells what has come about behind a stage, by its name within the chain. */
export const behindStage = (stage: Stage, what: string): string => itemId(stage.id, `out.${what}`);

/** What a stage's point is called and leads to. */
export const pointOfStage = (
  chain: ChainSection,
  stage: Stage,
): Pick<LevelPoint, 'key' | 'name' | 'isSymbol' | 'label' | 'link' | 'isBypassed'> => ({
  key: stage.id,
  name: stage.symbol || stage.label || 'stage',
  isSymbol: stage.symbol !== '',
  label: stage.symbol === '' ? '' : stage.label,
  link: { to: 'stage', sectionId: chain.id, stageId: stage.id },
  isBypassed: stage.off === true,
});

/** The levels that there are. */
const given = (levels: Partial<Record<PointLevelName, PointLevel | undefined>>): PointLevels =>
  Object.fromEntries(Object.entries(levels).filter(([, level]) => level !== undefined));

function withSteps(points: readonly LevelPoint[]): readonly LevelPoint[] {
  return points.map((point, index) => {
    const before = points[index - 1]?.wanted;
    return point.wanted === undefined || before === undefined
      ? point
      : { ...point, stepDb: point.wanted.value - before.value };
  });
}

/** A level with its linear value. */
export function levelOf(value: number, unit: DecibelUnit): PointLevel {
  const linear = linearFigure(value, unit);
  return { value, linear: linear === undefined ? '' : `${linear.text} ${linear.unit}` };
}

/** A figure in the unit; undefined while there is none, or no power. */
export function figureIn(
  evaluation: Evaluation,
  lineId: string,
  caseId: string,
  unit: DecibelUnit,
): number | undefined {
  const figure = evaluation.figure(lineId, caseId);
  if (figure.state !== 'value' || !Number.isFinite(figure.value) || figure.unit.form !== 'decibel') return undefined;
  return sameDimension(figure.unit.dimension, unit.dimension)
    ? figure.value + figure.unit.offsetDb - unit.offsetDb
    : undefined;
}

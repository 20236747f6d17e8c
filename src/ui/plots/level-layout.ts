/**
 * The layout of a level diagram: where every stroke, mark and label stands, in px, from the model and the width that there is.
 * Holds: no label meets another or leaves the drawing; a drawing wider than its place is to be scrolled, never squeezed.
 */
import { POINT_LEVELS, type LevelDiagram, type LevelPoint, type PointLevelName } from '../../review';
import { shortened, spreadApart, textWidth } from './boxes';
import { placeLabels, type BracketLayout, type ValueLabel } from './level-labels';
import { describePoint, levelWord, writeStep } from './level-words';
import { niceTicks, writeTick, type Ticks } from './ticks';

export const LABEL_PX = 12;
/** A name that is longer is cut on the drawing; the table has all of it. */
const LONGEST_NAME = 20;
const PLOT_HEIGHT_PX = 300;
const TOP_PX = 34;
const TICK_GAP_PX = 28;
const LINE_PX = 15;
/** Distances between points, px. Names that stand aslant need the least. */
const LEAST_SPACING_PX = 20;
/** Points this far apart have room for figures with two decimals. */
const FULL_FIGURES_PX = 66;
const MOST_SPACING_PX = 200;
const INSET_PX = 22;
/** Below this width, names of levels are short. */
const NARROW_PX = 620;

export interface XY {
  readonly x: number;
  readonly y: number;
}

export interface SeriesLayout {
  readonly name: PointLevelName;
  /** Limits are caps at each point; the others lines through the points. */
  readonly isLimit: boolean;
  /** Unbroken stretches. */
  readonly runs: readonly (readonly XY[])[];
  readonly marks: readonly (XY & { readonly isBypassed: boolean })[];
}

export interface EndLabel {
  readonly name: PointLevelName;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  /** From the last mark to the label. */
  readonly leader: readonly [XY, XY];
}

export interface PointLayout {
  readonly point: LevelPoint;
  readonly x: number;
  /** What can be pressed. */
  readonly left: number;
  readonly width: number;
  readonly name: XY & { readonly text: string; readonly isAslant: boolean };
  /** The step from the point before, midway between the two. */
  readonly step?: XY & { readonly text: string };
  /** What a screen reader says of the point. */
  readonly description: string;
}

export interface LevelLayout {
  readonly width: number;
  readonly height: number;
  readonly plot: { readonly left: number; readonly right: number; readonly top: number; readonly bottom: number };
  /** Down to where a point can be pressed, its name among it. */
  readonly pressBottom: number;
  readonly unit: string;
  readonly ticks: readonly { readonly y: number; readonly text: string }[];
  readonly points: readonly PointLayout[];
  readonly series: readonly SeriesLayout[];
  readonly endLabels: readonly EndLabel[];
  readonly brackets: readonly BracketLayout[];
  readonly values: readonly ValueLabel[];
  readonly remark?: XY & { readonly text: string };
}

export function layoutLevels(
  diagram: LevelDiagram,
  options: { readonly widthPx: number; readonly showLinear: boolean },
): LevelLayout {
  const { points, unit } = diagram;
  const names = POINT_LEVELS.filter((name) => points.some((point) => point[name] !== undefined));
  const levels = names.flatMap((name) => points.flatMap((point) => point[name]?.value ?? []));
  const ticks = niceTicks(Math.min(...levels), Math.max(...levels), 1 + PLOT_HEIGHT_PX / TICK_GAP_PX);
  const isShort = options.widthPx < NARROW_PX;
  const words = names.map((name) => levelWord(diagram, name, isShort));
  const left = Math.ceil(Math.max(...tickTexts(ticks).map((text) => textWidth(text, LABEL_PX)))) + 12;
  const texts = points.map(({ name, isBypassed }) => {
    const short = shortened(name, LONGEST_NAME);
    return isBypassed ? `(${short})` : short;
  });
  const widths = texts.map((text) => textWidth(text, LABEL_PX + 1));
  const endWidth = Math.ceil(Math.max(...words.map((word) => textWidth(word, LABEL_PX)))) + 26;
  const gaps = Math.max(1, points.length - 1);
  /** What stands to the right of the last point, with names aslant or level. */
  const across = (right: number): number => (options.widthPx - left - right - INSET_PX) / gaps;
  const aslantRight = Math.max(endWidth, Math.ceil(Math.max(...widths) * Math.SQRT1_2) + LINE_PX);
  const levelSpacing = Math.min(MOST_SPACING_PX, across(endWidth));
  const manner = mannerOf(widths, levelSpacing, left + INSET_PX, endWidth);
  const right = manner === 'aslant' ? aslantRight : endWidth;
  const spacing = Math.max(LEAST_SPACING_PX, Math.min(MOST_SPACING_PX, across(right)));
  const xAt = (index: number): number => left + INSET_PX + index * spacing;
  const plot = { left, right: xAt(points.length - 1) + INSET_PX / 2, top: TOP_PX, bottom: TOP_PX + PLOT_HEIGHT_PX };
  const width = Math.ceil(xAt(points.length - 1) + right);
  const yAt = (level: number): number =>
    plot.bottom - ((level - ticks.from) / (ticks.to - ticks.from)) * PLOT_HEIGHT_PX;

  const decimals = spacing < FULL_FIGURES_PX ? 1 : 2;
  const stepTexts = points.map(({ stepDb }) => (stepDb === undefined ? '' : `${writeStep(stepDb, decimals)} dB`));
  const hasSteps =
    stepTexts.some((text) => text !== '') && stepTexts.every((text) => textWidth(text, LABEL_PX) < spacing - 4);
  const namesTop = plot.bottom + 6 + (hasSteps ? LINE_PX : 0);
  const placed = points.map((point, index): PointLayout => {
    const x = xAt(index);
    const step = stepTexts[index] ?? '';
    return {
      point,
      x,
      left: x - spacing / 2,
      width: spacing,
      name: {
        ...{ text: texts[index] ?? '', isAslant: manner === 'aslant' },
        ...(manner === 'aslant'
          ? { x: x - 4, y: namesTop + 10 }
          : { x, y: namesTop + 12 + (manner === 'staggered' && index % 2 === 1 ? LINE_PX : 0) }),
      },
      ...(hasSteps && step !== '' ? { step: { x: x - spacing / 2, y: plot.bottom + 15, text: step } } : {}),
      description: describePoint(diagram, point),
    };
  });
  const series = names.map((name) => layoutSeries(name, placed, yAt));
  const namesHeight =
    manner === 'aslant'
      ? Math.ceil(Math.max(...widths) * Math.SQRT1_2) + LINE_PX
      : LINE_PX * (manner === 'level' ? 1 : 2);
  const hasBypassed = points.some(({ isBypassed }) => isBypassed);
  const namesBottom = namesTop + namesHeight + 6;
  const height = Math.ceil(namesBottom + (hasBypassed ? LINE_PX + 4 : 0));
  const endLabels = layoutEnds(series, words, plot);
  return {
    ...{ width, height, plot, unit: unit.word, points: placed, series, endLabels, pressBottom: namesBottom },
    ticks: ticks.values.map((value) => ({ y: yAt(value), text: writeTick(value, ticks.decimals) })),
    ...placeLabels({ points: placed, series, endLabels, plot, spacing, decimals, yAt, showLinear: options.showLinear }),
    ...(hasBypassed ? { remark: { x: 4, y: namesBottom + LINE_PX - 2, text: 'In brackets: bypassed.' } } : {}),
  };
}

const tickTexts = ({ values, decimals }: Ticks): string[] => values.map((value) => writeTick(value, decimals));

/** Names stand level where there is room, in two rows where that helps, else aslant. */
function mannerOf(
  widths: readonly number[],
  spacing: number,
  before: number,
  behind: number,
): 'level' | 'staggered' | 'aslant' {
  const isClear = (each: number): boolean =>
    widths.every((width, index) => {
      const next = widths[index + each];
      return next === undefined || (width + next) / 2 + 6 <= spacing * each;
    });
  // The first and the second name may not begin left of the drawing.
  if (spacing < LEAST_SPACING_PX || (widths[0] ?? 0) / 2 > before || (widths[1] ?? 0) / 2 > before + spacing)
    return 'aslant';
  // Nor may the last two end right of it.
  if ((widths.at(-1) ?? 0) / 2 > behind || (widths.at(-2) ?? 0) / 2 > behind + spacing) return 'aslant';
  return isClear(1) ? 'level' : isClear(2) ? 'staggered' : 'aslant';
}

function layoutSeries(
  name: PointLevelName,
  points: readonly PointLayout[],
  yAt: (level: number) => number,
): SeriesLayout {
  const isLimit = name === 'compression' || name === 'intercept';
  const runs: XY[][] = [];
  const marks: (XY & { isBypassed: boolean })[] = [];
  let run: XY[] | undefined;
  for (const { point, x } of points) {
    const level = point[name];
    if (level === undefined) {
      run = undefined;
      continue;
    }
    const at = { x, y: yAt(level.value) };
    marks.push({ ...at, isBypassed: point.isBypassed });
    if (run === undefined) runs.push((run = []));
    run.push(at);
  }
  return { name, isLimit, runs: isLimit ? [] : runs.filter(({ length }) => length > 1), marks };
}

function layoutEnds(
  series: readonly SeriesLayout[],
  words: readonly string[],
  plot: LevelLayout['plot'],
): readonly EndLabel[] {
  const ends = series.map(({ marks }) => marks.at(-1) ?? { x: plot.right, y: plot.top });
  const heights = spreadApart(
    ends.map(({ y }) => y),
    LINE_PX,
    plot.top,
    plot.bottom - 2,
  );
  const x = plot.right + 6;
  return series.map(({ name, isLimit }, index) => {
    const end = ends[index] ?? { x: plot.right, y: plot.top };
    const y = heights[index] ?? end.y;
    const from = { x: end.x + (isLimit ? 9 : 5), y: end.y };
    return { name, text: words[index] ?? '', x, y: y + 4, leader: [from, { x: x - 2, y }] };
  });
}

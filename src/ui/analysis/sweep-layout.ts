/**
 * The layout of a sweep: a curve a case with its name at its end, the bound of the requirement, and where they cross.
 * Holds: places without a figure are gaps; names at the ends stand apart from each other; a crossing without room for its label
 * keeps its mark, and the sentences beside the plot tell it.
 */
import type { SweepView, SweptCurve } from '../../app/analysis-sweep';
import { figureWords, nameOf } from '../../app/analysis-names';
import type { AxesLayout } from '../plots/axes';
import { boxAround, Room, shortened, spreadApart, textWidth, type Box } from '../plots/boxes';
import { writeFigureAt } from '../plots/curve-layout';
import { logarithmicTicks, niceTicks, writeTick, type Ticks } from '../plots/ticks';

const LABEL_PX = 12;
const PLOT_HEIGHT_PX = 260;
const LEAST_WIDTH_PX = 300;
const MOST_WIDTH_PX = 900;
const TOP_PX = 34;
const LONGEST_NAME = 16;
/** Pieces of a curve that labels keep clear of. */
const STROKE_PX = 6;
/** Strokes by which curves are told apart without colour. */
const DASHES = ['', '7 4', '2 3', '10 3 2 3', '1 5', '14 4'] as const;

export interface SweepLayout extends AxesLayout {
  readonly curves: readonly {
    readonly caseId: string;
    readonly path: string;
    readonly dash: string;
    readonly label?: { readonly x: number; readonly y: number; readonly text: string };
  }[];
  readonly limits: readonly {
    readonly y: number;
    /** Absent where there is no room. */
    readonly label?: { readonly x: number; readonly y: number; readonly text: string };
  }[];
  readonly crossings: readonly {
    readonly key: string;
    readonly x: number;
    readonly y: number;
    readonly label?: { readonly x: number; readonly y: number; readonly text: string };
  }[];
  /** Where the varied figure stands now; absent outside the range. */
  readonly now?: number;
}

/** The layout; undefined where there is no figure at all. */
export function layoutSweep(view: SweepView, widthPx: number): SweepLayout | undefined {
  const { curves, input, unit, range, target } = view;
  const limits = [...new Set(curves.flatMap(({ limit }) => (limit === undefined ? [] : [limit])))].filter(
    Number.isFinite,
  );
  const figures = curves.flatMap((curve) => Array.from(curve.figures).filter(Number.isFinite));
  if (figures.length === 0) return undefined;
  const [least, most] = [...figures, ...limits].reduce<readonly [number, number]>(
    ([low, high], y) => [Math.min(low, y), Math.max(high, y)],
    [Infinity, -Infinity],
  );
  const yScale = niceTicks(least, most, 8);
  const yTexts = textsOf(yScale, false);
  const left = Math.ceil(Math.max(...yTexts.map((text) => textWidth(text, LABEL_PX)))) + 14;
  const width = Math.max(LEAST_WIDTH_PX, Math.min(MOST_WIDTH_PX, Math.floor(widthPx)));
  const isNamed = curves.length > 1;
  const nameWidth = Math.max(0, ...curves.map(({ name }) => textWidth(shortened(name, LONGEST_NAME), LABEL_PX)));
  const plot: Box = {
    left,
    top: TOP_PX,
    right: width - (isNamed ? nameWidth + 12 : 24),
    bottom: TOP_PX + PLOT_HEIGHT_PX,
  };
  const { isLogarithmic } = range;
  const place = isLogarithmic ? Math.log : (x: number): number => x;
  const [low, high] = range.from < range.to ? [range.from, range.to] : [range.to, range.from];
  const xAt = (x: number): number =>
    plot.left + ((place(x) - place(low)) / (place(high) - place(low))) * (plot.right - plot.left);
  const yAt = (y: number): number =>
    plot.bottom - ((y - yScale.from) / (yScale.to - yScale.from)) * (plot.bottom - plot.top);
  const xTicks = ticksWithin(low, high, isLogarithmic, xAt);
  const ends = curves.map((curve) => endOf(curve, view.places, xAt, yAt));
  const shown = ends.flatMap((end) => (end === undefined ? [] : [end.y]));
  const heights = spreadApart(shown, 15, plot.top, plot.bottom);
  let at = 0;
  const drawn = curves.map((curve, index) => {
    const end = ends[index];
    const height = end === undefined ? undefined : heights[at++];
    return {
      ...{
        caseId: curve.caseId,
        path: pathOf(curve, view.places, xAt, yAt),
        dash: DASHES[index % DASHES.length] ?? '',
      },
      ...(isNamed &&
        height !== undefined && {
          label: { x: plot.right + 6, y: height + 4, text: shortened(curve.name, LONGEST_NAME) },
        }),
    };
  });
  const axis = (name: string, word: string | undefined): string =>
    word === undefined || word === '1' ? name : `${name}, ${word}`;
  const xTitle = axis(nameOf(input), input.unit.word);
  return {
    ...{ width, height: plot.bottom + 50, plot, xTicks, curves: drawn },
    yTicks: yScale.values.map((value, index) => ({ y: yAt(value), text: yTexts[index] ?? '' })),
    xTitle: { x: (plot.left + plot.right) / 2, y: plot.bottom + 40, text: shortened(xTitle, Math.floor(width / 8)) },
    yTitle: { x: 4, y: 14, text: shortened(axis(nameOf(target), unit?.word), Math.floor(width / 8)) },
    ...placeLabels(view, { xAt, yAt, plot, limits }),
    ...(input.figure >= low && input.figure <= high && { now: xAt(input.figure) }),
  };
}

type Along = (value: number) => number;

/** The last place of a curve that has a figure. */
function endOf(
  { figures }: SweptCurve,
  places: Float64Array,
  xAt: Along,
  yAt: Along,
): { readonly y: number } | undefined {
  const rightmost =
    (places[0] ?? 0) <= (places.at(-1) ?? 0)
      ? figures.findLastIndex(Number.isFinite)
      : figures.findIndex(Number.isFinite);
  return rightmost < 0 || !Number.isFinite(xAt(places[rightmost] ?? NaN))
    ? undefined
    : { y: yAt(figures[rightmost] ?? NaN) };
}

/** Strokes over the places that have a figure; a figure alone between gaps is a dot. */
function pathOf({ figures }: SweptCurve, places: Float64Array, xAt: Along, yAt: Along): string {
  let path = '';
  let isDrawing = false;
  figures.forEach((figure, index) => {
    if (!Number.isFinite(figure)) {
      isDrawing = false;
      return;
    }
    const point = `${xAt(places[index] ?? NaN).toFixed(1)} ${yAt(figure).toFixed(1)}`;
    const isAlone = !isDrawing && !Number.isFinite(figures[index + 1]);
    path += isDrawing ? `L${point}` : isAlone ? `M${point}h0.1` : `M${point}`;
    isDrawing = true;
  });
  return path;
}

const textsOf = ({ values, decimals }: Ticks, isLogarithmic: boolean): string[] =>
  values.map((value) =>
    Math.abs(value) >= 1e6 || decimals > 4 || isLogarithmic ? writeFigureAt(value, 6) : writeTick(value, decimals),
  );

/** As many ticks as have room for their figures, none of them beyond the range. */
function ticksWithin(low: number, high: number, isLogarithmic: boolean, xAt: Along): SweepLayout['xTicks'] {
  for (let most = 10; ; most--) {
    const ticks = (isLogarithmic ? logarithmicTicks : niceTicks)(low, high, most);
    const texts = textsOf(ticks, isLogarithmic);
    const dust = 1e-9 * Math.max(Math.abs(low), Math.abs(high));
    const within = ticks.values.flatMap((value, index) =>
      value < low - dust || value > high + dust ? [] : [{ x: xAt(value), text: texts[index] ?? '' }],
    );
    const isClear = within.every(({ x, text }, index) => {
      const next = within[index + 1];
      return next === undefined || (textWidth(text, LABEL_PX) + textWidth(next.text, LABEL_PX)) / 2 + 8 <= next.x - x;
    });
    if (isClear || most <= 3) return within;
  }
}

/** The labels of bounds and crossings: beside the curves and each other. */
function placeLabels(
  view: SweepView,
  {
    xAt,
    yAt,
    plot,
    limits,
  }: { readonly xAt: Along; readonly yAt: Along; readonly plot: Box; readonly limits: readonly number[] },
): Pick<SweepLayout, 'limits' | 'crossings'> {
  const room = new Room(plot);
  for (const limit of limits) room.takeStroke(plot.left, yAt(limit), plot.right, yAt(limit));
  for (const curve of view.curves) takeCurve(room, curve, view.places, xAt, yAt);
  const found = view.curves.flatMap(({ caseId, limit, crossings }) =>
    limit === undefined
      ? []
      : crossings.map((at) => ({ key: `${caseId} ${String(at)}`, at, x: xAt(at), y: yAt(limit) })),
  );
  for (const { x, y } of found) room.take(boxAround(x, y, 7, 7));
  // The bound's name first: where the curves cross it is told beside the plot as well.
  const named = limits.map((limit) => {
    const text = `${view.bound ?? 'bound'} ${figureWords(limit, view.unit)}`;
    const box = room.place(along(yAt(limit), plot, textWidth(text, LABEL_PX)));
    return { y: yAt(limit), ...(box !== undefined && { label: { x: box.left, y: box.bottom - 4, text } }) };
  });
  const crossings = found.map(({ key, at, x, y }) => {
    const text = figureWords(at, view.input.unit);
    const box = room.place(near(x, y, textWidth(text, LABEL_PX)));
    return { ...{ key, x, y }, ...(box !== undefined && { label: { x: box.left, y: box.bottom - 4, text } }) };
  });
  return { limits: named, crossings };
}

/** Takes the strokes of a curve; of a fine one, only places that lie apart. */
function takeCurve(room: Room, { figures }: SweptCurve, places: Float64Array, xAt: Along, yAt: Along): void {
  let from: { readonly x: number; readonly y: number } | undefined;
  figures.forEach((figure, index) => {
    if (!Number.isFinite(figure)) {
      from = undefined;
      return;
    }
    const to = { x: xAt(places[index] ?? NaN), y: yAt(figure) };
    const isEnd = !Number.isFinite(figures[index + 1]);
    if (from !== undefined && !isEnd && Math.hypot(to.x - from.x, to.y - from.y) < STROKE_PX) return;
    if (from !== undefined) room.takeStroke(from.x, from.y, to.x, to.y);
    from = to;
  });
}

/** Boxes above and below a level stroke. */
function* along(y: number, plot: Box, width: number): Generator<Box> {
  const last = plot.right - width - 4;
  for (const top of [y - 19, y + 3])
    for (let left = plot.left + 4; left <= last; left += 12) yield { left, right: left + width, top, bottom: top + 16 };
}

/** Boxes around a mark, the nearest first. */
function* near(x: number, y: number, width: number): Generator<Box> {
  const height = 16;
  for (let off = 9; off <= 81; off += 9)
    for (const top of [y - off - height, y + off])
      for (const left of [x + 4, x - 4 - width, x - width / 2, x + off, x - off - width])
        yield { left, right: left + width, top, bottom: top + height };
}

/** What the drawing says, for those who do not see it. */
export function describeSweep(view: SweepView): string {
  const { from, to, isLogarithmic } = view.range;
  const { unit } = view.input;
  const range = `${nameOf(view.target)} while ${nameOf(view.input)} goes from ${figureWords(from, unit)} to ${figureWords(to, unit)}${isLogarithmic ? ', by its logarithm' : ''}.`;
  return [range, ...view.words].join(' ');
}

/**
 * The layout of what trials gave: bars or the cumulative curve over the figure's axis, and upright marks for the requirement,
 * the nominal figure and the limits.
 * Holds: every mark on the axis has its words, and no words meet another's words or stroke; a mark further away than the trials
 * are wide is left out and told in words.
 */
import type { Spectrum } from '../../jobs';
import type { AxesLayout } from '../plots/axes';
import { boxesMeet, textWidth, type Box } from '../plots/boxes';
import { niceTicks, writeTick, type Ticks } from '../plots/ticks';

export type HistogramForm = 'bars' | 'cumulative';
export type MarkStyle = 'requirement' | 'nominal' | 'limit' | 'rss';

export interface HistogramMark {
  /** What it is, in words. */
  readonly name: string;
  readonly value: number;
  readonly style: MarkStyle;
}

export interface HistogramOptions {
  readonly widthPx: number;
  readonly form: HistogramForm;
  /** Trials that have a figure, those without power among them. */
  readonly given: number;
  readonly xTitle: string;
  /** Which side of the requirement fails. */
  readonly failing?: { readonly side: 'below' | 'above'; readonly limit: number } | undefined;
}

export interface Bar {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly isFailing: boolean;
}

export interface PlacedMark extends HistogramMark {
  readonly x: number;
  /** Where its words end and its stroke begins. */
  readonly y: number;
  readonly text: string;
  readonly textX: number;
  readonly textY: number;
  readonly box: Box;
}

export interface HistogramLayout extends AxesLayout {
  readonly bars: readonly Bar[];
  readonly curve: readonly { readonly x: number; readonly y: number }[];
  readonly marks: readonly PlacedMark[];
  /** Marks that are off the axis, in words. */
  readonly outside: readonly string[];
}

const PLOT_HEIGHT_PX = 210;
const LEAST_WIDTH_PX = 290;
const MOST_WIDTH_PX = 900;
export const MARK_LABEL_PX = 12;
const ROW_PX = 17;
const TITLE_PX = 20;
/** Above the plot: room for the topmost figure of the axis beside it. */
const HEAD_GAP_PX = 12;
const LEAST_HEAD_PX = 12;
const BAR_PX = 8;

/** Bars or points: the bins of a spectrum joined, each with its share of all trials that have a figure. */
export interface Slice {
  readonly from: number;
  readonly to: number;
  readonly count: number;
  /** Of all trials with a figure, in per cent. */
  readonly percent: number;
  /** At or below `to`, in per cent. */
  readonly atOrBelow: number;
}

/** The bins of a spectrum joined into `most` slices or fewer, of equal width. */
export function slicesOf({ from, step, counts, above }: Spectrum, given: number, most: number): readonly Slice[] {
  const size = Math.max(1, Math.ceil(counts.length / Math.max(1, most)));
  const inBins = counts.reduce((sum, count) => sum + count, 0);
  // All that is in no bin and not above them is below: without power, for one.
  let before = given - inBins - above;
  const slices: Slice[] = [];
  for (let first = 0; first < counts.length; first += size) {
    const count = counts.subarray(first, first + size).reduce((sum, one) => sum + one, 0);
    before += count;
    slices.push({
      from: from + first * step,
      to: from + (first + size) * step,
      count,
      percent: percentOf(count, given),
      atOrBelow: percentOf(before, given),
    });
  }
  return slices;
}

const percentOf = (count: number, all: number): number => (all > 0 ? (100 * count) / all : 0);

export function layoutHistogram(
  spectrum: Spectrum,
  allMarks: readonly HistogramMark[],
  options: HistogramOptions,
): HistogramLayout {
  const { form, given, failing } = options;
  const width = Math.max(LEAST_WIDTH_PX, Math.min(MOST_WIDTH_PX, Math.floor(options.widthPx)));
  const [low, high] = [spectrum.from, spectrum.from + spectrum.step * spectrum.counts.length];
  const reach = high > low ? high - low : Math.max(1e-3, 0.1 * Math.abs(low));
  const known = allMarks.filter(({ value }) => Number.isFinite(value));
  const drawn = known.filter(({ value }) => value >= low - reach && value <= high + reach);
  const range: readonly [number, number] = [
    Math.min(low, ...drawn.map(({ value }) => value)),
    Math.max(high, ...drawn.map(({ value }) => value)),
  ];
  const right = width - 26;
  const slices = slicesOf(
    spectrum,
    given,
    form === 'bars' ? Math.floor((right - 50) / BAR_PX) : spectrum.counts.length,
  );
  const most = form === 'bars' ? Math.max(...slices.map(({ percent }) => percent), 1e-6) : 100;
  const yScale = niceTicks(0, most, 1 + PLOT_HEIGHT_PX / 36);
  const yTexts = yScale.values.map((value) => writeTick(value, yScale.decimals));
  const left = Math.ceil(Math.max(...yTexts.map((text) => textWidth(text, MARK_LABEL_PX)))) + 14;
  const xScale = fittingTicks(range, right - left);
  const xAt = (value: number): number => left + ((value - xScale.from) / (xScale.to - xScale.from)) * (right - left);
  // Words first, over a plot that begins at 0: how high they reach tells where it begins.
  const words = placeMarks(drawn, xAt, { left: 0, right: width });
  const top = TITLE_PX + Math.ceil(Math.max(LEAST_HEAD_PX, ...words.map(({ box }) => -box.top)));
  const bottom = top + PLOT_HEIGHT_PX;
  const plot: Box = { left, top, right, bottom };
  const yAt = (percent: number): number =>
    bottom - ((percent - yScale.from) / (yScale.to - yScale.from)) * (bottom - top);
  const fails = (middle: number): boolean =>
    failing !== undefined && (failing.side === 'below' ? middle < failing.limit : middle > failing.limit);
  return {
    ...{ width, height: bottom + 46, plot },
    xTicks: xScale.values.map((value) => ({ x: xAt(value), text: writeTick(value, xScale.decimals) })),
    yTicks: yScale.values.map((value, index) => ({ y: yAt(value), text: yTexts[index] ?? '' })),
    xTitle: { x: (left + right) / 2, y: bottom + 38, text: options.xTitle },
    yTitle: { x: 4, y: 13, text: form === 'bars' ? 'Trials in each bar, %' : 'Trials at or below, %' },
    bars:
      form === 'bars'
        ? slices.map(({ from, to, percent }) => {
            const x = xAt(from);
            return {
              ...{ x, y: yAt(percent), height: bottom - yAt(percent), isFailing: fails((from + to) / 2) },
              // Equal figures are a bar all the same.
              width: Math.max(2, xAt(to) - x - 1),
            };
          })
        : [],
    curve: form === 'bars' ? [] : curveThrough(slices, low, given).map(([x, y]) => ({ x: xAt(x), y: yAt(y) })),
    marks: words.map((mark) => lowered(mark, top)),
    outside: known
      .filter((mark) => !drawn.includes(mark))
      .map(({ name, value }) => `Not drawn: “${name}”, far ${value < low ? 'below' : 'above'} all trials.`),
  };
}

function curveThrough(slices: readonly Slice[], low: number, given: number): readonly (readonly [number, number])[] {
  const [first] = slices;
  const start = first === undefined ? 0 : first.atOrBelow - percentOf(first.count, given);
  return [[low, start] as const, ...slices.map(({ to, atOrBelow }) => [to, atOrBelow] as const)];
}

/** As many ticks as have room for their figures. */
function fittingTicks([low, high]: readonly [number, number], widthPx: number): Ticks {
  for (let most = 12; most > 3; most--) {
    const ticks = niceTicks(low, high, most);
    const widest = Math.max(...ticks.values.map((value) => textWidth(writeTick(value, ticks.decimals), MARK_LABEL_PX)));
    if ((widest + 12) * (ticks.values.length - 1) <= widthPx) return ticks;
  }
  return niceTicks(low, high, 3);
}

/**
 * Words above the plot, each as low as can be, in the middle of its stroke or beside it: strokes go down from the words, so words
 * may not stand where a stroke from above passes. Found by trying; there are six marks at most.
 */
function placeMarks(
  marks: readonly HistogramMark[],
  xAt: (value: number) => number,
  edge: { readonly left: number; readonly right: number },
): readonly PlacedMark[] {
  const sorted = [...marks].sort((a, b) => a.value - b.value);
  const placed: PlacedMark[] = [];
  let triesLeft = MOST_TRIES;
  const candidates = sorted.map((mark) => candidatesFor(mark, xAt(mark.value), marks.length, edge));
  const place = (index: number): boolean => {
    const own = candidates[index];
    if (own === undefined) return true;
    for (const candidate of own) {
      if (triesLeft-- <= 0) return false;
      if (!placed.every((other) => areApart(candidate, other))) continue;
      placed.push(candidate);
      if (place(index + 1)) return true;
      placed.pop();
    }
    return false;
  };
  // What cannot be told apart by words above is told by the line below the plot and in the table.
  return place(0) ? placed : candidates.flatMap(([first]) => (first === undefined ? [] : [{ ...first, text: '' }]));
}

const MOST_TRIES = 50_000;
const BESIDE_PX = 6;

function candidatesFor(
  mark: HistogramMark,
  x: number,
  rows: number,
  edge: { readonly left: number; readonly right: number },
): readonly PlacedMark[] {
  const width = textWidth(mark.name, MARK_LABEL_PX);
  const middle = Math.min(Math.max(x - width / 2, edge.left + 2), edge.right - width - 2);
  const lefts = [middle, x + BESIDE_PX, x - width - BESIDE_PX].filter(
    (left) => left >= edge.left + 2 && left + width <= edge.right - 2,
  );
  return Array.from({ length: rows }, (_, row) => -HEAD_GAP_PX - row * ROW_PX).flatMap((y) =>
    lefts.map((left): PlacedMark => ({
      ...mark,
      // Beside the stroke, words and stroke begin at one height.
      ...{ x, y: left === middle ? y + 4 : y - 10, text: mark.name, textX: left, textY: y },
      box: { left: left - 2, right: left + width + 2, top: y - 12, bottom: y + 3 },
    })),
  );
}

const lowered = (mark: PlacedMark, by: number): PlacedMark => ({
  ...mark,
  ...{ y: mark.y + by, textY: mark.textY + by },
  box: { ...mark.box, top: mark.box.top + by, bottom: mark.box.bottom + by },
});

/** Neither words meet words, nor does a stroke pass through the other's words. */
const areApart = (a: PlacedMark, b: PlacedMark): boolean =>
  !boxesMeet(a.box, b.box) && !passes(a, b.box) && !passes(b, a.box);

const passes = ({ x, y }: PlacedMark, box: Box): boolean => y < box.bottom && x > box.left - 2 && x < box.right + 2;

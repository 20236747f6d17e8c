/**
 * The layout of a curve's plot: the table's points, the curve between them, and the places at which lines read it.
 * Holds: the curve drawn is the one that calls evaluate; labels meet no mark and no other label, and one without room is left
 * to the table.
 */
import { makeCurve, writeSignificant, type Curve } from '../../quantity';
import type { CurveUse } from '../../review';
import type { CurveSection } from '../../worksheet';
import type { AxesLayout } from './axes';
import { boxAround, Room, shortened, textWidth, type Box } from './boxes';
import { logarithmicTicks, niceTicks, writeTick, type Ticks } from './ticks';

export const CURVE_LABEL_PX = 12;
const PLOT_HEIGHT_PX = 280;
const MOST_WIDTH_PX = 900;
const LEAST_WIDTH_PX = 300;
const TOP_PX = 34;
const TICK_GAP_PX = 36;
const SAMPLES = 240;
const LONGEST_NAME = 24;

export interface CurveUseLayout {
  readonly key: string;
  readonly x: number;
  readonly y: number;
  /** Lines that read the curve at this place. */
  readonly uses: readonly CurveUse[];
  /** Absent where there is no room. */
  readonly label?: { readonly x: number; readonly y: number; readonly text: string; readonly box: Box };
  readonly description: string;
}

export interface CurveLayout extends AxesLayout {
  readonly line: readonly { readonly x: number; readonly y: number }[];
  readonly points: readonly { readonly x: number; readonly y: number }[];
  readonly uses: readonly CurveUseLayout[];
  /** Uses beyond the ends of the curve, in words. */
  readonly outside: readonly string[];
}

/** The curve of a section; undefined while its table is none. */
export function curveOf(section: CurveSection): Curve | undefined {
  const made = makeCurve({
    x: section.x,
    y: section.y,
    isMonotone: section.interpolation === 'monotone',
    isLogarithmic: section.logarithmic === true,
    points: section.points,
  });
  return made.ok ? made.value : undefined;
}

/** An axis in words: what it is, and its unit. */
export const axisTitle = (
  { label, unit }: { readonly label: string; readonly unit: string },
  otherwise: string,
): string =>
  [label.trim() || otherwise, unit.trim() === '1' ? '' : unit.trim()].filter((part) => part !== '').join(', ');

/** A figure on an axis or beside a mark. */
export const writeFigureAt = (value: number, significant = 4): string =>
  writeSignificant(value, significant).replace(/-/g, '−');

/** The name by which a line is called beside its mark. */
export const nameOfUse = ({ symbol, label }: CurveUse): string => symbol || label || 'a line';

export function layoutCurve(
  section: CurveSection,
  uses: readonly CurveUse[],
  options: { readonly widthPx: number },
): CurveLayout | undefined {
  const curve = curveOf(section);
  if (curve === undefined) return undefined;
  const isLogarithmic = section.logarithmic === true;
  const samples = sampled(curve, isLogarithmic, section.points);
  const ys = samples.map(([, y]) => y);
  const yScale = niceTicks(Math.min(...ys), Math.max(...ys), 1 + PLOT_HEIGHT_PX / TICK_GAP_PX);
  const yTexts = textsOf(yScale);
  const left = Math.ceil(Math.max(...yTexts.map((text) => textWidth(text, CURVE_LABEL_PX)))) + 14;
  const width = Math.max(LEAST_WIDTH_PX, Math.min(MOST_WIDTH_PX, Math.floor(options.widthPx)));
  // The half of the last tick's figure.
  const plot: Box = { left, top: TOP_PX, right: width - 36, bottom: TOP_PX + PLOT_HEIGHT_PX };
  const xScale = fittingTicks(curve, isLogarithmic, plot.right - plot.left);
  const place = isLogarithmic ? Math.log : (x: number): number => x;
  const [start, end] = [place(xScale.from), place(xScale.to)];
  const xAt = (x: number): number => plot.left + ((place(x) - start) / (end - start)) * (plot.right - plot.left);
  const yAt = (y: number): number =>
    plot.bottom - ((y - yScale.from) / (yScale.to - yScale.from)) * (plot.bottom - plot.top);
  const line = samples.map(([x, y]) => ({ x: xAt(x), y: yAt(y) }));
  const points = section.points.map(([x, y]) => ({ x: xAt(x), y: yAt(y) }));
  const xTexts = textsOf(xScale, isLogarithmic);
  const xTitle = axisTitle(section.x, 'x');
  return {
    ...{ width, height: plot.bottom + 50, plot, line, points },
    xTicks: xScale.values.map((value, index) => ({ x: xAt(value), text: xTexts[index] ?? '' })),
    yTicks: yScale.values.map((value, index) => ({ y: yAt(value), text: yTexts[index] ?? '' })),
    xTitle: { x: (plot.left + plot.right) / 2, y: plot.bottom + 40, text: fitted(xTitle, width - 40) },
    yTitle: { x: 4, y: 14, text: fitted(axisTitle(section.y, 'y'), width - 12) },
    uses: placeUses(section, uses, { xAt, yAt, plot, line, points }),
    outside: uses
      .filter(({ y }) => y === undefined)
      .map((use) => `${nameOfUse(use)} reads the curve at ${withUnit(use.x, section.x.unit)}, where it has no value.`),
  };
}

const withUnit = (value: number, unit: string): string =>
  unit.trim() === '1' || unit.trim() === '' ? writeFigureAt(value) : `${writeFigureAt(value)} ${unit.trim()}`;

/** A title that is not wider than its room. */
const fitted = (text: string, width: number): string => shortened(text, Math.floor(width / (CURVE_LABEL_PX * 0.6)));

/** Places on the curve, the table's own among them, in order. */
function sampled(
  curve: Curve,
  isLogarithmic: boolean,
  points: CurveSection['points'],
): readonly (readonly [number, number])[] {
  const { from, to } = curve;
  const between = Array.from({ length: SAMPLES - 1 }, (_, i) => {
    const share = (i + 1) / SAMPLES;
    return isLogarithmic ? from * (to / from) ** share : from + (to - from) * share;
  });
  return [...points.map(([x]) => x), ...between].sort((a, b) => a - b).map((x) => [x, curve.at(x)] as const);
}

const textsOf = ({ values, decimals }: Ticks, isLogarithmic = false): string[] =>
  values.map((value) =>
    Math.abs(value) >= 1e6 || decimals > 4
      ? writeFigureAt(value, 6)
      : writeTick(value, isLogarithmic ? decimalsOf(value, decimals) : decimals),
  );

/** Ticks of a logarithmic axis differ in size; each has the decimals that it needs itself. */
const decimalsOf = (value: number, decimals: number): number => {
  let least = 0;
  while (least < decimals && Math.abs(Number(value.toFixed(least)) - value) > 1e-9 * Math.abs(value)) least++;
  return least;
};

/** As many ticks as have room for their figures. */
function fittingTicks(curve: Curve, isLogarithmic: boolean, widthPx: number): Ticks {
  const make = isLogarithmic ? logarithmicTicks : niceTicks;
  const place = isLogarithmic ? Math.log : (x: number): number => x;
  for (let most = 12; most > 3; most--) {
    const ticks = make(curve.from, curve.to, most);
    const texts = textsOf(ticks, isLogarithmic);
    const perUnit = widthPx / (place(ticks.to) - place(ticks.from));
    const isClear = ticks.values.every((value, index) => {
      const next = ticks.values[index + 1];
      if (next === undefined) return true;
      const room = (place(next) - place(value)) * perUnit;
      return (
        (textWidth(texts[index] ?? '', CURVE_LABEL_PX) + textWidth(texts[index + 1] ?? '', CURVE_LABEL_PX)) / 2 + 8 <=
        room
      );
    });
    if (isClear) return ticks;
  }
  return make(curve.from, curve.to, 3);
}

interface Drawn {
  readonly xAt: (x: number) => number;
  readonly yAt: (y: number) => number;
  readonly plot: Box;
  readonly line: CurveLayout['line'];
  readonly points: CurveLayout['points'];
}

function placeUses(
  section: CurveSection,
  uses: readonly CurveUse[],
  { xAt, yAt, plot, line, points }: Drawn,
): readonly CurveUseLayout[] {
  const places = new Map<number, CurveUse[]>();
  for (const use of uses) if (use.y !== undefined) places.set(use.x, [...(places.get(use.x) ?? []), use]);
  const room = new Room(plot);
  for (const { x, y } of points) room.take(boxAround(x, y, 5, 5));
  line.slice(1).forEach((to, index) => {
    const from = line[index] ?? to;
    room.takeStroke(from.x, from.y, to.x, to.y);
  });
  const found = [...places].map(([x, there]) => ({ x: xAt(x), y: yAt(there[0]?.y ?? NaN), at: x, there }));
  for (const { x, y } of found) {
    room.take(boxAround(x, y, 7, 7));
    room.takeStroke(x, y, x, plot.bottom);
  }
  return found.map(({ x, y, at, there }) => {
    const names = [...new Set(there.map(nameOfUse))];
    const figure = withUnit(there[0]?.y ?? NaN, section.y.unit);
    const text = `${shortened(names.join(', '), LONGEST_NAME)}: ${figure}`;
    const box = room.place(near(x, y, textWidth(text, CURVE_LABEL_PX)));
    return {
      ...{ key: String(at), x, y, uses: there },
      ...(box === undefined ? {} : { label: { x: box.left, y: box.bottom - 4, text, box } }),
      description: `${names.join(', ')}: ${figure} at ${withUnit(at, section.x.unit)}`,
    };
  });
}

/** Boxes around a mark, the nearest first. */
function* near(x: number, y: number, width: number): Generator<Box> {
  const height = 16;
  for (let off = 10; off <= 90; off += 8)
    for (const top of [y - off - height, y - height / 2, y + off])
      for (const left of [x + off, x - off - width, x - width / 2])
        yield { left, right: left + width, top, bottom: top + height };
}

/** The points of the table and the uses of the curve, in the order of x. */
export function tableRows(
  section: CurveSection,
  uses: readonly CurveUse[],
): readonly { readonly x: number; readonly y: number | undefined; readonly use?: CurveUse }[] {
  return [...section.points.map(([x, y]) => ({ x, y })), ...uses.map((use) => ({ x: use.x, y: use.y, use }))].sort(
    (a, b) => a.x - b.x,
  );
}

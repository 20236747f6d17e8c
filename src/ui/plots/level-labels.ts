/**
 * Labels inside a level diagram: S/N brackets with their figures, and levels beside their marks where there is room.
 * Holds: the first and the last S/N have their figures; all others, and levels, only where they meet nothing.
 */
import { boxAround, Room, textWidth, type Box } from './boxes';
import type { EndLabel, PointLayout, SeriesLayout, XY } from './level-layout';
import { writeTick } from './ticks';

const SMALL_PX = 11;
const ROW_PX = 13;
/** Between points this far apart, every S/N has its bracket. */
const EVERY_BRACKET_PX = 92;

export interface BracketLayout {
  readonly x: number;
  readonly top: number;
  readonly bottom: number;
  /** `isBefore`: to the left of the bracket, where it ends. */
  readonly text: XY & { readonly words: string; readonly isBefore: boolean };
  readonly box: Box;
}

export interface ValueLabel {
  readonly series: SeriesLayout['name'];
  readonly x: number;
  /** Baselines. */
  readonly lines: readonly { readonly y: number; readonly text: string; readonly isLinear: boolean }[];
  readonly box: Box;
}

interface Placing {
  readonly points: readonly PointLayout[];
  readonly series: readonly SeriesLayout[];
  readonly endLabels: readonly EndLabel[];
  readonly plot: Box;
  readonly spacing: number;
  /** Of levels. */
  readonly decimals: number;
  readonly yAt: (level: number) => number;
  readonly showLinear: boolean;
}

export function placeLabels(placing: Placing): {
  readonly brackets: readonly BracketLayout[];
  readonly values: readonly ValueLabel[];
} {
  const { plot, series, endLabels } = placing;
  // Labels may stand above the uppermost tick, beside the unit of the axis.
  const room = new Room({ ...plot, top: plot.top - 16 });
  for (const { runs, marks, isLimit } of series) {
    for (const { x, y } of marks) room.take(boxAround(x, y, isLimit ? 10 : 6, isLimit ? 4 : 6));
    for (const run of runs)
      run.slice(1).forEach((to, index) => {
        const from = run[index] ?? to;
        room.takeStroke(from.x, from.y, to.x, to.y);
      });
  }
  for (const { leader } of endLabels) room.takeStroke(leader[0].x, leader[0].y, leader[1].x, leader[1].y);
  const brackets = placeBrackets(placing, room);
  return { brackets, values: placeValues(placing, room) };
}

function placeBrackets({ points, spacing, yAt, plot }: Placing, room: Room): readonly BracketLayout[] {
  const withRatio = points.filter(({ point }) => point.snrDb !== undefined && point.wanted && point.noise);
  const ends = [withRatio[0], withRatio.at(-1)].filter((end) => end !== undefined);
  const others = spacing >= EVERY_BRACKET_PX ? withRatio.slice(1, -1) : [];
  const brackets: BracketLayout[] = [];
  for (const place of new Set([...ends, ...others])) {
    const { point, x } = place;
    if (point.wanted === undefined || point.noise === undefined || point.snrDb === undefined) continue;
    const [top = 0, bottom = 0] = [yAt(point.wanted.value), yAt(point.noise.value)].sort((a, b) => a - b);
    const words = `S/N ${writeTick(point.snrDb, 1)} dB`;
    const isEnd = ends.includes(place);
    const box = room.place(besides(x, (top + bottom) / 2, textWidth(words, SMALL_PX), isEnd ? plot : undefined));
    if (box === undefined) continue;
    room.takeStroke(x, top, x, bottom);
    const isBefore = box.right < x;
    brackets.push({
      x,
      top,
      bottom,
      text: { x: isBefore ? box.right : box.left, y: box.bottom - 3, words, isBefore },
      box,
    });
  }
  return brackets;
}

/** Boxes to the right and left of a place, further and further from it where `within` says how far. */
function* besides(x: number, y: number, width: number, within?: Box): Generator<Box> {
  const reach = within === undefined ? 12 : within.bottom - within.top;
  for (let off = 0; off <= reach; off += 4)
    for (const dy of off === 0 ? [0] : [-off, off])
      for (const left of [x + 6, x - 6 - width])
        yield { left, right: left + width, top: y + dy - ROW_PX / 2, bottom: y + dy + ROW_PX / 2 };
}

function placeValues(
  { points, series, spacing, decimals, showLinear, yAt }: Placing,
  room: Room,
): readonly ValueLabel[] {
  const labels: ValueLabel[] = [];
  for (const { name, isLimit } of series)
    for (const { point, x } of points) {
      const level = point[name];
      if (level === undefined || (isLimit && !showLinear)) continue;
      const texts = [
        { text: writeTick(level.value, decimals), isLinear: false },
        ...(showLinear && level.linear !== '' ? [{ text: level.linear, isLinear: true }] : []),
      ];
      const width = Math.max(...texts.map(({ text }) => textWidth(text, SMALL_PX)));
      const height = texts.length * ROW_PX;
      const places = around(x, yAt(level.value), width, height, isLimit || name === 'wanted');
      // Where the next mark is nearer than the label is wide, a label beside its mark would seem to be that one's.
      const box = room.place(width + 8 < spacing ? places : places.filter((place) => isCentred(place, x)));
      if (box === undefined) continue;
      const lines = texts.map((text, row) => ({ ...text, y: box.top + (row + 1) * ROW_PX - 3 }));
      labels.push({ series: name, x: (box.left + box.right) / 2, lines, box });
    }
  return labels;
}

const isCentred = ({ left, right }: Box, x: number): boolean => Math.abs((left + right) / 2 - x) < 0.5;

/** Boxes above and below a mark, the better side first, then beside it. */
function around(x: number, y: number, width: number, height: number, isAbove: boolean): readonly Box[] {
  const at = (left: number, top: number): Box => ({ left, top, right: left + width, bottom: top + height });
  const above = [x - width / 2, x - width - 2, x + 2].map((left) => at(left, y - 8 - height));
  const below = [x - width / 2, x - width - 2, x + 2].map((left) => at(left, y + 8));
  const [first, second] = isAbove ? [above, below] : [below, above];
  return [...first, ...second, at(x + 8, y - height / 2), at(x - 8 - width, y - height / 2)];
}

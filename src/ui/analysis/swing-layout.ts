/**
 * Swing bars: how far each input moves the line, to the left where it worsens it and to the right where it betters it, all on
 * one scale. Holds: the labels stand beyond the ends of the bars and within the width.
 */
import type { Direction } from '../../analysis';
import { textWidth } from '../plots/boxes';

export const SWING_HEIGHT_PX = 22;
const LABEL_PX = 11;
const BAR_TOP_PX = 4;
const GAP_PX = 4;
const HATCH_PX = 5;
const LEAST_WIDTH_PX = 150;
const MOST_WIDTH_PX = 420;

export interface SwingInput {
  readonly adverse?: number;
  readonly favourable?: number;
  readonly adverseText: string;
  readonly favourableText: string;
}

interface Bar {
  readonly x: number;
  readonly width: number;
}

export interface SwingRow {
  readonly adverse: Bar & { readonly hatch: string };
  readonly favourable: Bar;
  readonly left: { readonly x: number; readonly text: string };
  readonly right: { readonly x: number; readonly text: string };
}

export interface SwingLayout {
  readonly width: number;
  /** The line without deviation. */
  readonly middle: number;
  readonly top: number;
  readonly barHeight: number;
  readonly rows: readonly SwingRow[];
}

const finite = (value: number | undefined): number => (value !== undefined && Number.isFinite(value) ? value : 0);

export function layoutSwings(inputs: readonly SwingInput[], direction: Direction, widthPx: number): SwingLayout {
  const width = Math.max(LEAST_WIDTH_PX, Math.min(MOST_WIDTH_PX, Math.floor(widthPx)));
  const texts = inputs.flatMap(({ adverseText, favourableText }) => [adverseText, favourableText]);
  const gutter = Math.max(0, ...texts.map((text) => textWidth(text, LABEL_PX))) + GAP_PX;
  const middle = width / 2;
  const room = Math.max(8, middle - gutter);
  const most = Math.max(
    0,
    ...inputs.flatMap(({ adverse, favourable }) => [finite(adverse), finite(favourable)].map(Math.abs)),
  );
  const betters = direction === 'higher' ? 1 : -1;
  const lengthOf = (change: number | undefined): number => (most === 0 ? 0 : (betters * finite(change) * room) / most);
  const barHeight = SWING_HEIGHT_PX - 2 * BAR_TOP_PX;
  const rows = inputs.map(({ adverse, favourable, adverseText, favourableText }): SwingRow => {
    const [worse, better] = [barTo(middle, lengthOf(adverse)), barTo(middle, lengthOf(favourable))];
    const left = Math.min(worse.x, better.x);
    const right = Math.max(worse.x + worse.width, better.x + better.width);
    return {
      adverse: { ...worse, hatch: hatching(worse, barHeight) },
      favourable: better,
      left: { x: left - GAP_PX, text: adverseText },
      right: { x: right + GAP_PX, text: favourableText },
    };
  });
  return { width, middle, top: BAR_TOP_PX, barHeight, rows };
}

const barTo = (middle: number, length: number): Bar => ({
  x: Math.min(middle, middle + length),
  width: Math.abs(length),
});

/** Slanted strokes over a bar, cut at its edges. */
function hatching({ x, width }: Bar, height: number): string {
  if (width === 0) return '';
  const strokes: string[] = [];
  const bottom = BAR_TOP_PX + height;
  for (let off = HATCH_PX; off < width + height; off += HATCH_PX) {
    const cutTop = Math.max(0, off - width);
    const cutBottom = Math.max(0, height - off);
    strokes.push(
      `M${(x + off - cutTop).toFixed(1)} ${(BAR_TOP_PX + cutTop).toFixed(1)}L${(x + off - height + cutBottom).toFixed(1)} ${(bottom - cutBottom).toFixed(1)}`,
    );
  }
  return strokes.join('');
}

/**
 * Room for labels: how wide a text is at most, and the first free place for one.
 * Widths are estimated on the safe side, so that a layout needs no page to measure on.
 */

export interface Box {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** Widths of letters over the size of the type. */
const NARROW = /[ .,:;'|!()[\]/ijlIft-]/;
/** Letters as wide as they are high, of East Asian scripts and the like. */
const FULL = /[\u{2e80}-\u{10ffff}]/u;
const WIDE = /[mwMW@%×−+=≥≤]/;

/** The width of a text in the page's sans, in px; other faces that it may fall back on included. */
export function textWidth(text: string, sizePx: number): number {
  let widthEm = 0;
  for (const letter of text)
    widthEm += FULL.test(letter) ? 1.1 : NARROW.test(letter) ? 0.34 : WIDE.test(letter) ? 0.84 : 0.58;
  return widthEm * sizePx;
}

/** The text, its end left out where it is longer than so many letters. */
export const shortened = (text: string, most: number): string =>
  Array.from(text).length <= most
    ? text
    : `${Array.from(text)
        .slice(0, most - 1)
        .join('')
        .trimEnd()}…`;

export const boxesMeet = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

export const boxAround = (x: number, y: number, halfWidth: number, halfHeight: number): Box => ({
  ...{ left: x - halfWidth, right: x + halfWidth },
  ...{ top: y - halfHeight, bottom: y + halfHeight },
});

export const isWithin = (inner: Box, outer: Box): boolean =>
  inner.left >= outer.left && inner.right <= outer.right && inner.top >= outer.top && inner.bottom <= outer.bottom;

/** What stands on a drawing already, within which further boxes find their places. */
export class Room {
  private readonly taken: Box[] = [];

  constructor(readonly edge: Box) {}

  take(box: Box): void {
    this.taken.push(box);
  }

  /** Takes a straight stroke, as small boxes along it. */
  takeStroke(x1: number, y1: number, x2: number, y2: number): void {
    const pieces = Math.max(1, Math.ceil(Math.hypot(x2 - x1, y2 - y1) / 6));
    for (let i = 0; i <= pieces; i++)
      this.take(boxAround(x1 + ((x2 - x1) * i) / pieces, y1 + ((y2 - y1) * i) / pieces, 2, 2));
  }

  isFree(box: Box): boolean {
    return isWithin(box, this.edge) && this.taken.every((other) => !boxesMeet(box, other));
  }

  /** The first of the boxes that is free, taken; undefined when none is. */
  place<B extends Box>(candidates: Iterable<B>): B | undefined {
    for (const box of candidates) {
      if (!this.isFree(box)) continue;
      this.take(box);
      return box;
    }
    return undefined;
  }
}

/** Heights for things that stand one below another: as near as can be to those wished for, at least `gap` apart, within ends. */
export function spreadApart(wished: readonly number[], gap: number, top: number, bottom: number): number[] {
  const order = wished.map((_, index) => index).sort((a, b) => (wished[a] ?? 0) - (wished[b] ?? 0) || a - b);
  const placed = order.map((index) => wished[index] ?? 0);
  for (let i = 0; i < placed.length; i++)
    placed[i] = Math.max(placed[i] ?? 0, i === 0 ? top : (placed[i - 1] ?? 0) + gap);
  for (let i = placed.length - 1; i >= 0; i--)
    placed[i] = Math.min(placed[i] ?? 0, i === placed.length - 1 ? bottom : (placed[i + 1] ?? 0) - gap);
  const heights: number[] = [];
  for (const [i, index] of order.entries()) heights[index] = placed[i] ?? 0;
  return heights;
}

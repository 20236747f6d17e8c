/**
 * Placing something that floats beside an element: below it where there is room, else above; never outside the window.
 * Holds: the answer depends on the numbers given alone.
 */

/** An element's place in the window, in CSS px. */
export interface Box {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** Where something floats, and how high it may be, in CSS px. */
export interface FloatPlace {
  readonly left: number;
  readonly top: number;
  readonly maxHeight: number;
}

/** What a floating thing takes, and what it floats in, in CSS px. */
export interface FloatSizes {
  readonly width: number;
  readonly height: number;
  readonly windowWidth: number;
  readonly windowHeight: number;
}

const EDGE = 8;
const GAP = 3;

/** The place beside `anchor`. `align` says which edges are in line. */
export function placeBeside(anchor: Box, sizes: FloatSizes, align: 'left' | 'right' = 'left'): FloatPlace {
  const { width, height, windowWidth, windowHeight } = sizes;
  const wantedLeft = align === 'left' ? anchor.left : anchor.right - width;
  const left = Math.max(EDGE, Math.min(wantedLeft, windowWidth - width - EDGE));
  const below = windowHeight - anchor.bottom - GAP - EDGE;
  const above = anchor.top - GAP - EDGE;
  if (height <= below || below >= above) return { left, top: anchor.bottom + GAP, maxHeight: Math.max(below, 60) };
  const maxHeight = Math.max(above, 60);
  return { left, top: anchor.top - GAP - Math.min(height, maxHeight), maxHeight };
}
